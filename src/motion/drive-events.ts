import type { SupportMotion } from './end-motion.ts';
import type { Kick } from './forced-motion.ts';
import type { TimeHistory } from './history.ts';
import type { RecordDrive } from './record-motion.ts';

/** Instants up to a time at which a drive changes its formula; of a record at most `most` of its samples. */
export function eventsOf(
  drive: RecordDrive | null,
  parts: TimeHistory['parts'],
  until: number,
  most: number,
): number[] {
  if (drive !== null) {
    const count = Math.min(
      most,
      drive.value.length + 1,
      Math.floor((until - drive.start) / drive.interval) + 1,
    );
    return Array.from({ length: Math.max(0, count) }, (_, i) => drive.start + i * drive.interval);
  }
  return parts.flatMap((part) => [part.from, part.to]).filter((t) => t <= until);
}

/** Sudden changes of q′ up to a time. */
export function kicksUntil(motion: SupportMotion, until: number): Kick[] {
  const { record } = motion;
  if (record === null || record.kick === null) return motion.kicks.filter((kick) => kick.time <= until);
  const kicks: Kick[] = [];
  for (let i = 0; i < record.kick.length; i++) {
    const time = record.start + i * record.interval;
    if (time > until) break;
    if (record.kick[i] !== 0) kicks.push({ time, amount: record.kick[i] });
  }
  return kicks;
}

/** Largest rate of a drive's waves, rad/s. */
export function quickestOf(parts: TimeHistory['parts']): number {
  let rate = 0;
  for (const part of parts) {
    if (part.kind === 'wave')
      for (const forcing of part.forcings) rate = Math.max(rate, Math.abs(forcing.rate.im));
  }
  return rate;
}

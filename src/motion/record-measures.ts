import type { HistoryMeasures } from './history-measures.ts';
import type { RecordDrive } from './record-motion.ts';

/** Measures of a long record, all of it (a longer span than needed only widens). Cost O(samples). */
export function measureRecord(drive: RecordDrive): HistoryMeasures {
  const { value, slope, curve, kick, interval: h, after } = drive;
  const count = value.length;
  let variation = 0;
  let slopeVariation = 0;
  let largest = 0;
  let largestRate = 0;
  let reached = 0;
  let before = 0;
  for (let i = 0; i < count; i++) {
    const end = slope[i] + (curve ? h * curve[i] : 0);
    const rate = Math.max(Math.abs(slope[i]), Math.abs(end));
    // joints are continuous in p but for rounding and for kicks of y′ under drag
    variation += rate * h + (i > 0 ? Math.abs(value[i] - reached) : 0);
    slopeVariation += (i > 0 ? Math.abs(slope[i] - before) : 0) + Math.abs(end - slope[i]);
    largest = Math.max(largest, Math.abs(value[i]), Math.abs(value[i] + rate * h));
    largestRate = Math.max(largestRate, rate);
    reached = value[i] + h * (slope[i] + (curve ? 0.5 * h * curve[i] : 0));
    before = end;
  }
  const jumps = [
    { value: Math.abs(value[0]), slope: Math.abs(slope[0]) },
    { value: Math.abs(reached - after), slope: Math.abs(before) },
  ];
  return {
    jumps,
    variation,
    slopeVariation,
    largest,
    largestRate,
    weighedKicks: (gamma) => {
      const fade = Math.exp(-gamma * h);
      let held = 0;
      let most = 0;
      for (const one of kick ?? []) {
        held = held * fade + Math.abs(one);
        most = Math.max(most, held);
      }
      return most;
    },
    harmonic: null,
    weighed: (gamma, onValue, onSlope) =>
      gamma > 0
        ? weighRecord(drive, gamma, onValue, onSlope)
        : // what never fades only grows, so the supremum is the whole
          jumps.reduce((sum, jump) => sum + Math.hypot(onValue * jump.value, onSlope * jump.slope), 0) +
          onValue * variation +
          onSlope * slopeVariation,
  };
}

/** One recurrence a sample: what was gathered fades by e^{−γh}, an interval's change by its mean weight. */
function weighRecord(drive: RecordDrive, gamma: number, onValue: number, onSlope: number): number {
  const { value, slope, curve, interval: h, after } = drive;
  const fade = Math.exp(-gamma * h);
  const mean = gamma * h > 1e-8 ? -Math.expm1(-gamma * h) / (gamma * h) : 1;
  let held = Math.hypot(onValue * value[0], onSlope * slope[0]);
  let most = held;
  let before = slope[0];
  let reached = value[0];
  for (let i = 0; i < value.length; i++) {
    const end = slope[i] + (curve ? h * curve[i] : 0);
    const joint = i > 0 ? onSlope * Math.abs(slope[i] - before) + onValue * Math.abs(value[i] - reached) : 0;
    const rate = Math.max(Math.abs(slope[i]), Math.abs(end));
    held += joint;
    if (held > most) most = held;
    held = held * fade + (onValue * rate * h + onSlope * Math.abs(end - slope[i])) * mean;
    if (held > most) most = held;
    reached = value[i] + h * (slope[i] + (curve ? 0.5 * h * curve[i] : 0));
    before = end;
  }
  return Math.max(most, held + Math.hypot(onValue * (reached - after), onSlope * before));
}

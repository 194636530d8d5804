import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import type { Load, Member } from '../spec/types.ts';
import { checkPosition, endAt, type Span } from './check-position.ts';
import { checkShape } from './check-shape.ts';

/**
 * What in a load does not fit together or not to the member; end motions stand in
 * `check-end-motions.ts`.
 *
 * @param pointer where the load stands
 * @param span extent of the member, where it is known
 * @param ends ends of the member, where they are known
 * @param latest end of the last sampled time, gauge time included, s; null where it is not known
 */
export function checkLoad(
  load: Load,
  pointer: string,
  span: Span | null,
  ends: Member['ends'] | null,
  latest: number | null,
): FaultRecord[] {
  switch (load.type) {
    case 'point-force':
      return checkForcePosition(load.at, `${pointer}/at`, span, ends);
    case 'distributed-force':
      return checkShape(load.profile, `${pointer}/profile`, span, ends, 'force-in-profile');
    case 'moving-force': {
      const { speed, start } = load;
      if (speed === 0) return [faultRecord('moving-force-at-rest', `${pointer}/speed`)];
      if (latest === null || start <= latest) return [];
      return [faultRecord('moving-force-misses', `${pointer}/start`, { start, end: latest })];
    }
    case 'body-force':
    case 'end-motion':
      return [];
  }
}

/** A force at a point acts on the member, and where it can move something. */
export function checkForcePosition(
  at: number,
  pointer: string,
  span: Span | null,
  ends: Member['ends'] | null,
): FaultRecord[] {
  const end = endAt(at, span);
  if (end !== null && ends?.[end].type === 'fixed') {
    return [faultRecord('force-at-fixed-end', pointer, { at, end })];
  }
  return checkPosition(at, pointer, span);
}

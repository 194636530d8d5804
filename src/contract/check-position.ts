import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import { samePlace } from '../members/node-layout.ts';

/** Extent of a member in m. */
export interface Span {
  readonly length: number;
  /** Largest position that still means the far end. */
  readonly limit: number;
}

export function spanOf(length: number): Span {
  return { length, limit: length * (1 + samePlace) };
}

/** A fault where a position (0 or more) lies beyond the member. */
export function checkPosition(at: number, pointer: string, span: Span | null): FaultRecord[] {
  if (span === null || at <= span.limit) return [];
  return [faultRecord('position-outside', pointer, { at, length: span.length })];
}

/** The end at which a position stands, null inside the member. */
export function endAt(at: number, span: Span | null): 'near' | 'far' | null {
  if (at === 0) return 'near';
  return at === span?.length ? 'far' : null;
}

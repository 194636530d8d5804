import { expect } from 'vitest';
import { solveModes } from '../../src/solutions/modes.ts';
import { compareWithDecimal } from './decimal.ts';
import type { PlainMember } from './plain-member.ts';
import { modesRequest } from './requests.ts';

/** Frequencies (rad/s) and enclosures, the rigid-body modes first. */
export function solveFrequencies(
  member: PlainMember,
  count: number,
): { omega: number[]; enclosures: [number, number][] } {
  const { modes } = solveModes(modesRequest(member, count));
  modes.forEach((mode, i) => expect(mode.order).toBe(i + 1));
  return {
    omega: modes.map((mode) => mode.angularFrequency),
    enclosures: modes.map((mode) => mode.enclosure),
  };
}

/**
 * Inputs of the tables are decimals; their rounding to double moves a frequency by a few 1e-16 relative,
 * the solver may add some ulp a segment. 1e-12 is the demand.
 */
const RELATIVE = 1e-12;

export function expectClose(value: number, expected: number, relative = RELATIVE): void {
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(relative * Math.abs(expected));
}

/** A certified enclosure is wide by rounding only: some ulp of the phase a segment, 1e-12 at the very most. */
export function expectEnclosed([low, high]: [number, number], decimal: string): void {
  expect(compareWithDecimal(low, decimal)).not.toBe(1);
  expect(compareWithDecimal(high, decimal)).not.toBe(-1);
  expect(high - low).toBeLessThanOrEqual(1e-12 * high);
}

import { describe, expect, it } from 'vitest';
import { entryMember } from '../support/entries.ts';
import { expectClose, expectEnclosed, solveFrequencies } from '../support/frequencies.ts';
import {
  enclosedFrequencies,
  plainMember,
  randomMemberEntries,
  referenceEntries,
} from '../support/reference.ts';

const enclosed = enclosedFrequencies();
const uniform = referenceEntries('uniform-ends').filter(
  (entry) => entry.expected.rigid_body_modes !== undefined,
);
const piecewise = referenceEntries('piecewise-members').filter(
  (entry) => entry.inputs.segments !== undefined,
);

describe('frequencies agree with the tables to 1e-12 and their enclosures hold the 32-digit values', () => {
  it.each([...uniform, ...piecewise].map((entry) => [entry.id, entry] as const))('%s', (id, entry) => {
    const expected: number[] = entry.expected.omega ?? entry.expected.z;
    const rigid: number = entry.expected.rigid_body_modes;
    const { omega, enclosures } = solveFrequencies(entryMember(entry), expected.length + rigid);
    expect(omega.length).toBe(expected.length + rigid);
    for (let i = 0; i < rigid; i++) expect(omega[i]).toBe(0);
    expected.forEach((value, i) => expectClose(omega[rigid + i], value));
    const decimals = enclosed.get(id);
    expect(decimals).toHaveLength(expected.length);
    decimals?.forEach((decimal, i) => expectEnclosed(enclosures[rigid + i], decimal));
  });
});

describe('frequencies of random members', () => {
  it.each(randomMemberEntries().map((entry) => [entry.id, entry] as const))('%s', (_, entry) => {
    const highest = entry.omega[entry.omega.length - 1][0];
    const { omega, enclosures } = solveFrequencies(plainMember(entry.member), highest);
    if (entry.rigid_body_modes === 1) expect(omega[0]).toBe(0);
    for (const [order, decimal] of entry.omega) {
      expectClose(omega[order - 1], Number(decimal));
      expectEnclosed(enclosures[order - 1], decimal);
    }
  });
});

describe('pairs of close frequencies', () => {
  const pairs = piecewise.flatMap((entry) =>
    ((entry.expected.close_pairs ?? []) as { pair: [number, number]; relative_gap: number }[]).map(
      (pair) => [entry.id, pair.pair, pair.relative_gap, entry] as const,
    ),
  );

  it.each(pairs)('%s %s: the relative gap is %s', (_, [first, second], gap, entry) => {
    const { omega } = solveFrequencies(entryMember(entry), second);
    const found = (omega[second - 1] - omega[first - 1]) / omega[first - 1];
    // Each frequency carries its own rounding, about 2e-15 of itself; b-05b knows its input to 2e-16 of 1e-12.
    expect(Math.abs(found - gap)).toBeLessThanOrEqual(4e-15 + 1e-5 * gap);
    expect(found).toBeGreaterThanOrEqual(0);
  });
});

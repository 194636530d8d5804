import { describe, expect, it } from 'vitest';
import { solveModes } from '../../src/solutions/modes.ts';
import type { Mode } from '../../src/spec/types.ts';
import { entryMember } from '../support/entries.ts';
import { travelTime } from '../support/plain-member.ts';
import { referenceEntries, referenceEntry } from '../support/reference.ts';
import { modesRequest, requestMember } from '../support/requests.ts';

/** Small terms first. */
function sumOf(values: readonly number[]): number {
  return values.reduceRight((total, value) => total + value, 0);
}

/**
 * Σ 1/ω² over all modes is the trace of the flexibility (∫ρ G dx + ΣM G), known without any mode. A missed or
 * doubled frequency shows at once.
 */
describe('sums over the modes', () => {
  const piecewise = referenceEntries('piecewise-members').filter(
    (entry) => entry.expected.partial_sum_20_modes !== undefined,
  );

  it.each(piecewise.map((entry) => [entry.id, entry] as const))('Σ 1/ω² of %s closes', (_, entry) => {
    const member = entryMember(entry);
    const rigid: number = entry.expected.rigid_body_modes;
    const count = 4000;
    const { modes } = solveModes(modesRequest(member, count + rigid));
    const squares = modes.slice(rigid).map((mode) => mode.angularFrequency ** -2);
    const twenty: number = entry.expected.partial_sum_20_modes;
    expect(Math.abs(sumOf(squares.slice(0, 20)) - twenty)).toBeLessThan(1e-12 * twenty);
    const all: number = entry.expected.sum_over_all_modes_1_over_omega2;
    const rest = all - sumOf(squares);
    // With all nodes held each segment has floor(κL/π) frequencies below ω, and releasing a node adds at
    // most one: (n − nodes) π/T ≤ ω_n ≤ √(((n + segments) π/T)² + max s/ρ), T the travel time.
    const nodes = member.segments.length + 1;
    const scale = (travelTime(member) / Math.PI) ** 2;
    const rounding = 1e-12 * all;
    expect(rest).toBeGreaterThan(-rounding);
    expect(rest).toBeLessThan(scale / (count - nodes) + rounding);
    const stiffest = Math.max(
      ...member.segments.map((segment) => (segment.inertia > 0 ? segment.foundation / segment.inertia : 0)),
    );
    const above = 1 / (1 / scale + stiffest / count ** 2);
    expect(rest).toBeGreaterThan(above / (count + nodes + 1) - rounding);
  });

  it.each(['h-06', 'h-07', 'h-08'])('partial sums, flexibilities and counts of %s', (id) => {
    const entry = referenceEntry('truncation', id);
    const member = entryMember(entry);
    const { expected } = entry;
    const pairs = expected.flexibility as { x: number; y: number; first_N: Record<string, number> }[];
    const positions = [...new Set(pairs.flatMap(({ x, y }) => [x, y]))].toSorted((a, b) => a - b);
    const { modes } = solveModes(modesRequest(member, 100, { positions, quantities: ['displacement'] }));
    for (const [count, value] of Object.entries(
      expected.partial_sums_1_over_omega2 as Record<string, number>,
    )) {
      const sum = sumOf(modes.slice(0, Number(count)).map((mode) => mode.angularFrequency ** -2));
      expect(Math.abs(sum - value)).toBeLessThan(1e-11 * value);
    }
    for (const [count, value] of Object.entries(
      expected.partial_sums_1_over_omega4 as Record<string, number>,
    )) {
      const sum = sumOf(modes.slice(0, Number(count)).map((mode) => mode.angularFrequency ** -4));
      expect(Math.abs(sum - value)).toBeLessThan(1e-11 * value);
      expect(sum).toBeLessThan(expected.sum_1_over_omega4 * (1 + 1e-13));
    }
    for (const { x, y, first_N: sums } of pairs) {
      for (const [count, value] of Object.entries(sums)) {
        const at = (mode: Mode, position: number): number =>
          mode.shape?.displacement?.[positions.indexOf(position)] ?? NaN;
        const terms = modes
          .slice(0, Number(count))
          .map((mode) => (at(mode, x) * at(mode, y)) / mode.angularFrequency ** 2);
        const sum = sumOf(terms);
        // Terms of both signs when x ≠ y: measured against the sum of their sizes, which is of the order of G.
        expect(Math.abs(sum - value)).toBeLessThan(1e-11 * value);
      }
    }
    for (const { omega, modes_below: below } of expected.mode_counts as {
      omega: number;
      modes_below: number;
    }[]) {
      const answer = solveModes({
        member: requestMember(member),
        series: { upTo: omega / (2 * Math.PI) },
        energyShares: false,
      });
      expect(answer.modes).toHaveLength(below);
      expect(answer.convergence.modesFound).toBe(below);
    }
  });
});

import { describe, expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { ResponsesAnswer } from '../../src/spec/types.ts';
import { entryInitial, entryMember } from '../support/entries.ts';
import { referenceEntry, type ReferenceEntry } from '../support/reference.ts';
import { responsesRequest } from '../support/requests.ts';

interface Row {
  N: number;
  u_N: number[];
  error_u: number[];
  v_N: number[];
  energy_first_N: number;
  tail_energy: number;
  tail_energy_fraction: number;
  flexibility?: { x: number; y?: number; residual: number }[];
}

function solve(
  entry: ReferenceEntry,
  modes: number,
): { answer: ResponsesAnswer; at: (x: number, t: number) => [number, number] } {
  const points = entry.inputs.points_x_t as [number, number][];
  const flexibilities = (entry.expected.rows[0].flexibility ?? []) as { x: number }[];
  const positions = [...new Set([...points.map(([x]) => x), ...flexibilities.map(({ x }) => x)])].toSorted(
    (a, b) => a - b,
  );
  const times = [...new Set(points.map(([, t]) => t))].toSorted((a, b) => a - b);
  const answer = solveResponses(
    responsesRequest({
      member: entryMember(entry),
      initial: entryInitial(entry),
      modes,
      positions,
      times,
      quantities: ['displacement', 'velocity'],
    }),
  );
  return { answer, at: (x, t) => [times.indexOf(t), positions.indexOf(x)] };
}

const cases = ['h-01', 'h-02', 'h-03', 'h-04', 'h-05'].flatMap((id) =>
  (referenceEntry('truncation', id).expected.rows as Row[]).map((row) => [id, row.N, row] as const),
);

/**
 * Truncated sums of mode N carry the phase error ω_N t·(some eps); ω_100 t stays below 400, so 1e-11 of the peak
 * (the demand of the tables) leaves room.
 */
const RELATIVE = 1e-11;

describe('truncated sums and tail energies agree with the tables', () => {
  it.each(cases)('%s with %i modes', (id, modes, row) => {
    const entry = referenceEntry('truncation', id);
    const { answer, at } = solve(entry, modes);
    const points = entry.inputs.points_x_t as [number, number][];
    const { displacement, velocity } = answer.fields;
    const exact = entry.expected.u_exact as number[];
    const peak = Math.max(...exact.map(Math.abs), ...row.u_N.map(Math.abs));
    const peakVelocity = Math.max(...row.v_N.map(Math.abs));
    points.forEach(([x, t], i) => {
      const [time, position] = at(x, t);
      expect(Math.abs(displacement!.values[time][position] - row.u_N[i])).toBeLessThan(RELATIVE * peak);
      // The velocity of data with kinks is the cut series itself.
      expect(velocity!.boundKind).toBe('rms');
      expect(Math.abs(velocity!.values[time][position] - row.v_N[i])).toBeLessThan(RELATIVE * peakVelocity);
      // The true truncation error is printed beside it: the certified bound covers it.
      expect(Math.abs(row.error_u[i])).toBeLessThanOrEqual(displacement!.bound![position]);
    });
    const { energy } = answer.convergence;
    const total: number = entry.expected.total_energy;
    expect(Math.abs(energy.total - total)).toBeLessThan(1e-13 * total);
    expect(Math.abs(energy.captured - row.energy_first_N)).toBeLessThan(RELATIVE * total);
    expect(Math.abs(energy.capturedFraction - row.energy_first_N / total)).toBeLessThan(RELATIVE);
    // The tail is an upper bound: the true tail and a rounding floor of the total, no more.
    expect(energy.tail).toBeGreaterThanOrEqual(row.tail_energy * (1 - RELATIVE));
    expect(energy.tail - row.tail_energy).toBeLessThan(1e-10 * total);
  });

  it('the bound is √(2 E_tail ΔG(x)) with the tabulated tail energy and flexibility, or smaller', () => {
    for (const [id, modes, row] of cases) {
      if (row.flexibility === undefined) continue;
      const { answer } = solve(referenceEntry('truncation', id), modes);
      const positions = Array.from(answer.fields.positions);
      for (const { x, y = x, residual } of row.flexibility) {
        if (x !== y) continue;
        const bound = answer.fields.displacement!.bound![positions.indexOf(x)];
        const formula = Math.sqrt(2 * row.tail_energy * residual);
        expect(bound).toBeLessThan(formula * (1 + 1e-6));
        // A form for smooth data may be smaller; these data are not smooth.
        expect(bound).toBeGreaterThan(formula * 0.999);
      }
    }
  });
});

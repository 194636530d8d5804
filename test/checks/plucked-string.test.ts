import { describe, expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { PlainMember } from '../support/plain-member.ts';
import { responsesRequest } from '../support/requests.ts';

const LENGTH = 2;
const TENSION = 900;
const DENSITY = 0.25;

const string: PlainMember = {
  segments: [{ length: LENGTH, stiffness: TENSION, inertia: DENSITY, foundation: 0 }],
  masses: [0, 0],
  springs: [0, 0],
  nearFixed: true,
  farFixed: true,
};

/** d'Alembert: half the odd, 2L-periodic extension of the triangle going either way. */
function exactPluck(at: number, height: number): (x: number, t: number) => number {
  const speed = Math.sqrt(TENSION / DENSITY);
  const triangle = (x: number): number =>
    x <= at ? (height * x) / at : (height * (LENGTH - x)) / (LENGTH - at);
  const extended = (x: number): number => {
    const inside = x - 2 * LENGTH * Math.floor(x / (2 * LENGTH));
    return inside <= LENGTH ? triangle(inside) : -triangle(2 * LENGTH - inside);
  };
  return (x, t) => (extended(x - speed * t) + extended(x + speed * t)) / 2;
}

/**
 * The bound over the largest true error in a whole period stays below 3, at every station and over the member.
 * With 5 modes of a pull at mid-span mode 6, which is not excited, still counts in the flexibility: from 20 modes
 * on that weighs little at a single station.
 */
describe('the displacement bound on a plucked string', () => {
  const places = [0.05, 0.3, 0.5, 0.6180339887, 1, 1.37, 1.9];
  const cases = places.flatMap((at) => [1, 5, 20, 40, 100, 400].map((modes) => [at, modes] as const));

  it.each(cases)('pulled at %s m, %i modes: at most 3 times the worst error, never below it', (at, modes) => {
    const height = 0.01;
    const exact = exactPluck(at, height);
    const positions = [0.02, 0.11, 0.3, 0.5, 0.61803, 0.9, 1, 1.2345, 1.5, 1.77, 1.98];
    if (!positions.includes(at)) positions.push(at);
    positions.sort((a, b) => a - b);
    const speed = Math.sqrt(TENSION / DENSITY);
    const period = (2 * LENGTH) / speed;
    // The error is a cusp where a kink passes: the instants of all passages, and 1,000 others.
    const passages = positions.flatMap((x) => [
      Math.abs(x - at) / speed,
      (x + at) / speed,
      (2 * LENGTH - x - at) / speed,
      period - Math.abs(x - at) / speed,
    ]);
    const times = [...passages, ...Array.from({ length: 1000 }, (_, i) => (i / 1000) * period)];
    const { fields, peaks, convergence } = solveResponses(
      responsesRequest({
        member: string,
        initial: { displacement: { type: 'pull', at, amplitude: height } },
        modes,
        positions,
        times,
        quantities: ['displacement'],
      }),
    );
    const { values, bound } = fields.displacement!;
    let worstOfAll = 0;
    positions.forEach((x, column) => {
      let worst = 0;
      times.forEach((t, row) => {
        worst = Math.max(worst, Math.abs(values[row][column] - exact(x, t)));
      });
      // Rounding of the oracle: some eps of the height.
      expect(worst).toBeLessThanOrEqual(bound![column] + 1e-15 * height);
      worstOfAll = Math.max(worstOfAll, worst);
      if (modes >= 20) expect(bound![column] / worst).toBeLessThan(3);
    });
    expect(convergence.displacementBound).toBeGreaterThanOrEqual(worstOfAll);
    expect(convergence.displacementBound! / worstOfAll).toBeLessThan(3);
    // Nothing moves beyond the ceiling, nor beyond the certified upper limit of the peak.
    expect(peaks.displacement!.upper!).toBeGreaterThanOrEqual(height);
    expect(convergence.ceiling).toBeGreaterThanOrEqual(height);
  });
});

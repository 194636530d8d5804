import { describe, expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { PlainMember } from '../support/plain-member.ts';
import { responsesRequest } from '../support/requests.ts';

/** L = 1, c = 1: ω_n = nπ, and cos(nπt) is known at any time from t mod 2, which a double holds exactly. */
const string: PlainMember = {
  segments: [{ length: 1, stiffness: 4, inertia: 4, foundation: 0 }],
  masses: [0, 0],
  springs: [0, 0],
  nearFixed: true,
  farFixed: true,
};

describe('a half-sine followed over 1e8 periods', () => {
  it.each([1, 3, 7])('stays within its bounds with %i half-waves', (halfWaves) => {
    const amplitude = 0.01;
    const positions = [0.1, 0.25, 0.5, 0.8];
    const times = [0, 1e2, 1e4, 1e6, 1e7, 1e8, 2e8].flatMap((periods) =>
      [0, 0.125, 0.3, 0.71].map((part) => 2 * periods + 2 * part),
    );
    for (const modes of [1, 7, 40]) {
      const { fields, peaks, convergence } = solveResponses(
        responsesRequest({
          member: string,
          initial: { displacement: { type: 'half-sine', amplitude, halfWaves } },
          modes,
          positions,
          times,
          quantities: ['displacement', 'velocity', 'force', 'acceleration'],
        }),
      );
      const omega = halfWaves * Math.PI;
      times.forEach((t, row) => {
        const phase = halfWaves * Math.PI * (t % 2);
        positions.forEach((x, column) => {
          const shape = Math.sin(halfWaves * Math.PI * x);
          const slope = halfWaves * Math.PI * Math.cos(halfWaves * Math.PI * x);
          const exact = {
            displacement: amplitude * shape * Math.cos(phase),
            velocity: -amplitude * omega * shape * Math.sin(phase),
            force: 4 * amplitude * slope * Math.cos(phase),
            acceleration: -amplitude * omega ** 2 * shape * Math.cos(phase),
          };
          for (const quantity of ['displacement', 'velocity', 'force', 'acceleration'] as const) {
            const field = fields[quantity]!;
            expect(field.boundKind).toBe('pointwise');
            const size =
              amplitude *
              { displacement: 1, velocity: omega, force: 4 * omega, acceleration: omega ** 2 }[quantity];
            // The oracle rounds its phase to some eps.
            expect(Math.abs(field.values[row][column] - exact[quantity])).toBeLessThanOrEqual(
              field.bound![column] + 4e-15 * halfWaves * size,
            );
            expect(Math.abs(exact[quantity])).toBeLessThanOrEqual(peaks[quantity]!.upper! * (1 + 1e-14));
          }
        });
      });
      if (modes >= halfWaves) {
        // Kept fully: what is left is the rounding of the phase ωt, some 50 eps of it, and no more.
        const phase = omega * times[times.length - 1];
        expect(Math.max(...Array.from(fields.displacement!.bound!))).toBeLessThan(
          100 * Number.EPSILON * phase * amplitude,
        );
        expect(convergence.energy.capturedFraction).toBeCloseTo(1, 12);
      }
    }
  });
});

import { expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import { uniformMember } from '../support/forced-requests.ts';
import { responsesRequest } from '../support/requests.ts';

it('a force that creeps over a string gives its influence line, with a single mode too', () => {
  // T = 8, ρ = 2: c = 2 m/s; at v = c/1000 the dynamic part is of order (v/c)² P
  const member = uniformMember(3, 8, 2, true);
  const speed = 0.002;
  const positions = [0.4, 1.1, 2.5];
  const times = [300, 900, 1400];
  for (const modes of [1, 40]) {
    const answer = solveResponses({
      ...responsesRequest({
        member,
        initial: {},
        modes,
        positions,
        times,
        quantities: ['force'],
        gaugeTime: 20,
      }),
      loads: [{ type: 'moving-force', force: 5, speed, start: 0 }],
    });
    times.forEach((t, j) => {
      positions.forEach((x, q) => {
        const z = speed * t;
        // transverse force of a taut string under a force at z: P (L − z)/L before it, −P z/L after it
        const expected = x <= z ? (5 * (3 - z)) / 3 : (-5 * z) / 3;
        const { values, bound } = answer.fields.force!;
        expect(Math.abs(values[j][q] - expected)).toBeLessThan(1e-2);
        expect(Math.abs(values[j][q] - expected)).toBeLessThan(bound![q] + 1e-4);
      });
    });
  }
});

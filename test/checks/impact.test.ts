import { describe, expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { PlainMember } from '../support/plain-member.ts';
import { referenceEntries } from '../support/reference.ts';
import { responsesRequest } from '../support/requests.ts';
import { StruckBar } from '../support/struck-bar.ts';

/** A steel pile or bar: EA 84 MN, 15.7 kg/m, 1.5 m; the exact solution scales with L/c and E V₀/c. */
const LENGTH = 1.5;
const STIFFNESS = 8.4e7;
const INERTIA = 15.7;
const SPEED = Math.sqrt(STIFFNESS / INERTIA);
const STRIKE = 4;

function bar(massRatio: number): PlainMember {
  return {
    segments: [{ length: LENGTH, stiffness: STIFFNESS, inertia: INERTIA, foundation: 0 }],
    masses: [0, massRatio * INERTIA * LENGTH],
    springs: [0, 0],
    nearFixed: true,
    farFixed: false,
  };
}

const ratios = referenceEntries('exact-fields')
  .filter((entry) => /^d-2\d$/.test(entry.id))
  .map((entry) => entry.inputs.mass_ratio as number);

/** St. Venant's impact: gauge averages of the force against the exact piecewise exponentials, at ends and inside. */
describe('impact of a mass on a fixed bar', () => {
  const gauges = [0.02, 0.1, 0.5];
  const cases = ratios.flatMap((ratio) =>
    [40, 200, 1000].flatMap((modes) => gauges.map((tau) => [ratio, modes, tau] as const)),
  );

  it.each(cases)(
    'mass ratio %s, %i modes, gauge %s L/c: force averages within their bound',
    (ratio, modes, gauge) => {
      const unit = LENGTH / SPEED;
      const peakForce = (STIFFNESS * STRIKE) / SPEED;
      const times = Array.from({ length: 97 }, (_, i) => (0.13 + 0.11 * i) * unit);
      const positions = [0, 0.3 * LENGTH, 0.5 * LENGTH, LENGTH];
      const { fields, peaks } = solveResponses(
        responsesRequest({
          member: bar(ratio),
          initial: { massVelocities: [{ at: LENGTH, velocity: -STRIKE }] },
          modes,
          positions,
          times,
          quantities: ['force', 'displacement', 'velocity'],
          gaugeTime: gauge * unit,
        }),
      );
      const exact = new StruckBar(ratio, 13);
      const { force, displacement, velocity } = fields;
      expect(force!.boundKind).toBe('gauge-average');
      times.forEach((time, row) => {
        const from = Math.max(0, time / unit - gauge / 2);
        positions.forEach((x, column) => {
          const average = -peakForce * exact.averageStress(x / LENGTH, from, from + gauge);
          expect(Math.abs(force!.values[row][column] - average)).toBeLessThanOrEqual(
            force!.bound![column] + 1e-11 * peakForce,
          );
          expect(Math.abs(average)).toBeLessThanOrEqual(peaks.force!.upper! * (1 + 1e-11));
        });
        const last = positions.length - 1;
        const moved = -STRIKE * unit * exact.massDisplacement(time / unit);
        expect(Math.abs(displacement!.values[row][last] - moved)).toBeLessThanOrEqual(
          displacement!.bound![last] + 1e-13 * STRIKE * unit,
        );
        const speed =
          (-STRIKE * (exact.massDisplacement(from + gauge) - exact.massDisplacement(from))) / gauge;
        expect(Math.abs(velocity!.values[row][last] - speed)).toBeLessThanOrEqual(
          velocity!.bound![last] + 1e-11 * STRIKE,
        );
      });
      // A wide gauge and many modes must come to a number that serves: below a hundredth of the impact force.
      if (modes === 1000 && gauge === 0.5)
        expect(Math.max(...Array.from(force!.bound!))).toBeLessThan(0.01 * peakForce);
    },
  );

  it('the peak of the fixed end approaches 2(1 + e⁻²) for equal masses (Timoshenko & Goodier, from memory)', () => {
    const unit = LENGTH / SPEED;
    const peakForce = (STIFFNESS * STRIKE) / SPEED;
    const gauge = 0.02;
    const { fields, peaks } = solveResponses(
      responsesRequest({
        member: bar(1),
        initial: { massVelocities: [{ at: LENGTH, velocity: -STRIKE }] },
        modes: 3000,
        positions: [0],
        times: Array.from({ length: 400 }, (_, i) => (i / 400) * 4 * unit),
        quantities: ['force'],
        gaugeTime: gauge * unit,
      }),
    );
    const formula = 2 * (1 + Math.exp(-2));
    const found = Math.abs(peaks.force!.value) / peakForce;
    const bound = fields.force!.bound![0] / peakForce;
    // Behind the front the stress falls as e^{−τ}: an average over 0.02 loses half of that at most twice over.
    expect(found).toBeLessThanOrEqual(formula + bound);
    expect(found).toBeGreaterThan(formula * (1 - 2 * gauge) - bound);
    expect(peaks.force!.upper! / peakForce).toBeGreaterThanOrEqual(formula * (1 - gauge));
  });
});

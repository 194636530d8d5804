import { describe, expect, it } from 'vitest';
import { entryMember } from '../support/entries.ts';
import { initialState, shapeFunction } from '../support/initial-shapes.ts';
import { plainMember, randomMemberEntries, referenceEntries, referenceEntry } from '../support/reference.ts';
import { StruckBar } from '../support/struck-bar.ts';
import { TravellingWaves } from '../support/travelling-waves.ts';
import { wavesOfEntry } from '../support/wave-entries.ts';
import { countBelow, countWithNodesHeld } from '../support/wittrick-williams.ts';

/** The oracles of test/support are held to the reference tables before anything else is held to them. */

function peak(values: readonly number[]): number {
  return Math.max(...values.map(Math.abs));
}

const waveEntries = referenceEntries('exact-fields').filter((entry) => /^d-0\d$/.test(entry.id));

describe('travelling waves', () => {
  it.each(waveEntries.map((entry) => [entry.id, entry] as const))(
    'give displacement, velocity and force of %s',
    (_, entry) => {
      const points = entry.inputs.points_x_t as [number, number][];
      const waves = wavesOfEntry(entry, Math.max(...points.map(([, t]) => t)));
      const { u, v, force } = entry.expected as Record<string, number[]>;
      points.forEach(([x, t], i) => {
        // Rounding of some hundred reflections, each a few eps of the peak.
        expect(Math.abs(waves.displacement(x, t) - u[i])).toBeLessThan(2e-13 * peak(u));
        expect(Math.abs(waves.velocity(x, t) - v[i])).toBeLessThan(2e-13 * peak(v));
        expect(Math.abs(waves.force(x, t) - force[i])).toBeLessThan(2e-13 * peak(force));
      });
    },
  );

  it('give the motion of a mass on a string struck by a hammer (d-30)', () => {
    const entry = referenceEntry('exact-fields', 'd-30');
    const member = entryMember(entry);
    const waves = new TravellingWaves(
      member,
      initialState(member, [], [], [undefined, entry.inputs.V_mass]),
      0.03,
    );
    (entry.inputs.t as number[]).forEach((t, i) => {
      expect(waves.displacement(0.8, t)).toBeCloseTo(entry.expected.u_mass[i], 15);
      expect(waves.velocity(0.8, t)).toBeCloseTo(entry.expected.v_mass[i], 13);
    });
    const { x, t } = entry.inputs.field_point;
    expect(waves.displacement(x, t)).toBeCloseTo(entry.expected.u_field, 15);
  });
});

describe('struck bar', () => {
  const impacts = referenceEntries('exact-fields').filter((entry) => /^d-2\d$/.test(entry.id));

  it.each(impacts.map((entry) => [entry.inputs.mass_ratio as number, entry] as const))(
    'gives the stresses at mass ratio %s',
    (ratio, entry) => {
      const bar = new StruckBar(ratio, 12);
      const { expected } = entry;
      (expected.tau as number[]).forEach((tau, i) => {
        expect(bar.fixedEndStress(tau)).toBeCloseTo(expected.fixed_end_stress_ratio[i], 12);
        expect(bar.struckEndStress(tau)).toBeCloseTo(expected.struck_end_stress_ratio[i], 12);
        expect(bar.massVelocity(tau)).toBeCloseTo(expected.mass_velocity_ratio[i], 12);
      });
      (expected.mass_displacement_ratio as number[]).forEach((value, i) => {
        expect(bar.massDisplacement(expected.tau[i])).toBeCloseTo(value, 12);
      });
    },
  );

  it.each([0.5, 1, 5])('agrees with travelling waves at mass ratio %s, averages included', (ratio) => {
    const member = {
      segments: [{ length: 1, stiffness: 1, inertia: 1, foundation: 0 }],
      masses: [0, ratio],
      springs: [0, 0],
      nearFixed: true,
      farFixed: false,
    };
    const waves = new TravellingWaves(member, initialState(member, [], [], [undefined, -1]), 12, 4);
    const bar = new StruckBar(ratio, 12);
    for (let i = 0; i < 60; i++) {
      const tau = 0.0713 + 0.197 * i;
      expect(-waves.velocity(1, tau)).toBeCloseTo(bar.massVelocity(tau), 12);
      expect(-waves.force(1, tau)).toBeCloseTo(bar.struckEndStress(tau), 12);
      expect(-waves.force(0, tau)).toBeCloseTo(bar.fixedEndStress(tau), 12);
      expect(-waves.displacement(1, tau)).toBeCloseTo(bar.massDisplacement(tau), 12);
      expect(-waves.forceAverage(0.3, tau, tau + 0.2)).toBeCloseTo(
        bar.averageStress(0.3, tau, tau + 0.2),
        12,
      );
      // Impulse and momentum: the average contact force is M (v(t₀) − v(t₁))/τ.
      const impulse = ratio * (bar.massVelocity(tau) - bar.massVelocity(tau + 0.2));
      expect(-waves.forceAverage(1, tau, tau + 0.2)).toBeCloseTo(impulse / 0.2, 11);
    }
  });
});

describe('count of frequencies', () => {
  it('brackets every frequency of the random members by 1e-9', () => {
    for (const { member, omega } of randomMemberEntries()) {
      const plain = plainMember(member);
      for (const [order, text] of omega) {
        const value = Number(text);
        expect(countBelow(plain, value * (1 - 1e-9))).toBe(order - 1);
        expect(countBelow(plain, value * (1 + 1e-9))).toBe(order);
        const { held, free } = countWithNodesHeld(plain, value * (1 + 1e-9));
        expect(held).toBeLessThanOrEqual(order);
        expect(held + free).toBeGreaterThanOrEqual(order);
      }
    }
  });
});

describe('static pull of the oracle', () => {
  it('leaves forces that balance at every node', () => {
    const member = {
      segments: [
        { length: 1, stiffness: 2, inertia: 1, foundation: 0 },
        { length: 0.5, stiffness: 3, inertia: 1, foundation: 0 },
        { length: 2, stiffness: 1, inertia: 1, foundation: 0 },
      ],
      masses: [0, 0, 0, 0],
      springs: [0.7, 0, 5, 0.2],
      nearFixed: false,
      farFixed: false,
    };
    for (const at of [0.4, 1, 1.2, 2.5]) {
      const { value, slope } = shapeFunction({ type: 'pull', at, amplitude: 0.3 }, member);
      expect(value(at)).toBeCloseTo(0.3, 15);
      [0, 1, 1.5, 3.5].forEach((x, node) => {
        if (x === at) return;
        const before = node > 0 ? member.segments[node - 1].stiffness * slope(x - 1e-9) : 0;
        const after = node < 3 ? member.segments[node].stiffness * slope(x + 1e-9) : 0;
        expect(after - before).toBeCloseTo(member.springs[node] * value(x), 14);
      });
    }
  });
});

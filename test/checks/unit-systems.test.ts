import { describe, expect, it } from 'vitest';
import { solveModes } from '../../src/solutions/modes.ts';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { InitialMotion, Quantity } from '../../src/spec/types.ts';
import { entryMember } from '../support/entries.ts';
import { lengthOf, type PlainMember } from '../support/plain-member.ts';
import { referenceEntry } from '../support/reference.ts';
import { modesRequest, responsesRequest } from '../support/requests.ts';

/** Factors by which numbers grow in another system of units: lengths, times, masses. */
interface Units {
  readonly length: number;
  readonly time: number;
  readonly mass: number;
}

/** Lengths ×1000, stiffness (a force) ×1e12, time ×1e-3: the mass follows, force = mass·length/time². */
const demanded: Units = { length: 1e3, time: 1e-3, mass: (1e12 * 1e-3 ** 2) / 1e3 };
const systems: readonly (readonly [string, Units])[] = [
  ['lengths ×1000, stiffness ×1e12, times ×1e-3', demanded],
  ['lengths ×1e-6, times ×1e9, masses ×1e-12', { length: 1e-6, time: 1e9, mass: 1e-12 }],
  ['lengths ×2^30, times ×2^-20, masses ×2^25', { length: 2 ** 30, time: 2 ** -20, mass: 2 ** 25 }],
];

function force({ length, time, mass }: Units): number {
  return (mass * length) / time ** 2;
}

function scaledMember(member: PlainMember, units: Units): PlainMember {
  return {
    ...member,
    segments: member.segments.map((segment) => ({
      length: segment.length * units.length,
      stiffness: segment.stiffness * force(units),
      inertia: (segment.inertia * units.mass) / units.length,
      foundation: (segment.foundation * force(units)) / units.length ** 2,
    })),
    masses: member.masses.map((mass) => mass * units.mass),
    springs: member.springs.map((spring) => (spring * force(units)) / units.length),
  };
}

/** A rounding of each input by half an ulp moves results by some eps; cancelling ones are measured on the peak. */
const RELATIVE = 1e-12;

describe.each(systems)('in %s', (_, units) => {
  it.each(['b-04', 'b-06', 'b-07', 'b-09', 'b-10', 'b-13', 'b-14', 'b-17', 'b-18', 'b-30'])(
    'frequencies and shapes of %s are the same',
    (id) => {
      const member = entryMember(referenceEntry('piecewise-members', id));
      const plain = solveModes(modesRequest(member, 41, { positions: { count: 101 } })).modes;
      const other = solveModes(
        modesRequest(scaledMember(member, units), 41, { positions: { count: 101 } }),
      ).modes;
      plain.slice(0, 40).forEach((mode, i) => {
        expect(Math.abs(other[i].angularFrequency * units.time - mode.angularFrequency)).toBeLessThanOrEqual(
          RELATIVE * mode.angularFrequency,
        );
        expect(other[i].nodalPoints).toBe(mode.nodalPoints);
        const phi = Array.from(mode.shape!.displacement!);
        const scaled = Array.from(other[i].shape!.displacement!).map(
          (value) => value * Math.sqrt(units.mass),
        );
        const peak = Math.max(...phi.map(Math.abs));
        // A rounded input turns a shape into its neighbour's by eps over their relative gap.
        const gap = Math.min(
          ...[plain[i - 1], plain[i + 1]]
            .filter((neighbour) => neighbour !== undefined)
            .map((neighbour) => Math.abs(neighbour.angularFrequency / mode.angularFrequency - 1)),
        );
        const tolerance = 1e-11 + (20 * Number.EPSILON) / gap;
        phi.forEach((value, j) => expect(Math.abs(scaled[j] - value)).toBeLessThan(tolerance * peak));
      });
    },
  );

  it.each([0, 0.02])('fields, bounds and energies are the same (gauge time %s)', (gauge) => {
    const member = entryMember(referenceEntry('piecewise-members', 'b-04'));
    const length = lengthOf(member);
    const quantities: Quantity[] = ['displacement', 'velocity', 'force'];
    const motion = (u: Units): InitialMotion => ({
      displacement: { type: 'pull', at: 0.9 * u.length, amplitude: 0.01 * u.length },
      velocity: {
        type: 'uniform',
        value: (0.3 * u.length) / u.time,
        from: 0.2 * u.length,
        to: 0.6 * u.length,
      },
      massVelocities: [{ at: (0.7 + 0.4) * u.length, velocity: (0.5 * u.length) / u.time }],
    });
    const solve = (u: Units) =>
      solveResponses(
        responsesRequest({
          member: scaledMember(member, u),
          damping: { type: 'rayleigh', massCoefficient: 0.1 / u.time, stiffnessCoefficient: 1e-3 * u.time },
          initial: motion(u),
          modes: 60,
          positions: Array.from({ length: 12 }, (__, i) => ((i + 0.5) / 12) * length * u.length),
          times: Array.from({ length: 9 }, (__, i) => i * 0.37 * u.time),
          quantities,
          gaugeTime: gauge * u.time,
          checks: true,
        }),
      );
    const plain = solve({ length: 1, time: 1, mass: 1 });
    const other = solve(units);
    const scales: Record<'displacement' | 'velocity' | 'force', number> = {
      displacement: units.length,
      velocity: units.length / units.time,
      force: force(units),
    };
    for (const quantity of quantities as (keyof typeof scales)[]) {
      const [a, b] = [plain.fields[quantity]!, other.fields[quantity]!];
      expect(b.boundKind).toBe(a.boundKind);
      expect(b.verdict).toBe(a.verdict);
      const peak = Math.abs(plain.peaks[quantity]!.value);
      a.values.forEach((row, i) =>
        row.forEach((value, j) => {
          expect(Math.abs(b.values[i][j] / scales[quantity] - value)).toBeLessThan(1e-10 * peak);
        }),
      );
      // Bounds are differences: what is left of 1e-12 of the whole.
      a.bound?.forEach((value, j) => {
        expect(Math.abs(b.bound![j] / scales[quantity] / value - 1)).toBeLessThan(1e-6);
      });
      if (a.rms !== undefined) expect(Math.abs(b.rms! / scales[quantity] / a.rms - 1)).toBeLessThan(1e-6);
    }
    const energy = force(units) * units.length;
    expect(
      Math.abs(other.convergence.energy.total / energy / plain.convergence.energy.total - 1),
    ).toBeLessThan(RELATIVE);
    expect(Math.abs(other.convergence.ceiling! / units.length / plain.convergence.ceiling! - 1)).toBeLessThan(
      RELATIVE,
    );
  });
});

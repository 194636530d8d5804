import { describe, expect, it } from 'vitest';
import { certify, roundingFactors, type QuantityCertificate } from '../../src/certificate/field-bounds.ts';
import { TailFlexibility } from '../../src/certificate/tail-flexibility.ts';
import { placeStations } from '../../src/modes/stations.ts';
import type { InitialMotion, Quantity } from '../../src/spec/types.ts';
import { uniformTrial, type TrialMember } from '../spectrum/trial-members.ts';
import { keep, type TrialSeries } from './trial-series.ts';

const EPS = Number.EPSILON;
const string = uniformTrial(1);
const pluck: InitialMotion = { displacement: { type: 'pull', at: 0.3, amplitude: 0.01 } };
const sine: InitialMotion = { displacement: { type: 'half-sine', amplitude: 0.01, halfWaves: 2 } };
const positions = [0, 0.2, 0.3, 0.5, 1];

/** Tail flexibilities at the positions with the kept modes taken out. */
function tailsOf({ member, series }: TrialSeries): TailFlexibility {
  const tails = new TailFlexibility(member, placeStations(member, positions));
  for (const { mode } of series.modes) tails.add(mode);
  return tails;
}

function certificate(
  quantity: Quantity,
  trial: TrialMember,
  initial: InitialMotion,
  modes: number,
  gaugeTime = 0,
  factor: Float64Array | null = null,
): QuantityCertificate & { kept: TrialSeries; tails: TailFlexibility } {
  const kept = keep(trial, initial, { modes }, { gaugeTime });
  const tails = tailsOf(kept);
  const { member, series, state } = kept;
  const result = certify(quantity, member, series, tails, gaugeTime, state.released, 1, factor);
  return { ...result, kept, tails };
}

describe('displacement', () => {
  it('is bounded by √(2E ΔG(x)) at each place, 0 at a fixed end', () => {
    const { bound, kind, rms, kept, tails, verdict } = certificate('displacement', string, pluck, 10);
    const { energies } = kept.series.tail;
    expect(kind).toBe('pointwise');
    expect(rms).toBeNull();
    expect(verdict).toBe(kept.series.verdict);
    positions.forEach((_, q) => {
      const expected = Math.sqrt(2 * energies.energy * tails.flexibilityTail(q, energies.nextOmega ** 2));
      expect(Math.abs(bound![q] - expected)).toBeLessThan(1e-13 * 0.01 + 1e-12 * expected);
    });
    expect(bound![0]).toBe(0);
    expect(bound![4]).toBe(0);
  });

  it('is certified after a rigid drift, whose rounding grows with the path', () => {
    const free = uniformTrial(1, { near: 'free', far: 'free' });
    const kept = keep(free, { velocity: { type: 'uniform', value: 1, from: 0 } }, { modes: 3 });
    const tails = tailsOf(kept);
    const at = (span: number): number =>
      certify('displacement', kept.member, kept.series, tails, 0, false, span, null).bound![2];
    expect(at(1e9) - at(1)).toBeGreaterThan(32 * EPS * 1e9);
    expect(at(1e9) - at(1)).toBeLessThan(128 * EPS * 1e9);
  });
});

describe('velocity and force of a pluck have no bound at the instant', () => {
  it('only in the mean square: √(2E/m) and √(2E/∫dx/k)', () => {
    const trial: TrialMember = { ...uniformTrial(2, {}, [2, 8, 0.5]), masses: { 1: 3 } };
    // beside the mass
    const initial: InitialMotion = { displacement: { type: 'pull', at: 0.3, amplitude: 0.01 } };
    for (const [quantity, size] of [
      ['velocity', 1 + 3],
      ['force', 2 / 8],
    ] as const) {
      const { bound, kind, rms, verdict, kept } = certificate(quantity, trial, initial, 10);
      expect(bound).toBeNull();
      expect(kind).toBe('rms');
      expect(verdict).toBe('irregular-data');
      const expected = Math.sqrt((2 * kept.series.tail.energies.energy) / size);
      expect(Math.abs(rms! / expected - 1)).toBeLessThan(1e-9);
    }
  });

  it('averaged over a gauge time they have one', () => {
    const velocity = certificate('velocity', string, pluck, 10, 0.25);
    const displacement = certificate('displacement', string, pluck, 10, 0.25);
    expect(velocity.kind).toBe('gauge-average');
    expect(velocity.bound![2] / displacement.bound![2]).toBeCloseTo(8, 9);
    const force = certificate('force', string, pluck, 10, 0.25);
    const { energies } = force.kept.series.tail;
    const expected = 8 * Math.sqrt(2 * energies.energy * force.tails.fluxTail(2));
    expect(Math.abs(force.bound![2] / expected - 1)).toBeLessThan(1e-9);
  });

  it('the acceleration of a pluck has none at all', () => {
    for (const gauge of [0, 0.25]) {
      const { bound, verdict } = certificate('acceleration', string, pluck, 10, gauge);
      expect(bound).toBeNull();
      expect(verdict).toBe('irregular-data');
    }
  });
});

describe('smooth data are bounded at the instant for every quantity', () => {
  it.each(['displacement', 'velocity', 'acceleration', 'force'] as const)('%s', (quantity) => {
    const before = certificate(quantity, string, sine, 1);
    const after = certificate(quantity, string, sine, 2);
    for (const { kind, bound } of [before, after]) {
      expect(kind).toBe('pointwise');
      expect(bound).not.toBeNull();
    }
    // all energy is in the second mode: before it the bound is its amplitude at least, after it the floor of
    // subtraction, √(64·2⁻⁵²) = 1.2e-7 of the amplitude
    const omega = 2 * Math.PI;
    const amplitude = {
      displacement: 0.01,
      velocity: 0.01 * omega,
      acceleration: 0.01 * omega ** 2,
      force: 0.01 * omega,
    }[quantity];
    const place = quantity === 'force' ? 3 : 1;
    const crest = quantity === 'force' ? 1 : Math.sin(omega * 0.2);
    expect(before.bound![place]).toBeGreaterThan(amplitude * crest);
    expect(after.bound![place]).toBeLessThan(1e-6 * amplitude);
    expect(after.bound![place]).toBeGreaterThan(EPS * amplitude);
  });
});

describe('stress', () => {
  it('is the bound of the force times the factor of each place', () => {
    const factor = Float64Array.of(1, 2, 3, 4, 5);
    const force = certificate('force', string, pluck, 10, 0.25);
    const stress = certificate('stress', string, pluck, 10, 0.25, factor);
    positions.forEach((_, q) => expect(stress.bound![q]).toBeCloseTo(force.bound![q] * factor[q], 15));
  });

  it('in the mean square takes the largest factor', () => {
    const force = certificate('force', string, pluck, 10);
    // of the whole member, not of the places that were asked for
    const { kept, tails } = force;
    const member = { ...kept.member, stressFactor: Float64Array.of(30) };
    const factor = Float64Array.of(1, 2, 3, 4, 5);
    const { rms } = certify('stress', member, kept.series, tails, 0, true, 1, factor);
    expect(rms! / force.rms!).toBeCloseTo(30, 12);
  });
});

it('a complete series leaves only rounding, for every quantity at the instant', () => {
  const bead: TrialMember = {
    segments: [
      [0.5, 1, 0],
      [0.5, 1, 0],
    ],
    masses: { 1: 1 },
  };
  for (const quantity of ['displacement', 'velocity', 'acceleration', 'force'] as const) {
    const { bound, kind, verdict } = certificate(quantity, bead, pluck, 5);
    expect(kind).toBe('pointwise');
    expect(verdict).toBe('complete');
    expect(Math.max(...bound!)).toBeLessThan(1e-13);
    expect(bound![2]).toBeGreaterThan(0);
  }
});

it('rounding factors: 2/τ of a level lower for averages, β a level higher for acceleration and flux', () => {
  const {
    member,
    series: { rounding },
  } = keep(
    { ...string, damping: { type: 'rayleigh', massCoefficient: 0, stiffnessCoefficient: 0.5 } },
    pluck,
    { modes: 10 },
  );
  const level = (n: 0 | 1 | 2 | 3): number => rounding.level(n);
  expect(roundingFactors('displacement', member, rounding, Math.PI, 0)).toBe(level(0));
  expect(roundingFactors('velocity', member, rounding, Math.PI, 0)).toBe(level(1));
  expect(roundingFactors('velocity', member, rounding, Math.PI, 0.1)).toBeCloseTo(20 * level(0), 20);
  expect(roundingFactors('acceleration', member, rounding, Math.PI, 0)).toBeCloseTo(
    level(2) + 0.5 * level(3),
    12,
  );
  expect(roundingFactors('force', member, rounding, Math.PI, 0)).toBeCloseTo(level(1) + 0.5 * level(2), 12);
  expect(roundingFactors('force', member, rounding, Math.PI, 0.1)).toBeCloseTo(20 * level(0), 20);
});

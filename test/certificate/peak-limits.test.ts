import { describe, expect, it } from 'vitest';
import { measureBetween, reachOfMode } from '../../src/certificate/loaded-reach.ts';
import { peakLimit, type PeakBasis } from '../../src/certificate/peak-limits.ts';
import type { InitialMotion, Quantity } from '../../src/spec/types.ts';
import { uniformTrial, type TrialMember } from '../spectrum/trial-members.ts';
import { keep } from './trial-series.ts';

function limit(
  quantity: Quantity,
  trial: TrialMember,
  initial: InitialMotion,
  modes: number,
  extra: Partial<PeakBasis> = {},
): number | null {
  const gaugeTime = extra.gaugeTime ?? 0;
  const { member, series, flexibility, state } = keep(trial, initial, { modes }, { gaugeTime });
  const times = new Float64Array([0, extra.span ?? 1]);
  const between = measureBetween([], times, gaugeTime);
  const basis: PeakBasis = {
    member,
    series,
    flexibility,
    reaches: series.modes.map((kept) => reachOfMode(member, kept, undefined, [], between)),
    grid: { step: 1, spacing: 1, edge: 0, kinked: true },
    gaugeTime,
    released: state.released,
    span: 1,
    ...extra,
  };
  // nothing sampled: what the energies and the modes alone say
  return peakLimit(quantity, basis, Number.POSITIVE_INFINITY);
}

const string = uniformTrial(1);
const sine: InitialMotion = { displacement: { type: 'half-sine', amplitude: 0.01, halfWaves: 3 } };

describe('a single mode is limited by its amplitude', () => {
  const omega = 3 * Math.PI;

  it.each([
    ['displacement', 0.01],
    ['velocity', 0.01 * omega],
    ['acceleration', 0.01 * omega ** 2],
    ['force', 0.01 * omega],
  ] as const)('%s', (quantity, amplitude) => {
    const found = limit(quantity, string, sine, 3)!;
    expect(found).toBeGreaterThanOrEqual(amplitude);
    // the other modes and the tail add the floor of subtraction, √(64·2⁻⁵²) = 1.2e-7 each level
    expect(found).toBeLessThan(amplitude * (1 + 2e-6));
  });

  it('acceleration with a damping ratio takes √(1 + 4ζ²)', () => {
    const damped: TrialMember = { ...string, damping: { type: 'ratio', value: 0.75 } };
    const found = limit('acceleration', damped, sine, 3)!;
    expect(found / (0.01 * omega ** 2)).toBeCloseTo(Math.sqrt(1 + 2.25), 5);
  });

  it('force under β takes √(1 + (βω)²)', () => {
    const damped: TrialMember = {
      ...string,
      damping: { type: 'rayleigh', massCoefficient: 0, stiffnessCoefficient: 0.1 },
    };
    const found = limit('force', damped, sine, 3)!;
    expect(found).toBeLessThanOrEqual(0.01 * omega * Math.hypot(1, 0.1 * omega) * (1 + 1e-6));
    expect(found).toBeGreaterThan(0.01 * omega);
  });
});

describe('a plucked string', () => {
  const pluck: InitialMotion = { displacement: { type: 'pull', at: 0.3, amplitude: 0.01 } };

  it('never rises above √(2EG): the ceiling when few modes are known', () => {
    // E = ½ h²/(x(1 − x)), G = 1/4
    const ceiling = (0.01 / Math.sqrt(0.21)) * 0.5;
    const found = limit('displacement', string, pluck, 1)!;
    expect(found).toBeGreaterThan(0.01);
    expect(found).toBeLessThanOrEqual(ceiling * (1 + 1e-9));
  });

  it('has no limit of velocity and force at the instant, but of their averages', () => {
    for (const quantity of ['velocity', 'force', 'acceleration'] as const) {
      expect(limit(quantity, string, pluck, 50)).toBeNull();
    }
    // the force of a pluck is one of two constants by turns: their averages never exceed the larger
    const force = limit('force', string, pluck, 200, { gaugeTime: 0.05 })!;
    expect(force).toBeGreaterThan(0.01 / 0.3);
    expect(force).toBeLessThan(10 * (0.01 / 0.3));
  });
});

describe('a rigid-body motion adds its path', () => {
  const free = uniformTrial(1, { near: 'free', far: 'free' });
  const push: InitialMotion = {
    displacement: { type: 'uniform', value: -0.5, from: 0 },
    velocity: { type: 'uniform', value: 2, from: 0 },
  };

  it('|a₀| + |v₀| t to the displacement, |v₀| to the velocity, nothing to the force', () => {
    expect(limit('displacement', free, push, 3, { span: 10 })).toBeCloseTo(20.5, 9);
    expect(limit('velocity', free, push, 3, { span: 10 })).toBeCloseTo(2, 9);
    expect(limit('force', free, push, 3, { span: 10 })).toBeCloseTo(0, 9);
  });

  it('under mass-proportional damping it decelerates by α v₀', () => {
    const dragged: TrialMember = {
      ...free,
      damping: { type: 'rayleigh', massCoefficient: 0.3, stiffnessCoefficient: 0 },
    };
    expect(limit('acceleration', dragged, push, 3, { span: 10 })).toBeCloseTo(0.6, 9);
  });
});

it('a complete series is limited by its modes alone', () => {
  const bead: TrialMember = {
    segments: [
      [0.5, 1, 0],
      [0.5, 1, 0],
    ],
    masses: { 1: 1 },
  };
  const initial: InitialMotion = { massVelocities: [{ at: 0.5, velocity: 0.2 }] };
  // ω = 2: amplitude 0.1 at the bead, force 2·0.1
  expect(limit('displacement', bead, initial, 1)).toBeCloseTo(0.1, 12);
  expect(limit('velocity', bead, initial, 1)).toBeCloseTo(0.2, 12);
  expect(limit('force', bead, initial, 1)).toBeCloseTo(0.2, 12);
  expect(limit('acceleration', bead, initial, 1)).toBeCloseTo(0.4, 12);
});

it('rest is limited to 0', () => {
  for (const quantity of ['displacement', 'velocity', 'acceleration', 'force'] as const) {
    expect(limit(quantity, string, {}, 2)).toBe(0);
  }
});

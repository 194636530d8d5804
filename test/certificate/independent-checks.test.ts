import { describe, expect, it } from 'vitest';
import { checkIndependently, type CheckResults } from '../../src/certificate/independent-checks.ts';
import type { KeptMode } from '../../src/certificate/kept-modes.ts';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { shapeAt } from '../../src/modes/shape-at.ts';
import type { InitialMotion } from '../../src/spec/types.ts';
import { doubleWell, uniformTrial, type TrialMember } from '../spectrum/trial-members.ts';
import { keep } from './trial-series.ts';

const times = Float64Array.from({ length: 20 }, (_, j) => 0.37 * j);
const stepped: TrialMember = {
  segments: [
    [1, 2, 3],
    [0.75, 5, 0.5, 40],
    [0.5, 2, 0],
    [1.5, 3, 1],
  ],
  far: 'free',
  masses: { 1: 0.5, 4: 0.7 },
  springs: { 2: 4 },
};
const pull: InitialMotion = { displacement: { type: 'pull', at: 0.8, amplitude: 0.1 } };

/** The checks, which grids below a million points always get. */
function checked(member: WaveMember, kept: readonly KeptMode[], energy: number): CheckResults {
  const results = checkIndependently(member, kept, times, energy);
  expect(results).not.toBeNull();
  return results as CheckResults;
}

function check(trial: TrialMember, initial: InitialMotion, modes: number): CheckResults {
  const { member, state, series } = keep(trial, initial, { modes }, { span: 8 });
  return checked(member, series.modes, state.energies[0] + state.rigidEnergy);
}

describe('when all is well the checks are of the order of rounding', () => {
  it.each<[string, TrialMember, InitialMotion, number]>([
    ['a plucked string', uniformTrial(1), { displacement: { type: 'pull', at: 0.3, amplitude: 0.1 } }, 60],
    ['a stepped member with everything', stepped, pull, 40],
    [
      'with damping ratios',
      { ...stepped, damping: { type: 'ratios', values: [0.01, 0.9, 1.2, 3, 0.2] } },
      pull,
      40,
    ],
    [
      'with Rayleigh damping',
      { ...stepped, damping: { type: 'rayleigh', massCoefficient: 0.3, stiffnessCoefficient: 0.02 } },
      pull,
      40,
    ],
    [
      'a free bar that drifts',
      uniformTrial(3, { near: 'free', far: 'free' }),
      { velocity: { type: 'uniform', value: 1, from: 0, to: 0.5 } },
      30,
    ],
    [
      'twins of a double well',
      doubleWell(35),
      { displacement: { type: 'half-sine', amplitude: 1, halfWaves: 3 } },
      20,
    ],
    [
      'beads on a massless string',
      {
        segments: [
          [1, 1, 0],
          [1, 1, 0],
          [1, 1, 0],
        ],
        masses: { 1: 1, 2: 2 },
      },
      pull,
      2,
    ],
    [
      'a massless stub before the bar',
      {
        segments: [
          [1, 1, 0],
          [1, 1, 1],
        ],
        near: 'free',
      },
      { velocity: { type: 'uniform', value: 1, from: 1 } },
      40,
    ],
    [
      'a massless stub behind the bar',
      {
        segments: [
          [1, 1, 1],
          [1, 1, 0],
        ],
        far: 'free',
      },
      { velocity: { type: 'uniform', value: 1, from: 0, to: 1 } },
      40,
    ],
    ['a thousand modes', uniformTrial(2), { displacement: { type: 'pull', at: 0.3, amplitude: 0.1 } }, 1000],
  ])('%s', (_, trial, initial, modes) => {
    const { drift, orthogonality, residual } = check(trial, initial, modes);
    // some thousand roundings: sums over the grid and phases up to 1,000 π
    expect(drift).toBeLessThan(1e-12);
    expect(orthogonality).toBeLessThan(1e-12);
    expect(residual).toBeLessThan(1e-11);
  });

  it('the residual also at blocks of a million times the mass, which hardly move', () => {
    const blocks: TrialMember = { ...uniformTrial(3, {}, [3, 1, 1]), masses: { 1: 1e6, 2: 1e6 } };
    const { residual } = check(blocks, { velocity: { type: 'uniform', value: 1, from: 0 } }, 40);
    // a block's displacement is known to 2⁻⁵² of the wave's, its force to ω M/Z ≈ 1e8 times that
    expect(residual).toBeLessThan(1e-8);
  });

  it('a member at rest has no drift', () => {
    expect(check(uniformTrial(1), {}, 3).drift).toBe(0);
  });
});

/** The checks after one of twelve kept modes, or the one with most energy, has been spoilt. */
function spoil(
  trial: TrialMember,
  index: number | 'liveliest',
  change: (kept: KeptMode, all: readonly KeptMode[], member: WaveMember) => KeptMode,
  initial: InitialMotion = pull,
  modes = 12,
): CheckResults {
  const { member, state, series } = keep(trial, initial, { modes }, { span: 8 });
  const energies = series.modes.map(({ start }) => start.energy);
  const chosen = index === 'liveliest' ? energies.indexOf(Math.max(...energies)) : index;
  const all = series.modes.map((kept, i) => (i === chosen ? change(kept, series.modes, member) : kept));
  return checked(member, all, state.energies[0]);
}

describe('a wrong shape', () => {
  it('that stands twice is seen by orthogonality', () => {
    for (const other of [1, 2, 11]) {
      const { orthogonality } = spoil(stepped, 0, (kept, all) => ({
        ...kept,
        mode: { ...kept.mode, shape: { ...all[other].mode.shape } },
      }));
      expect(orthogonality).toBeGreaterThan(0.99);
    }
  });

  it('with a kink or a step of 1e-6 in one place is seen by the residual', () => {
    for (const place of [0, 1, 2, 3]) {
      const { residual } = spoil(stepped, 4, (kept) => {
        const ends = Float64Array.from(kept.mode.shape.ends);
        for (let e = 4 * place; e < 4 * place + 4; e++) ends[e] *= 1 + 1e-6;
        return { ...kept, mode: { ...kept.mode, shape: { ...kept.mode.shape, ends } } };
      });
      expect(residual).toBeGreaterThan(1e-9);
    }
  });

  it('too large by 1e-6 everywhere is seen by the balance', () => {
    const { drift } = spoil(stepped, 'liveliest', (kept) => {
      const ends = kept.mode.shape.ends.map((value) => value * (1 + 1e-6));
      return { ...kept, mode: { ...kept.mode, shape: { ...kept.mode.shape, ends } } };
    });
    expect(drift).toBeGreaterThan(1e-8);
  });
});

describe('a wrong frequency', () => {
  it.each([
    ['stepped', stepped],
    ['uniform in three', uniformTrial(3)],
    ['uniform in one', uniformTrial(1)],
    ['fixed–free in one', uniformTrial(1, { far: 'free' })],
    ['with an end mass, in one', { ...uniformTrial(1, { far: 'free' }), masses: { 1: 2 } }],
    ['with an end spring, in one', { ...uniformTrial(1, { far: 'free' }), springs: { 1: 2 } }],
  ] as const)('of the shape, by 1e-6, is seen by the residual: %s', (_, trial) => {
    const { residual } = spoil(trial, 4, (kept, _all, member) => {
      const shape = shapeAt(member, kept.mode.frequency.omega * (1 + 1e-6));
      return { ...kept, mode: { ...kept.mode, shape } };
    });
    expect(residual).toBeGreaterThan(1e-9);
  });

  it('of the motion, by 1e-6, is seen by the balance', () => {
    const { drift } = spoil(stepped, 'liveliest', (kept) => {
      const omega = kept.mode.frequency.omega * (1 + 1e-6);
      return { ...kept, mode: { ...kept.mode, frequency: { ...kept.mode.frequency, omega } } };
    });
    expect(drift).toBeGreaterThan(1e-8);
  });
});

describe('a wrong coefficient', () => {
  it.each(['position', 'velocity'] as const)('%s by 1e-6 is seen by the balance', (which) => {
    const { drift } = spoil(
      stepped,
      'liveliest',
      (kept) => ({ ...kept, start: { ...kept.start, [which]: kept.start[which] * (1 + 1e-6) } }),
      { ...pull, velocity: { type: 'half-sine', amplitude: 0.3, halfWaves: 1 } },
    );
    expect(drift).toBeGreaterThan(1e-8);
  });

  it('a damping that takes other energy than it says is seen by the balance', () => {
    const trial: TrialMember = { ...stepped, damping: { type: 'ratio', value: 0.05 } };
    const { member, state, series } = keep(trial, pull, { modes: 12 }, { span: 8 });
    const wrong: WaveMember = { ...member, stiffness: member.stiffness.map((k) => k * (1 + 1e-6)) };
    expect(checked(wrong, series.modes, state.energies[0]).drift).toBeGreaterThan(1e-8);
  });
});

it('a long series is spot-checked: a shape that stands twice among 3,000 is seen where it is looked at', () => {
  const { member, state, series } = keep(uniformTrial(40), pull, { modes: 1500 });
  const all = series.modes.map((kept, i) =>
    i === 1 ? { ...kept, mode: { ...kept.mode, shape: series.modes[0].mode.shape } } : kept,
  );
  expect(checked(member, all, state.energies[0]).orthogonality).toBeGreaterThan(0.99);
});

it('a grid that would need a million points is not made: null', () => {
  // one segment of inertia 1e18 times the other's carries the modes, the grid follows it
  const trial: TrialMember = {
    segments: [
      [1, 1, 1e-9],
      [1, 1, 1],
    ],
  };
  const { member, state, series } = keep(trial, pull, { modes: 3 });
  const [first] = series.modes;
  const shape = { ...first.mode.shape, lambda: 1e16 };
  const quick = [{ ...first, mode: { ...first.mode, shape } }];
  expect(checkIndependently(member, quick, times, state.energies[0])).toBeNull();
});

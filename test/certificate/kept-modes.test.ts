import { describe, expect, it } from 'vitest';
import { keepModes } from '../../src/certificate/kept-modes.ts';
import {
  displacementBound,
  displacementCeiling,
  shortfallOf,
} from '../../src/certificate/series-tolerance.ts';
import { Fault } from '../../src/faults/fault.ts';
import type { InitialMotion } from '../../src/spec/types.ts';
import { uniformTrial, type TrialMember } from '../spectrum/trial-members.ts';
import { keep } from './trial-series.ts';

const string = uniformTrial(1);
const pluck: InitialMotion = { displacement: { type: 'pull', at: 0.3, amplitude: 0.01 } };
const stepped: TrialMember = {
  segments: [
    [1, 2, 3],
    [0.75, 5, 0.5, 40],
    [1.5, 3, 1],
  ],
  far: 'free',
  masses: { 1: 0.5 },
};

describe('with a tolerance N is the smallest number of modes whose bound meets it', () => {
  it.each<[string, TrialMember, InitialMotion, number]>([
    ['plucked string', string, pluck, 3e-2],
    ['plucked string', string, pluck, 3e-3],
    [
      'struck bar',
      uniformTrial(2, { far: 'free' }),
      { velocity: { type: 'uniform', value: 1, from: 0.2, to: 0.4 } },
      1e-2,
    ],
    ['stepped member', stepped, { displacement: { type: 'pull', at: 2, amplitude: 0.1 } }, 1e-2],
    [
      'free bar',
      uniformTrial(2, { near: 'free', far: 'free' }),
      { velocity: { type: 'uniform', value: 1, from: 0, to: 0.1 } },
      1e-2,
    ],
  ])('%s', (_, trial, initial, relativeTolerance) => {
    const { series, flexibility } = keep(trial, initial, { relativeTolerance, maxModes: 4096 });
    const count = series.modes.length;
    expect(series.verdict).toBe('converged');
    expect(series.modesNeeded).toBeNull();
    expect(count).toBeGreaterThan(2);
    const ceiling = displacementCeiling(series.tail, flexibility);
    expect(displacementBound(series.tail, flexibility, 1)).toBeLessThanOrEqual(relativeTolerance * ceiling);
    for (const fewer of [count - 1, Math.ceil(count / 2)]) {
      const before = keep(trial, initial, { modes: fewer });
      expect(displacementBound(before.series.tail, flexibility, 1)).toBeGreaterThan(
        relativeTolerance * ceiling,
      );
    }
  });
});

describe('modes are taken in order, the exact number where one is given', () => {
  it.each([1, 2, 17])('%i', (modes) => {
    const { series } = keep(stepped, pluck, { modes });
    expect(series.modes.map(({ mode }) => mode.frequency.order)).toEqual(
      Array.from({ length: modes }, (_, n) => n + 1),
    );
    expect(series.tail.kept).toBe(modes);
    // the frequency that follows is known, its lower side is used
    expect(series.tail.energies.nextOmega).toBeGreaterThan(series.modes[modes - 1].mode.frequency.upper);
  });

  it('the tail energy and what was captured make up the whole', () => {
    const { series, state } = keep(string, pluck, { modes: 20 });
    const sum = series.modes.reduce((total, { start }) => total + start.energy, 0);
    expect(series.energy.captured).toBeCloseTo(sum, 16);
    expect(series.tail.energies.energy + sum).toBeCloseTo(state.energies[0], 14);
  });

  it('the whole motion taken as a tail has the ceiling √(2EG) at mid-span, all of the energy', () => {
    const { series, flexibility, state } = keep(string, pluck, { modes: 3 });
    // the floor of rounding included
    expect(series.tail.whole.energies.energy / state.energies[0]).toBeCloseTo(1, 12);
    expect(flexibility).toBeCloseTo(0.25, 15);
    expect(displacementCeiling(series.tail, flexibility)).toBeCloseTo(
      Math.sqrt(2 * state.energies[0] * 0.25),
      15,
    );
  });

  it('of a drifting member the rigid part is left out of it', () => {
    const free = uniformTrial(2, { near: 'free', far: 'free' });
    const { series, state } = keep(
      free,
      { velocity: { type: 'uniform', value: 2, from: 0, to: 0.5 } },
      { modes: 4 },
    );
    // momentum 1, mass 1: ½ of it moves as a whole
    expect(state.energies[0]).toBeCloseTo(0.5, 14);
    expect(state.rigidEnergy).toBeCloseTo(0.5, 14);
    expect(series.tail.rigid).toEqual({ position: 0, velocity: expect.closeTo(1, 14) });
    expect(series.tail.whole.energies.energy).toBeCloseTo(0.5, 12);
  });
});

describe('verdicts', () => {
  it('mode-limit, with an estimate of the modes needed near the truth', () => {
    for (const [trial, initial, tolerance] of [
      [string, pluck, 1e-3],
      [stepped, { displacement: { type: 'pull', at: 2, amplitude: 0.1 } } as InitialMotion, 3e-3],
    ] as const) {
      const needed = keep(trial, initial, { relativeTolerance: tolerance, maxModes: 4096 }).series.modes
        .length;
      const short = keep(trial, initial, {
        relativeTolerance: tolerance,
        maxModes: Math.ceil(needed / 8),
      }).series;
      expect(short.verdict).toBe('mode-limit');
      expect(short.modesNeeded).toBeGreaterThan(needed / 2);
      expect(short.modesNeeded).toBeLessThan(needed * 2);
    }
  });

  it('a fixed number of modes is judged by 1e-3 of the ceiling', () => {
    const needed = keep(string, pluck, { relativeTolerance: 1e-3, maxModes: 4096 }).series.modes.length;
    expect(keep(string, pluck, { modes: needed }).series.verdict).toBe('converged');
    const { series } = keep(string, pluck, { modes: needed - 1 });
    expect(series.verdict).toBe('mode-limit');
    expect(series.modesNeeded).toBeGreaterThan(needed / 2);
    expect(series.modesNeeded).toBeLessThan(2 * needed);
  });

  it('rounding-limit where the tolerance lies below what doubles hold', () => {
    const sine: InitialMotion = { displacement: { type: 'half-sine', amplitude: 1, halfWaves: 1 } };
    const { series } = keep(string, sine, { relativeTolerance: 1e-16, maxModes: 64 });
    expect(series.verdict).toBe('rounding-limit');
    expect(series.modesNeeded).toBeNull();
    // after 1e8 periods the phase itself is rounded away
    const late = keep(string, sine, { relativeTolerance: 1e-8, maxModes: 64 }, { span: 2e8 }).series;
    expect(late.verdict).toBe('rounding-limit');
  });

  it('complete where the member has no more modes, whatever was asked', () => {
    const beads: TrialMember = {
      segments: [
        [1, 1, 0],
        [1, 1, 0],
        [1, 1, 0],
      ],
      masses: { 1: 1, 2: 2 },
    };
    const initial: InitialMotion = { displacement: { type: 'pull', at: 1, amplitude: 0.1 } };
    for (const wanted of [{ modes: 40 }, { relativeTolerance: 1e-12, maxModes: 40 }]) {
      const { series, flexibility } = keep(beads, initial, wanted);
      expect(series.verdict).toBe('complete');
      expect(series.modes).toHaveLength(2);
      expect(series.tail.energies.energy).toBe(0);
      // rounding is all that is left
      expect(displacementBound(series.tail, flexibility, 1)).toBeLessThan(1e-13);
    }
  });

  it('rest converges with one mode, for any tolerance', () => {
    const { series } = keep(string, {}, { relativeTolerance: 1e-12, maxModes: 10 });
    expect(series.verdict).toBe('converged');
    expect(series.modes).toHaveLength(1);
  });

  it('half sines converge with their own mode: E² goes below the floor of subtraction', () => {
    for (const halfWaves of [1, 2, 5]) {
      const initial: InitialMotion = { displacement: { type: 'half-sine', amplitude: 1, halfWaves } };
      const { series } = keep(string, initial, { relativeTolerance: 1e-6, maxModes: 64 });
      expect(series.verdict).toBe('converged');
      expect(series.modes).toHaveLength(halfWaves);
    }
  });
});

describe('refusals', () => {
  it('more numbers than may be held: says how many and of what', () => {
    const many = uniformTrial(100);
    let caught: unknown;
    try {
      keep(many, pluck, { relativeTolerance: 1e-9, maxModes: 500 }, { heldNumbers: 20_000 });
    } catch (error) {
      caught = error;
    }
    expect(caught).toBeInstanceOf(Fault);
    const [record] = (caught as Fault).records;
    expect(record).toMatchObject({ code: 'too-many-values', pointer: '/series' });
    expect(record.detail).toContain('500 modes of 100 segments');
    expect(record.detail).toContain('the limit is 20000');
  });

  it('more energy in the modes than in the data is a fault of its own', () => {
    const { member, state, flexibility } = keep(string, pluck, { modes: 2 });
    const false_ = { ...state, energies: [0.5 * state.energies[0], null, null] as const };
    const shortfall = shortfallOf({ modes: 30 }, member, flexibility, 0, true, 1);
    let caught: unknown;
    try {
      keepModes(member, false_, 30, false, 1, shortfall, 8e6);
    } catch (error) {
      caught = error;
    }
    expect((caught as Fault).records[0].code).toBe('energy-inconsistent');
  });
});

it('the coupling of a resolved spectrum is 0, of twins that of rounding', () => {
  expect(keep(string, pluck, { modes: 20 }).series.coupling).toBe(0);
  const wells: TrialMember = {
    segments: [
      [1, 1, 1],
      [1, 1, 1, 900],
      [1, 1, 1],
    ],
  };
  const { coupling } = keep(wells, pluck, { modes: 6 }).series;
  expect(coupling).toBeLessThan(1e-13);
});

import { describe, expect, it } from 'vitest';
import { readInitialState } from '../../src/motion/initial-state.ts';
import type { InitialMotion, Shape } from '../../src/spec/types.ts';
import { uniformTrial, waveMember, type TrialMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;

type Levels = readonly [number, number | null, number | null];

function energies(trial: TrialMember, initial: InitialMotion): Levels {
  return readInitialState(waveMember(trial), initial).energies;
}

/** Each level within some roundings of what is expected; null where the data are not that smooth. */
function expectLevels(found: Levels, expected: Levels, roundings = 256): void {
  expected.forEach((value, level) => {
    if (value === null) expect(found[level]).toBeNull();
    else expect(Math.abs((found[level] ?? NaN) - value)).toBeLessThanOrEqual(roundings * EPS * value);
  });
}

// L = 2, T = 8, ρ = 1/2, c = 4
const [length, tension, rho] = [2, 8, 0.5];
const string = uniformTrial(1, {}, [length, tension, rho]);
const free = uniformTrial(1, { near: 'free', far: 'free' }, [length, tension, rho]);
const parts = uniformTrial(4, {}, [length, tension, rho]);
const sine = (halfWaves: number, amplitude = 0.01): Shape => ({ type: 'half-sine', amplitude, halfWaves });

/** ∫₀ᴸ of the square of the m-th derivative of a polynomial. */
function squareOfDerivative(coefficients: readonly number[], m: number): number {
  let d = [...coefficients];
  for (let step = 0; step < m; step++) d = d.slice(1).map((c, j) => c * (j + 1));
  let sum = 0;
  d.forEach((a, i) => d.forEach((b, j) => (sum += (a * b * length ** (i + j + 1)) / (i + j + 1))));
  return sum;
}

describe('data regular at every level', () => {
  it.each([1, 2, 7])('a half-sine of %i half waves on a fixed string: E, ω²E, ω⁴E', (halfWaves) => {
    const omega = (halfWaves * Math.PI * 4) / length;
    const energy = (tension * 0.01 ** 2 * (halfWaves * Math.PI) ** 2) / (4 * length);
    const levels = [energy, omega ** 2 * energy, omega ** 4 * energy] as const;
    for (const trial of [string, parts]) {
      expectLevels(energies(trial, { displacement: sine(halfWaves) }), levels);
    }
    const kinetic = 0.25 * rho * length * 9;
    expectLevels(energies(parts, { velocity: sine(halfWaves, 3) }), [
      kinetic,
      omega ** 2 * kinetic,
      omega ** 4 * kinetic,
    ]);
  });

  it('on a uniform bedding too, ω² = s/ρ + c²κ²', () => {
    const bedded = uniformTrial(2, {}, [length, tension, rho, 20]);
    const square = 40 + (Math.PI * 4) ** 2 / 4;
    const energy = 0.25 * rho * length * 0.01 ** 2 * square;
    expectLevels(energies(bedded, { displacement: sine(1) }), [
      energy,
      square * energy,
      square ** 2 * energy,
    ]);
  });

  it('a free bar with a polynomial of zero end slopes', () => {
    // 3L x² − 2x³
    const coefficients = [0.1, 0, 3 * length, -2];
    expectLevels(energies(free, { displacement: { type: 'polynomial', coefficients, from: 0 } }), [
      0.5 * tension * squareOfDerivative(coefficients, 1),
      ((0.5 * tension ** 2) / rho) * squareOfDerivative(coefficients, 2),
      ((0.5 * tension ** 3) / rho ** 2) * squareOfDerivative(coefficients, 3),
    ]);
  });

  it('(x(L − x))³ on a fixed string: curvature 0 at the ends', () => {
    const coefficients = [0, 0, 0, 8, -12, 6, -1];
    // ∫f′², ∫f″² and ∫f‴² in exact rationals
    expectLevels(energies(string, { displacement: { type: 'polynomial', coefficients, from: 0 } }), [
      0.5 * tension * (1024 / 385),
      ((0.5 * tension ** 2) / rho) * (1024 / 35),
      ((0.5 * tension ** 3) / rho ** 2) * (4608 / 7),
    ]);
  });

  it('rest, and a free member moving as a whole', () => {
    expectLevels(energies(string, {}), [0, 0, 0]);
    const state = readInitialState(waveMember({ ...free, masses: { 1: 2 } }), {
      velocity: { type: 'uniform', value: 3, from: 0 },
    });
    // its energy is that of the rigid-body motion, kept apart
    expect(state.rigidEnergy).toBeCloseTo(13.5, 13);
    expectLevels(state.energies, [0, 0, 0]);
  });
});

describe('data regular at the first level only', () => {
  it('a parabola on a fixed string: its acceleration is not 0 at the ends', () => {
    const h = 0.02;
    const coefficients = [0, (4 * h) / length, (-4 * h) / length ** 2];
    const acceleration = (8 * h * tension) / (rho * length ** 2);
    expectLevels(energies(parts, { displacement: { type: 'polynomial', coefficients, from: 0 } }), [
      (8 * tension * h * h) / (3 * length),
      0.5 * rho * length * acceleration ** 2,
      null,
    ]);
  });

  it('a pull at a mass: only the mass accelerates, E¹ = F²/2M', () => {
    const trial: TrialMember = { ...parts, masses: { 1: 3 } };
    const [a, b, h] = [0.5, 1.5, 0.03];
    const force = tension * h * (1 / a + 1 / b);
    const levels = [0.5 * force * h, (0.5 * force ** 2) / 3, null] as const;
    expectLevels(energies(trial, { displacement: { type: 'pull', at: a, amplitude: h } }), levels);
    const line: Shape = { type: 'polyline', positions: [0, a, length], values: [0, h, 0] };
    expectLevels(energies(trial, { displacement: line }), levels);
  });

  it('a stretched rod released at its end mass: E¹ = p²/2M', () => {
    const trial: TrialMember = {
      segments: [
        [1, 8, 0.5],
        [1, 2, 0.5],
      ],
      far: 'free',
      masses: { 2: 3 },
    };
    // flux 4 throughout: slopes 1/2 and 2
    const line: Shape = { type: 'polyline', positions: [0, 1, 2], values: [0, 0.5, 2.5] };
    expectLevels(energies(trial, { displacement: line }), [0.5 * 4 * 2.5, 16 / 6, null]);
  });

  it('a velocity that moves a mass with the string', () => {
    const trial: TrialMember = { ...parts, masses: { 2: 3 } };
    const [energy, first, second] = energies(trial, { velocity: sine(1, 2) });
    expect(energy).toBeCloseTo(0.25 * rho * length * 4 + 0.5 * 3 * 4, 13);
    expect(first).toBeCloseTo((0.25 * tension * 4 * Math.PI ** 2) / length, 12);
    // the jerk of the string is not that of the mass, but its energy is finite: ½ρ∫(c²g″)²
    expect(second).toBeCloseTo(0.25 * rho * length * 4 * (2 * Math.PI) ** 4, 9);
  });

  it('a half-sine over a mass: no kink there, so the mass does not accelerate and the string beside it does', () => {
    const trial: TrialMember = { ...parts, masses: { 1: 3 } };
    const energy = (tension * 0.01 ** 2 * Math.PI ** 2) / (4 * length);
    expectLevels(energies(trial, { displacement: sine(1) }), [energy, (2 * Math.PI) ** 2 * energy, null]);
  });

  it('an end that meets its spring, p = −K f', () => {
    const trial: TrialMember = { ...uniformTrial(2, { far: 'free' }, [1, 1, 1]), springs: { 2: 3 } };
    // f = x + bx²: 1 + 2b = −3(1 + b), b = −4/5
    const right = energies(trial, {
      displacement: { type: 'polynomial', coefficients: [0, 1, -0.8], from: 0 },
    });
    expect(right[1]).toBeCloseTo(0.5 * 1.6 ** 2, 13);
    expect(right[2]).toBeNull();
    const wrong = energies(trial, {
      displacement: { type: 'polynomial', coefficients: [0, 1, -0.8001], from: 0 },
    });
    expect(wrong[1]).toBeNull();
  });
});

describe('data without a first level', () => {
  const massive: TrialMember = { ...parts, masses: { 1: 3 } };

  it.each<[string, TrialMember, InitialMotion]>([
    ['a pluck beside the masses', massive, { displacement: { type: 'pull', at: 0.7, amplitude: 0.01 } }],
    ['a pluck of a bare string', string, { displacement: { type: 'pull', at: 0.5, amplitude: 0.01 } }],
    [
      'a kink of a polyline',
      string,
      { displacement: { type: 'polyline', positions: [0, 0.5, 2], values: [0, 0.01, 0] } },
    ],
    ['a half-sine with a free end', uniformTrial(1, { far: 'free' }), { displacement: sine(1) }],
    ['a velocity that jumps', string, { velocity: { type: 'uniform', value: 1, from: 0.3, to: 0.9 } }],
    ['a velocity at a fixed end', string, { velocity: { type: 'uniform', value: 1, from: 0 } }],
    ['an impulse on a mass', massive, { impulses: [{ at: 0.5, impulse: 1 }] }],
    ['an impulse spread over a width', string, { impulses: [{ at: 1, impulse: 1, width: 0.2 }] }],
    [
      'a mass faster than its string',
      massive,
      { velocity: sine(1, 1), massVelocities: [{ at: 0.5, velocity: 0 }] },
    ],
    [
      'a half-sine over a change of stiffness',
      {
        segments: [
          [0.8, 8, 1],
          [1.2, 2, 1],
        ],
      },
      { displacement: sine(1) },
    ],
  ])('%s', (_, trial, initial) => {
    const [energy, first, second] = energies(trial, initial);
    expect(energy).toBeGreaterThan(0);
    expect(first).toBeNull();
    expect(second).toBeNull();
  });
});

describe('a half-sine stays regular however many half waves it has', () => {
  it.each([1, 30, 300, 3000])('%i', (halfWaves) => {
    const loose = waveMember(uniformTrial(1, { near: 'free', far: 'free' }));
    const { energies: levels, rigidEnergy } = readInitialState(loose, { velocity: sine(halfWaves) });
    const [elastic, first, second] = levels;
    const energy = elastic + rigidEnergy;
    // on a free member a velocity needs no condition at the ends
    const omega = halfWaves * Math.PI;
    expect(Math.abs((first ?? 0) / energy / omega ** 2 - 1)).toBeLessThan(1e-11);
    expect(second).toBeNull();
    const [fixedEnergy, fixedFirst, fixedSecond] = energies(uniformTrial(1), { velocity: sine(halfWaves) });
    expect(Math.abs((fixedFirst ?? 0) / fixedEnergy / omega ** 2 - 1)).toBeLessThan(1e-11);
    expect(Math.abs((fixedSecond ?? 0) / fixedEnergy / omega ** 4 - 1)).toBeLessThan(1e-11);
  });
});

it('massless stretches report what they cannot keep', () => {
  const bead: TrialMember = {
    segments: [
      [1, 5, 0],
      [1, 5, 0],
    ],
    masses: { 1: 2 },
  };
  const { lostEnergy, energies: levels } = readInitialState(waveMember(bead), {
    displacement: { type: 'pull', at: 0.5, amplitude: 0.03 },
  });
  // force 5·0.03·(2 + 2/3): of its energy two thirds
  const given = 0.5 * 5 * 0.03 ** 2 * (2 + 2 / 3);
  expect(lostEnergy).toBeCloseTo((2 * given) / 3, 16);
  expect(levels[0]).toBeCloseTo(given / 3, 16);
  // one mass at 2/3 of the height pulled by its two springs: F²/2M
  expect(levels[1]).toBeCloseTo((0.02 * 10) ** 2 / 4, 14);
});

it('a motion is released if nothing moves at first', () => {
  const released = (initial: InitialMotion): boolean =>
    readInitialState(waveMember({ ...parts, masses: { 1: 3 } }), initial).released;
  expect(released({ displacement: sine(1) })).toBe(true);
  expect(released({ displacement: sine(1), velocity: { type: 'uniform', value: 0, from: 0 } })).toBe(true);
  expect(released({ velocity: sine(1) })).toBe(false);
  expect(released({ massVelocities: [{ at: 0.5, velocity: 1e-9 }] })).toBe(false);
  expect(released({ impulses: [{ at: 0.5, impulse: 1 }] })).toBe(false);
});

describe('a free member: the energy of the whole is kept apart from the elastic one', () => {
  it('a velocity on half of it: momentum²/2m and the rest', () => {
    const { energies: levels, rigidEnergy } = readInitialState(waveMember(free), {
      velocity: { type: 'uniform', value: 2, from: 0, to: 1 },
    });
    // mass 1, momentum 1, energy ½·½·4
    expect(rigidEnergy).toBeCloseTo(0.5, 15);
    expect(levels[0]).toBeCloseTo(0.5, 15);
  });

  it('a small elastic motion beside a fast drift keeps its digits', () => {
    const velocity: Shape[] = [
      { type: 'uniform', value: 1e6, from: 0 },
      { type: 'polynomial', coefficients: [1, -1], from: 0 },
    ];
    const { energies: levels, roundings, rigidEnergy } = readInitialState(waveMember(free), { velocity });
    expect(rigidEnergy / 5e11).toBeCloseTo(1, 12);
    // ½·½∫(1 − x)² = 1/6, known to 1e6 roundings
    expect(Math.abs(levels[0] - 1 / 6)).toBeLessThanOrEqual(roundings[0]);
    expect(roundings[0]).toBeLessThan(1e-7);
  });

  it('a restrained member has none', () => {
    expect(readInitialState(waveMember(string), { velocity: sine(1) }).rigidEnergy).toBe(0);
  });
});

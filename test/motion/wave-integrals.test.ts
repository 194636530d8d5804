import { describe, expect, it } from 'vitest';
import { gauss, pieceIntegral, pieceTimesWave, waveIntegral } from '../../src/motion/wave-integrals.ts';
import { waveValue, type Piece, type WaveTerm } from '../../src/motion/piecewise-field.ts';
import { integrate } from '../modes/quadrature.ts';
import { motionValues } from './motion-values.ts';

const EPS = Number.EPSILON;

const piece = (length: number, powers: number[], waves: WaveTerm[] = []): Piece => ({
  segment: 0,
  start: 0,
  length,
  powers,
  waves,
  magnitude: 1,
});

/** Largest |y| on a cell. */
function reach(wave: WaveTerm): number {
  return wave.square > 0
    ? Math.hypot(wave.value, wave.slope / Math.sqrt(wave.square))
    : Math.max(Math.abs(wave.value), Math.abs(wave.farValue));
}

describe('∫ t^d y over a cell, d = 0 … 20, agrees with 25-digit values', () => {
  it.each(motionValues.powers.map((row) => [row.square, row.value, row.slope, row] as const))(
    'κ² = %s, y(0) = %s, y′(0) = %s',
    (square, value, slope, row) => {
      const wave: WaveTerm = { square, value, slope, farValue: Number(row.farValue) };
      const phase = Math.sqrt(Math.abs(square)) * row.length;
      let worst = 0;
      row.integrals.forEach((expected, degree) => {
        const powers = Array.from({ length: degree + 1 }, (_, d) => (d === degree ? 1 : 0));
        const found = pieceTimesWave(piece(row.length, powers), wave);
        // a quick wave leaves about its amplitude over κ; the phase at the far end is known to its rounding
        const size = Math.min(row.length, (2 + 2 * degree) / (Math.sqrt(Math.abs(square)) || 1e-300));
        const scale = reach(wave) * size * (1 + (square > 0 ? phase : Math.min(phase, 40)));
        worst = Math.max(worst, Math.abs(found - Number(expected)) / (EPS * scale));
      });
      expect(worst).toBeLessThan(32);
    },
  );
});

it('the sum of powers is the sum of their integrals', () => {
  const wave: WaveTerm = { square: 400, value: 0.3, slope: -7, farValue: 0 };
  const single = [1, -2, 0.5, 4].map((c, degree) =>
    pieceTimesWave(piece(0.7, [...Array.from({ length: degree }, () => 0), c]), wave),
  );
  const all = pieceTimesWave(piece(0.7, [1, -2, 0.5, 4]), wave);
  expect(Math.abs(all - single.reduce((sum, value) => sum + value, 0))).toBeLessThan(64 * EPS);
});

/** A sine of phase a over the cell of length 0.8, or a hyperbolic sine for a < 0 meaning a decay |a|. */
function term(a: number, value: number, slope: number): WaveTerm {
  const h = 0.8;
  const square = (Math.sign(a) * a * a) / (h * h);
  const kappa = Math.abs(a) / h;
  const farValue =
    a > 0
      ? value * Math.cos(a) + (slope / kappa) * Math.sin(a)
      : value * Math.cosh(a) + (slope / kappa) * Math.sinh(-a);
  return { square, value, slope, farValue };
}

describe('products of two waves agree with Gauss panels', () => {
  const phases = [0.2, 0.9, 1.1, 2.99, 3.01, 7, 7.000001, 40, 41, 300];

  it.each(phases.flatMap((a) => phases.map((b) => [a, b] as const)))('phases %s and %s', (a, b) => {
    const [f, y] = [term(a, 0.4, 3), term(b, -0.7, 11)];
    const panels = Math.ceil((a + b) / 3) + 1;
    const expected = integrate((xi) => waveValue(f, 0.8, xi) * waveValue(y, 0.8, xi), 0, 0.8, panels);
    const scale = reach(f) * reach(y) * 0.8 * (1 + Math.max(a, b));
    expect(Math.abs(pieceTimesWave(piece(0.8, [], [f]), y) - expected)).toBeLessThan(16 * EPS * scale);
  });

  it.each([-0.5, -1.5, -3.5, -9].flatMap((a) => [-0.6, -4, 0.6, 2, 5, 60].map((b) => [a, b] as const)))(
    'a decay of %s and %s',
    (a, b) => {
      const [f, y] = [term(a, 0.4, 1), term(b, -0.7, 2)];
      const panels = Math.ceil(Math.abs(a) + Math.abs(b)) + 1;
      const expected = integrate((xi) => waveValue(f, 0.8, xi) * waveValue(y, 0.8, xi), 0, 0.8, panels);
      // largest values and slopes of both enter the closed form
      const scale = reach(f) * reach(y) * 0.8 * (1 + Math.abs(a)) * (1 + Math.max(0, b));
      expect(Math.abs(pieceTimesWave(piece(0.8, [], [f]), y) - expected)).toBeLessThan(64 * EPS * scale);
    },
  );

  it('two equal sines have no resonance to divide by: ∫ sin² = h/2 (1 − sin 2a/2a)', () => {
    for (const a of [1.5, Math.PI, 100 * Math.PI, 12_345.6]) {
      const f = term(a, 0, a / 0.8);
      const expected = 0.4 * (1 - Math.sin(2 * a) / (2 * a));
      expect(Math.abs(pieceTimesWave(piece(0.8, [], [f]), f) - expected)).toBeLessThan(EPS * (8 + a));
    }
  });
});

it('an empty piece gives 0', () => {
  expect(pieceTimesWave(piece(1, []), term(3, 1, 1))).toBe(0);
  expect(pieceTimesWave(piece(1, [0, 0]), term(3, 1, 1))).toBe(0);
});

it('Gauss panels of phase 3 integrate cos 50x to rounding', () => {
  expect(Math.abs(gauss(1, 50, (x) => Math.cos(50 * x)) - Math.sin(50) / 50)).toBeLessThan(8 * EPS);
  expect(gauss(2, 0, (x) => x * x)).toBeCloseTo(8 / 3, 15);
});

describe('plain integrals', () => {
  it.each([0.001, 0.9, 4, 100, -0.001, -0.9, -1.1, -30])('of a wave, phase or decay %s', (a) => {
    const wave = term(a, 0.4, a < -5 ? -0.4 * (-a / 0.8) : 3);
    const panels = 2 + Math.ceil(Math.abs(a) / 2);
    const expected = integrate((xi) => waveValue(wave, 0.8, xi), 0, 0.8, panels);
    const scale = 0.8 * reach(wave) * (1 + Math.abs(a));
    expect(Math.abs(waveIntegral(wave, 0.8) - expected)).toBeLessThan(32 * EPS * scale);
  });

  it('of a piece: powers and waves', () => {
    const wave = term(2, 0.4, 3);
    const sum = 0.8 * (1 - 2 / 2 + 5 / 3) + waveIntegral(wave, 0.8);
    expect(pieceIntegral(piece(0.8, [1, -2, 5], [wave]))).toBeCloseTo(sum, 14);
    expect(pieceIntegral(piece(0.8, []))).toBe(0);
  });
});

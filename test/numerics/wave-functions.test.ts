import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import {
  cosine,
  meanSquare,
  meanSquareBetween,
  sinc,
  sineSquareMean,
} from '../../src/numerics/wave-functions.ts';

const EPS = Number.EPSILON;

interface Values {
  functions: { square: number; sinc: string; cosine: string; sineSquareMean: string }[];
  meanSquare: { square: number; y0: number; slope: number; value: string }[];
  meanSquareBetween: { a: number; y0: number; y1: number; value: string }[];
}

/** Computed at 60 digits by wave-functions-values.py, formulas there. */
const values = JSON.parse(
  readFileSync(new URL('./wave-functions-values.json', import.meta.url), 'utf8'),
) as Values;

/** |found − expected| in units of rounding of `scale`. */
function roundings(found: number, expected: string, scale: number): number {
  return Math.abs(found - Number(expected)) / (EPS * scale);
}

describe('S and C agree with 40-digit values on both sides of the switch-over at |a²| = 1/4', () => {
  it.each(values.functions.map((row) => [row.square, row] as const))('a² = %s', (square, row) => {
    const a = Math.sqrt(Math.abs(square));
    const [s, c] = [Number(row.sinc), Number(row.cosine)];
    // a carries half a rounding of itself: an absolute error of a/2 in the angle, relative in a decay
    const sScale = square > 0.25 ? Math.abs(s) + 1 : (1 + a) * Math.abs(s);
    const cScale = square > 0 ? Math.abs(c) + a : (1 + a) * Math.abs(c);
    expect(roundings(sinc(square), row.sinc, sScale)).toBeLessThan(2);
    expect(roundings(cosine(square), row.cosine, cScale)).toBeLessThan(2);
  });
});

it.each(values.functions.filter(({ square }) => square <= 1e5).map((row) => [row.square, row] as const))(
  'R = (1 − C S)/(2a²) agrees with 40-digit values at a² = %s',
  (square, row) => {
    const found = sineSquareMean(square, cosine(square), sinc(square));
    // 1 − C S cancels by at most 7 next to the switch-over; a decay brings its own a roundings
    const scale = Number(row.sineSquareMean) * (square < 0 ? 1 + Math.sqrt(-square) : 1);
    expect(roundings(found, row.sineSquareMean, scale)).toBeLessThan(16);
  },
);

it.each(values.meanSquare.map((row) => [row.square, row.y0, row.slope, row] as const))(
  'the mean square of a solution, a² = %s, y₀ = %s, h y₀′ = %s, agrees with its 40-digit quadrature',
  (square, y0, slope, row) => {
    const [c, s] = [cosine(square), sinc(square)];
    const found = meanSquare(y0, slope, square, c, s);
    const cross = Math.abs(y0 * slope * s * s);
    const scale =
      0.5 * y0 * y0 * (1 + Math.abs(c * s)) + cross + slope * slope * sineSquareMean(square, c, s);
    // the terms as they are summed, each within 16 roundings as above; the angle a brings a more
    expect(roundings(found, row.value, scale)).toBeLessThan(16 + Math.sqrt(Math.abs(square)));
  },
);

it.each(values.meanSquareBetween.map((row) => [row.a, row.y0, row.y1, row] as const))(
  'the mean square between two ends, a = %s, y = %s and %s, agrees with its 40-digit quadrature',
  (a, y0, y1, row) => {
    const found = meanSquareBetween(y0, y1, a);
    const own = (y0 * y0 + y1 * y1) / (2 * a);
    // at a = 1/2 the two terms cancel inside by 8 and 13 and against each other by 2
    expect(roundings(found, row.value, own)).toBeLessThan(a < 3 ? 64 : 4);
  },
);

it('S, C and R are entire: values and slopes meet at a² = 0 and at the switch-over', () => {
  const r = (square: number): number => sineSquareMean(square, cosine(square), sinc(square));
  for (const at of [0, 0.25, -0.25]) {
    const h = 2 ** -20;
    for (const f of [sinc, cosine, r]) {
      // a smooth function of curvature below 1: f(at + h) − 2 f(at) + f(at − h) is h² and rounding
      expect(Math.abs(f(at + h) - 2 * f(at) + f(at - h))).toBeLessThan(h * h + 16 * EPS);
    }
  }
});

it('S, C and R satisfy C² + a² S² = 1 and the derivative of ξ S(a²ξ²) is C', () => {
  for (const square of [-40, -1, -0.25, -1e-6, 0, 1e-6, 0.25, 1, 40, 1e4]) {
    const [c, s] = [cosine(square), sinc(square)];
    const scale = c * c + Math.abs(square) * s * s;
    expect(Math.abs(c * c + square * s * s - 1)).toBeLessThan(
      4 * EPS * scale * (1 + Math.sqrt(Math.abs(square))),
    );
  }
});

it('a huge decay neither overflows nor divides by zero', () => {
  for (const a of [800, 1e4, 1e150]) {
    expect(meanSquareBetween(1, 0, a)).toBe(0.5 / a);
    expect(meanSquareBetween(1e-200, 1, a)).toBe(0.5 / a);
  }
});

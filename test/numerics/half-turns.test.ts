import { expect, it } from 'vitest';
import { cosPi, sinPi } from '../../src/numerics/half-turns.ts';

const EPS = Number.EPSILON;

it('whole and half numbers give 0, 1 and −1 exactly, however large', () => {
  for (const n of [0, 1, 2, 3, 7, 1000, 20_001, 2 ** 31 + 1, 2 ** 50 + 1, 2 ** 51 - 1]) {
    for (const sign of [1, -1]) {
      const parity = n % 2 === 0 ? 1 : -1;
      expect(Math.abs(sinPi(sign * n))).toBe(0);
      expect(cosPi(sign * n)).toBe(parity);
      expect(sinPi(sign * (n + 0.5))).toBe(sign * parity);
      expect(Math.abs(cosPi(sign * (n + 0.5)))).toBe(0);
    }
  }
});

it('sixths, quarters and thirds of a half turn give 1/2, √2/2 and √3/2', () => {
  for (const turns of [0, 2, -2, 1000, -1000]) {
    // x itself is known to half a rounding of the turns, π times that in the angle
    const tolerance = EPS * (2 + 2 * Math.abs(turns));
    expect(Math.abs(sinPi(turns + 1 / 6) - 0.5)).toBeLessThanOrEqual(tolerance);
    expect(Math.abs(sinPi(turns + 0.25) - Math.SQRT1_2)).toBeLessThanOrEqual(tolerance);
    expect(Math.abs(sinPi(turns + 1 / 3) - 0.5 * Math.sqrt(3))).toBeLessThanOrEqual(tolerance);
    expect(Math.abs(cosPi(turns + 1 / 3) - 0.5)).toBeLessThanOrEqual(tolerance);
    expect(Math.abs(cosPi(turns + 2 / 3) + 0.5)).toBeLessThanOrEqual(tolerance);
  }
});

/** sin πx of the binary doubles, 30 digits (mpmath: mp.dps = 40; sin(pi*mpf(x))). */
const SINES: readonly (readonly [number, number])[] = [
  [0.1, 0.3090169943749474406880937],
  [0.7, 0.809016994374947506107],
  [1.3, -0.809016994374947506107],
  [2.0000001, 3.141592648448277398715371e-7],
  [12345.678, -0.8476779360852772551225233],
  [-0.4999, -0.999999950651978400435288],
];

it('values between agree with 30-digit sines within two roundings', () => {
  for (const [x, expected] of SINES) expect(Math.abs(sinPi(x) - expected)).toBeLessThan(2 * EPS);
});

it('sine is odd, cosine even, and both repeat after two half turns', () => {
  for (let j = 1; j < 400; j++) {
    const x = (j * 0.61803398875 * 8) % 8;
    expect(sinPi(-x)).toBe(-sinPi(x));
    expect(Math.abs(cosPi(-x) - cosPi(x))).toBeLessThan(2 * EPS);
    expect(Math.abs(sinPi(x) ** 2 + cosPi(x) ** 2 - 1)).toBeLessThan(4 * EPS);
    expect(Math.abs(sinPi(x) - Math.sin(Math.PI * x))).toBeLessThan(2 * EPS * (1 + Math.PI * x));
  }
});

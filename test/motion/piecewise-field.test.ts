import { describe, expect, it } from 'vitest';
import {
  derivativeOf,
  derivedPowers,
  horner,
  isZero,
  nodeValuesOf,
  piecePhase,
  pieceSlope,
  pieceValue,
  waveSlope,
  waveValue,
  type Piece,
  type WaveTerm,
} from '../../src/motion/piecewise-field.ts';

const EPS = Number.EPSILON;

describe('a wave term is a sine, a line or a hyperbolic sine', () => {
  it('κ² > 0: value cos κξ + slope/κ sin κξ', () => {
    const farValue = 2 * Math.cos(21) - Math.sin(21);
    const term: WaveTerm = { square: 9, value: 2, slope: -3, farValue };
    for (const xi of [0, 0.1, 1, 7]) {
      const scale = 3 * EPS * (4 + 3 * xi);
      expect(Math.abs(waveValue(term, 7, xi) - 2 * Math.cos(3 * xi) + Math.sin(3 * xi))).toBeLessThan(scale);
      const slope = -6 * Math.sin(3 * xi) - 3 * Math.cos(3 * xi);
      expect(Math.abs(waveSlope(term, 7, xi) - slope)).toBeLessThan(3 * scale);
    }
  });

  it('κ² = 0: a line', () => {
    const term: WaveTerm = { square: 0, value: 2, slope: -3, farValue: -4 };
    expect(waveValue(term, 2, 0.5)).toBe(0.5);
    expect(waveSlope(term, 2, 0.5)).toBe(-3);
  });

  it.each([0.5, 3, 40, 2000])('κ² < 0, decay %s: the line through both ends, sinh κξ/sinh κh', (decay) => {
    const h = 2;
    const kappa = decay / h;
    const share = (xi: number): number =>
      (Math.exp(kappa * (xi - h)) * -Math.expm1(-2 * kappa * xi)) / -Math.expm1(-2 * decay);
    const slopeShare = (xi: number): number =>
      (kappa * Math.exp(kappa * (xi - h)) * (1 + Math.exp(-2 * kappa * xi))) / -Math.expm1(-2 * decay);
    const [near, far] = [1.5, -0.25];
    const slope = far * slopeShare(0) - near * slopeShare(h);
    const term: WaveTerm = { square: -kappa * kappa, value: near, slope, farValue: far };
    for (const xi of [0, 0.001, 0.7, 1.9, 2]) {
      const expected = near * share(h - xi) + far * share(xi);
      expect(Math.abs(waveValue(term, h, xi) - expected)).toBeLessThan(EPS * (32 + 2 * decay) * 1.5);
      const slopeExpected = far * slopeShare(xi) - near * slopeShare(h - xi);
      expect(Math.abs(waveSlope(term, h, xi) - slopeExpected)).toBeLessThan(
        EPS * (32 + 2 * decay) * 1.5 * Math.max(kappa, 1) * 2,
      );
    }
    const derived = derivativeOf(term, h);
    for (const xi of [0, 1, 2]) {
      expect(Math.abs(waveValue(derived, h, xi) - waveSlope(term, h, xi))).toBeLessThan(
        EPS * (64 + 4 * decay) * 1.5 * Math.max(kappa, 1) * 2,
      );
    }
  });
});

const piece: Piece = {
  segment: 1,
  start: 0.5,
  length: 2,
  powers: [1, -4, 8],
  magnitude: 20,
  waves: [{ square: 4, value: 0.5, slope: 1, farValue: 0.5 * Math.cos(4) + 0.5 * Math.sin(4) }],
};

it('a piece adds its powers of t = ξ/h and its waves; its scale is the magnitude of both', () => {
  const { value, scale } = pieceValue(piece, 1);
  expect(value).toBeCloseTo(1 - 2 + 2 + 0.5 * Math.cos(2) + 0.5 * Math.sin(2), 14);
  expect(scale).toBeCloseTo(20 + Math.hypot(0.5, 0.5), 14);
});

it('a slope is per metre', () => {
  const { value } = pieceSlope(piece, 1);
  expect(value).toBeCloseTo((-4 + 8) / 2 - Math.sin(2) + Math.cos(2), 14);
});

it('powers are evaluated and derived', () => {
  expect(horner([], 3)).toBe(0);
  expect(horner([1, 2, 3], 2)).toBe(17);
  expect(derivedPowers([1, 2, 3])).toEqual([2, 6]);
  expect(derivedPowers([5])).toEqual([]);
});

it('a piece is zero only if every term is', () => {
  const still: WaveTerm = { square: 4, value: 0, slope: 0, farValue: 0 };
  expect(isZero({ ...piece, powers: [0, 0], waves: [still] })).toBe(true);
  expect(isZero({ ...piece, powers: [0, 1e-300], waves: [] })).toBe(false);
  expect(isZero({ ...piece, powers: [], waves: [{ ...still, slope: 1 }] })).toBe(false);
});

it('the phase of a piece is that of its quickest wave', () => {
  expect(piecePhase(piece)).toBe(4);
  expect(piecePhase({ ...piece, waves: [...piece.waves, { ...piece.waves[0], square: -100 }] })).toBe(20);
  expect(piecePhase({ ...piece, waves: [] })).toBe(0);
});

it('node values are those at the ends of the segments, the near side deciding where pieces jump', () => {
  const line = (segment: number, start: number, length: number, powers: number[]): Piece => ({
    segment,
    start,
    length,
    powers,
    waves: [],
    magnitude: 10,
  });
  const values = nodeValuesOf([line(0, 0, 1, [2, 1]), line(0, 1, 1, [3]), line(1, 0, 2, [3, 5])], 2);
  expect(Array.from(values)).toEqual([2, 3, 8]);
});

import { expect, it } from 'vitest';
import { dampingRate, largestRatioAbove, ratioOf } from '../../src/motion/modal-damping.ts';

const none = { ratios: [], massCoefficient: 0, stiffnessCoefficient: 0 };

it('the rate is α + 2ζω + βω²', () => {
  expect(dampingRate({ ratios: [0.1], massCoefficient: 2, stiffnessCoefficient: 0.5 }, 1, 4)).toBe(
    2 + 0.8 + 8,
  );
  expect(dampingRate(none, 3, 7)).toBe(0);
});

it('Rayleigh damping has ζ = α/2ω + βω/2 (Clough & Penzien, Dynamics of Structures, ch. 12; from memory)', () => {
  const [alpha, beta, omega] = [0.3, 0.002, 25];
  const rate = dampingRate({ ratios: [], massCoefficient: alpha, stiffnessCoefficient: beta }, 1, omega);
  expect(rate / (2 * omega)).toBeCloseTo(alpha / (2 * omega) + (beta * omega) / 2, 15);
});

it('the last given ratio serves all higher modes', () => {
  const damping = { ...none, ratios: [0.01, 0.05, 0.02] };
  expect([1, 2, 3, 4, 1000].map((order) => ratioOf(damping, order))).toEqual([0.01, 0.05, 0.02, 0.02, 0.02]);
  expect(ratioOf(none, 5)).toBe(0);
});

it('the largest ratio above a mode looks at the given ones and the one that serves the rest', () => {
  const damping = { ...none, ratios: [0.3, 0.01, 0.2, 0.05] };
  expect([0, 1, 2, 3, 4, 99].map((order) => largestRatioAbove(damping, order))).toEqual([
    0.3, 0.2, 0.2, 0.05, 0.05, 0.05,
  ]);
  expect(largestRatioAbove(none, 0)).toBe(0);
});

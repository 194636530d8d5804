import { describe, expect, it } from 'vitest';
import { dissipatedEnergy } from '../../src/motion/dissipation.ts';
import { freeMotion } from '../../src/motion/modal-motion.ts';
import { panelRule } from '../modes/quadrature.ts';
import { motionValues } from './motion-values.ts';

const EPS = Number.EPSILON;

describe('∫ c q′² agrees with 40-digit values within 64 roundings of the initial energy', () => {
  const groups = new Map<string, (typeof motionValues.dissipated)[number][]>();
  for (const row of motionValues.dissipated) {
    const key = `ω = ${row[2]}, c = ${row[3]}`;
    groups.set(key, [...(groups.get(key) ?? []), row]);
  }

  it.each([...groups])('%s', (_, rows) => {
    for (const [a, v, omega, rate, t, expected] of rows) {
      const energy = 0.5 * (omega * omega * a * a + v * v);
      const found = dissipatedEnergy(a, v, omega, rate, t);
      // next to critical damping the energy itself is taken, with its phase error and sin x/x = 1 for
      // x < 1e-6; far beyond it ½(v − d/μ) cancels by c/2ω
      const zeta = omega > 0 ? rate / (2 * omega) : 0;
      const critical = Math.abs(zeta - 1) < 1e-2 ? 8 * Math.min(omega * t, 100) + 1e-12 / EPS : 0;
      const tolerance = EPS * (64 + critical + (zeta > 1 ? 4 * zeta : 0)) * energy;
      expect(Math.abs(found - Number(expected))).toBeLessThan(tolerance + 1e-300);
    }
  });
});

it('agrees with quadrature of c q′² from the modal motion', () => {
  for (const zeta of [0.02, 0.4, 0.98, 0.996, 1, 1.004, 1.02, 3]) {
    const [omega, t, a, v] = [2, 3, 0.6, -1.1];
    const rate = 2 * zeta * omega;
    const points = panelRule(0, t, 24);
    const q = new Float64Array(points.length);
    const speed = new Float64Array(points.length);
    freeMotion(
      a,
      v,
      omega,
      rate,
      Float64Array.from(points, ({ x }) => x),
      q,
      speed,
    );
    const sum = points.reduce((total, { weight }, j) => total + weight * rate * speed[j] ** 2, 0);
    const energy = 0.5 * (omega * omega * a * a + v * v);
    expect(Math.abs(dissipatedEnergy(a, v, omega, rate, t) - sum)).toBeLessThan(1e-13 * energy);
  }
});

it('never takes more than there is, never gives back, and ends with all of it', () => {
  for (const zeta of [1e-6, 0.1, 0.9999, 1, 1.0001, 10, 1e4]) {
    const [omega, a, v] = [3, -0.4, 2];
    const energy = 0.5 * (omega * omega * a * a + v * v);
    let before = 0;
    for (let j = 0; j <= 60; j++) {
      const lost = dissipatedEnergy(a, v, omega, 2 * zeta * omega, 0.1 * j);
      expect(lost).toBeGreaterThanOrEqual(before - 64 * EPS * energy);
      expect(lost).toBeLessThanOrEqual(energy * (1 + 64 * EPS));
      before = lost;
    }
    const end = dissipatedEnergy(a, v, omega, 2 * zeta * omega, 1e9);
    expect(Math.abs(end / energy - 1)).toBeLessThan(EPS * (64 + 4 * zeta));
  }
});

it('of a rigid-body mode is ½v²(1 − e^{−2ct}), nothing without damping', () => {
  expect(dissipatedEnergy(5, 2, 0, 0.3, 1.5)).toBeCloseTo(2 * (1 - Math.exp(-0.9)), 15);
  expect(dissipatedEnergy(5, 2, 0, 0, 1e9)).toBe(0);
});

import { describe, expect, it } from 'vitest';
import { freeMotion } from '../../src/motion/modal-motion.ts';
import { motionValues } from './motion-values.ts';

const EPS = Number.EPSILON;

function at(a: number, v: number, omega: number, rate: number, t: number): [number, number] {
  const position = new Float64Array(1);
  const velocity = new Float64Array(1);
  freeMotion(a, v, omega, rate, Float64Array.of(t), position, velocity);
  return [position[0], velocity[0]];
}

/** Errors of q and q′ in roundings of √(2E)/ω and √(2E), phase included. */
function errors(row: (typeof motionValues.freeMotion)[number]): [number, number] {
  const [a, v, omega, rate, t, q, speed] = row;
  const [found, foundSpeed] = at(a, v, omega, rate, t);
  if (omega === 0) {
    return [
      Math.abs(found - Number(q)) / (EPS * (Math.abs(a) + Math.abs(v * t) + 1e-300)),
      Math.abs(foundSpeed - Number(speed)) / (EPS * (Math.abs(v) + 1e-300)),
    ];
  }
  // a rounding of ω moves the phase by ωt of them while the motion lasts
  const phase = rate < 2 * omega ? omega * t * Math.exp(-0.5 * rate * t) : 0;
  const level = Math.hypot(omega * a, v) * EPS * (1 + phase);
  return [(Math.abs(found - Number(q)) * omega) / level, Math.abs(foundSpeed - Number(speed)) / level];
}

describe('free motion agrees with 40-digit values within 16 roundings of its amplitude and phase', () => {
  const groups = new Map<string, (typeof motionValues.freeMotion)[number][]>();
  for (const row of motionValues.freeMotion) {
    const [, , omega, rate] = row;
    const key = omega === 0 ? `ω = 0, c = ${rate}` : `ω = ${omega}, c/2ω = ${rate / (2 * omega)}`;
    groups.set(key, [...(groups.get(key) ?? []), row]);
  }

  it.each([...groups])('%s', (_, rows) => {
    expect(Math.max(...rows.flatMap(errors))).toBeLessThan(16);
  });
});

it('energy never grows, and stays without damping', () => {
  const times = Float64Array.from({ length: 400 }, (_, j) => 0.05 * j);
  const q = new Float64Array(400);
  const v = new Float64Array(400);
  for (const zeta of [0, 1e-3, 0.2, 0.999999, 1, 1.000001, 3, 50]) {
    for (const [a, b] of [
      [1, 0],
      [0, 1],
      [-0.3, 2],
    ]) {
      freeMotion(a, b, 1.3, 2 * zeta * 1.3, times, q, v);
      let before = 0.5 * (b * b + 1.69 * a * a);
      const first = before;
      for (let j = 0; j < 400; j++) {
        const energy = 0.5 * (v[j] ** 2 + 1.69 * q[j] ** 2);
        if (zeta === 0) expect(Math.abs(energy / first - 1)).toBeLessThan(EPS * (16 + 4 * times[j]));
        expect(energy).toBeLessThanOrEqual(before + 64 * EPS * first);
        before = energy;
      }
    }
  }
});

it('q′ is the derivative of q and q″ = −c q′ − ω² q, across critical damping', () => {
  const h = 1e-5;
  for (const rate of [0, 0.4, 1.99999, 2, 2.00001, 2.5, 9]) {
    for (const t of [0.1, 1, 4]) {
      const [before, speedBefore] = at(0.7, -0.4, 1, rate, t - h);
      const [q, speed] = at(0.7, -0.4, 1, rate, t);
      const [after, speedAfter] = at(0.7, -0.4, 1, rate, t + h);
      // central differences: h²/6 of the third derivative and rounding over h
      expect(Math.abs((after - before) / (2 * h) - speed)).toBeLessThan(1e-8);
      expect(Math.abs((speedAfter - speedBefore) / (2 * h) + rate * speed + q)).toBeLessThan(1e-8);
    }
  }
});

it('time zero returns the initial state exactly', () => {
  for (const omega of [0, 1, 40]) {
    for (const rate of [0, 0.3, 2, 80, 1e6]) {
      const [q, v] = at(0.3, -1.7, omega, rate, 0);
      expect(q).toBe(0.3);
      expect(v).toBe(-1.7);
    }
  }
});

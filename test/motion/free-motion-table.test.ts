import { describe, expect, it } from 'vitest';
import { FreeMotionTable } from '../../src/motion/free-motion-table.ts';
import { freeMotion } from '../../src/motion/modal-motion.ts';

const EPS = Number.EPSILON;

/** Largest difference from plain evaluation in roundings of amplitude and phase. */
function difference(times: Float64Array, a: number, v: number, omega: number, rate: number): number {
  const count = times.length;
  const [q, p] = [new Float64Array(count), new Float64Array(count)];
  const [qPlain, pPlain] = [new Float64Array(count), new Float64Array(count)];
  new FreeMotionTable(times).fill(a, v, omega, rate, q, p);
  freeMotion(a, v, omega, rate, times, qPlain, pPlain);
  let worst = 0;
  for (let j = 0; j < count; j++) {
    const level = EPS * Math.hypot(omega * a, v) * (1 + omega * Math.abs(times[j]));
    worst = Math.max(worst, (Math.abs(q[j] - qPlain[j]) * (omega || 1)) / (level || EPS));
    worst = Math.max(worst, Math.abs(p[j] - pPlain[j]) / (level || EPS));
  }
  return worst;
}

describe('tables equal plain evaluation', () => {
  const even = Float64Array.from({ length: 301 }, (_, j) => 3 + (17 * j) / 300);
  const clamped = Float64Array.from({ length: 301 }, (_, j) => Math.max(0, (17 * j) / 300 - 1));
  const uneven = Float64Array.from({ length: 50 }, (_, j) => j * j * 0.01);
  const shortList = Float64Array.of(0, 1, 2);
  const still = new Float64Array(20);

  it.each([
    ['evenly spaced times', even],
    ['times that begin with several zeros', clamped],
    ['uneven times', uneven],
    ['few times', shortList],
    ['all times zero', still],
  ] as const)('%s', (_, times) => {
    for (const omega of [0, 0.7, 31, 4000]) {
      for (const zeta of [0, 0.003, 0.01, 0.6, 0.9989, 0.9995, 1, 2]) {
        const rate = omega === 0 ? zeta : 2 * zeta * omega;
        expect(difference(times, 0.8, -1.3, omega, rate)).toBeLessThan(16);
      }
    }
  });
});

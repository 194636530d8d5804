import { describe, expect, it } from 'vitest';
import { Rounding } from '../../src/certificate/rounding.ts';
import { ModeSeries, type Mode } from '../../src/modes/mode-series.ts';
import type { ModalStart } from '../../src/motion/modal-projection.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;

const series = new ModeSeries(waveMember(uniformTrial(1)));
const modes: Mode[] = Array.from({ length: 50 }, () => series.next()!);

function start(energy: number, positionScale = 0, velocityScale = 0): ModalStart {
  return { position: 0, velocity: 0, energy, positionScale, velocityScale };
}

/** Errors of one mode of energy E on levels 0 … 3. */
function levels(mode: Mode, given: ModalStart, span: number): number[] {
  const rounding = new Rounding(span, 1, 1);
  rounding.add(mode, given);
  return ([0, 1, 2, 3] as const).map((level) => rounding.level(level));
}

describe('the error of a mode', () => {
  it('covers what its frequency is off: at t = 2·10⁸ the string of ω = nπ stands as at first', () => {
    for (const mode of modes.slice(0, 20)) {
      const { omega } = mode.frequency;
      for (const periods of [1, 1e3, 1e6, 1e8]) {
        const t = 2 * periods;
        // q = cos ωt for a = 1: exactly 1; E = ω²/2, and the error of ω q is bounded
        const error = omega * Math.abs(Math.cos(omega * t) - 1);
        const [bound] = levels(mode, start(0.5 * omega * omega, omega), t);
        expect(error).toBeLessThanOrEqual(bound);
        // not absurdly wide: the enclosure is 8 roundings, the phase ωt of them
        expect(bound).toBeLessThan(EPS * omega * (1000 + 32 * omega * t));
      }
    }
  });

  it('grows with the span until the phase is lost, then it is twice the amplitude', () => {
    const [early] = levels(modes[0], start(0.5), 1);
    const [late] = levels(modes[0], start(0.5), 1e6);
    const [lost] = levels(modes[0], start(0.5), 1e30);
    expect(early).toBeLessThan(late);
    expect(late).toBeLessThan(1e-7);
    expect(lost).toBeGreaterThanOrEqual(2);
    expect(lost).toBeLessThan(2 + 1e-9);
  });

  it('is weighted by ω on each level', () => {
    for (const mode of [modes[0], modes[9], modes[49]]) {
      const [zero, one, two, three] = levels(mode, start(2, 3, 1), 5);
      const { omega } = mode.frequency;
      expect(one / zero).toBeCloseTo(omega, 10);
      expect(two / one).toBeCloseTo(omega, 10);
      expect(three / two).toBeCloseTo(omega, 10);
    }
  });

  it('grows with the terms of its coefficients', () => {
    const plain = levels(modes[3], start(1), 1)[0];
    const cancelled = levels(modes[3], start(1, 1e6), 1)[0];
    expect(cancelled).toBeGreaterThan(1e6 * EPS);
    expect(cancelled).toBeGreaterThan(100 * plain);
  });

  it('a mode that is not excited adds only the error of its coefficient', () => {
    expect(levels(modes[3], start(0), 1e9)[0]).toBe(0);
    expect(levels(modes[3], start(0, 1), 1e9)[0]).toBeGreaterThan(0);
    expect(levels(modes[3], start(0, 1), 1e9)[0]).toBeLessThan(1e-13);
  });
});

it('the slack of an energy is √2E δ + δ², δ the error of the coefficient', () => {
  const rounding = new Rounding(1, 1, 1);
  rounding.add(modes[0], start(8, 1));
  const first = rounding.slack;
  expect(first).toBeGreaterThan(0);
  rounding.add(modes[0], start(8, 2));
  // δ doubles with the terms; δ² is below any digit
  expect(rounding.slack / first).toBeCloseTo(2, 9);
  rounding.add(modes[0], start(8));
  expect(rounding.slack).toBe(0);
});

it('modes add as the root of the sum of squares, and summing them costs a little more each 64', () => {
  const rounding = new Rounding(3, 1, 1);
  const single = modes.map((mode) => levels(mode, start(1, 1), 3)[0]);
  modes.forEach((mode) => rounding.add(mode, start(1, 1)));
  const root = Math.sqrt(single.reduce((sum, value) => sum + value * value, 0));
  expect(rounding.level(0)).toBeGreaterThan(0.5 * root);
  expect(rounding.level(0)).toBeLessThan(1.5 * root);
});

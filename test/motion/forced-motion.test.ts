import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { ForcedMotion } from '../../src/motion/forced-motion.ts';
import { linearStep } from '../../src/motion/linear-step.ts';
import { movedFromRest } from '../../src/motion/wave-forcing.ts';
import type { HistoryPart } from '../../src/motion/history.ts';

type Pair = readonly [number, number];
type Line = readonly [number, number, number, Pair, readonly [number, number, number], string, string];
type Wave = readonly [number, number, number, Pair, Pair, string, string];

/** Numbers computed at 60 digits by forced-values.py. */
const { lines, waves } = JSON.parse(
  readFileSync(new URL('./forced-values.json', import.meta.url), 'utf8'),
) as { lines: Line[]; waves: Wave[] };

/** Of what the motion reaches by then; the service promises 1e-9. */
const ACCURACY = 1e-11;

/** The time over which a force of 1 gathers speed: t, or 1/ω. */
function softness(omega: number, t: number): number {
  return Math.min(t, omega > 0 ? 1 / omega : Infinity);
}

function forced(part: HistoryPart, omega: number, rate: number, t: number): Pair {
  const [q, v] = [new Float64Array(1), new Float64Array(1)];
  new ForcedMotion([part], [], Float64Array.of(t)).add(omega, rate, 1, q, v);
  return [q[0], v[0]];
}

describe('one modal coordinate under loads, against 60-digit values', () => {
  it('linearStep: any damping, ω = 0, short and long steps', () => {
    const missed: string[] = [];
    for (const [omega, rate, t, [a, v], [value, slope, curve], q, u] of lines) {
      const step = linearStep(omega, rate, t);
      const position =
        step.positionOfPosition * a +
        step.positionOfVelocity * v +
        step.positionOfLoad * value +
        step.positionOfRate * slope +
        step.positionOfCurve * curve;
      const velocity =
        step.velocityOfPosition * a +
        step.velocityOfVelocity * v +
        step.velocityOfLoad * value +
        step.velocityOfRate * slope +
        step.positionOfRate * curve;
      const soft = softness(omega, t);
      const pushed = (Math.abs(value) + Math.abs(slope) * t + Math.abs(curve) * t * t) * soft;
      const speed = pushed + Math.abs(a) * omega + Math.abs(v);
      const errors = [
        Math.abs(position - Number(q)) / (speed * soft + Math.abs(a)),
        Math.abs(velocity - Number(u)) / speed,
      ];
      if (Math.max(...errors) > ACCURACY) missed.push([omega, rate, t, a, v, value, slope, curve].join());
    }
    expect(missed).toEqual([]);
    expect(lines.length).toBeGreaterThan(400);
  });

  it('ForcedMotion over a line: the same to the same digits', () => {
    const missed: string[] = [];
    for (const [omega, rate, t, [a, v], [value, slope, curve], q, u] of lines) {
      if (a !== 0 || v !== 0) continue;
      const [position, velocity] = forced(
        { kind: 'linear', from: 0, to: Infinity, value, slope, curve },
        omega,
        rate,
        t,
      );
      const soft = softness(omega, t);
      const pushed = (Math.abs(value) + Math.abs(slope) * t + Math.abs(curve) * t * t) * soft;
      const errors = [
        Math.abs(position - Number(q)) / (pushed * soft),
        Math.abs(velocity - Number(u)) / pushed,
      ];
      if (Math.max(...errors) > ACCURACY) missed.push([omega, rate, t, value, slope, curve].join());
    }
    expect(missed).toEqual([]);
  });

  it.each(['movedFromRest', 'ForcedMotion'])(
    '%s under a wave: at resonance, at ζ = 1, within 1e-9 of both',
    (way) => {
      const missed: string[] = [];
      for (const [omega, rate, t, [re, im], [decay, pace], q, u] of waves) {
        const forcing = { amplitude: { re, im }, rate: { re: decay, im: pace } };
        let [position, velocity] = forced(
          { kind: 'wave', from: 0, to: Infinity, forcings: [forcing] },
          omega,
          rate,
          t,
        );
        if (way === 'movedFromRest') {
          ({ position, velocity } = movedFromRest(omega, rate, forcing, t));
        }
        // rounding is of the lasting motion, 1/ω² (1/Ω² of a rigid body), however early; ωt is known to an ulp
        const still = omega > 0 ? 1 / omega ** 2 : Math.max(t * t, 1 / (decay ** 2 + pace ** 2));
        const speed = omega > 0 ? 1 / omega : Math.max(t, 1 / Math.hypot(decay, pace));
        const grown = Math.max(1, Math.abs(Number(q)) / still, Math.abs(Number(u)) / speed);
        const share = (ACCURACY + 8 * Number.EPSILON * (omega + pace) * t) * grown;
        const errors = [Math.abs(position - Number(q)) / still, Math.abs(velocity - Number(u)) / speed];
        if (Math.max(...errors) > share)
          missed.push(`${[omega, rate, t, decay, pace].join()}: ${errors.join()}`);
      }
      expect(missed).toEqual([]);
      expect(waves.length).toBeGreaterThan(300);
    },
  );
});

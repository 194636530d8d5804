import { describe, expect, it } from 'vitest';
import { PhaseSweep } from '../../src/spectrum/phase-sweep.ts';
import type { PlainMember } from '../support/plain-member.ts';
import { RandomStream } from '../support/random.ts';
import { randomMember } from '../support/random-members.ts';
import { requestMember } from '../support/requests.ts';
import { countBelow } from '../support/wittrick-williams.ts';
import { readMember } from '../../src/members/read-member.ts';
import { uniformTrial, waveMember } from './trial-members.ts';

const EPS = Number.EPSILON;

describe('uniform members, cut into 1, 2 and 7 segments', () => {
  const cases = [1, 2, 7].flatMap((count) => [
    [count, 'fixed', 'fixed', 0] as const,
    [count, 'fixed', 'free', 0.5] as const,
    [count, 'free', 'fixed', 0.5] as const,
    [count, 'free', 'free', 1] as const,
  ]);

  it.each(cases)('%i segments, %s–%s: Φ = ωL/c + %s·π and Φ′ = L/c', (count, near, far, halfTurns) => {
    // L = 3, c = 2: phase 1.5 ω
    const phase = new PhaseSweep(waveMember(uniformTrial(count, { near, far }, [3, 8, 2])));
    for (const omega of [0.7, 3.3, 12.9, 40.2]) {
      for (let joint = 0; joint < count; joint++) {
        const total = 1.5 * omega + halfTurns * Math.PI;
        const n = Math.round(total / Math.PI);
        phase.sweep(omega, n, joint);
        expect(Math.abs(phase.residual - (total - n * Math.PI))).toBeLessThan(EPS * (32 + 4 * total));
        expect(Math.abs(phase.slope - 1.5)).toBeLessThan(EPS * (64 + 8 * total));
        expect(phase.noise).toBeGreaterThan(0);
      }
    }
  });

  it.each(cases)('%i segments, %s–%s: the count steps at (n − %s)π c/L', (count, near, far, halfTurns) => {
    const phase = new PhaseSweep(waveMember(uniformTrial(count, { near, far }, [3, 8, 2])));
    for (let n = 1; n <= 40; n++) {
      const omega = ((n - halfTurns) * Math.PI) / 1.5;
      if (omega === 0) continue;
      phase.sweep(omega * (1 - 1e-14), 1, 0);
      expect(phase.below).toBe(n - 1);
      phase.sweep(omega * (1 + 1e-14), 1, 0);
      expect(phase.below).toBe(n);
    }
  });
});

it('on a uniform bedding the count steps at √(s/ρ + k/ρ (nπ/L)²), the zero wave number included', () => {
  const [k, rho, s, length] = [8, 2, 50, 3];
  const fixed = new PhaseSweep(waveMember(uniformTrial(3, {}, [length, k, rho, s])));
  const free = new PhaseSweep(
    waveMember(uniformTrial(3, { near: 'free', far: 'free' }, [length, k, rho, s])),
  );
  for (let n = 0; n <= 20; n++) {
    const omega = Math.sqrt(s / rho + (k / rho) * ((n * Math.PI) / length) ** 2);
    for (const [phase, below] of [
      [fixed, Math.max(0, n - 1)],
      [free, n],
    ] as const) {
      phase.sweep(omega * (1 - 1e-13), 1, 1);
      expect(phase.below).toBe(below);
      phase.sweep(omega * (1 + 1e-13), 1, 1);
      expect(phase.below).toBe(phase === fixed && n === 0 ? 0 : below + 1);
    }
  }
});

function randomPlain(stream: number): { plain: PlainMember; top: number; random: RandomStream } {
  const random = new RandomStream(4711, stream);
  const plain = randomMember(random, random.pick(['general', 'nearly-rigid', 'massless-segments', 'rigid']));
  const time = plain.segments.reduce((sum, s) => sum + s.length * Math.sqrt(s.inertia / s.stiffness), 0);
  return { plain, top: (12 * Math.PI) / (time || 1), random };
}

it('counts agree with Wittrick & Williams (1971) on random members at random frequencies', () => {
  const differences: string[] = [];
  for (let stream = 0; stream < 150; stream++) {
    const { plain, top, random } = randomPlain(stream);
    const phase = new PhaseSweep(readMember(requestMember(plain)));
    for (let j = 0; j < 12; j++) {
      const omega = top * random.decades(-3, 0);
      phase.sweep(omega, 1, random.integer(0, plain.segments.length - 1));
      if (phase.below !== countBelow(plain, omega)) differences.push(`member ${stream}, ω = ${omega}`);
    }
  }
  expect(differences).toEqual([]);
});

it('the count never falls as ω rises and says how often the total phase has passed π', () => {
  const falls: string[] = [];
  for (let stream = 200; stream < 260; stream++) {
    const { plain, top, random } = randomPlain(stream);
    const phase = new PhaseSweep(readMember(requestMember(plain)));
    const joint = random.integer(0, plain.segments.length - 1);
    let before = 0;
    for (let j = 1; j <= 200; j++) {
      const omega = (top * j) / 200;
      phase.sweep(omega, 0, joint);
      const { residual, below, noise } = phase;
      const off = Math.abs(residual - Math.PI * Math.round(residual / Math.PI));
      const clear = off > 2 * noise + 4 * EPS * Math.abs(residual);
      if (below < before || (clear && below !== Math.floor(residual / Math.PI))) {
        falls.push(`member ${stream}, ω = ${omega}`);
      }
      before = below;
    }
  }
  expect(falls).toEqual([]);
});

it('in a joint where the wave travels the slope is the derivative of the total phase', () => {
  let worst = 0;
  let checked = 0;
  for (let stream = 200; stream < 260; stream++) {
    const { plain, top, random } = randomPlain(stream);
    const phase = new PhaseSweep(readMember(requestMember(plain)));
    const joint = random.integer(0, plain.segments.length - 1);
    const { length, stiffness, inertia, foundation } = plain.segments[joint];
    for (let j = 1; j <= 20; j++) {
      const omega = (top * j) / 20;
      const h = 1e-6 * omega;
      const square = ((omega * omega * inertia - foundation) / stiffness) * length * length;
      if (square < 1e-3) continue;
      phase.sweep(omega + h, 0, joint);
      const { residual: after, slope: slopeAfter } = phase;
      phase.sweep(omega - h, 0, joint);
      const { residual: before, slope: slopeBefore } = phase;
      phase.sweep(omega, 0, joint);
      const { slope, noise, residual } = phase;
      // central differences: rounding of Φ over h, and how far the slope itself moves over h
      const rounding = (4 * noise + 8 * EPS * Math.abs(residual)) / h;
      const allowed = rounding + Math.abs(slopeAfter - slopeBefore) + 1e-9 * slope;
      worst = Math.max(worst, Math.abs((after - before) / (2 * h) - slope) / allowed);
      checked++;
    }
  }
  expect(checked).toBeGreaterThan(500);
  expect(worst).toBeLessThan(1);
});

it('all joints count alike away from a frequency, and a survey finds the nearest of them', () => {
  for (let stream = 300; stream < 340; stream++) {
    const { plain, top, random } = randomPlain(stream);
    const phase = new PhaseSweep(readMember(requestMember(plain)));
    const omega = top * random.decades(-2, 0);
    const joints = plain.segments.map((_, joint) => {
      phase.sweep(omega, 1, joint);
      return { below: phase.below, residual: phase.residual, slope: phase.slope };
    });
    for (const joint of joints) expect(joint.below).toBe(joints[0].below);
    const n = joints[0].below + 1;
    const steps = plain.segments.map((_, joint) => {
      phase.sweep(omega, n, joint);
      return Math.abs(phase.residual) / phase.slope;
    });
    const chosen = phase.survey(omega, n, Infinity);
    expect(phase.below).toBe(n - 1);
    expect(Math.abs(phase.residual) / phase.slope).toBeLessThanOrEqual(Math.min(...steps) * (1 + 1e-9));
    expect(steps[chosen]).toBeLessThanOrEqual(Math.min(...steps) * (1 + 1e-6));
  }
});

it('one sweep counts one, a survey two', () => {
  const phase = new PhaseSweep(waveMember(uniformTrial(5)));
  phase.sweep(1, 1, 0);
  phase.sweep(1, 1, 4);
  expect(phase.sweeps).toBe(2);
  phase.survey(1, 1, 1);
  expect(phase.sweeps).toBe(4);
});

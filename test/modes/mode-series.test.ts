import { describe, expect, it } from 'vitest';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { readMember } from '../../src/members/read-member.ts';
import { evaluateShape, waveNumberSquare } from '../../src/modes/mode-shape.ts';
import { ModeSeries, type Mode } from '../../src/modes/mode-series.ts';
import { RandomStream } from '../support/random.ts';
import { randomMember } from '../support/random-members.ts';
import { requestMember } from '../support/requests.ts';
import { doubleWell, uniformTrial, waveMember, type TrialMember } from '../spectrum/trial-members.ts';
import { panelRule } from './quadrature.ts';

const EPS = Number.EPSILON;

function modes(member: WaveMember, count: number): Mode[] {
  const series = new ModeSeries(member);
  const list: Mode[] = [];
  for (let mode = series.next(); mode !== null && list.length < count; mode = series.next()) list.push(mode);
  return list;
}

/** Largest deviation of the mass Gram matrix from the unit matrix, by Gauss panels on sampled shapes. */
function gramDefect(member: WaveMember, list: readonly Mode[]): number {
  const out = new Float64Array(2);
  const samples: { weight: number; values: Float64Array }[] = [];
  const sample = (weight: number, i: number, x: number): void => {
    const values = Float64Array.from(list, ({ shape }) => {
      evaluateShape(member, shape, i, x, out);
      return out[0];
    });
    samples.push({ weight, values });
  };
  for (let i = 0; i < member.segmentCount; i++) {
    if (member.inertia[i] === 0) continue;
    const phase = Math.max(
      ...list.map(
        ({ shape }) => Math.sqrt(Math.abs(waveNumberSquare(member, i, shape.lambda))) * member.length[i],
      ),
    );
    for (const { x, weight } of panelRule(0, member.length[i], 1 + Math.ceil(Math.min(phase, 2000) / 2))) {
      sample(member.inertia[i] * weight, i, x);
    }
  }
  for (let j = 0; j <= member.segmentCount; j++) {
    if (member.mass[j] > 0) sample(member.mass[j], Math.max(0, j - 1), j === 0 ? 0 : member.length[j - 1]);
  }
  let worst = 0;
  for (let a = 0; a < list.length; a++) {
    for (let b = a; b < list.length; b++) {
      let product = 0;
      for (const { weight, values } of samples) product += weight * values[a] * values[b];
      worst = Math.max(worst, Math.abs(product - (a === b ? 1 : 0)));
    }
  }
  return worst;
}

describe('twins of a symmetric double well', () => {
  it.each([10, 15, 20, 25, 30, 35, 40, 46])(
    'decay %s: all shapes are orthonormal, pairs included',
    (decay) => {
      const member = waveMember(doubleWell(decay));
      const list = modes(member, 10);
      expect(list.map(({ frequency }) => frequency.order)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
      expect(gramDefect(member, list)).toBeLessThan(1e-12);
      for (const mode of list) expect(mode.coupling).toBeLessThan(64 * EPS);
    },
  );

  it.each([
    [10, 6e-6],
    [15, 4e-8],
    [20, 3e-10],
  ])('decay %s: a resolved pair fills both wells alike, in step and against each other', (decay, gap) => {
    const member = waveMember(doubleWell(decay));
    const list = modes(member, 6);
    const out = new Float64Array(2);
    list.forEach(({ shape }, index) => {
      evaluateShape(member, shape, 0, 0.37, out);
      const near = out[0];
      evaluateShape(member, shape, 2, 1 - 0.37, out);
      // even modes of the pair are symmetric, odd ones antisymmetric; a shape turns by some 10 eps/gap
      expect(Math.abs(out[0] - (index % 2 === 0 ? near : -near))).toBeLessThan((100 * EPS) / gap);
    });
  });

  it('of wells 1e-9 apart in length each mode lives in its own', () => {
    const member = waveMember({
      segments: [
        [1, 1, 1],
        [40 / 30, 1, 1, 900],
        [1 + 1e-9, 1, 1],
      ],
    });
    const [first, second] = modes(member, 2);
    const out = new Float64Array(2);
    const size = ({ shape }: Mode, segment: number): number => {
      evaluateShape(member, shape, segment, 0.5, out);
      return Math.abs(out[0]);
    };
    expect(size(first, 2)).toBeGreaterThan(1.3);
    expect(size(first, 0)).toBeLessThan(1e-6);
    expect(size(second, 0)).toBeGreaterThan(1.3);
    expect(size(second, 2)).toBeLessThan(1e-6);
    expect(gramDefect(member, [first, second])).toBeLessThan(1e-12);
  });

  it('three wells give orthonormal triples', () => {
    const triple: TrialMember = {
      segments: [
        [1, 1, 1],
        [1.2, 1, 1, 900],
        [1, 1, 1],
        [1.2, 1, 1, 900],
        [1, 1, 1],
      ],
    };
    const member = waveMember(triple);
    expect(gramDefect(member, modes(member, 12))).toBeLessThan(1e-12);
  });
});

it.each(['general', 'rigid', 'nearly-rigid', 'massless-segments', 'twin-wells', 'lumps-only'] as const)(
  'the first modes of random %s members are orthonormal in the mass product',
  (family) => {
    for (let stream = 0; stream < 8; stream++) {
      const random = new RandomStream(61, stream);
      const member = readMember(requestMember(randomMember(random, family)));
      const list = modes(member, 8);
      // contrasts of 1e6 cost some digits
      expect(gramDefect(member, list)).toBeLessThan(1e-9);
    }
  },
);

it('the rigid-body mode comes first, 1/√m everywhere, without coupling', () => {
  const member = waveMember({ ...uniformTrial(2, { near: 'free', far: 'free' }), masses: { 1: 3 } });
  const [rigid, next] = modes(member, 2);
  expect(rigid.frequency.omega).toBe(0);
  expect(Array.from(rigid.shape.ends)).toEqual([0.5, 0, 0.5, 0, 0.5, 0, 0.5, 0]);
  expect(next.frequency.order).toBe(2);
  expect(gramDefect(member, [rigid, next])).toBeLessThan(64 * EPS);
});

it('a member of lumps ends its series', () => {
  const member = waveMember({
    segments: [
      [1, 1, 0],
      [1, 1, 0],
      [1, 1, 0],
    ],
    masses: { 1: 1, 2: 1 },
  });
  const series = new ModeSeries(member);
  expect([series.next()?.frequency.order, series.next()?.frequency.order]).toEqual([1, 2]);
  expect(series.next()).toBeNull();
  expect(series.next()).toBeNull();
});

it('neighbours a thousandth apart are shaped one by one, at high orders too', () => {
  // relative gaps of 1/n
  const member = waveMember(uniformTrial(1));
  const series = new ModeSeries(member);
  let last: Mode | null = null;
  for (let n = 1; n <= 1500; n++) last = series.next();
  expect(last?.coupling).toBe(0);
  expect(Math.abs((last?.shape.ends[1] ?? 0) / (Math.SQRT2 * 1500 * Math.PI) - 1)).toBeLessThan(1e-12);
});

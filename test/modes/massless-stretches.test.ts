import { describe, expect, it } from 'vitest';
import { masslessStretches } from '../../src/modes/massless-stretches.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;

it('a member with inertia everywhere has none', () => {
  expect(masslessStretches(waveMember(uniformTrial(3)))).toEqual([]);
});

describe('runs end at inertia and at masses', () => {
  it('two segments joined by a massless node are one run, by a mass two', () => {
    const segments = [
      [1, 1, 1],
      [1, 2, 0],
      [3, 2, 0],
      [1, 1, 1],
    ] as const;
    const joined = masslessStretches(waveMember({ segments, springs: { 2: 5 } }));
    expect(joined.map(({ first, last }) => [first, last])).toEqual([[1, 2]]);
    const apart = masslessStretches(waveMember({ segments, masses: { 2: 1 } }));
    expect(apart.map(({ first, last }) => [first, last])).toEqual([
      [1, 1],
      [2, 2],
    ]);
  });

  it('reach to the ends of the member', () => {
    const member = waveMember({
      segments: [
        [1, 1, 0],
        [1, 1, 1],
        [1, 1, 0],
        [1, 1, 0],
      ],
      far: 'free',
    });
    expect(masslessStretches(member).map(({ first, last }) => [first, last])).toEqual([
      [0, 0],
      [2, 3],
    ]);
  });
});

it('the held flexibility is that of a string between its end nodes, x(l − x)/(k l)', () => {
  const member = waveMember({
    segments: [
      [1, 1, 1],
      [1, 2, 0],
      [3, 2, 0],
      [1, 1, 1],
    ],
  });
  const [stretch] = masslessStretches(member);
  for (const x of [0.25, 1, 1.5, 3.9]) {
    const [i, d] = x <= 1 ? [0, x] : [1, x - 1];
    const expected = (x * (4 - x)) / (2 * 4);
    expect(Math.abs(stretch.held.flexibility(i, d) - expected)).toBeLessThan(8 * EPS);
  }
  expect(Array.from(stretch.nearShape)).toEqual([1, 0.75, 0]);
  expect(Array.from(stretch.farShape)).toEqual([0, 0.25, 1]);
});

it('a sprung node inside shares the motion of the end nodes', () => {
  const member = waveMember({
    segments: [
      [1, 1, 1],
      [1, 3, 0],
      [1, 3, 0],
      [1, 1, 1],
    ],
    springs: { 1: 100, 2: 4, 3: 100 },
  });
  const [stretch] = masslessStretches(member);
  // springs 3 and 3 to the ends, 4 to the ground; those of the end nodes belong to the nodes
  expect(stretch.nearShape[1]).toBeCloseTo(0.3, 15);
  expect(stretch.farShape[1]).toBeCloseTo(0.3, 15);
  expect(stretch.held.flexibility(0, 1)).toBeCloseTo(0.1, 15);
});

describe('a massless end of the member', () => {
  const segments = [
    [1, 1, 1],
    [2, 4, 0],
  ] as const;

  it('follows the motion of its only node where it is free', () => {
    const [stretch] = masslessStretches(waveMember({ segments, far: 'free' }));
    expect(Array.from(stretch.nearShape)).toEqual([1, 1]);
    expect(Array.from(stretch.farShape)).toEqual([0, 0]);
    // held at its node, pulled at x from it: x/k
    expect(stretch.held.flexibility(0, 2)).toBe(0.5);
  });

  it('with a spring follows it in the ratio of two springs in a row', () => {
    const [stretch] = masslessStretches(waveMember({ segments, far: 'free', springs: { 2: 6 } }));
    expect(stretch.nearShape[1]).toBeCloseTo(2 / 8, 15);
    expect(stretch.held.flexibility(0, 2)).toBeCloseTo(1 / 8, 15);
  });

  it('with a mass is held by it', () => {
    const [stretch] = masslessStretches(waveMember({ segments, far: 'free', masses: { 2: 6 } }));
    expect(Array.from(stretch.farShape)).toEqual([0, 1]);
    expect(stretch.held.flexibility(0, 2)).toBe(0);
  });
});

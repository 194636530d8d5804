import { describe, expect, it } from 'vitest';
import {
  canDriftFreely,
  firstFrequencyEstimate,
  modeCount,
  totalMass,
  travelTime,
} from '../../src/spectrum/spectrum-size.ts';
import { uniformTrial, waveMember } from './trial-members.ts';

const free = { near: 'free', far: 'free' } as const;
const pair = waveMember({
  segments: [
    [2, 50, 2],
    [3, 27, 3],
  ],
  ...free,
  masses: { 0: 1, 1: 4, 2: 2 },
});

it('travel time is Σ l √(ρ/k), total mass is ∫ρ + ΣM', () => {
  expect(travelTime(pair)).toBe(2 / 5 + 3 / 3);
  expect(totalMass(pair)).toBe(4 + 9 + 7);
});

it('a mass on a fixed end does not move and does not count', () => {
  const member = waveMember({ segments: [[2, 1, 3]], masses: { 1: 5 }, far: 'free' });
  expect(totalMass(member)).toBe(11);
  expect(member.mass[0]).toBe(0);
});

describe('a member drifts freely only without fixed end, spring and foundation', () => {
  it.each([
    ['nothing', {}, {}, true],
    ['a mass', { masses: { 1: 2 } }, {}, true],
    ['a spring', { springs: { 1: 1e-300 } }, {}, false],
    ['a fixed end', { near: 'fixed' }, {}, false],
  ] as const)('%s', (_, extra, _extra, drifts) => {
    expect(canDriftFreely(waveMember({ ...uniformTrial(2, free), ...extra }))).toBe(drifts);
  });

  it('a foundation of one segment', () => {
    const member = waveMember({
      segments: [
        [1, 1, 1],
        [1, 1, 1, 1e-9],
      ],
      ...free,
    });
    expect(canDriftFreely(member)).toBe(false);
  });
});

it('distributed inertia has infinitely many modes, lumps as many as can move', () => {
  expect(modeCount(pair)).toBe(Infinity);
  const lumps = waveMember({
    segments: [
      [1, 1, 0],
      [1, 1, 0],
      [1, 1, 0],
    ],
    far: 'free',
    masses: { 1: 1, 3: 2 },
  });
  expect(modeCount(lumps)).toBe(2);
});

it('the first estimate is positive, finite and follows the unit of time', () => {
  for (const trial of [uniformTrial(3), uniformTrial(3, free), uniformTrial(2, { far: 'free' })]) {
    const slow = firstFrequencyEstimate(waveMember(trial));
    const quick = firstFrequencyEstimate(
      waveMember({ ...trial, segments: trial.segments.map(([l, k, rho]) => [l, 1e6 * k, rho]) }),
    );
    expect(slow).toBeGreaterThan(0);
    expect(quick / slow).toBeCloseTo(1000, 9);
  }
});

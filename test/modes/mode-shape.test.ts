import { describe, expect, it } from 'vitest';
import { readMember } from '../../src/members/read-member.ts';
import type { WaveMember } from '../../src/members/wave-member.ts';
import {
  evaluateShape,
  modalMass,
  rigidShape,
  segmentMeanSquare,
  segmentMeanSquareFlux,
  waveNumberSquare,
  type ModeShape,
} from '../../src/modes/mode-shape.ts';
import { shapeAt } from '../../src/modes/shape-at.ts';
import { NaturalFrequencies } from '../../src/spectrum/natural-frequencies.ts';
import { RandomStream } from '../support/random.ts';
import { randomMember } from '../support/random-members.ts';
import { requestMember } from '../support/requests.ts';
import { doubleWell, waveMember } from '../spectrum/trial-members.ts';
import { integrate } from './quadrature.ts';

const EPS = Number.EPSILON;

function shapes(member: WaveMember, count: number): ModeShape[] {
  const frequencies = new NaturalFrequencies(member);
  const list: ModeShape[] = [];
  while (list.length < count) {
    const next = frequencies.next();
    if (next === null) break;
    if (next.omega > 0) list.push(shapeAt(member, next.omega));
  }
  return list;
}

it('κ² = (ω²ρ − s)/k, of either sign', () => {
  const member = waveMember({ segments: [[1, 2, 3, 12]] });
  expect(waveNumberSquare(member, 0, 6)).toBe(3);
  expect(waveNumberSquare(member, 0, 4)).toBe(0);
  expect(waveNumberSquare(member, 0, 0)).toBe(-6);
});

describe('shapes of random members', () => {
  const members = Array.from({ length: 30 }, (_, stream) => {
    const random = new RandomStream(31, stream);
    const family = random.pick(['general', 'massless-segments', 'nearly-rigid', 'uniform'] as const);
    return readMember(requestMember(randomMember(random, family)));
  });

  it('closed mean squares agree with Gauss panels of the evaluated shape', () => {
    let worst = 0;
    const out = new Float64Array(2);
    for (const member of members.slice(0, 15)) {
      for (const shape of shapes(member, 6)) {
        for (let i = 0; i < member.segmentCount; i++) {
          const l = member.length[i];
          const phase = Math.sqrt(Math.abs(waveNumberSquare(member, i, shape.lambda))) * l;
          if (phase > 200) continue;
          const mean = (which: number): number =>
            integrate(
              (x) => {
                evaluateShape(member, shape, i, x, out);
                return out[which] ** 2;
              },
              0,
              l,
              1 + Math.ceil(phase / 2),
            ) / l;
          for (const [closed, panels] of [
            [segmentMeanSquare(member, i, shape.lambda, shape.ends), mean(0)],
            [segmentMeanSquareFlux(member, i, shape.lambda, shape.ends), mean(1)],
          ]) {
            // end values of a decay come from two marches; 64 roundings of phase or decay
            if (panels > 0)
              worst = Math.max(worst, Math.abs(closed / panels - 1) / (EPS * 256 * (1 + phase)));
          }
        }
      }
    }
    expect(worst).toBeLessThan(1);
  });
});

it('strong decay neither overflows nor loses the far well: both ends of the barrier are kept', () => {
  const member = waveMember(doubleWell(2000));
  const [shape] = shapes(member, 1);
  const out = new Float64Array(2);
  for (let j = 0; j <= 20; j++) {
    evaluateShape(member, shape, 1, (member.length[1] * j) / 20, out);
    expect(Number.isFinite(out[0]) && Number.isFinite(out[1])).toBe(true);
    const kappa = Math.sqrt(-waveNumberSquare(member, 1, shape.lambda));
    const near = shape.ends[4] * Math.exp((-kappa * member.length[1] * j) / 20);
    const far = shape.ends[6] * Math.exp((-kappa * member.length[1] * (20 - j)) / 20);
    const size = Math.abs(near) + Math.abs(far);
    expect(Math.abs(out[0] - near - far)).toBeLessThanOrEqual(1e-12 * size);
  }
});

it('the rigid shape is 1/√m without flux', () => {
  const member = waveMember({
    segments: [
      [1, 1, 2],
      [3, 1, 4],
    ],
    near: 'free',
    far: 'free',
    masses: { 1: 2 },
  });
  const shape = rigidShape(member, 16);
  expect(Array.from(shape.ends)).toEqual([0.25, 0, 0.25, 0, 0.25, 0, 0.25, 0]);
  expect(modalMass(member, 0, shape.ends)).toBe(1);
});

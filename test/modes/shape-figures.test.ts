import { describe, expect, it } from 'vitest';
import { readMember } from '../../src/members/read-member.ts';
import { ModeSeries } from '../../src/modes/mode-series.ts';
import { evaluateShape } from '../../src/modes/mode-shape.ts';
import { nodeDisplacement, peakDisplacement, strainShares } from '../../src/modes/shape-figures.ts';
import { RandomStream } from '../support/random.ts';
import { randomMember } from '../support/random-members.ts';
import { requestMember } from '../support/requests.ts';
import { doubleWell, uniformTrial, waveMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;

describe('strain energy shares', () => {
  it('of a uniform member are the parts of its length (whole half waves in each)', () => {
    const member = waveMember(uniformTrial(4));
    const series = new ModeSeries(member);
    for (let n = 1; n <= 12; n++) {
      const { segments, nodes } = strainShares(member, series.next()!.shape);
      if (n % 4 === 0) for (const share of segments) expect(Math.abs(share - 0.25)).toBeLessThan(1e-13);
      expect(Array.from(nodes)).toEqual([0, 0, 0, 0, 0]);
    }
  });

  it('of two springs in a row with a mass between are those of a parallel pair: K/(K₁ + K₂)', () => {
    const member = waveMember({ segments: [[1, 3, 0]], far: 'free', masses: { 1: 2 }, springs: { 1: 5 } });
    const { segments, nodes } = strainShares(member, new ModeSeries(member).next()!.shape);
    expect(Math.abs(segments[0] - 3 / 8)).toBeLessThan(4 * EPS);
    expect(Math.abs(nodes[1] - 5 / 8)).toBeLessThan(4 * EPS);
  });

  it('of a uniform bedding: s/(s + k κ²) is bedding, so a mode that strains nothing has it all', () => {
    const member = waveMember({ segments: [[1, 1, 1, 7]], near: 'free', far: 'free' });
    const { segments } = strainShares(member, new ModeSeries(member).next()!.shape);
    expect(segments[0]).toBe(1);
  });

  it('are not negative and sum to 1', () => {
    for (let stream = 0; stream < 20; stream++) {
      const member = readMember(requestMember(randomMember(new RandomStream(3, stream), 'general')));
      const series = new ModeSeries(member);
      for (let n = 1; n <= 6; n++) {
        const { segments, nodes } = strainShares(member, series.next()!.shape);
        const all = [...segments, ...nodes];
        expect(Math.min(...all)).toBeGreaterThanOrEqual(0);
        expect(Math.abs(all.reduce((sum, share) => sum + share, 0) - 1)).toBeLessThan(16 * EPS);
      }
    }
  });
});

describe('the peak of a shape', () => {
  it('of a uniform member is √(2/m), crests or ends', () => {
    for (const trial of [
      uniformTrial(1),
      uniformTrial(3),
      uniformTrial(2, { far: 'free' }),
      uniformTrial(3, { near: 'free', far: 'free' }),
    ]) {
      const member = waveMember(trial);
      const series = new ModeSeries(member);
      if (!member.nearFixed) series.next();
      for (let n = 1; n <= 10; n++) {
        expect(Math.abs(peakDisplacement(member, series.next()!.shape) - Math.SQRT2)).toBeLessThan(32 * EPS);
      }
    }
  });

  it('is met and not exceeded on a fine grid of random members and wells', () => {
    const out = new Float64Array(2);
    const members = Array.from({ length: 15 }, (_, stream) =>
      readMember(requestMember(randomMember(new RandomStream(4, stream), 'general'))),
    );
    members.push(waveMember(doubleWell(10)));
    for (const member of members) {
      const series = new ModeSeries(member);
      for (let n = 1; n <= 6; n++) {
        const { shape } = series.next()!;
        let seen = 0;
        for (let i = 0; i < member.segmentCount; i++) {
          for (let j = 0; j <= 400; j++) {
            evaluateShape(member, shape, i, (member.length[i] * j) / 400, out);
            seen = Math.max(seen, Math.abs(out[0]));
          }
        }
        const peak = peakDisplacement(member, shape);
        expect(seen).toBeLessThanOrEqual(peak * (1 + 1e-12));
        // 400 points a segment of some 20 half waves at most: 1 − cos(π·20/800)
        expect(seen).toBeGreaterThan(peak * 0.99);
      }
    }
  });
});

it('the displacement of a node is that of the segment before it, at x = 0 of the first', () => {
  const member = waveMember({ ...uniformTrial(3, { near: 'free' }) });
  const { shape } = new ModeSeries(member).next()!;
  expect(nodeDisplacement(shape, 0)).toBe(shape.ends[0]);
  for (let j = 1; j <= 3; j++) expect(nodeDisplacement(shape, j)).toBe(shape.ends[4 * j - 2]);
});

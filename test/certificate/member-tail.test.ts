import { describe, expect, it } from 'vitest';
import { controlStations, memberTail, type MemberTail } from '../../src/certificate/member-tail.ts';
import { TailFlexibility } from '../../src/certificate/tail-flexibility.ts';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { readMember } from '../../src/members/read-member.ts';
import { ModeSeries } from '../../src/modes/mode-series.ts';
import { ShapeSampler } from '../../src/modes/shape-sampler.ts';
import type { Stations } from '../../src/modes/stations.ts';
import { RandomStream } from '../support/random.ts';
import { randomMember, type MemberFamily } from '../support/random-members.ts';
import { requestMember } from '../support/requests.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';

describe('control stations', () => {
  it('are both ends of each segment and uneven places between', () => {
    const member = waveMember(uniformTrial(2, {}, [8, 1, 1]));
    const { segment, distance, position } = controlStations(member);
    expect(Array.from(segment)).toEqual([0, 0, 0, 0, 0, 1, 1, 1, 1, 1]);
    expect([distance[0], distance[4], distance[5], distance[9]]).toEqual([0, 4, 0, 4]);
    expect([position[4], position[5], position[9]]).toEqual([4, 4, 8]);
    // no gap is wider than 1.12 of an even one
    for (let q = 1; q < 5; q++) {
      expect(distance[q] - distance[q - 1]).toBeGreaterThan(0);
      expect(distance[q] - distance[q - 1]).toBeLessThanOrEqual(1.12);
    }
  });
});

/** Stations at 200 even places of each segment, ends included. */
function fineStations(member: WaveMember): Stations {
  const per = 201;
  const count = per * member.segmentCount;
  const [position, distance] = [new Float64Array(count), new Float64Array(count)];
  const segment = Int32Array.from({ length: count }, (_, q) => Math.floor(q / per));
  for (let q = 0; q < count; q++) {
    const i = segment[q];
    distance[q] = (q % per) / 200 === 1 ? member.length[i] : (member.length[i] * (q % per)) / 200;
    position[q] = member.position[i] + distance[q];
  }
  return { position, segment, distance };
}

/**
 * Bound over the largest sum of the modes that follow (up to `last`), on the fine grid, for ΔG and ΔH after
 * each of the given numbers of modes: never below 1, for the sum is less than the whole tail.
 */
function ratios(member: WaveMember, counts: readonly number[], last: number): [number, number][] {
  const control = new TailFlexibility(member, controlStations(member));
  const stations = fineStations(member);
  const width = stations.segment.length;
  const sampler = new ShapeSampler(member, stations);
  const series = new ModeSeries(member);
  const [u, p] = [new Float64Array(width), new Float64Array(width)];
  const found: { bound: MemberTail; g: Float64Array; h: Float64Array }[] = [];
  for (let kept = 0; kept < last; kept++) {
    const next = series.next();
    if (next === null) break;
    const { lambda } = next.shape;
    if (counts.includes(kept) && lambda > 0) {
      const bound = memberTail(member, control, lambda);
      found.push({ bound, g: new Float64Array(width), h: new Float64Array(width) });
    }
    control.add(next);
    if (lambda === 0) continue;
    sampler.sample(next.shape, u, p);
    for (const { g, h } of found) {
      for (let q = 0; q < width; q++) {
        g[q] += (u[q] * u[q]) / lambda;
        h[q] += (p[q] / lambda) ** 2;
      }
    }
  }
  return found.map(({ bound, g, h }) => [
    bound.flexibility / Math.max(...g),
    bound.fluxInertia / Math.max(...h),
  ]);
}

describe('the bound over the member is not exceeded by a long series on 200 places a segment', () => {
  const families: MemberFamily[] = [
    'general',
    'rigid',
    'nearly-rigid',
    'massless-segments',
    'twin-wells',
    'uniform',
  ];

  it.each(families)('%s members', (family) => {
    const all: [number, number][] = [];
    for (let stream = 0; stream < 8; stream++) {
      const member = readMember(requestMember(randomMember(new RandomStream(19, stream), family)));
      all.push(...ratios(member, [0, 1, 4, 15, 40], 250));
    }
    for (const which of [0, 1]) {
      const sorted = all.map((pair) => pair[which]).toSorted((a, b) => a - b);
      // sums and bound are rounded apart
      expect(sorted[0]).toBeGreaterThan(1 - 1e-12);
      // and it is no wild guess, but for the flux inside a stiff bedding
      if (family !== 'twin-wells' || which === 0) {
        expect(sorted[Math.floor(sorted.length / 2)]).toBeLessThan(6);
      }
    }
  });
});

it('on a uniform string it is at most about twice the largest tail', () => {
  for (const [g, h] of ratios(waveMember(uniformTrial(3)), [1, 5, 20], 600)) {
    expect(g).toBeGreaterThanOrEqual(1);
    expect(g).toBeLessThan(2.2);
    expect(h).toBeLessThan(2.2);
  }
});

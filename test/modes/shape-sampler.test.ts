import { describe, expect, it } from 'vitest';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { readMember } from '../../src/members/read-member.ts';
import { ModeSeries, type Mode } from '../../src/modes/mode-series.ts';
import { evaluateShape, waveNumberSquare } from '../../src/modes/mode-shape.ts';
import { ShapeSampler, stationSlice } from '../../src/modes/shape-sampler.ts';
import { evenPositions, placeStations } from '../../src/modes/stations.ts';
import { RandomStream } from '../support/random.ts';
import { randomMember } from '../support/random-members.ts';
import { requestMember } from '../support/requests.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;

function modes(member: WaveMember, orders: readonly number[]): Mode[] {
  const series = new ModeSeries(member);
  const list: Mode[] = [];
  for (let n = 1; n <= Math.max(...orders); n++) {
    const mode = series.next();
    if (mode === null) break;
    if (orders.includes(n)) list.push(mode);
  }
  return list;
}

describe('sampling equals plain evaluation at every station', () => {
  it.each(['general', 'massless-segments', 'nearly-rigid', 'uniform', 'rigid'] as const)(
    '%s members',
    (family) => {
      const out = new Float64Array(2);
      let worst = 0;
      for (let stream = 0; stream < 10; stream++) {
        const random = new RandomStream(77, stream);
        const member = readMember(requestMember(randomMember(random, family)));
        const length = member.position[member.segmentCount];
        const scattered = Array.from({ length: 30 }, () => random.unit() * length);
        for (const positions of [evenPositions(member, 101), scattered, Array.from(member.position)]) {
          const stations = placeStations(member, positions);
          const sampler = new ShapeSampler(member, stations);
          const u = new Float64Array(positions.length);
          const p = new Float64Array(positions.length);
          for (const { shape } of modes(member, [1, 2, 5, 40])) {
            sampler.sample(shape, u, p);
            positions.forEach((_: number, q: number) => {
              const i = stations.segment[q];
              evaluateShape(member, shape, i, stations.distance[q], out);
              const square = waveNumberSquare(member, i, shape.lambda);
              const kappa = Math.sqrt(Math.abs(square));
              const impedance = member.stiffness[i] * Math.max(kappa, 1 / member.length[i]);
              const ends = Array.from(shape.ends.subarray(4 * i, 4 * i + 4));
              const [a, b] = [
                Math.max(Math.abs(ends[0]), Math.abs(ends[2])),
                Math.max(Math.abs(ends[1]), Math.abs(ends[3])),
              ];
              const amplitude = Math.max(a, b / impedance);
              // one addition theorem away: some roundings of amplitude and phase
              const tolerance = EPS * (16 + 8 * kappa * member.length[i]) * amplitude;
              worst = Math.max(worst, Math.abs(u[q] - out[0]) / (tolerance || 1));
              worst = Math.max(worst, Math.abs(p[q] - out[1]) / (tolerance * impedance || 1));
            });
          }
        }
      }
      expect(worst).toBeLessThan(1);
    },
  );
});

it('fixed ends give exactly 0, segment ends the marched values', () => {
  const member = waveMember(uniformTrial(3));
  const stations = placeStations(member, [0, ...Array.from(member.position).slice(1)]);
  const u = new Float64Array(4);
  const p = new Float64Array(4);
  const sampler = new ShapeSampler(member, stations);
  for (const { shape } of modes(member, [1, 2, 3, 30])) {
    sampler.sample(shape, u, p);
    expect(u[0]).toBe(0);
    expect(u[3]).toBe(0);
    expect([u[1], u[2]]).toEqual([shape.ends[2], shape.ends[6]]);
    expect(Array.from(p)).toEqual([shape.ends[1], shape.ends[3], shape.ends[7], shape.ends[11]]);
  }
});

it('a dense even grid on a high mode follows √2 sin nπx within the rounding of its phase', () => {
  const member = waveMember(uniformTrial(1));
  const count = 5001;
  const stations = placeStations(member, evenPositions(member, count));
  const u = new Float64Array(count);
  const p = new Float64Array(count);
  const [mode] = modes(member, [700]);
  new ShapeSampler(member, stations).sample(mode.shape, u, p);
  let worst = 0;
  for (let q = 0; q < count; q++) {
    const x = 700 * Math.PI * stations.position[q];
    worst = Math.max(worst, Math.abs(u[q] - Math.SQRT2 * Math.sin(x)));
    worst = Math.max(worst, Math.abs(p[q] / (700 * Math.PI) - Math.SQRT2 * Math.cos(x)));
  }
  expect(worst).toBeLessThan(EPS * (16 + 8 * 700 * Math.PI));
});

it('a slice samples as the whole does', () => {
  const member = waveMember(uniformTrial(2));
  const stations = placeStations(member, evenPositions(member, 40));
  const slice = stationSlice(stations, 10, 30);
  expect(Array.from(slice.position)).toEqual(Array.from(stations.position).slice(10, 30));
  const [mode] = modes(member, [5]);
  const [u, p] = [new Float64Array(40), new Float64Array(40)];
  const [us, ps] = [new Float64Array(20), new Float64Array(20)];
  new ShapeSampler(member, stations).sample(mode.shape, u, p);
  new ShapeSampler(member, slice).sample(mode.shape, us, ps);
  for (let q = 0; q < 20; q++) {
    expect(Math.abs(us[q] - u[10 + q])).toBeLessThan(64 * EPS);
    expect(Math.abs(ps[q] - p[10 + q])).toBeLessThan(64 * EPS * 5 * Math.PI);
  }
});

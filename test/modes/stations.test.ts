import { describe, expect, it } from 'vitest';
import { evenPositions, placeStation, placeStations } from '../../src/modes/stations.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;
const member = waveMember({
  segments: [
    [0.1, 1, 1],
    [0.2, 1, 1],
    [0.7, 1, 1],
  ],
});

describe('a place on the member', () => {
  it('inside a segment is that segment and the distance from its near node', () => {
    expect(placeStation(member, 0.05)).toEqual({ at: 0.05, i: 0, d: 0.05 });
    expect(placeStation(member, 0.5)).toMatchObject({ i: 2 });
    expect(Math.abs(placeStation(member, 0.5).d - 0.2)).toBeLessThan(EPS);
  });

  it('at a node counts to its near side, exactly at the far end of the segment', () => {
    expect(placeStation(member, member.position[1])).toEqual({ at: 0.1, i: 0, d: 0.1 });
    expect(placeStation(member, member.position[2])).toMatchObject({ i: 1, d: member.length[1] });
    expect(placeStation(member, member.position[3])).toMatchObject({ i: 2, d: member.length[2] });
    expect(placeStation(member, 0)).toEqual({ at: 0, i: 0, d: 0 });
  });

  it('within 64 roundings of the length of a node stands on it, beyond that beside it', () => {
    for (const node of [1, 2, 3]) {
      const x = member.position[node];
      const close = 50 * EPS * member.position[3];
      expect(placeStation(member, x - close)).toMatchObject({ i: node - 1, d: member.length[node - 1] });
      if (node === 3) continue;
      expect(placeStation(member, x + close)).toMatchObject({ i: node - 1, d: member.length[node - 1] });
      expect(placeStation(member, x + 4 * close)).toMatchObject({ i: node });
      expect(placeStation(member, x + 4 * close).d).toBeGreaterThan(0);
    }
    expect(placeStation(member, 0.1 + 0.2)).toMatchObject({ i: 1, d: member.length[1] });
  });

  it('keeps the position that was asked for', () => {
    const asked = [0, 0.1 + 1e-16, 0.30000000000000004, 1];
    expect(Array.from(placeStations(member, asked).position)).toEqual(asked);
  });

  it('is found among a thousand segments', () => {
    const long = waveMember(uniformTrial(1000, {}, [1000, 1, 1]));
    for (const x of [0.25, 1, 499.5, 500, 999.75, 1000]) {
      const { i, d } = placeStation(long, x);
      expect(long.position[i] + d).toBeCloseTo(x, 9);
      expect(i).toBe(Math.max(0, Math.ceil(x) - 1));
    }
  });
});

it('stations are a structure of arrays in the order asked', () => {
  const stations = placeStations(member, [0.9, 0.05, 0.9]);
  expect(Array.from(stations.segment)).toEqual([2, 0, 2]);
  expect(stations.distance[0]).toBe(stations.distance[2]);
});

it('even positions hold both ends exactly', () => {
  const odd = waveMember({
    segments: [
      [0.1, 1, 1],
      [0.1, 1, 1],
      [0.1, 1, 1],
    ],
  });
  for (const count of [2, 3, 7, 101]) {
    const positions = evenPositions(odd, count);
    expect(positions).toHaveLength(count);
    expect(positions[0]).toBe(0);
    expect(positions[count - 1]).toBe(odd.position[3]);
    for (let q = 1; q < count; q++) expect(positions[q]).toBeGreaterThan(positions[q - 1]);
  }
});

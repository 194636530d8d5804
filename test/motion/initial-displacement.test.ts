import { describe, expect, it } from 'vitest';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { masslessStretches } from '../../src/modes/massless-stretches.ts';
import { StaticResponse } from '../../src/modes/static-response.ts';
import { readDisplacement, settle, settlePieces } from '../../src/motion/initial-displacement.ts';
import { nodeValuesOf, pieceValue } from '../../src/motion/piecewise-field.ts';
import type { Shape } from '../../src/spec/types.ts';
import { canDriftFreely } from '../../src/spectrum/spectrum-size.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';
import { faultsOf } from './faults.ts';

const EPS = Number.EPSILON;
const string = waveMember(uniformTrial(2, {}, [2, 8, 0.5]));
const free = waveMember(uniformTrial(2, { near: 'free', far: 'free' }));

const read = (member: WaveMember, shapes: Shape | Shape[] | undefined): ReturnType<typeof readDisplacement> =>
  readDisplacement(member, shapes, canDriftFreely(member) ? null : new StaticResponse(member));

describe('pulls', () => {
  it('by force keep the force, by amplitude take amplitude/G', () => {
    expect(read(string, { type: 'pull', at: 0.5, force: 7 }).pulls).toEqual([
      { segment: 0, distance: 0.5, force: 7 },
    ]);
    // G = x(L − x)/TL
    const [pull] = read(string, { type: 'pull', at: 0.5, amplitude: 0.03 }).pulls;
    expect(Math.abs(pull.force / (0.03 / ((0.5 * 1.5) / 16)) - 1)).toBeLessThan(8 * EPS);
  });

  it('of a list stay apart from given shapes', () => {
    const { pulls, pieces } = read(string, [
      { type: 'pull', at: 0.5, force: 1 },
      { type: 'half-sine', amplitude: 2, halfWaves: 1 },
      { type: 'pull', at: 1.5, force: -2 },
    ]);
    expect(pulls.map(({ segment, force }) => [segment, force])).toEqual([
      [0, 1],
      [1, -2],
    ]);
    expect(pieceValue(pieces[0], 1).value).toBeCloseTo(2, 15);
  });

  it('nothing given is rest', () => {
    const { pulls, pieces } = read(string, undefined);
    expect(pulls).toEqual([]);
    expect(pieces.every(({ powers, waves }) => powers.length === 0 && waves.length === 0)).toBe(true);
  });
});

describe('faults name the place and the remedy', () => {
  it('pull-without-restraint', () => {
    expect(faultsOf(() => read(free, { type: 'pull', at: 0.25, amplitude: 1 }))).toEqual([
      {
        code: 'pull-without-restraint',
        pointer: '/initial/displacement/at',
        detail:
          'The member can move as a rigid body (no fixed end, spring or foundation), so a static pull at 0.25 m has no shape of rest. Restrain the member or describe the shape by a polyline.',
      },
    ]);
    const [record] = faultsOf(() =>
      read(free, [
        { type: 'uniform', value: 1, from: 0 },
        { type: 'pull', at: 0.25, force: 1 },
      ]),
    );
    expect(record.pointer).toBe('/initial/displacement/1/at');
  });

  it('pull-at-fixed-end', () => {
    for (const at of [0, 2]) {
      expect(faultsOf(() => read(string, [{ type: 'pull', at, amplitude: 1 }]))).toEqual([
        {
          code: 'pull-at-fixed-end',
          pointer: '/initial/displacement/0/at',
          detail: `The pull at ${at} m acts on a fixed end, which does not move. Pull at another place.`,
        },
      ]);
    }
  });

  it('infinite-energy: a fixed end that is displaced', () => {
    expect(faultsOf(() => read(string, { type: 'polynomial', coefficients: [0.5, -0.25], from: 0 }))).toEqual(
      [
        {
          code: 'infinite-energy',
          pointer: '/initial/displacement',
          detail:
            'The initial displacement is 0.5 at the fixed near end at 0 m; a jump stores infinite strain energy. Let it end at 0 there, or change the end.',
        },
      ],
    );
    const [far] = faultsOf(() => read(string, { type: 'polynomial', coefficients: [0, 0.5], from: 0 }));
    expect(far.detail).toContain('is 1 at the fixed far end at 2 m');
  });

  it('infinite-energy: a jump, inside a segment or at a node', () => {
    for (const at of [0.75, 1]) {
      const [record] = faultsOf(() => read(string, { type: 'polyline', positions: [0, at], values: [0, 3] }));
      expect(record).toMatchObject({ code: 'infinite-energy', pointer: '/initial/displacement' });
      expect(record.detail).toBe(
        `The initial displacement jumps from 3 to 0 at ${at} m; a jump stores infinite strain energy. Join the values, for example by a polyline with a short slope.`,
      );
    }
  });

  it('values within rounding of their terms are no jump', () => {
    // 1 − 2x·0.5 and sums that cancel: rounding of the terms, not of the result
    const shapes: Shape[] = [
      { type: 'polynomial', coefficients: [0, 0.1], from: 0 },
      { type: 'polynomial', coefficients: [0, 0.2], from: 0 },
      { type: 'polynomial', coefficients: [0, -0.30000000000000004], from: 0 },
    ];
    expect(() => read(string, shapes)).not.toThrow();
    expect(() =>
      read(string, { type: 'polyline', positions: [0, 0.7, 1.4], values: [0, 1e-9, 0] }),
    ).not.toThrow();
    expect(() => read(string, { type: 'polyline', positions: [0, 0.7, 1.4], values: [0, 1, 1e-12] })).toThrow(
      /jumps/,
    );
  });

  it.each([1, 59, 164, 1001, 9999, 20_000])('a half-sine of %i half waves ends at 0', (halfWaves) => {
    for (const length of [2, 45.3, 0.37]) {
      const member = waveMember(uniformTrial(1, {}, [length, 8, 0.5]));
      expect(() => read(member, { type: 'half-sine', amplitude: 1, halfWaves })).not.toThrow();
    }
  });

  it('free ends may be displaced', () => {
    expect(() => read(free, { type: 'uniform', value: 1, from: 0 })).not.toThrow();
  });
});

describe('massless stretches keep only the static interpolation of their ends', () => {
  const bead = waveMember({
    segments: [
      [1, 5, 0],
      [1, 5, 0],
    ],
    masses: { 1: 2 },
  });

  it('a string plucked at L/4 with its mass at mid-span: the force is shared by the ends of the stretch', () => {
    const given = read(bead, { type: 'pull', at: 0.5, amplitude: 0.03 });
    const { pulls } = settle(bead, given, masslessStretches(bead));
    // one half is borne by the fixed end, the other by the mass
    expect(pulls.map(({ segment, distance }) => [segment, distance])).toEqual([
      [0, 0],
      [0, 1],
    ]);
    for (const { force } of pulls) expect(force).toBeCloseTo(0.5 * given.pulls[0].force, 14);
    // the mass stands 2/3 as high as the pull
    const high = pulls[1].force * new StaticResponse(bead).flexibility(0, 1);
    expect(high).toBeCloseTo(0.02, 15);
  });

  it('a pull at the mass stays as it is', () => {
    const given = read(bead, { type: 'pull', at: 1, amplitude: 0.03 });
    const pulls = settle(bead, given, masslessStretches(bead)).pulls.filter(({ force }) => force !== 0);
    expect(pulls).toHaveLength(1);
    expect(pulls[0].force).toBeCloseTo(given.pulls[0].force, 14);
  });

  it('a given shape becomes straight between the nodes, with its own values there', () => {
    const given = read(bead, { type: 'half-sine', amplitude: 1, halfWaves: 1 });
    const { pieces } = settle(bead, given, masslessStretches(bead));
    const nodes = nodeValuesOf(pieces, 2);
    [0, 1, 0].forEach((value, j) => expect(Math.abs(nodes[j] - value)).toBeLessThan(4 * EPS));
    expect(pieceValue(pieces[0], 0.5).value).toBeCloseTo(0.5, 15);
    expect(pieceValue(pieces[1], 0.25).value).toBeCloseTo(0.75, 15);
  });

  it.each([0.5, 40, 4e6])('on a bedding of %s it sags as sinh', (s) => {
    const member = waveMember({
      segments: [
        [1, 5, 1],
        [2, 5, 0, s],
        [1, 5, 1],
      ],
    });
    const stretches = masslessStretches(member);
    const given = read(member, { type: 'polyline', positions: [0, 1, 3, 4], values: [0, 1, 0.25, 0] });
    const { pieces } = settle(member, given, stretches);
    const middle = pieces.find(({ segment }) => segment === 1)!;
    const kappa = Math.sqrt(s / 5);
    const share = (xi: number): number =>
      (Math.exp(kappa * (xi - 2)) * -Math.expm1(-2 * kappa * xi)) / -Math.expm1(-4 * kappa);
    for (const xi of [0, 0.3, 1, 2]) {
      const expected = share(2 - xi) + 0.25 * share(xi);
      expect(Math.abs(pieceValue(middle, xi).value - expected)).toBeLessThan(EPS * (64 + 8 * kappa));
    }
  });

  it('cells stay in order and segments with inertia are left alone', () => {
    const member = waveMember({
      segments: [
        [1, 1, 0],
        [1, 1, 1],
        [1, 1, 0],
      ],
    });
    const given = read(member, { type: 'polyline', positions: [0, 1.5, 2.5, 3], values: [0, 1, 1, 0] });
    const stretches = masslessStretches(member);
    const pieces = settlePieces(member, given.pieces, nodeValuesOf(given.pieces, 3), stretches);
    expect(pieces.map(({ segment }) => segment)).toEqual([0, 1, 1, 2]);
    expect(pieces[1]).toBe(given.pieces[1]);
    expect(settlePieces(member, given.pieces, new Float64Array(4), [])).toBe(given.pieces);
  });
});

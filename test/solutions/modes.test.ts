import { describe, expect, it } from 'vitest';
import { solveModes } from '../../src/solutions/modes.ts';
import type { Member, Mode, ModesRequest } from '../../src/spec/types.ts';
import { faultsOf } from '../motion/faults.ts';
import type { PlainMember } from '../support/plain-member.ts';
import { RandomStream } from '../support/random.ts';
import { randomMember } from '../support/random-members.ts';
import { modesRequest, requestMember } from '../support/requests.ts';
import { doubleWell, plainTrial, uniformTrial, type TrialMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;

const stepped: TrialMember = {
  segments: [
    [1, 2, 3],
    [0.75, 5, 0.5, 40],
    [1.5, 3, 1],
  ],
  far: 'free',
  masses: { 1: 0.5, 3: 0.7 },
  springs: { 2: 4 },
};

function omegas(plain: PlainMember, count: number): number[] {
  return solveModes(modesRequest(plain, count)).modes.map((mode) => mode.angularFrequency);
}

/** Largest relative difference in roundings. */
function roundings(found: readonly number[], expected: readonly number[]): number {
  expect(found).toHaveLength(expected.length);
  return Math.max(
    ...expected.map((value, i) => (value === found[i] ? 0 : Math.abs(found[i] / value - 1) / EPS)),
  );
}

const randomPlain = (stream: number): PlainMember =>
  randomMember(new RandomStream(55, stream), stream % 2 === 0 ? 'general' : 'rigid');

describe('invariances', () => {
  it('the same request gives the same bytes', () => {
    const request = modesRequest(plainTrial(stepped), 40, {});
    const text = JSON.stringify(solveModes(request));
    solveModes(modesRequest(randomPlain(0), 10));
    expect(JSON.stringify(solveModes(request))).toBe(text);
  });

  it('another system of units changes no digit that counts', () => {
    for (let stream = 0; stream < 8; stream++) {
      const plain = randomPlain(stream);
      const found = omegas(plain, 20);
      // lengths in mm, forces times 1e12: ω² = force/(length·inertia per length·…) keeps its digits
      const scaled: PlainMember = {
        ...plain,
        segments: plain.segments.map(({ length, stiffness, inertia, foundation }) => ({
          length: length * 1000,
          stiffness: stiffness * 1e12,
          inertia: inertia * 1e6,
          foundation: foundation * 1e6,
        })),
        masses: plain.masses.map((mass) => mass * 1e9),
        springs: plain.springs.map((spring) => spring * 1e9),
      };
      // a few roundings, and those of the scaling itself
      expect(roundings(omegas(scaled, 20), found)).toBeLessThan(64);
    }
  });

  it('a member seen from its other end has the same frequencies and mirrored shapes', () => {
    for (let stream = 0; stream < 8; stream++) {
      const plain = randomPlain(stream);
      const mirrored: PlainMember = {
        segments: plain.segments.toReversed(),
        masses: plain.masses.toReversed(),
        springs: plain.springs.toReversed(),
        nearFixed: plain.farFixed,
        farFixed: plain.nearFixed,
      };
      expect(roundings(omegas(mirrored, 20), omegas(plain, 20))).toBeLessThan(64);
    }
    const plain = plainTrial(stepped);
    const length = 3.25;
    const positions = [0.2, 0.9, 1.6, 3];
    const there = solveModes(modesRequest(plain, 8, { positions })).modes;
    const back = solveModes(
      modesRequest(
        {
          segments: plain.segments.toReversed(),
          masses: plain.masses.toReversed(),
          springs: plain.springs.toReversed(),
          nearFixed: plain.farFixed,
          farFixed: plain.nearFixed,
        },
        8,
        { positions: positions.map((x) => length - x).toReversed() },
      ),
    ).modes;
    there.forEach(({ shape }, n) => {
      const other = back[n].shape!;
      const sign = Math.sign(shape!.displacement![0] * other.displacement![3]);
      positions.forEach((_, q) => {
        expect(Math.abs(shape!.displacement![q] - sign * other.displacement![3 - q])).toBeLessThan(1e-12);
        expect(Math.abs(shape!.force![q] + sign * other.force![3 - q])).toBeLessThan(1e-11);
      });
    });
  });

  it('cutting a segment in two changes no frequency', () => {
    const cut: TrialMember = {
      ...stepped,
      segments: [[0.3, 2, 3], [0.7, 2, 3], ...stepped.segments.slice(1)],
      masses: { 2: 0.5, 4: 0.7 },
      springs: { 3: 4 },
    };
    expect(roundings(omegas(plainTrial(cut), 30), omegas(plainTrial(stepped), 30))).toBeLessThan(32);
  });

  it('more mass lowers, more stiffness raises every frequency (Rayleigh, Theory of Sound, § 88)', () => {
    const base = omegas(plainTrial(stepped), 20);
    const heavier = omegas(plainTrial({ ...stepped, masses: { 1: 0.9, 3: 0.7 } }), 20);
    const stiffer = omegas(plainTrial({ ...stepped, springs: { 2: 9 } }), 20);
    base.forEach((omega, n) => {
      expect(heavier[n]).toBeLessThanOrEqual(omega * (1 + 16 * EPS));
      expect(stiffer[n]).toBeGreaterThanOrEqual(omega * (1 - 16 * EPS));
      // and no further than the next one: one more degree of constraint
      if (n > 0) expect(heavier[n]).toBeGreaterThanOrEqual(base[n - 1]);
    });
  });
});

describe('what a mode says of itself', () => {
  it('frequency, period and enclosure belong to ω; orders ascend; the n-th shape has n − 1 nodes', () => {
    const { modes } = solveModes(modesRequest(plainTrial(stepped), 25, { positions: { count: 4001 } }));
    modes.forEach((mode, i) => {
      expect(mode.order).toBe(i + 1);
      expect(mode.frequency).toBe(mode.angularFrequency / (2 * Math.PI));
      expect(mode.period).toBe((2 * Math.PI) / mode.angularFrequency);
      expect(mode.enclosure[0]).toBeLessThanOrEqual(mode.angularFrequency);
      expect(mode.enclosure[1]).toBeGreaterThanOrEqual(mode.angularFrequency);
      let changes = 0;
      const values = mode.shape!.displacement!;
      for (let q = 2; q < values.length; q++) if (values[q] * values[q - 1] < 0) changes++;
      expect(changes).toBe(mode.nodalPoints);
      expect(mode.nodalPoints).toBe(i);
    });
  });

  it('by peak a shape reaches 1 and its modal mass is 1/peak²', () => {
    const plain = plainTrial(stepped);
    const byMass = solveModes(modesRequest(plain, 6, { positions: { count: 2001 } })).modes;
    const byPeak = solveModes(
      modesRequest(plain, 6, { positions: { count: 2001 }, normalisation: 'peak' }),
    ).modes;
    byPeak.forEach((mode, n) => {
      const peak = Math.max(...Array.from(mode.shape!.displacement!).map(Math.abs));
      expect(peak).toBeLessThanOrEqual(1 + 4 * EPS);
      expect(peak).toBeGreaterThan(1 - 1e-4);
      const factor = Math.sqrt(mode.modalMass);
      expect(byMass[n].modalMass).toBe(1);
      [100, 900, 1700].forEach((q) => {
        expect(mode.shape!.displacement![q]).toBeCloseTo(byMass[n].shape!.displacement![q] * factor, 13);
        expect(mode.shape!.force![q]).toBeCloseTo(byMass[n].shape!.force![q] * factor, 12);
      });
    });
  });

  it('only the quantities asked for are given, at the positions asked for', () => {
    const answer = solveModes(
      modesRequest(plainTrial(stepped), 2, { positions: [0.5, 3], quantities: ['force'] }),
    );
    expect(Array.from(answer.shapes!.positions)).toEqual([0.5, 3]);
    expect(answer.modes[0].shape!.displacement).toBeUndefined();
    expect(answer.modes[0].shape!.force).toHaveLength(2);
    const bare = solveModes(modesRequest(plainTrial(stepped), 2));
    expect(bare.shapes).toBeUndefined();
    expect(bare.modes[0].shape).toBeUndefined();
  });

  it('damping ratios: given ones, the last for the rest; Rayleigh α/2ω + βω/2; null for a rigid-body mode', () => {
    const of = (damping: Member['damping'], trial: TrialMember = stepped): Mode[] =>
      solveModes({
        member: requestMember(plainTrial(trial), damping),
        series: { modes: 4 },
        energyShares: false,
      }).modes;
    expect(of({ type: 'ratios', values: [0.01, 0.02] }).map((mode) => mode.dampingRatio)).toEqual(
      [0.01, 0.02, 0.02, 0.02].map((value) => expect.closeTo(value, 15)),
    );
    for (const mode of of({ type: 'rayleigh', massCoefficient: 0.3, stiffnessCoefficient: 0.01 })) {
      const omega = mode.angularFrequency;
      expect(mode.dampingRatio).toBeCloseTo(0.15 / omega + 0.005 * omega, 15);
    }
    const [rigid, next] = of({ type: 'ratio', value: 0.05 }, uniformTrial(2, { near: 'free', far: 'free' }));
    expect(rigid).toMatchObject({ angularFrequency: 0, frequency: 0, period: null, dampingRatio: null });
    expect(next.dampingRatio).toBeCloseTo(0.05, 15);
    expect(of(undefined)[0].dampingRatio).toBe(0);
  });
});

describe('how many modes', () => {
  it('all up to a frequency, exactly (uniform string, c = L = 1: f_n = n/2)', () => {
    const member = requestMember(plainTrial(uniformTrial(3)));
    for (const [upTo, count] of [
      [0.4999, 0],
      [0.5001, 1],
      [50.1, 100],
    ]) {
      const { modes, convergence } = solveModes({ member, series: { upTo }, energyShares: false });
      expect(modes).toHaveLength(count);
      expect(convergence).toEqual({ spectrumComplete: true, modesFound: count, modesInTotal: null });
    }
  });

  it('a member of lumps answers those it has, and says so', () => {
    const beads: TrialMember = {
      segments: [
        [1, 1, 0],
        [1, 1, 0],
        [1, 1, 0],
      ],
      masses: { 1: 1, 2: 2 },
    };
    const answer = solveModes(modesRequest(plainTrial(beads), 5));
    expect(answer.modes).toHaveLength(2);
    expect(answer.convergence).toEqual({ spectrumComplete: true, modesFound: 2, modesInTotal: 2 });
    expect(answer.notices).toEqual([
      {
        code: 'finite-modes',
        detail: 'All inertia is lumped, so the member has 2 modes; all of them are given.',
      },
    ]);
    expect(solveModes(modesRequest(plainTrial(beads), 2)).notices).toEqual([]);
  });

  it('mode-out-of-reach and too-many-values name the place and the limit', () => {
    const member = requestMember(plainTrial(uniformTrial(1)));
    const [reach] = faultsOf(() => solveModes({ member, series: { upTo: 10_001.1 }, energyShares: false }));
    expect(reach).toEqual({
      code: 'mode-out-of-reach',
      pointer: '/series/upTo',
      detail: '20002 modes lie below 10001.1 Hz; at most 20000 can be solved at once. Lower the frequency.',
    });
    const [many] = faultsOf(() =>
      solveModes({
        member,
        series: { modes: 20_000 },
        shapes: { positions: { count: 201 }, normalisation: 'mass', quantities: ['displacement', 'force'] },
        energyShares: false,
      }),
    );
    expect(many).toEqual({
      code: 'too-many-values',
      pointer: '/shapes',
      detail:
        '8040000 numbers would be needed (20000 modes of 402 shape values); the limit is 8000000. Ask for less.',
    });
    const [long] = faultsOf(() =>
      solveModes({
        member: requestMember(plainTrial(uniformTrial(401))),
        series: { modes: 20_000 },
        energyShares: false,
      }),
    );
    expect(long).toMatchObject({ code: 'too-many-values', pointer: '/series' });
  });
});

describe('energy shares', () => {
  it('follow the segments and attachments of the request and sum to 1', () => {
    const member: Member = {
      kind: 'wave',
      segments: [
        { length: 2, stiffness: 2, inertia: 3, foundation: 0, drag: 0 },
        { length: 1, stiffness: 5, inertia: 0.5, foundation: 4, drag: 0 },
      ],
      ends: {
        near: { type: 'attached', mass: 0, spring: 7, dashpot: 0 },
        far: { type: 'attached', mass: 1, spring: 3, dashpot: 0 },
      },
      attachments: [
        { at: 0.5, mass: 0, spring: 2, dashpot: 0 },
        { at: 2.5, mass: 0.3, spring: 0, dashpot: 0 },
        { at: 0.5, mass: 0, spring: 6, dashpot: 0 },
      ],
    };
    const { modes } = solveModes({ member, series: { modes: 8 }, energyShares: true });
    for (const { energyShares } of modes) {
      const { segments, attachments, ends } = energyShares!;
      expect([segments.length, attachments.length, ends.length]).toEqual([2, 3, 2]);
      const all = [...segments, ...attachments, ...ends];
      expect(Math.min(...all)).toBeGreaterThanOrEqual(0);
      expect(all.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 13);
      // two springs at one place share as their stiffness; a mass has none
      expect(attachments[2]).toBeCloseTo(3 * attachments[0], 14);
      expect(attachments[1]).toBe(0);
    }
  });

  it('are null for a rigid-body mode and absent unless asked for', () => {
    const free = requestMember(plainTrial(uniformTrial(2, { near: 'free', far: 'free' })));
    const [rigid, next] = solveModes({ member: free, series: { modes: 2 }, energyShares: true }).modes;
    expect(rigid.energyShares).toBeNull();
    expect(Array.from(next.energyShares!.segments)).toEqual([
      expect.closeTo(0.5, 13),
      expect.closeTo(0.5, 13),
    ]);
    expect(
      solveModes({ member: free, series: { modes: 2 }, energyShares: false }).modes[1].energyShares,
    ).toBeUndefined();
  });
});

describe('participation', () => {
  const request = (
    trial: TrialMember,
    ends: 'near' | 'far' | 'both' | 'uniform',
    modes = 30,
  ): ModesRequest => ({
    member: requestMember(plainTrial(trial)),
    series: { modes },
    energyShares: false,
    participation: { ends },
  });

  it('fixed–free: 8/(π²(2n − 1)²), cumulated', () => {
    const { modes, participation } = solveModes(request(uniformTrial(2, { far: 'free' }, [3, 5, 2]), 'near'));
    expect(participation).toEqual({ ends: 'near', mass: expect.closeTo(6, 13), endMass: 0 });
    let sum = 0;
    modes.forEach((mode, index) => {
      const fraction = 8 / (Math.PI * (2 * index + 1)) ** 2;
      sum += fraction;
      expect(mode.participation!.effectiveMassFraction).toBeCloseTo(fraction, 13);
      expect(mode.participation!.cumulativeFraction).toBeCloseTo(sum, 12);
      expect(mode.participation!.effectiveMass).toBeCloseTo(6 * fraction, 12);
      expect(mode.participation!.factor ** 2).toBeCloseTo(6 * fraction, 12);
    });
  });

  it('moving-end-not-fixed and uniform-motion-held', () => {
    const [loose] = faultsOf(() => solveModes(request(uniformTrial(2, { far: 'free' }), 'both')));
    expect(loose).toEqual({
      code: 'moving-end-not-fixed',
      pointer: '/participation/ends',
      detail:
        'Participation for "both" moves the far end as a support, but that end is not fixed. Make it fixed, or choose other ends, or "uniform" where no end is fixed.',
    });
    const [held] = faultsOf(() => solveModes(request(uniformTrial(2, { near: 'free' }), 'uniform')));
    expect(held).toEqual({
      code: 'uniform-motion-held',
      pointer: '/participation/ends',
      detail:
        'Participation for "uniform" moves every point by one unit, but the far end is fixed. Choose "near", "far" or "both".',
    });
  });
});

it('twins are listed one after the other with enclosures that may touch', () => {
  const { modes } = solveModes(modesRequest(plainTrial(doubleWell(46)), 6));
  for (const pair of [0, 2, 4]) {
    const [a, b] = [modes[pair], modes[pair + 1]];
    expect(b.angularFrequency / a.angularFrequency - 1).toBeLessThan(16 * EPS);
    expect(b.angularFrequency).toBeGreaterThanOrEqual(a.angularFrequency);
  }
});

it('the summary states length, travel time and moving mass', () => {
  const { member } = solveModes(modesRequest(plainTrial(stepped), 1));
  expect(member).toEqual({
    kind: 'wave',
    length: 3.25,
    travelTime: expect.closeTo(Math.sqrt(1.5) + 0.75 * Math.sqrt(0.1) + 1.5 * Math.sqrt(1 / 3), 14),
    totalMass: expect.closeTo(3 + 0.375 + 1.5 + 1.2, 14),
  });
});

import { describe, expect, it } from 'vitest';
import { TailFlexibility } from '../../src/certificate/tail-flexibility.ts';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { ModeSeries } from '../../src/modes/mode-series.ts';
import { placeStations } from '../../src/modes/stations.ts';
import { uniformTrial, waveMember, type TrialMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;

/** Tails at positions after `count` modes, with ω² of the next. */
function tailsAfter(
  member: WaveMember,
  positions: number[],
  count: number,
): { tails: TailFlexibility; next: number } {
  const tails = new TailFlexibility(member, placeStations(member, positions));
  const series = new ModeSeries(member);
  for (let n = 0; n < count; n++) tails.add(series.next()!);
  return { tails, next: series.next()?.shape.lambda ?? NaN };
}

/** Σ of a term from n = first to infinity: a million terms, then the integral of their mean. */
function sumFrom(first: number, term: (n: number) => number, rest: (n: number) => number): number {
  const last = 100_000;
  let sum = rest(last + 0.5);
  for (let n = last; n >= first; n--) sum += term(n);
  return sum;
}

const places = [0.05, 0.3, 0.37, 0.5, 0.81];

describe('a fixed string, L = k = ρ = 1: ΔG = Σ 2 sin²(nπx)/(nπ)², ΔH = Σ 2 cos²(nπx)/(nπ)²', () => {
  it.each([0, 1, 7, 100])('after %i modes', (count) => {
    const { tails, next } = tailsAfter(waveMember(uniformTrial(2)), places, count);
    places.forEach((x, q) => {
      // sin² and cos² have mean 1/2, the rest of the oscillation falls as 1/last²
      const g = sumFrom(
        count + 1,
        (n) => (2 * Math.sin(n * Math.PI * x) ** 2) / (n * Math.PI) ** 2,
        (n) => 1 / (Math.PI ** 2 * n),
      );
      const h = sumFrom(
        count + 1,
        (n) => (2 * Math.cos(n * Math.PI * x) ** 2) / (n * Math.PI) ** 2,
        (n) => 1 / (Math.PI ** 2 * n),
      );
      const [foundG, foundH] = [tails.flexibilityTail(q, next), tails.fluxTail(q)];
      expect(Math.abs(foundG - g)).toBeLessThan(1e-9);
      expect(Math.abs(foundH - h)).toBeLessThan(1e-9);
      expect(tails.whole[q]).toBeCloseTo(x * (1 - x), 15);
      expect(tails.wholeFlux[q]).toBeCloseTo((x ** 3 + (1 - x) ** 3) / 3, 15);
    });
  });

  it('the floor stays: at a fixed end and at a node where every tail term vanishes', () => {
    const { tails, next } = tailsAfter(waveMember(uniformTrial(2)), [0, 0.5], 50);
    expect(tails.flexibilityTail(0, next)).toBe(0);
    expect(tails.flexibilityTail(1, next)).toBeGreaterThan(64 * EPS * 0.25);
  });
});

it('the value is never below the sum of the next thousand terms', () => {
  const trial: TrialMember = {
    segments: [
      [1, 2, 3],
      [0.75, 5, 0.5, 40],
      [1.5, 3, 1],
    ],
    far: 'free',
    masses: { 1: 0.5, 3: 2 },
    springs: { 2: 4 },
  };
  const member = waveMember(trial);
  const positions = [0.4, 1, 1.3, 2.2, 3.25];
  const stations = placeStations(member, positions);
  const tails = new TailFlexibility(member, stations);
  const series = new ModeSeries(member);
  const kept: { g: number; h: number }[][] = [];
  for (let n = 0; n < 1200; n++) {
    const mode = series.next()!;
    const before = positions.map((_, q) => ({
      g: tails.flexibilityTail(q, mode.shape.lambda),
      h: tails.fluxTail(q),
    }));
    kept.push(before);
    tails.add(mode);
  }
  const last = kept[kept.length - 1];
  kept.slice(0, 200).forEach((tail) =>
    tail.forEach(({ g, h }, q) => {
      // the rest after 1,199 modes is positive: what was left before is more than the difference
      expect(g).toBeGreaterThan(last[q].g);
      expect(h).toBeGreaterThan(last[q].h);
    }),
  );
  // at a mass ΔG falls as N⁻³, elsewhere as N⁻¹
  const ratio = (q: number): number => kept[100][q].g / kept[800][q].g;
  expect(ratio(0)).toBeGreaterThan(6);
  expect(ratio(0)).toBeLessThan(11);
  expect(ratio(1)).toBeGreaterThan(200);
});

describe('a member that drifts uses G⊥ and H⊥, the rigid-body mode left out', () => {
  it('free bar: ΔG⊥ = Σ 2 cos²(nπx)/(nπ)²', () => {
    const member = waveMember(uniformTrial(1, { near: 'free', far: 'free' }));
    const { tails, next } = tailsAfter(member, [0, ...places], 12);
    [0, ...places].forEach((x, q) => {
      const g = sumFrom(
        12,
        (n) => (2 * Math.cos(n * Math.PI * x) ** 2) / (n * Math.PI) ** 2,
        (n) => (x === 0 ? 2 : 1) / (Math.PI ** 2 * n),
      );
      expect(Math.abs(tails.flexibilityTail(q, next) - g)).toBeLessThan(1e-9);
    });
  });
});

describe('a nearly free member uses the shifted form, in which nothing cancels', () => {
  it.each([1e-6, 1e-10, 1e-13, 1e-30])('spring %s', (spring) => {
    const soft = waveMember({
      ...uniformTrial(1, { near: 'free', far: 'free' }),
      springs: { 0: spring },
    });
    const { tails, next } = tailsAfter(soft, [0, ...places], 20);
    [0, ...places].forEach((x, q) => {
      // the elastic modes are those of the free bar to the order of the spring
      const truth = sumFrom(
        20,
        (n) => (2 * Math.cos(n * Math.PI * x) ** 2) / (n * Math.PI) ** 2,
        (n) => (x === 0 ? 2 : 1) / (Math.PI ** 2 * n),
      );
      const found = tails.flexibilityTail(q, next);
      expect(found).toBeGreaterThan(truth * (1 - 1e-4 - spring));
      // far below the 64·2⁻⁵²/K of plain subtraction
      expect(found).toBeLessThan(1.05 * truth);
    });
  });
});

describe('lumps', () => {
  it('after its only mode a bead on a massless string has nothing left at the bead', () => {
    const member = waveMember({
      segments: [
        [1, 5, 0],
        [1, 5, 0],
      ],
      masses: { 1: 2 },
    });
    const positions = [0.5, 1, 1.7];
    const tails = new TailFlexibility(member, placeStations(member, positions));
    // G − G_held: the bead's 1/10 and its static share
    [0.025, 0.1, 0.009].forEach((g, q) => expect(tails.whole[q]).toBeCloseTo(g, 15));
    tails.add(new ModeSeries(member).next()!);
    positions.forEach((_, q) => {
      expect(tails.flexibilityTail(q, 1)).toBeLessThan(100 * EPS);
      expect(tails.fluxTail(q)).toBeLessThan(200 * EPS);
    });
  });
});

it('sampled values may be taken out in parts of the stations', () => {
  const member = waveMember(uniformTrial(1));
  const [whole, parts] = [0, 1].map(() => new TailFlexibility(member, placeStations(member, places)));
  const series = new ModeSeries(member);
  for (let n = 1; n <= 5; n++) {
    const mode = series.next()!;
    const u = Float64Array.from(places, (x) => Math.SQRT2 * Math.sin(n * Math.PI * x));
    const p = Float64Array.from(places, (x) => Math.SQRT2 * n * Math.PI * Math.cos(n * Math.PI * x));
    whole.addSampled(mode, u, p);
    parts.addSampled(mode, u.subarray(0, 2), p.subarray(0, 2));
    parts.addSampled(mode, u.subarray(2), p.subarray(2), 2);
  }
  places.forEach((_, q) => {
    expect(parts.flexibilityTail(q, 400)).toBe(whole.flexibilityTail(q, 400));
    expect(parts.fluxTail(q)).toBe(whole.fluxTail(q));
  });
});

describe('a flexibility overdrawn tells of a wrong shape', () => {
  const member = waveMember(uniformTrial(2));
  const tails = (): TailFlexibility => new TailFlexibility(member, placeStations(member, places));

  it('never by right shapes, however many', () => {
    const right = tails();
    const series = new ModeSeries(member);
    for (let n = 1; n <= 300; n++) {
      right.add(series.next()!);
      expect(right.overdrawn()).toBe(false);
    }
  });

  it('by the first shape taken twice, by one that is too large', () => {
    const [twice, large] = [tails(), tails()];
    const first = new ModeSeries(member).next()!;
    twice.add(first);
    expect(twice.overdrawn()).toBe(false);
    twice.add(first);
    expect(twice.overdrawn()).toBe(true);
    const ends = first.shape.ends.map((value) => 1.2 * value);
    large.add({ ...first, shape: { ...first.shape, ends } });
    expect(large.overdrawn()).toBe(true);
  });
});

import { describe, expect, it } from 'vitest';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { StaticResponse } from '../../src/modes/static-response.ts';
import { RandomStream } from '../support/random.ts';
import { solveDense } from '../support/gauss.ts';
import { waveMember, type TrialMember } from '../spectrum/trial-members.ts';
import { integrate } from './quadrature.ts';

const EPS = Number.EPSILON;

/** Segment and distance of a place. */
function seat(member: WaveMember, x: number): [number, number] {
  let i = 0;
  while (i < member.segmentCount - 1 && x > member.position[i + 1]) i++;
  return [i, Math.min(x - member.position[i], member.length[i])];
}

const roundings = (found: number, expected: number): number => Math.abs(found / expected - 1) / EPS;

/** L = 3, T = 8, in segments of the given shares. */
function string(shares: readonly number[], extra: Partial<TrialMember> = {}, s = 0, rho = 2): WaveMember {
  return waveMember({ ...extra, segments: shares.map((share) => [3 * share, 8, rho, s] as const) });
}

const cuts = [[1], [0.5, 0.5], [0.25, 0.125, 0.5, 0.125]];
const places = [0.1, 0.3, 0.75, 1.5, 1.9, 2.7];

describe('a taut string between fixed ends', () => {
  it.each(cuts)(
    'G(x,z) = x(L − z)/TL, the influence of z on the force at x is (L − z)/L or −z/L',
    (...cut) => {
      const member = string(cut);
      const response = new StaticResponse(member);
      for (const x of places) {
        expect(roundings(response.flexibility(...seat(member, x)), (x * (3 - x)) / 24)).toBeLessThan(16);
        for (const z of places) {
          const [low, high] = [Math.min(x, z), Math.max(x, z)];
          const found = response.mutualFlexibility(...seat(member, x), ...seat(member, z));
          expect(roundings(found, (low * (3 - high)) / 24)).toBeLessThan(16);
          const influence = response.influence(...seat(member, x), ...seat(member, z));
          expect(roundings(influence, x <= z ? (3 - z) / 3 : -z / 3)).toBeLessThan(16);
        }
      }
      expect(response.flexibility(0, 0)).toBe(0);
    },
  );

  it.each(cuts)('H(x) = ∫ρ I² = ρ(x³ + (L − x)³)/3L²', (...cut) => {
    const member = string(cut);
    const response = new StaticResponse(member);
    for (const x of [0, ...places, 3]) {
      const expected = (2 * (x ** 3 + (3 - x) ** 3)) / 27;
      expect(roundings(response.fluxInertia(...seat(member, x)), expected)).toBeLessThan(16);
    }
  });
});

it('a bar fixed at one end: G(x,z) = min(x,z)/EA and H(x) = ρ(L − x) + M', () => {
  const member = string([0.5, 0.5], { far: 'free', masses: { 2: 5 } });
  const response = new StaticResponse(member);
  for (const x of [...places, 3]) {
    expect(roundings(response.fluxInertia(...seat(member, x)), 2 * (3 - x) + 5)).toBeLessThan(16);
    for (const z of places) {
      const found = response.mutualFlexibility(...seat(member, x), ...seat(member, z));
      expect(roundings(found, Math.min(x, z) / 8)).toBeLessThan(16);
    }
  }
});

it('the force just outside a free massless end has no influence: H = 0 there', () => {
  const member = string([1], { far: 'free' });
  expect(new StaticResponse(member).fluxInertia(0, 3)).toBe(0);
});

/** M. Hetényi, Beams on Elastic Foundation, 1946, by analogy; the string on bedding in K. F. Graff, 1975, § 1.6. */
describe('a string on bedding: hyperbolic functions of κ = √(s/T)', () => {
  it.each([0.02, 5, 800, 80_000])('s = %s', (s) => {
    const kappa = Math.sqrt(s / 8);
    for (const cut of cuts) {
      const member = string(cut, {}, s);
      const response = new StaticResponse(member);
      // sinh a sinh b/sinh c without overflow
      const ratio = (a: number, b: number, c: number): number =>
        (0.5 * Math.exp(kappa * (a + b - c)) * (-Math.expm1(-2 * kappa * a) * -Math.expm1(-2 * kappa * b))) /
        -Math.expm1(-2 * kappa * c);
      for (const x of places) {
        const own = ratio(x, 3 - x, 3) / (8 * kappa);
        // e^{κ…} brings κL roundings
        expect(roundings(response.flexibility(...seat(member, x)), own)).toBeLessThan(32);
        for (const z of places) {
          const [low, high] = [Math.min(x, z), Math.max(x, z)];
          const expected = ratio(low, 3 - high, 3) / (8 * kappa);
          const found = response.mutualFlexibility(...seat(member, x), ...seat(member, z));
          expect(Math.abs(found - expected)).toBeLessThanOrEqual((32 + 12 * kappa) * EPS * expected + 1e-300);
        }
      }
    }
  });

  it('a long stretch gives 1/2Tκ', () => {
    const response = new StaticResponse(string([0.5, 0.5], { near: 'free', far: 'free' }, 8e6));
    expect(roundings(response.flexibility(0, 1.5), 1 / (2 * 8 * 1000))).toBeLessThan(8);
  });

  it('the integral of the influence line up to a place, in weak and strong bedding', () => {
    // (∞, ∞): a force at z has the influence ∓e^{−κ|x − z|}/2 on the flux at x
    for (const s of [3, 8e4]) {
      const member = string([0.3, 0.7], { near: 'free', far: 'free', springs: { 1: 6 } }, s);
      const response = new StaticResponse(member);
      for (const x of [0.2, 0.9, 2]) {
        const [i, d] = seat(member, x);
        for (const z of [0, 0.1, 0.2, 0.5, 0.9, 1.4, 2, 3]) {
          const cut = [0, 0.9, x, z].filter((y) => y <= z).toSorted((a, b) => a - b);
          let expected = 0;
          for (let c = 1; c < cut.length; c++) {
            const over = (y: number): number => response.influence(i, d, ...seat(member, y));
            if (cut[c] > cut[c - 1]) expected += integrate(over, cut[c - 1], cut[c], s > 10 ? 200 : 4);
          }
          const found = response.influenceIntegral(i, d, ...seat(member, z));
          expect(Math.abs(found - expected), `s = ${s}, x = ${x}, z = ${z}`).toBeLessThan(1e-12);
        }
      }
      if (s > 10) {
        const kappa = Math.sqrt(s / 8);
        const whole = response.influenceIntegral(...seat(member, 2), ...seat(member, 2));
        expect(whole).toBeCloseTo(-0.5 / kappa, 12);
      }
    }
  });

  it('H is the inertia integral of the influence line, node masses on their side', () => {
    const member = waveMember({
      segments: [
        [1, 8, 2, 3],
        [0.7, 5, 0.5],
        [1.3, 8, 1, 40],
      ],
      far: 'free',
      masses: { 1: 1.5, 2: 0.3, 3: 0.8 },
      springs: { 2: 6 },
    });
    const response = new StaticResponse(member);
    for (const [i, d] of [
      [0, 0],
      [0, 0.4],
      [0, 1],
      [1, 0],
      [1, 0.35],
      [2, 0.2],
      [2, 1.3],
    ]) {
      let inertia = 0;
      for (let j = 0; j < 3; j++) {
        const cut = j === i ? [0, d, member.length[j]] : [0, member.length[j]];
        for (let c = 1; c < cut.length; c++) {
          const over = (z: number): number => response.influence(i, d, j, z) ** 2;
          if (cut[c] > cut[c - 1]) inertia += member.inertia[j] * integrate(over, cut[c - 1], cut[c], 4);
        }
      }
      for (let node = 1; node <= 3; node++) {
        const [j, z] = node === 3 ? [2, member.length[2]] : [node, 0];
        let line = response.influence(i, d, j, z);
        // the station on the near side of the node sees its mass behind it, on the far side before it
        if (node === i + 1 && d === member.length[i]) line = response.influence(i, d, i, d);
        if (node === i && d === 0) line = response.influence(i, d, i, d) - 1;
        inertia += member.mass[node] * line * line;
      }
      expect(roundings(response.fluxInertia(i, d), inertia)).toBeLessThan(64);
    }
  });
});

describe('shifted by σ times the inertia', () => {
  it('a uniform string has κ = √((s + σρ)/T)', () => {
    const sigma = 11;
    const member = string([0.5, 0.5], {}, 4);
    const response = new StaticResponse(member, sigma);
    const kappa = Math.sqrt((4 + sigma * 2) / 8);
    for (const x of places) {
      const expected =
        (Math.sinh(kappa * x) * Math.sinh(kappa * (3 - x))) / (8 * kappa * Math.sinh(3 * kappa));
      expect(roundings(response.flexibility(...seat(member, x)), expected)).toBeLessThan(32);
    }
  });

  it('a mass on a node acts as a spring σM', () => {
    const light = waveMember({ segments: [[1, 2, 0]], near: 'free', far: 'free', masses: { 0: 3, 1: 5 } });
    const response = new StaticResponse(light, 7);
    // springs 21 and 35 joined by 2: at the near end 21 + 2·35/37
    expect(roundings(response.flexibility(0, 0), 1 / (21 + 70 / 37))).toBeLessThan(8);
    expect(roundings(response.flexibility(0, 1), 1 / (35 + 42 / 23))).toBeLessThan(8);
  });
});

it('chains of springs agree with elimination of their stiffness matrix', () => {
  for (let stream = 0; stream < 20; stream++) {
    const random = new RandomStream(12, stream);
    const n = random.integer(1, 7);
    const trial: TrialMember = {
      segments: Array.from({ length: n }, () => [random.between(0.5, 2), random.decades(-2, 2), 1] as const),
      near: random.chance(0.5) ? 'fixed' : 'free',
      far: 'free',
      springs: Object.fromEntries(
        Array.from({ length: n }, (_, j) => [j + 1, random.chance(0.6) ? random.decades(-2, 2) : 0]),
      ),
    };
    const member = waveMember(trial);
    if (!member.nearFixed && member.spring.every((k) => k === 0)) continue;
    const free = Array.from({ length: n + 1 }, (_, j) => j).filter((j) => j > 0 || !member.nearFixed);
    const matrix = free.map((a) =>
      free.map((b) => {
        let entry = a === b ? member.spring[a] : 0;
        for (let i = 0; i < n; i++) {
          const k = member.stiffness[i] / member.length[i];
          if (a === b && (a === i || a === i + 1)) entry += k;
          if (Math.abs(a - b) === 1 && Math.min(a, b) === i) entry -= k;
        }
        return entry;
      }),
    );
    const response = new StaticResponse(member);
    const place = (j: number): [number, number] => (j === n ? [n - 1, member.length[n - 1]] : [j, 0]);
    free.forEach((load, row) => {
      const column = solveDense(
        matrix,
        free.map((_, at) => (at === row ? 1 : 0)),
      );
      free.forEach((node, at) => {
        const found = response.mutualFlexibility(...place(node), ...place(load));
        // the elimination subtracts: its own condition, contrasts of 1e4
        expect(Math.abs(found - column[at])).toBeLessThan(1e-10 * Math.max(...column.map(Math.abs)));
      });
    });
  }
});

describe('static shapes of a unit end motion', () => {
  it('are straight lines between fixed ends, 1 where the other end is free', () => {
    const held = new StaticResponse(string([0.25, 0.5, 0.25]));
    expect(Array.from(held.endMotion('near'))).toEqual([1, 0.75, 0.25, 0]);
    expect(Array.from(held.endMotion('far'))).toEqual([0, 0.25, 0.75, 1]);
    const free = new StaticResponse(string([0.25, 0.75], { far: 'free' }));
    expect(Array.from(free.endMotion('near'))).toEqual([1, 1, 1]);
  });

  it.each([2, 50, 3e5])('are sinh κ(L − x)/sinh κL on a bedding of %s', (s) => {
    const member = string([0.25, 0.5, 0.25], {}, s);
    const response = new StaticResponse(member);
    const kappa = Math.sqrt(s / 8);
    const line = (rest: number): number =>
      (Math.exp(-kappa * (3 - rest)) * -Math.expm1(-2 * kappa * rest)) / -Math.expm1(-6 * kappa);
    const near = response.endMotion('near');
    const far = response.endMotion('far');
    for (let j = 0; j <= 3; j++) {
      const x = member.position[j];
      expect(Math.abs(near[j] - line(3 - x))).toBeLessThanOrEqual((16 + 8 * kappa) * EPS * line(3 - x));
      expect(Math.abs(far[j] - line(x))).toBeLessThanOrEqual((16 + 8 * kappa) * EPS * line(x));
    }
  });

  it('with a spring at the other end share the motion as two springs in a row', () => {
    const response = new StaticResponse(string([1], { far: 'free', springs: { 1: 4 } }));
    // k/L = 8/3: the far end moves by (8/3)/(8/3 + 4)
    expect(roundings(response.endMotion('near')[1], 8 / 20)).toBeLessThan(4);
  });
});

import { describe, expect, it } from 'vitest';
import { readMember } from '../../src/members/read-member.ts';
import type { WaveMember } from '../../src/members/wave-member.ts';
import {
  evaluateShape,
  modalMass,
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
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';

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

/** φ and p of a shape at x. */
function at(member: WaveMember, shape: ModeShape, x: number): [number, number] {
  const out = new Float64Array(2);
  let i = 0;
  while (i < member.segmentCount - 1 && x > member.position[i + 1]) i++;
  evaluateShape(member, shape, i, Math.min(x - member.position[i], member.length[i]), out);
  return [out[0], out[1]];
}

/** Largest deviation of displacement and flux from closed forms, in roundings of their amplitudes. */
function deviation(
  member: WaveMember,
  shape: ModeShape,
  displacement: (x: number) => number,
  flux: (x: number) => number,
  [amplitude, strength]: [number, number],
): number {
  let worst = 0;
  const length = member.position[member.segmentCount];
  for (let j = 0; j <= 60; j++) {
    const x = (length * j) / 60;
    const [u, p] = at(member, shape, x);
    worst = Math.max(worst, Math.abs(u - displacement(x)) / (EPS * amplitude));
    worst = Math.max(worst, Math.abs(p - flux(x)) / (EPS * strength));
  }
  return worst;
}

describe('closed forms of uniform members', () => {
  const [length, k, rho] = [3, 8, 2];
  const high = Math.sqrt(2 / (rho * length));

  it.each([1, 4])('fixed–fixed in %i segments: √(2/ρL) sin nπx/L', (count) => {
    const member = waveMember(uniformTrial(count, {}, [length, k, rho]));
    shapes(member, 20).forEach((shape, index) => {
      const kappa = ((index + 1) * Math.PI) / length;
      const error = deviation(
        member,
        shape,
        (x) => high * Math.sin(kappa * x),
        (x) => k * kappa * high * Math.cos(kappa * x),
        [high, k * kappa * high],
      );
      // ω carries some roundings, its phase nπ of them; so does κx here
      expect(error).toBeLessThan(16 + 8 * Math.PI * (index + 1));
    });
  });

  it('free–free: √(2/ρL) cos nπx/L', () => {
    const member = waveMember(uniformTrial(3, { near: 'free', far: 'free' }, [length, k, rho]));
    shapes(member, 12).forEach((shape, index) => {
      const kappa = ((index + 1) * Math.PI) / length;
      const error = deviation(
        member,
        shape,
        (x) => high * Math.cos(kappa * x),
        (x) => -k * kappa * high * Math.sin(kappa * x),
        [high, k * kappa * high],
      );
      expect(error).toBeLessThan(16 + 8 * Math.PI * (index + 1));
    });
  });

  it('fixed with an end mass: A sin κx, 1/A² = ρL/2 (1 − sin 2κL/2κL) + M sin² κL', () => {
    const mass = 1.7;
    const member = waveMember({
      ...uniformTrial(2, { far: 'free' }, [length, k, rho]),
      masses: { 2: mass },
    });
    shapes(member, 12).forEach((shape) => {
      const kappa = Math.sqrt((shape.lambda * rho) / k);
      const phase = kappa * length;
      // kκ cos κL = ω²M sin κL holds to the rounding of ω
      const balance = k * kappa * Math.cos(phase) - shape.lambda * mass * Math.sin(phase);
      expect(Math.abs(balance)).toBeLessThan(EPS * (8 + 4 * phase) * (k * kappa + shape.lambda * mass));
      const size = 0.5 * rho * length * (1 - Math.sin(2 * phase) / (2 * phase)) + mass * Math.sin(phase) ** 2;
      const amplitude = 1 / Math.sqrt(size);
      const error = deviation(
        member,
        shape,
        (x) => amplitude * Math.sin(kappa * x),
        (x) => k * kappa * amplitude * Math.cos(kappa * x),
        [amplitude, k * kappa * amplitude],
      );
      expect(error).toBeLessThan(32 + 8 * phase);
    });
  });
});

it('a mode trapped between two beddings is A cos κx inside and dies as sinh γ(b − x) outside', () => {
  const [half, outside, bedding] = [1, 2, 400];
  const member = waveMember({
    segments: [
      [outside, 1, 1, bedding],
      [2 * half, 1, 1],
      [outside, 1, 1, bedding],
    ],
  });
  const [shape] = shapes(member, 1);
  const kappa = Math.sqrt(shape.lambda);
  const gamma = Math.sqrt(bedding - shape.lambda);
  // ω itself: κ tan κa = γ coth γb
  expect(Math.abs(kappa * Math.tan(kappa * half) - gamma / Math.tanh(gamma * outside))).toBeLessThan(
    64 * EPS * gamma * (1 + gamma * gamma),
  );
  const edge = Math.cos(kappa * half) / Math.sinh(gamma * outside);
  const inside = half + Math.sin(2 * kappa * half) / (2 * kappa);
  const tails = edge * edge * (Math.sinh(2 * gamma * outside) / (2 * gamma) - outside);
  const amplitude = 1 / Math.sqrt(inside + tails);
  const middle = outside + half;
  const wave = (x: number): number => {
    const y = Math.abs(x - middle);
    return y <= half ? Math.cos(kappa * y) : edge * Math.sinh(gamma * (half + outside - y));
  };
  const slope = (x: number): number => {
    const y = Math.abs(x - middle);
    const inner = -kappa * Math.sin(kappa * y);
    const outer = -gamma * edge * Math.cosh(gamma * (half + outside - y));
    return Math.sign(x - middle) * (y <= half ? inner : outer);
  };
  const error = deviation(
    member,
    shape,
    (x) => amplitude * wave(x),
    (x) => amplitude * slope(x),
    [amplitude, amplitude * gamma],
  );
  expect(error).toBeLessThan(128);
});

describe('where the two marches are joined', () => {
  const wells = waveMember({
    segments: [
      [1, 1, 1],
      [1, 1, 1, 900],
      [1.1, 1, 1],
    ],
  });

  it('is where the mode lives: a join elsewhere meets badly', () => {
    const { omega } = new NaturalFrequencies(wells).next()!;
    // the first mode lives in the longer well
    expect(shapeAt(wells, omega).mismatch).toBeLessThan(1e-14);
    expect(shapeAt(wells, omega, 3).mismatch).toBeLessThan(1e-14);
    expect(shapeAt(wells, omega, 0).mismatch).toBeGreaterThan(1e-6);
  });

  it('does not matter for a mode that moves the whole member', () => {
    const member = waveMember({
      segments: [
        [1, 2, 3],
        [0.75, 5, 0.5],
        [1.5, 3, 1],
      ],
      far: 'free',
      masses: { 1: 0.5 },
    });
    for (const shape of shapes(member, 8)) {
      for (let node = 0; node <= 3; node++) {
        const other = shapeAt(member, Math.sqrt(shape.lambda), node);
        const worst = Math.max(...shape.ends.map((value, e) => Math.abs(value - other.ends[e])));
        const size = Math.max(...shape.ends.map(Math.abs));
        expect(worst / size).toBeLessThan(1e-13 * (1 + Math.sqrt(shape.lambda)));
      }
    }
  });
});

describe('random members', () => {
  const members = Array.from({ length: 30 }, (_, stream) => {
    const random = new RandomStream(31, stream);
    const family = random.pick(['general', 'massless-segments', 'nearly-rigid', 'uniform'] as const);
    return readMember(requestMember(randomMember(random, family)));
  });

  it('modal mass is 1 and ∫p²/k + ∫sφ² + ΣKφ² = ω² (Rayleigh quotient)', () => {
    let worst = 0;
    for (const member of members) {
      for (const shape of shapes(member, 10)) {
        const mass = modalMass(member, shape.lambda, shape.ends);
        worst = Math.max(worst, Math.abs(mass - 1) / (16 * EPS * member.segmentCount));
        let strain = 0;
        for (let i = 0; i < member.segmentCount; i++) {
          const l = member.length[i];
          strain += (l / member.stiffness[i]) * segmentMeanSquareFlux(member, i, shape.lambda, shape.ends);
          strain += member.foundation[i] * l * segmentMeanSquare(member, i, shape.lambda, shape.ends);
        }
        for (let j = 0; j <= member.segmentCount; j++) {
          const u = j === 0 ? shape.ends[0] : shape.ends[4 * j - 2];
          strain += member.spring[j] * u * u;
        }
        // the quotient is stationary at a mode: errors of the shape enter squared
        worst = Math.max(worst, Math.abs(strain / shape.lambda - 1) / 1e-12);
      }
    }
    expect(worst).toBeLessThan(1);
  });

  it('both ends of a segment are those of the evaluated shape, neighbours meet at the nodes', () => {
    let worst = 0;
    const out = new Float64Array(2);
    for (const member of members) {
      for (const shape of shapes(member, 8)) {
        const { ends, lambda } = shape;
        const length = member.position[member.segmentCount];
        const looks = Array.from({ length: 41 }, (_, j) => at(member, shape, (length * j) / 40));
        const highest = Math.max(...looks.map(([u]) => Math.abs(u)));
        // a mode of zero wave number has no flux
        const strongest = Math.max(...looks.map(([, p]) => Math.abs(p))) || 1;
        for (let i = 0; i < member.segmentCount; i++) {
          const phase = Math.sqrt(Math.abs(waveNumberSquare(member, i, lambda))) * member.length[i];
          evaluateShape(member, shape, i, 0, out);
          const near = [out[0] - ends[4 * i], out[1] - ends[4 * i + 1]];
          evaluateShape(member, shape, i, member.length[i], out);
          const far = [out[0] - ends[4 * i + 2], out[1] - ends[4 * i + 3]];
          const tolerance = 1e-12 * (1 + phase);
          for (const [du, dp] of [near, far]) {
            worst = Math.max(worst, Math.abs(du) / (highest * tolerance));
            worst = Math.max(worst, Math.abs(dp) / (strongest * tolerance));
          }
          if (i + 1 === member.segmentCount) continue;
          const jump = ends[4 * i + 5] - ends[4 * i + 3];
          const lump = (member.spring[i + 1] - lambda * member.mass[i + 1]) * ends[4 * i + 2];
          worst = Math.max(worst, Math.abs(ends[4 * i + 4] - ends[4 * i + 2]) / (1e-12 * highest));
          // the displacement of a heavy node is known to rounding of the highest, not of its own
          const inertial = (member.spring[i + 1] + lambda * member.mass[i + 1]) * highest;
          worst = Math.max(worst, Math.abs(jump - lump) / (1e-12 * (strongest + inertial)));
        }
      }
    }
    expect(worst).toBeLessThan(1);
  });

  it('φ(0) > 0, or φ′(0⁺) > 0 at a fixed near end', () => {
    for (const member of members) {
      for (const shape of shapes(member, 10)) {
        expect(shape.ends[member.nearFixed ? 1 : 0]).toBeGreaterThan(0);
        if (member.nearFixed) expect(shape.ends[0]).toBe(0);
        if (member.farFixed) expect(shape.ends[4 * member.segmentCount - 2]).toBe(0);
      }
    }
  });
});

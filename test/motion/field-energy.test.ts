import { describe, expect, it } from 'vitest';
import { masslessStretches } from '../../src/modes/massless-stretches.ts';
import { StaticResponse } from '../../src/modes/static-response.ts';
import {
  massForm,
  massRounding,
  piecesStrainForm,
  strainForm,
  strainRounding,
  valueAt,
} from '../../src/motion/field-energy.ts';
import { readDisplacement, settle } from '../../src/motion/initial-displacement.ts';
import { readVelocity } from '../../src/motion/initial-velocity.ts';
import { pieceSlope, pieceValue } from '../../src/motion/piecewise-field.ts';
import type { Shape } from '../../src/spec/types.ts';
import { integrate } from '../modes/quadrature.ts';
import { uniformTrial, waveMember, type TrialMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;

const roundings = (found: number, expected: number): number => Math.abs(found / expected - 1) / EPS;

/** Twice the strain energy of shapes on a trial. */
function strain(trial: TrialMember, shapes: Shape | Shape[]): number {
  const member = waveMember(trial);
  const response = new StaticResponse(member);
  return strainForm(member, readDisplacement(member, shapes, response), response);
}

const [length, tension] = [2, 8];
const string = uniformTrial(3, {}, [length, tension, 0.5]);

describe('strain energies of a taut string in closed form', () => {
  it('plucked: T h²(1/a + 1/b), whether given by amplitude, force or polyline', () => {
    const [a, b, h] = [0.5, 1.5, 0.03];
    const expected = tension * h * h * (1 / a + 1 / b);
    expect(roundings(strain(string, { type: 'pull', at: a, amplitude: h }), expected)).toBeLessThan(32);
    const force = h * tension * (1 / a + 1 / b);
    expect(roundings(strain(string, { type: 'pull', at: a, force }), expected)).toBeLessThan(32);
    const line: Shape = { type: 'polyline', positions: [0, a, length], values: [0, h, 0] };
    expect(roundings(strain(string, line), expected)).toBeLessThan(32);
  });

  it('half-sine: T h² n²π²/2L', () => {
    for (const halfWaves of [1, 2, 5, 30]) {
      const expected = (tension * 0.01 ** 2 * (halfWaves * Math.PI) ** 2) / (2 * length);
      const found = strain(string, { type: 'half-sine', amplitude: 0.01, halfWaves });
      expect(roundings(found, expected)).toBeLessThan(32 + 8 * halfWaves);
    }
  });

  it('parabola 4h x(L − x)/L²: 16 T h²/3L', () => {
    const h = 0.02;
    const parabola: Shape = {
      type: 'polynomial',
      coefficients: [0, (4 * h) / length, (-4 * h) / length ** 2],
      from: 0,
    };
    expect(roundings(strain(string, parabola), (16 * tension * h * h) / (3 * length))).toBeLessThan(32);
  });

  it('two pulls: their own forms and twice the force of one times the shape of the other', () => {
    const pulls: Shape[] = [
      { type: 'pull', at: 0.5, force: 3 },
      { type: 'pull', at: 1.25, force: -2 },
    ];
    const g = (x: number, z: number): number => (Math.min(x, z) * (2 - Math.max(x, z))) / 16;
    const expected = 9 * g(0.5, 0.5) + 4 * g(1.25, 1.25) - 12 * g(0.5, 1.25);
    expect(roundings(strain(string, pulls), expected)).toBeLessThan(64);
  });
});

it('springs and bedding add K f² and ∫ s f²', () => {
  const trial: TrialMember = {
    segments: [
      [1, 8, 1, 30],
      [1, 8, 1],
    ],
    near: 'free',
    far: 'free',
    springs: { 0: 3, 1: 5, 2: 7 },
  };
  // f = 1 + x: k 2, s ∫(1 + x)² = 30·7/3, springs 3·1 + 5·4 + 7·9
  const found = strain(trial, { type: 'polynomial', coefficients: [1, 1], from: 0 });
  expect(roundings(found, 16 + 70 + 3 + 20 + 63)).toBeLessThan(32);
});

it('mixtures of pulls and given shapes agree with quadrature of the whole field', () => {
  const trial: TrialMember = {
    segments: [
      [1, 2, 3],
      [0.75, 5, 0.5, 40],
      [1.5, 3, 1],
    ],
    far: 'free',
    masses: { 1: 0.5 },
    springs: { 2: 4, 3: 2 },
  };
  const member = waveMember(trial);
  const response = new StaticResponse(member);
  const field = readDisplacement(
    member,
    [
      { type: 'pull', at: 0.4, amplitude: 0.3 },
      { type: 'pull', at: 2.5, force: -1 },
      { type: 'polyline', positions: [0, 1.2, 2, 3.25], values: [0, 0.1, -0.2, 0.3] },
      { type: 'half-sine', amplitude: 0.2, halfWaves: 5 },
    ],
    response,
  );
  const pulled = (i: number, d: number): [number, number] => {
    let [u, p] = [0, 0];
    for (const { segment, distance, force } of field.pulls) {
      u += force * response.mutualFlexibility(i, d, segment, distance);
      p += force * response.influence(i, d, segment, distance);
    }
    return [u, p];
  };
  let form = 0;
  for (const piece of field.pieces) {
    const { segment: i, start } = piece;
    const k = member.stiffness[i];
    const cuts = [0, piece.length];
    for (const { segment, distance } of field.pulls) {
      const xi = distance - start;
      if (segment === i && xi > 0 && xi < piece.length) cuts.splice(1, 0, xi);
    }
    for (let c = 1; c < cuts.length; c++) {
      form += integrate(
        (xi) => {
          const [u, p] = pulled(i, start + xi);
          const slope = p / k + pieceSlope(piece, xi).value;
          return k * slope * slope + member.foundation[i] * (u + pieceValue(piece, xi).value) ** 2;
        },
        cuts[c - 1],
        cuts[c],
        6,
      );
    }
  }
  for (const node of [2, 3]) {
    const [i, d] = [node - 1, member.length[node - 1]];
    form += member.spring[node] * (pulled(i, d)[0] + valueAt(field.pieces, i, d)) ** 2;
  }
  expect(roundings(strainForm(member, field, response), form)).toBeLessThan(1000);
});

it('kinetic energy: ∫ρ g² + ΣM v²', () => {
  const member = waveMember({ ...string, masses: { 1: 3 } });
  const velocity = readVelocity(
    member,
    {
      velocity: { type: 'uniform', value: 2, from: 0, to: 1 },
      massVelocities: [{ at: 2 / 3, velocity: -4 }],
    },
    null,
  );
  expect(roundings(massForm(member, velocity.pieces, velocity.masses), 0.5 * 4 + 3 * 16)).toBeLessThan(16);
  const wave = readVelocity(member, { velocity: { type: 'half-sine', amplitude: 3, halfWaves: 2 } }, null);
  const masses = 3 * (3 * Math.sin((2 * Math.PI) / 3)) ** 2;
  expect(roundings(massForm(member, wave.pieces, wave.masses), 0.5 * 9 + masses)).toBeLessThan(32);
});

it('plucked massless string: two thirds of the energy is no motion of the mass (certificate of finite modes)', () => {
  const member = waveMember({
    segments: [
      [1, 5, 0],
      [1, 5, 0],
    ],
    masses: { 1: 2 },
  });
  const response = new StaticResponse(member);
  const given = readDisplacement(member, { type: 'pull', at: 0.5, amplitude: 0.03 }, response);
  const kept = strainForm(member, settle(member, given, masslessStretches(member)), response);
  expect(roundings(kept / strainForm(member, given, response), 1 / 3)).toBeLessThan(32);
});

it('a field is found at any distance, 0 beyond its cells', () => {
  const member = waveMember(string);
  const { pieces } = readDisplacement(
    member,
    { type: 'polyline', positions: [0, 0.5, 2], values: [0, 1, 0] },
    new StaticResponse(member),
  );
  expect(valueAt(pieces, 0, 0.25)).toBeCloseTo(0.5, 15);
  expect(valueAt(pieces, 0, member.length[0])).toBeCloseTo(8 / 9, 15);
  expect(valueAt(pieces, 7, 0)).toBe(0);
  expect(piecesStrainForm(member, pieces)).toBeCloseTo(8 * (2 + 2 / 3), 13);
});

describe('the rounding of the forms', () => {
  const member = waveMember(uniformTrial(1, {}, [1, 1, 1]));
  const read = (shapes: Shape[]): ReturnType<typeof readDisplacement> =>
    readDisplacement(member, shapes, new StaticResponse(member));

  it('is of the order of 2⁻⁵² where nothing cancels', () => {
    const { pieces } = read([{ type: 'half-sine', amplitude: 1, halfWaves: 1 }]);
    expect(strainRounding(member, pieces)).toBeGreaterThan(EPS);
    expect(strainRounding(member, pieces)).toBeLessThan(1000 * EPS);
    expect(massRounding(member, pieces)).toBeLessThan(1000 * EPS);
  });

  it('covers what is lost where large terms cancel', () => {
    // 1e6·x(1 − x) less itself but for a part of 1e-6: x(1 − x) remains, known to 1e6 roundings
    const shapes: Shape[] = [
      { type: 'polynomial', coefficients: [0, 1e6 + 1, -1e6 - 1], from: 0 },
      { type: 'polynomial', coefficients: [0, -1e6, 1e6], from: 0 },
    ];
    const { pieces } = read(shapes);
    expect(Math.abs(piecesStrainForm(member, pieces) - 1 / 3)).toBeLessThan(strainRounding(member, pieces));
    expect(Math.abs(massForm(member, pieces, new Float64Array(2)) - 1 / 30)).toBeLessThan(
      massRounding(member, pieces),
    );
    expect(strainRounding(member, pieces)).toBeGreaterThan(1e6 * EPS);
    expect(strainRounding(member, pieces)).toBeLessThan(1e9 * EPS);
  });
});

it('polynomials of degree 20 are integrated exactly: ∫ k f′² of x²⁰(1 − x)', () => {
  const member = waveMember(uniformTrial(1));
  const coefficients = Array.from({ length: 21 }, (_, d) => (d === 19 ? 1 : d === 20 ? -1 : 0));
  const { pieces } = readDisplacement(member, { type: 'polynomial', coefficients, from: 0 }, null);
  // f = x¹⁹ − x²⁰: 361/37 − 760/38 + 400/39
  const expected = 361 / 37 - 760 / 38 + 400 / 39;
  expect(roundings(piecesStrainForm(member, pieces), expected)).toBeLessThan(4000);
  // and ∫ρ f² = 1/39 − 2/40 + 1/41
  expect(roundings(massForm(member, pieces, new Float64Array(2)), 1 / 39 - 1 / 20 + 1 / 41)).toBeLessThan(
    1e5,
  );
});

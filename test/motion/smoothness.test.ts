import { describe, expect, it } from 'vitest';
import { masslessStretches } from '../../src/modes/massless-stretches.ts';
import { pieceValue, type PiecewiseField } from '../../src/motion/piecewise-field.ts';
import { shapePieces, type GivenShape } from '../../src/motion/shape-pieces.ts';
import { acceleration, inEnergySpace } from '../../src/motion/smoothness.ts';
import { waveMember, type TrialMember } from '../spectrum/trial-members.ts';

const trial: TrialMember = {
  segments: [
    [1, 2, 4],
    [1, 6, 0.5, 3],
    [1, 2, 1],
  ],
  masses: { 1: 5 },
  springs: { 2: 7 },
};
const member = waveMember(trial);

const pieces = (...shapes: GivenShape[]): PiecewiseField => shapePieces(member, shapes);
const line = (values: number[]): GivenShape => ({ type: 'polyline', positions: [0, 1, 2, 3], values });
const masses = (value: number): Float64Array => Float64Array.of(0, value, 0, 0);

describe('a field of finite strain energy', () => {
  it('is continuous, 0 at fixed ends and moves its masses', () => {
    const field = pieces(line([0, 3, 5, 0]));
    expect(inEnergySpace(member, { pieces: field, masses: masses(3) }, [])).toBe(field);
  });

  it.each([
    ['a mass that moves otherwise', line([0, 3, 5, 0]), 2.9999],
    ['a jump at a node', { type: 'uniform', value: 3, from: 0.5, to: 2 } as const, 3],
    ['a near end that moves', line([1, 3, 5, 0]), 3],
    ['a far end that moves', line([0, 3, 5, 1]), 3],
  ] as const)('is not: %s', (_, shape, mass) => {
    expect(inEnergySpace(member, { pieces: pieces(shape), masses: masses(mass) }, [])).toBeNull();
  });

  it('needs nothing of massless stretches: they follow statically', () => {
    const soft = waveMember({
      segments: [
        [1, 2, 4],
        [1, 6, 0],
        [1, 2, 1],
      ],
    });
    // continuous on the inertia, anything between
    const shapes: GivenShape[] = [
      { type: 'polynomial', coefficients: [0, 1], from: 0, to: 1 },
      { type: 'uniform', value: 40, from: 1, to: 2 },
      { type: 'polynomial', coefficients: [9, -3], from: 2, to: 3 },
    ];
    const field = shapePieces(soft, shapes);
    const kept = inEnergySpace(soft, { pieces: field, masses: new Float64Array(4) }, masslessStretches(soft));
    expect(kept).not.toBeNull();
    const middle = kept!.find(({ segment }) => segment === 1)!;
    expect(pieceValue(middle, 0).value).toBe(1);
    expect(pieceValue(middle, 0.5).value).toBe(2);
    expect(pieceValue(middle, 1).value).toBe(3);
  });
});

describe('the acceleration ((k f′)′ − s f)/ρ, ([k f′] − K f − F)/M', () => {
  // k f′ = 6, so that slopes are 3, 1 and, with the spring's 7·4, 17
  const smooth = line([0, 3, 4, 21]);

  it('of straight lines that balance the spring is 0 but where bedding pulls back', () => {
    const found = acceleration(waveMember({ ...trial, far: 'free' }), pieces(smooth), []);
    expect(found).toBeNull(); // the free end still carries force
    const held = acceleration(member, pieces(smooth), [])!;
    expect(pieceValue(held.pieces[0], 0.5).value).toBe(0);
    // −s f/ρ = −3·3.5/0.5
    expect(pieceValue(held.pieces[1], 0.5).value).toBeCloseTo(-21, 13);
    expect(Array.from(held.masses)).toEqual([0, 0, 0, 0]);
  });

  it('of a kink at a mass is the difference of fluxes over it', () => {
    const kinked = line([0, 1, 2, 12]);
    // k f′: 2, then 6, then 20 = 6 + 7·2
    expect(acceleration(member, pieces(kinked), [])!.masses[1]).toBeCloseTo((6 - 2) / 5, 15);
  });

  it('of polynomials and waves is their second derivative', () => {
    const shapes: GivenShape[] = [
      { type: 'polynomial', coefficients: [0, 0, 0, 2], from: 0 },
      { type: 'half-sine', amplitude: 3, halfWaves: 2 },
    ];
    const bar = waveMember({ segments: [[3, 2, 4, 5]], near: 'fixed', far: 'free', masses: { 1: 1 } });
    const found = acceleration(bar, shapePieces(bar, shapes), [])!;
    for (const x of [0, 0.7, 2.9]) {
      const kappa = (2 * Math.PI) / 3;
      const f = 2 * x ** 3 + 3 * Math.sin(kappa * x);
      const second = 12 * x - 3 * kappa * kappa * Math.sin(kappa * x);
      expect(pieceValue(found.pieces[0], x).value).toBeCloseTo((2 * second - 5 * f) / 4, 11);
    }
    // the end mass: −k f′(L)
    expect(found.masses[1]).toBeCloseTo(-2 * (54 + 2 * Math.PI), 11);
  });

  it.each<[string, GivenShape]>([
    ['a kink inside a segment', { type: 'polyline', positions: [0, 0.5, 3], values: [0, 1, 0] }],
    ['a flux that the spring does not balance', line([0, 3, 4, 0])],
  ])('does not exist for %s', (_, shape) => {
    expect(acceleration(member, pieces(shape), [])).toBeNull();
  });

  it('a held force counts only at a mass: −F/M', () => {
    const still = pieces(line([0, 0, 0, 0]));
    const at = (segment: number, distance: number): ReturnType<typeof acceleration> =>
      acceleration(member, still, [{ segment, distance, force: 10 }]);
    expect(at(0, 1)!.masses[1]).toBe(-2);
    expect(at(1, 0)!.masses[1]).toBe(-2);
    expect(at(0, 0.5)).toBeNull();
    expect(at(1, 1)).toBeNull();
  });
});

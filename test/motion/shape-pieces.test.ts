import { describe, expect, it } from 'vitest';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { pieceValue, type PiecewiseField } from '../../src/motion/piecewise-field.ts';
import { listOf, place, shapePieces, shapePointer, type GivenShape } from '../../src/motion/shape-pieces.ts';
import { waveMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;

const member = waveMember({
  segments: [
    [1, 1, 1],
    [0.5, 1, 1],
    [1.5, 1, 1],
  ],
});

/** Value of a field at x, taken inside a cell. */
function valueAt(field: PiecewiseField, of: WaveMember, x: number): number {
  const piece = field.find((cell) => {
    const start = of.position[cell.segment] + cell.start;
    return x >= start && x <= start + cell.length;
  })!;
  return pieceValue(piece, x - of.position[piece.segment] - piece.start).value;
}

/** Largest difference from a plain function at places off the breaks. */
function worst(shapes: GivenShape[], plain: (x: number) => number): number {
  const field = shapePieces(member, shapes);
  let largest = 0;
  for (let j = 0; j < 200; j++) {
    const x = 3 * ((j + 0.5317) / 200);
    largest = Math.max(largest, Math.abs(valueAt(field, member, x) - plain(x)));
  }
  return largest;
}

describe('every shape is the function it says', () => {
  it('uniform, over a stretch or the whole', () => {
    const part = { type: 'uniform', value: 2.5, from: 0.4, to: 1.7 } as const;
    expect(worst([part], (x) => (x > 0.4 && x < 1.7 ? 2.5 : 0))).toBe(0);
    expect(worst([{ type: 'uniform', value: -1, from: 0 }], () => -1)).toBe(0);
    expect(worst([{ type: 'uniform', value: -1, from: 2 }], (x) => (x > 2 ? -1 : 0))).toBe(0);
  });

  it('polyline, zero outside its first and last point', () => {
    const line = { type: 'polyline', positions: [0.3, 1, 1.25, 2.8], values: [1, -2, 4, 0.5] } as const;
    const plain = (x: number): number => {
      const { positions, values } = line;
      for (let i = 1; i < 4; i++) {
        const [a, b] = [positions[i - 1], positions[i]];
        if (x >= a && x <= b) return values[i - 1] + ((values[i] - values[i - 1]) * (x - a)) / (b - a);
      }
      return 0;
    };
    expect(
      worst([{ ...line, positions: [...line.positions], values: [...line.values] }], plain),
    ).toBeLessThan(32 * EPS * 4);
  });

  it.each([0, 1, 2, 5, 12, 20])('polynomial of degree %i, in x from the near end', (degree) => {
    const coefficients = Array.from({ length: degree + 1 }, (_, d) => (d % 2 === 0 ? 1 : -1) / 2 ** d);
    const plain = (x: number): number => coefficients.reduceRight((sum, c) => sum * x + c, 0);
    const size = coefficients.reduceRight((sum, c) => sum * 3 + Math.abs(c), 0);
    expect(worst([{ type: 'polynomial', coefficients, from: 0 }], plain)).toBeLessThan(
      EPS * size * (8 + 4 * degree),
    );
    const part = { type: 'polynomial', coefficients, from: 0.6, to: 2.2 } as const;
    expect(worst([part], (x) => (x > 0.6 && x < 2.2 ? plain(x) : 0))).toBeLessThan(
      EPS * size * (8 + 4 * degree),
    );
  });

  it.each([1, 2, 3, 77])('half-sine of %i half waves', (halfWaves) => {
    const shape = { type: 'half-sine', amplitude: 0.3, halfWaves } as const;
    expect(worst([shape], (x) => 0.3 * Math.sin((halfWaves * Math.PI * x) / 3))).toBeLessThan(
      0.3 * EPS * (16 + 4 * Math.PI * halfWaves),
    );
  });

  it('several shapes add up', () => {
    const shapes: GivenShape[] = [
      { type: 'uniform', value: 1, from: 0, to: 2 },
      { type: 'polynomial', coefficients: [0, 1], from: 0 },
      { type: 'half-sine', amplitude: 2, halfWaves: 1 },
    ];
    const plain = (x: number): number => (x < 2 ? 1 : 0) + x + 2 * Math.sin((Math.PI * x) / 3);
    expect(worst(shapes, plain)).toBeLessThan(64 * EPS * 5);
  });
});

describe('cells', () => {
  const breaks = (shapes: GivenShape[], extra?: number[]): number[] =>
    shapePieces(member, shapes, extra).map((cell) => member.position[cell.segment] + cell.start);

  it('end at every node and wherever a shape changes its formula', () => {
    expect(breaks([])).toEqual([0, 1, 1.5]);
    expect(breaks([{ type: 'uniform', value: 1, from: 0.25, to: 2 }])).toEqual([0, 0.25, 1, 1.5, 2]);
    expect(breaks([{ type: 'polyline', positions: [0, 0.5, 1, 3], values: [0, 1, 1, 0] }])).toEqual([
      0, 0.5, 1, 1.5,
    ]);
    expect(breaks([], [2.5, 0.75])).toEqual([0, 0.75, 1, 1.5, 2.5]);
  });

  it('cover each segment once and in order, slivers of rounding left out', () => {
    const close = 1 + 20 * EPS;
    expect(breaks([{ type: 'uniform', value: 1, from: 0.25, to: close }])).toEqual([0, 0.25, 1, 1.5]);
    expect(breaks([], [1 - 20 * EPS, 1.5 + 20 * EPS, 0.4, 0.4])).toEqual([0, 0.4, 1, 1.5]);
    for (const cell of shapePieces(member, [], [0.3, 0.7, 2])) {
      expect(cell.length).toBeGreaterThan(0);
      expect(cell.start + cell.length).toBeLessThanOrEqual(member.length[cell.segment] * (1 + EPS));
    }
  });

  it('take the terms that are added to them', () => {
    const field = shapePieces(member, [], [], (from, to, segment) => ({ powers: [from, to, segment] }));
    expect(field.map(({ powers }) => powers)).toEqual([
      [0, 1, 0],
      [1, 1.5, 1],
      [1.5, 3, 2],
    ]);
  });
});

it('places, lists and pointers', () => {
  expect(place(member, 1)).toEqual({ segment: 0, distance: 1 });
  expect(place(member, 2)).toEqual({ segment: 2, distance: 0.5 });
  expect(listOf(undefined)).toEqual([]);
  expect(listOf(3)).toEqual([3]);
  expect(listOf([3, 4])).toEqual([3, 4]);
  expect(shapePointer('velocity', [{}, {}], 1)).toBe('/initial/velocity/1');
  expect(shapePointer('displacement', {}, 0)).toBe('/initial/displacement');
});

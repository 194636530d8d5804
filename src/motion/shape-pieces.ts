import type { WaveMember } from '../members/wave-member.ts';
import { placeStation } from '../modes/stations.ts';
import { cosPi, sinPi } from '../numerics/half-turns.ts';
import type { Shape } from '../spec/types.ts';
import type { Piece, PiecewiseField, WaveTerm } from './piecewise-field.ts';

/** A shape that is given by its values, not by the force that makes it. */
export type GivenShape = Exclude<Shape, { type: 'pull' }>;

/** Cells shorter than this fraction of the member are rounding of a breakpoint, not cells. */
const SLIVER = 64 * Number.EPSILON;

/**
 * The sum of shapes as one piece a cell; cells end at the nodes and wherever a shape changes its
 * formula. `extra` adds terms to a cell (segment, start and length in it, m).
 *
 * @param extraBreaks further positions at which a cell ends, m
 */
export function shapePieces(
  member: WaveMember,
  shapes: readonly GivenShape[],
  extraBreaks: readonly number[] = [],
  extra?: (from: number, to: number, segment: number) => { powers?: number[]; waves?: WaveTerm[] },
): PiecewiseField {
  const length = member.position[member.segmentCount];
  const breaks = [...extraBreaks, ...shapes.flatMap((shape) => breakpoints(shape, length))]
    .filter((x) => x > 0 && x < length)
    .toSorted((a, b) => a - b);
  const pieces: Piece[] = [];
  let next = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    const begin = member.position[i];
    const end = member.position[i + 1];
    let from = begin;
    const push = (to: number): void => {
      pieces.push(pieceOf(member, shapes, i, from, to, extra?.(from, to, i)));
      from = to;
    };
    for (; next < breaks.length && breaks[next] < end - SLIVER * length; next++) {
      if (breaks[next] > from + SLIVER * length) push(breaks[next]);
    }
    push(end);
  }
  return pieces;
}

function pieceOf(
  member: WaveMember,
  shapes: readonly GivenShape[],
  segment: number,
  from: number,
  to: number,
  extra: { powers?: number[]; waves?: WaveTerm[] } = {},
): Piece {
  const total = member.position[member.segmentCount];
  const h = to - from;
  const powers: number[] = [...(extra.powers ?? [])];
  const waves: WaveTerm[] = [...(extra.waves ?? [])];
  let magnitude = powers.reduce((sum, c) => sum + Math.abs(c), 0);
  const add = (terms: readonly number[], size: number): void => {
    terms.forEach((c, j) => (powers[j] = (powers[j] ?? 0) + c));
    magnitude += size;
  };
  for (const shape of shapes) {
    const middle = 0.5 * (from + to);
    switch (shape.type) {
      case 'uniform':
        if (within(shape, middle, total)) add([shape.value], Math.abs(shape.value));
        break;
      case 'polynomial':
        if (within(shape, middle, total))
          add(shifted(shape.coefficients, from, h), absoluteTerms(shape.coefficients, to));
        break;
      case 'polyline': {
        const { positions, values } = shape;
        const last = firstAtLeast(positions, middle);
        if (last <= 0 || last >= positions.length) break;
        const slope = (values[last] - values[last - 1]) / (positions[last] - positions[last - 1]);
        add(
          [values[last - 1] + slope * (from - positions[last - 1]), slope * h],
          Math.abs(values[last - 1]) + Math.abs(values[last]),
        );
        break;
      }
      case 'half-sine': {
        const { amplitude, halfWaves } = shape;
        const turns = Math.PI * (halfWaves / total);
        waves.push({
          square: turns * turns,
          value: amplitude * sinPi((halfWaves * from) / total),
          slope: amplitude * turns * cosPi((halfWaves * from) / total),
          farValue: amplitude * sinPi((halfWaves * to) / total),
        });
        break;
      }
    }
  }
  return { segment, start: from - member.position[segment], length: h, powers, waves, magnitude };
}

/** Where the shape changes its formula, m. */
function breakpoints(shape: GivenShape, length: number): readonly number[] {
  switch (shape.type) {
    case 'uniform':
    case 'polynomial':
      return [shape.from, shape.to ?? length];
    case 'polyline':
      return shape.positions;
    case 'half-sine':
      return [];
  }
}

function within(shape: { from: number; to?: number }, x: number, length: number): boolean {
  return x >= shape.from && x <= (shape.to ?? length);
}

/** Σ|c_j| x^j. */
function absoluteTerms(coefficients: readonly number[], x: number): number {
  return coefficients.reduceRight((sum, c) => sum * x + Math.abs(c), 0);
}

/** Index of the first position not before x. */
function firstAtLeast(positions: readonly number[], x: number): number {
  let low = 0;
  let high = positions.length;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (positions[mid] >= x) high = mid;
    else low = mid + 1;
  }
  return low;
}

/** Coefficients in t of Σ c_j (from + h t)^j (Taylor shift by Horner's scheme). */
function shifted(coefficients: readonly number[], from: number, h: number): number[] {
  const d = [...coefficients];
  for (let i = 0; i < d.length; i++) {
    for (let j = d.length - 2; j >= i; j--) d[j] += from * d[j + 1];
  }
  let scale = 1;
  return d.map((c) => {
    const value = c * scale;
    scale *= h;
    return value;
  });
}

/** Segment and distance of a place, as used by the static response. */
export function place(member: WaveMember, at: number): { segment: number; distance: number } {
  const { i, d } = placeStation(member, at);
  return { segment: i, distance: d };
}

/** One or several as a list. */
export function listOf<T>(value: T | readonly T[] | undefined): readonly T[] {
  if (value === undefined) return [];
  return Array.isArray(value) ? (value as readonly T[]) : [value as T];
}

/** Pointer to one of the shapes of the initial motion, as the request holds it: one or a list. */
export function shapePointer(field: 'displacement' | 'velocity', shapes: unknown, index: number): string {
  return Array.isArray(shapes) ? `/initial/${field}/${index}` : `/initial/${field}`;
}

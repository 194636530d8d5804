import type { History, InitialMotion, Shape } from '../spec/types.ts';
import type { Span } from './check-position.ts';

/** A value and the sum of the magnitudes that it was formed from. */
export interface ScaledValue {
  readonly value: number;
  readonly scale: number;
}

/** A value of 0 that was not formed from anything. */
export const nothing: ScaledValue = { value: 0, scale: 0 };

/** Units of rounding, times the terms summed, within which two values count as equal. */
const equality = 256 * Number.EPSILON;

export function disagrees(left: ScaledValue, right: ScaledValue): boolean {
  return Math.abs(left.value - right.value) > equality * (left.scale + right.scale);
}

/** The value of a history at its start, from the right. */
function valueAtStart(history: History): ScaledValue {
  switch (history.type) {
    case 'harmonic':
      return {
        value: history.amplitude * Math.cos(history.phase),
        scale: Math.abs(history.amplitude) * Math.max(1, Math.abs(history.phase)),
      };
    case 'step':
    case 'rectangular-pulse':
      return { value: history.amplitude, scale: Math.abs(history.amplitude) };
    case 'samples':
      return { value: history.values[0], scale: largestMagnitude(history.values) };
    case 'ramp':
    case 'half-sine-pulse':
      return nothing;
  }
}

function largestMagnitude(values: readonly number[]): number {
  return values.reduce((largest, value) => Math.max(largest, Math.abs(value)), 0);
}

/** The value of a history at time 0. */
export function firstValue(history: History): ScaledValue {
  return history.start > 0 ? nothing : valueAtStart(history);
}

/**
 * The jump of an end displacement and what to do about it, null where there is none. A step and a
 * rectangular pulse always jump; a harmonic jumps at its start unless it begins where the end is.
 *
 * @param initial initial displacement of the end, in the unit of the history
 */
export function jumpOf(history: History, initial: ScaledValue): { jump: number; remedy: string } | null {
  const begin = valueAtStart(history);
  switch (history.type) {
    case 'step':
    case 'rectangular-pulse':
      if (begin.value === 0) return null;
      return { jump: begin.value, remedy: 'Let it rise over some time: a ramp, or samples.' };
    case 'harmonic': {
      const before = history.start > 0 ? nothing : initial;
      if (!disagrees(begin, before)) return null;
      const remedy = 'Give it the phase "-90 deg", so that it begins at 0, or let it rise by samples.';
      return { jump: begin.value - before.value, remedy };
    }
    case 'samples':
      if (history.start === 0 || !disagrees(begin, nothing)) return null;
      return { jump: begin.value, remedy: 'Let the first sample be 0, or start the record at time 0.' };
    case 'ramp':
    case 'half-sine-pulse':
      return null;
  }
}

/** The initial displacement of the member at a fixed end. */
export function initialValue(
  { displacement }: InitialMotion,
  { length }: Span,
  end: 'near' | 'far',
): ScaledValue {
  let value = 0;
  let scale = 0;
  for (const shape of [displacement ?? []].flat()) {
    for (const term of termsAt(shape, end === 'near' ? 0 : length, length)) {
      value += term;
      scale += Math.abs(term);
    }
  }
  return { value, scale };
}

/** What a shape sums up to its value at an end; a pull and a half-sine are 0 at fixed ends. */
function termsAt(shape: Shape, x: number, length: number): readonly number[] {
  switch (shape.type) {
    case 'pull':
    case 'half-sine':
      return [];
    case 'polyline': {
      const index = x === 0 ? 0 : shape.positions.length - 1;
      return shape.positions[index] === x ? [shape.values[index]] : [];
    }
    case 'polynomial':
      return covers(shape, x, length) ? shape.coefficients.map((c, power) => c * x ** power) : [];
    case 'uniform':
      return covers(shape, x, length) ? [shape.value] : [];
  }
}

function covers({ from, to }: { from: number; to?: number }, x: number, length: number): boolean {
  return x === 0 ? from === 0 : (to ?? length) === length;
}

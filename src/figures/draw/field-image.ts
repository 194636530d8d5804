import type { Numbers } from '../../spec/types.ts';
import { colorSteps, hatchedFrom, negativeFrom } from './field-colors.ts';

/** Samples that a pixel stands for, first and one past the last. */
type Span = readonly [first: number, end: number];

/** Distance between the lines of the hatching, px. */
const hatching = 6;

/**
 * Colours of a field, one index a pixel, row by row from the top; time runs to the right, position upwards.
 * A pixel shows the sample nearest to it; where several fall into it, the one of largest magnitude.
 *
 * @param values rows, one a time
 * @param columns column of every position
 * @param reach magnitude of the strongest colour
 *
 * Cost O(samples + pixels).
 */
export function fieldPixels(
  values: readonly Numbers[],
  columns: readonly number[],
  times: Numbers,
  positions: Numbers,
  reach: number,
  width: number,
  height: number,
): Uint8Array {
  const across = spansOf(times, width);
  const upwards = spansOf(positions, height);
  const pixels = new Uint8Array(width * height);
  if (reach === 0) return pixels;
  // first the strongest color of every pixel column at every position, then rows are merged
  const strips = Array.from({ length: positions.length }, () => new Uint8Array(width));
  for (let q = 0; q < strips.length; q++) {
    const strip = strips[q];
    const column = columns[q];
    for (let x = 0; x < width; x++) {
      const [first, end] = across[x];
      let extreme = values[first][column];
      for (let j = first + 1; j < end; j++) {
        if (Math.abs(values[j][column]) > Math.abs(extreme)) extreme = values[j][column];
      }
      strip[x] = colorOf(extreme / reach);
    }
  }
  for (let y = 0; y < height; y++) {
    const [from, to] = upwards[height - 1 - y];
    const row = pixels.subarray(y * width, (y + 1) * width);
    row.set(strips[from]);
    for (let q = from + 1; q < to; q++) keepStronger(row, strips[q]);
    hatchRow(row, y);
  }
  return pixels;
}

/** Index of the color of a value between −1 and 1, without hatching. */
export function colorOf(value: number): number {
  const step = Math.min(colorSteps, Math.round(Math.abs(value) * colorSteps));
  return value < 0 && step > 0 ? negativeFrom + step : step;
}

/** Puts the hatching over the negative colors of row y. */
export function hatchRow(row: Uint8Array, y: number): void {
  for (let x = (hatching - (y % hatching)) % hatching; x < row.length; x += hatching) {
    if (row[x] > negativeFrom) row[x] += hatchedFrom - negativeFrom;
  }
}

function keepStronger(row: Uint8Array, other: Uint8Array): void {
  for (let x = 0; x < row.length; x++) if (strengthOf(other[x]) > strengthOf(row[x])) row[x] = other[x];
}

function strengthOf(color: number): number {
  return color > negativeFrom ? color - negativeFrom : color;
}

/** The samples of every pixel along a stretch whose ends are the first and the last sample. */
function spansOf(samples: Numbers, pixels: number): Span[] {
  const from = samples[0];
  const scale = pixels / (samples[samples.length - 1] - from);
  const spans: Span[] = [];
  let next = 0;
  for (let p = 0; p < pixels; p++) {
    const first = next;
    const end = p === pixels - 1 ? Infinity : p + 1;
    while (next < samples.length && (samples[next] - from) * scale < end) next++;
    if (next > first) {
      spans.push([first, next]);
      continue;
    }
    // no sample in this pixel: the nearer one of its neighbours
    const before = Math.max(next - 1, 0);
    const after = Math.min(next, samples.length - 1);
    const middle = p + 0.5;
    const nearer =
      middle - (samples[before] - from) * scale <= (samples[after] - from) * scale - middle ? before : after;
    spans.push([nearer, nearer + 1]);
  }
  return spans;
}

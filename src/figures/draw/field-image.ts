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
  // the most extreme value of every pixel column, position by position, before rows are merged
  const strip = new Float64Array(positions.length);
  for (let x = 0; x < width; x++) {
    const [first, end] = across[x];
    for (let q = 0; q < strip.length; q++) {
      const column = columns[q];
      let extreme = values[first][column];
      for (let j = first + 1; j < end; j++) {
        if (Math.abs(values[j][column]) > Math.abs(extreme)) extreme = values[j][column];
      }
      strip[q] = extreme / reach;
    }
    for (let y = 0; y < height; y++) {
      const [from, to] = upwards[height - 1 - y];
      let extreme = strip[from];
      for (let q = from + 1; q < to; q++) if (Math.abs(strip[q]) > Math.abs(extreme)) extreme = strip[q];
      pixels[y * width + x] = colorOf(extreme, (x + y) % hatching === 0);
    }
  }
  return pixels;
}

/** Index of the colour of a value between −1 and 1. */
export function colorOf(value: number, hatched: boolean): number {
  const step = Math.min(colorSteps, Math.round(Math.abs(value) * colorSteps));
  if (step === 0 || value > 0) return step;
  return step + (hatched ? hatchedFrom : negativeFrom);
}

/** The samples of every pixel along a stretch whose ends are the first and the last sample. */
function spansOf(samples: Numbers, pixels: number): Span[] {
  const from = samples[0];
  const scale = pixels / (samples[samples.length - 1] - from);
  const spans: Span[] = [];
  let next = 0;
  for (let p = 0; p < pixels; p++) {
    const first = next;
    while (next < samples.length && ((samples[next] - from) * scale < p + 1 || p === pixels - 1)) next++;
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

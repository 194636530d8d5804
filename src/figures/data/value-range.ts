import type { Numbers } from '../../spec/types.ts';

/** Smallest and largest of some numbers; [∞, −∞] for none. Cost O(n). */
export function extentOf(values: Numbers): [number, number] {
  let least = Infinity;
  let most = -Infinity;
  for (let i = 0; i < values.length; i++) {
    if (values[i] < least) least = values[i];
    if (values[i] > most) most = values[i];
  }
  return [least, most];
}

/**
 * Range of an axis that shows these extremes and zero with a margin; −1 to 1 where all is zero, so that
 * a field at rest is a line and not a missing picture.
 */
export function rangeAround(least: number, most: number): { from: number; to: number } {
  const low = Math.min(least, 0);
  const high = Math.max(most, 0);
  if (!(high > low)) return { from: -1, to: 1 };
  const margin = 0.06 * high - 0.06 * low;
  // no margin is added where it would leave the numbers
  const from = low < 0 ? Math.max(low - margin, -Number.MAX_VALUE) : low;
  const to = high > 0 ? Math.min(high + margin, Number.MAX_VALUE) : high;
  return { from, to };
}

/** Smallest distance of neighbours in an ascending list; 0 for a single one. */
export function stepOf(values: Numbers): number {
  let step = Infinity;
  for (let i = 1; i < values.length; i++) {
    const apart = values[i] - values[i - 1];
    if (apart > 0 && apart < step) step = apart;
  }
  return step === Infinity ? 0 : step;
}

/** Index of the value nearest to a wanted one. Cost O(n). */
export function nearest(values: Numbers, wanted: number): number {
  let best = 0;
  for (let i = 1; i < values.length; i++) {
    if (Math.abs(values[i] - wanted) < Math.abs(values[best] - wanted)) best = i;
  }
  return best;
}

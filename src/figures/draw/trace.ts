import { curveStepAfter, line } from 'd3-shape';
import type { Numbers } from '../../spec/types.ts';

/** Places on the sheet of the points of a curve, px; `along` ascends or descends. */
export interface Points {
  readonly along: Float64Array;
  readonly across: Float64Array;
}

/** Places of numbers on an axis. */
export function placesOf(values: Numbers, place: (value: number) => number): Float64Array {
  const places = new Float64Array(values.length);
  for (let i = 0; i < values.length; i++) places[i] = place(values[i]);
  return places;
}

/**
 * The points that a drawing can show: of each pixel along, the first, the least, the greatest and the last
 * in their order, so that no peak is lost. Few points are kept as they are. Cost O(points).
 */
export function thinOut({ along, across }: Points): Points {
  const count = along.length;
  const pixels = Math.abs(along[count - 1] - along[0]) + 1;
  if (count <= 2 * pixels + 8) return { along, across };
  const keptAlong: number[] = [];
  const keptAcross: number[] = [];
  const keep = (i: number) => {
    keptAlong.push(along[i]);
    keptAcross.push(across[i]);
  };
  for (let first = 0; first < count;) {
    const pixel = Math.floor(along[first]);
    let least = first;
    let most = first;
    let next = first;
    while (next < count && Math.floor(along[next]) === pixel) {
      if (across[next] < across[least]) least = next;
      if (across[next] > across[most]) most = next;
      next++;
    }
    const last = next - 1;
    for (const i of new Set([first, Math.min(least, most), Math.max(least, most), last])) keep(i);
    first = next;
  }
  return { along: Float64Array.from(keptAlong), across: Float64Array.from(keptAcross) };
}

/** SVG path through points; `upright` swaps the axes. */
export function pathOf({ along, across }: Points, upright: boolean): string {
  const [x, y] = upright ? [across, along] : [along, across];
  return (
    line<number>(
      (_, i) => x[i],
      (_, i) => y[i],
    ).digits(along.length > 1000 ? 1 : 2)(x) ?? ''
  );
}

/** Path of a step line that holds every value until the next place. */
export function stepsOf({ along, across }: Points): string {
  const steps = line<number>(
    (_, i) => along[i],
    (_, i) => across[i],
  );
  return steps.curve(curveStepAfter).digits(2)(along) ?? '';
}

/** Closed path between two curves over the same places; each is thinned to its outermost points. */
export function areaBetween(lower: Points, upper: Points, upright: boolean): string {
  const { along, across } = thinOut(lower);
  const back = pathOf({ along: along.toReversed(), across: across.toReversed() }, upright);
  return `${pathOf(thinOut(upper), upright)}L${back.slice(1)}Z`;
}

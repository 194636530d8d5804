import type { WaveMember } from '../members/wave-member.ts';

/** A place on the member where shapes are sampled. */
export interface Stations {
  /** Position from the near end, m, shape [count]. */
  readonly position: Float64Array;
  /** Segment on whose side the station lies, shape [count]: at a node the near side, at x = 0 the only one. */
  readonly segment: Int32Array;
  /** Distance from the near end of that segment, m, shape [count]. */
  readonly distance: Float64Array;
}

/** Positions closer to a node than this many units of rounding of the length stand on it. */
const SNAP = 64 * Number.EPSILON;

/** Places positions (m, within the member) on its segments. Cost O(count · log segments). */
export function placeStations(member: WaveMember, positions: ArrayLike<number>): Stations {
  const count = positions.length;
  const position = new Float64Array(count);
  const segment = new Int32Array(count);
  const distance = new Float64Array(count);
  for (let q = 0; q < count; q++) {
    const { at, i, d } = placeStation(member, positions[q]);
    position[q] = at;
    segment[q] = i;
    distance[q] = d;
  }
  return { position, segment, distance };
}

/** Segment and distance of one position; a node counts to its near side. */
export function placeStation(member: WaveMember, x: number): { at: number; i: number; d: number } {
  const { position, segmentCount } = member;
  const snap = SNAP * position[segmentCount];
  let low = 0;
  let high = segmentCount - 1;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (position[mid + 1] >= x - snap) high = mid;
    else low = mid + 1;
  }
  if (Math.abs(position[low + 1] - x) <= snap) {
    return { at: x, i: low, d: member.length[low] };
  }
  return { at: x, i: low, d: Math.min(Math.max(x - position[low], 0), member.length[low]) };
}

/** Equally spaced positions, both ends included; the last one is the far end itself. */
export function evenPositions(member: WaveMember, count: number): Float64Array {
  const length = member.position[member.segmentCount];
  return Float64Array.from({ length: count }, (_, q) =>
    q === count - 1 ? length : (length * q) / (count - 1),
  );
}

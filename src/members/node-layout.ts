import type { Member } from '../spec/types.ts';

/** Where the nodes of a member stand. */
export interface NodeLayout {
  /** Node positions in m from the near end, shape [n + 1], strictly ascending, first 0, last L. */
  readonly position: Float64Array;
  /** Index of the request's segment between node i and node i + 1, shape [n]. */
  readonly origin: Int32Array;
  /** Node of each attachment of the request, shape [attachments]. */
  readonly attachmentNode: Int32Array;
}

/**
 * How far, as a part of the member's length, a position may lie from a node and still mean that
 * node: 64 rounding units of double precision. It covers sums of segment lengths formed by the
 * caller and conversions of units; it is far below any length that means something.
 */
export const samePlace = 64 * Number.EPSILON;

/**
 * Nodes at the ends, at the boundaries of the segments and at the attachments. An attachment
 * nearer than `samePlace`·L to a boundary, or to another attachment, stands at that node.
 *
 * @param member its attachments lie inside (0, L)
 * @returns the layout; cost O(n log n) in segments and attachments
 */
export function layOutNodes(member: Member): NodeLayout {
  const boundaries = segmentBoundaries(member.segments);
  const near = samePlace * boundaries[boundaries.length - 1];
  const attachments: readonly { at: number }[] = member.attachments;
  const order = attachments
    .map((_, index) => index)
    .toSorted((a, b) => attachments[a].at - attachments[b].at);

  const position: number[] = [0];
  const origin: number[] = [];
  const attachmentNode = new Int32Array(attachments.length);
  let next = 0;
  for (let segment = 0; segment < member.segments.length; segment++) {
    const end = boundaries[segment + 1];
    while (next < order.length && attachments[order[next]].at < end - near) {
      const at = attachments[order[next]].at;
      if (at > position[position.length - 1] + near) {
        position.push(at);
        origin.push(segment);
      }
      attachmentNode[order[next++]] = position.length - 1;
    }
    position.push(end);
    origin.push(segment);
    while (next < order.length && attachments[order[next]].at <= end + near) {
      attachmentNode[order[next++]] = position.length - 1;
    }
  }
  return { position: Float64Array.from(position), origin: Int32Array.from(origin), attachmentNode };
}

/** Length of the member in m: the sum of its segments. */
export function memberLength(member: Member): number {
  const boundaries = segmentBoundaries(member.segments);
  return boundaries[boundaries.length - 1];
}

/** Running sums of the segment lengths in m, compensated (Neumaier 1974), shape [segments + 1]. */
function segmentBoundaries(segments: readonly { length: number }[]): Float64Array {
  const boundaries = new Float64Array(segments.length + 1);
  let sum = 0;
  let lost = 0;
  segments.forEach(({ length }, index) => {
    const next = sum + length;
    lost += sum >= length ? sum - next + length : length - next + sum;
    sum = next;
    boundaries[index + 1] = sum + lost;
  });
  return boundaries;
}

/**
 * The position itself, or the node that it means when it lies within `samePlace`·L of one.
 *
 * @param at position in m
 * @param position node positions in m, ascending, last L
 * @returns position in m; cost O(log n)
 */
export function snapToNode(at: number, position: Float64Array): number {
  const near = samePlace * position[position.length - 1];
  let low = 0;
  let high = position.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (position[middle] < at) low = middle + 1;
    else high = middle;
  }
  if (Math.abs(position[low] - at) <= near) return position[low];
  if (low > 0 && at - position[low - 1] <= near) return position[low - 1];
  return at;
}

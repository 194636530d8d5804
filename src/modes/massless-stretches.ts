import type { WaveMember } from '../members/wave-member.ts';
import { StaticResponse } from './static-response.ts';

/**
 * A maximal run of segments without inertia whose inner nodes carry none either. Nothing in it can
 * keep a shape of its own: it follows the nodes at its ends statically.
 */
export interface MasslessStretch {
  /** First and last segment of the run. */
  readonly first: number;
  readonly last: number;
  /** Nodal displacement shapes for a unit displacement of either end node, shape [last − first + 2]. */
  readonly nearShape: Float64Array;
  readonly farShape: Float64Array;
  /** Static response of the run with its end nodes held (or as the member's end leaves them). */
  readonly held: StaticResponse;
}

/**
 * The massless stretches of a member, in ascending order.
 *
 * Modes do not span the strain energy of such a stretch: its own flexibility with held ends,
 * G_held, is missing from Σφ²/ω² for ever, and an initial shape keeps only its static interpolation
 * there (for t > 0). Cost: O(segments).
 */
export function masslessStretches(member: WaveMember): MasslessStretch[] {
  const stretches: MasslessStretch[] = [];
  const n = member.segmentCount;
  for (let first = 0; first < n; first++) {
    if (member.inertia[first] > 0) continue;
    let last = first;
    while (last + 1 < n && member.inertia[last + 1] === 0 && member.mass[last + 1] === 0) last++;
    stretches.push(stretchOf(member, first, last));
    first = last;
  }
  return stretches;
}

function stretchOf(member: WaveMember, first: number, last: number): MasslessStretch {
  const n = member.segmentCount;
  const nearFollows = first === 0 && !member.nearFixed && member.mass[0] === 0;
  const farFollows = last === n - 1 && !member.farFixed && member.mass[n] === 0;
  const slice = (array: Float64Array, extra: number): Float64Array =>
    Float64Array.from(array.subarray(first, last + 1 + extra));
  const spring = slice(member.spring, 1);
  if (!nearFollows) spring[0] = 0;
  if (!farFollows) spring[spring.length - 1] = 0;
  const run: WaveMember = {
    ...member,
    segmentCount: last - first + 1,
    length: slice(member.length, 0),
    stiffness: slice(member.stiffness, 0),
    inertia: slice(member.inertia, 0),
    foundation: slice(member.foundation, 0),
    position: slice(member.position, 1),
    mass: new Float64Array(last - first + 2),
    spring,
    nearFixed: !nearFollows,
    farFixed: !farFollows,
  };
  const held = new StaticResponse(run);
  const none = new Float64Array(last - first + 2);
  return {
    first,
    last,
    nearShape: nearFollows ? none : held.endMotion('near'),
    farShape: farFollows ? none : held.endMotion('far'),
    held,
  };
}

import type { WaveMember } from '../members/wave-member.ts';
import { canDriftFreely } from '../spectrum/spectrum-size.ts';
import { InertiaRelief } from './inertia-relief.ts';
import { masslessStretches } from './massless-stretches.ts';
import { StaticResponse } from './static-response.ts';

/** Places a segment is looked at before its crest is refined. */
const LOOKS = 16;

/**
 * The largest flexibility G(x,x) − G_held(x) over the member (unrestrained: G⊥), m/N.
 *
 * In massless segments it is largest at an end; G⊥ is convex in every segment; elsewhere the crest
 * is bracketed on 16 places and refined by golden section to rounding of its value.
 * @param withHeld the whole G, what massless stretches add between held ends included
 * Cost: O(segments).
 */
export function largestFlexibility(member: WaveMember, withHeld = false): number {
  const drifts = canDriftFreely(member);
  const source = drifts ? new InertiaRelief(member) : new StaticResponse(member);
  const stretches = masslessStretches(member);
  let largest = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    const l = member.length[i];
    const stretch = stretches.find((run) => i >= run.first && i <= run.last);
    const at = (distance: number): number => {
      const held = withHeld ? 0 : (stretch?.held.flexibility(i - stretch.first, distance) ?? 0);
      return source.flexibility(i, distance) - (Number.isFinite(held) ? held : 0);
    };
    largest = Math.max(largest, at(0), at(l));
    // without its own flexibility a massless stretch is largest at an end; G⊥ is convex
    if (drifts || (stretch && !withHeld)) continue;
    let best = 0;
    let bestValue = at(0);
    for (let look = 1; look <= LOOKS; look++) {
      const value = at((look * l) / LOOKS);
      if (value > bestValue) {
        best = look;
        bestValue = value;
      }
    }
    largest = Math.max(
      largest,
      crest(at, (Math.max(0, best - 1) * l) / LOOKS, (Math.min(LOOKS, best + 1) * l) / LOOKS),
    );
  }
  return largest;
}

/** Largest value of a function with one crest in the interval, by golden section. */
function crest(at: (x: number) => number, from: number, to: number): number {
  const golden = 0.5 * (Math.sqrt(5) - 1);
  let a = from;
  let b = to;
  let x = b - golden * (b - a);
  let y = a + golden * (b - a);
  let fx = at(x);
  let fy = at(y);
  for (let step = 0; step < 44; step++) {
    if (fx > fy) {
      b = y;
      y = x;
      fy = fx;
      x = b - golden * (b - a);
      fx = at(x);
    } else {
      a = x;
      x = y;
      fx = fy;
      y = a + golden * (b - a);
      fy = at(y);
    }
  }
  return Math.max(fx, fy);
}

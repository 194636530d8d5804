import type { KeptSeries } from '../certificate/kept-modes.ts';
import type { WaveMember } from '../members/wave-member.ts';
import type { Stations } from '../modes/stations.ts';
import type { AppliedLoad } from '../motion/applied-loads.ts';
import { sampleMotion } from '../motion/sampled-motion.ts';
import type { InitialMotion, Notice } from '../spec/types.ts';

/** Share of the largest contact force that counts as tension: beyond what a cut series shows at a front. */
const TENSION = 0.01;

/**
 * A ram that strikes an end of a bar stays joined to it in this model. The notice says when the force
 * between them first turns to tension at a sampled time: from there on a ram that only rests against
 * the bar would leave it. Null where no end mass is struck or no tension appears.
 */
export function contactNotice(
  member: WaveMember,
  initial: InitialMotion,
  series: KeptSeries,
  loads: readonly AppliedLoad[],
  times: Float64Array,
): Notice | null {
  if (member.kind !== 'bar') return null;
  const last = member.segmentCount - 1;
  const length = member.position[member.segmentCount];
  const struck = [...(initial.massVelocities ?? []), ...(initial.impulses ?? [])].map((one) => one.at);
  for (const end of ['near', 'far'] as const) {
    const at = end === 'near' ? 0 : length;
    const mass = end === 'near' ? member.mass[0] : member.mass[member.segmentCount];
    if (mass === 0 || !struck.some((x) => Math.abs(x - at) <= 1e-12 * length)) continue;
    const station: Stations = {
      position: Float64Array.of(at),
      segment: Int32Array.of(end === 'near' ? 0 : last),
      distance: Float64Array.of(end === 'near' ? 0 : member.length[last]),
    };
    const force = sampleMotion(
      member,
      series.modes,
      station,
      times,
      ['force'],
      0,
      () => undefined,
      loads,
    ).get('force');
    if (!force) continue;
    const largest = force.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
    const first = force.findIndex((value) => value > TENSION * largest);
    if (first < 0) continue;
    return {
      code: 'contact-tension',
      detail: `The force between the ${end} end and the mass that strikes it turns to tension at ${times[first]} s. The mass stays joined to the member here; one that only rests against it would leave it at about that time, and what follows would differ.`,
    };
  }
  return null;
}

import type { WaveMember } from '../members/wave-member.ts';
import type { ResponsesSeries } from '../spec/types.ts';
import { totalMass } from '../spectrum/spectrum-size.ts';
import type { Shortfall, TailState } from './kept-modes.ts';
import { rigidRounding, roundingFactors } from './field-bounds.ts';
import { tailFactors } from './quantity-bounds.ts';

/** Tolerance that a fixed number of modes is judged by, relative to the ceiling. */
const USUAL_TOLERANCE = 1e-3;

/** Error of the displacement anywhere on the member within the span, m: tail and rounding. */
export function displacementBound(tail: TailState, flexibility: number, span: number): number {
  const left =
    (Math.sqrt(2 * tail.energies.energy) + tail.loads.displacement) * Math.sqrt(tail.member.flexibility);
  return left + displacementRounding(tail, flexibility, span);
}

/** √(2E G) over the member and what loads can add: the elastic displacement never exceeds it, m. */
export function displacementCeiling(tail: TailState, flexibility: number, still = 0): number {
  const reach = Math.sqrt(2 * tail.whole.energies.energy) + tail.whole.loads.displacement;
  return reach * Math.sqrt(flexibility) + still;
}

/**
 * How far the certificate is from what the series was asked for: error over tolerance of the
 * displacement (relative to the ceiling, or absolute) and of the force, the larger one.
 *
 * A force without any bound (irregular data, no gauge time) cannot be met by more modes: it does not
 * count here and is reported with its own verdict; alone it leaves the usual displacement tolerance.
 *
 * @param flexibility largest G over the member, m/N
 * @param still upper limit of the quasi-static displacement, m
 */
export function shortfallOf(
  series: ResponsesSeries,
  member: WaveMember,
  flexibility: number,
  gaugeTime: number,
  released: boolean,
  span: number,
  still = 0,
): Shortfall {
  const wanted = 'tolerances' in series ? series.tolerances : {};
  const relative = 'relativeTolerance' in series ? series.relativeTolerance : USUAL_TOLERANCE;
  return (tail) => {
    const force = wanted.force === undefined ? null : forceBound(tail, member, gaugeTime, released);
    const ceiling = displacementCeiling(tail, flexibility, still);
    if (!Number.isFinite(tail.loads.displacement)) {
      // a force that travels with the wave: only the mean square can be waited for, against the static shape
      const mean = tail.loads.rmsDisplacement / Math.sqrt(totalMass(member));
      return { ratio: Number.isFinite(mean) ? share(mean, relative * still) : 0, roundingRatio: 0 };
    }
    const error = displacementBound(tail, flexibility, span);
    const noise = displacementRounding(tail, flexibility, span);
    let ratio = 0;
    let roundingRatio = 0;
    if (wanted.displacement !== undefined) {
      ratio = share(error, wanted.displacement);
      roundingRatio = share(noise, wanted.displacement);
    } else if (force === null && !tail.whole.silent) {
      // an elastic motion of rounding size is none: it meets any relative tolerance
      ratio = share(error, relative * ceiling);
      roundingRatio = share(noise, relative * ceiling);
    }
    if (force !== null) {
      ratio = Math.max(ratio, share(force.bound, wanted.force as number));
      roundingRatio = Math.max(roundingRatio, share(force.rounding, wanted.force as number));
    }
    return { ratio, roundingRatio };
  };
}

function displacementRounding(tail: TailState, flexibility: number, span: number): number {
  const elastic = tail.rounding.level(0) * Math.sqrt(flexibility);
  return elastic + rigidRounding('displacement', tail.rigid, span, 0, 0);
}

function forceBound(
  tail: TailState,
  member: WaveMember,
  gaugeTime: number,
  released: boolean,
): { bound: number; rounding: number } | null {
  const factors = tailFactors(
    'force',
    tail.energies,
    member.damping,
    tail.kept,
    gaugeTime,
    released,
    tail.loads,
  );
  if (!factors.exists) return null;
  const rounding =
    roundingFactors('force', member, tail.rounding, tail.whole.energies.nextOmega, gaugeTime) *
    Math.sqrt(tail.whole.member.fluxInertia);
  return { bound: factors.onFluxInertia * Math.sqrt(tail.member.fluxInertia) + rounding, rounding };
}

/** Error over tolerance. */
function share(error: number, tolerance: number): number {
  return error === 0 ? 0 : error / tolerance;
}

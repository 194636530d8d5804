import { shapeRounding } from '../../certificate/rounding.ts';
import type { WaveMember } from '../../members/wave-member.ts';
import { ModeSeries } from '../../modes/mode-series.ts';
import { movingInertia, participationFactor, type MovingEnds } from '../../modes/participation.ts';
import { travelTime } from '../../spectrum/spectrum-size.ts';
import type { EffectiveMassCriterion } from '../../spec/types.ts';
import { ratio, shown, verdictAbove, type Outcome } from './criterion-outcome.ts';

const EPS = Number.EPSILON;

/** Modes beyond those of the request that are looked through for the number that would do. */
const FARTHEST = 1000;

/**
 * Whether the modes of the request carry a fraction of the inertia m(r, r) that moves with the ends: the
 * rule by which a modal analysis is held to be complete enough, as in EN 1998-1, 4.3.3.3.1 (from memory;
 * 90 % there). Where they do not, modes are added until the fraction is reached, to say how many it takes.
 *
 * The fraction Γ_n²/m(r, r) of a mode errs by 2√fraction δ + δ², δ the error of its shape in the mass norm.
 *
 * @param count number of modes of the request
 */
export function checkEffectiveMass(
  { minimum }: EffectiveMassCriterion,
  member: WaveMember,
  ends: MovingEnds,
  count: number,
): Outcome {
  const inertia = movingInertia(member, ends);
  const series = new ModeSeries(member);
  const time = travelTime(member);
  let fraction = 0;
  let error = 4 * EPS;
  let taken = 0;
  const takeOne = (): boolean => {
    const mode = series.next();
    if (mode === null) return false;
    const factor = participationFactor(member, mode.shape, ends);
    const part = inertia > 0 ? (factor * factor) / inertia : 0;
    const shape = shapeRounding(mode, time, member.segmentCount) + 8 * EPS;
    fraction += part;
    error += 2 * Math.sqrt(part) * shape + shape * shape + EPS;
    taken++;
    return true;
  };
  while (taken < count && takeOne());
  const demand = fraction;
  const bound = error;
  const verdict = verdictAbove(demand - bound, demand + bound, minimum);
  const used = taken;
  let more = true;
  if (verdict === 'fail')
    while (fraction - error < minimum && taken < used + FARTHEST && more) more = takeOne();
  const needed =
    fraction - error >= minimum
      ? `${taken} modes reach it`
      : more
        ? `${taken} modes do not reach it either (${shown(fraction)})`
        : `all ${taken} modes of the member do not reach it (${shown(fraction)})`;
  const statement = {
    pass: `The ${used} modes of the request carry ${shown(demand)} of the inertia that moves with the ends, at least ${shown(minimum)}.`,
    fail: `The ${used} modes of the request carry ${shown(demand)} of the inertia that moves with the ends, less than ${shown(minimum)}; ${needed}.`,
    undetermined: `Whether the ${used} modes of the request carry ${shown(minimum)} of the inertia that moves with the ends is within rounding: they carry ${shown(demand)}.`,
  }[verdict];
  return {
    verdict,
    demand,
    bound,
    limit: minimum,
    utilisation: ratio(minimum, demand),
    statement,
    remedy: 'Ask for one more mode, or move the minimum by more than rounding.',
  };
}

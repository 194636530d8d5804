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
  let asked: Captured = { modes: 0, fraction: 0, error: 0 };
  let last = asked;
  let verdict = verdictAbove(0, 0, minimum);
  let complete = true;
  for (const captured of captureBy(member, ends)) {
    last = captured;
    if (captured.modes <= count) {
      asked = captured;
      verdict = verdictAbove(asked.fraction - asked.error, asked.fraction + asked.error, minimum);
    }
    const settled = verdict !== 'fail' || last.fraction - last.error >= minimum;
    if (last.modes >= count && (settled || last.modes >= count + FARTHEST)) {
      complete = false;
      break;
    }
  }
  const { modes: used, fraction: demand, error: bound } = asked;
  const needed =
    last.fraction - last.error >= minimum
      ? `${last.modes} modes reach it`
      : complete
        ? `all ${last.modes} modes of the member do not reach it (${shown(last.fraction)})`
        : `${last.modes} modes do not reach it either (${shown(last.fraction)})`;
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

/** The fraction that the first so many modes carry, with its error. */
interface Captured {
  readonly modes: number;
  readonly fraction: number;
  readonly error: number;
}

function* captureBy(member: WaveMember, ends: MovingEnds): Generator<Captured> {
  const inertia = movingInertia(member, ends);
  const series = new ModeSeries(member);
  const time = travelTime(member);
  let modes = 0;
  let fraction = 0;
  let error = 4 * EPS;
  for (let mode = series.next(); mode !== null; mode = series.next()) {
    const factor = participationFactor(member, mode.shape, ends);
    const part = inertia > 0 ? (factor * factor) / inertia : 0;
    const shape = shapeRounding(mode, time, member.segmentCount) + 8 * EPS;
    modes++;
    fraction += part;
    error += 2 * Math.sqrt(part) * shape + shape * shape + EPS;
    yield { modes, fraction, error };
  }
}

import { dampingRate, ratioOf } from '../../motion/modal-damping.ts';
import type { CheckVerdict, DampingCriterion } from '../../spec/types.ts';
import { ratio, shown, shownModes, verdictAbove, worstOf, type Outcome } from './criterion-outcome.ts';
import type { EnclosedFrequency, KnownModes } from './known-modes.ts';

interface DampedMode {
  readonly order: number;
  readonly damping: number;
  readonly error: number;
  readonly verdict: CheckVerdict;
}

/**
 * Whether the damping ratio ζ_n = (α + 2ζω_n + βω_n²)/(2ω_n) of every mode up to a frequency reaches a
 * minimum. A mode whose enclosure holds that frequency counts as undetermined, unless it passes.
 *
 * @param listed the modes meant where no frequency is given
 */
export function checkDamping(
  { minimum, upTo }: DampingCriterion,
  modes: KnownModes,
  listed: readonly EnclosedFrequency[],
  pointer: string,
): Outcome {
  const candidates = upTo === undefined ? listed : modes.upTo(upTo, `${pointer}/upTo`);
  const damped = candidates.flatMap((mode): DampedMode[] => {
    if (mode.frequency === 0 || (upTo !== undefined && mode.lower > upTo)) return [];
    const { value, error } = dampingOf(modes, mode);
    const verdict = verdictAbove(value - error, value + error, minimum);
    const counts = upTo === undefined || mode.upper <= upTo;
    return [
      {
        order: mode.order,
        damping: value,
        error,
        verdict: counts || verdict === 'pass' ? verdict : 'undetermined',
      },
    ];
  });
  const reach = upTo === undefined ? 'of the request' : `up to ${shown(upTo)} Hz`;
  if (damped.length === 0) {
    const statement = `There is no vibrating mode ${reach}, so none has less damping than ${shown(minimum)}.`;
    return { verdict: 'pass', demand: null, bound: null, limit: minimum, utilisation: null, statement };
  }
  const verdict = worstOf(damped.map((one) => one.verdict));
  const least = damped.reduce((a, b) => (b.damping < a.damping ? b : a));
  const concerned = damped.filter((one) => one.verdict === verdict).map(({ order }) => order);
  const smallest = `the smallest damping ratio is ${shown(least.damping)} (mode ${least.order})`;
  const statement = {
    pass: `All ${damped.length} vibrating modes ${reach} have a damping ratio of ${shown(minimum)} or more; ${smallest}.`,
    fail: `Of the ${damped.length} vibrating modes ${reach}, ${shownModes(concerned)} ${concerned.length === 1 ? 'has' : 'have'} a damping ratio below ${shown(minimum)}; ${smallest}.`,
    undetermined: `Whether ${shownModes(concerned)} ${reach} ${concerned.length === 1 ? 'has' : 'have'} a damping ratio of ${shown(minimum)} or more is within rounding; ${smallest}.`,
  }[verdict];
  return {
    verdict,
    demand: least.damping,
    bound: least.error,
    limit: minimum,
    utilisation: ratio(minimum, least.damping),
    statement,
    remedy: 'Move the minimum or the highest frequency by more than rounding.',
    modes: verdict === 'pass' ? [least.order] : concerned,
  };
}

/** ζ_n and how far the enclosure of ω_n and rounding can move it; given ratios by themselves are exact. */
function dampingOf(
  { member }: KnownModes,
  { order, natural }: EnclosedFrequency,
): { value: number; error: number } {
  const { damping } = member;
  const { massCoefficient, stiffnessCoefficient } = damping;
  if (massCoefficient === 0 && stiffnessCoefficient === 0)
    return { value: ratioOf(damping, order), error: 0 };
  const at = (omega: number): number => dampingRate(damping, order, omega) / (2 * omega);
  const value = at(natural.omega);
  // ζ(ω) is convex, so it is largest at a side; its least value within is less by the width at most
  const sides = Math.max(Math.abs(at(natural.lower) - value), Math.abs(at(natural.upper) - value));
  const width = (natural.upper - natural.lower) / natural.lower;
  return { value, error: sides + (width + 8 * Number.EPSILON) * value };
}

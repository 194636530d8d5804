import type { FrequencyRangeCriterion } from '../../spec/types.ts';
import { ratio, shown, verdictAbove, verdictBelow, worstOf, type Outcome } from './criterion-outcome.ts';
import type { KnownModes } from './known-modes.ts';

/** Whether a natural frequency lies within a range, by its counted enclosure. */
export function checkFrequencyRange(
  { order, min, max }: FrequencyRangeCriterion,
  modes: KnownModes,
): Outcome {
  const limit = (max ?? min) as number;
  const mode = modes.mode(order);
  if (mode === null) {
    const verdict = 'undetermined';
    const statement = `There is no mode ${order}: the member has ${modes.total} modes, so the criterion cannot be met or missed.`;
    const remedy = `Name a mode from 1 to ${modes.total}.`;
    return { verdict, demand: null, bound: null, limit, utilisation: null, statement, remedy };
  }
  const { frequency, lower, upper } = mode;
  const low = min === undefined ? 'pass' : verdictAbove(lower, upper, min);
  const high = max === undefined ? 'pass' : verdictBelow(lower, upper, max);
  const verdict = worstOf([low, high]);
  const overMin = min === undefined ? null : ratio(min, frequency);
  const overMax = max === undefined ? null : ratio(frequency, max);
  const minGoverns = overMax === null || (overMin !== null && overMin > overMax);
  const range =
    min === undefined
      ? `at or below ${shown(limit)} Hz`
      : max === undefined
        ? `at or above ${shown(min)} Hz`
        : `from ${shown(min)} Hz to ${shown(max)} Hz`;
  const means = {
    pass: `lies ${range}, as it must`,
    fail: `does not lie ${range}`,
    undetermined: `may lie ${range} or not: the limit is within rounding of it`,
  }[verdict];
  return {
    verdict,
    demand: frequency,
    bound: Math.max(upper - frequency, frequency - lower),
    limit: minGoverns ? (min as number) : (max as number),
    utilisation: minGoverns ? overMin : overMax,
    statement: `The natural frequency of mode ${order}, ${shown(frequency)} Hz (counted between ${lower} Hz and ${upper} Hz), ${means}.`,
    remedy: 'Move the limit away from the frequency by more than rounding.',
    modes: [order],
  };
}

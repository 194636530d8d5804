import type { CheckVerdict, Criterion, CriterionResult } from '../../spec/types.ts';

/** What a criterion comes to, its name and type aside. */
export type Outcome = Omit<CriterionResult, 'id' | 'type'>;

/** Fail over undetermined over pass. */
export function worstOf(verdicts: readonly CheckVerdict[]): CheckVerdict {
  if (verdicts.includes('fail')) return 'fail';
  return verdicts.includes('undetermined') ? 'undetermined' : 'pass';
}

/**
 * The verdict on a quantity that lies between two certified limits and must not exceed `limit`.
 *
 * @param lower it certainly reaches this
 * @param upper it certainly does not exceed this; null where nothing is known
 */
export function verdictBelow(lower: number, upper: number | null, limit: number): CheckVerdict {
  if (lower > limit) return 'fail';
  return upper !== null && upper <= limit ? 'pass' : 'undetermined';
}

/** The same of a quantity that must reach `limit`. */
export function verdictAbove(lower: number, upper: number, limit: number): CheckVerdict {
  if (upper < limit) return 'fail';
  return lower >= limit ? 'pass' : 'undetermined';
}

/** A ratio that is a number, or null. */
export function ratio(top: number, bottom: number): number | null {
  const value = top / bottom;
  return Number.isFinite(value) ? value : null;
}

/** The result of a criterion; a remedy only where it is undetermined. */
export function resultOf({ id, type }: Criterion, { remedy, ...outcome }: Outcome): CriterionResult {
  const told = outcome.verdict === 'undetermined' && remedy !== undefined;
  return { id, type, ...outcome, ...(told && { remedy }) };
}

/** A number as a sentence has it: six digits, without trailing zeros. */
export function shown(value: number): string {
  return String(Number(value.toPrecision(6)));
}

/** `mode 3`, `modes 1, 2 and 5`, `modes 1, 2, 3, … (12 in all)`. */
export function shownModes(orders: readonly number[]): string {
  if (orders.length === 1) return `mode ${orders[0]}`;
  if (orders.length > 8) return `modes ${orders.slice(0, 6).join(', ')}, … (${orders.length} in all)`;
  return `modes ${orders.slice(0, -1).join(', ')} and ${orders[orders.length - 1]}`;
}

import type { Verdict } from '../spec/types.ts';

/** From the best to the worst. */
const ORDER: readonly Verdict[] = ['complete', 'converged', 'mode-limit', 'rounding-limit', 'irregular-data'];

/** The worst of several verdicts. */
export function worstVerdict(verdicts: readonly Verdict[]): Verdict {
  return verdicts.reduce((worst, verdict) =>
    ORDER.indexOf(verdict) > ORDER.indexOf(worst) ? verdict : worst,
  );
}

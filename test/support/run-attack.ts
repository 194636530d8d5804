import { solveResponses } from '../../src/solutions/responses.ts';
import type { AttackCase } from './attack-cases.ts';
import { compareSeries } from './compare-series.ts';

/** What an attack on the bounds brought. */
export interface AttackOutcome {
  /** Every claim that a longer series contradicts, and every answer withheld, in words. */
  readonly failures: readonly string[];
  /** Median over the cases of the largest error of the displacement over its bound. */
  readonly median: number;
}

function quantile(sorted: readonly number[], share: number): number {
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))];
}

/**
 * Solves cases 0 to `count` − 1 of a seed with few and with many modes, compares, and prints how near the
 * errors come to their bounds.
 */
export function runAttack(
  caseOf: (seed: number, index: number) => AttackCase,
  count: number,
  seed: number,
): AttackOutcome {
  const failures: string[] = [];
  const ratios = new Map<string, number[]>();
  const families = new Map<string, number>();
  for (let index = 0; index < count; index++) {
    const { family, short, long, weights } = caseOf(seed, index);
    const [kind] = family.split(', ');
    families.set(kind, (families.get(kind) ?? 0) + 1);
    try {
      const comparison = compareSeries(solveResponses(short), solveResponses(long), weights);
      for (const { claim, where, found, allowed } of comparison.violations.slice(0, 3)) {
        failures.push(`case ${index} (${family}), ${claim} at ${where}: ${found} > ${allowed}`);
      }
      for (const [key, ratio] of comparison.ratios) ratios.set(key, [...(ratios.get(key) ?? []), ratio]);
    } catch (error) {
      failures.push(`case ${index} (${family}): ${String(error)}`);
    }
  }
  const rows = [...ratios].map(([key, values]) => {
    const sorted = values.toSorted((a, b) => a - b);
    const figures = [quantile(sorted, 0.5), quantile(sorted, 0.9), sorted[sorted.length - 1]];
    return `${key.padEnd(28)} ${String(values.length).padStart(7)} ${figures.map((x) => x.toPrecision(3).padStart(10)).join('')}`;
  });
  process.stdout.write(
    `largest error over bound, per case      cases    median       90 %     worst\n${rows.join('\n')}\n` +
      `${[...families].map(([family, number]) => `${family} ${number}`).join(', ')}\n`,
  );
  const displacement = (ratios.get('displacement pointwise') ?? [0]).toSorted((a, b) => a - b);
  return { failures, median: quantile(displacement, 0.5) };
}

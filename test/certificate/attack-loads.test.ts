import { expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import { compareSeries } from '../support/compare-series.ts';
import { loadAttackCase } from '../support/load-attack-cases.ts';

/**
 * CASES and SEED in the environment make a longer run:
 *
 *     CASES=100000 SEED=7 npx vitest run test/certificate/attack-loads.test.ts
 */
const CASES = Number(process.env['CASES'] ?? 2000);
const SEED = Number(process.env['SEED'] ?? 20_263);

function quantile(sorted: readonly number[], share: number): number {
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))];
}

it(
  `no bound is exceeded by a much longer series: ${CASES} random loaded members, seed ${SEED}`,
  () => {
    const failures: string[] = [];
    const ratios = new Map<string, number[]>();
    const families = new Map<string, number>();
    for (let index = 0; index < CASES; index++) {
      const { family, short, long, weights } = loadAttackCase(SEED, index);
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
    const table = [...ratios].map(([key, values]) => {
      const sorted = values.toSorted((a, b) => a - b);
      const figures = [quantile(sorted, 0.5), quantile(sorted, 0.9), sorted[sorted.length - 1]];
      return `${key.padEnd(28)} ${String(values.length).padStart(7)} ${figures.map((x) => x.toPrecision(3).padStart(10)).join('')}`;
    });
    process.stdout.write(
      `largest error over bound, per case      cases    median       90 %     worst\n${table.join('\n')}\n` +
        `${[...families].map(([family, count]) => `${family} ${count}`).join(', ')}\n`,
    );
    expect(failures.slice(0, 20)).toEqual([]);
    // No bound may be so wide that it says nothing: half of all cases come within this of it.
    expect(
      quantile(
        (ratios.get('displacement pointwise') ?? [0]).toSorted((a, b) => a - b),
        0.5,
      ),
    ).toBeGreaterThan(0.05);
  },
  Math.max(180_000, CASES * 200),
);

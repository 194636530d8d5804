import { expect, it } from 'vitest';
import { loadAttackCase } from '../support/load-attack-cases.ts';
import { runAttack } from '../support/run-attack.ts';

/**
 * CASES and SEED in the environment make a longer run:
 *
 *     CASES=100000 SEED=7 npx vitest run test/certificate/attack-loads.test.ts
 */
const CASES = Number(process.env['CASES'] ?? 2000);
const SEED = Number(process.env['SEED'] ?? 20_263);

it(
  `no bound is exceeded by a much longer series: ${CASES} random loaded members, seed ${SEED}`,
  () => {
    const { failures, median } = runAttack(loadAttackCase, CASES, SEED);
    expect(failures.slice(0, 20)).toEqual([]);
    // No bound may be so wide that it says nothing: half of all cases come within this of it.
    expect(median).toBeGreaterThan(0.05);
  },
  Math.max(180_000, CASES * 200),
);

import { expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { Quantity, ResponsesRequest } from '../../src/spec/types.ts';
import { attackCase } from '../support/attack-cases.ts';
import { loadAttackCase } from '../support/load-attack-cases.ts';

/** CASES and SEED in the environment make a longer run. */
const CASES = Number(process.env['CASES'] ?? 250);
const SEED = Number(process.env['SEED'] ?? 477);

const QUANTITIES: readonly Quantity[] = [
  'displacement',
  'relativeDisplacement',
  'velocity',
  'acceleration',
  'force',
];

/** The grid with `parts` steps in place of each. */
function refined(grid: readonly number[], parts: number): number[] {
  return grid.flatMap((x, i) =>
    i === 0
      ? [x]
      : Array.from({ length: parts }, (_, m) => grid[i - 1] + ((x - grid[i - 1]) * (m + 1)) / parts),
  );
}

/** The longer series of a case, looked at between the samples of the shorter one. */
function lookedInto(short: ResponsesRequest, long: ResponsesRequest): ResponsesRequest {
  const { positions, times } = short.sample as { positions: number[]; times: number[] };
  return { ...long, sample: { ...short.sample, positions: refined(positions, 3), times: refined(times, 6) } };
}

it(
  `no peak between samples exceeds its upper limit: ${CASES} random members, seed ${SEED}`,
  () => {
    const failures: string[] = [];
    const ratios: number[] = [];
    for (let index = 0; index < CASES; index++) {
      const { family, short, long } = (index % 4 === 0 ? attackCase : loadAttackCase)(SEED, index);
      const { peaks, fields } = solveResponses(short);
      const fine = solveResponses(lookedInto(short, long)).fields;
      for (const quantity of QUANTITIES) {
        const upper = peaks[quantity]?.upper;
        const field = fine[quantity];
        if (upper == null || field?.bound == null) continue;
        if (field.boundKind !== fields[quantity]?.boundKind) continue;
        let found = 0;
        for (const row of field.values) {
          row.forEach((value, q) => (found = Math.max(found, Math.abs(value) - field.bound![q])));
        }
        if (!(found <= upper)) {
          failures.push(`case ${index} (${family}), ${quantity}: ${found} > ${upper}`);
        }
        if (quantity === 'displacement' && found > 0) ratios.push(upper / found);
      }
    }
    ratios.sort((a, b) => a - b);
    const at = (share: number): string => ratios[Math.floor(share * (ratios.length - 1))].toPrecision(3);
    process.stdout.write(`upper limit over peak: median ${at(0.5)}, 90 % ${at(0.9)}\n`);
    expect(failures.slice(0, 20)).toEqual([]);
    // A limit that says nothing is no limit: half of all cases come within this of it.
    expect(ratios[Math.floor(ratios.length / 2)]).toBeLessThan(10);
  },
  Math.max(180_000, CASES * 300),
);

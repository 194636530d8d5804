import { describe, expect, it } from 'vitest';
import { solveChecks } from '../../src/solutions/checks.ts';
import { moveMember } from '../../src/solutions/responses.ts';
import { solveTransferFunctions } from '../../src/solutions/transfer-functions.ts';
import { readPeak } from '../../src/solutions/criteria/peak-runs.ts';
import type {
  PeakCriterion,
  Quantity,
  ResponsesRequest,
  TransferFunctionsRequest,
  TransferQuantity,
} from '../../src/spec/types.ts';
import { attackCase } from '../support/attack-cases.ts';
import { loadAttackCase } from '../support/load-attack-cases.ts';
import { lengthOf, travelTime } from '../support/plain-member.ts';
import { RandomStream } from '../support/random.ts';
import { randomMember } from '../support/random-members.ts';
import { requestMember } from '../support/requests.ts';

/** CASES and SEED in the environment make a longer run. */
const CASES = Number(process.env['CASES'] ?? 200);
const SEED = Number(process.env['SEED'] ?? 91);

/** Work that a check may add here, so that a thousand of them end in time. */
const LITTLE_WORK = 2e6;

const QUANTITIES: readonly Quantity[] = ['displacement', 'velocity', 'acceleration', 'force'];

/** The grid with `parts` steps in place of each. */
function refined(grid: readonly number[], parts: number): number[] {
  return grid.flatMap((x, i) =>
    i === 0
      ? [x]
      : Array.from({ length: parts }, (_, m) => grid[i - 1] + ((x - grid[i - 1]) * (m + 1)) / parts),
  );
}

/** At most a dozen of many positions, the first and the last among them. */
function thinned(positions: number[]): number[] {
  const step = Math.max(1, Math.ceil(positions.length / 12));
  return positions.filter((_, q) => q % step === 0 || q === positions.length - 1);
}

/** A much longer series, looked at between the samples of the shorter one. */
function lookedInto(short: ResponsesRequest, long: ResponsesRequest, at: number[] | null): ResponsesRequest {
  const { positions, times } = short.sample as { positions: number[]; times: number[] };
  const sample = { ...short.sample, positions: at ?? refined(positions, 2), times: refined(times, 5) };
  return { ...long, sample, checks: false };
}

describe('no verdict on a peak is turned by a much longer series', () => {
  it(
    `in ${CASES} random cases, seed ${SEED}`,
    () => {
      const failures: string[] = [];
      const counts = { pass: 0, fail: 0, undetermined: 0 };
      for (let index = 0; index < CASES; index++) {
        const random = new RandomStream(SEED, index);
        const { family, short, long } = (index % 2 === 0 ? attackCase : loadAttackCase)(SEED, index);
        const positions = thinned((short.sample as { positions: number[] }).positions);
        short.sample.positions = positions;
        // Two quantities a case keep the thousand within minutes; acceleration has seldom a limit under loads.
        short.sample.quantities = [random.pick(QUANTITIES), 'displacement' as const]
          .toSorted()
          .filter((one, i, all) => all.indexOf(one) === i);
        const at = random.chance(0.4) ? [random.pick(positions), random.pick(positions)] : null;
        const truth = moveMember(lookedInto(short, long, at));
        const criteria = QUANTITIES.flatMap(
          (quantity): (PeakCriterion & { certain: number; most: number })[] => {
            if (!short.sample.quantities.includes(quantity)) return [];
            const { lower, upper, value } = readPeak(truth, quantity, at !== null);
            if (!(value > 0)) return [];
            // Near the peak, where a verdict is hardest, and somewhat off it.
            const limit = value * random.pick([0.5, 0.9, 0.97, 1, 1.03, 1.1, 1.5, 3]);
            return [
              {
                id: quantity,
                type: 'peak',
                quantity,
                limit,
                certain: lower,
                most: upper ?? Infinity,
                ...(at && { at }),
              },
            ];
          },
        );
        if (criteria.length === 0) continue;
        const fewest = 'modes' in short.series ? short.series.modes : 4;
        const request = {
          ...short,
          checks: false,
          series: { relativeTolerance: 0.5, maxModes: fewest * random.pick([1, 2, 4]) },
        };
        const answer = solveChecks(
          { operation: 'responses', request, criteria, undetermined: 'fail' },
          LITTLE_WORK,
        );
        answer.criteria.forEach(({ verdict, statement }, i) => {
          counts[verdict]++;
          const { certain, most, limit } = criteria[i];
          if (verdict === 'pass' && certain > limit)
            failures.push(`case ${index} (${family}): ${certain}; ${statement}`);
          if (verdict === 'fail' && most < limit)
            failures.push(`case ${index} (${family}): ${most}; ${statement}`);
        });
      }
      process.stdout.write(`verdicts on peaks: ${JSON.stringify(counts)}\n`);
      expect(failures.slice(0, 20)).toEqual([]);
      // A check that never decides would pass this test too.
      expect(Math.min(counts.pass, counts.fail)).toBeGreaterThan(0.1 * CASES);
    },
    Math.max(300_000, CASES * 1500),
  );
});

describe('no verdict on a transfer function is turned by a denser look', () => {
  it(
    `in ${CASES / 5} random cases, seed ${SEED}`,
    () => {
      const failures: string[] = [];
      const counts = { pass: 0, fail: 0, undetermined: 0 };
      for (let index = 0; index < CASES / 5; index++) {
        const random = new RandomStream(SEED + 1, index);
        const { request, highest } = randomTransfer(random);
        const from = random.between(0.1, 0.6) * highest;
        const to = from + random.between(0.05, 0.4) * highest;
        const look = { from, to, count: 400, spacing: 'linear' as const };
        const dense = solveTransferFunctions({ ...request, frequencies: look, refine: true });
        const [{ magnitude }] = dense.outputs;
        const most = Math.max(...magnitude);
        if (!(most > 0)) continue;
        const limit = most * random.pick([0.5, 0.98, 1.02, 1.1, 2]);
        const answer = solveChecks({
          operation: 'transfer-functions',
          request,
          criteria: [{ id: 'band', type: 'transfer', band: [from, to], limit }],
          undetermined: 'fail',
        });
        const [{ verdict, statement }] = answer.criteria;
        counts[verdict]++;
        // The refined grid misses no peak by more than 1 %.
        if (verdict === 'pass' && most > limit * (1 + 1e-6))
          failures.push(`case ${index}: ${most}; ${statement}`);
        if (verdict === 'fail' && most * 1.011 < limit) failures.push(`case ${index}: ${most}; ${statement}`);
      }
      process.stdout.write(`verdicts on transfer functions: ${JSON.stringify(counts)}\n`);
      expect(failures.slice(0, 20)).toEqual([]);
      expect(Math.min(counts.pass, counts.fail)).toBeGreaterThan(0.05 * CASES);
    },
    Math.max(300_000, CASES * 1500),
  );
});

/** A damped member of a random family under a random input, and a frequency that a few of its modes lie below. */
function randomTransfer(random: RandomStream): { request: TransferFunctionsRequest; highest: number } {
  const plain = randomMember(random, random.pick(['general', 'general', 'uniform', 'massless-segments']));
  const time = travelTime(plain) || 1;
  const damping = random.pick([
    { type: 'loss-factor' as const, value: random.decades(-2, -0.5) },
    { type: 'ratio' as const, value: random.decades(-2, -0.5) },
    {
      type: 'rayleigh' as const,
      massCoefficient: random.decades(-2, 0) / time,
      stiffnessCoefficient: random.decades(-3, -1.5) * time,
    },
  ]);
  const length = lengthOf(plain);
  const held = plain.nearFixed ? 'near' : plain.farFixed ? 'far' : null;
  const impedance =
    random.decades(-1, 2) * Math.sqrt(plain.segments[0].stiffness * (plain.segments[0].inertia || 1));
  const motions =
    held === null
      ? []
      : [
          { type: 'end-motion' as const, end: held, quantity: 'acceleration' as const },
          ...(damping.type === 'ratio'
            ? []
            : [{ type: 'outcrop-motion' as const, end: held, impedance, quantity: 'displacement' as const }]),
        ];
  const input = random.pick([
    { type: 'point-force' as const, at: 0.37 * length },
    ...motions,
  ]) as TransferFunctionsRequest['input'];
  const quantities: TransferQuantity[] = ['displacement', 'velocity', 'acceleration', 'force'];
  const output = { at: random.between(0.05, 0.95) * length, quantity: random.pick(quantities) };
  const highest = random.between(0.4, 3) / time;
  return {
    request: {
      member: requestMember(plain, damping),
      input,
      outputs: [output],
      frequencies: [highest],
      refine: false,
    },
    highest,
  };
}

import { Fault } from '../../faults/fault.ts';
import { readMember } from '../../members/read-member.ts';
import type { TransferCriterion, TransferFunctionsRequest } from '../../spec/types.ts';
import { solveTransferFunctions } from '../transfer-functions.ts';
import { ratio, shown, verdictBelow, type Outcome } from './criterion-outcome.ts';
import { TransferBand } from './transfer-band.ts';
import type { Stretch } from './transfer-spread.ts';

/** Stretches that a band is first cut into, and frequencies that one criterion may solve. */
const FIRST = 64;
const MOST_SOLVED = 40_000;
/** Rounding of the closed form, relative: it has no bound of its own. */
const ROUNDING = 1e-9;
const TURN = 2 * Math.PI;

/** What was found of a band so far. */
interface Found {
  /** Largest magnitude that was solved, and its frequency in Hz and output. */
  value: number;
  frequency: number;
  output: number;
  /** The peak certainly reaches this. */
  lower: number;
  /** What the stretches that are done do not exceed. */
  settled: number;
  solved: number;
}

/**
 * Whether the magnitude of a transfer function stays at or below a limit everywhere in a band.
 *
 * The band is cut into stretches. In the middle of each the function is solved, and {@link TransferBand}
 * bounds how far it can move to both sides; a stretch whose bound meets the limit is done, another one is
 * halved. A solved magnitude above the limit is a fail. What is left when {@link MOST_SOLVED} frequencies
 * are solved is undetermined: a peak is never passed by luck between two frequencies.
 *
 * Cost: O(segments + modes) a solved frequency and output; more of them, the nearer the peak to the limit.
 */
export function checkTransfer(criterion: TransferCriterion, request: TransferFunctionsRequest): Outcome {
  const { band, limit, output } = criterion;
  const outputs = output === undefined ? request.outputs : [request.outputs[output]];
  const asked: TransferFunctionsRequest = { ...request, outputs, refine: false };
  delete asked.series;
  const [from, to] = band.map((frequency) => TURN * frequency);
  const member = readMember(request.member, 'steady');
  const bounds = from === to ? null : new TransferBand(member, asked, band[1]);
  const found: Found = { value: 0, frequency: band[0], output: 0, lower: 0, settled: 0, solved: 0 };
  let open: Stretch[] =
    from === to
      ? [{ from, to }]
      : Array.from({ length: FIRST }, (_, i) => ({
          from: from + ((to - from) * i) / FIRST,
          to: i === FIRST - 1 ? to : from + ((to - from) * (i + 1)) / FIRST,
        }));
  let infinite = false;
  while (open.length > 0 && found.lower <= limit && found.solved + open.length <= MOST_SOLVED) {
    const next = tried(asked, open, bounds, limit, found);
    infinite = next === null;
    if (next === null) break;
    open = next;
  }
  const verdict = infinite
    ? 'fail'
    : verdictBelow(found.lower, open.length === 0 ? found.settled : null, limit);
  return outcome(criterion, asked, found, verdict, infinite);
}

/**
 * Solves the middle of every stretch.
 *
 * @returns the halves of those that are not done; null where an undamped resonance was hit
 */
function tried(
  request: TransferFunctionsRequest,
  open: readonly Stretch[],
  bounds: TransferBand | null,
  limit: number,
  found: Found,
): Stretch[] | null {
  const middles = open.map(({ from, to }) => (0.5 * (from + to)) / TURN);
  const answer = solvedAt(request, middles, found);
  if (answer === null) return null;
  found.solved += open.length;
  return open.flatMap((stretch, j) => {
    let upper = 0;
    answer.outputs.forEach(({ magnitude, bound }, index) => {
      const error = (bound?.[j] ?? 0) + ROUNDING * magnitude[j];
      if (magnitude[j] > found.value) {
        Object.assign(found, { value: magnitude[j], frequency: middles[j], output: index });
      }
      found.lower = Math.max(found.lower, magnitude[j] - error);
      const most = magnitude[j] + error;
      upper = Math.max(
        upper,
        bounds === null ? most : bounds.upperWithin(index, stretch, most) * (1 + ROUNDING),
      );
    });
    if (upper <= limit) {
      found.settled = Math.max(found.settled, upper);
      return [];
    }
    const middle = 0.5 * (stretch.from + stretch.to);
    return [
      { from: stretch.from, to: middle },
      { from: middle, to: stretch.to },
    ];
  });
}

function solvedAt(
  request: TransferFunctionsRequest,
  frequencies: number[],
  found: Found,
): ReturnType<typeof solveTransferFunctions> | null {
  try {
    return solveTransferFunctions({ ...request, frequencies });
  } catch (error) {
    const hit = error instanceof Fault && error.records.every(({ code }) => code === 'resonance-hit');
    if (!hit) throw error;
    found.frequency =
      frequencies.length === 1
        ? frequencies[0]
        : (frequencies.find((one) => solvedAt(request, [one], found) === null) ?? found.frequency);
    return null;
  }
}

function outcome(
  { band, limit }: TransferCriterion,
  { outputs }: TransferFunctionsRequest,
  found: Found,
  verdict: Outcome['verdict'],
  infinite: boolean,
): Outcome {
  const { quantity, at } = outputs[found.output];
  const range = `from ${shown(band[0])} to ${shown(band[1])} Hz`;
  const name = `magnitude of the transfer function to the ${quantity}`;
  const largest = `${shown(found.value)} at ${shown(found.frequency)} Hz and ${shown(at)} m is the largest solved`;
  const statement = infinite
    ? `The ${name} exceeds ${shown(limit)}: at ${shown(found.frequency)} Hz the undamped member is in resonance.`
    : {
        pass: `The ${name} stays at or below ${shown(limit)} everywhere ${range}: ${largest}, and between the ${found.solved} frequencies solved it certainly stays below the limit.`,
        fail: `The ${name} exceeds ${shown(limit)} ${range}: ${largest}.`,
        undetermined: `Whether the ${name} stays at or below ${shown(limit)} everywhere ${range} is not settled by ${found.solved} frequencies: ${largest}.`,
      }[verdict];
  return {
    verdict,
    demand: infinite ? null : found.value,
    bound: verdict === 'pass' ? found.settled - found.value : null,
    limit,
    utilisation: infinite ? null : ratio(found.value, limit),
    statement,
    remedy:
      'Move the limit away from the peak, narrow the band, or give the member damping: an undamped peak has no largest magnitude.',
    at,
    frequency: found.frequency,
  };
}

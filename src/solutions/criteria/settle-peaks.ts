import type { CheckVerdict, PeakCriterion, Quantity, ResponsesRequest } from '../../spec/types.ts';
import { HELD_NUMBERS, MODE_LIMIT } from '../limits.ts';
import { moveMember, type MovedMember } from '../responses.ts';
import { verdictBelow } from './criterion-outcome.ts';
import { readPeak, requestOf, valuesOf, type PeakReading, type RunPlan } from './peak-runs.ts';

/** Most modes where the request says only a number of them. */
const USUAL_LIMIT = 4096;
/** Sampled values of one run. */
const MOST_VALUES = 1_000_000;
/** Multiplications that the runs beyond the first may cost all together, tuned by trial to about two seconds. */
const MOST_WORK = 1e9;
/** Share of what is unsettled from which the modes left out are the matter, else the samples. */
const TAIL_SHARE = 0.25;
/** More modes must make the bound smaller than this share of it, or rounding rules. */
const LEAST_GAIN = 0.9;

/** What is certain of a peak after all runs, and why no run decided where none did. */
export interface PeakFinding extends PeakReading {
  readonly verdict: CheckVerdict;
  readonly modesUsed: number;
  readonly mostModes: number;
  /** What the last run lacked: a limit at all, modes, samples, digits. */
  readonly lacking: 'limit' | 'modes' | 'samples' | 'rounding' | null;
  readonly run: MovedMember;
}

interface Work {
  left: number;
}

/**
 * Decides criteria on peaks: runs the request as it is, then with more modes or denser samples, whichever
 * keeps the criterion open, until all are decided or nothing helps. What a run has certified stays true, so
 * the best of all runs counts: no verdict depends on a single one.
 *
 * Criteria that look at the same places with the same gauge time share their runs.
 * Cost: at most about {@link MOST_WORK} multiplications beyond the first runs.
 */
export function settlePeaks(
  request: ResponsesRequest,
  criteria: readonly PeakCriterion[],
  mostWork = MOST_WORK,
): Map<PeakCriterion, PeakFinding> {
  const groups = new Map<string, PeakCriterion[]>();
  for (const criterion of criteria) {
    const key = JSON.stringify([criterion.at ?? null, gaugeOf(request, criterion)]);
    groups.set(key, [...(groups.get(key) ?? []), criterion]);
  }
  const found = new Map<PeakCriterion, PeakFinding>();
  const work: Work = { left: mostWork };
  for (const group of groups.values()) settleGroup(request, group, work, found);
  return found;
}

function gaugeOf(request: ResponsesRequest, { gaugeTime }: PeakCriterion): number {
  return gaugeTime ?? request.sample.gaugeTime;
}

function settleGroup(
  request: ResponsesRequest,
  group: readonly PeakCriterion[],
  work: Work,
  found: Map<PeakCriterion, PeakFinding>,
): void {
  const [first] = group;
  const at = first.at === undefined ? null : [first.at].flat();
  const mostModes = modeLimit(request);
  let plan: RunPlan = {
    at,
    gaugeTime: gaugeOf(request, first),
    quantities: namedIn(group),
    level: 0,
    modes: null,
  };
  const runs = new Map<Quantity, { reading: PeakReading; modes: number }>();
  for (;;) {
    const run = moveMember(requestOf(request, plan));
    const used = run.basis.series.modes.length;
    const open: PeakCriterion[] = [];
    let next: RunPlan | null = null;
    for (const criterion of group) {
      const before = found.get(criterion);
      if (before !== undefined && before.verdict !== 'undetermined') continue;
      const { quantity, limit } = criterion;
      const fresh = readPeak(run, quantity, at !== null);
      const earlier = runs.get(quantity);
      const reading = joined(before, fresh);
      const verdict = verdictBelow(reading.lower, reading.upper, limit);
      const lacking = verdict === 'undetermined' ? lackOf(fresh, run, earlier) : null;
      found.set(criterion, { ...reading, verdict, modesUsed: used, mostModes, lacking, run });
      if (verdict !== 'undetermined') continue;
      open.push(criterion);
      next ??= nextPlan(request, { ...plan, quantities: [quantity] }, lacking, used, mostModes, work);
    }
    for (const quantity of plan.quantities) {
      runs.set(quantity, { reading: readPeak(run, quantity, at !== null), modes: used });
    }
    if (open.length === 0 || next === null) return;
    plan = { ...next, quantities: namedIn(open) };
    work.left -= workOf(requestOf(request, plan), plan.modes ?? used);
  }
}

function namedIn(criteria: readonly PeakCriterion[]): Quantity[] {
  return [...new Set(criteria.map(({ quantity }) => quantity))];
}

/** The better of what two runs are certain of; the value is that of the later one, held to it. */
function joined(before: PeakReading | undefined, fresh: PeakReading): PeakReading {
  const lower = Math.max(before?.lower ?? 0, fresh.lower);
  const upper = before?.upper == null ? fresh.upper : Math.min(before.upper, fresh.upper ?? Infinity);
  const larger =
    before !== undefined && before.value > fresh.value && (upper === null || before.value <= upper);
  return { ...(larger ? before : fresh), lower, upper, bound: fresh.bound };
}

/** What keeps a peak unsettled in a run. */
function lackOf(
  { upper, lower, bound }: PeakReading,
  run: MovedMember,
  earlier: { reading: PeakReading; modes: number } | undefined,
): NonNullable<PeakFinding['lacking']> {
  if (bound === null || upper === null) return 'limit';
  const used = run.basis.series.modes.length;
  const complete = run.basis.series.verdict === 'complete' || run.basis.series.verdict === 'rounding-limit';
  const grew = earlier !== undefined && used > earlier.modes;
  const stuck = grew && earlier.reading.bound !== null && bound > LEAST_GAIN * earlier.reading.bound;
  if (2 * bound < TAIL_SHARE * (upper - lower)) return 'samples';
  return complete || stuck ? 'rounding' : 'modes';
}

/** The next run for a criterion, or null where none would help or the work would be too much. */
function nextPlan(
  request: ResponsesRequest,
  plan: RunPlan,
  lacking: PeakFinding['lacking'],
  used: number,
  mostModes: number,
  work: Work,
): RunPlan | null {
  const more = used < mostModes ? { ...plan, modes: Math.min(mostModes, 2 * used) } : null;
  const denser = { ...plan, modes: plan.modes ?? used, level: plan.level + 1 };
  const wanted = lacking === 'modes' ? [more, denser] : lacking === 'samples' ? [denser] : [];
  for (const one of wanted) {
    if (one === null) continue;
    const next = requestOf(request, one);
    if (valuesOf(next) <= MOST_VALUES && workOf(next, one.modes) <= work.left) return one;
  }
  return null;
}

function workOf(request: ResponsesRequest, modes: number): number {
  const { times, gaugeTime } = request.sample;
  // a modal coordinate at an instant, in multiplications; twice more for both sides of a gauge
  const perTime = (request.loads.length > 0 ? 40 : 20) * (gaugeTime > 0 ? 3 : 1);
  const instants = Array.isArray(times) ? times.length : times.count;
  return modes * (2 * valuesOf(request) + perTime * instants + 100 * request.member.segments.length);
}

/** Most modes that a request allows; those of one request, and as many as can be held. */
function modeLimit({ series, member }: ResponsesRequest): number {
  const segments = member.segments.length + member.attachments.length;
  const held = Math.floor(HELD_NUMBERS / (4 * segments));
  const asked = 'modes' in series ? Math.max(series.modes, USUAL_LIMIT) : series.maxModes;
  return Math.min(asked, held, MODE_LIMIT);
}

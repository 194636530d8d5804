import { Fault } from '../faults/fault.ts';
import { readMember } from '../members/read-member.ts';
import type {
  ChecksAnswer,
  ChecksRequest,
  Criterion,
  PeakCriterion,
  TransferCriterion,
} from '../spec/types.ts';
import { resultOf, worstOf, type Outcome } from './criteria/criterion-outcome.ts';
import { checkDamping } from './criteria/damping.ts';
import { checkEffectiveMass } from './criteria/effective-mass.ts';
import { checkFrequencyRange } from './criteria/frequency-range.ts';
import { KnownModes } from './criteria/known-modes.ts';
import { peakOutcome } from './criteria/peak.ts';
import { checkSeparation } from './criteria/separation.ts';
import { settlePeaks } from './criteria/settle-peaks.ts';
import { checkTransfer } from './criteria/transfer.ts';
import { checkVortex } from './criteria/vortex.ts';
import { solveModes } from './modes.ts';
import { solveResponses } from './responses.ts';
import { solveTransferFunctions } from './transfer-functions.ts';

/**
 * Holds a solve to criteria. The solve is made as it would be by itself; every criterion is then decided
 * from certified limits alone, with more modes or samples where these leave it open: `pass` and `fail` are
 * true of the member as it is described, whatever a longer series would show.
 *
 * Faults: those of the solve, and `mode-out-of-reach` of a criterion. Pointers lead into the whole request.
 *
 * @param mostWork multiplications that more modes and samples may cost; by default some seconds of them
 * Cost: that of the solve; criteria on peaks and transfer functions add up to some seconds.
 */
export function solveChecks(checks: ChecksRequest, mostWork?: number): ChecksAnswer {
  const { convergence, notices } = within(() => solved(checks));
  const peaks = within(() => peaksOf(checks, mostWork));
  const modes = new KnownModes(
    readMember(checks.request.member, checks.operation === 'transfer-functions' ? 'steady' : 'time'),
  );
  const criteria = checks.criteria.map((criterion, index) =>
    resultOf(criterion, outcomeOf(checks, criterion, `/criteria/${index}`, modes, peaks)),
  );
  const longest = [...peaks.values()].reduce<ChecksAnswer['convergence']>((most, { longest: other }) => {
    return 'modesUsed' in most && (most.modesUsed ?? 0) < other.modesUsed ? other : most;
  }, convergence);
  return {
    verdict: worstOf(criteria.map(({ verdict }) => verdict)),
    criteria,
    convergence: longest,
    notices,
  };
}

function solved(checks: ChecksRequest): Pick<ChecksAnswer, 'convergence' | 'notices'> {
  switch (checks.operation) {
    case 'modes':
      return solveModes(checks.request);
    case 'responses':
      return solveResponses(checks.request);
    case 'transfer-functions':
      return solveTransferFunctions(checks.request);
  }
}

type Peaks = Map<PeakCriterion, { readonly outcome: Outcome; readonly longest: Longest }>;
type Longest = Extract<ChecksAnswer['convergence'], { balance: unknown }>;

function peaksOf(checks: ChecksRequest, mostWork?: number): Peaks {
  if (checks.operation !== 'responses') return new Map();
  const wanted = checks.criteria.filter((one): one is PeakCriterion => one.type === 'peak');
  const { request } = checks;
  return new Map(
    [...settlePeaks(request, wanted, mostWork)].map(([criterion, finding]) => [
      criterion,
      { outcome: peakOutcome(criterion, request, finding), longest: finding.run.answer.convergence },
    ]),
  );
}

function outcomeOf(
  checks: ChecksRequest,
  criterion: Criterion,
  pointer: string,
  modes: KnownModes,
  peaks: Peaks,
): Outcome {
  switch (criterion.type) {
    case 'peak':
      return peaks.get(criterion)!.outcome;
    case 'frequency-range':
      return checkFrequencyRange(criterion, modes);
    case 'separation':
      return checkSeparation(criterion, modes, pointer);
    case 'damping':
      return checkDamping(criterion, modes, listedModes(checks, modes), pointer);
    case 'vortex':
      return checkVortex(criterion, modes, pointer);
    case 'effective-mass': {
      const { request } = checks as Extract<ChecksRequest, { operation: 'modes' }>;
      return checkEffectiveMass(
        criterion,
        modes.member,
        request.participation!.ends,
        listedModes(checks, modes).length,
      );
    }
    case 'transfer':
      return transferOutcome(checks, criterion);
  }
}

/** The modes that a request of modes asks for; none of other requests, which must say which they mean. */
function listedModes(
  checks: ChecksRequest,
  modes: KnownModes,
): NonNullable<ReturnType<KnownModes['mode']>>[] {
  if (checks.operation !== 'modes') return [];
  const { series } = checks.request;
  if ('upTo' in series) {
    // as many as the solve itself lists, rigid-body modes included
    const { upTo } = series;
    const upper = modes
      .upTo(upTo, '/request/series/upTo')
      .filter((mode) => mode.frequency <= upTo * (1 + 8 * Number.EPSILON));
    const first = modes.mode(1);
    return first !== null && first.frequency === 0 ? [first, ...upper] : upper;
  }
  return Array.from({ length: series.modes }, (_, index) => modes.mode(index + 1)).filter(
    (mode) => mode !== null,
  );
}

function transferOutcome(checks: ChecksRequest, criterion: TransferCriterion): Outcome {
  const { request } = checks as Extract<ChecksRequest, { operation: 'transfer-functions' }>;
  return within(() => checkTransfer(criterion, request));
}

/** Faults of a solver point into the request that it was given; here that is a part of the whole. */
function within<Value>(solve: () => Value): Value {
  try {
    return solve();
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    throw new Fault(error.records.map((record) => ({ ...record, pointer: `/request${record.pointer}` })));
  }
}

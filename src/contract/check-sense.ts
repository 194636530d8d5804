import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import { memberFaults, type Regime } from '../members/member-faults.ts';
import { memberLength } from '../members/node-layout.ts';
import type {
  Load,
  Member,
  ModesRequest,
  MovingEnds,
  ResponsesRequest,
  Sample,
  TransferFunctionsRequest,
} from '../spec/types.ts';
import { checkEndMotions } from './check-end-motions.ts';
import { checkInitial } from './check-initial.ts';
import { checkLoad } from './check-loads.ts';
import { type Span, spanOf } from './check-position.ts';
import { checkSample, checkShapesRequest, checkSize } from './check-sample.ts';
import { checkFrequencies, checkInput, checkOutputs } from './check-transfer-functions.ts';
import { soundness, type IsSound } from './soundness.ts';
import { snapAttachments, snapInitialMotion, snapList, snapLoad } from './snap-positions.ts';

/** What is known of the member where only some of its parts are sound. */
interface KnownMember {
  readonly faults: FaultRecord[];
  readonly span: Span | null;
  readonly ends: Member['ends'] | null;
  /** The member itself where it has no fault. */
  readonly member: Member | null;
  /** Moves a position to the node that it means; the identity where the nodes are not known. */
  readonly snap: (at: number) => number;
}

/**
 * Faults beyond the schema: parts of the request that do not fit together, and members that cannot
 * be solved as posed. Only parts without a fault of form are looked at. Positions near a node are
 * set to the node.
 *
 * @param request validated; changed in place
 * @param formFaults what the schema has found
 */
export function checkModesRequest(request: ModesRequest, formFaults: readonly FaultRecord[]): FaultRecord[] {
  const isSound = soundness(formFaults);
  if (!isSound('')) return [];
  const { faults, span, ends, snap } = knownMember(request.member, isSound);
  if (request.shapes !== undefined && isSound('/shapes')) {
    snapList(request.shapes.positions, snap);
    const modes = isSound('/series') && 'modes' in request.series ? request.series.modes : 1;
    faults.push(...checkShapesRequest(request.shapes, modes, span));
  }
  if (request.participation !== undefined && ends !== null && isSound('/participation')) {
    faults.push(...checkParticipation(request.participation.ends, ends));
  }
  return faults;
}

/** The same for a request of responses. */
export function checkResponsesRequest(
  request: ResponsesRequest,
  formFaults: readonly FaultRecord[],
): FaultRecord[] {
  const isSound = soundness(formFaults);
  if (!isSound('')) return [];
  const { faults, span, ends, snap } = knownMember(request.member, isSound);
  if (isSound('/initial')) {
    snapInitialMotion(request.initial, snap);
    faults.push(...checkInitial(request.initial, span, ends));
  }
  if (isSound('/loads')) request.loads.forEach((load) => snapLoad(load, snap));
  faults.push(...checkLoads(request, isSound, span, ends));
  if (isSound('/sample')) {
    snapList(request.sample.positions, snap);
    faults.push(...checkSample(request.sample, span));
  }
  return faults;
}

/** Faults of the loads that have no fault of form, and of a request in which nothing moves. */
function checkLoads(
  { initial, loads, member, sample }: ResponsesRequest,
  isSound: IsSound,
  span: Span | null,
  ends: Member['ends'] | null,
): FaultRecord[] {
  const known = isSound('/initial') && span !== null ? { motion: initial, span } : null;
  const list: readonly (Load | null)[] = !Array.isArray(loads)
    ? []
    : loads.map((load, index) => (isSound(`/loads/${index}`) ? load : null));
  if (isSound('/initial') && isSound('/loads') && loads.length + Object.keys(initial).length === 0) {
    return [faultRecord('nothing-moves', '')];
  }
  const latest = isSound('/sample') ? latestTime(sample) : null;
  const single = list.flatMap((load, index) =>
    load === null ? [] : checkLoad(load, `/loads/${index}`, span, ends, latest),
  );
  const turns = isSound('/member/kind') && member.kind === 'shaft';
  return [...single, ...checkEndMotions(list, ends, known, turns ? 'rad' : 'm')];
}

function latestTime({ times, gaugeTime }: Sample): number {
  return (
    (Array.isArray(times) ? times.reduce((late, time) => Math.max(late, time), 0) : times.end) + gaugeTime
  );
}

/** The same for a request of transfer functions. */
export function checkTransferFunctionsRequest(
  request: TransferFunctionsRequest,
  formFaults: readonly FaultRecord[],
): FaultRecord[] {
  const isSound = soundness(formFaults);
  if (!isSound('')) return [];
  const { faults, span, ends, member, snap } = knownMember(request.member, isSound, 'steady');
  const { input, outputs, frequencies } = request;
  if (isSound('/input')) {
    if (input.type === 'point-force') input.at = snap(input.at);
    faults.push(...checkInput(input, span, ends));
  }
  if (isSound('/outputs')) {
    for (const output of outputs) output.at = snap(output.at);
    faults.push(...checkOutputs(outputs, span, member));
  }
  if (isSound('/frequencies')) {
    faults.push(...checkFrequencies(frequencies, isSound('/input') ? input : null));
    if (isSound('/outputs')) {
      const count = Array.isArray(frequencies) ? frequencies.length : frequencies.count;
      faults.push(...checkSize({ outputs: outputs.length, frequencies: count }, '/frequencies'));
    }
  }
  return faults;
}

/** A support that moves must be a fixed end; where the whole member moves, none may be. */
function checkParticipation(moving: MovingEnds, { near, far }: Member['ends']): FaultRecord[] {
  const held = near.type === 'fixed' ? 'near' : far.type === 'fixed' ? 'far' : null;
  if (moving === 'uniform') {
    return held === null ? [] : [faultRecord('uniform-motion-held', '/participation/ends', { end: held })];
  }
  const wanted = moving === 'both' ? (['near', 'far'] as const) : [moving];
  const end = wanted.find((name) => (name === 'near' ? near : far).type !== 'fixed');
  if (end === undefined) return [];
  return [faultRecord('moving-end-not-fixed', '/participation/ends', { end, ends: moving })];
}

function knownMember(member: Member, isSound: IsSound, regime: Regime = 'time'): KnownMember {
  const faults = isSound('/member') ? memberFaults(member, regime) : [];
  const solvable = isSound('/member') && faults.length === 0;
  // Without a kind the schema has not looked at the other keys.
  const kindKnown = isSound('/member/kind');
  return {
    faults,
    span: kindKnown && isSound('/member/segments') ? spanOf(memberLength(member)) : null,
    ends: kindKnown && isSound('/member/ends') ? member.ends : null,
    member: solvable ? member : null,
    snap: solvable ? snapAttachments(member) : (at) => at,
  };
}

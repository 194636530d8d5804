import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import { memberFaults } from '../members/member-faults.ts';
import { memberLength } from '../members/node-layout.ts';
import type { Member, ModesRequest, MovingEnds, ResponsesRequest } from '../spec/types.ts';
import { checkInitial } from './check-initial.ts';
import { type Span, spanOf } from './check-position.ts';
import { checkSample, checkShapesRequest } from './check-sample.ts';
import { isWithin } from './pointer.ts';
import { snapAttachments, snapInitialMotion, snapList } from './snap-positions.ts';

/** Whether a part of the request, named by its pointer, is there and has no fault of form. */
type IsSound = (part: string) => boolean;

/** What is known of the member where only some of its parts are sound. */
interface KnownMember {
  readonly faults: FaultRecord[];
  readonly span: Span | null;
  readonly ends: Member['ends'] | null;
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
  if (isSound('/sample')) {
    snapList(request.sample.positions, snap);
    faults.push(...checkSample(request.sample, span));
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

function soundness(formFaults: readonly FaultRecord[]): IsSound {
  const faulty = formFaults.map(({ pointer }) => pointer);
  if (faulty.includes('')) return () => false;
  return (part) =>
    part === '' || faulty.every((pointer) => !isWithin(pointer, part) && !isWithin(part, pointer));
}

function knownMember(member: Member, isSound: IsSound): KnownMember {
  const faults = isSound('/member') ? memberFaults(member) : [];
  const solvable = isSound('/member') && faults.length === 0;
  // Without a kind the schema has not looked at the other keys.
  const kindKnown = isSound('/member/kind');
  return {
    faults,
    span: kindKnown && isSound('/member/segments') ? spanOf(memberLength(member)) : null,
    ends: kindKnown && isSound('/member/ends') ? member.ends : null,
    snap: solvable ? snapAttachments(member) : (at) => at,
  };
}

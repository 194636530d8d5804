import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import type { Member } from '../spec/types.ts';
import { attachmentLumps, endLump } from './lump.ts';
import { memberSegments } from './member-segments.ts';
import { modalDrag } from './modal-damping.ts';
import { memberLength, samePlace } from './node-layout.ts';
import type { SegmentProperties } from './segment-properties.ts';

/** Stiffness and inertia must stay within these limits, so that their products stay finite. */
const smallest = 1e-90;
const largest = 1e90;

/** A segment shorter than this part of the member has no place of its own in double precision. */
const shortest = 1e-12;

/** How the member moves: in time, free or loaded, or in a steady state at one frequency after another. */
export type Regime = 'time' | 'steady';

/**
 * Everything about a valid member that cannot be solved as posed, with pointers into the request.
 *
 * @param regime a loss factor describes steady motion only
 * @returns the faults, none where `readMember` succeeds; cost O(segments + attachments)
 */
export function memberFaults(member: Member, regime: Regime = 'time'): FaultRecord[] {
  const wrongSections = sectionFaults(member);
  const misplaced = [...lengthFaults(member), ...attachmentFaults(member)];
  if (wrongSections.length > 0) return [...wrongSections, ...misplaced];
  const segments = memberSegments(member);
  return [
    ...magnitudeFaults(segments),
    ...misplaced,
    ...inertiaFaults(member, segments),
    ...dampingFaults(member, segments, regime),
  ];
}

function sectionFaults(member: Member): FaultRecord[] {
  if (member.kind !== 'shaft') return [];
  return member.segments.flatMap((segment, index) =>
    'outerDiameter' in segment && segment.innerDiameter >= segment.outerDiameter
      ? [
          faultRecord('inner-diameter-too-large', `/member/segments/${index}/innerDiameter`, {
            inner: segment.innerDiameter,
            outer: segment.outerDiameter,
          }),
        ]
      : [],
  );
}

function magnitudeFaults(segments: readonly SegmentProperties[]): FaultRecord[] {
  return segments.flatMap(({ stiffness, inertia, stressFactor }, index) => {
    const named = { stiffness, 'inertia per length': inertia, 'stress per unit of force': stressFactor };
    return Object.entries(named)
      .filter(([, value]) => value !== 0 && !(value >= smallest && value <= largest))
      .map(([name, value]) => faultRecord('section-magnitude', `/member/segments/${index}`, { name, value }));
  });
}

function lengthFaults(member: Member): FaultRecord[] {
  const total = memberLength(member);
  return member.segments.flatMap(({ length }, index) =>
    length < shortest * total
      ? [faultRecord('segment-too-short', `/member/segments/${index}/length`, { length, total, shortest })]
      : [],
  );
}

function attachmentFaults(member: Member): FaultRecord[] {
  const length = memberLength(member);
  const attachments: readonly { at: number }[] = member.attachments;
  return attachments.flatMap(({ at }, index) => {
    const pointer = `/member/attachments/${index}/at`;
    if (at > (1 + samePlace) * length) return [faultRecord('attachment-outside', pointer, { at, length })];
    if (at >= (1 - samePlace) * length)
      return [faultRecord('attachment-at-end', pointer, { at, end: 'far' })];
    if (at <= samePlace * length) return [faultRecord('attachment-at-end', pointer, { at, end: 'near' })];
    return [];
  });
}

function inertiaFaults(member: Member, segments: readonly SegmentProperties[]): FaultRecord[] {
  const faults = segments.flatMap(({ inertia, drag }, index) =>
    inertia === 0 && drag > 0
      ? [faultRecord('drag-without-inertia', `/member/segments/${index}/drag`, { drag })]
      : [],
  );
  const movable = segments.some(({ inertia }) => inertia > 0) || hasNodeMass(member);
  return movable ? faults : [...faults, faultRecord('no-inertia', '/member')];
}

function dampingFaults(
  member: Member,
  segments: readonly SegmentProperties[],
  regime: Regime,
): FaultRecord[] {
  const faults: FaultRecord[] = [];
  const { near, far } = member.ends;
  const dashpots = [
    { pointer: '/member/ends/near/dashpot', value: endLump(near).dashpot },
    { pointer: '/member/ends/far/dashpot', value: endLump(far).dashpot },
    ...attachmentLumps(member).map(({ dashpot }, index) => ({
      pointer: `/member/attachments/${index}/dashpot`,
      value: dashpot,
    })),
  ].filter(({ value }) => value > 0);
  for (const { pointer, value } of dashpots)
    faults.push(faultRecord('dashpot-unsupported', pointer, { value }));

  const withInertia = segments.filter(({ inertia }) => inertia > 0);
  const coupling = modalDrag(withInertia, hasNodeMass(member)) === null;
  if (coupling) {
    const index = segments.findIndex(({ drag }) => drag > 0);
    faults.push(faultRecord('drag-not-modal', `/member/segments/${index}/drag`));
  }

  const { damping } = member;
  if (damping?.type === 'loss-factor') {
    if (regime === 'time') {
      faults.push(faultRecord('loss-factor-in-time', '/member/damping', { half: damping.value / 2 }));
    }
  } else if (damping !== undefined && (dashpots.length > 0 || coupling)) {
    faults.push(faultRecord('damping-mixed', '/member/damping', { type: damping.type }));
  }
  return faults;
}

/** Whether any node that can move carries a mass. */
export function hasNodeMass(member: Member): boolean {
  const { near, far } = member.ends;
  return [endLump(near), endLump(far), ...attachmentLumps(member)].some(({ mass }) => mass > 0);
}

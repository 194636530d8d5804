import { Fault } from '../faults/fault.ts';
import type { Member } from '../spec/types.ts';
import { attachmentLumps, endLump } from './lump.ts';
import { hasNodeMass, memberFaults, type Regime } from './member-faults.ts';
import { memberSegments } from './member-segments.ts';
import { modalDamping, modalDrag } from './modal-damping.ts';
import { layOutNodes } from './node-layout.ts';
import type { SegmentProperties } from './segment-properties.ts';
import type { WaveMember } from './wave-member.ts';

/**
 * The member in the terms of the wave equation, split into segments at its attachments.
 *
 * Lumps at one node add up. A segment that is split keeps its properties on both sides.
 *
 * @param member canonical member (SI, defaults filled in)
 * @param regime in a steady state a loss factor is taken too; it is not part of the result, see `lossFactor`
 * @returns see `WaveMember`; cost O(n log n) in segments and attachments
 * @throws Fault with every record of `memberFaults`
 */
export function readMember(member: Member, regime: Regime = 'time'): WaveMember {
  const faults = memberFaults(member, regime);
  if (faults.length > 0) throw new Fault(faults);

  const segments = memberSegments(member);
  const lumps = attachmentLumps(member);
  const { position, origin, attachmentNode } = layOutNodes(member);
  const perSegment = (key: keyof SegmentProperties): Float64Array =>
    Float64Array.from(origin, (index) => segments[index][key]);

  const mass = new Float64Array(position.length);
  const spring = new Float64Array(position.length);
  lumps.forEach((lump, index) => {
    mass[attachmentNode[index]] += lump.mass;
    spring[attachmentNode[index]] += lump.spring;
  });
  const last = origin.length;
  const { near, far } = member.ends;
  mass[0] = endLump(near).mass;
  mass[last] = endLump(far).mass;
  spring[0] = endLump(near).spring;
  spring[last] = endLump(far).spring;

  return {
    kind: member.kind,
    segmentCount: last,
    length: splitLengths(position, origin, segments),
    stiffness: perSegment('stiffness'),
    inertia: perSegment('inertia'),
    foundation: perSegment('foundation'),
    stressFactor: perSegment('stressFactor'),
    origin,
    position,
    mass,
    spring,
    nearFixed: near.type === 'fixed',
    farFixed: far.type === 'fixed',
    attachmentNode,
    attachmentSpring: Float64Array.from(lumps, (lump) => lump.spring),
    damping: modalDamping(member, modalDrag(segments, hasNodeMass(member)) ?? 0),
  };
}

/** Lengths in m: that of the request for a whole segment, a difference of positions for a split one. */
function splitLengths(
  position: Float64Array,
  origin: Int32Array,
  segments: readonly SegmentProperties[],
): Float64Array {
  return Float64Array.from(origin, (from, index) => {
    const whole = origin[index - 1] !== from && origin[index + 1] !== from;
    return whole ? segments[from].length : position[index + 1] - position[index];
  });
}

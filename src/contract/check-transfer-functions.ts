import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import { memberSegments } from '../members/member-segments.ts';
import { layOutNodes } from '../members/node-layout.ts';
import { SECTION_REMEDY } from '../modes/stress-factors.ts';
import type { Frequencies, Member, TransferInput, TransferOutput } from '../spec/types.ts';
import { checkMovedEnds } from './check-end-motions.ts';
import { checkForcePosition } from './check-loads.ts';
import { checkPosition, type Span } from './check-position.ts';

/** What in the input of a transfer function does not fit to the member. */
export function checkInput(
  input: TransferInput,
  span: Span | null,
  ends: Member['ends'] | null,
): FaultRecord[] {
  switch (input.type) {
    case 'point-force':
      return checkForcePosition(input.at, '/input/at', span, ends);
    case 'end-motion':
      return checkMovedEnds(input.end, '/input/end', ends);
    case 'outcrop-motion': {
      const type = ends?.[input.end].type ?? 'fixed';
      return type === 'fixed'
        ? []
        : [faultRecord('outcrop-end-not-fixed', '/input/end', { end: input.end, type })];
    }
  }
}

/**
 * What in the outputs does not fit to the member.
 *
 * @param member the member where it has no fault, else null
 */
export function checkOutputs(
  outputs: readonly TransferOutput[],
  span: Span | null,
  member: Member | null,
): FaultRecord[] {
  const outside = outputs.flatMap(({ at }, index) => checkPosition(at, `/outputs/${index}/at`, span));
  if (outside.length > 0 || member === null) return outside;
  const { position, origin } = layOutNodes(member);
  const segments = memberSegments(member);
  return outputs.flatMap(({ at, quantity }, index) => {
    if (quantity !== 'stress') return [];
    // The near side of a node, the far side at x = 0.
    const node = position.findIndex((place) => place >= at);
    const segment = origin[Math.max(0, node - 1)];
    if (segments[segment].stressFactor > 0) return [];
    const remedy = SECTION_REMEDY[member.kind];
    return [faultRecord('stress-without-section', `/outputs/${index}/quantity`, { at, segment, remedy })];
  });
}

/**
 * What in the frequencies does not fit together or not to the input.
 *
 * @param input the input where it has no fault of form, else null
 */
export function checkFrequencies(frequencies: Frequencies, input: TransferInput | null): FaultRecord[] {
  const accelerated = input !== null && 'quantity' in input && input.quantity === 'acceleration';
  if (Array.isArray(frequencies)) {
    const stray = frequencies.findIndex((value, index) => index > 0 && !(value > frequencies[index - 1]));
    if (stray > 0) {
      const values = { frequency: frequencies[stray], before: frequencies[stray - 1] };
      return [faultRecord('frequencies-not-ascending', `/frequencies/${stray}`, values)];
    }
    const still = accelerated && frequencies[0] === 0;
    return still ? [faultRecord('acceleration-at-zero-frequency', '/frequencies/0')] : [];
  }
  const { from, to, spacing } = frequencies;
  if (from >= to) return [faultRecord('frequency-span-empty', '/frequencies/to', { from, to })];
  if (from > 0) return [];
  if (spacing === 'logarithmic') return [faultRecord('logarithm-from-zero', '/frequencies/from')];
  return accelerated ? [faultRecord('acceleration-at-zero-frequency', '/frequencies/from')] : [];
}

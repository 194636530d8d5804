import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import type { Member, PullShape, Shape } from '../spec/types.ts';
import { checkPosition, endAt, type Span } from './check-position.ts';

/**
 * What in a shape does not fit together or not to the member.
 *
 * @param pointer where the shape stands
 * @param span extent of the member, where it is known
 * @param ends ends of the member, where they are known
 * @param forceFault what it means that a pull is given by its force; null where it may be
 */
export function checkShape(
  shape: Shape,
  pointer: string,
  span: Span | null,
  ends: Member['ends'] | null,
  forceFault: 'force-in-velocity' | 'force-in-profile' | null,
): FaultRecord[] {
  switch (shape.type) {
    case 'pull':
      return checkPull(shape, pointer, span, ends, forceFault);
    case 'half-sine':
      return [];
    case 'polyline':
      return checkPolyline(shape.positions, shape.values, pointer, span);
    case 'polynomial':
    case 'uniform':
      return checkStretch(shape.from, shape.to, pointer, span);
  }
}

function checkPull(
  shape: PullShape,
  pointer: string,
  span: Span | null,
  ends: Member['ends'] | null,
  forceFault: 'force-in-velocity' | 'force-in-profile' | null,
): FaultRecord[] {
  const { at } = shape;
  const faults = checkPosition(at, `${pointer}/at`, span);
  if (forceFault !== null && 'force' in shape)
    faults.push(faultRecord(forceFault, `${pointer}/force`, { at }));
  const end = endAt(at, span);
  if (end !== null && ends?.[end].type === 'fixed') {
    faults.push(faultRecord('pull-at-fixed-end', `${pointer}/at`, { at }));
  }
  return faults;
}

function checkPolyline(
  positions: readonly number[],
  values: readonly number[],
  pointer: string,
  span: Span | null,
): FaultRecord[] {
  const faults: FaultRecord[] = [];
  if (positions.length !== values.length) {
    const counts = { positions: positions.length, values: values.length };
    faults.push(faultRecord('lengths-differ', `${pointer}/values`, counts));
  }
  const stray = positions.findIndex((at, index) => index > 0 && !(at > positions[index - 1]));
  if (stray > 0) {
    const place = { at: positions[stray], before: positions[stray - 1] };
    faults.push(faultRecord('positions-not-ascending', `${pointer}/positions/${stray}`, place));
  }
  const outside = positions.findIndex((at) => span !== null && at > span.limit);
  if (outside >= 0)
    faults.push(...checkPosition(positions[outside], `${pointer}/positions/${outside}`, span));
  return faults;
}

function checkStretch(
  from: number,
  to: number | undefined,
  pointer: string,
  span: Span | null,
): FaultRecord[] {
  const end = to ?? span?.length;
  const outside = [
    ...checkPosition(from, `${pointer}/from`, span),
    ...(to === undefined ? [] : checkPosition(to, `${pointer}/to`, span)),
  ];
  if (outside.length > 0 || end === undefined || from < end) return outside;
  return [faultRecord('stretch-empty', `${pointer}/${to === undefined ? 'from' : 'to'}`, { from, to: end })];
}

import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import type { InitialMotion, Member, Shape, Shapes } from '../spec/types.ts';
import { checkPosition, type Span } from './check-position.ts';

/**
 * What in an initial motion does not fit together or not to the member.
 *
 * @param span extent of the member, where it is known
 * @param ends ends of the member, where they are known
 */
export function checkInitial(
  initial: InitialMotion,
  span: Span | null,
  ends: Member['ends'] | null,
): FaultRecord[] {
  const faults: FaultRecord[] = [];
  for (const field of ['displacement', 'velocity'] as const) {
    for (const { shape, pointer } of placed(initial[field], `/initial/${field}`)) {
      faults.push(...checkShape(shape, pointer, span));
      if (shape.type !== 'pull') continue;
      if (field === 'velocity' && 'force' in shape) {
        faults.push(faultRecord('force-in-velocity', `${pointer}/force`, { at: shape.at }));
      }
      if (span === null || ends === null) continue;
      const end = shape.at === 0 ? 'near' : shape.at === span.length ? 'far' : null;
      if (end !== null && ends[end].type === 'fixed') {
        faults.push(faultRecord('pull-at-fixed-end', `${pointer}/at`, { at: shape.at }));
      }
    }
  }
  return [...faults, ...checkMassVelocities(initial, span), ...checkImpulses(initial, span)];
}

/** Shapes with their pointers, whether there is one or a list. */
function placed(shapes: Shapes | undefined, pointer: string): { shape: Shape; pointer: string }[] {
  if (shapes === undefined) return [];
  if (!Array.isArray(shapes)) return [{ shape: shapes, pointer }];
  return shapes.map((shape, index) => ({ shape, pointer: `${pointer}/${index}` }));
}

function checkShape(shape: Shape, pointer: string, span: Span | null): FaultRecord[] {
  switch (shape.type) {
    case 'pull':
      return checkPosition(shape.at, `${pointer}/at`, span);
    case 'half-sine':
      return [];
    case 'polyline':
      return checkPolyline(shape.positions, shape.values, pointer, span);
    case 'polynomial':
    case 'uniform':
      return checkStretch(shape.from, shape.to, pointer, span);
  }
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

function checkMassVelocities({ massVelocities = [] }: InitialMotion, span: Span | null): FaultRecord[] {
  const seen = new Set<number>();
  return massVelocities.flatMap(({ at }, index) => {
    const pointer = `/initial/massVelocities/${index}/at`;
    if (seen.has(at)) return [faultRecord('repeated-mass-velocity', pointer, { at })];
    seen.add(at);
    return checkPosition(at, pointer, span);
  });
}

function checkImpulses({ impulses = [] }: InitialMotion, span: Span | null): FaultRecord[] {
  return impulses.flatMap(({ at, width }, index) => {
    const pointer = `/initial/impulses/${index}`;
    const outside = checkPosition(at, `${pointer}/at`, span);
    if (outside.length > 0 || width === undefined || span === null) return outside;
    const { length, limit } = span;
    if (at - width / 2 >= length - limit && at + width / 2 <= limit) return [];
    return [faultRecord('width-outside', `${pointer}/width`, { at, width, length })];
  });
}

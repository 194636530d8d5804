import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import type { InitialMotion, Member, Shape, Shapes } from '../spec/types.ts';
import { checkPosition, type Span } from './check-position.ts';
import { checkShape } from './check-shape.ts';

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
  const faults = (['displacement', 'velocity'] as const).flatMap((field) => {
    const forceFault = field === 'velocity' ? 'force-in-velocity' : null;
    return placed(initial[field], `/initial/${field}`).flatMap(({ shape, pointer }) =>
      checkShape(shape, pointer, span, ends, forceFault),
    );
  });
  return [...faults, ...checkMassVelocities(initial, span), ...checkImpulses(initial, span)];
}

/** Shapes with their pointers, whether there is one or a list. */
function placed(shapes: Shapes | undefined, pointer: string): { shape: Shape; pointer: string }[] {
  if (shapes === undefined) return [];
  if (!Array.isArray(shapes)) return [{ shape: shapes, pointer }];
  return shapes.map((shape, index) => ({ shape, pointer: `${pointer}/${index}` }));
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

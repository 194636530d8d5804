import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import type { EndMotion, InitialMotion, Load, Member, SupportEnds } from '../spec/types.ts';
import type { Span } from './check-position.ts';
import { disagrees, firstValue, initialValue, jumpOf, nothing } from './end-displacement.ts';

type EndName = 'near' | 'far';

/**
 * What in the motions of supports does not fit together, to the member or to the initial motion.
 *
 * @param loads loads of the request; null for one that has a fault of form
 * @param ends ends of the member, where they are known
 * @param initial initial motion, where it and the extent of the member are known
 * @param unit unit of a displacement
 */
export function checkEndMotions(
  loads: readonly (Load | null)[],
  ends: Member['ends'] | null,
  initial: { readonly motion: InitialMotion; readonly span: Span } | null,
  unit: string,
): FaultRecord[] {
  const mover: Partial<Record<EndName, number>> = {};
  return loads.flatMap((load, index) => {
    if (load?.type !== 'end-motion') return [];
    const pointer = `/loads/${index}`;
    const faults = checkMovedEnds(load.end, `${pointer}/end`, ends);
    for (const end of endsOf(load.end)) {
      const other = mover[end];
      if (other !== undefined) faults.push(faultRecord('end-motion-twice', `${pointer}/end`, { end, other }));
      else mover[end] = index;
    }
    if (faults.length > 0) return faults;
    return endsOf(load.end)
      .flatMap((end) => checkStart(load, end, `${pointer}/history`, initial, unit))
      .slice(0, 1);
  });
}

/** A support that moves must be a fixed end. */
export function checkMovedEnds(
  moved: SupportEnds,
  pointer: string,
  ends: Member['ends'] | null,
): FaultRecord[] {
  if (ends === null) return [];
  const end = endsOf(moved).find((name) => ends[name].type !== 'fixed');
  return end === undefined
    ? []
    : [faultRecord('end-motion-not-fixed', pointer, { end, type: ends[end].type })];
}

function endsOf(moved: SupportEnds): readonly EndName[] {
  return moved === 'both' ? ['near', 'far'] : [moved];
}

/** An end displacement is continuous and begins at the initial displacement of the member there. */
function checkStart(
  { quantity, history }: EndMotion,
  end: EndName,
  pointer: string,
  initial: { readonly motion: InitialMotion; readonly span: Span } | null,
  unit: string,
): FaultRecord[] {
  const given = initial === null ? nothing : initialValue(initial.motion, initial.span, end);
  if (quantity === 'displacement') {
    const jump = jumpOf(history, given);
    if (jump !== null) {
      const values = { end, unit, time: history.start, jump: shown(jump.jump), remedy: jump.remedy };
      return [faultRecord('end-displacement-jumps', pointer, values)];
    }
  }
  const first = quantity === 'displacement' ? firstValue(history) : nothing;
  if (initial === null || !disagrees(first, given)) return [];
  const values = { end, unit, first: shown(first.value), initial: shown(given.value) };
  return [faultRecord('end-displacement-disagrees', pointer, values)];
}

/** A value without the last digit of double precision, which a sum leaves behind. */
function shown(value: number): number {
  return Number(value.toPrecision(15));
}

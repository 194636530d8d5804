import type { FaultRecord } from '../faults/fault.ts';

/** Whether a part of the request, named by its pointer, is there and has no fault of form. */
export type IsSound = (part: string) => boolean;

/**
 * Which parts of a request have no fault of form in them, nor around them.
 *
 * Cost: O(faults) once, O(depth) a question.
 */
export function soundness(formFaults: readonly FaultRecord[]): IsSound {
  const faulty = new Set(formFaults.map(({ pointer }) => pointer));
  if (faulty.has('')) return () => false;
  const around = new Set<string>();
  for (const pointer of faulty) for (const part of partsAround(pointer)) around.add(part);
  return (part) =>
    part === '' || (!around.has(part) && partsAround(part).every((outer) => !faulty.has(outer)));
}

/** A pointer and all that lead to a part around it, the whole request left out. */
function partsAround(pointer: string): string[] {
  const parts: string[] = [];
  for (let end = pointer.length; end > 0; end = pointer.lastIndexOf('/', end - 1)) {
    parts.push(pointer.slice(0, end));
  }
  return parts;
}

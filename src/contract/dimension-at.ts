import type { Load, Member } from '../spec/types.ts';
import { type Dimension, dimensions, plainNumber } from './dimensions.ts';

/** Dimensions that depend on what the member carries: [any other member, shaft]. */
const byKind = {
  displacement: [dimensions.length, dimensions.angle],
  velocity: [dimensions.speed, dimensions.angularVelocity],
  acceleration: [dimensions.acceleration, dimensions.angularAcceleration],
  flux: [dimensions.force, dimensions.torque],
  fluxPerLength: [dimensions.forcePerLength, dimensions.torquePerLength],
  impulse: [dimensions.impulse, dimensions.angularImpulse],
  impedance: [dimensions.impedance, dimensions.torsionalImpedance],
} as const;

/**
 * Everything that `x-dimension` may say. `shape` is the dimension of the field that the shape
 * describes, `history` that of the load whose history it is.
 */
export type DimensionName = keyof typeof dimensions | keyof typeof byKind | 'shape' | 'history';

export function isDimensionName(name: string): name is DimensionName {
  return (
    name === 'shape' || name === 'history' || Object.hasOwn(byKind, name) || Object.hasOwn(dimensions, name)
  );
}

/** What of a request decides on the dimensions in it. */
export interface DimensionContext {
  /** Kind of the member; a kind that is not known counts as a cable. */
  readonly kind: Member['kind'];
  /** The request as far as it has been read; anything. */
  readonly document: unknown;
}

/**
 * The dimension of a quantity at its place in a request.
 *
 * @param name what `x-dimension` says
 * @param pointer where the quantity stands
 */
export function dimensionAt(name: DimensionName, context: DimensionContext, pointer: string): Dimension {
  if (name === 'shape') return dimensionAt(shapeField(pointer), context, pointer);
  if (name === 'history') {
    const measured = historyField(context.document, pointer) ?? 'displacement';
    return measured === 'factor' ? plainNumber : dimensionAt(measured, context, pointer);
  }
  if (Object.hasOwn(byKind, name)) {
    return byKind[name as keyof typeof byKind][context.kind === 'shaft' ? 1 : 0];
  }
  return dimensions[name as keyof typeof dimensions];
}

function shapeField(pointer: string): 'displacement' | 'velocity' | 'fluxPerLength' {
  if (pointer.startsWith('/loads/')) return 'fluxPerLength';
  return pointer.startsWith('/initial/velocity') ? 'velocity' : 'displacement';
}

/**
 * What the history of a load measures; `factor` is a plain number.
 *
 * @param pointer leads into the load
 * @returns null where the load does not say it
 */
function historyField(
  document: unknown,
  pointer: string,
): 'flux' | 'factor' | 'acceleration' | 'displacement' | null {
  const index = Number(pointer.split('/')[2]);
  const load = (document as { loads?: Partial<Load>[] }).loads?.[index];
  switch (load?.type) {
    case 'point-force':
      return 'flux';
    case 'distributed-force':
      return 'factor';
    case 'body-force':
      return 'acceleration';
    case 'end-motion':
      return load.quantity === 'displacement' || load.quantity === 'acceleration' ? load.quantity : null;
    case 'moving-force':
    case undefined:
      return null;
  }
}

/** Whether a dimension at this place follows from the request, the kind of its member aside. */
export function isHistoryKnown(document: unknown, pointer: string): boolean {
  return !/^\/loads\/\d+\/history\//.test(pointer) || historyField(document, pointer) !== null;
}

import type { Load, Member, PeakCriterion, Quantity, TransferFunctionsRequest } from '../spec/types.ts';
import { type Dimension, dimensions, plainNumber, quotient } from './dimensions.ts';

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
 * describes, `history` that of the load whose history it is, `peak` that of the quantity of a
 * criterion, `transfer` that of an output over the input.
 */
export type DimensionName =
  keyof typeof dimensions | keyof typeof byKind | 'shape' | 'history' | 'peak' | 'transfer';

export function isDimensionName(name: string): name is DimensionName {
  return (
    ['shape', 'history', 'peak', 'transfer'].includes(name) ||
    Object.hasOwn(byKind, name) ||
    Object.hasOwn(dimensions, name)
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
  if (name === 'peak') {
    return dimensionAt(
      nameOfQuantity[peakQuantity(context.document, pointer) ?? 'displacement'],
      context,
      '',
    );
  }
  if (name === 'transfer') {
    const [output, input] = transferQuantities(context.document, pointer) ?? ['displacement', 'displacement'];
    return quotient(dimensionAt(output, context, ''), dimensionAt(input, context, ''));
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

const nameOfQuantity = {
  displacement: 'displacement',
  relativeDisplacement: 'displacement',
  velocity: 'velocity',
  acceleration: 'acceleration',
  force: 'flux',
  stress: 'modulus',
} as const satisfies Readonly<Record<Quantity, DimensionName>>;

function criterionAt(document: unknown, pointer: string): { quantity?: unknown; output?: unknown } | null {
  const index = Number(pointer.split('/')[2]);
  return (document as { criteria?: PeakCriterion[] } | null)?.criteria?.[index] ?? null;
}

function quantityOf(value: unknown): Quantity | null {
  return typeof value === 'string' && Object.hasOwn(nameOfQuantity, value) ? (value as Quantity) : null;
}

/** The quantity that a criterion of peaks names; null where it names none. */
function peakQuantity(document: unknown, pointer: string): Quantity | null {
  return quantityOf(criterionAt(document, pointer)?.quantity);
}

/** What a criterion of transfer functions divides by what; null where the request does not say it. */
function transferQuantities(document: unknown, pointer: string): [DimensionName, DimensionName] | null {
  const request = (document as { request?: Partial<TransferFunctionsRequest> } | null)?.request;
  const index = Number(criterionAt(document, pointer)?.output ?? 0);
  const output = quantityOf(request?.outputs?.[index]?.quantity);
  const input = request?.input as { type?: unknown; quantity?: unknown } | undefined;
  const moved = quantityOf(input?.quantity);
  const driver = input?.type === 'point-force' ? 'flux' : moved === null ? null : nameOfQuantity[moved];
  return output === null || driver === null ? null : [nameOfQuantity[output], driver];
}

/** Whether a dimension at this place follows from the request, the kind of its member aside. */
export function isDimensionKnown(document: unknown, pointer: string): boolean {
  if (/^\/loads\/\d+\/history\//.test(pointer)) return historyField(document, pointer) !== null;
  if (!/^\/criteria\/\d+\/limit$/.test(pointer)) return true;
  return peakQuantity(document, pointer) !== null || transferQuantities(document, pointer) !== null;
}

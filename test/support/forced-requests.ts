import type {
  Damping,
  History,
  Load,
  Quantity,
  ResponsesAnswer,
  ResponsesRequest,
  TransferFunctionsRequest,
  TransferInput,
} from '../../src/spec/types.ts';
import type { PlainMember } from './plain-member.ts';
import type { ReferenceEntry } from './reference.ts';
import { requestMember, responsesRequest } from './requests.ts';

/** A uniform member fixed at its near end, the far end fixed or free. */
export function uniformMember(
  length: number,
  stiffness: number,
  inertia: number,
  farFixed: boolean,
): PlainMember {
  return {
    segments: [{ length, stiffness, inertia, foundation: 0 }],
    masses: [0, 0],
    springs: [0, 0],
    nearFixed: true,
    farFixed,
  };
}

/** The string of an entry that gives L, T and rho. */
export function entryString(entry: ReferenceEntry): PlainMember {
  const { L, T, rho } = entry.inputs;
  return uniformMember(L, T, rho, true);
}

/** The member with the same drag in every segment, N·s/m². */
export function withDrag(request: ResponsesRequest, drag: number): ResponsesRequest {
  const { member } = request;
  return {
    ...request,
    member: {
      ...member,
      segments: member.segments.map((segment) => ({ ...segment, drag })),
    } as ResponsesRequest['member'],
  };
}

/** What a loaded motion is asked for at points (x, t). */
export interface LoadedCase {
  readonly member: PlainMember;
  readonly damping?: Damping;
  readonly loads: Load[];
  readonly points: readonly (readonly [number, number])[];
  readonly modes: number;
  readonly quantities?: Quantity[];
}

/** A request sampled at all positions and times of the points. */
export function loadedRequest(given: LoadedCase): ResponsesRequest {
  const sorted = (values: number[]): number[] => [...new Set(values)].toSorted((a, b) => a - b);
  return {
    ...responsesRequest({
      member: given.member,
      ...(given.damping && { damping: given.damping }),
      initial: {},
      modes: given.modes,
      positions: sorted(given.points.map(([x]) => x)),
      times: sorted(given.points.map(([, t]) => t)),
      quantities: given.quantities ?? ['displacement'],
    }),
    loads: given.loads,
  };
}

/** Value and bound of a quantity at (x, t). */
export function sampledAt(
  answer: ResponsesAnswer,
  quantity: Quantity,
  x: number,
  t: number,
): { value: number; bound: number } {
  const field = answer.fields[quantity]!;
  const column = Array.from(answer.fields.positions).indexOf(x);
  const row = Array.from(answer.fields.times as ArrayLike<number>).indexOf(t);
  return { value: field.values[row][column], bound: field.bound?.[column] ?? Number.NaN };
}

/** A transfer function request at circular frequencies, rad/s. */
export function transferRequest(
  member: PlainMember,
  damping: Damping | undefined,
  input: TransferInput,
  positions: readonly number[],
  omegas: readonly number[],
  modes?: number,
): TransferFunctionsRequest {
  return {
    member: requestMember(member, damping),
    input,
    outputs: positions.map((at) => ({ at, quantity: 'displacement' as const })),
    frequencies: omegas.map((omega) => omega / (2 * Math.PI)),
    refine: false,
    ...(modes !== undefined && { series: { modes } }),
  };
}

/** The history of an entry's transient load. */
export function entryHistory(load: { type: string; P: number; td?: number; tr?: number }): History {
  switch (load.type) {
    case 'step':
      return { type: 'step', amplitude: load.P, start: 0 };
    case 'half-sine':
      return { type: 'half-sine-pulse', amplitude: load.P, start: 0, duration: load.td! };
    case 'ramp':
      return { type: 'ramp', amplitude: load.P, start: 0, duration: load.tr! };
    default:
      throw new Error(`no history for ${load.type}`);
  }
}

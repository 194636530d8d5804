import type { FaultRecord } from '../faults/fault.ts';

/**
 * What crosses the thread boundary on the way to a worker: a request that was read already, or the
 * bytes of a body that is too large to be read on the event loop, in a buffer of their own, which is
 * moved. `ready` asks only for a sign of life.
 */
export type SolveTask =
  | { readonly kind: 'request'; readonly operation: string; readonly request: unknown }
  | { readonly kind: 'body'; readonly operation: string; readonly body: Uint8Array<ArrayBuffer> }
  | { readonly kind: 'ready' };

/**
 * What crosses it on the way back. Plain records, because structured clone drops the own fields
 * and the subclass of an Error.
 */
export type SolveResult =
  | { readonly kind: 'answer'; readonly bytes: Uint8Array<ArrayBuffer>; readonly seconds: number }
  | { readonly kind: 'faults'; readonly records: readonly FaultRecord[] }
  | { readonly kind: 'error'; readonly memory: boolean; readonly stack: string }
  | { readonly kind: 'ready' };

/** One operation of the service, as a worker runs it. */
export interface SolverOperation {
  /** Reads a parsed body into the canonical request; throws Fault. */
  readonly read: (body: unknown) => unknown;
  /** Solves a canonical request; pure and synchronous; throws Fault. */
  readonly solve: (request: unknown) => unknown;
}

export type SolverOperations = Readonly<Record<string, SolverOperation>>;

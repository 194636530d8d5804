import type { IdentifiedRequest } from '../contract/identify-request.ts';
import type { FaultRecord } from '../faults/fault.ts';
import type { JobAnswer } from '../spec/types.ts';

/** Work to be done later: one solve, or a batch as its text comes. */
export type JobWork =
  | { readonly kind: 'solve'; readonly operation: string; readonly body: Uint8Array<ArrayBuffer> }
  | { readonly kind: 'batch'; readonly source: AsyncIterable<Uint8Array> };

/** A job and how far it is. */
export interface Job {
  readonly id: string;
  readonly kind: JobWork['kind'];
  readonly state: JobAnswer['state'];
  /** Lines that are answered, and all of them; of a solve 0 or 1, and 1. */
  readonly done: number;
  readonly total: number;
  /** ms since 1970, as are the others; null where it has not come. */
  readonly submitted: number;
  readonly started: number | null;
  readonly finished: number | null;
  /** Why it failed; null where it did not. */
  readonly failure: readonly FaultRecord[] | null;
}

export function isFinished({ state }: Pick<Job, 'state'>): boolean {
  return state !== 'queued' && state !== 'running';
}

/** Where jobs wait, run and are kept. */
export interface JobEngine {
  /** Seconds for which a job is kept after its end. */
  readonly age: number;
  /** Whether jobs outlive this process. */
  readonly lasting: boolean;
  /**
   * Takes a job. With a key that was used before for the same work, that job is returned.
   *
   * @throws Fault `empty-body`, `jobs-full`, `body-too-large`, `too-many-lines`, `idempotency-key-reused`,
   *   `queue-unreachable`
   */
  submit(work: JobWork, key: string | null): Promise<Job>;
  find(id: string): Promise<Job | null>;
  /** Cancels a job that is not finished; gives the job as it is then. */
  cancel(id: string): Promise<Job | null>;
  /** What a solve that has succeeded was about: its answer is kept or made by `Answers`. */
  solved(id: string): Promise<IdentifiedRequest | null>;
  /** The answers of a batch that has succeeded, in order, as NDJSON. */
  lines(id: string): AsyncIterable<Uint8Array>;
  /** Begins to work; jobs are taken before. */
  start(): void;
  /** Takes no further work up; what is under way may end. */
  stop(): Promise<void>;
}

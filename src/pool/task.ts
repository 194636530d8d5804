import type { ContentCoding } from '../encoding/compress.ts';
import type { FaultRecord } from '../faults/fault.ts';
import type { WantedAnswer } from './answer-form.ts';

/** Bytes in a buffer of their own, which is moved to the other thread: its sender keeps nothing of them. */
type OwnBytes = Uint8Array<ArrayBuffer>;

/** The JSON of an answer that was kept. */
export interface KeptJson {
  readonly bytes: OwnBytes;
  readonly coding: ContentCoding;
}

/**
 * What crosses the thread boundary on the way to a worker: the canonical text of a request that was
 * read already, where it is kept with the JSON of its answer, or the bytes of a body that is too
 * large to be read on the event loop. `ready` asks only for a sign of life.
 */
export type SolveTask =
  | {
      readonly kind: 'request';
      readonly operation: string;
      readonly request: OwnBytes;
      readonly wanted: WantedAnswer;
      readonly kept?: KeptJson;
    }
  | {
      readonly kind: 'body';
      readonly operation: string;
      readonly body: OwnBytes;
      readonly wanted: WantedAnswer;
      /** Version of the solver, for the digest. */
      readonly version: string;
    }
  | { readonly kind: 'ready' };

/** Lines of a batch, one after another in one buffer. */
export interface LinesTask {
  readonly kind: 'lines';
  readonly bytes: OwnBytes;
  /** The number of every line in its batch, and where it ends in the bytes. */
  readonly lines: readonly { readonly number: number; readonly end: number }[];
}

/** Whatever a worker may be given. */
export type AnyTask = SolveTask | LinesTask;

/** The answer to a task. */
export interface SolvedAnswer {
  readonly kind: 'answer';
  readonly bytes: OwnBytes;
  /** Content coding of the bytes. */
  readonly coding: ContentCoding;
  /** Time of the worker, s. */
  readonly seconds: number;
  /** What the answer says in one word, where its operation judges. */
  readonly verdict?: string;
  /** Canonical text of the request and digest of its result, where the worker has read a body. */
  readonly identified?: { readonly digest: string; readonly request: OwnBytes };
}

/** What came of one line: the length of its answer, or faults; its id where that could be read. */
export type SolvedLine =
  | { readonly id: string; readonly length: number }
  | { readonly id: string | null; readonly records: readonly FaultRecord[] };

/** What came of the lines of a task, in their order. */
export interface SolvedLines {
  readonly kind: 'lines';
  /** JSON of the answers, one after another. */
  readonly bytes: OwnBytes;
  readonly lines: readonly SolvedLine[];
  /** Time of the worker, s. */
  readonly seconds: number;
}

/**
 * What crosses it on the way back. Plain records, because structured clone drops the own fields
 * and the subclass of an Error.
 */
export type SolveResult =
  | SolvedAnswer
  | SolvedLines
  | { readonly kind: 'faults'; readonly records: readonly FaultRecord[] }
  | { readonly kind: 'error'; readonly memory: boolean; readonly stack: string }
  | { readonly kind: 'ready' };

/** One operation of the service, as a worker runs it. */
export interface SolverOperation {
  /** Reads a parsed body into the canonical request; throws Fault. */
  readonly read: (body: unknown) => unknown;
  /** Solves a canonical request; pure and synchronous; throws Fault. */
  readonly solve: (request: unknown) => unknown;
  /** What an answer says in one word, for the header; of operations that judge. */
  readonly verdictOf?: (answer: unknown) => string;
}

export type SolverOperations = Readonly<Record<string, SolverOperation>>;

/** The buffers of a task or a result, which move to the other thread. */
export function buffersOf(message: AnyTask | SolveResult): ArrayBuffer[] {
  switch (message.kind) {
    case 'request':
      return [message.request, ...(message.kept === undefined ? [] : [message.kept.bytes])].map(bufferOf);
    case 'body':
      return [message.body.buffer];
    case 'answer':
      return [message.bytes, ...(message.identified === undefined ? [] : [message.identified.request])].map(
        bufferOf,
      );
    case 'lines':
      return [message.bytes.buffer];
    default:
      return [];
  }
}

function bufferOf({ buffer }: OwnBytes): ArrayBuffer {
  return buffer;
}

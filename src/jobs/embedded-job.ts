import type { IdentifiedRequest } from '../contract/identify-request.ts';
import type { FaultRecord } from '../faults/fault.ts';
import type { Job, JobWork } from './job.ts';
import type { Line } from './split-lines.ts';

/** A job in the memory of this process, with what it needs and has made. */
export class EmbeddedJob {
  readonly id: string;
  readonly kind: JobWork['kind'];
  /** Its Idempotency-Key. */
  readonly key: string | null;
  fingerprint = '';
  readonly stopper = new AbortController();
  readonly submitted = Date.now();
  state: Job['state'] = 'queued';
  started: number | null = null;
  finished: number | null = null;
  failure: readonly FaultRecord[] | null = null;
  done = 0;
  total: number;
  /** Lines that are not taken up. */
  lines: (readonly Line[])[] = [];
  answers: Uint8Array[] = [];
  result: IdentifiedRequest | null = null;
  /** What it holds. */
  bytes = 0;

  constructor(id: string, kind: JobWork['kind'], key: string | null) {
    this.id = id;
    this.kind = kind;
    this.key = key;
    this.total = kind === 'solve' ? 1 : 0;
  }

  /** A solver begins on it. */
  begin(): void {
    if (this.state !== 'queued') return;
    this.state = 'running';
    this.started = Date.now();
  }

  end(state: Job['state'], failure: readonly FaultRecord[] | null): void {
    this.state = state;
    this.failure = failure;
    this.finished = Date.now();
    this.stopper.abort();
  }

  empty(): void {
    this.lines = [];
    this.answers = [];
  }

  /** The job as it is now. */
  view(): Job {
    const { id, kind, state, done, total, submitted, started, finished, failure } = this;
    return { id, kind, state, done, total, submitted, started, finished, failure };
  }
}

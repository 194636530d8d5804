import { randomUUID } from 'node:crypto';
import type { IdentifiedRequest } from '../contract/identify-request.ts';
import { Fault, fault, faultRecord, type FaultRecord } from '../faults/fault.ts';
import { EmbeddedJob } from './embedded-job.ts';
import { Fingerprint } from './fingerprint.ts';
import { isFinished, type Job, type JobEngine, type JobWork } from './job.ts';
import type { JobSolver } from './job-solver.ts';
import { NotWanted } from './line-solver.ts';
import { splitLines, type Line } from './split-lines.ts';

export interface JobBounds {
  /** Most jobs that are kept, those under way included. */
  readonly count: number;
  /** Bytes of all requests and answers of jobs. */
  readonly bytes: number;
  /** Time for which a job is kept after its end, s. */
  readonly age: number;
}

export interface EmbeddedJobsOptions {
  readonly bounds: JobBounds;
  readonly solver: JobSolver;
  /** Told of what no job should do. */
  readonly onError: (error: unknown) => void;
}

/**
 * Jobs in this process: they need nothing else, and end with it. Bounded by number, bytes and age; jobs
 * that have ended make room for new ones, the oldest first.
 */
export class EmbeddedJobs implements JobEngine {
  readonly lasting = false;
  readonly #options: EmbeddedJobsOptions;
  readonly #jobs = new Map<string, EmbeddedJob>();
  /** Jobs by Idempotency-Key. */
  readonly #byKey = new Map<string, EmbeddedJob>();
  #bytes = 0;

  constructor(options: EmbeddedJobsOptions) {
    this.#options = options;
  }

  get age(): number {
    return this.#options.bounds.age;
  }

  start(): void {
    // Jobs run from the moment that they are submitted.
  }

  async stop(): Promise<void> {
    // The pool lets work under way end, and refuses the rest.
  }

  async submit(work: JobWork, key: string | null): Promise<Job> {
    const fingerprint = new Fingerprint(work);
    const job = new EmbeddedJob(randomUUID(), work.kind, key);
    try {
      if (work.kind === 'batch') await this.#readLines(job, fingerprint.over(work.source));
      else this.#grow(job, work.body.byteLength);
      job.fingerprint = fingerprint.value;
      const earlier = key === null ? undefined : this.#byKey.get(key);
      if (earlier === undefined) this.#admit(job);
      else {
        this.#release(job);
        if (earlier.fingerprint === job.fingerprint) return earlier.view();
        throw fault('idempotency-key-reused', '', {
          key: JSON.stringify(key),
          job: `/v1/jobs/${earlier.id}`,
        });
      }
    } catch (error) {
      this.#release(job);
      throw error;
    }
    void this.#run(job, work);
    return job.view();
  }

  async find(id: string): Promise<Job | null> {
    return this.#jobs.get(id)?.view() ?? null;
  }

  async cancel(id: string): Promise<Job | null> {
    const job = this.#jobs.get(id);
    if (job !== undefined && !isFinished(job)) this.#end(job, 'cancelled');
    return job?.view() ?? null;
  }

  async solved(id: string): Promise<IdentifiedRequest | null> {
    return this.#jobs.get(id)?.result ?? null;
  }

  async *lines(id: string): AsyncGenerator<Uint8Array> {
    yield* this.#jobs.get(id)?.answers ?? [];
  }

  async #readLines(job: EmbeddedJob, source: AsyncIterable<Uint8Array>): Promise<void> {
    for await (const lines of splitLines(source, this.#options.solver.lineLimit)) {
      // Copies, because a line is a part of the larger buffer in which it came.
      const own = lines.map(({ number, bytes }) => ({ number, bytes: bytes && Uint8Array.from(bytes) }));
      this.#grow(job, sizeOf(own));
      job.lines.push(own);
      job.total += own.length;
    }
    if (job.total === 0) throw fault('empty-body', '');
  }

  #admit(job: EmbeddedJob): void {
    const { count } = this.#options.bounds;
    while (this.#jobs.size >= count) {
      if (!this.#forgetOldest()) throw fault('jobs-full', '', { reason: `${count} jobs are under way` });
    }
    this.#jobs.set(job.id, job);
    if (job.key !== null) this.#byKey.set(job.key, job);
  }

  async #run(job: EmbeddedJob, work: JobWork): Promise<void> {
    try {
      await (work.kind === 'solve' ? this.#solve(job, work) : this.#solveLines(job));
    } catch (error) {
      if (error instanceof NotWanted) return;
      if (!(error instanceof Fault)) this.#options.onError(error);
      const records = error instanceof Fault ? error.records : [faultRecord('internal-error', '')];
      this.#end(job, 'failed', records);
    }
  }

  async #solve(job: EmbeddedJob, work: Extract<JobWork, { kind: 'solve' }>): Promise<void> {
    const { solver } = this.#options;
    const end = await solver.solve(work.operation, work.body, job.stopper.signal, () => job.begin());
    if ('records' in end) throw new Fault(end.records);
    job.result = await solver.results.find(end.digest);
    if (!isFinished(job)) job.done = 1;
    this.#end(job, 'succeeded');
  }

  async #solveLines(job: EmbeddedJob): Promise<void> {
    const groups = this.#options.solver.lines(this.#takeLines(job), job.stopper.signal, () => job.begin());
    for await (const { bytes, count } of groups) {
      if (isFinished(job)) return;
      this.#grow(job, bytes.byteLength, 'job-result-too-large');
      job.answers.push(bytes);
      job.done += count;
    }
    this.#end(job, 'succeeded');
  }

  /** The lines of a job, each given up as it is taken. */
  async *#takeLines(job: EmbeddedJob): AsyncGenerator<readonly Line[]> {
    for (let lines = job.lines.shift(); lines !== undefined; lines = job.lines.shift()) {
      yield lines;
      this.#shrink(job, sizeOf(lines));
    }
  }

  #end(job: EmbeddedJob, state: Job['state'], failure: readonly FaultRecord[] | null = null): void {
    if (isFinished(job)) return;
    job.end(state, failure);
    if (state !== 'succeeded') this.#release(job);
    setTimeout(() => this.#forget(job), this.age * 1000).unref();
  }

  /** Counts bytes of a job, and makes room for them. */
  #grow(
    job: EmbeddedJob,
    bytes: number,
    refusal: 'body-too-large' | 'job-result-too-large' = 'body-too-large',
  ): void {
    const limit = this.#options.bounds.bytes;
    job.bytes += bytes;
    this.#bytes += bytes;
    if (job.bytes > limit) throw fault(refusal, '', { limit });
    while (this.#bytes > limit) {
      if (!this.#forgetOldest()) throw fault('jobs-full', '', { reason: `Jobs hold ${limit} bytes already` });
    }
  }

  #shrink(job: EmbeddedJob, bytes: number): void {
    const held = Math.min(bytes, job.bytes);
    job.bytes -= held;
    this.#bytes -= held;
  }

  #release(job: EmbeddedJob): void {
    job.empty();
    this.#shrink(job, job.bytes);
  }

  #forgetOldest(): boolean {
    const ended = [...this.#jobs.values()].filter(isFinished);
    if (ended.length === 0) return false;
    this.#forget(ended.reduce((oldest, job) => (job.finished! < oldest.finished! ? job : oldest)));
    return true;
  }

  #forget(job: EmbeddedJob): void {
    if (!this.#jobs.delete(job.id)) return;
    if (job.key !== null) this.#byKey.delete(job.key);
    this.#release(job);
  }
}

function sizeOf(lines: readonly Line[]): number {
  return lines.reduce((size, { bytes }) => size + (bytes?.byteLength ?? 0), 0);
}

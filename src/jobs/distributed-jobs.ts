import { randomUUID } from 'node:crypto';
import type { IdentifiedRequest } from '../contract/identify-request.ts';
import { fault } from '../faults/fault.ts';
import { ChunkQueue } from './chunk-queue.ts';
import { ChunkWorker } from './chunk-worker.ts';
import { cutChunks, writeChunk } from './chunk-text.ts';
import { Fingerprint } from './fingerprint.ts';
import type { Job, JobEngine, JobWork } from './job.ts';
import type { JobSolver } from './job-solver.ts';
import { sharedConnection } from './shared-connection.ts';
import { SharedJobStore, type NewJob } from './shared-job-store.ts';
import { splitLines } from './split-lines.ts';

export interface DistributedJobsOptions {
  /** Address of the server that the instances share. */
  readonly url: string;
  /** Time for which a job is kept after its end, s. */
  readonly age: number;
  /** Bytes of the text of one job, and of its answers. */
  readonly bytes: number;
  /** Solver threads of this instance. */
  readonly workers: number;
  readonly solver: JobSolver;
  /** Told of a server that is away, and of what no job should do. */
  readonly onError: (error: unknown) => void;
}

/**
 * Jobs on a server that any number of instances share: each takes chunks of the work, what one leaves
 * undone another takes over, and every one of them can tell of every job. While the server is away
 * everything throws the Fault `queue-unreachable`; it is used again as soon as it is back.
 */
export class DistributedJobs implements JobEngine {
  readonly lasting = true;
  readonly age: number;
  readonly #bytes: number;
  readonly #solver: JobSolver;
  readonly #client: ReturnType<typeof sharedConnection>;
  readonly #store: SharedJobStore;
  readonly #queue: ChunkQueue;
  readonly #worker: ChunkWorker;

  constructor({ url, age, bytes, workers, solver, onError }: DistributedJobsOptions) {
    this.age = age;
    this.#bytes = bytes;
    this.#solver = solver;
    this.#client = sharedConnection(url, onError);
    this.#store = new SharedJobStore(this.#client, age, bytes);
    this.#queue = new ChunkQueue(this.#client, this.#store, onError);
    this.#worker = new ChunkWorker({
      url,
      // One more than fills them, so that the end of a chunk leaves none of them idle.
      concurrency: 1 + Math.ceil(workers / 4),
      store: this.#store,
      solver,
      mostBytes: bytes,
      onError,
    });
  }

  start(): void {
    this.#queue.start();
    this.#worker.start();
  }

  async stop(): Promise<void> {
    await this.#worker.stop();
    await this.#queue.stop();
    this.#client.disconnect();
  }

  async submit(work: JobWork, key: string | null): Promise<Job> {
    const id = randomUUID();
    try {
      const job = await this.#put(id, work);
      for (;;) {
        const holder = await this.#store.commit(job, key);
        if (holder === id) break;
        const earlier = await this.#store.find(holder);
        // Forgotten in this very moment, and its key with it.
        if (earlier === null) continue;
        await this.#store.drop(id);
        if (earlier.fingerprint === job.fingerprint) return earlier;
        throw fault('idempotency-key-reused', '', { key: JSON.stringify(key), job: `/v1/jobs/${holder}` });
      }
    } catch (error) {
      await this.#store.drop(id).catch(() => undefined);
      throw error;
    }
    // From here on the job is taken: should this fail, any instance queues it (`ChunkQueue`).
    await this.#queue.add(id).catch(() => undefined);
    return (await this.#store.find(id))!;
  }

  find(id: string): Promise<Job | null> {
    return this.#store.find(id);
  }

  async cancel(id: string): Promise<Job | null> {
    await this.#store.end(id, 'cancelled');
    return this.#store.find(id);
  }

  async solved(id: string): Promise<IdentifiedRequest | null> {
    const job = await this.#store.find(id);
    return job === null ? null : this.#solver.results.find(job.digest);
  }

  async *lines(id: string): AsyncGenerator<Uint8Array> {
    const job = await this.#store.find(id);
    for (let chunk = 0; chunk < (job?.chunks ?? 0); chunk++) {
      const answers = await this.#store.answers(id, chunk);
      if (answers === null) throw new Error(`the answers of job ${id} went while they were sent`);
      yield answers;
    }
  }

  /** Puts the chunks of some work on the server, as its text comes. */
  async #put(id: string, work: JobWork): Promise<NewJob> {
    const fingerprint = new Fingerprint(work);
    if (work.kind === 'solve') {
      await this.#store.putChunk(id, 0, Buffer.from(work.body));
      const { kind, operation } = work;
      return { id, kind, operation, total: 1, chunks: 1, fingerprint: fingerprint.value };
    }
    let total = 0;
    let chunks = 0;
    let bytes = 0;
    const lines = splitLines(fingerprint.over(work.source), this.#solver.lineLimit);
    for await (const chunk of cutChunks(lines)) {
      const text = writeChunk(chunk);
      bytes += text.byteLength;
      if (bytes > this.#bytes) throw fault('body-too-large', '', { limit: this.#bytes });
      await this.#store.putChunk(id, chunks++, text);
      total += chunk.length;
    }
    if (total === 0) throw fault('empty-body', '');
    return { id, kind: work.kind, operation: '', total, chunks, fingerprint: fingerprint.value };
  }
}

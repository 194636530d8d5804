import { setTimeout as pause } from 'node:timers/promises';
import { Worker, type Job as QueuedChunk } from 'bullmq';
import type { Redis } from 'ioredis';
import { Fault, faultRecord } from '../faults/fault.ts';
import { mostAttempts, queueName, queuePrefix, type ChunkTask } from './chunk-queue.ts';
import { readChunk } from './chunk-text.ts';
import type { JobSolver } from './job-solver.ts';
import { NotWanted } from './line-solver.ts';
import { waitingConnection } from './shared-connection.ts';
import type { SharedJob, SharedJobStore } from './shared-job-store.ts';

/**
 * Time after which a chunk whose instance gives no sign of life counts as left, and how often such are
 * looked for, ms. Solving happens in other threads, so a living instance is never late with its sign.
 */
const lockDuration = 10_000;
const stalledInterval = 5000;

/** How often a chunk may be left by the instance that had it. */
const mostStalls = 20;

/** How often it is looked whether work under way is still wanted, ms. */
const watchPeriod = 25;

export interface ChunkWorkerOptions {
  readonly url: string;
  readonly concurrency: number;
  readonly store: SharedJobStore;
  readonly solver: JobSolver;
  /** Of the answers of one job. */
  readonly mostBytes: number;
  readonly onError: (error: unknown) => void;
}

/** Takes chunks out of the shared queue and answers them, as often as it takes, each once in the result. */
export class ChunkWorker {
  readonly #options: ChunkWorkerOptions;
  readonly #client: Redis;
  readonly #worker: Worker<ChunkTask>;

  constructor(options: ChunkWorkerOptions) {
    this.#options = options;
    this.#client = waitingConnection(options.url, options.onError);
    this.#worker = new Worker<ChunkTask>(queueName, (chunk) => this.#work(chunk.data), {
      connection: this.#client,
      prefix: queuePrefix,
      concurrency: options.concurrency,
      autorun: false,
      lockDuration,
      stalledInterval,
      maxStalledCount: mostStalls,
    });
    this.#worker.on('error', options.onError);
    this.#worker.on('failed', (chunk, error) => this.#failed(chunk, error));
  }

  start(): void {
    this.#worker.run().catch(this.#options.onError);
  }

  async stop(): Promise<void> {
    // What is under way has ended with the pool. Without a server, closing would wait for it.
    const closed = this.#worker.close(this.#client.status !== 'ready').catch(this.#options.onError);
    await Promise.race([closed, pause(2000, undefined, { ref: false })]);
    this.#client.disconnect();
  }

  /** Answers one chunk. @throws where another attempt, or another instance, can do better */
  async #work({ id, chunk }: ChunkTask): Promise<void> {
    const { store } = this.#options;
    const job = await store.find(id);
    const text = await store.chunk(id, chunk);
    // Cancelled, or answered before by an instance that could not say so.
    if (job === null || text === null) return;
    const stopper = new AbortController();
    const watch = this.#watch(id, stopper);
    try {
      await (job.kind === 'solve'
        ? this.#solve(job, text, stopper.signal)
        : this.#answer(job, chunk, text, stopper.signal));
    } catch (error) {
      if (!(error instanceof NotWanted)) throw error;
    } finally {
      clearInterval(watch);
    }
  }

  async #solve({ id, operation }: SharedJob, body: Buffer, gone: AbortSignal): Promise<void> {
    const { store, solver } = this.#options;
    const end = await solver.solve(operation, body, gone, () => this.#begin(id));
    if ('digest' in end) {
      // Where the server was away, only this instance has kept the request.
      const result = await solver.results.find(end.digest);
      if (result === null) throw new Error(`the request of job ${id} was not kept`);
      await this.#insist(() => solver.results.keep(result));
      await this.#insist(() => store.end(id, 'succeeded', end));
    } else if (end.records[0].code === 'stopping') throw new Fault(end.records);
    else await this.#insist(() => store.end(id, 'failed', { failure: end.records }));
  }

  async #answer({ id }: SharedJob, chunk: number, text: Buffer, gone: AbortSignal): Promise<void> {
    const { store, solver, mostBytes } = this.#options;
    const lines = readChunk(text);
    const parts: Uint8Array[] = [];
    for await (const { bytes } of solver.lines(once(lines), gone, () => this.#begin(id))) parts.push(bytes);
    const fits = await this.#insist(() => store.keepChunk(id, chunk, Buffer.concat(parts), lines.length));
    if (fits) return;
    const failure = [faultRecord('job-result-too-large', '', { limit: mostBytes })];
    await this.#insist(() => store.end(id, 'failed', { failure }));
  }

  #begin(id: string): void {
    this.#options.store.begin(id).catch(() => undefined);
  }

  /** Stops work that is not wanted any more. A server that is away says nothing about that. */
  #watch(id: string, stopper: AbortController): NodeJS.Timeout {
    return setInterval(() => {
      this.#options.store.isActive(id).then(
        (isActive) => isActive || stopper.abort(),
        () => undefined,
      );
    }, watchPeriod);
  }

  /** What has been solved is not given up because the server is away for a while. */
  async #insist<Value>(work: () => Promise<Value>): Promise<Value> {
    for (let attempt = 1; ; attempt++) {
      try {
        return await work();
      } catch (error) {
        if (attempt === mostAttempts) throw error;
        await pause(Math.min(100 * attempt, 1000));
      }
    }
  }

  #failed(chunk: QueuedChunk<ChunkTask> | undefined, error: Error): void {
    if (chunk === undefined) return;
    const isLast = chunk.attemptsMade >= mostAttempts || /stalled/.test(error.message);
    if (!isLast) return;
    this.#options.onError(error);
    const failure = [faultRecord('job-failed', '', { reason: 'a part of it was given up again and again' })];
    this.#options.store.end(chunk.data.id, 'failed', { failure }).catch(this.#options.onError);
  }
}

async function* once<Value>(value: Value): AsyncGenerator<Value> {
  yield value;
}

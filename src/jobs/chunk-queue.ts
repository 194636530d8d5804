import { Queue } from 'bullmq';
import type { Redis } from 'ioredis';
import { fromShared } from './shared-connection.ts';
import type { SharedJobStore } from './shared-job-store.ts';

/** Name of the queue on the server, and what its keys begin with. */
export const queueName = 'chunks';
export const queuePrefix = 'tailbound';

/** What an instance is told to do: one chunk of one job. */
export interface ChunkTask {
  readonly id: string;
  readonly chunk: number;
}

/** Times that a chunk is tried; it fails only where an instance stops or the server goes away. */
export const mostAttempts = 20;

/** Pause before a chunk is tried again, ms. */
const retryPause = 500;

/** Chunks that are queued with one command. */
const addedAtOnce = 500;

/** Largest priority that the queue knows. */
const lowestPriority = 2_097_152;

/** How often jobs are looked for that were taken and not queued, ms. */
const sweepPeriod = 5000;

/** Puts the chunks of jobs into the queue that the instances share. */
export class ChunkQueue {
  readonly #client: Redis;
  #opened: Queue<ChunkTask> | null = null;
  readonly #store: SharedJobStore;
  readonly #onError: (error: unknown) => void;
  #timer: NodeJS.Timeout | undefined;

  constructor(client: Redis, store: SharedJobStore, onError: (error: unknown) => void) {
    this.#store = store;
    this.#onError = onError;
    this.#client = client;
  }

  /** From now on, jobs that another instance has taken and not queued are queued too. */
  start(): void {
    this.#timer = setInterval(() => {
      this.#sweep().catch(() => undefined);
    }, sweepPeriod);
    this.#timer.unref();
  }

  async stop(): Promise<void> {
    clearInterval(this.#timer);
    await this.#opened?.close().catch(this.#onError);
  }

  /**
   * Queues all chunks of a job, as often as it may be called: chunks that wait are known by their names,
   * those that are answered are passed over by whoever takes them.
   */
  async add(id: string): Promise<void> {
    const job = await this.#store.find(id);
    const count = job?.chunks ?? 0;
    for (let first = 0; first < count; first += addedAtOnce) {
      const chunks = Array.from({ length: Math.min(addedAtOnce, count - first) }, (_, i) => first + i);
      const queue = await fromShared(() => this.#open());
      await fromShared(() => queue.addBulk(chunks.map((chunk) => queued(id, chunk, job!.kind === 'solve'))));
    }
    await this.#store.markQueued(id);
  }

  /**
   * The queue, opened when the server is first there: one that was opened without it stays unusable,
   * because the library asks the server for its version only once.
   */
  async #open(): Promise<Queue<ChunkTask>> {
    if (this.#opened !== null) return this.#opened;
    const queue = new Queue<ChunkTask>(queueName, {
      connection: this.#client,
      prefix: queuePrefix,
      // Else an addition would wait for ever for a server that is away.
      skipWaitingForReady: true,
    });
    queue.on('error', this.#onError);
    await queue.waitUntilReady();
    return (this.#opened ??= queue);
  }

  async #sweep(): Promise<void> {
    for (const id of await this.#store.unqueued()) await this.add(id);
  }
}

/**
 * A chunk as the queue takes it. Solves go first; then first chunks before second ones and so on, so that
 * a short batch does not wait for the whole of a long one.
 */
function queued(id: string, chunk: number, isSolve: boolean) {
  return {
    name: 'chunk',
    data: { id, chunk },
    opts: {
      jobId: `${id}-${chunk}`,
      attempts: mostAttempts,
      backoff: { type: 'fixed', delay: retryPause },
      removeOnComplete: true,
      removeOnFail: true,
      ...(isSolve ? {} : { priority: Math.min(chunk + 1, lowestPriority) }),
    },
  };
}

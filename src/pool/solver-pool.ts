import { performance } from 'node:perf_hooks';
import { Piscina } from 'piscina';
import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import { LoadEstimate } from './load-estimate.ts';
import {
  buffersOf,
  type AnyTask,
  type LinesTask,
  type SolvedAnswer,
  type SolvedLines,
  type SolveResult,
  type SolveTask,
} from './task.ts';
import { WaitingLine } from './waiting-line.ts';

export interface SolverPoolOptions {
  /** Compiled module whose default export serves the tasks. */
  readonly workerFile: string;
  /** Number of worker threads, ≥ 1. */
  readonly workers: number;
  /** Requests that may wait for a worker, ≥ 0. */
  readonly queueLimit: number;
  /** Heap of one worker in MiB; typed arrays are not counted. */
  readonly memoryLimit: number;
  /** Told of a worker that fails while it has no task. */
  readonly onWorkerError: (error: Error) => void;
}

export interface SolveLimits {
  /** Moment of arrival of the request, in ms of performance.now(). */
  readonly arrived: number;
  /** Seconds from arrival to the answer, waiting included. */
  readonly deadline: number;
  /** Aborts when nobody waits for the answer any more. */
  readonly gone?: AbortSignal;
}

/**
 * Limits of work for which nobody waits at the other end of a connection: it lets other requests pass
 * and does not count against the line, so whoever hands it in bounds how much of it there is.
 */
export interface BackgroundLimits {
  readonly background: true;
  /** Seconds from the moment that a worker begins. */
  readonly deadline: number;
  /** Aborts when it is not wanted any more. */
  readonly gone: AbortSignal;
  /** Told when a worker begins. */
  readonly onStart?: () => void;
}

/** What comes of one request; `cause` is for the log, not for the client. */
export type SolveOutcome =
  | SolvedAnswer
  | { readonly kind: 'faults'; readonly records: readonly FaultRecord[]; readonly cause?: string }
  | { readonly kind: 'gone' };

/** What comes of lines of a batch; faults are those of the pool, for all of them. */
export type LinesOutcome = SolvedLines | Exclude<SolveOutcome, { kind: 'answer' }>;

/** One request on its way through the pool. */
interface Job {
  readonly task: AnyTask;
  readonly stopper: AbortController;
  /** Told that a worker begins. */
  readonly begin: () => void;
  /** Settles the request; later calls do nothing. */
  readonly settle: (outcome: SolveOutcome | SolvedLines) => void;
  readonly patience: number;
}

/**
 * Time in ms that a worker gets to finish a solve whose client has gone. Replacing a worker
 * takes about as long, so stopping at once would cost more than it saves where clients often leave.
 */
const patience = 250;

/** The same for work that was cancelled, which happens rarely: it must stop at once. */
const backgroundPatience = 20;

/**
 * A fixed number of worker threads behind a bounded line of waiting requests, first come, first
 * served. Every request is settled exactly once: by its answer, by faults, or because its client has
 * gone. A worker that crashes, runs out of memory or works on for nobody is ended and replaced.
 *
 * The line is kept here because the pool library counts only tasks without an abort signal against
 * its own queue limit, and moves those with one out of order.
 */
export class SolverPool {
  readonly #options: SolverPoolOptions;
  readonly #threads: Piscina;
  readonly #load = new LoadEstimate();
  readonly #waiting = new WaitingLine<Job>();
  readonly #running = new Set<Job>();
  #stopping = false;
  #ready = false;
  #drained: () => void = () => undefined;

  constructor(options: SolverPoolOptions) {
    this.#options = options;
    this.#threads = new Piscina({
      filename: options.workerFile,
      minThreads: options.workers,
      maxThreads: options.workers,
      idleTimeout: Infinity,
      resourceLimits: { maxOldGenerationSizeMb: options.memoryLimit },
    });
    // Without a listener an error of an idle worker would end the process.
    this.#threads.on('error', options.onWorkerError);
  }

  get isReady(): boolean {
    return this.#ready && !this.#stopping;
  }

  get isStopping(): boolean {
    return this.#stopping;
  }

  get workers(): number {
    return this.#options.workers;
  }

  get running(): number {
    return this.#running.size;
  }

  get waiting(): number {
    return this.#waiting.length;
  }

  /** Whole seconds after which a refused client may try again, 1 to 60. */
  get retryAfter(): number {
    return this.#load.secondsUntilFree(this.#running.size + this.#waiting.length, this.#options.workers);
  }

  /** Waits until every worker has loaded and warmed up; rejects when one cannot. */
  async start(): Promise<void> {
    const signs = Array.from({ length: this.#options.workers }, () =>
      this.#threads.run({ kind: 'ready' } satisfies SolveTask),
    );
    await Promise.all(signs);
    this.#ready = true;
  }

  /**
   * Solves one request in a worker.
   *
   * Faults of the pool itself: `queue-full`, `deadline-exceeded`, `solver-out-of-memory`,
   * `solver-crashed`, `internal-error`, `stopping`.
   */
  run(task: SolveTask, limits: SolveLimits | BackgroundLimits): Promise<SolveOutcome>;
  run(task: LinesTask, limits: BackgroundLimits): Promise<LinesOutcome>;
  run(task: AnyTask, limits: SolveLimits | BackgroundLimits): Promise<SolveOutcome | LinesOutcome> {
    if (this.#stopping) return Promise.resolve(refusal('stopping'));
    if ('background' in limits) return new Promise((resolve) => this.#admit(task, limits, resolve));
    if (this.#running.size >= this.#options.workers && this.#waiting.length >= this.#options.queueLimit) {
      return Promise.resolve(refusal('queue-full', { limit: this.#options.queueLimit }));
    }
    return new Promise((resolve) => this.#admit(task, limits, resolve));
  }

  /** Refuses new work, lets work under way finish for up to `grace` seconds, refuses the rest, ends the workers. */
  async stop(grace: number): Promise<void> {
    this.#stopping = true;
    if (this.#running.size > 0) {
      const timer = setTimeout(() => this.#refuseAll(), grace * 1000);
      await new Promise<void>((resolve) => (this.#drained = resolve));
      clearTimeout(timer);
    }
    await this.#threads.destroy();
  }

  #admit(
    task: AnyTask,
    limits: SolveLimits | BackgroundLimits,
    resolve: (outcome: SolveOutcome | LinesOutcome) => void,
  ): void {
    const background = 'background' in limits;
    let timer: NodeJS.Timeout | undefined;
    const allow = (milliseconds: number): void => {
      timer = setTimeout(() => {
        job.settle(refusal('deadline-exceeded', { seconds: limits.deadline }));
        job.stopper.abort();
      }, milliseconds);
    };
    const leave = (): void => job.settle({ kind: 'gone' });
    const job: Job = {
      task,
      stopper: new AbortController(),
      begin: () => {
        if (!background) return;
        allow(limits.deadline * 1000);
        limits.onStart?.();
      },
      settle: (outcome) => {
        clearTimeout(timer);
        limits.gone?.removeEventListener('abort', leave);
        resolve(outcome);
        this.#leave(job);
      },
      patience: background ? backgroundPatience : patience,
    };
    if (limits.gone?.aborted) return leave();
    limits.gone?.addEventListener('abort', leave, { once: true });
    if (!background) allow(Math.max(0, limits.arrived + limits.deadline * 1000 - performance.now()));
    this.#waiting.add(job, background);
    this.#next();
  }

  /** Takes a settled request out of the line, or bounds the time of a worker that is still at it. */
  #leave(job: Job): void {
    if (this.#running.has(job)) {
      setTimeout(() => this.#running.has(job) && job.stopper.abort(), job.patience).unref();
      return;
    }
    this.#waiting.remove(job);
  }

  #next(): void {
    while (this.#running.size < this.#options.workers) {
      const job = this.#waiting.take();
      if (job === undefined) return;
      this.#running.add(job);
      job.begin();
      void this.#solve(job);
    }
  }

  async #solve(job: Job): Promise<void> {
    const { task, stopper } = job;
    const transferList = buffersOf(task);
    let outcome: SolveOutcome | LinesOutcome;
    try {
      const result = (await this.#threads.run(task, { signal: stopper.signal, transferList })) as SolveResult;
      outcome = this.#outcomeOf(result);
    } catch (error) {
      outcome = outcomeOfCrash(error);
    }
    this.#running.delete(job);
    job.settle(outcome);
    this.#next();
    if (this.#running.size === 0) this.#drained();
  }

  #outcomeOf(result: SolveResult): SolveOutcome | LinesOutcome {
    switch (result.kind) {
      case 'answer':
        this.#load.record(result.seconds);
        return result;
      case 'lines':
      case 'faults':
        return result;
      case 'error':
        return { ...refusal(result.memory ? 'solver-out-of-memory' : 'internal-error'), cause: result.stack };
      case 'ready':
        return { ...refusal('internal-error'), cause: 'a sign of life is no answer' };
    }
  }

  #refuseAll(): void {
    for (const job of [...this.#waiting.all(), ...this.#running]) {
      job.settle(refusal('stopping'));
      job.stopper.abort();
    }
  }
}

type PoolFault = Parameters<typeof faultRecord>[0];

function refusal(
  code: PoolFault,
  values: Record<string, number> = {},
): Extract<SolveOutcome, { kind: 'faults' }> {
  return { kind: 'faults', records: [faultRecord(code, '', values)] };
}

function outcomeOfCrash(error: unknown): SolveOutcome {
  const memory = (error as NodeJS.ErrnoException).code === 'ERR_WORKER_OUT_OF_MEMORY';
  return { ...refusal(memory ? 'solver-out-of-memory' : 'solver-crashed'), cause: String(error) };
}

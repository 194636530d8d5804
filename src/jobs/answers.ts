import { performance } from 'node:perf_hooks';
import type { IdentifiedRequest } from '../contract/identify-request.ts';
import { isSmall, type ContentCoding } from '../encoding/compress.ts';
import { faultRecord } from '../faults/fault.ts';
import type { AnswerForm, WantedAnswer } from '../pool/answer-form.ts';
import type { BackgroundLimits, SolveLimits, SolveOutcome, SolverPool } from '../pool/solver-pool.ts';
import type { KeptJson } from '../pool/task.ts';
import { answerKey } from './answer-key.ts';
import type { ResultStore } from './result-store.ts';
import { SharedWork } from './shared-work.ts';

/** The bytes of an answer and what tells it from others. */
export interface Answered {
  readonly kind: 'answered';
  readonly bytes: Uint8Array<ArrayBuffer>;
  readonly coding: ContentCoding;
  readonly digest: string;
  readonly key: string;
  /** What it says in one word, where its operation judges. */
  readonly verdict?: string;
}

/** Operations whose answers have a verdict, which is kept beside their bytes. */
const judging: ReadonlySet<string> = new Set(['checks']);

export type AnswerOutcome = Answered | Exclude<SolveOutcome, { kind: 'answer' }>;

/** Largest JSON that is copied for a worker on the event loop, bytes: about 1 ms. Beyond it is solved again. */
const largestHandedOver = 4 * 1024 * 1024;

/**
 * Answers to requests and to digests: bytes that are kept, else the work of a solver. Whatever is
 * solved is kept under its digest.
 */
export class Answers {
  readonly #pool: SolverPool;
  readonly #store: ResultStore;
  readonly #version: string;
  readonly #longest: number;
  readonly #onStoreError: (error: unknown) => void;
  readonly #shared = new SharedWork<AnswerOutcome>();

  /**
   * @param version of the solver; it is part of every digest
   * @param longest deadline of work that several wait for, s
   * @param onStoreError told of a store that fails; the answer is given all the same
   */
  constructor(options: {
    pool: SolverPool;
    store: ResultStore;
    version: string;
    longest: number;
    onStoreError: (error: unknown) => void;
  }) {
    this.#pool = options.pool;
    this.#store = options.store;
    this.#version = options.version;
    this.#longest = options.longest;
    this.#onStoreError = options.onStoreError;
  }

  /** The request kept under a digest, or null. */
  find(digest: string): Promise<IdentifiedRequest | null> {
    return this.#store.find(digest);
  }

  /** Makes sure that a request is kept; throws where the store fails. */
  keep(result: IdentifiedRequest): Promise<void> {
    return this.#store.keep(result);
  }

  /** Answers a request that was read, and keeps it. */
  async toRequest(
    result: IdentifiedRequest,
    wanted: WantedAnswer,
    limits: SolveLimits,
  ): Promise<AnswerOutcome> {
    const outcome = (await this.#keptAnswer(result, wanted)) ?? (await this.#solve(result, wanted, limits));
    if (outcome.kind === 'answered') await this.#safely(this.#store.keep(result));
    return outcome;
  }

  /** Answers a body that is too large to be read on the event loop, and keeps its request. */
  async toBody(
    operation: string,
    body: Uint8Array<ArrayBuffer>,
    wanted: WantedAnswer,
    limits: SolveLimits | BackgroundLimits,
  ): Promise<AnswerOutcome> {
    const task = { kind: 'body', operation, body, wanted, version: this.#version } as const;
    const outcome = await this.#pool.run(task, limits);
    if (outcome.kind !== 'answer') return outcome;
    const { digest, request } = outcome.identified!;
    await this.#safely(this.#store.keep({ operation, digest, request }));
    return this.#keepAnswer(digest, wanted, outcome);
  }

  /** Answers a kept result. Equal answers that are wanted at the same time are made once. */
  async toResult(
    result: IdentifiedRequest,
    wanted: WantedAnswer,
    limits: SolveLimits,
  ): Promise<AnswerOutcome> {
    const kept = await this.#keptAnswer(result, wanted);
    if (kept !== null) return kept;
    const key = answerKey(result.digest, wanted.form, 'identity') + wanted.codings.join();
    for (;;) {
      const joined = performance.now();
      const place = this.#shared.join(key, (gone) =>
        this.#solve(result, wanted, { arrived: joined, deadline: this.#longest, gone }),
      );
      const outcome = await within(place.work, limits);
      place.leave();
      // Work that began before this request did may end by its own deadline before that of the request.
      if (outcome.kind !== 'faults' || outcome.records[0].code !== 'deadline-exceeded') return outcome;
      if (timeLeft(limits) <= 0) return outcome;
    }
  }

  async #solve(result: IdentifiedRequest, wanted: WantedAnswer, limits: SolveLimits): Promise<AnswerOutcome> {
    const kept = await this.#keptJson(result.digest);
    // A copy, because the buffer of a task moves to the worker.
    const request = new Uint8Array(result.request);
    const task = { kind: 'request', operation: result.operation, request, wanted } as const;
    const outcome = await this.#pool.run(kept === null ? task : { ...task, kept }, limits);
    return outcome.kind === 'answer' ? this.#keepAnswer(result.digest, wanted, outcome) : outcome;
  }

  async #keepAnswer(
    digest: string,
    { form }: WantedAnswer,
    { bytes, coding, verdict }: { bytes: Uint8Array<ArrayBuffer>; coding: ContentCoding; verdict?: string },
  ): Promise<Answered> {
    const key = answerKey(digest, form, coding);
    await this.#safely(this.#store.keepAnswer(key, bytes));
    if (verdict === undefined) return { kind: 'answered', bytes, coding, digest, key };
    await this.#safely(this.#store.keepAnswer(verdictKey(digest), new TextEncoder().encode(verdict)));
    return { kind: 'answered', bytes, coding, digest, key, verdict };
  }

  /** The bytes that a solver would give, with their verdict: where that has gone, neither is. */
  async #keptAnswer(result: IdentifiedRequest, wanted: WantedAnswer): Promise<Answered | null> {
    const answered = await this.#keptForm(result.digest, wanted);
    if (answered === null || !judging.has(result.operation)) return answered;
    const verdict = await this.#safely(this.#store.findAnswer(verdictKey(result.digest)));
    return verdict == null ? null : { ...answered, verdict: new TextDecoder().decode(verdict) };
  }

  /** In the first coding, or small ones without any. */
  async #keptForm(digest: string, { form, codings }: WantedAnswer): Promise<Answered | null> {
    const first = await this.#keptBytes(digest, form, codings[0]);
    if (first !== null || !codings.includes('identity')) return first;
    const plain = await this.#keptBytes(digest, form, 'identity');
    return plain !== null && isSmall(plain.bytes) ? plain : null;
  }

  async #keptBytes(digest: string, form: AnswerForm, coding: ContentCoding): Promise<Answered | null> {
    const key = answerKey(digest, form, coding);
    const bytes = await this.#safely(this.#store.findAnswer(key));
    return bytes == null ? null : { kind: 'answered', bytes, coding, digest, key };
  }

  /** A copy of the JSON of a result in any coding: of that, a worker makes every other form. */
  async #keptJson(digest: string): Promise<KeptJson | null> {
    for (const coding of ['identity', 'br', 'gzip'] as const) {
      const found = await this.#keptBytes(digest, { format: 'json' }, coding);
      if (found !== null && found.bytes.byteLength <= largestHandedOver) {
        return { bytes: new Uint8Array(found.bytes), coding };
      }
    }
    return null;
  }

  /** What the store gives; undefined where it fails, so that an answer never depends on it. */
  async #safely<Value>(work: Promise<Value>): Promise<Value | undefined> {
    try {
      return await work;
    } catch (error) {
      this.#onStoreError(error);
      return undefined;
    }
  }
}

/** No key of an answer has a colon. */
function verdictKey(digest: string): string {
  return `${digest}:verdict`;
}

function timeLeft({ arrived, deadline }: SolveLimits): number {
  return arrived + deadline * 1000 - performance.now();
}

/** The outcome of shared work, or that the time of one of those who wait, or his patience, is over. */
async function within(work: Promise<AnswerOutcome>, limits: SolveLimits): Promise<AnswerOutcome> {
  const { gone, deadline } = limits;
  return new Promise((resolve, reject) => {
    const seconds = { seconds: deadline };
    const timer = setTimeout(
      () => end({ kind: 'faults', records: [faultRecord('deadline-exceeded', '', seconds)] }),
      Math.max(0, timeLeft(limits)),
    );
    const leave = (): void => end({ kind: 'gone' });
    const end = (outcome: AnswerOutcome): void => {
      clearTimeout(timer);
      gone?.removeEventListener('abort', leave);
      resolve(outcome);
    };
    gone?.addEventListener('abort', leave, { once: true });
    work.then(end, reject);
    if (gone?.aborted) leave();
  });
}

import { createHash } from 'node:crypto';
import type { Redis } from 'ioredis';
import type { FaultRecord } from '../faults/fault.ts';
import type { Job } from './job.ts';
import { fromShared, keyPrefix } from './shared-connection.ts';
import { begin, commit, end, keepChunk } from './shared-job-scripts.ts';

/** Life of a job that never ends, s. */
const longestLife = 30 * 86_400;

/** A job as all instances see it. */
export interface SharedJob extends Job {
  readonly operation: string;
  readonly chunks: number;
  readonly fingerprint: string;
  readonly digest: string;
}

/** What a job is before it is taken. */
export type NewJob = Pick<SharedJob, 'id' | 'kind' | 'operation' | 'total' | 'chunks' | 'fingerprint'>;

/**
 * The jobs of all instances, with their chunks and answers. Whatever must happen as one is a script.
 * Every method throws the Fault `queue-unreachable` while the server is away.
 */
export class SharedJobStore {
  readonly #client: Redis;
  readonly #age: number;
  readonly #mostBytes: number;

  /**
   * @param age time for which a job is kept after its end, s
   * @param mostBytes of the answers of one job
   */
  constructor(client: Redis, age: number, mostBytes: number) {
    this.#client = client;
    this.#age = age;
    this.#mostBytes = mostBytes;
  }

  putChunk(id: string, chunk: number, bytes: Buffer): Promise<unknown> {
    const { chunks } = keysOf(id);
    return fromShared(() =>
      Promise.all([
        this.#client.hset(chunks, String(chunk), bytes),
        this.#client.expire(chunks, longestLife),
      ]),
    );
  }

  /** Takes a job whose chunks are there; gives the id of the job that its key belongs to. */
  commit(job: NewJob, key: string | null): Promise<string> {
    const keyName =
      key === null ? '' : `${keyPrefix}key:${createHash('sha256').update(key).digest('base64url')}`;
    const { id, ...given } = job;
    const fields = { ...given, state: 'queued', done: 0, bytes: 0, submitted: Date.now(), key: keyName };
    return fromShared(async () => {
      const keys = [keysOf(id).job, unqueued, keyName];
      return String(
        await this.#client.eval(commit, 3, ...keys, id, longestLife, ...Object.entries(fields).flat()),
      );
    });
  }

  /** Drops chunks of a job that was not taken. */
  drop(id: string): Promise<unknown> {
    return fromShared(() => this.#client.del(keysOf(id).chunks));
  }

  /** Jobs that were taken and perhaps not queued, because an instance ended in between. */
  unqueued(): Promise<string[]> {
    return fromShared(() => this.#client.smembers(unqueued));
  }

  markQueued(id: string): Promise<unknown> {
    return fromShared(() => this.#client.srem(unqueued, id));
  }

  async find(id: string): Promise<SharedJob | null> {
    const fields = await fromShared(() => this.#client.hgetall(keysOf(id).job));
    return fields.state === undefined ? null : jobOf(id, fields);
  }

  async isActive(id: string): Promise<boolean> {
    const state = await fromShared(() => this.#client.hget(keysOf(id).job, 'state'));
    return state === 'queued' || state === 'running';
  }

  /** The chunk; null once it has been answered. */
  chunk(id: string, chunk: number): Promise<Buffer | null> {
    return fromShared(() => this.#client.hgetBuffer(keysOf(id).chunks, String(chunk)));
  }

  answers(id: string, chunk: number): Promise<Buffer | null> {
    return fromShared(() => this.#client.hgetBuffer(keysOf(id).answers, String(chunk)));
  }

  begin(id: string): Promise<unknown> {
    return fromShared(() => this.#client.eval(begin, 1, keysOf(id).job, Date.now()));
  }

  /** Keeps the answers of a chunk, however often it was worked on; false where they are too large. */
  async keepChunk(id: string, chunk: number, answers: Buffer, lines: number): Promise<boolean> {
    const { job, chunks, answers: out } = keysOf(id);
    const limits = [Date.now(), this.#age, longestLife, this.#mostBytes];
    const tooLarge = await fromShared(() =>
      this.#client.eval(keepChunk, 3, job, chunks, out, chunk, answers, lines, ...limits),
    );
    return tooLarge !== 1;
  }

  /** Ends a job, unless it has ended. */
  end(
    id: string,
    state: 'succeeded' | 'failed' | 'cancelled',
    { digest, failure }: { readonly digest?: string; readonly failure?: readonly FaultRecord[] } = {},
  ): Promise<unknown> {
    const { job, chunks, answers } = keysOf(id);
    const fields = [
      ...(digest === undefined ? [] : ['digest', digest, 'done', '1']),
      ...(failure === undefined ? [] : ['failure', JSON.stringify(failure)]),
    ];
    return fromShared(() =>
      this.#client.eval(end, 3, job, chunks, answers, state, Date.now(), this.#age, ...fields),
    );
  }
}

const unqueued = `${keyPrefix}unqueued`;

function keysOf(id: string): { readonly job: string; readonly chunks: string; readonly answers: string } {
  const job = `${keyPrefix}job:${id}`;
  return { job, chunks: `${job}:chunks`, answers: `${job}:answers` };
}

function jobOf(id: string, fields: Readonly<Record<string, string | undefined>>): SharedJob {
  const numberOr = (text: string | undefined): number | null => (text === undefined ? null : Number(text));
  return {
    id,
    kind: fields.kind as Job['kind'],
    state: fields.state as Job['state'],
    operation: fields.operation ?? '',
    chunks: Number(fields.chunks),
    fingerprint: fields.fingerprint ?? '',
    digest: fields.digest ?? '',
    done: Number(fields.done),
    total: Number(fields.total),
    submitted: Number(fields.submitted),
    started: numberOr(fields.started),
    finished: numberOr(fields.finished),
    failure: fields.failure === undefined ? null : (JSON.parse(fields.failure) as FaultRecord[]),
  };
}

import type { Redis } from 'ioredis';
import type { IdentifiedRequest } from '../contract/identify-request.ts';
import { fault } from '../faults/fault.ts';
import type { ResultStore } from './result-store.ts';
import { fromShared, keyPrefix } from './shared-connection.ts';

export interface SharedResultsOptions {
  readonly client: Redis;
  /** What this instance keeps itself: asked first, and all there is while the server is away. */
  readonly near: ResultStore;
}

/** Time for which a request is kept after its last use, s; no job is kept longer (settings.ts). */
const requestAge = 7 * 86_400;

/** Largest answer that is shared, bytes; a larger one is computed again where it is wanted. */
const largestAnswer = 1024 * 1024;

/** Time for which a server that has failed is not asked, ms: answers must not wait for it one by one. */
const rest = 2000;

/** Time for which the bytes of an answer are shared, s. */
const answerAge = 3600;

/**
 * Results that all instances share, so that a link works on each of them: in the memory of this
 * instance, and beyond it on a server for a time.
 */
export class SharedResults implements ResultStore {
  readonly #client: Redis;
  readonly #near: ResultStore;
  #restsUntil = 0;

  constructor({ client, near }: SharedResultsOptions) {
    this.#client = client;
    this.#near = near;
  }

  async keep(result: IdentifiedRequest): Promise<void> {
    await this.#near.keep(result);
    const text = Buffer.concat([Buffer.from(`${result.operation}\n`), result.request]);
    await this.#far(() => this.#client.set(requestKey(result.digest), text, 'EX', requestAge));
  }

  /** Every instance has the few that it links to. */
  async pin(result: IdentifiedRequest): Promise<void> {
    await this.#near.pin(result);
  }

  async find(digest: string): Promise<IdentifiedRequest | null> {
    const near = await this.#near.find(digest);
    if (near !== null) return near;
    const text = await this.#far(() => this.#client.getexBuffer(requestKey(digest), 'EX', requestAge));
    if (text === null) return null;
    const end = text.indexOf('\n');
    const operation = text.subarray(0, end).toString();
    const result = { operation, digest, request: Uint8Array.from(text.subarray(end + 1)) };
    await this.#near.keep(result);
    return result;
  }

  async keepAnswer(key: string, bytes: Uint8Array<ArrayBuffer>): Promise<void> {
    await this.#near.keepAnswer(key, bytes);
    if (bytes.byteLength > largestAnswer) return;
    await this.#far(() => this.#client.set(answerKey(key), Buffer.from(bytes), 'EX', answerAge));
  }

  async findAnswer(key: string): Promise<Uint8Array<ArrayBuffer> | null> {
    const near = await this.#near.findAnswer(key);
    if (near !== null) return near;
    const bytes = await this.#far(() => this.#client.getBuffer(answerKey(key)));
    return bytes === null ? null : Uint8Array.from(bytes);
  }

  /** What the server gives. @throws Fault `queue-unreachable`, at once while it rests */
  async #far<Value>(work: () => Promise<Value>): Promise<Value> {
    if (Date.now() < this.#restsUntil) throw fault('queue-unreachable', '');
    try {
      return await fromShared(work);
    } catch (error) {
      this.#restsUntil = Date.now() + rest;
      throw error;
    }
  }
}

const requestKey = (digest: string): string => `${keyPrefix}request:${digest}`;
const answerKey = (key: string): string => `${keyPrefix}answer:${key}`;

import { LRUCache } from 'lru-cache';
import type { IdentifiedRequest } from '../contract/identify-request.ts';
import type { ResultStore } from './result-store.ts';

export interface ResultBounds {
  /** Most requests kept, ≥ 1. */
  readonly requests: number;
  /** Bytes of all requests kept, > 0. */
  readonly requestBytes: number;
  /** Bytes of all answers kept; 0 keeps none. */
  readonly answerBytes: number;
}

/** Bytes that an entry costs beside its own, key and bookkeeping; estimated on the high side. */
const entryCost = 512;

/**
 * Results in the memory of this process: bounded by number and by bytes, the least recently used goes
 * first, all are forgotten at a restart. Requests and answers have bounds of their own: an answer that
 * has gone is computed again.
 */
export class EmbeddedResults implements ResultStore {
  readonly #pinned = new Map<string, IdentifiedRequest>();
  readonly #requests: LRUCache<string, IdentifiedRequest>;
  readonly #answers: LRUCache<string, Uint8Array<ArrayBuffer>> | null;

  constructor({ requests, requestBytes, answerBytes }: ResultBounds) {
    this.#requests = new LRUCache({
      max: requests,
      maxSize: requestBytes,
      sizeCalculation: ({ request }) => request.byteLength + entryCost,
    });
    // To the library a size of 0 means: without bound.
    this.#answers =
      answerBytes === 0
        ? null
        : new LRUCache({ maxSize: answerBytes, sizeCalculation: ({ byteLength }) => byteLength + entryCost });
  }

  /** Number of requests kept, pinned ones included, and bytes of requests and of answers. */
  get size(): { readonly requests: number; readonly requestBytes: number; readonly answerBytes: number } {
    return {
      requests: this.#requests.size + this.#pinned.size,
      requestBytes: this.#requests.calculatedSize,
      answerBytes: this.#answers?.calculatedSize ?? 0,
    };
  }

  async keep(result: IdentifiedRequest): Promise<void> {
    if (this.#pinned.has(result.digest)) return;
    // An equal request that is there already is only marked as used.
    if (this.#requests.get(result.digest) === undefined) this.#requests.set(result.digest, result);
  }

  async pin(result: IdentifiedRequest): Promise<void> {
    this.#requests.delete(result.digest);
    this.#pinned.set(result.digest, result);
  }

  async find(digest: string): Promise<IdentifiedRequest | null> {
    return this.#pinned.get(digest) ?? this.#requests.get(digest) ?? null;
  }

  async keepAnswer(key: string, bytes: Uint8Array<ArrayBuffer>): Promise<void> {
    this.#answers?.set(key, bytes);
  }

  async findAnswer(key: string): Promise<Uint8Array<ArrayBuffer> | null> {
    return this.#answers?.get(key) ?? null;
  }
}

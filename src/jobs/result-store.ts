import type { IdentifiedRequest } from '../contract/identify-request.ts';

/**
 * Where results are kept under their digests: the canonical request, from which the answer can always
 * be computed again, and for a while the bytes of answers. Asynchronous, so that it can be shared by
 * several instances.
 */
export interface ResultStore {
  /** Keeps a request, or marks it as used. */
  keep(result: IdentifiedRequest): Promise<void>;
  /** Keeps a request for ever, outside of all bounds: for the few that the service itself links to. */
  pin(result: IdentifiedRequest): Promise<void>;
  /** The request of a digest, null where none is kept. */
  find(digest: string): Promise<IdentifiedRequest | null>;
  /** Keeps the bytes of an answer; where they do not fit, they are dropped. The store never changes them. */
  keepAnswer(key: string, bytes: Uint8Array<ArrayBuffer>): Promise<void>;
  /** The bytes of an answer, null where they are not kept. The caller must not change them. */
  findAnswer(key: string): Promise<Uint8Array<ArrayBuffer> | null>;
}

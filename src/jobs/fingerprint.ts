import { createHash } from 'node:crypto';
import type { JobWork } from './job.ts';

/** Tells work from other work while it is read: a hash of where it was sent and of its bytes. */
export class Fingerprint {
  readonly #hash = createHash('sha256');

  constructor(work: JobWork) {
    this.#hash.update(work.kind === 'solve' ? `${work.operation}\n` : 'batches\n');
    if (work.kind === 'solve') this.#hash.update(work.body);
  }

  /** The pieces of a batch, unchanged. */
  async *over(source: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
    for await (const piece of source) {
      this.#hash.update(piece);
      yield piece;
    }
  }

  /** Once all has been read. */
  get value(): string {
    return this.#hash.copy().digest('base64url');
  }
}

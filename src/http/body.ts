import type { Readable } from 'node:stream';
import { fault } from '../faults/fault.ts';

/** Bytes set aside for a body before any has come: an announcement alone costs no more. */
const firstCapacity = 64 * 1024;

/**
 * The whole body of a request, in a buffer of its own. Chunks are copied as they arrive, so that
 * megabytes do not hold the event loop at the end all at once.
 *
 * @param payload the stream of the body
 * @param announced Content-Length, or undefined for a chunked body
 * @param limit largest body in bytes
 * @param seconds time that the body may take
 * @throws Fault `body-too-large`, as early as it is known, `request-timeout`, and `malformed-http` for a
 *   broken body
 */
export async function readBody(
  payload: Readable,
  announced: number | undefined,
  limit: number,
  seconds: number,
): Promise<Uint8Array<ArrayBuffer>> {
  const tooLarge = (): Error => fault('body-too-large', '', { limit });
  if (announced !== undefined && announced > limit) throw tooLarge();
  let bytes = new Uint8Array(new ArrayBuffer(Math.min(announced ?? firstCapacity, firstCapacity)));
  let length = 0;
  const tooSlow = fault('request-timeout', '', { seconds });
  const timer = setTimeout(() => payload.destroy(tooSlow), seconds * 1000);
  try {
    const chunks: AsyncIterable<Buffer> = payload.iterator({ destroyOnReturn: false });
    for await (const chunk of chunks) {
      const end = length + chunk.length;
      if (end > limit) {
        // Let the rest run out: a client that still sends would not see the answer.
        payload.resume();
        throw tooLarge();
      }
      if (end > bytes.length)
        bytes = grown(bytes, announced ?? Math.min(limit, Math.max(end, 2 * bytes.length)));
      bytes.set(chunk, length);
      length = end;
    }
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ECONNRESET') throw error;
    throw fault('malformed-http', '', { reason: 'the connection broke off inside the body' });
  } finally {
    clearTimeout(timer);
  }
  return bytes.subarray(0, length);
}

function grown(bytes: Uint8Array, capacity: number): Uint8Array<ArrayBuffer> {
  const larger = new Uint8Array(new ArrayBuffer(capacity));
  larger.set(bytes);
  return larger;
}

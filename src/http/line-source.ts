import type { Readable } from 'node:stream';
import { fault } from '../faults/fault.ts';

/**
 * The body of a batch as it comes, read only as fast as it is asked for. A client that is silent
 * although its lines could be taken does not hold its place for ever.
 *
 * @param payload the stream of the body
 * @param patience longest silence, s
 * @throws Fault `batch-stalled`, and `malformed-http` for a broken body
 */
export async function* lineSource(payload: Readable, patience: number): AsyncGenerator<Uint8Array> {
  const pieces = (payload.iterator({ destroyOnReturn: false }) as AsyncIterable<Buffer>)[
    Symbol.asyncIterator
  ]();
  for (;;) {
    const next = await soonEnough(pieces.next(), patience);
    if (next.done) return;
    yield next.value;
  }
}

async function soonEnough<Value>(work: Promise<Value>, seconds: number): Promise<Value> {
  let timer: NodeJS.Timeout | undefined;
  const silence = new Promise<never>((_resolve, reject) => {
    timer = setTimeout(() => reject(fault('batch-stalled', '', { seconds })), seconds * 1000);
  });
  try {
    return await Promise.race([work, silence]);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ECONNRESET') throw error;
    throw fault('malformed-http', '', { reason: 'the connection broke off inside the body' });
  } finally {
    clearTimeout(timer);
  }
}

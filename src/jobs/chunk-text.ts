import type { Line } from './split-lines.ts';

/** Most lines and bytes of a chunk: the part of a batch that one instance takes at a time. */
export const mostChunkLines = 32;
const mostChunkBytes = 256 * 1024;

/**
 * Lines gathered into chunks of nearly equal size.
 *
 * Cost: holds one chunk.
 */
export async function* cutChunks(lines: AsyncIterable<readonly Line[]>): AsyncGenerator<readonly Line[]> {
  let chunk: Line[] = [];
  let bytes = 0;
  for await (const some of lines) {
    for (const line of some) {
      chunk.push(line);
      bytes += line.bytes?.byteLength ?? 0;
      if (chunk.length < mostChunkLines && bytes < mostChunkBytes) continue;
      yield chunk;
      chunk = [];
      bytes = 0;
    }
  }
  if (chunk.length > 0) yield chunk;
}

/** A chunk as bytes: a first line with numbers and lengths (−1: too long, left out), then the lines. */
export function writeChunk(chunk: readonly Line[]): Buffer {
  const head = chunk.map(({ number, bytes }) => [number, bytes === null ? -1 : bytes.byteLength]);
  const lines = chunk.map(({ bytes }) => bytes ?? new Uint8Array(0));
  return Buffer.concat([Buffer.from(`${JSON.stringify(head)}\n`), ...lines]);
}

export function readChunk(text: Buffer): Line[] {
  let at = text.indexOf('\n') + 1;
  const head = JSON.parse(text.subarray(0, at).toString()) as [number: number, length: number][];
  return head.map(([number, length]) => {
    if (length < 0) return { number, bytes: null };
    at += length;
    return { number, bytes: text.subarray(at - length, at) };
  });
}

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cutChunks, mostChunkLines, readChunk, writeChunk } from '../../src/jobs/chunk-text.ts';
import { splitLines, type Line } from '../../src/jobs/split-lines.ts';

async function* pieces(parts: readonly Uint8Array[]): AsyncGenerator<Uint8Array> {
  yield* parts;
}

async function split(parts: readonly Uint8Array[], limit = 1000): Promise<Line[]> {
  const lines: Line[] = [];
  for await (const some of splitLines(pieces(parts), limit)) lines.push(...some);
  return lines;
}

const shown = (lines: readonly Line[]): [number, string | null][] =>
  lines.map(({ number, bytes }) => [number, bytes === null ? null : Buffer.from(bytes).toString()]);

describe('lines', () => {
  it('are the same however the text comes in pieces', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.string({ unit: fc.constantFrom('a', 'é', '\n', '\r', ' ', '\t', '{'), maxLength: 60 }),
        fc.array(fc.nat(70), { maxLength: 8 }),
        async (text, cuts) => {
          const bytes = Buffer.from(text);
          const at = [
            0,
            ...cuts.map((cut) => Math.min(cut, bytes.length)).toSorted((a, b) => a - b),
            bytes.length,
          ];
          const parts = at.slice(1).map((end, i) => bytes.subarray(at[i], end));
          const expected = text
            .split('\n')
            .map((line, i): [number, string] => [i + 1, line.replace(/\r$/, '')])
            .filter(([, line]) => /[^ \t\r]/.test(line));
          expect(shown(await split(parts))).toEqual(expected);
        },
      ),
      { numRuns: 500 },
    );
  });

  it('that are too long are told without being held', async () => {
    const parts = ['ab\n', 'x'.repeat(8), 'x'.repeat(8), '\ncd'].map((text) => Buffer.from(text));
    expect(shown(await split(parts, 10))).toEqual([
      [1, 'ab'],
      [2, null],
      [3, 'cd'],
    ]);
  });

  it('go into chunks and come out the same', async () => {
    const text = Array.from({ length: 100 }, (_, i) =>
      i % 7 === 3 ? '' : i === 50 ? 'y'.repeat(2000) : `{"é":${i}}`,
    );
    const lines = await split([Buffer.from(text.join('\n'))]);
    const chunks: (readonly Line[])[] = [];
    async function* source(): AsyncGenerator<readonly Line[]> {
      yield lines;
    }
    for await (const chunk of cutChunks(source())) chunks.push(chunk);
    expect(chunks.length).toBe(Math.ceil(lines.length / mostChunkLines));
    expect(shown(chunks.flatMap((chunk) => readChunk(writeChunk(chunk))))).toEqual(shown(lines));
    expect(lines.some(({ bytes }) => bytes === null)).toBe(true);
  });
});

import { describe, expect, it } from 'vitest';
import { identifyRequest, type IdentifiedRequest } from '../../src/contract/identify-request.ts';
import { EmbeddedResults, type ResultBounds } from '../../src/jobs/embedded-results.ts';
import { reachableBufferBytes } from './collect-garbage.ts';

const bounds: ResultBounds = { requests: 10, requestBytes: 1e6, answerBytes: 1e6 };
const result = (i: number, bytes = 10): IdentifiedRequest =>
  identifyRequest('modes', { i, text: 'x'.repeat(bytes) }, '1');
const answer = (i: number, bytes: number): Uint8Array<ArrayBuffer> => new Uint8Array(bytes).fill(i);
async function kept(store: EmbeddedResults, indices: readonly number[], bytes = 10): Promise<number[]> {
  const found = await Promise.all(indices.map((i) => store.find(result(i, bytes).digest)));
  return indices.filter((_, i) => found[i] !== null);
}
const upTo = (count: number): number[] => Array.from({ length: count }, (_, i) => i);

describe('the store of results in memory', () => {
  it('gives back what it keeps, and nothing for what it does not', async () => {
    const store = new EmbeddedResults(bounds);
    await store.keep(result(1));
    await store.keepAnswer('key', answer(1, 3));
    expect(await store.find(result(1).digest)).toEqual(result(1));
    expect(await store.findAnswer('key')).toEqual(answer(1, 3));
    expect([await store.find('nothing'), await store.findAnswer('nothing')]).toEqual([null, null]);
  });

  it('is bounded by number: the least recently used goes first', async () => {
    const store = new EmbeddedResults(bounds);
    for (const i of upTo(10)) await store.keep(result(i));
    await store.find(result(0).digest);
    await store.keep(result(1));
    for (const i of [10, 11]) await store.keep(result(i));
    expect(await kept(store, upTo(12))).toEqual([0, 1, 4, 5, 6, 7, 8, 9, 10, 11]);
  });

  it('is bounded by bytes, those of its own bookkeeping included', async () => {
    const store = new EmbeddedResults({ ...bounds, requests: 1000, requestBytes: 10_000 });
    for (const i of upTo(50)) await store.keep(result(i, 2000));
    expect(store.size.requestBytes).toBeLessThanOrEqual(10_000);
    expect(await kept(store, upTo(50), 2000)).toEqual([47, 48, 49]);
    await store.keep(result(60, 20_000));
    expect(await kept(store, [47, 48, 49], 2000)).toEqual([47, 48, 49]);
    expect(await kept(store, [60], 20_000)).toEqual([]);
  });

  it('bounds answers apart from requests, and keeps none where it may not', async () => {
    const store = new EmbeddedResults(bounds);
    await store.keep(result(1));
    for (const i of upTo(100)) await store.keepAnswer(String(i), answer(i, 100_000));
    expect(store.size.answerBytes).toBeLessThanOrEqual(1e6);
    expect(await store.findAnswer('99')).toEqual(answer(99, 100_000));
    expect(await store.findAnswer('0')).toBeNull();
    expect(await kept(store, [1])).toEqual([1]);
    const none = new EmbeddedResults({ ...bounds, answerBytes: 0 });
    await none.keepAnswer('a', answer(1, 10));
    expect([await none.findAnswer('a'), none.size.answerBytes]).toEqual([null, 0]);
  });

  it('never forgets what is pinned', async () => {
    const store = new EmbeddedResults({ ...bounds, requests: 2 });
    await store.keep(result(0));
    await store.pin(result(0));
    await store.pin(result(1));
    for (const i of upTo(40)) await store.keep(result(i));
    expect(await kept(store, upTo(40))).toEqual([0, 1, 38, 39]);
    expect(store.size.requests).toBe(4);
  });

  it('stays flat in memory while ten times its size goes through it, again and again', async () => {
    const mebibyte = 1024 * 1024;
    const store = new EmbeddedResults({
      requests: 1e6,
      requestBytes: 4 * mebibyte,
      answerBytes: 8 * mebibyte,
    });
    const before = reachableBufferBytes();
    const after: number[] = [];
    for (let round = 0; round < 4; round++) {
      for (let i = 0; i < 400; i++) {
        await store.keep(result(round * 1000 + i, 100_000));
        await store.keepAnswer(`${round} ${i}`, answer(i, 200_000));
      }
      expect(store.size.requestBytes).toBeLessThanOrEqual(4 * mebibyte);
      expect(store.size.answerBytes).toBeLessThanOrEqual(8 * mebibyte);
      after.push(reachableBufferBytes() - before);
    }
    // Full, and not beyond: 12 MiB and what the machine needs beside it.
    expect(Math.max(...after)).toBeLessThan(13 * mebibyte);
    expect(Math.min(...after)).toBeGreaterThan(10 * mebibyte);
  });
});

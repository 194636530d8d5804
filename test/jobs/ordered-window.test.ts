import { setTimeout as pause } from 'node:timers/promises';
import { describe, expect, it } from 'vitest';
import { orderedWindow } from '../../src/jobs/ordered-window.ts';

const bounds = { pieces: 3, bytes: 100, sizeOf: (result: number) => result };

/** Work with these sizes and times; what is begun and not taken is counted. */
function workOf(times: readonly number[], size = 1) {
  let begun = 0;
  return {
    get begun() {
      return begun;
    },
    begin: async () => {
      if (begun === times.length) return null;
      const time = times[begun++];
      return { work: pause(time).then(() => size) };
    },
  };
}

describe('an ordered window', () => {
  it('hands results on in the order of their beginning', async () => {
    let next = 0;
    const begin = async () => {
      if (next === 20) return null;
      const number = next++;
      return { work: pause((number * 7) % 5).then(() => number) };
    };
    const results: number[] = [];
    for await (const result of orderedWindow(begin, { ...bounds, sizeOf: () => 1 })) results.push(result);
    expect(results).toEqual(Array.from({ length: 20 }, (_, i) => i));
  });

  it('begins no more than it may hold, in pieces and in bytes', async () => {
    for (const [size, most] of [
      [1, 3],
      [60, 2],
      [500, 1],
    ]) {
      const work = workOf(Array<number>(10).fill(1), size);
      // Two at once cannot be told apart from one that is large before it is done.
      const window = orderedWindow(work.begin, { ...bounds, pieces: size === 500 ? 1 : 3 });
      let taken = 0;
      for (;;) {
        const { done } = await window.next();
        if (done) break;
        taken++;
        await pause(10);
        expect(work.begun - taken + 1).toBeLessThanOrEqual(size === 60 ? 3 : most);
      }
      expect(taken).toBe(10);
    }
  });

  it('hands on what is done while the next piece does not come', async () => {
    let asked = 0;
    const begin = () =>
      asked++ === 0 ? Promise.resolve({ work: Promise.resolve(7) }) : new Promise<null>(() => undefined);
    const window = orderedWindow(begin, bounds);
    expect(await window.next()).toEqual({ done: false, value: 7 });
    await window.return(undefined);
  });

  it('tells an error in its turn, and begins nothing afterwards', async () => {
    let begun = 0;
    const begin = async () => {
      const number = begun++;
      return { work: number === 2 ? Promise.reject(new Error('third')) : Promise.resolve(number) };
    };
    const window = orderedWindow(begin, bounds);
    expect((await window.next()).value).toBe(0);
    expect((await window.next()).value).toBe(1);
    await expect(window.next()).rejects.toThrow('third');
    const before = begun;
    await pause(20);
    expect(begun).toBe(before);
  });

  it('tells that the next piece could not begin once those before have been taken', async () => {
    let begun = 0;
    const begin = async () => {
      if (begun++ === 1) throw new Error('source');
      return { work: pause(20).then(() => 1) };
    };
    const window = orderedWindow(begin, bounds);
    expect((await window.next()).value).toBe(1);
    await expect(window.next()).rejects.toThrow('source');
  });
});

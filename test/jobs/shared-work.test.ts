import { describe, expect, it } from 'vitest';
import { SharedWork } from '../../src/jobs/shared-work.ts';

function trial() {
  const shared = new SharedWork<number>();
  const started: { signal: AbortSignal; finish: (value: number) => void; fail: (error: Error) => void }[] =
    [];
  const join = (key = 'a') =>
    shared.join(key, (signal) => new Promise((finish, fail) => started.push({ signal, finish, fail })));
  return { started, join };
}

describe('shared work', () => {
  it('is done once for all who want it at the same time, and again for who comes later', async () => {
    const { started, join } = trial();
    const places = [join(), join(), join('b')];
    expect(started).toHaveLength(2);
    started[0].finish(1);
    started[1].finish(2);
    expect(await Promise.all(places.map(({ work }) => work))).toEqual([1, 1, 2]);
    join();
    expect(started).toHaveLength(3);
  });

  it('is stopped when all have left, not before; who comes then starts anew', () => {
    const { started, join } = trial();
    const [first, second] = [join(), join()];
    first.leave();
    expect(started[0].signal.aborted).toBe(false);
    second.leave();
    expect(started[0].signal.aborted).toBe(true);
    join();
    expect(started).toHaveLength(2);
    expect(started[1].signal.aborted).toBe(false);
  });

  it('fails for all', async () => {
    const { started, join } = trial();
    const [first, second] = [join(), join()];
    started[0].fail(new Error('no'));
    await expect(first.work).rejects.toThrow('no');
    await expect(second.work).rejects.toThrow('no');
  });
});

import { setTimeout as pause } from 'node:timers/promises';
import { performance } from 'node:perf_hooks';
import { afterEach, describe, expect, it } from 'vitest';
import { plainJson } from '../../src/pool/answer-form.ts';
import { SolverPool, type SolverPoolOptions } from '../../src/pool/solver-pool.ts';
import { answerOf, ask, codesOf, startTrialPool, trialWorker } from './trial-pool.ts';

const pools: SolverPool[] = [];

async function startPool(options: Partial<SolverPoolOptions> = {}): Promise<SolverPool> {
  const pool = await startTrialPool(options);
  pools.push(pool);
  return pool;
}

afterEach(async () => {
  await Promise.all(pools.splice(0).map((pool) => pool.stop(0)));
});

describe('the solver pool', () => {
  it('answers a request with bytes made in a worker', async () => {
    const pool = await startPool();
    const outcome = await ask(pool, 'echo', { a: [1, 2.5] });
    expect(answerOf(outcome)).toEqual({ echo: { a: [1, 2.5] } });
  });

  it('reads a large body in the worker and reports its faults as the same records', async () => {
    const pool = await startPool();
    const run = (text: string) =>
      pool.run(
        {
          kind: 'body',
          operation: 'echo',
          body: new TextEncoder().encode(text),
          wanted: plainJson,
          version: '1',
        },
        { arrived: performance.now(), deadline: 30 },
      );
    expect(answerOf(await run('{"x":1}'))).toEqual({ echo: { x: 1 } });
    expect(await run('{"x":1')).toMatchObject({
      kind: 'faults',
      records: [{ code: 'malformed-json', pointer: '', detail: expect.stringContaining('column 7') }],
    });
    expect(codesOf(await run('{"refuse":true}'))).toEqual(['malformed-json']);
  });

  it('passes on faults of the solver and names a bug with its stack for the log', async () => {
    const pool = await startPool();
    expect(await ask(pool, 'refuse')).toMatchObject({
      kind: 'faults',
      records: [{ code: 'no-inertia', pointer: '/member' }],
    });
    expect(codesOf(await ask(pool, 'overflow'))).toEqual(['result-overflow']);
    const bug = await ask(pool, 'bug');
    expect(codesOf(bug)).toEqual(['internal-error']);
    expect(bug).toMatchObject({ cause: expect.stringContaining('trial-worker.js') });
  });

  it('keeps every core busy: two workers finish two solves in the time of one', async () => {
    const pool = await startPool({ workers: 2 });
    const threads = await Promise.all([1, 2].map(() => ask(pool, 'thread', { milliseconds: 100 })));
    expect(new Set(threads.map((outcome) => answerOf(outcome).threadId)).size).toBe(2);
  });

  it('serves first come, first served, also after a request has left the line', async () => {
    const pool = await startPool();
    const order: number[] = [];
    const leave = new AbortController();
    const line = [0, 1, 2, 3, 4, 5].map((i) =>
      ask(pool, 'busy', { milliseconds: 20 }, i === 2 ? { gone: leave.signal } : {}).then((outcome) => {
        order.push(outcome.kind === 'gone' ? -i : i);
      }),
    );
    leave.abort();
    await Promise.all(line);
    expect(order).toEqual([-2, 0, 1, 3, 4, 5]);
  });

  it('refuses at once what exceeds the line, and says when to come back', async () => {
    const pool = await startPool({ queueLimit: 2 });
    const accepted = [1, 2, 3].map(() => ask(pool, 'busy', { milliseconds: 50 }));
    const refused = await ask(pool, 'busy', { milliseconds: 50 });
    expect([pool.running, pool.waiting]).toEqual([1, 2]);
    expect(refused).toMatchObject({
      records: [{ code: 'queue-full', detail: expect.stringContaining('2 requests') }],
    });
    expect(pool.retryAfter).toBeGreaterThanOrEqual(1);
    expect((await Promise.all(accepted)).map((outcome) => outcome.kind)).toEqual([
      'answer',
      'answer',
      'answer',
    ]);
  });

  it('takes no line at all with a queue limit of 0', async () => {
    const pool = await startPool({ queueLimit: 0 });
    const first = ask(pool, 'busy', { milliseconds: 50 });
    expect(codesOf(await ask(pool, 'echo'))).toEqual(['queue-full']);
    expect((await first).kind).toBe('answer');
    expect((await ask(pool, 'echo')).kind).toBe('answer');
  });

  it('ends a solve at its deadline, counted from arrival, and serves the next request', async () => {
    const pool = await startPool();
    const started = performance.now();
    const [slow, waiting] = await Promise.all([
      ask(pool, 'busy', { milliseconds: 60_000 }, { deadline: 0.2 }),
      ask(pool, 'echo', {}, { deadline: 0.1 }),
    ]);
    expect(codesOf(slow)).toEqual(['deadline-exceeded']);
    expect(codesOf(waiting)).toEqual(['deadline-exceeded']);
    expect(performance.now() - started).toBeLessThan(5_000);
    expect((await ask(pool, 'echo')).kind).toBe('answer');
  });

  it('frees the worker when the client has gone, running or waiting', async () => {
    const pool = await startPool();
    const leave = new AbortController();
    const running = ask(pool, 'busy', { milliseconds: 60_000 }, { gone: leave.signal });
    const waiting = ask(pool, 'echo', {}, { gone: leave.signal });
    expect([pool.running, pool.waiting]).toEqual([1, 1]);
    await pause(50);
    leave.abort();
    expect(await Promise.all([running, waiting])).toEqual([{ kind: 'gone' }, { kind: 'gone' }]);
    expect(pool.waiting).toBe(0);
    expect((await ask(pool, 'echo')).kind).toBe('answer');
    expect((await ask(pool, 'echo', {}, { gone: AbortSignal.abort() })).kind).toBe('gone');
  });

  it('lets a worker finish what it is nearly done with, and keeps it; one at a long solve is replaced', async () => {
    const pool = await startPool();
    const thread = async () => answerOf(await ask(pool, 'thread')).threadId;
    const leaveDuring = async (milliseconds: number) => {
      const leave = new AbortController();
      const solve = ask(pool, 'busy', { milliseconds }, { gone: leave.signal });
      await pause(20);
      leave.abort();
      expect(await solve).toEqual({ kind: 'gone' });
    };
    const first = await thread();
    await leaveDuring(80);
    expect(await thread()).toBe(first);
    const started = performance.now();
    await leaveDuring(60_000);
    expect(await thread()).not.toBe(first);
    expect(performance.now() - started).toBeLessThan(5_000);
  });

  it('replaces a worker that exits', async () => {
    const pool = await startPool();
    const crashed = await ask(pool, 'exit');
    expect(codesOf(crashed)).toEqual(['solver-crashed']);
    expect(crashed).toMatchObject({ cause: expect.stringContaining('code: 3') });
    expect((await ask(pool, 'echo')).kind).toBe('answer');
  });

  it('replaces a worker that throws outside its task', async () => {
    const errors: Error[] = [];
    const pool = await startPool({ onWorkerError: (error) => errors.push(error) });
    await ask(pool, 'throwLater');
    for (let i = 0; i < 3; i++) expect(['answer', 'faults']).toContain((await ask(pool, 'echo')).kind);
    expect((await ask(pool, 'echo')).kind).toBe('answer');
  });

  it('replaces a worker that runs out of heap; the others and the process go on', async () => {
    const pool = await startPool({ workers: 2, memoryLimit: 24 });
    const [hungry, calm] = await Promise.all([ask(pool, 'heap'), ask(pool, 'busy', { milliseconds: 100 })]);
    expect(codesOf(hungry)).toEqual(['solver-out-of-memory']);
    expect(calm.kind).toBe('answer');
    const after = await Promise.all([ask(pool, 'echo'), ask(pool, 'echo')]);
    expect(after.map((outcome) => outcome.kind)).toEqual(['answer', 'answer']);
  });

  it('calls an impossible typed array what it is: out of memory', async () => {
    const pool = await startPool();
    expect(codesOf(await ask(pool, 'buffers'))).toEqual(['solver-out-of-memory']);
  });

  it('survives many crashes', async () => {
    const pool = await startPool();
    for (let i = 0; i < 25; i++) {
      expect(codesOf(await ask(pool, 'exit'))).toEqual(['solver-crashed']);
    }
    expect((await ask(pool, 'echo')).kind).toBe('answer');
  });

  it('lets work under way finish when it is stopped, and refuses new work', async () => {
    const pool = await startPool();
    const running = ask(pool, 'busy', { milliseconds: 100 });
    const waiting = ask(pool, 'busy', { milliseconds: 100 });
    const stopped = pool.stop(10);
    expect(codesOf(await ask(pool, 'echo'))).toEqual(['stopping']);
    expect(pool.isReady).toBe(false);
    expect((await running).kind).toBe('answer');
    expect((await waiting).kind).toBe('answer');
    await stopped;
  });

  it('refuses what is not done when the grace is over', async () => {
    const pool = await startPool();
    const running = ask(pool, 'busy', { milliseconds: 60_000 });
    const waiting = ask(pool, 'echo');
    const started = performance.now();
    await pool.stop(0.1);
    expect(performance.now() - started).toBeLessThan(5_000);
    expect([await running, await waiting].map(codesOf)).toEqual([['stopping'], ['stopping']]);
  });

  it('is not ready before its workers are, and says so when they cannot load', async () => {
    const pool = new SolverPool({
      workerFile: trialWorker.replace('trial-worker', 'no-such-worker'),
      workers: 1,
      queueLimit: 1,
      memoryLimit: 64,
      onWorkerError: () => undefined,
    });
    pools.push(pool);
    expect(pool.isReady).toBe(false);
    await expect(pool.start()).rejects.toThrow(/no-such-worker/);
    expect(pool.isReady).toBe(false);
  });

  it('gives the same bytes from every worker', async () => {
    const pool = await startPool({ workers: 2 });
    const outcomes = await Promise.all(
      Array.from({ length: 8 }, () => ask(pool, 'numbers', { count: 5000 })),
    );
    const texts = new Set(outcomes.map((outcome) => JSON.stringify(answerOf(outcome))));
    expect(texts.size).toBe(1);
  });
});

import { performance } from 'node:perf_hooks';
import { setTimeout as pause } from 'node:timers/promises';
import { afterEach, describe, expect, it } from 'vitest';
import { batchOf, linesOf, OpenBatch, postBatch } from './batch-client.ts';
import { startTrialService, type TrialOptions, type TrialService } from './trial-service.ts';

const services: TrialService[] = [];

async function start(options: TrialOptions = {}): Promise<TrialService> {
  const service = await startTrialService(options);
  services.push(service);
  return service;
}

afterEach(async () => {
  await Promise.all(services.splice(0).map(({ app }) => app.close()));
});

async function until(condition: () => boolean): Promise<void> {
  const end = performance.now() + 10_000;
  while (!condition()) {
    if (performance.now() > end) throw new Error('the awaited state did not come');
    await pause(5);
  }
}

const line = (id: string, request: object = {}, operation = 'modes'): object => ({ id, operation, request });
const many = (count: number, request: object = {}): object[] =>
  Array.from({ length: count }, (_, i) => line(`m${i}`, { i, ...request }));

describe('a batch', () => {
  it('is answered line by line, in order, with the bytes of a single answer', async () => {
    const { url, post } = await start({ pool: { workers: 2 } });
    // The first is the slowest: its answer comes first all the same.
    const lines = [line('slow', { do: 'busy', milliseconds: 300 }), ...many(400)];
    const response = await postBatch(url, lines);
    expect(response.status).toBe(200);
    expect(response.headers.get('content-type')).toBe('application/x-ndjson');
    expect(response.headers.get('cache-control')).toBe('no-store');
    const text = await response.text();
    const answers = linesOf(text);
    expect(answers.map(({ id }) => id)).toEqual(['slow', ...many(400).map((_, i) => `m${i}`)]);
    expect(answers.every(({ status }) => status === 200)).toBe(true);
    const single = await (await post('/v1/modes', { i: 7 })).text();
    expect(text.split('\n')[8]).toBe(`{"id":"m7","status":200,"answer":${single}}`);
  });

  it('gives a bad line an error of its own, with its number and pointers into it, and goes on', async () => {
    const { url } = await start({ app: { bodyLimit: 1000 } });
    const response = await postBatch(url, [
      line('first'),
      '',
      '{"id": "torn", "operation"',
      line('unknown', {}, 'toString'),
      { id: 'keys', operation: 'modes', request: {}, extra: 1 },
      { operation: 'modes', request: {} },
      '[1]',
      '  \t',
      line('refused', { refuse: true }),
      line('physics', { do: 'refuse' }),
      `{"id":"long","request":"${'x'.repeat(1000)}"}`,
      '{"id":"latin","x":"\u0001"}',
      { id: '', operation: 5 },
      line('last'),
    ]);
    const answers = linesOf(await response.text());
    expect(
      answers.map(({ id, status, problem }) => [
        id,
        status,
        problem?.line,
        problem?.errors.map(({ code, pointer }) => `${code} ${pointer}`),
      ]),
    ).toEqual([
      ['first', 200, undefined, undefined],
      [null, 400, 3, ['malformed-json ']],
      ['unknown', 400, 4, ['not-one-of /operation']],
      ['keys', 400, 5, ['unknown-key /extra']],
      [null, 400, 6, ['missing-key /id']],
      [null, 400, 7, ['wrong-type ']],
      ['refused', 400, 9, ['malformed-json /request/refuse']],
      ['physics', 422, 10, ['no-inertia /request/member']],
      [null, 413, 11, ['line-too-long ']],
      [null, 400, 12, ['malformed-json ']],
      ['', 400, 13, ['missing-key /request', 'text-length /id', 'wrong-type /operation']],
      ['last', 200, undefined, undefined],
    ]);
    expect(answers[1].problem!.detail).toMatch(/^Line 3, column \d+/);
    expect(answers[2].problem!.detail).toContain('modes');
  });

  it('spares the other lines a crash, an exhausted memory and a deadline', async () => {
    const { url } = await start({ pool: { memoryLimit: 24 }, app: { solveDeadline: 5 } });
    const lines = [
      ...many(40),
      line('exit', { do: 'exit' }),
      line('bug', { do: 'bug' }),
      line('heap', { do: 'heap' }),
      line('late', { do: 'busy', milliseconds: 60_000 }),
      ...many(5),
    ];
    const answers = linesOf(await (await postBatch(url, lines)).text());
    expect(answers).toHaveLength(lines.length);
    const failed = answers.filter(({ status }) => status !== 200);
    expect(failed.map(({ id, status, problem }) => [id, status, problem!.code])).toEqual([
      ['exit', 500, 'solver-crashed'],
      ['bug', 500, 'internal-error'],
      ['heap', 500, 'solver-out-of-memory'],
      ['late', 504, 'deadline-exceeded'],
    ]);
  });

  it('answers while lines still come, each as soon as it is there', async () => {
    const { url } = await start();
    const batch = new OpenBatch(url);
    for (const id of ['a', 'b', 'c']) {
      await batch.send(`${JSON.stringify(line(id))}\r\n`);
      expect(await batch.next()).toMatchObject({ id, status: 200 });
    }
    batch.request.end(JSON.stringify(line('d')));
    expect(await batch.next()).toMatchObject({ id: 'd', status: 200 });
    expect(await batch.next()).toBeNull();
  });

  it('reads lines only as fast as answers are taken', async () => {
    const { url } = await start();
    const batch = new OpenBatch(url);
    let sent = 0;
    let finished = false;
    const total = 1000;
    // An answer has 20 kB, so that all of them would be 20 MB.
    const sending = (async () => {
      for (; sent < total; sent++) {
        await batch.send(`${JSON.stringify(line(`m${sent}`, { pad: 'x'.repeat(20_000) }))}\n`);
      }
      batch.request.end();
      finished = true;
    })();
    await batch.next();
    let before = -1;
    while (before !== sent) {
      before = sent;
      await pause(500);
    }
    expect(finished).toBe(false);
    let answers = 1;
    while ((await batch.next()) !== null) answers++;
    await sending;
    expect(answers).toBe(total);
  });

  it('stops when its client leaves', async () => {
    const { url, pool, post } = await start({ pool: { workers: 2 } });
    const batch = new OpenBatch(url);
    await batch.send(batchOf(many(50, { do: 'busy', milliseconds: 60_000 })));
    await batch.send('\n');
    await until(() => pool.running === 2);
    batch.request.destroy();
    const left = performance.now();
    await until(() => pool.running === 0);
    expect(performance.now() - left).toBeLessThan(1000);
    expect((await post('/v1/modes', {})).status).toBe(200);
  });

  it('lets single requests pass, and is not kept from going on by them', async () => {
    const { url, post } = await start({ pool: { queueLimit: 2 } });
    const batch = postBatch(url, many(60, { do: 'busy', milliseconds: 30 }));
    await pause(200);
    const started = performance.now();
    for (let i = 0; i < 5; i++) expect((await post('/v1/modes', {})).status).toBe(200);
    // Each waits for one line at most, of the 60 that are there.
    expect(performance.now() - started).toBeLessThan(1000);
    const state = { open: true };
    const flood = async (): Promise<void> => {
      while (state.open) expect((await post('/v1/modes', { do: 'busy', milliseconds: 5 })).status).toBe(200);
    };
    const floods = [flood(), flood()];
    expect(linesOf(await (await batch).text())).toHaveLength(60);
    state.open = false;
    await Promise.all(floods);
  });

  it('has at most 100,000 lines', { timeout: 120_000 }, async () => {
    const { url } = await start({ pool: { workers: 2 } });
    const lines = Array<string>(100_002).fill('{"id":"a","operation":"echo","request":1}');
    const response = await postBatch(url, lines);
    const text = await response.text();
    const last = linesOf(text.slice(text.lastIndexOf('\n', text.length - 2) + 1))[0];
    expect(text.split('\n')).toHaveLength(100_002);
    expect([last.id, last.status, last.problem!.code, last.problem!.line]).toEqual([
      null,
      413,
      'too-many-lines',
      100_001,
    ]);
  });

  it('is refused as a whole where it is empty, of another type, or one too many', async () => {
    const { url, pool } = await start({ app: { batchLimit: 1 } });
    const code = async (response: Response): Promise<unknown[]> => [
      response.status,
      ((await response.json()) as { code: string }).code,
    ];
    expect(await code(await postBatch(url, '\n \n'))).toEqual([400, 'empty-body']);
    const json = await postBatch(url, [line('a')], { 'content-type': 'application/json' });
    expect(json.headers.get('accept')).toBe('application/x-ndjson');
    expect(await code(json)).toEqual([415, 'unsupported-media-type']);
    expect(await code(await postBatch(url, [line('a')], { accept: 'application/json' }))).toEqual([
      406,
      'not-acceptable',
    ]);
    const open = new OpenBatch(url);
    await open.send(`${JSON.stringify(line('busy', { do: 'busy', milliseconds: 300 }))}\n`);
    await until(() => pool.running === 1);
    const refused = await postBatch(url, [line('a')]);
    expect(refused.headers.get('retry-after')).toMatch(/^\d+$/);
    expect(await code(refused)).toEqual([503, 'too-many-batches']);
    open.request.end();
    while ((await open.next()) !== null);
    expect((await postBatch(url, [line('a')])).status).toBe(200);
  });

  it('says from which line on it was not answered when the service stops', async () => {
    const { url, app, pool } = await start({ app: { stopGrace: 5 } });
    const batch = postBatch(url, many(100, { do: 'busy', milliseconds: 50 }));
    await until(() => pool.running === 1);
    await pause(300);
    await app.close();
    const answers = linesOf(await (await batch).text());
    const last = answers.at(-1)!;
    expect([last.status, last.problem!.code]).toEqual([503, 'stopping']);
    expect(answers.slice(0, -1).every(({ status }) => status === 200)).toBe(true);
    expect(last.problem!.line).toBe(answers.length);
  });
});

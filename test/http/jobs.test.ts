import { performance } from 'node:perf_hooks';
import { setTimeout as pause } from 'node:timers/promises';
import { EventSource } from 'eventsource';
import { afterEach, describe, expect, it } from 'vitest';
import { EmbeddedJobs, type JobBounds } from '../../src/jobs/embedded-jobs.ts';
import type { JobAnswer } from '../../src/spec/types.ts';
import { postBatch } from './batch-client.ts';
import { startTrialService, type TrialOptions, type TrialService } from './trial-service.ts';

const services: TrialService[] = [];

async function start(options: TrialOptions = {}): Promise<TrialService> {
  const service = await startTrialService(options);
  services.push(service);
  return service;
}

/** Jobs with other bounds. */
const bounded = (bounds: Partial<JobBounds>): TrialOptions => ({
  app: {
    makeJobs: (solver, onError) =>
      new EmbeddedJobs({ bounds: { count: 100, bytes: 1e7, age: 60, ...bounds }, solver, onError }),
  },
});

afterEach(async () => {
  await Promise.all(services.splice(0).map(({ app }) => app.close()));
});

const later = { prefer: 'respond-async' };
const lines = (count: number, request: object = {}): object[] =>
  Array.from({ length: count }, (_, i) => ({ id: `m${i}`, operation: 'modes', request: { i, ...request } }));

async function jobOf(response: Response): Promise<JobAnswer> {
  expect([response.status, response.headers.get('preference-applied')]).toEqual([202, 'respond-async']);
  const job = (await response.json()) as JobAnswer;
  expect(response.headers.get('location')).toBe(job.links.self);
  return job;
}

const look = async (url: string, { links }: JobAnswer): Promise<JobAnswer> =>
  (await (await fetch(url + links.self)).json()) as JobAnswer;

async function reach(url: string, job: JobAnswer, wanted: (job: JobAnswer) => boolean): Promise<JobAnswer> {
  const end = performance.now() + 20_000;
  for (;;) {
    const now = await look(url, job);
    if (wanted(now)) return now;
    if (performance.now() > end) throw new Error(`the job stays ${JSON.stringify(now)}`);
    await pause(10);
  }
}

const finished = ({ state }: JobAnswer): boolean => state !== 'queued' && state !== 'running';

async function problemOf(response: Response): Promise<[number, string]> {
  expect(response.headers.get('content-type')).toBe('application/problem+json');
  return [response.status, ((await response.json()) as { code: string }).code];
}

describe('a solve as a job', () => {
  it('is taken with 202 and has the answer of a direct solve as its result, in every form', async () => {
    const { url, post } = await start();
    const job = await jobOf(await post('/v1/modes', { i: 1 }, { prefer: 'Respond-Async, wait=5' }));
    const done = await reach(url, job, finished);
    expect(done).toMatchObject({ state: 'succeeded', progress: { done: 1, total: 1 } });
    expect(Date.parse(done.finished!)).toBeGreaterThanOrEqual(Date.parse(done.started!));
    expect(Date.parse(done.started!)).toBeGreaterThanOrEqual(Date.parse(done.submitted));
    const result = await fetch(url + job.links.result);
    const direct = await post('/v1/modes', { i: 1 });
    expect(await result.text()).toBe(await direct.text());
    for (const name of ['etag', 'content-location', 'content-type']) {
      expect(result.headers.get(name)).toBe(direct.headers.get(name));
    }
    const table = await fetch(`${url}${job.links.result}?format=svg`);
    // The answers of the trial worker are no modes: what matters is that the form is negotiated.
    expect(table.status).not.toBe(200);
    expect((await fetch(`${url}${job.links.result}?format=none`)).status).toBe(400);
  });

  it('is refused at once where its request is wrong, and fails with the problem where the physics is', async () => {
    const { url, post } = await start();
    expect(await problemOf(await post('/v1/modes', { refuse: true }, later))).toEqual([422, 'no-inertia']);
    const job = await jobOf(await post('/v1/modes', { do: 'refuse' }, later));
    expect((await reach(url, job, finished)).state).toBe('failed');
    expect(await problemOf(await fetch(url + job.links.result))).toEqual([422, 'no-inertia']);
  });

  it('has no result before it is finished, and says what to do', async () => {
    const { url, post } = await start();
    const job = await jobOf(await post('/v1/modes', { do: 'busy', milliseconds: 500 }, later));
    const early = await fetch(url + job.links.result);
    expect(early.headers.get('retry-after')).toBe('1');
    const problem = (await early.json()) as { detail: string; code: string };
    expect([early.status, problem.code]).toEqual([409, 'job-not-finished']);
    expect(problem.detail).toContain(job.links.events);
    await reach(url, job, finished);
    expect((await fetch(url + job.links.result)).status).toBe(200);
    expect(await problemOf(await fetch(`${url}/v1/jobs/none`))).toEqual([404, 'job-not-found']);
    expect(await problemOf(await fetch(`${url}/v1/jobs/none/events`))).toEqual([404, 'job-not-found']);
    expect(await problemOf(await fetch(`${url}/v1/jobs/none`, { method: 'DELETE' }))).toEqual([
      404,
      'job-not-found',
    ]);
  });
});

describe('a batch as a job', () => {
  it('has the same bytes as the batch answered directly', async () => {
    const { url } = await start({ pool: { workers: 2 } });
    const all = [...lines(200), 'no JSON', '', ...lines(3, { do: 'refuse' })];
    const job = await jobOf(await postBatch(url, all, later));
    expect(job.progress.total).toBe(204);
    const done = await reach(url, job, finished);
    expect(done).toMatchObject({ state: 'succeeded', progress: { done: 204, total: 204 } });
    const result = await fetch(url + job.links.result);
    expect(result.headers.get('content-type')).toBe('application/x-ndjson');
    expect(await result.text()).toBe(await (await postBatch(url, all)).text());
    expect((await fetch(url + job.links.result, { headers: { accept: 'text/csv' } })).status).toBe(406);
  });

  it('is cancelled by DELETE, running work within 200 ms', { retry: 2 }, async () => {
    const { url, pool } = await start({ pool: { workers: 2 } });
    const job = await jobOf(await postBatch(url, lines(50, { do: 'busy', milliseconds: 60_000 }), later));
    await reach(url, job, ({ state }) => state === 'running');
    const asked = performance.now();
    const answer = await fetch(url + job.links.self, { method: 'DELETE' });
    expect(((await answer.json()) as JobAnswer).state).toBe('cancelled');
    while (pool.running > 0) await pause(2);
    expect(performance.now() - asked).toBeLessThan(200);
    expect(await problemOf(await fetch(url + job.links.result))).toEqual([404, 'job-cancelled']);
    const again = await fetch(url + job.links.self, { method: 'DELETE' });
    expect(((await again.json()) as JobAnswer).state).toBe('cancelled');
  });

  it('is the same job when it is sent again with its Idempotency-Key, and no other work is', async () => {
    const { url, post } = await start();
    const key = { ...later, 'idempotency-key': '"8e03978e-40d5-43e8-bc93-6894a57f9324"' };
    const first = await jobOf(await postBatch(url, lines(3), key));
    const bare = { ...later, 'idempotency-key': '8e03978e-40d5-43e8-bc93-6894a57f9324' };
    expect((await jobOf(await postBatch(url, lines(3), bare))).id).toBe(first.id);
    expect(await problemOf(await postBatch(url, lines(4), key))).toEqual([422, 'idempotency-key-reused']);
    expect(await problemOf(await post('/v1/modes', {}, key))).toEqual([422, 'idempotency-key-reused']);
    expect((await jobOf(await postBatch(url, lines(3), later))).id).not.toBe(first.id);
    const malformed = { ...later, 'idempotency-key': 'two words' };
    expect(await problemOf(await postBatch(url, lines(3), malformed))).toEqual([
      400,
      'idempotency-key-malformed',
    ]);
    const solve = { ...later, 'idempotency-key': 'solve' };
    const solves = await Promise.all([1, 2].map(async () => jobOf(await post('/v1/modes', { i: 5 }, solve))));
    expect(solves[0].id).toBe(solves[1].id);
    expect(await problemOf(await post('/v1/responses', { i: 5 }, solve))).toEqual([
      422,
      'idempotency-key-reused',
    ]);
  });

  it('is refused as a whole where it has no line or too many', { timeout: 120_000 }, async () => {
    const { url } = await start();
    expect(await problemOf(await postBatch(url, '\n', later))).toEqual([400, 'empty-body']);
    const tooMany = '{"id":"a","operation":"echo","request":1}\n'.repeat(100_001);
    expect(await problemOf(await postBatch(url, tooMany, later))).toEqual([413, 'too-many-lines']);
  });
});

describe('the jobs of a process', () => {
  it('make room for new ones when they are finished, and are refused while none is', async () => {
    const { url, post } = await start(bounded({ count: 2 }));
    const jobs: JobAnswer[] = [];
    for (const i of [1, 2, 3]) {
      jobs.push(await jobOf(await post('/v1/modes', { i }, later)));
      await reach(url, jobs.at(-1)!, finished);
    }
    expect((await fetch(url + jobs[0].links.self)).status).toBe(404);
    expect((await fetch(url + jobs[1].links.self)).status).toBe(200);
    const busy = { do: 'busy', milliseconds: 400 };
    for (const i of [1, 2]) await jobOf(await post('/v1/modes', { i, ...busy }, later));
    const refused = await post('/v1/modes', busy, later);
    expect(refused.headers.get('retry-after')).toMatch(/^\d+$/);
    expect(await problemOf(refused)).toEqual([503, 'jobs-full']);
  });

  it('are bounded in bytes, what they were asked and what they answer', async () => {
    const { url } = await start(bounded({ bytes: 20_000 }));
    const wide = await postBatch(url, lines(30, { pad: 'x'.repeat(1000) }), later);
    expect(await problemOf(wide)).toEqual([413, 'body-too-large']);
    const job = await jobOf(await postBatch(url, lines(10, { do: 'numbers', count: 1000 }), later));
    expect((await reach(url, job, finished)).state).toBe('failed');
    expect(await problemOf(await fetch(url + job.links.result))).toEqual([422, 'job-result-too-large']);
    for (let i = 0; i < 5; i++) {
      const small = await jobOf(await postBatch(url, lines(10, { pad: 'x'.repeat(500) }), later));
      expect((await reach(url, small, finished)).state).toBe('succeeded');
    }
  });

  it('are forgotten when their time is over', async () => {
    const { url, post } = await start(bounded({ age: 1 }));
    const job = await jobOf(await post('/v1/modes', {}, later));
    await reach(url, job, finished);
    await pause(1200);
    expect(await problemOf(await fetch(url + job.links.self))).toEqual([404, 'job-not-found']);
  });
});

interface Seen {
  readonly type: string;
  readonly id: string;
  readonly job: JobAnswer;
}

/** Everything that an EventSource is told until the end. */
function follow(url: string): {
  readonly seen: Seen[];
  readonly ended: Promise<void>;
  readonly close: () => void;
} {
  const source = new EventSource(url);
  const seen: Seen[] = [];
  const ended = new Promise<void>((resolve) => {
    for (const type of ['progress', 'end']) {
      source.addEventListener(type, ({ data, lastEventId: id }) => {
        seen.push({ type, id, job: JSON.parse(String(data)) as JobAnswer });
        if (type === 'end') resolve();
      });
    }
  });
  return { seen, ended, close: () => source.close() };
}

describe('the events of a job', () => {
  it('reach an EventSource: progress never goes back and ends at all of it, then the end', async () => {
    const { url } = await start({ pool: { workers: 2 } });
    const job = await jobOf(await postBatch(url, lines(40, { do: 'busy', milliseconds: 50 }), later));
    const { seen, ended, close } = follow(url + job.links.events);
    await ended;
    const progress = seen.filter(({ type }) => type === 'progress');
    const done = progress.map(({ job: { progress: now } }) => now.done);
    expect(done.length).toBeGreaterThan(3);
    expect(done).toEqual(done.toSorted((a, b) => a - b));
    expect(done.at(-1)).toBe(40);
    expect(seen.at(-1)).toMatchObject({ type: 'end', id: 'end', job: { state: 'succeeded' } });
    const estimates = progress
      .map(({ job: { progress: now } }) => now.secondsLeft)
      .filter((s) => s !== undefined);
    expect(estimates.length).toBeGreaterThan(0);
    // It comes back after the end, is told 204, and stays away.
    await pause(1500);
    expect(seen.filter(({ type }) => type === 'end')).toHaveLength(1);
    close();
  });

  it('go on where a client has left off', async () => {
    const { url } = await start();
    const job = await jobOf(await postBatch(url, lines(6), later));
    await reach(url, job, finished);
    const ask = (last: string): Promise<Response> =>
      fetch(url + job.links.events, { headers: { 'last-event-id': last } });
    const text = await (await ask('3')).text();
    expect(text.match(/^id: .*$/gm)).toEqual(['id: 6', 'id: end']);
    expect((await (await ask('6')).text()).match(/^id: .*$/gm)).toEqual(['id: end']);
    expect((await ask('end')).status).toBe(204);
    expect((await (await ask('nonsense')).text()).match(/^event: .*$/gm)).toEqual([
      'event: progress',
      'event: end',
    ]);
  });

  it('tell of a cancelled job', async () => {
    const { url } = await start();
    const job = await jobOf(await postBatch(url, lines(9, { do: 'busy', milliseconds: 60_000 }), later));
    const { seen, ended, close } = follow(url + job.links.events);
    await reach(url, job, ({ state }) => state === 'running');
    await fetch(url + job.links.self, { method: 'DELETE' });
    await ended;
    expect(seen.at(-1)!.job.state).toBe('cancelled');
    close();
  });
});

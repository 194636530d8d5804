import { performance } from 'node:perf_hooks';
import { setTimeout as pause } from 'node:timers/promises';
import { afterEach, describe, expect, it } from 'vitest';
import type { JobAnswer } from '../../src/spec/types.ts';
import { batchOf, linesOf, postBatch } from '../http/batch-client.ts';
import { startServiceProcess, type ServiceProcess } from '../http/service-process.ts';
import { howToInstall, redisIsHere, RedisServer } from './redis-server.ts';

if (!redisIsHere) process.stderr.write(`\nSKIPPED: jobs that instances share. ${howToInstall}\n`);

const later = { prefer: 'respond-async' };
const member = (i: number): object => ({
  kind: 'cable',
  tension: 1e6 + 1000 * i,
  segments: [{ length: 40, massPerLength: 50 }],
  ends: { near: { type: 'fixed' }, far: { type: 'fixed' } },
});

/** Lines that take a solver some milliseconds, with some that are wrong. */
function lines(count: number, modes = 3): unknown[] {
  return Array.from({ length: count }, (_, i) =>
    i % 97 === 50
      ? `{"id":"torn${i}"`
      : { id: `m${i}`, operation: 'modes', request: { member: member(i), series: { modes } } },
  );
}

const services: ServiceProcess[] = [];
const servers: RedisServer[] = [];

async function replica(url: string): Promise<ServiceProcess> {
  const service = await startServiceProcess({ QUEUE_URL: url, WORKERS: '1', LOG_LEVEL: 'info' });
  services.push(service);
  return service;
}

async function server(): Promise<RedisServer> {
  const made = await RedisServer.make();
  servers.push(made);
  return made;
}

afterEach(async () => {
  for (const { child } of services.splice(0)) if (child.exitCode === null) child.kill('SIGKILL');
  await Promise.all(servers.splice(0).map((made) => made.remove()));
});

const finished = ({ state }: JobAnswer): boolean => state !== 'queued' && state !== 'running';

async function jobOf(response: Response): Promise<JobAnswer> {
  expect(response.status).toBe(202);
  return (await response.json()) as JobAnswer;
}

async function reach(
  service: ServiceProcess,
  { links }: JobAnswer,
  wanted: (job: JobAnswer) => boolean,
): Promise<JobAnswer> {
  const end = performance.now() + 120_000;
  let seen = 'nothing';
  while (performance.now() < end) {
    const response = await fetch(service.url + links.self);
    const job = (await response.json()) as JobAnswer;
    seen = JSON.stringify(job);
    if (response.status === 200 && wanted(job)) return job;
    await pause(50);
  }
  throw new Error(`the job stays ${seen}`);
}

async function until(condition: () => Promise<boolean>): Promise<void> {
  const end = performance.now() + 30_000;
  while (!(await condition())) {
    if (performance.now() > end) throw new Error('the awaited state did not come');
    await pause(5);
  }
}

async function codeOf(response: Response): Promise<unknown[]> {
  return [response.status, ((await response.json()) as { code: string }).code];
}

describe.runIf(redisIsHere)('jobs that instances share', { timeout: 300_000 }, () => {
  it('lose nothing when one of three is killed and the server is restarted', async () => {
    const redis = await server();
    await redis.start();
    const replicas = await Promise.all([1, 2, 3].map(() => replica(redis.url)));
    const all = lines(2000, 60);
    const job = await jobOf(await postBatch(replicas[0].url, all, later));
    expect(job.progress.total).toBe(2000);
    await reach(replicas[1], job, ({ progress }) => progress.done >= 200);
    replicas[0].child.kill('SIGKILL');
    const killed = await reach(replicas[1], job, ({ progress }) => progress.done >= 600);
    expect(finished(killed)).toBe(false);
    await redis.stop();
    await pause(500);
    expect(await codeOf(await fetch(replicas[1].url + job.links.self))).toEqual([503, 'queue-unreachable']);
    await redis.start();
    const done = await reach(replicas[2], job, finished);
    expect(done).toMatchObject({ state: 'succeeded', progress: { done: 2000, total: 2000 } });
    const text = await (await fetch(replicas[1].url + job.links.result)).text();
    const ids = linesOf(text).map(({ id, problem }) => id ?? `torn at ${problem!.line}`);
    expect(ids).toEqual(all.map((line, i) => (typeof line === 'string' ? `torn at ${i + 1}` : `m${i}`)));
    // The engine in the process gives the same bytes.
    const alone = await startServiceProcess({ WORKERS: '2' });
    services.push(alone);
    const embedded = await jobOf(await postBatch(alone.url, all, later));
    await reach(alone, embedded, finished);
    expect(await (await fetch(alone.url + embedded.links.result)).text()).toBe(text);
    // Both that are left have worked.
    expect(await replicas[1].stop()).toBe(0);
    expect(await replicas[2].stop()).toBe(0);
  });

  it('are refused with 503 while the server is away, at the start and later, and taken when it is there', async () => {
    const redis = await server();
    const service = await replica(redis.url);
    const solve = { member: member(1), series: { modes: 3 } };
    const headers = { 'content-type': 'application/json', ...later };
    const ask = (): Promise<Response> =>
      fetch(`${service.url}/v1/modes`, { method: 'POST', headers, body: JSON.stringify(solve) });
    const direct = async (): Promise<number> => (await service.post('/v1/modes', solve)).status;
    const away = await ask();
    expect(away.headers.get('retry-after')).toMatch(/^\d+$/);
    expect(await codeOf(away)).toEqual([503, 'queue-unreachable']);
    expect(await codeOf(await postBatch(service.url, lines(3), later))).toEqual([503, 'queue-unreachable']);
    expect(await codeOf(await fetch(`${service.url}/v1/jobs/x`))).toEqual([503, 'queue-unreachable']);
    expect(await direct()).toBe(200);
    for (let round = 0; round < 2; round++) {
      await redis.start();
      let response = await ask();
      for (let i = 0; i < 50 && response.status === 503; i++) {
        await pause(100);
        response = await ask();
      }
      const job = await jobOf(response);
      expect((await reach(service, job, finished)).state).toBe('succeeded');
      expect(await (await fetch(service.url + job.links.result)).text()).toBe(
        await (await service.post('/v1/modes', solve)).text(),
      );
      await redis.stop();
      expect(await codeOf(await ask())).toEqual([503, 'queue-unreachable']);
      expect(await direct()).toBe(200);
    }
    expect(await service.stop()).toBe(0);
  });

  it('and their results are the same from every instance, by key, by link and by event', async () => {
    const redis = await server();
    await redis.start();
    const [one, two] = await Promise.all([replica(redis.url), replica(redis.url)]);
    const key = { ...later, 'idempotency-key': 'once' };
    const jobs = await Promise.all(
      [one, two].map(async ({ url }) => jobOf(await postBatch(url, lines(40), key))),
    );
    expect(jobs[0].id).toBe(jobs[1].id);
    expect(await codeOf(await postBatch(two.url, lines(41), key))).toEqual([422, 'idempotency-key-reused']);
    const events = await (await fetch(two.url + jobs[0].links.events)).text();
    const done = [...events.matchAll(/^event: progress\nid: (\d+)$/gm)].map(([, id]) => Number(id));
    expect(done).toEqual(done.toSorted((a, b) => a - b));
    expect(done.at(-1)).toBe(40);
    expect(events).toContain('event: end');
    const solved = await one.post('/v1/modes', { member: member(5), series: { modes: 2 } });
    const link = solved.headers.get('content-location')!;
    expect(await (await fetch(two.url + link)).text()).toBe(await solved.text());
  });

  it('are cancelled on whichever instance they run, within 200 ms', { retry: 2 }, async () => {
    const redis = await server();
    await redis.start();
    const [one, two] = await Promise.all([replica(redis.url), replica(redis.url)]);
    // Each line takes a second or more.
    const heavy = Array.from({ length: 320 }, (_, i) => ({
      id: `h${i}`,
      operation: 'modes',
      request: { member: member(i), series: { modes: 20_000 } },
    }));
    const job = await jobOf(await postBatch(one.url, heavy, later));
    const busy = async ({ url }: ServiceProcess): Promise<boolean> => {
      const { running } = (await (await fetch(`${url}/health/ready`)).json()) as { running: number };
      return running > 0;
    };
    await until(async () => (await busy(one)) && (await busy(two)));
    // What looking takes by itself on a machine with other work is not counted.
    const looked = performance.now();
    for (let i = 0; i < 10; i++) await Promise.all([busy(one), busy(two)]);
    const looking = (performance.now() - looked) / 10;
    const asked = performance.now();
    const answer = await fetch(one.url + job.links.self, { method: 'DELETE' });
    expect(((await answer.json()) as JobAnswer).state).toBe('cancelled');
    await until(async () => !(await Promise.all([busy(one), busy(two)])).includes(true));
    expect(performance.now() - asked - 3 * looking).toBeLessThan(200);
    expect(await codeOf(await fetch(two.url + job.links.result))).toEqual([404, 'job-cancelled']);
  });

  it('leave a chunk to another instance when theirs is stopped', async () => {
    const redis = await server();
    await redis.start();
    const [one, two] = await Promise.all([replica(redis.url), replica(redis.url)]);
    const all = lines(600, 60);
    const job = await jobOf(await postBatch(one.url, batchOf(all), later));
    await reach(two, job, ({ progress }) => progress.done > 0);
    expect(await one.stop()).toBe(0);
    expect((await reach(two, job, finished)).state).toBe('succeeded');
    const answers = linesOf(await (await fetch(two.url + job.links.result)).text());
    expect(answers).toHaveLength(600);
    expect(answers.filter(({ status }) => status === 503)).toEqual([]);
  });
});

import { connect } from 'node:net';
import { performance } from 'node:perf_hooks';
import { setTimeout as pause } from 'node:timers/promises';
import { afterEach, describe, expect, it } from 'vitest';
import { identifyRequest } from '../../src/contract/identify-request.ts';
import { EmbeddedResults } from '../../src/jobs/embedded-results.ts';
import { reachableBufferBytes } from '../jobs/collect-garbage.ts';
import { startTrialService, type TrialOptions, type TrialService } from './trial-service.ts';
import { trialPages } from './trial-pages.ts';

const services: TrialService[] = [];

async function startService(options: TrialOptions = {}): Promise<TrialService> {
  const service = await startTrialService(options);
  services.push(service);
  return service;
}

afterEach(async () => {
  await Promise.all(services.splice(0).map(({ app }) => app.close()));
});

/** Keeps requests, and no answers: each is solved again. */
const withoutAnswers = () => new EmbeddedResults({ requests: 100, requestBytes: 1e7, answerBytes: 0 });
const plain = { 'accept-encoding': 'identity' };

async function until(condition: () => boolean): Promise<void> {
  const end = performance.now() + 10_000;
  while (!condition()) {
    if (performance.now() > end) throw new Error('the awaited state did not come');
    await pause(5);
  }
}

async function pinned(store: EmbeddedResults, request: object): Promise<string> {
  const result = identifyRequest('modes', request, '1');
  await store.pin(result);
  return `/v1/results/${result.digest}`;
}

describe('a result', () => {
  it('is linked from the solve and gives the same answer', async () => {
    const { url, post } = await startService();
    const solved = await post('/v1/modes', { b: 1, a: 2 });
    const path = solved.headers.get('content-location')!;
    expect(path).toBe(`/v1/results/${identifyRequest('modes', { a: 2, b: 1 }, '1').digest}`);
    const got = await fetch(url + path);
    expect(got.status).toBe(200);
    expect(await got.text()).toBe(await solved.text());
    for (const name of ['etag', 'content-type', 'content-location', 'content-length', 'vary']) {
      expect([name, got.headers.get(name)]).toEqual([name, solved.headers.get(name)]);
    }
    expect(got.headers.get('vary')).toBe('Accept, Accept-Encoding');
    expect(got.headers.get('cache-control')).toBe('max-age=31536000, immutable');
    expect(solved.headers.get('cache-control')).toBeNull();
    expect(got.headers.get('cross-origin-resource-policy')).toBe('cross-origin');
    expect(got.headers.get('etag')).toMatch(/^"[\w-]{43}"$/);
  });

  it('has one digest for a body that the worker reads and for the same one that the event loop reads', async () => {
    const { post } = await startService();
    const small = await post('/v1/modes', '{"a":1}');
    const large = await post('/v1/modes', `{"a":1${' '.repeat(20_000)}}`);
    expect(large.headers.get('content-location')).toBe(small.headers.get('content-location'));
    expect(large.headers.get('etag')).toBe(small.headers.get('etag'));
    expect(await large.text()).toBe(await small.text());
  });

  it('can be got back after a body that only the worker has read', async () => {
    const { url, post } = await startService({ app: { results: withoutAnswers() } });
    const values = Array.from({ length: 20_000 }, (_, i) => i / 7);
    const solved = await post('/v1/responses', { values });
    const got = await fetch(url + solved.headers.get('content-location')!);
    expect(await got.text()).toBe(await solved.text());
  });

  it('is answered without a solver while its bytes are kept, then by one', async () => {
    const { url, post } = await startService();
    const solved = await post('/v1/modes', { do: 'count' });
    const path = solved.headers.get('content-location')!;
    const first = await solved.text();
    expect(await (await fetch(url + path)).text()).toBe(first);
    expect(await (await post('/v1/modes', { do: 'count' })).text()).toBe(first);
    const forgetful = await startService({ app: { results: withoutAnswers() } });
    const again = await forgetful.post('/v1/modes', { do: 'count' });
    expect(await (await fetch(forgetful.url + again.headers.get('content-location')!)).json()).toMatchObject({
      solved: 2,
    });
  });

  it('is not solved for a client that has it: 304 with tag and freshness, and no body', async () => {
    const store = withoutAnswers();
    const { url, pool } = await startService({ app: { results: store } });
    const path = await pinned(store, { do: 'count' });
    const tag = (await fetch(url + path, { headers: plain })).headers.get('etag')!;
    for (const header of [tag, `W/${tag}`, `"other", ${tag}`, '*']) {
      const answer = await fetch(url + path, { headers: { ...plain, 'if-none-match': header } });
      expect(answer.status).toBe(304);
      expect(answer.headers.get('etag')).toBe(tag);
      expect(answer.headers.get('cache-control')).toMatch(/immutable/);
      expect(answer.headers.get('vary')).toBe('Accept, Accept-Encoding');
      expect(answer.headers.get('content-length')).toBeNull();
      expect(await answer.text()).toBe('');
    }
    // The next solve is the second: none of the above was one.
    const other = await fetch(url + path, { headers: { ...plain, 'if-none-match': '"other"' } });
    expect([other.status, ((await other.json()) as { solved: number }).solved]).toEqual([200, 2]);
    expect(pool.running).toBe(0);
  });

  it('that is not kept is answered with 404, which says why and how to get it back', async () => {
    const { url } = await startService();
    const answer = await fetch(`${url}/v1/results/AAAA`, { headers: { 'if-none-match': '*' } });
    const problem = (await answer.json()) as Record<string, string>;
    expect([answer.status, problem.code]).toEqual([404, 'result-not-kept']);
    expect(problem.detail).toMatch(/"AAAA".*restarts.*POST the request again/);
    expect(answer.headers.get('cache-control')).toBe('no-store');
  });

  it('is forgotten when others are used more, and comes back by its request', async () => {
    const results = new EmbeddedResults({ requests: 2, requestBytes: 1e6, answerBytes: 1e6 });
    const { url, post } = await startService({ app: { results } });
    const first = (await post('/v1/modes', { i: 0 })).headers.get('content-location')!;
    for (const i of [1, 2]) await (await post('/v1/modes', { i })).text();
    expect((await fetch(url + first)).status).toBe(404);
    expect((await post('/v1/modes', { i: 0 })).headers.get('content-location')).toBe(first);
    expect((await fetch(url + first)).status).toBe(200);
  });

  it('has the head that its answer has', async () => {
    const { url, post } = await startService({ app: { results: withoutAnswers() } });
    const solved = await post('/v1/modes', { do: 'numbers', count: 100_000 });
    const path = solved.headers.get('content-location')!;
    const get = await fetch(url + path, { headers: plain });
    const head = await fetch(url + path, { headers: plain, method: 'HEAD' });
    const without = (headers: Headers) =>
      [...headers]
        .filter(([name]) => !['date', 'x-request-id', 'connection', 'keep-alive'].includes(name))
        .toSorted(([a], [b]) => (a < b ? -1 : 1));
    expect([head.status, without(head.headers)]).toEqual([200, without(get.headers)]);
    expect(await head.text()).toBe('');
    expect(head.headers.get('content-length')).toBe(String((await get.text()).length));
    const tag = get.headers.get('etag')!;
    const same = await fetch(url + path, { method: 'HEAD', headers: { ...plain, 'if-none-match': tag } });
    expect(same.status).toBe(304);
    expect((await fetch(`${url}/v1/results/x`, { method: 'HEAD' })).status).toBe(404);
  });

  it('has another tag in another content coding, and the same content', async () => {
    const { url, post } = await startService();
    const solved = await post('/v1/modes', { do: 'numbers', count: 1000 });
    const path = solved.headers.get('content-location')!;
    const answers = await Promise.all(
      ['identity', 'gzip', 'br'].map((coding) =>
        fetch(url + path, { headers: { 'accept-encoding': coding } }),
      ),
    );
    expect(answers.map(({ headers }) => headers.get('content-encoding'))).toEqual([null, 'gzip', 'br']);
    expect(new Set(answers.map(({ headers }) => headers.get('etag'))).size).toBe(3);
    expect(new Set(await Promise.all(answers.map((answer) => answer.text()))).size).toBe(1);
    const small = await post('/v1/modes', { a: 1 }, { 'accept-encoding': 'br' });
    expect(small.headers.get('content-encoding')).toBeNull();
    const none = await fetch(url + path, { headers: { 'accept-encoding': 'identity;q=0' } });
    expect([none.status, ((await none.json()) as { code: string }).code]).toEqual([
      406,
      'coding-not-acceptable',
    ]);
  });

  it('of a request of the service itself is there from the start and never forgotten', async () => {
    const results = new EmbeddedResults({ requests: 1, requestBytes: 1e6, answerBytes: 0 });
    const examples = [{ name: 'own', title: 'Own', operation: 'modes' as const, text: '{"own":true}' }];
    const { url, post } = await startService({ app: { results, examples } });
    const path = `/v1/results/${identifyRequest('modes', { own: true }, '1').digest}`;
    expect(await (await fetch(url + path)).json()).toEqual({ echo: { own: true } });
    for (const i of [1, 2, 3]) await (await post('/v1/modes', { i })).text();
    expect((await fetch(url + path)).status).toBe(200);
  });

  it('is solved once for all who ask for it at the same time', async () => {
    const store = withoutAnswers();
    const { url, pool } = await startService({ app: { results: store }, pool: { workers: 2 } });
    const path = await pinned(store, { do: 'count', milliseconds: 300 });
    const asked = Array.from({ length: 20 }, () => fetch(url + path, { headers: plain }));
    await until(() => pool.running > 0);
    await pause(100);
    expect([pool.running, pool.waiting]).toEqual([1, 0]);
    const texts = await Promise.all((await Promise.all(asked)).map((answer) => answer.text()));
    expect(new Set(texts).size).toBe(1);
  });

  it('is solved on for those who stay when another client leaves, and stopped when all have left', async () => {
    const store = withoutAnswers();
    const { url, port, pool } = await startService({ app: { results: store } });
    const path = await pinned(store, { do: 'count', milliseconds: 700 });
    const leave = async (target: string, meanwhile: () => void): Promise<void> => {
      const socket = connect(port, '127.0.0.1', () =>
        socket.write(`GET ${target} HTTP/1.1\r\nhost: x\r\n\r\n`),
      );
      await until(() => pool.running === 1);
      meanwhile();
      await pause(50);
      socket.destroy();
    };
    let stays: Promise<Response> | undefined;
    await leave(path, () => {
      stays = fetch(url + path);
    });
    expect((await stays!).status).toBe(200);
    const endless = await pinned(store, { do: 'busy', milliseconds: 60_000 });
    await leave(endless, () => undefined);
    await until(() => pool.running === 0);
    expect((await fetch(url + path)).status).toBe(200);
  });

  it('holds to the deadline of each client, also where several wait for one solve', async () => {
    const store = withoutAnswers();
    const { url, pool } = await startService({ app: { results: store } });
    const path = await pinned(store, { do: 'busy', milliseconds: 2500 });
    const patient = fetch(url + path);
    await until(() => pool.running === 1);
    const hasty = await fetch(url + path, { headers: { prefer: 'wait=1' } });
    expect(hasty.status).toBe(504);
    expect((await patient).status).toBe(200);
    const quick = await fetch(url + (await pinned(store, {})), { headers: { prefer: 'wait=1' } });
    expect([quick.status, quick.headers.get('preference-applied')]).toEqual([200, 'wait=1']);
  });

  it('is given all the same when the store fails', async () => {
    const store = withoutAnswers();
    const down = (): Promise<never> => Promise.reject(new Error('the store is down'));
    Object.assign(store, { keep: down, keepAnswer: down, findAnswer: down });
    const { post } = await startService({ app: { results: store } });
    expect((await post('/v1/modes', { a: 1 })).status).toBe(200);
  });

  it('leaves memory flat when ten times the size of the store goes through it', async () => {
    const results = new EmbeddedResults({ requests: 50, requestBytes: 1e6, answerBytes: 4e6 });
    const { post } = await startService({ app: { results } });
    const push = async (from: number): Promise<number> => {
      for (let i = from; i < from + 100; i++) {
        const response = await post('/v1/modes', { do: 'numbers', count: 20_000, i }, plain);
        expect((await response.text()).length).toBeGreaterThan(300_000);
      }
      return reachableBufferBytes();
    };
    const full = await push(0);
    expect(await push(100)).toBeLessThan(full + 2e6);
    // The examples of the start page stay beside them.
    expect(results.size.requests).toBe(50 + trialPages.examples.length);
    expect(results.size.answerBytes).toBeLessThanOrEqual(4e6);
  });
});

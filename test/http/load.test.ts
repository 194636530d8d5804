import { connect } from 'node:net';
import { Agent, request as httpRequest } from 'node:http';
import { performance } from 'node:perf_hooks';
import { setTimeout as pause } from 'node:timers/promises';
import { afterEach, describe, expect, it } from 'vitest';
import { startTrialService, type TrialOptions, type TrialService } from './trial-service.ts';

const services: TrialService[] = [];

async function startService(options: TrialOptions = {}): Promise<TrialService> {
  const service = await startTrialService(options);
  services.push(service);
  return service;
}

afterEach(async () => {
  await Promise.all(services.splice(0).map(({ app }) => app.close()));
});

async function codeOf(response: Response): Promise<unknown> {
  expect(response.headers.get('content-type')).toBe('application/problem+json');
  return ((await response.json()) as { code: string }).code;
}

async function until(condition: () => boolean): Promise<void> {
  const end = performance.now() + 10_000;
  while (!condition()) {
    if (performance.now() > end) throw new Error('the awaited state did not come');
    await pause(5);
  }
}

function median(values: readonly number[]): number {
  return values.toSorted((a, b) => a - b)[values.length >> 1];
}

/** Takes no content coding: its length is that of the text. */
const identity = { 'accept-encoding': 'identity' };

describe('the service under load', () => {
  it('answers /health/live within 20 ms (median) while a 2-second solve runs', { retry: 2 }, async () => {
    const { url, post, pool } = await startService();
    const solve = post('/v1/responses', { do: 'busy', milliseconds: 2000 });
    await until(() => pool.running === 1);
    const times: number[] = [];
    while (pool.running === 1) {
      const started = performance.now();
      const response = await fetch(`${url}/health/live`);
      await response.arrayBuffer();
      times.push(performance.now() - started);
      await pause(10);
    }
    expect((await solve).status).toBe(200);
    expect(times.length).toBeGreaterThan(50);
    expect(median(times)).toBeLessThan(20);
  });

  it('frees the worker when the client disconnects', async () => {
    const { port, pool, post } = await startService();
    const body = JSON.stringify({ do: 'busy', milliseconds: 60_000 });
    const socket = connect(port, '127.0.0.1', () =>
      socket.write(
        `POST /v1/modes HTTP/1.1\r\nhost: x\r\ncontent-type: application/json\r\ncontent-length: ${body.length}\r\n\r\n${body}`,
      ),
    );
    await until(() => pool.running === 1);
    const waiting = new AbortController();
    const second = fetch(`http://127.0.0.1:${port}/v1/modes`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: '{"do":"echo"}',
      signal: waiting.signal,
    }).catch((error: Error) => error.name);
    await until(() => pool.waiting === 1);
    waiting.abort();
    expect(await second).toBe('AbortError');
    await until(() => pool.waiting === 0);
    socket.destroy();
    await until(() => pool.running === 0);
    expect((await post('/v1/modes', { do: 'echo' })).status).toBe(200);
  });

  it('refuses with 503 and Retry-After when the line is full; bad requests are told so all the same', async () => {
    const { post, pool } = await startService({ pool: { queueLimit: 1 } });
    const running = [1, 2].map(() => post('/v1/modes', { do: 'busy', milliseconds: 300 }));
    await until(() => pool.running + pool.waiting === 2);
    const refused = await post('/v1/modes', { do: 'echo' });
    expect(refused.status).toBe(503);
    expect(refused.headers.get('retry-after')).toMatch(/^[1-9]\d*$/);
    expect(await codeOf(refused)).toBe('queue-full');
    expect((await post('/v1/modes', { refuse: true })).status).toBe(422);
    expect((await Promise.all(running)).map((response) => response.status)).toEqual([200, 200]);
  });

  it('ends a solve at the deadline with 504, waiting included', async () => {
    const { post } = await startService({ app: { solveDeadline: 1.5 } });
    const started = performance.now();
    const both = await Promise.all([
      post('/v1/modes', { do: 'busy', milliseconds: 60_000 }),
      post('/v1/modes', { do: 'echo' }),
    ]);
    expect(both.map((response) => response.status)).toEqual([504, 504]);
    expect(await codeOf(both[0])).toBe('deadline-exceeded');
    expect(performance.now() - started).toBeLessThan(8000);
    expect((await post('/v1/modes', { do: 'echo' })).status).toBe(200);
  });

  it('lets Prefer: wait shorten the deadline, never lengthen it', async () => {
    const { post } = await startService({ app: { solveDeadline: 1.5 } });
    const impatient = await post('/v1/modes', { do: 'busy', milliseconds: 60_000 }, { prefer: 'wait=1' });
    expect(impatient.status).toBe(504);
    expect(((await impatient.json()) as { detail: string }).detail).toContain('within 1 s');
    const patient = await post('/v1/modes', { do: 'busy', milliseconds: 60_000 }, { prefer: 'wait=100' });
    expect(((await patient.json()) as { detail: string }).detail).toContain('within 1.5 s');
    const served = await post('/v1/modes', {}, { prefer: 'wait=1' });
    expect(served.headers.get('preference-applied')).toBe('wait=1');
    const capped = await post('/v1/modes', {}, { prefer: 'wait=100' });
    expect(capped.headers.get('preference-applied')).toBeNull();
  });

  it('answers a crash and an exhausted memory with 500 and goes on', async () => {
    const { post } = await startService({ pool: { memoryLimit: 24 } });
    for (const [request, code] of [
      [{ do: 'exit' }, 'solver-crashed'],
      [{ do: 'heap' }, 'solver-out-of-memory'],
      [{ do: 'buffers' }, 'solver-out-of-memory'],
      [{ do: 'bug' }, 'internal-error'],
    ] as const) {
      const response = await post('/v1/modes', request);
      expect([response.status, await codeOf(response)]).toEqual([500, code]);
      expect((await post('/v1/modes', {})).status).toBe(200);
    }
  });

  it('gives the same bytes for the same request, from both workers', async () => {
    const { post } = await startService({ pool: { workers: 2 } });
    const texts = await Promise.all(
      Array.from({ length: 8 }, async () =>
        (await post('/v1/modes', { do: 'numbers', count: 20_000 })).text(),
      ),
    );
    expect(new Set(texts).size).toBe(1);
  });

  it('sends an answer of many megabytes whole, with its length', async () => {
    const { post } = await startService();
    const response = await post('/v1/modes', { do: 'numbers', count: 1_000_000 }, identity);
    const text = await response.text();
    expect(response.headers.get('content-length')).toBe(String(text.length));
    const { values } = JSON.parse(text) as { values: number[] };
    expect(values.length).toBe(1_000_000);
    expect([values[1], values[999_999]]).toEqual([Math.sin(1), Math.sin(999_999)]);
  });
});

describe('a graceful stop', () => {
  it('finishes what is under way, refuses what comes, and does not wait for idle connections', async () => {
    const { app, port, pool, url } = await startService();
    const agent = new Agent({ keepAlive: true, maxSockets: 1 });
    const underWay = send(agent, port, '/v1/modes', { do: 'busy', milliseconds: 500 });
    await until(() => pool.running === 1);
    const started = performance.now();
    const closed = app.close();
    await until(() => pool.isStopping);
    const ready = await fetch(`${url}/health/ready`);
    expect([ready.status, await codeOf(ready)]).toEqual([503, 'stopping']);
    expect(ready.headers.get('connection')).toBe('close');
    const late = await fetch(`${url}/v1/modes`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: '{}',
    });
    expect([late.status, late.headers.get('retry-after') !== null, await codeOf(late)]).toEqual([
      503,
      true,
      'stopping',
    ]);
    expect(await underWay).toEqual({ status: 200, connection: 'close' });
    await closed;
    expect(performance.now() - started).toBeLessThan(5000);
    agent.destroy();
  });

  it('refuses what is not done when the grace is over', async () => {
    const { app, pool, post } = await startService({ app: { stopGrace: 0.2 } });
    const underWay = post('/v1/modes', { do: 'busy', milliseconds: 60_000 });
    await until(() => pool.running === 1);
    await app.close();
    const response = await underWay;
    expect([response.status, await codeOf(response)]).toEqual([503, 'stopping']);
  });
});

function send(
  agent: Agent,
  port: number,
  path: string,
  body: unknown,
): Promise<{ status?: number; connection?: string }> {
  return new Promise((resolve, reject) => {
    const options = {
      agent,
      port,
      path,
      host: '127.0.0.1',
      method: 'POST',
      headers: { 'content-type': 'application/json' },
    };
    const request = httpRequest(options, (response) => {
      response.resume();
      response.on('end', () =>
        resolve({ status: response.statusCode, connection: response.headers.connection }),
      );
    });
    request.on('error', reject);
    request.end(JSON.stringify(body));
  });
}

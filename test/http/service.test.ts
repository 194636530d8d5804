import { spawnSync } from 'node:child_process';
import { readdirSync, readFileSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { validatorOf } from '../../src/contract/validators.ts';
import { badRequests } from '../contract/bad-requests.ts';
import { startServiceProcess, type ServiceProcess } from './service-process.ts';

const examples = new URL('../../schemas/examples/', import.meta.url);
const load = (file: string): string => readFileSync(new URL(file, examples), 'utf8');
const files = readdirSync(examples);
function pathOf(file: string): string {
  const request = JSON.parse(load(file)) as object;
  if ('criteria' in request) return '/v1/checks';
  if ('input' in request) return '/v1/transfer-functions';
  return 'sample' in request ? '/v1/responses' : '/v1/modes';
}
const schemaOf = {
  '/v1/modes': 'ModesAnswer',
  '/v1/responses': 'ResponsesAnswer',
  '/v1/transfer-functions': 'TransferFunctionsAnswer',
  '/v1/checks': 'ChecksAnswer',
} as Record<string, string>;

function expectValid(schema: string, document: unknown): void {
  const validate = validatorOf(schema);
  validate.call({ kind: 'cable', originals: new Map() }, document);
  expect(validate.errors ?? []).toEqual([]);
}

let service: ServiceProcess;
beforeAll(async () => {
  service = await startServiceProcess();
});
afterAll(async () => {
  await service.stop();
});

describe('the service as it is started', () => {
  it.each(files)('solves the example %s, and the answer satisfies its schema', async (file) => {
    const path = pathOf(file);
    const response = await service.post(path, load(file));
    expect([response.status, response.headers.get('content-type')]).toEqual([200, 'application/json']);
    expectValid(schemaOf[path], await response.json());
  });

  it.each(badRequests.map((row) => [row.title, row] as const))('refuses: %s', async (_title, row) => {
    const response = await service.post(`/v1/${row.operation}`, row.body);
    const problem = (await response.json()) as {
      status: number;
      code: string;
      errors: Record<string, string>[];
    };
    expect([response.status, response.headers.get('content-type')]).toEqual([
      row.status,
      'application/problem+json',
    ]);
    expectValid('ProblemDocument', problem);
    expect(problem.status).toBe(row.status);
    expect(problem.errors.map(({ code, pointer }) => [code, pointer])).toEqual(
      row.faults.map(({ code, pointer }) => [code, pointer]),
    );
    row.faults.forEach(({ wording }, i) => expect(problem.errors[i].detail).toMatch(wording));
    expect(row.faults.map(({ code }) => code)).toContain(problem.code);
  });

  it('gives the same bytes twice, on both workers and after a restart', async () => {
    const again = await startServiceProcess({ WORKERS: '1' });
    try {
      for (const file of files) {
        const texts = [service, service, service, service, again].map(async ({ post }) =>
          (await post(pathOf(file), load(file))).text(),
        );
        expect(new Set(await Promise.all(texts)).size).toBe(1);
      }
    } finally {
      await again.stop();
    }
  });

  it('gives the same bytes for a body read in the worker as for one read on the event loop', async () => {
    const short = load('struck-pile.json');
    const long = short.replace('{', `{${' '.repeat(300_000)}`);
    const [a, b] = await Promise.all(
      [short, long].map(async (body) => (await service.post('/v1/responses', body)).text()),
    );
    expect(a).toBe(b);
  });

  it.each([
    [
      'an undamped resonance hit exactly, by its frequency',
      { damping: undefined, input: { type: 'end-motion', end: 'near', quantity: 'displacement' } },
      { code: 'resonance-hit', pointer: '/frequencies', detail: /^At 2\.5 Hz / },
    ],
    [
      'an outcrop motion under damping ratios',
      {
        damping: { type: 'ratio', value: 0.02 },
        input: { type: 'outcrop-motion', end: 'near', impedance: 2e6, quantity: 'displacement' },
      },
      { code: 'outcrop-with-ratios', pointer: '/member/damping', detail: /loss-factor/ },
    ],
  ])('refuses in the solver %s', async (_title, { damping, input }, { code, pointer, detail }) => {
    // A uniform column on a fixed base is in resonance at V/(4 H) = 2.5 Hz.
    const member = {
      kind: 'shear-column',
      segments: [{ length: 20, shearWaveSpeed: 200, density: 1900 }],
      ends: { near: { type: 'fixed' }, far: { type: 'free' } },
      damping,
    };
    const response = await service.post('/v1/transfer-functions', {
      member,
      input,
      outputs: [{ at: 20, quantity: 'displacement' }],
      frequencies: [1, 2.5],
    });
    expect([response.status, response.headers.get('content-type')]).toEqual([
      422,
      'application/problem+json',
    ]);
    const problem = (await response.json()) as { detail: string };
    expectValid('ProblemDocument', problem);
    expect(problem).toMatchObject({ code, errors: [{ code, pointer }] });
    expect(problem.detail).toMatch(detail);
  });

  it(
    'is found live within 20 ms (median) while a record of 200,000 points is read and solved',
    { retry: 2 },
    async () => {
      const shaken = JSON.parse(load('shaken-soil-column.json')) as {
        loads: { history: { interval: number; values: number[] } }[];
      };
      const { history } = shaken.loads[0];
      const values = Array.from({ length: 200_000 }, (_, i) => history.values[i % history.values.length]);
      const long = (more: number[]): unknown => ({
        ...shaken,
        loads: [{ ...shaken.loads[0], history: { ...history, values: [...values, ...more] } }],
        series: { modes: 20 },
      });
      const solved = service.post('/v1/responses', long([]));
      const state = { done: false };
      void solved.finally(() => (state.done = true));
      const times: number[] = [];
      while (!state.done) {
        const started = performance.now();
        await (await fetch(`${service.url}/health/live`)).arrayBuffer();
        times.push(performance.now() - started);
      }
      expect((await solved).status).toBe(200);
      expect(times.toSorted((a, b) => a - b)[times.length >> 1]).toBeLessThan(20);
      const refused = await service.post('/v1/responses', long([0]));
      expect([refused.status, ((await refused.json()) as { code: string }).code]).toEqual([
        400,
        'too-many-items',
      ]);
    },
  );

  it('answers every link to a result that its start page has', async () => {
    const page = await (await fetch(`${service.url}/`)).text();
    const links = new Set(
      [...page.matchAll(/"(\/v1\/results\/[^"]*)"/g)].map(([, link]) => link.replaceAll('&amp;', '&')),
    );
    // Five forms of each example, and at least one figure in two sizes and two themes.
    expect(links.size).toBeGreaterThanOrEqual(files.length * (5 + 4));
    for (const link of links) {
      const response = await fetch(service.url + link);
      const bytes = await response.arrayBuffer();
      expect([link, response.status, bytes.byteLength > 0]).toEqual([link, 200, true]);
    }
  });

  it('serves the reference document that clients are built from', async () => {
    const document = (await (await fetch(`${service.url}/openapi.json`)).json()) as {
      openapi: string;
      paths: object;
    };
    expect(document.openapi).toMatch(/^3\.1/);
    expect(Object.keys(document.paths).toSorted()).toEqual([
      '/',
      '/docs',
      '/examples/{name}.json',
      '/health/live',
      '/health/ready',
      '/openapi.json',
      '/openapi.yaml',
      '/v1/batches',
      '/v1/checks',
      '/v1/jobs/{id}',
      '/v1/jobs/{id}/events',
      '/v1/jobs/{id}/result',
      '/v1/modes',
      '/v1/responses',
      '/v1/results/{digest}',
      '/v1/transfer-functions',
    ]);
    const yaml = await fetch(`${service.url}/openapi.yaml`);
    expect(await yaml.text()).toMatch(/^openapi: ["']?3\.1/);
  });

  it('is found live within 20 ms (median) while both workers solve for seconds', { retry: 2 }, async () => {
    const heavy = { ...JSON.parse(load('stay-cable-release.json')), series: { modes: 8000 } };
    const solves = [1, 2].map(() => service.post('/v1/responses', heavy));
    const solved = Promise.all(solves);
    const state = { done: false };
    void solved.finally(() => (state.done = true));
    const times: number[] = [];
    while (!state.done) {
      const started = performance.now();
      await (await fetch(`${service.url}/health/live`)).arrayBuffer();
      times.push(performance.now() - started);
    }
    expect((await solved).map(({ status }) => status)).toEqual([200, 200]);
    expect(times.length).toBeGreaterThan(50);
    expect(times.toSorted((a, b) => a - b)[times.length >> 1]).toBeLessThan(20);
  });
});

describe('starting and stopping', () => {
  it.each(['SIGTERM', 'SIGINT'] as const)('ends with 0 on %s', async (signal) => {
    const started = await startServiceProcess({ WORKERS: '1' });
    expect(await started.stop(signal)).toBe(0);
    expect(started.log.map(({ msg }) => msg)).toContain('stopping');
  });

  it('says that the port is taken', async () => {
    const server = createServer().listen(0, '127.0.0.1');
    await new Promise((resolve) => server.once('listening', resolve));
    const port = String((server.address() as AddressInfo).port);
    const { status, stderr } = runMain({ PORT: port });
    server.close();
    expect(status).toBe(1);
    expect(stderr).toBe(
      `127.0.0.1:${port} is in use. Stop what listens there, or set PORT to a free port.\n`,
    );
  });

  it('says what is wrong with the settings', () => {
    const { status, stderr } = runMain({ PORT: 'eighty', WORKERS: '0' });
    expect(status).toBe(1);
    expect(stderr).toBe(
      'The settings are wrong:\nPORT must be integer, but is "eighty".\nWORKERS must be >= 1, but is "0".\n',
    );
  });
});

function runMain(environment: Record<string, string>): { status: number | null; stderr: string } {
  const program = fileURLToPath(new URL('../../dist/main.js', import.meta.url));
  return spawnSync(process.execPath, [program], {
    env: { ...process.env, ...environment },
    encoding: 'utf8',
  });
}

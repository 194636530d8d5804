import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { trialPages } from './trial-pages.ts';
import { exchange, startTrialService, type TrialService } from './trial-service.ts';

let service: TrialService;

beforeAll(async () => {
  service = await startTrialService({ app: { bodyLimit: 300_000 } });
});
afterAll(async () => {
  await service.app.close();
});

interface Expected {
  readonly status: number;
  readonly code: string;
  readonly detail?: RegExp;
  readonly pointer?: string;
}

async function expectProblem(response: Response, { status, code, detail, pointer }: Expected): Promise<void> {
  const problem = (await response.json()) as Record<string, unknown>;
  expect(response.headers.get('content-type')).toBe('application/problem+json');
  expect(response.status).toBe(status);
  const id = response.headers.get('x-request-id');
  expect(problem).toMatchObject({
    type: `urn:tailbound:fault:${code}`,
    status,
    code,
    instance: `urn:uuid:${id}`,
    errors: [{ code, pointer: pointer ?? '' }],
  });
  expect(problem.title).not.toBe('');
  if (detail !== undefined) expect(problem.detail).toMatch(detail);
}

describe('an exchange over HTTP', () => {
  it('answers a solve with JSON and the id of the request', async () => {
    const id = '6f9619ff-8b86-4d01-b42d-00cf4fc964ff';
    const response = await service.post('/v1/modes', { a: 1 }, { 'x-request-id': id });
    expect(response.status).toBe(200);
    expect(response.headers.get('content-type')).toBe('application/json');
    expect(response.headers.get('x-request-id')).toBe(id);
    expect(response.headers.get('x-content-type-options')).toBe('nosniff');
    expect(await response.json()).toEqual({ echo: { a: 1 } });
  });

  it('makes an id of its own where the caller gives none that is a UUID', async () => {
    const response = await service.post('/v1/modes', {}, { 'x-request-id': 'my id' });
    expect(response.headers.get('x-request-id')).toMatch(/^[0-9a-f-]{36}$/);
  });

  it('reads a body above the inline limit in the worker, with the same answer and the same faults', async () => {
    const large = { values: Array.from({ length: 20_000 }, (_, i) => i) };
    const response = await service.post('/v1/modes', large);
    expect(await response.json()).toEqual({ echo: large });
    const broken = `${JSON.stringify(large).slice(0, -1)},}`;
    await expectProblem(await service.post('/v1/modes', broken), {
      status: 400,
      code: 'malformed-json',
      detail: /Line 1/,
    });
    const refused = await service.post('/v1/modes', { ...large, do: 'refuse' });
    await expectProblem(refused, { status: 422, code: 'no-inertia', pointer: '/member' });
  });

  it('refuses an unknown path and lists the known ones', async () => {
    await expectProblem(await fetch(`${service.url}/v2/modes?x=1`), {
      status: 404,
      code: 'not-found',
      detail:
        /\/v2\/modes\. .*\/v1\/modes, \/v1\/responses, \/v1\/transfer-functions, \/v1\/checks, \/v1\/results\/\{digest\}, \/v1\/batches, \/v1\/jobs\/\{id\}, .*\/health\/live/,
    });
    // Before the body: no media type is asked for where nothing is served.
    await expectProblem(await service.post('/nowhere', 'x', { 'content-type': 'text/xml' }), {
      status: 404,
      code: 'not-found',
    });
  });

  it.each([
    ['GET', '/v1/modes', 'POST, OPTIONS'],
    ['HEAD', '/v1/modes', 'POST, OPTIONS'],
    ['PUT', '/v1/responses', 'POST, OPTIONS'],
    ['DELETE', '/v1/modes', 'POST, OPTIONS'],
    ['GET', '/v1/transfer-functions', 'POST, OPTIONS'],
    ['POST', '/health/live', 'GET, HEAD, OPTIONS'],
    ['PROPFIND', '/health/ready', 'GET, HEAD, OPTIONS'],
    ['PATCH', '/openapi.yaml', 'GET, HEAD, OPTIONS'],
    ['POST', '/', 'GET, HEAD, OPTIONS'],
    ['DELETE', '/docs', 'GET, HEAD, OPTIONS'],
    ['PUT', '/docs/', 'GET, HEAD, OPTIONS'],
    ['POST', '/docs/json', 'GET, HEAD, OPTIONS'],
    ['PATCH', '/docs/static/swagger-ui.css', 'GET, HEAD, OPTIONS'],
    ['POST', '/examples/struck-pile.json', 'GET, HEAD, OPTIONS'],
    ['POST', '/assets/page.css', 'GET, HEAD, OPTIONS'],
  ])('refuses %s %s and says what it takes', async (method, path, allow) => {
    const response = await fetch(service.url + path, { method });
    expect(response.headers.get('allow')).toBe(allow);
    expect(response.status).toBe(405);
    if (method !== 'HEAD')
      await expectProblem(response, { status: 405, code: 'method-not-allowed', detail: new RegExp(method) });
  });

  it('tells the methods of a resource to OPTIONS', async () => {
    const response = await fetch(`${service.url}/v1/modes`, { method: 'OPTIONS' });
    expect([response.status, response.headers.get('allow')]).toEqual([204, 'POST, OPTIONS']);
  });

  it.each([
    'application/json',
    'application/*',
    '*/*',
    'text/html, application/json;q=0.1',
    'application/problem+json, */*;q=0.1',
  ])('answers Accept: %s', async (accept) => {
    expect((await service.post('/v1/modes', {}, { accept })).status).toBe(200);
  });

  it.each(['text/html', 'video/*', 'application/pdf, text/html;q=0.5'])(
    'refuses Accept: %s and lists what is offered',
    async (accept) => {
      await expectProblem(await service.post('/v1/modes', {}, { accept }), {
        status: 406,
        code: 'not-acceptable',
        detail:
          /offered: application\/json, text\/csv, application\/vnd\.apache\.arrow\.stream, image\/svg\+xml, image\/png/,
      });
    },
  );

  it.each([
    ['application/json'],
    ['application/json; charset=utf-8'],
    ['application/json;charset="UTF-8"'],
    ['Application/JSON'],
  ])('takes Content-Type: %s', async (type) => {
    expect((await service.post('/v1/modes', {}, { 'content-type': type })).status).toBe(200);
  });

  it.each([
    ['text/plain'],
    ['application/json; charset=latin1'],
    ['application/json; profile=x'],
    ['application/jsonp'],
    ['application/vnd.api+json'],
    ['application/x-www-form-urlencoded'],
  ])('refuses Content-Type: %s', async (type) => {
    const response = await service.post('/v1/modes', {}, { 'content-type': type });
    expect(response.headers.get('accept')).toBe('application/json');
    await expectProblem(response, {
      status: 415,
      code: 'unsupported-media-type',
      detail: /application\/json in UTF-8/,
    });
  });

  it('refuses a body without Content-Type and one with a content coding', async () => {
    const bare = await fetch(`${service.url}/v1/modes`, {
      method: 'POST',
      body: new Uint8Array([0x7b, 0x7d]),
    });
    await expectProblem(bare, {
      status: 415,
      code: 'unsupported-media-type',
      detail: /without Content-Type/,
    });
    const coded = await service.post('/v1/modes', {}, { 'content-encoding': 'gzip' });
    await expectProblem(coded, {
      status: 415,
      code: 'unsupported-media-type',
      detail: /Content-Encoding "gzip"/,
    });
  });

  it.each([
    ['', 'empty-body', /no body/],
    ['{', 'malformed-json', /Line 1, column 2/],
    ['{"a":1}\n{"a":2}', 'malformed-json', /Line 2, column 1: .* expected the end of the text/],
    ['\ufeff{}', 'malformed-json', /byte order mark/],
    ['{"__proto__":{"x":1}}', 'reserved-key', /__proto__/],
    ['{"a":{"b":1,"b":2}}', 'duplicate-key', /"b"/],
    ['['.repeat(10_000), 'nested-too-deep', /64 levels/],
    ['{"a":1e999}', 'number-out-of-range', /1e999/],
  ])('refuses the body %j', async (body, code, detail) => {
    const response = await service.post('/v1/modes', body);
    const problem = (await response.json()) as { code: string; detail: string };
    expect([response.status, problem.code]).toEqual([400, code]);
    expect(problem.detail).toMatch(detail);
  });

  it('refuses a body that is not UTF-8', async () => {
    const response = await service.post('/v1/modes', Uint8Array.of(0x7b, 0x22, 0xe9, 0x22, 0x7d));
    await expectProblem(response, { status: 400, code: 'not-utf8', detail: /offset 2/ });
  });

  it('refuses a body beyond the limit, announced or not', async () => {
    const tooLarge = 'x'.repeat(300_001);
    await expectProblem(await service.post('/v1/modes', tooLarge), {
      status: 413,
      code: 'body-too-large',
      detail: /300000 bytes/,
    });
    const chunked = await exchange(
      service.port,
      'POST /v1/modes HTTP/1.1\r\nhost: x\r\ncontent-type: application/json\r\ntransfer-encoding: chunked\r\n\r\n' +
        `${tooLarge.length.toString(16)}\r\n${tooLarge}\r\n0\r\n\r\n`,
    );
    expect(chunked).toMatch(/^HTTP\/1\.1 413 /);
    expect(chunked).toContain('"code":"body-too-large"');
  });

  it('still delivers the refusal to a client that sends far too much', async () => {
    const response = await service.post('/v1/modes', 'x'.repeat(20_000_000));
    await expectProblem(response, { status: 413, code: 'body-too-large' });
  });

  it.each([
    ['text that is not HTTP', 'NONSENSE\r\n\r\n', 400, 'malformed-http'],
    ['an unknown method', 'FOO /v1/modes HTTP/1.1\r\nhost: x\r\n\r\n', 400, 'malformed-http'],
    [
      'a path that is not percent-encoded',
      'GET /%zz HTTP/1.1\r\nhost: x\r\nconnection: close\r\n\r\n',
      400,
      'malformed-http',
    ],
    [
      'a request without Host',
      'GET /health/live HTTP/1.1\r\nconnection: close\r\n\r\n',
      400,
      'malformed-http',
    ],
    [
      'headers without end',
      `GET / HTTP/1.1\r\nhost: x\r\nx: ${'y'.repeat(20_000)}\r\n\r\n`,
      431,
      'headers-too-large',
    ],
  ])('answers %s with a problem document', async (_title, text, status, code) => {
    const answer = await exchange(service.port, text);
    expect(answer).toMatch(new RegExp(`^HTTP/1\\.1 ${status} `));
    expect(answer).toContain('content-type: application/problem+json');
    expect(JSON.parse(answer.slice(answer.indexOf('\r\n\r\n') + 4))).toMatchObject({ status, code });
  });

  it('reads a chunked body, and one that comes in drops, like any other', async () => {
    const numbers = JSON.stringify({ values: Array.from({ length: 15_000 }, (_, i) => i) });
    const pieces = numbers.match(/.{1,10000}/g) ?? [];
    const chunks = pieces.map((piece) => `${piece.length.toString(16)}\r\n${piece}\r\n`).join('');
    const head =
      'POST /v1/modes HTTP/1.1\r\nhost: x\r\nconnection: close\r\ncontent-type: application/json\r\n';
    const chunked = await exchange(
      service.port,
      `${head}transfer-encoding: chunked\r\n\r\n${chunks}0\r\n\r\n`,
    );
    const plain = await exchange(service.port, `${head}content-length: ${numbers.length}\r\n\r\n${numbers}`);
    for (const answer of [chunked, plain]) {
      expect(answer).toMatch(/^HTTP\/1\.1 200 /);
      expect(answer.slice(answer.indexOf('\r\n\r\n') + 4)).toBe(`{"echo":${numbers}}`);
    }
  });

  it('says in one list what several faults are, and leads with the one of the lowest status', async () => {
    const response = await service.post('/v1/modes', '{"a":1,"a":2,"b":1e999}');
    expect(await response.json()).toMatchObject({
      status: 400,
      code: 'duplicate-key',
      detail: expect.stringMatching(/^2 faults/),
      errors: [
        { code: 'duplicate-key', pointer: '/a' },
        { code: 'number-out-of-range', pointer: '/b' },
      ],
    });
  });

  it('serves the reference document in both forms', async () => {
    const yaml = await fetch(`${service.url}/openapi.yaml`);
    expect([yaml.status, yaml.headers.get('content-type')]).toEqual([200, 'application/yaml']);
    expect(await yaml.text()).toBe(trialPages.document.yaml);
    const json = await fetch(`${service.url}/openapi.json`);
    expect(json.headers.get('content-type')).toBe('application/json');
    expect(await json.json()).toEqual(JSON.parse(trialPages.document.json));
  });
});

import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { parse } from 'junit2json';
import { tautString } from '../support/checks.ts';
import { startServiceProcess, type ServiceProcess } from './service-process.ts';

let service: ServiceProcess;
beforeAll(async () => {
  service = await startServiceProcess();
}, 60_000);
afterAll(() => service.stop());

const at = (min: number, id: string) => ({ id, type: 'frequency-range', order: 1, min });
const body = (criteria: object[], more: object = {}) => ({
  operation: 'modes',
  request: { member: tautString, series: { modes: 2 } },
  criteria,
  ...more,
});

async function checked(request: object, headers: Record<string, string> = {}, query = ''): Promise<Response> {
  return fetch(`${service.url}/v1/checks${query}`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', ...headers },
    body: JSON.stringify(request),
  });
}

/** The first natural frequency itself: whether it is reached is within rounding. */
async function firstFrequency(): Promise<number> {
  const answer = await service.post('/v1/modes', { member: tautString, series: { modes: 1 } });
  return ((await answer.json()) as { modes: { frequency: number }[] }).modes[0].frequency;
}

describe('checks over HTTP', () => {
  it('are answered with 200 and a verdict in a header, whatever it is', async () => {
    const open = await firstFrequency();
    for (const [criteria, verdict] of [
      [[at(40, 'a')], 'pass'],
      [[at(40, 'a'), at(60, 'b'), at(open, 'c')], 'fail'],
      [[at(40, 'a'), at(open, 'c')], 'undetermined'],
    ] as const) {
      const reply = await checked(body([...criteria]));
      expect([reply.status, reply.headers.get('verdict')]).toEqual([200, verdict]);
      const answer = (await reply.json()) as { verdict: string; criteria: { id: string }[] };
      expect(answer.verdict).toBe(verdict);
      expect(answer.criteria.map(({ id }) => id)).toEqual(criteria.map(({ id }) => id));
    }
  });

  it('keep their result with its verdict, in both forms and from both ends of the store', async () => {
    const request = body([at(41, 'kept')]);
    const first = await checked(request);
    const again = await checked(request);
    const path = first.headers.get('content-location')!;
    const got = await fetch(service.url + path);
    const report = await fetch(service.url + path, { headers: { accept: 'application/xml' } });
    const reportAgain = await fetch(`${service.url}${path}?format=xml`);
    const text = await first.text();
    expect(await again.text()).toBe(text);
    expect(await got.text()).toBe(text);
    expect(await reportAgain.text()).toBe(await report.text());
    for (const reply of [first, again, got, report, reportAgain]) {
      expect([reply.status, reply.headers.get('verdict')]).toEqual([200, 'pass']);
    }
    expect(report.headers.get('content-type')).toBe('application/xml');
    expect(report.headers.get('etag')).not.toBe(got.headers.get('etag'));
    const tag = report.headers.get('etag')!;
    const headers = { accept: 'application/xml', 'if-none-match': tag };
    expect((await fetch(service.url + path, { headers })).status).toBe(304);
  });

  it('say what they offer, and other operations have no XML and no verdict', async () => {
    const request = body([at(42, 'a')]);
    const wrong = await checked(request, {}, '?format=csv');
    expect(wrong.status).toBe(400);
    expect(((await wrong.json()) as { detail: string }).detail).toMatch(/checks has: json, xml/);
    expect((await checked(request, { accept: 'image/png' })).status).toBe(406);
    expect((await checked(request, {}, '?view=shapes')).status).toBe(400);
    const path = (await checked(request)).headers.get('content-location')!;
    const picky = { accept: 'image/png, application/xml;q=0.5' };
    expect((await fetch(service.url + path, { headers: picky })).headers.get('content-type')).toBe(
      'application/xml',
    );
    expect((await fetch(`${service.url}${path}?format=svg`)).status).toBe(400);
    const modes = { member: tautString, series: { modes: 1 } };
    const solved = await service.post('/v1/modes', modes);
    expect(solved.headers.get('verdict')).toBeNull();
    const asXml = await fetch(`${service.url}/v1/modes?format=xml`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(modes),
    });
    expect(asXml.status).toBe(400);
  });

  it('are read in the worker where they are large, to the same digest', async () => {
    const request = body([at(43, 'a')]);
    const text = JSON.stringify(request);
    const small = await service.post('/v1/checks', text);
    const large = await service.post('/v1/checks', text.replace('{', `{${' '.repeat(20_000)}`));
    expect(large.headers.get('verdict')).toBe('pass');
    expect(large.headers.get('content-location')).toBe(small.headers.get('content-location'));
  });
});

describe('the report in XML', () => {
  const criteria = async () => [
    at(40, 'met <by far> & "well"'),
    at(60, "missed ]]> it's"),
    at(await firstFrequency(), 'open \u0001 🎻'),
  ];
  const accept = { accept: 'application/xml' };

  it('is read by a parser of such reports: one case a criterion, undetermined a failure', async () => {
    const report = (await parse(await (await checked(body(await criteria()), accept)).text()))!;
    if (!('testsuite' in report)) throw new Error('no test suites');
    expect(report).toMatchObject({ tests: 3, failures: 2, errors: 0 });
    const [suite] = report.testsuite!;
    expect(suite).toMatchObject({ name: 'modes', tests: 3, failures: 2, errors: 0, skipped: 0 });
    const [met, missed, open] = suite.testcase!;
    expect([met.name, met.failure]).toEqual(['met <by far> & "well"', undefined]);
    expect(met.classname).toBe('checks.frequency-range');
    expect(missed.name).toBe("missed ]]> it's");
    expect(missed.failure![0]).toMatchObject({
      type: 'fail',
      message: expect.stringMatching(/does not lie at or above 60 Hz/),
    });
    expect(open.name).toBe('open \ufffd 🎻');
    expect(open.failure![0]).toMatchObject({ type: 'undetermined' });
    expect(open.failure![0].inner).toMatch(/What would settle it: Move the limit/);
  });

  it('skips what is undetermined where the request says so', async () => {
    const request = body(await criteria(), { undetermined: 'skip' });
    const report = (await parse(await (await checked(request, accept)).text()))!;
    if (!('testsuite' in report)) throw new Error('no test suites');
    const [suite] = report.testsuite!;
    expect(suite).toMatchObject({ tests: 3, failures: 1, skipped: 1 });
    expect(suite.testcase!.map((one) => [one.failure !== undefined, one.skipped !== undefined])).toEqual([
      [false, false],
      [true, false],
      [false, true],
    ]);
  });

  it('comes of the examples too', async () => {
    for (const name of ['footbridge-hanger-checks', 'pump-shaft-checks']) {
      const file = new URL(`../../schemas/examples/${name}.json`, import.meta.url);
      const reply = await checked(JSON.parse(readFileSync(file, 'utf8')) as object, accept);
      const report = (await parse(await reply.text()))!;
      expect([reply.headers.get('verdict'), report]).toMatchObject(['pass', { failures: 0 }]);
    }
  });
});

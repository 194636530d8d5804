import { Writable } from 'node:stream';
import { pino } from 'pino';
import { afterEach, describe, expect, it } from 'vitest';
import { startTrialService, type TrialService } from './trial-service.ts';

const services: TrialService[] = [];
afterEach(async () => {
  await Promise.all(services.splice(0).map(({ app }) => app.close()));
});

async function startLogged(): Promise<{ service: TrialService; lines: () => Record<string, unknown>[] }> {
  const chunks: string[] = [];
  const stream = new Writable({
    write(chunk, _encoding, done) {
      chunks.push(String(chunk));
      done();
    },
  });
  const service = await startTrialService({ logger: pino({ level: 'info' }, stream) });
  services.push(service);
  const lines = () =>
    chunks
      .join('')
      .trim()
      .split('\n')
      .map((line) => JSON.parse(line) as Record<string, unknown>);
  return { service, lines };
}

describe('the log', () => {
  it('has one line per request with its id, path and status, and nothing of the body or query', async () => {
    const { service, lines } = await startLogged();
    const response = await service.post('/v1/modes?format=json', { note: 'confidential' });
    await response.text();
    const answered = lines().filter((line) => line.msg === 'request answered');
    expect(answered).toHaveLength(1);
    expect(answered[0]).toMatchObject({
      reqId: response.headers.get('x-request-id'),
      method: 'POST',
      path: '/v1/modes',
      status: 200,
      milliseconds: expect.any(Number),
    });
    expect(JSON.stringify(lines())).not.toMatch(/format|confidential/);
  });

  it('tells of a crash and of a bug with the cause and the id of the request', async () => {
    const { service, lines } = await startLogged();
    const crash = await service.post('/v1/modes', { do: 'exit' });
    const bug = await service.post('/v1/modes', { do: 'bug' });
    expect(await bug.text()).not.toContain('trial-worker');
    const causes = lines().filter((line) => line.msg === 'solver failed');
    expect(causes).toMatchObject([
      { level: 50, reqId: crash.headers.get('x-request-id'), cause: expect.stringContaining('exited') },
      {
        level: 50,
        reqId: bug.headers.get('x-request-id'),
        cause: expect.stringContaining('trial-worker.js'),
      },
    ]);
  });
});

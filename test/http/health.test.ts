import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildApp } from '../../src/http/app.ts';
import { EmbeddedResults } from '../../src/jobs/embedded-results.ts';
import { SolverPool } from '../../src/pool/solver-pool.ts';
import { trialWorker } from '../pool/trial-pool.ts';
import { trialPages } from './trial-pages.ts';
import { trialJobs, startTrialService, type TrialService } from './trial-service.ts';

let service: TrialService;
beforeAll(async () => {
  service = await startTrialService();
});
afterAll(async () => {
  await service.app.close();
});

describe('the health of the service', () => {
  it('is live and ready once its workers have loaded', async () => {
    const live = await fetch(`${service.url}/health/live`);
    expect([live.status, live.headers.get('cache-control')]).toEqual([200, 'no-store']);
    expect(await live.json()).toEqual({ status: 'live' });
    const ready = await fetch(`${service.url}/health/ready`);
    expect(await ready.json()).toEqual({ status: 'ready', running: 0, waiting: 0 });
  });

  it('is live but not ready before that', async () => {
    const options = { workerFile: trialWorker, workers: 1, queueLimit: 1, memoryLimit: 64 };
    const pool = new SolverPool({ ...options, onWorkerError: () => undefined });
    const app = await buildApp({
      pool,
      results: new EmbeddedResults({ requests: 1, requestBytes: 1e6, answerBytes: 0 }),
      version: '1',
      readRequest: (_operation, body) => body,
      solveDeadline: 1,
      bodyLimit: 1024,
      stopGrace: 1,
      ...trialJobs,
      ...trialPages,
    });
    const live = await app.inject('/health/live');
    expect(live.statusCode).toBe(200);
    const ready = await app.inject('/health/ready');
    expect([ready.statusCode, ready.json().code]).toEqual([503, 'not-ready']);
    expect(Number(ready.headers['retry-after'])).toBeGreaterThanOrEqual(1);
    await pool.start();
    expect((await app.inject('/health/ready')).statusCode).toBe(200);
    await app.close();
  });
});

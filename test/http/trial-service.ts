import { connect, type AddressInfo } from 'node:net';
import type { FastifyBaseLogger, FastifyInstance } from 'fastify';
import { fault } from '../../src/faults/fault.ts';
import { buildApp, type AppOptions } from '../../src/http/app.ts';
import { EmbeddedJobs } from '../../src/jobs/embedded-jobs.ts';
import { EmbeddedResults } from '../../src/jobs/embedded-results.ts';
import type { SolverPool, SolverPoolOptions } from '../../src/pool/solver-pool.ts';
import { startTrialPool } from '../pool/trial-pool.ts';
import { trialPages } from './trial-pages.ts';

export interface TrialService {
  readonly app: FastifyInstance;
  readonly pool: SolverPool;
  readonly url: string;
  readonly port: number;
  readonly post: (path: string, body: unknown, headers?: Record<string, string>) => Promise<Response>;
}

export interface TrialOptions {
  readonly pool?: Partial<SolverPoolOptions>;
  readonly app?: Partial<
    Pick<
      AppOptions,
      | 'solveDeadline'
      | 'bodyLimit'
      | 'stopGrace'
      | 'results'
      | 'version'
      | 'examples'
      | 'batchLimit'
      | 'makeJobs'
    >
  >;
  readonly logger?: FastifyBaseLogger;
}

/** Batches and jobs of the tests. */
export const trialJobs: Pick<AppOptions, 'batchLimit' | 'makeJobs'> = {
  batchLimit: 4,
  makeJobs: (solver, onError) =>
    new EmbeddedJobs({ bounds: { count: 100, bytes: 1e7, age: 60 }, solver, onError }),
};

/** The real app on a free port, in front of the worker of the tests; `do` in a request says what it does. */
export async function startTrialService(options: TrialOptions = {}): Promise<TrialService> {
  const pool = await startTrialPool(options.pool);
  const app = await buildApp({
    pool,
    results: new EmbeddedResults({ requests: 100, requestBytes: 1e7, answerBytes: 1e7 }),
    version: '1',
    readRequest: readTrialRequest,
    solveDeadline: 30,
    bodyLimit: 8 * 1024 * 1024,
    stopGrace: 5,
    ...trialJobs,
    ...trialPages,
    ...options.app,
    ...(options.logger === undefined ? {} : { logger: options.logger }),
  });
  const url = await app.listen({ port: 0, host: '127.0.0.1' });
  const { port } = app.server.address() as AddressInfo;
  const post: TrialService['post'] = (path, body, headers = {}) =>
    fetch(url + path, {
      method: 'POST',
      headers: { 'content-type': 'application/json', ...headers },
      body: typeof body === 'string' || body instanceof Uint8Array ? (body as string) : JSON.stringify(body),
    });
  return { app, pool, url, port, post };
}

function readTrialRequest(_operation: string, body: unknown): unknown {
  if ((body as { refuse?: boolean }).refuse) throw fault('no-inertia', '/refuse');
  return body;
}

/** Sends raw text over a socket and returns everything that comes back until the connection closes. */
export function exchange(port: number, text: string): Promise<string> {
  return new Promise((resolve, reject) => {
    const socket = connect(port, '127.0.0.1', () => socket.write(text));
    let answer = '';
    socket.setEncoding('utf8');
    socket.on('data', (chunk: string) => (answer += chunk));
    socket.on('close', () => resolve(answer));
    socket.on('error', reject);
  });
}

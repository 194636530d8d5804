import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import closeWithGrace from 'close-with-grace';
import { pino } from 'pino';
import { readRequest } from './contract/read-request.ts';
import { buildApp } from './http/app.ts';
import type { Example } from './http/pages/example.ts';
import { damped } from './jobs/damped.ts';
import { DistributedJobs } from './jobs/distributed-jobs.ts';
import { EmbeddedJobs } from './jobs/embedded-jobs.ts';
import { EmbeddedResults } from './jobs/embedded-results.ts';
import { sharedConnection } from './jobs/shared-connection.ts';
import { SharedResults } from './jobs/shared-results.ts';
import { SolverPool } from './pool/solver-pool.ts';
import { readSettings, type Settings } from './settings.ts';

/** Time beyond the grace that the server may take to close its connections, s. */
const closingTime = 5;

const settings = settingsOrExit();
const logger = pino({ level: settings.LOG_LEVEL });
const pool = new SolverPool({
  workerFile: fileURLToPath(new URL('./pool/worker.js', import.meta.url)),
  workers: settings.WORKERS,
  queueLimit: settings.QUEUE_LIMIT,
  memoryLimit: settings.MEMORY_LIMIT,
  onWorkerError: (error) => logger.error({ err: error }, 'worker failed'),
});
const document = { yaml: readBeside('openapi.yaml'), json: readBeside('openapi.json') };
const mebibyte = 1024 * 1024;
const embeddedResults = new EmbeddedResults({
  requests: settings.RESULTS_COUNT,
  requestBytes: settings.RESULTS_MEMORY * mebibyte,
  answerBytes: settings.ANSWERS_MEMORY * mebibyte,
});
const url = settings.QUEUE_URL;
const shared =
  url === ''
    ? null
    : sharedConnection(
        url,
        damped((error) => logger.error({ err: error }, 'queue away')),
      );
const jobsBytes = settings.JOBS_MEMORY * mebibyte;
const app = await buildApp({
  pool,
  results: shared === null ? embeddedResults : new SharedResults({ client: shared, near: embeddedResults }),
  batchLimit: settings.BATCH_LIMIT,
  makeJobs: (solver, onError) =>
    url === ''
      ? new EmbeddedJobs({
          bounds: { count: settings.JOBS_COUNT, bytes: jobsBytes, age: settings.JOBS_AGE },
          solver,
          onError,
        })
      : new DistributedJobs({
          url,
          age: settings.JOBS_AGE,
          bytes: jobsBytes,
          workers: settings.WORKERS,
          solver,
          onError,
        }),
  version: (JSON.parse(document.json) as { info: { version: string } }).info.version,
  readRequest,
  solveDeadline: settings.SOLVE_DEADLINE,
  bodyLimit: settings.BODY_LIMIT,
  stopGrace: settings.STOP_GRACE,
  document,
  examples: JSON.parse(readBeside('examples.json')) as Example[],
  logger,
});

closeWithGrace({ delay: (settings.STOP_GRACE + closingTime) * 1000, logger }, async ({ err, signal }) => {
  if (err) logger.fatal({ err }, 'stopping after an error');
  else logger.info({ signal }, 'stopping');
  await app.close();
  shared?.disconnect();
});

try {
  const address = await app.listen({ host: settings.HOST, port: settings.PORT });
  await pool.start();
  logger.info({ url: address, workers: settings.WORKERS }, 'ready');
} catch (error) {
  exit(wordingOf(error));
}

function settingsOrExit(): Settings {
  try {
    return readSettings();
  } catch (error) {
    return exit(`The settings are wrong:\n${(error as Error).message}`);
  }
}

function wordingOf(error: unknown): string {
  const { code, message } = error as NodeJS.ErrnoException;
  const place = `${settings.HOST}:${settings.PORT}`;
  switch (code) {
    case 'EADDRINUSE':
      return `${place} is in use. Stop what listens there, or set PORT to a free port.`;
    case 'EACCES':
      return `${place} may not be listened on. Set PORT to a port above 1023.`;
    case 'EADDRNOTAVAIL':
    case 'ENOTFOUND':
      return `${settings.HOST} is no address of this machine. Set HOST to one that is.`;
    default:
      return `The service cannot start: ${message}`;
  }
}

/** Beside the compiled program: the build puts them there. */
function readBeside(name: string): string {
  return readFileSync(new URL(name, import.meta.url), 'utf8');
}

function exit(message: string): never {
  process.stderr.write(`${message}\n`);
  process.exit(1);
}

// The real app in front of the worker named on the command line; prints its address when it is ready.
import { readRequest } from '../../dist/contract/read-request.js';
import { buildApp } from '../../dist/http/app.js';
import { EmbeddedJobs } from '../../dist/jobs/embedded-jobs.js';
import { EmbeddedResults } from '../../dist/jobs/embedded-results.js';
import { SolverPool } from '../../dist/pool/solver-pool.js';

const [workerFile, reading, workers, answerBytes = '0'] = process.argv.slice(2);
const pool = new SolverPool({
  workerFile,
  workers: Number(workers),
  queueLimit: 1000,
  memoryLimit: 512,
  onWorkerError: (error) => {
    throw error;
  },
});
const app = await buildApp({
  pool,
  // No answers are kept: every request is solved.
  results: new EmbeddedResults({ requests: 1000, requestBytes: 1e8, answerBytes: Number(answerBytes) }),
  version: '1',
  readRequest: reading === 'contract' ? readRequest : (_operation, body) => body,
  solveDeadline: 60,
  bodyLimit: 8 * 1024 * 1024,
  stopGrace: 1,
  batchLimit: 16,
  makeJobs: (solver, onError) =>
    new EmbeddedJobs({ bounds: { count: 100, bytes: 1e8, age: 60 }, solver, onError }),
  document: { yaml: '', json: '{"components":{"schemas":{}}}' },
  examples: [],
});
const url = await app.listen({ host: '127.0.0.1', port: 0 });
await pool.start();
console.log(url);

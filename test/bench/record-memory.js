// A process with one worker of the pool that solves the long record, sent as a body: its largest memory.
import { performance } from 'node:perf_hooks';
import { fileURLToPath } from 'node:url';
import { plainJson } from '../../dist/pool/answer-form.js';
import { SolverPool } from '../../dist/pool/solver-pool.js';
import { recordRequest } from './record-request.js';

const megabytes = (bytes) => Math.round(bytes / 1e6);
const pool = new SolverPool({
  workerFile: fileURLToPath(new URL('../../dist/pool/worker.js', import.meta.url)),
  workers: 1,
  queueLimit: 1,
  memoryLimit: 512,
  onWorkerError: (error) => {
    throw error;
  },
});
await pool.start();
const request = recordRequest(['relativeDisplacement', 'acceleration', 'force'], true);
const body = new TextEncoder().encode(JSON.stringify(request));
const before = process.memoryUsage().rss;
const solves = 5;
for (let i = 0; i < solves; i++) {
  const task = { kind: 'body', operation: 'responses', body: body.slice(), wanted: plainJson, version: '1' };
  const outcome = await pool.run(task, { arrived: performance.now(), deadline: 60 });
  if (outcome.kind !== 'answer') throw new Error(JSON.stringify(outcome));
}
const largest = process.resourceUsage().maxRSS * 1024;
console.log(
  `Memory of a process with one worker: ${megabytes(before)} MB ready, at most ${megabytes(largest)} MB in ${solves} solves, ` +
    `so the worker took ${megabytes(largest - before)} MB more (goal: below 200 MB)`,
);
await pool.stop(1);

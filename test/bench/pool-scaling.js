import { performance } from 'node:perf_hooks';
import { fileURLToPath } from 'node:url';
import { plainJson } from '../../dist/pool/answer-form.js';
import { SolverPool } from '../../dist/pool/solver-pool.js';
import { fixed, median, printTable } from './timing.js';

const trialWorker = fileURLToPath(new URL('../pool/trial-worker.js', import.meta.url));

/** How much sooner two workers finish the same tasks than one. */
export async function poolScaling() {
  const pools = await Promise.all([1, 2].map(startPool));
  const rows = [];
  for (const [steps, tasks] of [
    [20_000, 2000],
    [200_000, 400],
  ]) {
    const times = [[], []];
    for (let round = 0; round < 7; round++) {
      for (const [i, pool] of pools.entries()) times[i].push(await run(pool, steps, tasks));
    }
    const [one, two] = times.map(median);
    rows.push([`${fixed(one / tasks, 2)} ms`, tasks, fixed(one, 0), fixed(two, 0), fixed(one / two)]);
  }
  printTable('Two workers against one', ['task', 'tasks', 'one ms', 'two ms', 'ratio'], rows);
  await Promise.all(pools.map((pool) => pool.stop(1)));
}

async function startPool(workers) {
  const onWorkerError = (error) => {
    throw error;
  };
  const pool = new SolverPool({
    workerFile: trialWorker,
    workers,
    queueLimit: 10_000,
    memoryLimit: 64,
    onWorkerError,
  });
  await pool.start();
  return pool;
}

async function run(pool, steps, tasks) {
  const started = performance.now();
  // A buffer for every task: it moves to the worker.
  const task = () => ({
    kind: 'request',
    operation: 'compute',
    request: new TextEncoder().encode(JSON.stringify({ steps })),
    wanted: plainJson,
  });
  const outcomes = await Promise.all(
    Array.from({ length: tasks }, () => pool.run(task(), { arrived: performance.now(), deadline: 600 })),
  );
  if (outcomes.some(({ kind }) => kind !== 'answer')) throw new Error('a task failed');
  return performance.now() - started;
}

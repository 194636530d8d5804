import { fileURLToPath } from 'node:url';
import { performance } from 'node:perf_hooks';
import { plainJson } from '../../src/pool/answer-form.ts';
import { SolverPool, type SolveOutcome, type SolverPoolOptions } from '../../src/pool/solver-pool.ts';

/** The worker of the tests: operations that spin, crash, fill the memory, … */
export const trialWorker = fileURLToPath(new URL('./trial-worker.js', import.meta.url));

export async function startTrialPool(options: Partial<SolverPoolOptions> = {}): Promise<SolverPool> {
  const pool = new SolverPool({
    workerFile: trialWorker,
    workers: 1,
    queueLimit: 8,
    memoryLimit: 64,
    onWorkerError: () => undefined,
    ...options,
  });
  await pool.start();
  return pool;
}

export function ask(
  pool: SolverPool,
  operation: string,
  request: unknown = {},
  limits: { deadline?: number; gone?: AbortSignal } = {},
): Promise<SolveOutcome> {
  return pool.run(
    { kind: 'request', operation, request: bytesOf(request), wanted: plainJson },
    { arrived: performance.now(), deadline: 30, ...limits },
  );
}

function bytesOf(request: unknown): Uint8Array<ArrayBuffer> {
  return new TextEncoder().encode(JSON.stringify(request));
}

/** The parsed answer; throws where the outcome is none. */
export function answerOf(outcome: SolveOutcome): Record<string, unknown> {
  if (outcome.kind !== 'answer') throw new Error(`no answer but ${JSON.stringify(outcome)}`);
  return JSON.parse(new TextDecoder().decode(outcome.bytes)) as Record<string, unknown>;
}

export function codesOf(outcome: SolveOutcome): string[] {
  return outcome.kind === 'faults' ? outcome.records.map((record) => record.code) : [outcome.kind];
}

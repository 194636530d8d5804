import { performance } from 'node:perf_hooks';
import { move, Piscina } from 'piscina';
import { encodeJson } from '../encoding/json.ts';
import { readJson } from '../encoding/read-json.ts';
import { Fault } from '../faults/fault.ts';
import type { SolveResult, SolverOperations, SolveTask } from './task.ts';

/**
 * The worker's side of the thread boundary: reads where the event loop has not, solves, encodes, and
 * hands the bytes over without a copy.
 *
 * @param operations what the worker can solve, by name
 * @returns the function that the pool calls with every task
 */
export function serveTasks(operations: SolverOperations): (task: SolveTask) => unknown {
  return (task) => handOver(runTask(operations, task));
}

/** Runs one task and tags what comes of it; never throws. */
export function runTask(operations: SolverOperations, task: SolveTask): SolveResult {
  if (task.kind === 'ready') return { kind: 'ready' };
  const started = performance.now();
  try {
    const operation = operations[task.operation];
    const request = task.kind === 'body' ? operation.read(readJson(task.body)) : task.request;
    const bytes = encodeJson(operation.solve(request));
    return { kind: 'answer', bytes, seconds: (performance.now() - started) / 1000 };
  } catch (error) {
    if (error instanceof Fault) return { kind: 'faults', records: error.records };
    const stack = error instanceof Error ? (error.stack ?? error.message) : String(error);
    return { kind: 'error', memory: isOutOfMemory(error), stack };
  }
}

/** Typed arrays lie outside the heap that a worker's limits cap; their failure is a RangeError. */
function isOutOfMemory(error: unknown): boolean {
  return (
    error instanceof RangeError &&
    /array buffer allocation failed|invalid (string|(typed )?array) length/i.test(error.message)
  );
}

function handOver(result: SolveResult): unknown {
  if (result.kind !== 'answer') return result;
  return move({ [Piscina.transferableSymbol]: result.bytes.buffer, [Piscina.valueSymbol]: result } as never);
}

import { performance } from 'node:perf_hooks';
import { move, Piscina } from 'piscina';
import { identifyRequest } from '../contract/identify-request.ts';
import { compress, decompress } from '../encoding/compress.ts';
import { readJson } from '../encoding/read-json.ts';
import { Fault } from '../faults/fault.ts';
import { encodeAnswer } from './encode-answer.ts';
import { answerLines } from './serve-lines.ts';
import { buffersOf, type AnyTask, type SolveResult, type SolverOperations, type SolveTask } from './task.ts';

/**
 * The worker's side of the thread boundary: reads where the event loop has not, solves, encodes, and
 * hands the bytes over without a copy.
 *
 * @param operations what the worker can solve, by name
 * @returns the function that the pool calls with every task
 */
export function serveTasks(operations: SolverOperations): (task: AnyTask) => unknown {
  return (task) => handOver(runTask(operations, task));
}

/** Runs one task and tags what comes of it; never throws. */
export function runTask(operations: SolverOperations, task: AnyTask): SolveResult {
  if (task.kind === 'ready') return { kind: 'ready' };
  const started = performance.now();
  try {
    if (task.kind === 'lines') return { ...answerLines(operations, task), seconds: secondsSince(started) };
    const answered = task.kind === 'body' ? answerBody(operations, task) : answerRequest(operations, task);
    return { kind: 'answer', ...answered, seconds: secondsSince(started) };
  } catch (error) {
    if (error instanceof Fault) return { kind: 'faults', records: error.records };
    const stack = error instanceof Error ? (error.stack ?? error.message) : String(error);
    return { kind: 'error', memory: isOutOfMemory(error), stack };
  }
}

function secondsSince(started: number): number {
  return (performance.now() - started) / 1000;
}

function answerBody(operations: SolverOperations, task: Extract<SolveTask, { kind: 'body' }>) {
  const { operation, body, wanted, version } = task;
  const identified = identifyRequest(operation, operations[operation].read(readJson(body)), version);
  // From the canonical text, as for any other request: equal requests are solved from equal objects.
  const request = parse(identified.request);
  const answer = operations[operation].solve(request);
  const encoded = encodeAnswer(operation, request, answer, wanted);
  return {
    ...encoded,
    ...verdictIn(operations, operation, answer),
    identified: { digest: identified.digest, request: identified.request },
  };
}

function answerRequest(operations: SolverOperations, task: Extract<SolveTask, { kind: 'request' }>) {
  const { operation, kept, wanted } = task;
  const json = kept === undefined ? null : decompress(kept.bytes, kept.coding);
  const judges = operations[operation].verdictOf !== undefined;
  if (json !== null && wanted.form.format === 'json' && !judges) {
    return compress(new Uint8Array(json), wanted.codings);
  }
  const request = parse(task.request);
  const answer = json === null ? operations[operation].solve(request) : parse(json);
  return { ...encodeAnswer(operation, request, answer, wanted), ...verdictIn(operations, operation, answer) };
}

function verdictIn(operations: SolverOperations, operation: string, answer: unknown): { verdict?: string } {
  const { verdictOf } = operations[operation];
  return verdictOf === undefined ? {} : { verdict: verdictOf(answer) };
}

function parse(bytes: Uint8Array): unknown {
  return JSON.parse(new TextDecoder().decode(bytes)) as unknown;
}

/** Typed arrays lie outside the heap that a worker's limits cap; their failure is a RangeError. */
function isOutOfMemory(error: unknown): boolean {
  return (
    error instanceof RangeError &&
    /array buffer allocation failed|invalid (string|(typed )?array) length/i.test(error.message)
  );
}

function handOver(result: SolveResult): unknown {
  const buffers = buffersOf(result);
  if (buffers.length === 0) return result;
  return move({ [Piscina.transferableSymbol]: buffers, [Piscina.valueSymbol]: result } as never);
}

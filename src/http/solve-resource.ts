import { performance } from 'node:perf_hooks';
import type { FastifyInstance, FastifyRequest } from 'fastify';
import type { Operation } from '../contract/read-request.ts';
import { readJson } from '../encoding/read-json.ts';
import { Fault } from '../faults/fault.ts';
import type { SolverPool } from '../pool/solver-pool.ts';
import type { SolveTask } from '../pool/task.ts';
import { warmUpBody } from '../pool/warm-up.ts';
import { inPieces } from './answer-stream.ts';
import { goneSignal } from './client-gone.ts';
import { preferredWait } from './prefer.ts';
import { addResource } from './resource.ts';

/**
 * Largest body in bytes that is read on the event loop; larger ones are read in the worker. At 8 KiB
 * even a body of nothing but unit strings holds the loop for less than 5 ms (test/bench). The limit
 * that is promised is 256 KiB.
 */
export const inlineBodyLimit = 8 * 1024;

/** Readings before the first request, until the compiler has seen the reading often enough. */
const warmUpRounds = 100;

export interface SolveOptions {
  readonly pool: SolverPool;
  /** Reads a parsed body of an operation into the canonical request; throws Fault. */
  readonly readRequest: (operation: Operation, body: unknown) => unknown;
  /** Longest time from the arrival of a request to its answer, s. */
  readonly solveDeadline: number;
}

/** `POST url` solves one operation: read, pool, reply. */
export function addSolveResource(
  app: FastifyInstance,
  url: string,
  operation: Operation,
  options: SolveOptions,
): void {
  const { pool, readRequest, solveDeadline } = options;
  app.addHook('onReady', async () => {
    const body = warmUpBody(operation);
    for (let round = 0; round < warmUpRounds; round++) readRequest(operation, readJson(body));
  });
  addResource(app, {
    url,
    offers: ['application/json'],
    post: async (request, reply) => {
      const arrived = performance.now();
      const wait = preferredWait(request.headers.prefer);
      const deadline = Math.min(wait ?? solveDeadline, solveDeadline);
      const task = taskOf(request, operation, options);
      const outcome = await pool.run(task, { arrived, deadline, gone: goneSignal(reply) });
      if (outcome.kind === 'gone') {
        request.log.info({ operation }, 'client gone');
        return reply.hijack();
      }
      if (outcome.kind === 'faults') {
        if (outcome.cause !== undefined)
          request.log.error({ operation, cause: outcome.cause }, 'solver failed');
        throw new Fault(outcome.records);
      }
      if (wait !== null && wait === deadline) reply.header('preference-applied', `wait=${wait}`);
      const { buffer, byteOffset, byteLength } = outcome.bytes;
      reply.type('application/json').header('content-length', byteLength);
      return reply.send(inPieces(Buffer.from(buffer, byteOffset, byteLength)));
    },
  });
}

function taskOf(request: FastifyRequest, operation: Operation, { readRequest }: SolveOptions): SolveTask {
  const body = (request.body as Uint8Array<ArrayBuffer> | undefined) ?? new Uint8Array(0);
  if (body.byteLength > inlineBodyLimit) return { kind: 'body', operation, body };
  return { kind: 'request', operation, request: readRequest(operation, readJson(body)) };
}

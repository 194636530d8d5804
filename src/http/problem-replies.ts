import type { FastifyError, FastifyInstance, FastifyReply, FastifyRequest } from 'fastify';
import { Fault, fault, faultRecord, type FaultRecord } from '../faults/fault.ts';
import type { SolverPool } from '../pool/solver-pool.ts';
import { problemMediaType, problemOf } from './problem.ts';

/**
 * Answers everything that goes wrong with a problem document.
 *
 * @param paths those served, for the answer to an unknown one
 */
export function addProblemReplies(
  app: FastifyInstance,
  pool: SolverPool,
  paths: () => readonly string[],
): void {
  app.setErrorHandler((error: FastifyError, request, reply) =>
    sendProblem(request, reply, recordsOf(error, request), pool),
  );
  const notFound = (request: FastifyRequest): Error =>
    fault('not-found', '', { path: pathOf(request), resources: paths().join(', ') });
  // Before the body is read: what is not served needs no body.
  app.addHook('onRequest', async (request) => {
    if (request.is404) throw notFound(request);
  });
  // What a handler finds missing below its own path.
  app.setNotFoundHandler((request) => {
    throw notFound(request);
  });
}

export function sendProblem(
  request: FastifyRequest,
  reply: FastifyReply,
  records: readonly FaultRecord[],
  pool: SolverPool,
): FastifyReply {
  const problem = problemOf(records, request.id);
  if (problem.status === 503) reply.header('retry-after', String(pool.retryAfter));
  return reply
    .code(problem.status)
    .header('cache-control', 'no-store')
    .type(problemMediaType)
    .send(Buffer.from(JSON.stringify(problem)));
}

function recordsOf(error: FastifyError | Fault, request: FastifyRequest): readonly FaultRecord[] {
  if (error instanceof Fault) return error.records;
  request.log.error({ err: error }, 'unexpected error');
  return [faultRecord('internal-error', '')];
}

export function pathOf(request: FastifyRequest): string {
  return request.url.split('?', 1)[0];
}

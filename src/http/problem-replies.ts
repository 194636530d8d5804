import type { FastifyError, FastifyInstance, FastifyReply, FastifyRequest } from 'fastify';
import { Fault, faultRecord, type FaultRecord } from '../faults/fault.ts';
import type { SolverPool } from '../pool/solver-pool.ts';
import { problemMediaType, problemOf } from './problem.ts';

export interface ProblemOptions {
  readonly pool: SolverPool;
  readonly bodyLimit: number;
  /** Paths served, for the answer to an unknown one. */
  readonly paths: () => readonly string[];
}

/** Answers everything that goes wrong with a problem document. */
export function addProblemReplies(app: FastifyInstance, options: ProblemOptions): void {
  app.setErrorHandler((error: FastifyError, request, reply) =>
    sendProblem(request, reply, recordsOf(error, request, options), options.pool),
  );
  // Before the body is read: what is not served needs no body.
  app.addHook('onRequest', async (request) => {
    if (request.is404) {
      throw new Fault([
        faultRecord('not-found', '', { path: pathOf(request), resources: options.paths().join(', ') }),
      ]);
    }
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
  if (problem.status === 415) reply.header('accept', 'application/json');
  return reply
    .code(problem.status)
    .type(problemMediaType)
    .send(Buffer.from(JSON.stringify(problem)));
}

function recordsOf(
  error: FastifyError | Fault,
  request: FastifyRequest,
  options: ProblemOptions,
): readonly FaultRecord[] {
  if (error instanceof Fault) return error.records;
  switch (error.code) {
    case 'FST_ERR_CTP_BODY_TOO_LARGE':
      return [faultRecord('body-too-large', '', { limit: options.bodyLimit })];
    case 'FST_ERR_CTP_INVALID_CONTENT_LENGTH':
      return [
        faultRecord('malformed-http', '', { reason: 'the body is not as long as Content-Length says' }),
      ];
    case 'ECONNRESET':
      return [faultRecord('malformed-http', '', { reason: 'the connection broke off inside the body' })];
  }
  request.log.error({ err: error }, 'unexpected error');
  return [faultRecord('internal-error', '')];
}

export function pathOf(request: FastifyRequest): string {
  return request.url.split('?', 1)[0];
}

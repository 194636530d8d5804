import type { FastifyReply, FastifyRequest } from 'fastify';
import { Fault } from '../faults/fault.ts';
import type { Answered, AnswerOutcome } from '../jobs/answers.ts';
import type { Format } from '../pool/answer-form.ts';
import type { SolveLimits } from '../pool/solver-pool.ts';
import { inPieces } from './answer-stream.ts';
import { entityTag } from './entity-tag.ts';
import { mediaTypeOf } from './negotiate-answer.ts';
import { confirmWait } from './solve-limits.ts';

/** Where the result of a digest is. */
export function resultPath(digest: string): string {
  return `/v1/results/${digest}`;
}

/** A drawing that is opened by itself keeps its styles and embedded pictures, and can do nothing else. */
const drawingPolicy =
  "default-src 'none';style-src 'unsafe-inline';img-src data:;font-src data:;frame-ancestors 'none'";

/**
 * Sends what came of a solve.
 *
 * @throws Fault where it came to faults
 */
export function sendOutcome(
  request: FastifyRequest,
  reply: FastifyReply,
  operation: string,
  outcome: AnswerOutcome,
  limits: SolveLimits,
): FastifyReply {
  if (outcome.kind === 'gone') {
    request.log.info({ operation }, 'client gone');
    return reply.hijack();
  }
  if (outcome.kind === 'faults') {
    if (outcome.cause !== undefined) request.log.error({ operation, cause: outcome.cause }, 'solver failed');
    throw new Fault(outcome.records);
  }
  confirmWait(request, reply, limits);
  return sendAnswer(reply, request.answerPreferences!.format, outcome);
}

function sendAnswer(reply: FastifyReply, format: Format, answered: Answered): FastifyReply {
  const { buffer, byteOffset, byteLength } = answered.bytes;
  reply
    .type(format === 'csv' ? 'text/csv; charset=utf-8; header=present' : mediaTypeOf[format])
    .header('content-length', byteLength)
    .header('content-location', resultPath(answered.digest))
    .header('etag', entityTag(answered.key));
  if (answered.verdict !== undefined) reply.header('verdict', answered.verdict);
  if (answered.coding !== 'identity') reply.header('content-encoding', answered.coding);
  if (format === 'svg') reply.header('content-security-policy', drawingPolicy);
  return reply.send(inPieces(Buffer.from(buffer, byteOffset, byteLength)));
}

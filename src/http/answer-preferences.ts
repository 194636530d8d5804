import type { FastifyInstance, FastifyReply, FastifyRequest } from 'fastify';
import type { Operation } from '../contract/read-request.ts';
import type { ContentCoding } from '../encoding/compress.ts';
import type { Format, WantedAnswer } from '../pool/answer-form.ts';
import { readAnswerQuery, type AnswerQuery } from './answer-query.ts';
import { formOf, negotiateCodings, negotiateFormat } from './negotiate-answer.ts';

/** What a client wants of an answer, as far as it is known before the operation is. */
interface AnswerPreferences {
  readonly query: AnswerQuery;
  readonly format: Format;
  readonly codings: readonly ContentCoding[];
}

declare module 'fastify' {
  interface FastifyRequest {
    answerPreferences: AnswerPreferences | null;
  }
}

/** Lets requests carry what their clients want. */
export function addAnswerPreferences(app: FastifyInstance): void {
  app.decorateRequest('answerPreferences', null);
}

/**
 * Reads what a client wants of an answer, before anything is spent on it.
 *
 * @param operation null where it is not known yet; then it is read again once it is
 * @throws Fault of the query, of Accept or of Accept-Encoding
 */
export function readPreferences(
  request: FastifyRequest,
  reply: FastifyReply,
  operation: Operation | null = null,
): void {
  // Problems too depend on both headers.
  reply.header('vary', 'Accept, Accept-Encoding');
  const query = readAnswerQuery(request.query as Record<string, string | string[]>);
  const format = negotiateFormat(request, query, operation);
  request.answerPreferences = { query, format, codings: negotiateCodings(request, format) };
}

/**
 * The form and codings that the client of a request wants of an answer to an operation.
 *
 * @throws Fault `parameter-value` where the operation has no such table or view
 */
export function wantedAnswer(request: FastifyRequest, operation: Operation): WantedAnswer {
  const { query, format, codings } = request.answerPreferences!;
  return { form: formOf(operation, format, query), codings };
}

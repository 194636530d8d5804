import type { FastifyInstance } from 'fastify';
import type { Operation } from '../contract/read-request.ts';
import { fault } from '../faults/fault.ts';
import { answerKey } from '../jobs/answer-key.ts';
import { readPreferences, wantedAnswer } from './answer-preferences.ts';
import { shownText } from './answer-query.ts';
import { entityTag, namedTag } from './entity-tag.ts';
import { addResource } from './resource.ts';
import { resultPath, sendOutcome } from './send-answer.ts';
import { limitsOf } from './solve-limits.ts';
import type { SolveOptions } from './solve-resource.ts';

/** A digest names one content for ever (RFC 8246). */
const cacheControl = 'max-age=31536000, immutable';

/** `GET /v1/results/{digest}`: the answer to a request that was solved before, in any form. */
export function addResultResource(app: FastifyInstance, { answers, solveDeadline }: SolveOptions): void {
  addResource(app, {
    url: '/v1/results/:digest',
    offers: (request, reply) => readPreferences(request, reply),
    get: async (request, reply) => {
      const limits = limitsOf(request, reply, solveDeadline);
      const { digest } = request.params as { digest: string };
      const result = await answers.find(digest);
      if (result === null) throw fault('result-not-kept', '', { digest: shownText(digest) });
      readPreferences(request, reply, result.operation as Operation);
      const wanted = wantedAnswer(request, result.operation as Operation);
      // Pages of other origins may show the figures of a result.
      reply.header('cross-origin-resource-policy', 'cross-origin');
      const tags = wanted.codings.map((coding) => entityTag(answerKey(digest, wanted.form, coding)));
      const tag = namedTag(request.headers['if-none-match'], tags);
      if (tag !== null) {
        return reply
          .code(304)
          .headers({ etag: tag, 'cache-control': cacheControl, 'content-location': resultPath(digest) })
          .send();
      }
      const outcome = await answers.toResult(result, wanted, limits);
      if (outcome.kind === 'answered') reply.header('cache-control', cacheControl);
      return sendOutcome(request, reply, result.operation, outcome, limits);
    },
  });
}

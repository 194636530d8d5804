import type { FastifyInstance } from 'fastify';
import { identifyRequest } from '../contract/identify-request.ts';
import type { Operation } from '../contract/read-request.ts';
import { readJson } from '../encoding/read-json.ts';
import type { Answers } from '../jobs/answers.ts';
import { warmUpBody } from '../pool/warm-up.ts';
import { readPreferences, wantedAnswer } from './answer-preferences.ts';
import { submitJob, type JobOptions } from './job-submission.ts';
import { prefersAsync } from './prefer.ts';
import { addResource } from './resource.ts';
import { sendOutcome } from './send-answer.ts';
import { limitsOf } from './solve-limits.ts';

/**
 * Largest body in bytes that is read on the event loop; larger ones are read in the worker. At 8 KiB
 * even a body of nothing but unit strings holds the loop for less than 5 ms (test/bench). The limit
 * that is promised is 256 KiB.
 */
export const inlineBodyLimit = 8 * 1024;

/** Readings before the first request, until the compiler has seen the reading often enough. */
const warmUpRounds = 100;

export interface SolveOptions extends JobOptions {
  readonly answers: Answers;
  /** Reads a parsed body of an operation into the canonical request; throws Fault. */
  readonly readRequest: (operation: Operation, body: unknown) => unknown;
  /** Version of the solver, part of every digest. */
  readonly version: string;
  /** Longest time from the arrival of a request to its answer, s. */
  readonly solveDeadline: number;
}

/** `POST url` solves one operation: read, solve, reply. */
export function addSolveResource(
  app: FastifyInstance,
  url: string,
  operation: Operation,
  options: SolveOptions,
): void {
  const { answers, readRequest, version, solveDeadline } = options;
  app.addHook('onReady', async () => {
    const body = warmUpBody(operation);
    for (let round = 0; round < warmUpRounds; round++) {
      identifyRequest(operation, readRequest(operation, readJson(body)), version);
    }
  });
  addResource(app, {
    url,
    offers: (request, reply) => {
      readPreferences(request, reply, operation);
      wantedAnswer(request, operation);
    },
    post: async (request, reply) => {
      const limits = limitsOf(request, reply, solveDeadline);
      const wanted = wantedAnswer(request, operation);
      const body = (request.body as Uint8Array<ArrayBuffer> | undefined) ?? new Uint8Array(0);
      const isLarge = body.byteLength > inlineBodyLimit;
      const read = isLarge ? null : readRequest(operation, readJson(body));
      if (prefersAsync(request.headers.prefer))
        return submitJob(request, reply, { kind: 'solve', operation, body }, options);
      const outcome =
        read === null
          ? await answers.toBody(operation, body, wanted, limits)
          : await answers.toRequest(identifyRequest(operation, read, version), wanted, limits);
      return sendOutcome(request, reply, operation, outcome, limits);
    },
  });
}

import { Readable } from 'node:stream';
import type { FastifyInstance, FastifyReply, FastifyRequest } from 'fastify';
import { fault } from '../faults/fault.ts';
import { BatchEnded } from '../jobs/batch-ended.ts';
import { NotWanted, type LineSolver } from '../jobs/line-solver.ts';
import { splitLines } from '../jobs/split-lines.ts';
import { writeLines } from '../jobs/write-lines.ts';
import type { SolverPool } from '../pool/solver-pool.ts';
import { goneSignal } from './client-gone.ts';
import { submitJob, type JobOptions } from './job-submission.ts';
import { lineSource } from './line-source.ts';
import { linesMediaType, requireAcceptable } from './media.ts';
import { prefersAsync } from './prefer.ts';
import { problemOf } from './problem.ts';
import { addResource } from './resource.ts';

/** Longest silence of a client whose lines could be taken, s. */
const patience = 60;

/** Bytes of answers that wait in the stream to the client beside those of the solver. */
const streamBuffer = 64 * 1024;

export interface BatchOptions extends JobOptions {
  readonly pool: SolverPool;
  readonly lineSolver: LineSolver;
  /** Batches that may be answered at the same time. */
  readonly batchLimit: number;
}

/** `POST /v1/batches`: lines in, their answers out in the same order, while the lines still come. */
export function addBatchResource(app: FastifyInstance, options: BatchOptions): void {
  const { pool, lineSolver, batchLimit } = options;
  let underWay = 0;
  // The body stays a stream.
  app.addContentTypeParser(linesMediaType, async (_request: FastifyRequest, payload: Readable) => payload);
  addResource(app, {
    url: '/v1/batches',
    takes: linesMediaType,
    offers: (request) => {
      if (!prefersAsync(request.headers.prefer)) requireAcceptable(request, [linesMediaType]);
    },
    post: async (request, reply) => {
      const source = lineSource(request.body as Readable, patience);
      if (prefersAsync(request.headers.prefer)) {
        return submitJob(request, reply, { kind: 'batch', source }, options);
      }
      if (pool.isStopping) throw fault('stopping', '');
      if (underWay >= batchLimit) throw fault('too-many-batches', '', { limit: batchLimit });
      underWay++;
      const gone = goneSignal(reply);
      const ended = (): number => underWay--;
      gone.addEventListener('abort', () => request.log.info({ operation: 'batches' }, 'client gone'));
      const answers = answersTo(source, lineSolver, gone);
      let first: IteratorResult<Uint8Array>;
      try {
        // What is wrong with the body as a whole is answered as with any other request.
        first = await answers.next();
        if (first.done) throw fault('empty-body', '');
      } catch (error) {
        ended();
        if (error instanceof NotWanted) return reply.hijack();
        throw error;
      }
      const stream = Readable.from(continued(first.value, answers, ended), {
        objectMode: false,
        highWaterMark: streamBuffer,
      });
      return sendLines(reply, stream);
    },
  });
}

/** Sends lines as they come. */
export function sendLines(reply: FastifyReply, stream: Readable): FastifyReply {
  return (
    reply
      .type(linesMediaType)
      .header('cache-control', 'no-store')
      .header('x-content-type-options', 'nosniff')
      // A proxy that collects the answer would undo the streaming.
      .header('x-accel-buffering', 'no')
      .send(stream)
  );
}

async function* continued(
  first: Uint8Array,
  rest: AsyncGenerator<Uint8Array>,
  ended: () => void,
): AsyncGenerator<Uint8Array> {
  try {
    yield first;
    yield* rest;
  } catch (error) {
    if (!(error instanceof NotWanted)) throw error;
  } finally {
    ended();
  }
}

/** Answers in order; where the batch cannot go on, a last line says from which line on and why. */
async function* answersTo(
  source: AsyncIterable<Uint8Array>,
  solver: LineSolver,
  gone: AbortSignal,
): AsyncGenerator<Uint8Array> {
  let answered = false;
  try {
    for await (const { bytes } of solver.solve(splitLines(source, solver.lineLimit), gone)) {
      answered = true;
      yield bytes;
    }
  } catch (error) {
    if (!(error instanceof BatchEnded) || !answered) throw error;
    const lines = [{ id: null, records: error.records }];
    yield writeLines([error.line], { bytes: new Uint8Array(0), lines }, problemOf);
  }
}

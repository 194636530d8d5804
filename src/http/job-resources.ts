import { Readable } from 'node:stream';
import type { FastifyInstance, FastifyReply, FastifyRequest } from 'fastify';
import type { Operation } from '../contract/read-request.ts';
import { Fault, fault, type FaultValues } from '../faults/fault.ts';
import { isFinished, type Job, type JobEngine } from '../jobs/job.ts';
import type { SolverPool } from '../pool/solver-pool.ts';
import { readPreferences, wantedAnswer } from './answer-preferences.ts';
import { shownText } from './answer-query.ts';
import { sendLines } from './batch-resource.ts';
import { goneSignal } from './client-gone.ts';
import { jobDocument } from './job-document.ts';
import { jobEvents } from './job-events.ts';
import { sendJob, type JobOptions } from './job-submission.ts';
import { linesMediaType, requireAcceptable } from './media.ts';
import { addResource } from './resource.ts';
import { sendOutcome } from './send-answer.ts';
import { limitsOf } from './solve-limits.ts';
import type { SolveOptions } from './solve-resource.ts';

export interface JobResourceOptions extends JobOptions, SolveOptions {
  readonly pool: SolverPool;
}

/** `/v1/jobs/{id}`: what a job is doing, its progress as events, its result; DELETE cancels it. */
export function addJobResources(app: FastifyInstance, options: JobResourceOptions): void {
  const { jobs, pool } = options;
  addResource(app, {
    url: '/v1/jobs/:id',
    offers: ['application/json'],
    get: async (request, reply) => sendJob(reply, await jobOf(request, jobs)),
    delete: async (request, reply) => {
      const { id } = request.params as { id: string };
      return sendJob(reply, (await jobs.cancel(id)) ?? notFound(id, jobs));
    },
  });
  addResource(app, {
    url: '/v1/jobs/:id/events',
    offers: ['text/event-stream'],
    get: async (request, reply) => {
      const job = await jobOf(request, jobs);
      const last = request.headers['last-event-id'];
      // To a client that has seen the end, 204 says not to come back (HTML, server-sent events).
      if (last === 'end') return reply.code(204).send();
      const stop = { gone: goneSignal(reply), isStopping: () => pool.isStopping };
      const seen = /^\d{1,9}$/.test(String(last)) ? Number(last) : null;
      return reply
        .type('text/event-stream')
        .header('cache-control', 'no-store')
        .header('x-accel-buffering', 'no')
        .send(Readable.from(jobEvents(job, jobs, seen, stop), { objectMode: false }));
    },
  });
  addResource(app, {
    url: '/v1/jobs/:id/result',
    // What is on offer depends on the job.
    offers: () => undefined,
    get: async (request, reply) => {
      const job = await jobOf(request, jobs);
      requireResult(job, reply);
      return job.kind === 'batch'
        ? sendBatch(request, reply, job, options)
        : sendSolve(request, reply, job, options);
    },
  });
}

async function jobOf(request: FastifyRequest, jobs: JobEngine): Promise<Job> {
  const { id } = request.params as { id: string };
  return (await jobs.find(id)) ?? notFound(id, jobs);
}

function notFound(id: string, { age, lasting }: JobEngine): never {
  const volatile = lasting ? '' : ', when newer ones need their place, and when this service restarts';
  throw fault('job-not-found', '', { id: shownText(id), seconds: age, volatile });
}

/** Refuses where a job has no result; the reply then says when to ask again, if that can help. */
function requireResult(job: Job, reply: FastifyReply): void {
  const { state, done, total } = job;
  const values: FaultValues = { state, done, total, events: jobDocument(job).links.events };
  if (!isFinished(job)) {
    reply.header('retry-after', '1');
    throw fault('job-not-finished', '', values);
  }
  if (state === 'cancelled') throw fault('job-cancelled', '', values);
  if (job.failure !== null) throw new Fault(job.failure);
}

function sendBatch(
  request: FastifyRequest,
  reply: FastifyReply,
  job: Job,
  { jobs }: JobResourceOptions,
): FastifyReply {
  requireAcceptable(request, [linesMediaType]);
  return sendLines(reply, Readable.from(jobs.lines(job.id), { objectMode: false }));
}

async function sendSolve(
  request: FastifyRequest,
  reply: FastifyReply,
  job: Job,
  { jobs, answers, solveDeadline }: JobResourceOptions,
): Promise<FastifyReply> {
  readPreferences(request, reply);
  const limits = limitsOf(request, reply, solveDeadline);
  const result = await jobs.solved(job.id);
  if (result === null) return notFound(job.id, jobs);
  const wanted = wantedAnswer(request, result.operation as Operation);
  const outcome = await answers.toResult(result, wanted, limits);
  return sendOutcome(request, reply, result.operation, outcome, limits);
}

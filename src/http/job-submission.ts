import type { FastifyReply, FastifyRequest } from 'fastify';
import type { Job, JobEngine, JobWork } from '../jobs/job.ts';
import { idempotencyKey } from './idempotency-key.ts';
import { jobDocument, jobPath } from './job-document.ts';

export interface JobOptions {
  readonly jobs: JobEngine;
}

/** Takes work as a job: 202, and where it is. */
export async function submitJob(
  request: FastifyRequest,
  reply: FastifyReply,
  work: JobWork,
  { jobs }: JobOptions,
): Promise<FastifyReply> {
  const job = await jobs.submit(work, idempotencyKey(request.headers['idempotency-key']));
  request.log.info({ job: job.id, kind: job.kind, total: job.total }, 'job taken');
  reply.code(202).header('location', jobPath(job.id)).header('preference-applied', 'respond-async');
  return sendJob(reply, job);
}

/** Sends a job as it is now. */
export function sendJob(reply: FastifyReply, job: Job): FastifyReply {
  return reply
    .header('cache-control', 'no-store')
    .type('application/json')
    .send(Buffer.from(JSON.stringify(jobDocument(job))));
}

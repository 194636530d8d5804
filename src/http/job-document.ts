import { isFinished, type Job } from '../jobs/job.ts';
import type { JobAnswer } from '../spec/types.ts';

export function jobPath(id: string): string {
  return `/v1/jobs/${id}`;
}

/** A job as its clients see it. */
export function jobDocument(job: Job, now = Date.now()): JobAnswer {
  const { id, state, done, total, submitted, started, finished } = job;
  const left = secondsLeft(job, now);
  return {
    id,
    state,
    progress: { done, total, ...(left === null ? {} : { secondsLeft: left }) },
    submitted: timestamp(submitted),
    ...(started === null ? {} : { started: timestamp(started) }),
    ...(finished === null ? {} : { finished: timestamp(finished) }),
    links: { self: jobPath(id), events: `${jobPath(id)}/events`, result: `${jobPath(id)}/result` },
  };
}

/** The rest at the pace so far, to a tenth of a second. */
function secondsLeft(job: Job, now: number): number | null {
  const { kind, done, total, started } = job;
  if (kind !== 'batch' || isFinished(job) || started === null || done === 0) return null;
  return Math.round(((Math.max(0, now - started) / done) * (total - done)) / 100) / 10;
}

function timestamp(milliseconds: number): string {
  return new Date(milliseconds).toISOString();
}

import { setTimeout as pause } from 'node:timers/promises';
import { Fault } from '../faults/fault.ts';
import { isFinished, type Job, type JobEngine } from '../jobs/job.ts';
import { jobDocument } from './job-document.ts';

/** How often a job is looked at, ms. */
const period = 200;

/** Longest silence, ms: proxies end connections on which nothing happens. */
const longestSilence = 15_000;

/** Time after which a client comes back when it is cut off, ms. */
const retry = 1000;

/**
 * The progress of a job as server-sent events (HTML living standard): `progress` whenever something
 * changed, at last `end`; each has the document of the job. The id of an event is the number done, so
 * that a client that comes back is told only what it has not seen.
 *
 * @param seen what the client has seen done; null for all
 * @param stop when to end early
 */
export async function* jobEvents(
  first: Job,
  jobs: Pick<JobEngine, 'find'>,
  seen: number | null,
  { gone, isStopping }: { readonly gone: AbortSignal; readonly isStopping: () => boolean },
): AsyncGenerator<string> {
  yield `retry: ${retry}\n\n`;
  let job: Job | null = first;
  let told = seen === null ? '' : `${seen} running`;
  let done = seen ?? 0;
  let spoken = Date.now();
  while (job !== null && !gone.aborted && !isStopping()) {
    const state = `${job.done} ${job.state}`;
    // Another instance may be a moment behind: what was done stays done.
    if (state !== told && job.done >= done) {
      const isNew = told === '' || job.done > done || !isFinished(job);
      if (isNew) yield event('progress', String(job.done), job);
      if (isFinished(job)) return yield event('end', 'end', job);
      told = state;
      done = job.done;
      spoken = Date.now();
    } else if (Date.now() - spoken >= longestSilence) {
      yield ': the job goes on\n\n';
      spoken = Date.now();
    }
    await pause(period);
    job = await lookAt(jobs, job);
  }
}

/** The job as it is now; as it was, where that cannot be found out. */
async function lookAt(jobs: Pick<JobEngine, 'find'>, job: Job): Promise<Job | null> {
  try {
    return await jobs.find(job.id);
  } catch (error) {
    if (error instanceof Fault) return job;
    throw error;
  }
}

function event(name: string, id: string, job: Job): string {
  return `event: ${name}\nid: ${id}\ndata: ${JSON.stringify(jobDocument(job))}\n\n`;
}

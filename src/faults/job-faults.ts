/** What goes wrong with batches and jobs, beside what goes wrong with a request. */
export const jobFaultWordings = {
  'line-too-long': {
    title: 'A line is too long',
    detail: 'The line exceeds {limit} bytes. Send a smaller request on it, or send that request by itself.',
  },
  'too-many-lines': {
    title: 'The batch has too many lines',
    detail: 'A batch has at most {limit} lines. Send the rest as another batch.',
  },
  'too-many-batches': {
    title: 'Too many batches are under way',
    detail:
      '{limit} batches are being answered already. Try again after the time in Retry-After, or hand the batch in as a job (Prefer: respond-async).',
  },
  'batch-stalled': {
    title: 'The batch does not go on',
    detail:
      'No further line came for {seconds} s, though one could have been taken. The lines before are answered; send the rest as another batch.',
  },
  'job-not-found': {
    title: 'There is no such job',
    detail:
      'No job {id} is known. Jobs are forgotten {seconds} s after they end{volatile}. Submit the work again; with an Idempotency-Key a repetition never makes a second job.',
  },
  'job-not-finished': {
    title: 'The job is not finished',
    detail:
      'The job is {state}: {done} of {total} done. Ask again after the time in Retry-After, or follow its events at {events}.',
  },
  'job-cancelled': {
    title: 'The job was cancelled',
    detail: 'The job was cancelled with {done} of {total} done, so it has no result. Submit the work again.',
  },
  'job-failed': {
    title: 'The job failed',
    detail: 'The service could not finish the job: {reason}. Submit the work again.',
  },
  'job-result-too-large': {
    title: 'The result of the job is too large',
    detail:
      'The answers of the job exceed the {limit} bytes that are kept for jobs. Send smaller batches, or ask for less in their lines.',
  },
  'jobs-full': {
    title: 'No further job fits in',
    detail:
      '{reason}. Try again after the time in Retry-After, when jobs have ended, or raise JOBS_COUNT or JOBS_MEMORY of the service.',
  },
  'idempotency-key-malformed': {
    title: 'The Idempotency-Key cannot be read',
    detail:
      'The Idempotency-Key is {found}. Send 1 to 255 visible ASCII characters, such as a UUID, bare or in double quotes.',
  },
  'idempotency-key-reused': {
    title: 'The Idempotency-Key belongs to other work',
    detail:
      'The Idempotency-Key {key} was sent before with another body or to another path; that job is {job}. Take a new key for new work.',
  },
  'queue-unreachable': {
    title: 'The job queue cannot be reached',
    detail:
      'The queue that the instances of this service share does not answer, so jobs can neither be taken nor looked up. Try again after the time in Retry-After; requests without Prefer: respond-async are answered meanwhile.',
  },
} as const;

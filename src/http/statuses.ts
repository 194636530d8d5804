import type { FaultCode } from '../faults/catalogue.ts';
import { figureFaultWordings } from '../faults/figure-faults.ts';
import { criterionFaultWordings } from '../faults/criterion-faults.ts';
import { formFaultWordings } from '../faults/form-faults.ts';
import { loadFaultWordings } from '../faults/load-faults.ts';
import { memberFaultWordings } from '../faults/member-faults.ts';
import { senseFaultWordings } from '../faults/sense-faults.ts';

function every<Code extends FaultCode>(
  wordings: Readonly<Record<Code, unknown>>,
  status: number,
): Record<Code, number> {
  return Object.fromEntries(Object.keys(wordings).map((code) => [code, status])) as Record<Code, number>;
}

/**
 * HTTP status of every fault of the catalogue, in one table (RFC 9110, section 15). 400: the text or
 * the schema is broken. 422: a valid request that cannot be solved as posed.
 */
export const statusOfFault: Readonly<Partial<Record<FaultCode, number>>> = {
  ...every(formFaultWordings, 400),
  ...every(senseFaultWordings, 422),
  ...every(memberFaultWordings, 422),
  ...every(loadFaultWordings, 422),
  ...every(figureFaultWordings, 422),
  // No such size exists for any answer.
  'figure-size': 400,
  ...every(criterionFaultWordings, 422),
  // Stands last in a list that was cut short, and leaves the status to the faults before it.
  'more-faults': 422,

  // The text of a request body
  'empty-body': 400,
  'not-utf8': 400,
  'malformed-json': 400,
  'duplicate-key': 400,
  'reserved-key': 400,
  'nested-too-deep': 400,
  'number-out-of-range': 400,

  // The physics of the motion
  'no-inertia': 422,
  'pull-without-restraint': 422,
  'pull-at-fixed-end': 422,
  'force-in-velocity': 422,
  'moving-end-not-fixed': 422,
  'uniform-motion-held': 422,
  'infinite-energy': 422,
  'impulse-on-no-mass': 422,
  'impulse-off-inertia': 422,
  'mass-velocity-on-no-mass': 422,
  'mode-out-of-reach': 422,
  'too-many-values': 422,
  'result-overflow': 422,
  'stress-without-section': 422,

  // The exchange over HTTP
  'malformed-http': 400,
  'not-found': 404,
  'method-not-allowed': 405,
  'not-acceptable': 406,
  'request-timeout': 408,
  'body-too-large': 413,
  'unsupported-media-type': 415,
  'headers-too-large': 431,

  // The form of an answer
  'unknown-parameter': 400,
  'repeated-parameter': 400,
  'parameter-value': 400,
  'parameter-without-use': 400,
  'coding-not-acceptable': 406,
  'nothing-to-tabulate': 422,
  'result-not-kept': 404,

  // Batches and jobs
  'line-too-long': 413,
  'too-many-lines': 413,
  'too-many-batches': 503,
  'batch-stalled': 408,
  'job-not-found': 404,
  'job-not-finished': 409,
  'job-cancelled': 404,
  'job-failed': 500,
  'job-result-too-large': 422,
  'jobs-full': 503,
  'idempotency-key-malformed': 400,
  'idempotency-key-reused': 422,
  'queue-unreachable': 503,

  // The solver pool
  'internal-error': 500,
  'energy-inconsistent': 500,
  'solver-crashed': 500,
  'solver-out-of-memory': 500,
  'queue-full': 503,
  'not-ready': 503,
  stopping: 503,
  'deadline-exceeded': 504,
};

import { catalogue, type FaultCode } from '../faults/catalogue.ts';
import type { FaultRecord } from '../faults/fault.ts';
import type { ProblemDocument } from '../spec/types.ts';
import { statusOfFault } from './statuses.ts';

export const problemMediaType = 'application/problem+json';

/**
 * Faults as a problem document (RFC 9457). The status is the lowest of the faults, because what
 * breaks the schema comes before what breaks the physics; `code` and `title` are those of the first
 * fault with that status.
 *
 * @param records at least one
 * @param occurrence id of the request, or number of the line in a batch: lines name nothing that differs
 *   from one time to another, so that equal lines have equal answers
 */
export function problemOf(records: readonly FaultRecord[], occurrence: string | number): ProblemDocument {
  const leading = records.reduce((first, record) =>
    statusOf(record.code) < statusOf(first.code) ? record : first,
  );
  return {
    type: `urn:tailbound:fault:${leading.code}`,
    title: catalogue[leading.code].title,
    status: statusOf(leading.code),
    detail:
      records.length === 1
        ? leading.detail
        : `${records.length} faults were found. The first: ${leading.detail}`,
    ...(typeof occurrence === 'string' ? { instance: `urn:uuid:${occurrence}` } : {}),
    code: leading.code,
    ...(typeof occurrence === 'number' ? { line: occurrence } : {}),
    errors: records.map(({ pointer, detail, code }) => ({ pointer, detail, code })),
  };
}

export function statusOf(code: FaultCode): number {
  return statusOfFault[code] ?? 500;
}

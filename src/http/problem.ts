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
 * @param requestId names this occurrence
 */
export function problemOf(records: readonly FaultRecord[], requestId: string): ProblemDocument {
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
    instance: `urn:uuid:${requestId}`,
    code: leading.code,
    errors: records.map(({ pointer, detail, code }) => ({ pointer, detail, code })),
  };
}

export function statusOf(code: FaultCode): number {
  return statusOfFault[code] ?? 500;
}

import { identifyRequest } from '../contract/identify-request.ts';
import type { Operation } from '../contract/read-request.ts';
import type { ResultStore } from '../jobs/result-store.ts';
import type { SolveOptions } from './solve-resource.ts';

/** A request that the service itself links to. */
export interface OwnRequest {
  readonly operation: Operation;
  /** Parsed body. */
  readonly body: unknown;
}

/**
 * Keeps requests for ever, so that links to their results work at once and are never forgotten.
 *
 * @returns the digests of their results, in the same order
 * @throws Fault where a request cannot be read
 */
export function pinRequests(
  store: ResultStore,
  requests: readonly OwnRequest[],
  { readRequest, version }: Pick<SolveOptions, 'readRequest' | 'version'>,
): Promise<string[]> {
  return Promise.all(
    requests.map(async ({ operation, body }) => {
      const result = identifyRequest(operation, readRequest(operation, body), version);
      await store.pin(result);
      return result.digest;
    }),
  );
}

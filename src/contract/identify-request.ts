import { createHash } from 'node:crypto';
import { canonicalJson } from './canonical-json.ts';

/** A canonical request with the name of its result. */
export interface IdentifiedRequest {
  readonly operation: string;
  /** Name of the result: 43 characters that are safe in a URL (base64url, RFC 4648). */
  readonly digest: string;
  /** Canonical text (RFC 8785) of the request in UTF-8, in a buffer of its own. */
  readonly request: Uint8Array<ArrayBuffer>;
}

/**
 * Names the result of a request: SHA-256 (FIPS 180-4) of the canonical text of
 * `{"operation", "request", "version"}`, so that what leads to other bytes has another name.
 *
 * @param request the canonical request: defaults filled in, SI
 * @param version version of the solver
 * Cost: O(size of the request).
 */
export function identifyRequest(operation: string, request: unknown, version: string): IdentifiedRequest {
  const text = canonicalJson(request);
  // The keys stand in the order that RFC 8785 asks for.
  const hash = createHash('sha256')
    .update(`{"operation":${canonicalJson(operation)},"request":`)
    .update(text)
    .update(`,"version":${canonicalJson(version)}}`);
  return { operation, digest: hash.digest('base64url'), request: new TextEncoder().encode(text) };
}

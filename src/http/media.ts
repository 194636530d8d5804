import type { FastifyRequest } from 'fastify';
import { fault } from '../faults/fault.ts';

const wanted = 'as application/json in UTF-8, without a content coding';

/**
 * The media type among those offered that the Accept header likes best (RFC 9110, section 12.5.1);
 * refuses a request that admits none of them.
 */
export function requireAcceptable(request: FastifyRequest, offered: readonly string[]): string {
  const type = request.accepts().type([...offered]);
  if (typeof type === 'string') return type;
  const accept = JSON.stringify(request.headers.accept);
  throw fault('not-acceptable', '', { accept, offered: offered.join(', ') });
}

/** Refuses a body that is not plain JSON: media type, charset and coding are taken at their word. */
export function requireJsonBody(request: FastifyRequest): void {
  const { 'content-type': type, 'content-encoding': coding } = request.headers;
  if (type === undefined || type === '') throw wrongMedia('A body without Content-Type');
  if (!isJson(type)) throw wrongMedia(`Content-Type ${JSON.stringify(type)}`);
  if (coding !== undefined && coding.toLowerCase() !== 'identity') {
    throw wrongMedia(`Content-Encoding ${JSON.stringify(coding)}`);
  }
}

function wrongMedia(found: string): Error {
  return fault('unsupported-media-type', '', { found, wanted });
}

/** `application/json`, with no parameter but `charset=utf-8`, which changes nothing. */
function isJson(contentType: string): boolean {
  return /^application\/json[ \t]*(;[ \t]*charset=("utf-8"|utf-8)[ \t]*)?;?[ \t]*$/i.test(contentType);
}

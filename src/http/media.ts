import type { FastifyReply, FastifyRequest } from 'fastify';
import { fault } from '../faults/fault.ts';

/** The media type of batches: one JSON text a line. */
export const linesMediaType = 'application/x-ndjson';

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

/**
 * Refuses a body that is not of this plain type, and says in `Accept` what is taken: media type, charset
 * and coding are taken at their word.
 */
export function requireBody(request: FastifyRequest, reply: FastifyReply, wanted: string): void {
  const found = wrongBody(request.headers, wanted);
  if (found === null) return;
  reply.header('accept', wanted);
  throw fault('unsupported-media-type', '', {
    found,
    wanted: `as ${wanted} in UTF-8, without a content coding`,
  });
}

/** What is wrong with the body by its headers, or null. */
function wrongBody(headers: FastifyRequest['headers'], wanted: string): string | null {
  const { 'content-type': type, 'content-encoding': coding } = headers;
  if (type === undefined || type === '') return 'A body without Content-Type';
  if (!isPlain(type, wanted)) return `Content-Type ${JSON.stringify(type)}`;
  const isCoded = coding !== undefined && coding.toLowerCase() !== 'identity';
  return isCoded ? `Content-Encoding ${JSON.stringify(coding)}` : null;
}

/** The media type, with no parameter but `charset=utf-8`, which changes nothing. */
function isPlain(contentType: string, wanted: string): boolean {
  const [type, ...parameters] = contentType.split(';').map((part) => part.trim().toLowerCase());
  return type === wanted && parameters.every((part) => /^(?:charset=(?:"utf-8"|utf-8))?$/.test(part));
}

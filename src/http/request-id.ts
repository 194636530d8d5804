import { randomUUID } from 'node:crypto';
import type { IncomingMessage } from 'node:http';

const uuid = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i;

/** Id of a request in log, header and problem: the caller's `X-Request-Id` if it is a UUID, else a new one. */
export function requestId(message: { headers: IncomingMessage['headers'] }): string {
  const given = message.headers['x-request-id'];
  return typeof given === 'string' && uuid.test(given) ? given.toLowerCase() : randomUUID();
}

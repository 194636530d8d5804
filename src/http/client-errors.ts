import { randomUUID } from 'node:crypto';
import { maxHeaderSize } from 'node:http';
import type { Socket } from 'node:net';
import type { FastifyBaseLogger } from 'fastify';
import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import { problemMediaType, problemOf } from './problem.ts';

/**
 * Answers what never becomes a request (Node's `clientError`): text that is not HTTP, headers beyond
 * the limit, requests that do not arrive in time. Writes to the bare socket and closes it.
 *
 * @param requestTimeout time that a request may take to arrive, s
 */
export function clientErrorHandler(requestTimeout: number) {
  return function answer(
    this: { log: FastifyBaseLogger },
    error: Error & { code?: string },
    socket: Socket,
  ): void {
    if (error.code === 'ECONNRESET' || socket.destroyed) {
      socket.destroy();
      return;
    }
    const id = randomUUID();
    const problem = problemOf([recordOf(error, requestTimeout)], id);
    this.log.info({ reqId: id, code: problem.code, reason: error.message }, 'request refused');
    if (!socket.writable) {
      socket.destroy();
      return;
    }
    const body = JSON.stringify(problem);
    const head = [
      `HTTP/1.1 ${problem.status} ${problem.title}`,
      `content-type: ${problemMediaType}`,
      `content-length: ${Buffer.byteLength(body)}`,
      `x-request-id: ${id}`,
      'connection: close',
    ];
    socket.end(`${head.join('\r\n')}\r\n\r\n${body}`);
  };
}

function recordOf(error: Error & { code?: string }, requestTimeout: number): FaultRecord {
  switch (error.code) {
    case 'HPE_HEADER_OVERFLOW':
      return faultRecord('headers-too-large', '', { limit: maxHeaderSize });
    case 'ERR_HTTP_REQUEST_TIMEOUT':
      return faultRecord('request-timeout', '', { seconds: requestTimeout });
    default:
      return faultRecord('malformed-http', '', { reason: error.message });
  }
}

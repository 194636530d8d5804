import type { FastifyReply } from 'fastify';

/**
 * A signal that aborts when the connection closes before the answer is written. The framework's own
 * `request.signal` cannot serve: it aborts as soon as the body of a POST has been read.
 */
export function goneSignal(reply: FastifyReply): AbortSignal {
  const controller = new AbortController();
  const { raw } = reply;
  if (raw.destroyed) controller.abort();
  raw.once('close', () => {
    if (!raw.writableFinished) controller.abort();
  });
  return controller.signal;
}

import { performance } from 'node:perf_hooks';
import type { FastifyReply, FastifyRequest } from 'fastify';
import type { SolveLimits } from '../pool/solver-pool.ts';
import { goneSignal } from './client-gone.ts';
import { preferredWait } from './prefer.ts';

/**
 * The limits of a solve that begins now: until the deadline of the service, or the shorter one that
 * the client prefers, which the answer then confirms (RFC 7240).
 *
 * @param solveDeadline of the service, s
 */
export function limitsOf(request: FastifyRequest, reply: FastifyReply, solveDeadline: number): SolveLimits {
  const wait = preferredWait(request.headers.prefer);
  const deadline = Math.min(wait ?? solveDeadline, solveDeadline);
  return { arrived: performance.now(), deadline, gone: goneSignal(reply) };
}

/** Confirms the preference that an answer has followed. */
export function confirmWait(request: FastifyRequest, reply: FastifyReply, { deadline }: SolveLimits): void {
  if (preferredWait(request.headers.prefer) === deadline)
    reply.header('preference-applied', `wait=${deadline}`);
}

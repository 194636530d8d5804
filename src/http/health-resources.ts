import type { FastifyInstance, FastifyReply } from 'fastify';
import { fault } from '../faults/fault.ts';
import type { SolverPool } from '../pool/solver-pool.ts';
import { addResource } from './resource.ts';

/** `/health/live`: the process answers. `/health/ready`: the solvers take work. */
export function addHealthResources(app: FastifyInstance, pool: SolverPool): void {
  const offers = ['application/json'];
  addResource(app, {
    url: '/health/live',
    offers,
    get: async (_request, reply) => state(reply, { status: 'live' }),
  });
  addResource(app, {
    url: '/health/ready',
    offers,
    get: async (_request, reply) => {
      if (!pool.isReady) throw fault(pool.isStopping ? 'stopping' : 'not-ready', '');
      return state(reply, { status: 'ready', running: pool.running, waiting: pool.waiting });
    },
  });
}

function state(reply: FastifyReply, body: object): FastifyReply {
  return reply
    .type('application/json')
    .header('cache-control', 'no-store')
    .send(Buffer.from(JSON.stringify(body)));
}

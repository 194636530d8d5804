import { METHODS } from 'node:http';
import type { FastifyInstance, RouteHandlerMethod } from 'fastify';
import { fault } from '../faults/fault.ts';
import { requireAcceptable, requireJsonBody } from './media.ts';
import { pathOf } from './problem-replies.ts';

export interface Resource {
  readonly url: string;
  /** Media types of its answers, the preferred first. */
  readonly offers: readonly string[];
  readonly get?: RouteHandlerMethod;
  /** Takes application/json. */
  readonly post?: RouteHandlerMethod;
}

/**
 * Adds a resource with the methods it has; every other method of HTTP is answered with 405 and
 * `Allow`, OPTIONS with `Allow` alone.
 */
export function addResource(app: FastifyInstance, { url, offers, get, post }: Resource): void {
  const methods = [...(get === undefined ? [] : ['GET', 'HEAD']), ...(post === undefined ? [] : ['POST'])];
  if (get !== undefined) {
    app.get(url, { onRequest: async (request) => requireAcceptable(request, offers) }, get);
  }
  if (post !== undefined) {
    const onRequest = async (request: Parameters<typeof requireJsonBody>[0]): Promise<void> => {
      requireAcceptable(request, offers);
      requireJsonBody(request);
    };
    app.post(url, { onRequest }, post);
  }
  refuseOtherMethods(app, url, methods);
}

/**
 * Answers every method that a resource does not have with 405 and `Allow`, OPTIONS with `Allow` alone.
 *
 * @param methods that it has
 */
export function refuseOtherMethods(app: FastifyInstance, url: string, methods: readonly string[]): void {
  const allow = [...methods, 'OPTIONS'].join(', ');
  app.options(url, async (_request, reply) => reply.code(204).header('allow', allow).send());
  app.route({
    method: app.supportedMethods.filter((method) => method !== 'OPTIONS' && !methods.includes(method)),
    url,
    onRequest: async (request, reply) => {
      reply.header('allow', allow);
      throw fault('method-not-allowed', '', {
        path: pathOf(request),
        method: request.method,
        methods: allow,
      });
    },
    handler: async () => undefined,
  });
}

/** Lets the app see every method that Node parses, so that none is mistaken for an unknown path. */
export function knowAllMethods(app: FastifyInstance): void {
  for (const method of METHODS) {
    if (method !== 'CONNECT' && !app.supportedMethods.includes(method)) app.addHttpMethod(method);
  }
}

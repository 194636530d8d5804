import { METHODS } from 'node:http';
import type { FastifyInstance, FastifyReply, FastifyRequest, RouteHandlerMethod } from 'fastify';
import { fault } from '../faults/fault.ts';
import { requireAcceptable, requireBody } from './media.ts';

export interface Resource {
  readonly url: string;
  /**
   * Media types of its answers, the preferred first, or a function that negotiates before the body is
   * read, and throws a Fault where it cannot.
   */
  readonly offers: readonly string[] | ((request: FastifyRequest, reply: FastifyReply) => void);
  readonly get?: RouteHandlerMethod;
  readonly post?: RouteHandlerMethod;
  /** Media type of what it takes; application/json where none is given. */
  readonly takes?: string;
  readonly delete?: RouteHandlerMethod;
}

/**
 * Adds a resource with the methods it has; every other method of HTTP is answered with 405 and
 * `Allow`, OPTIONS with `Allow` alone.
 */
export function addResource(app: FastifyInstance, resource: Resource): void {
  const { url, offers, get, post, takes = 'application/json' } = resource;
  const methods = [
    ...(get === undefined ? [] : ['GET', 'HEAD']),
    ...(post === undefined ? [] : ['POST']),
    ...(resource.delete === undefined ? [] : ['DELETE']),
  ];
  const negotiate = async (request: FastifyRequest, reply: FastifyReply): Promise<void> => {
    if (typeof offers === 'function') offers(request, reply);
    else requireAcceptable(request, offers);
  };
  if (get !== undefined) app.get(url, { onRequest: negotiate }, get);
  if (post !== undefined) {
    const onRequest = async (request: FastifyRequest, reply: FastifyReply): Promise<void> => {
      await negotiate(request, reply);
      requireBody(request, reply, takes);
    };
    app.post(url, { onRequest }, post);
  }
  if (resource.delete !== undefined) app.delete(url, { onRequest: negotiate }, resource.delete);
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
        path: templateOf(url),
        method: request.method,
        methods: allow,
      });
    },
    handler: async () => undefined,
  });
}

/** The path of a route as a URI template (RFC 6570), as in the reference document. */
export function templateOf(url: string): string {
  return url.replaceAll(/:(\w+)/g, '{$1}');
}

/** Lets the app see every method that Node parses, so that none is mistaken for an unknown path. */
export function knowAllMethods(app: FastifyInstance): void {
  for (const method of METHODS) {
    if (method !== 'CONNECT' && !app.supportedMethods.includes(method)) app.addHttpMethod(method);
  }
}

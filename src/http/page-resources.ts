import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import type { FastifyInstance } from 'fastify';
import type { ReferenceDocument } from './document-resources.ts';
import { exampleUrl, type Example } from './pages/example.ts';
import { originOf } from './pages/request-origin.ts';
import { serviceLimits, type Schemas } from './pages/service-limits.ts';
import { startPage, type StartPage } from './pages/start-page.ts';
import { addResource } from './resource.ts';

export interface PageOptions {
  readonly document: ReferenceDocument;
  /** Largest body in bytes. */
  readonly bodyLimit: number;
  /** Longest time from the arrival of a request to its answer, s. */
  readonly solveDeadline: number;
  readonly examples: readonly Example[];
  /** Where the answer of each example is, in their order. */
  readonly resultUrls: readonly string[];
}

/** Nothing but what this service serves, and no script. */
const pagePolicy =
  "default-src 'none'; style-src 'self'; img-src 'self'; base-uri 'none'; form-action 'none'; frame-ancestors 'none'";

/** Time that an asset may be kept, s; its address changes with its bytes. */
const assetAge = 365 * 86_400;

/** `/`, the page for people, with its assets and the examples that it shows. */
export function addPageResources(app: FastifyInstance, options: PageOptions): void {
  const { document, examples, resultUrls, bodyLimit, solveDeadline } = options;
  const { info, components } = JSON.parse(document.json) as {
    info: StartPage['info'];
    components: { schemas: Schemas };
  };
  const limits = serviceLimits(components.schemas, bodyLimit);
  const styleUrl = addAsset(app, 'page.css', 'text/css; charset=utf-8');
  const iconUrl = addAsset(app, 'mark.svg', 'image/svg+xml');
  addResource(app, {
    url: '/',
    offers: ['text/html'],
    get: async (request, reply) =>
      reply
        .type('text/html; charset=utf-8')
        .header('cache-control', 'no-cache')
        .header('content-security-policy', pagePolicy)
        .send(
          startPage({
            info,
            limits,
            solveDeadline,
            examples,
            resultUrls,
            origin: originOf(request),
            styleUrl,
            iconUrl,
          }),
        ),
  });
  for (const example of examples) {
    const bytes = Buffer.from(example.text);
    addResource(app, {
      url: exampleUrl(example),
      offers: ['application/json'],
      get: async (_request, reply) => reply.type('application/json').send(bytes),
    });
  }
}

/** Serves a file of pages/; gives the address under which it may be kept. */
function addAsset(app: FastifyInstance, name: string, type: string): string {
  const bytes = readFileSync(new URL(`pages/${name}`, import.meta.url));
  const mark = createHash('sha256').update(bytes).digest('base64url').slice(0, 12);
  const url = `/assets/${name}`;
  addResource(app, {
    url,
    offers: [type.split(';')[0]],
    get: async (_request, reply) =>
      reply.type(type).header('cache-control', `public, max-age=${assetAge}, immutable`).send(bytes),
  });
  return `${url}?${mark}`;
}

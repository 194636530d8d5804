import { readFileSync } from 'node:fs';
import swagger from '@fastify/swagger';
import swaggerUi from '@fastify/swagger-ui';
import type { FastifyInstance } from 'fastify';
import { fault } from '../faults/fault.ts';
import type { ReferenceDocument } from './document-resources.ts';
import { requireAcceptable } from './media.ts';
import { pathOf } from './problem-replies.ts';
import { refuseOtherMethods } from './resource.ts';

const prefix = '/docs';

const mark = readFileSync(new URL('pages/mark.svg', import.meta.url));

/** Scripts and styles of this service alone; the icons of the page are data. */
const policy = {
  'default-src': "'none'",
  'script-src': "'self'",
  'style-src': "'self'",
  'img-src': ["'self'", 'data:'],
  'connect-src': "'self'",
  'base-uri': "'none'",
  'form-action': "'none'",
  'frame-ancestors': "'none'",
};

/** `/docs`: the reference document as a page on which every request can be tried. */
export async function addReferencePage(app: FastifyInstance, document: ReferenceDocument): Promise<void> {
  await app.register(async (scope) => {
    // The framework does not tell of the page's own address with a slash.
    const urls = new Set([`${prefix}/`]);
    scope.addHook('onRoute', ({ url, method }) => {
      if ([method].flat().includes('GET')) urls.add(url);
    });
    addAssetRules(scope);
    await scope.register(swagger, {
      mode: 'static',
      specification: { document: JSON.parse(document.json) as never },
    });
    await scope.register(swaggerUi, {
      routePrefix: prefix,
      staticCSP: policy,
      theme: {
        title: 'Tailbound: reference',
        favicon: [{ filename: 'mark.svg', rel: 'icon', type: 'image/svg+xml', sizes: 'any', content: mark }],
      },
      uiConfig: {
        // The default layout has a bar for opening other documents.
        layout: 'BaseLayout',
        validatorUrl: null,
        tryItOutEnabled: true,
        // Colouring an answer of a megabyte would hold the page for the better part of a minute.
        syntaxHighlight: false,
        docExpansion: 'list',
        defaultModelsExpandDepth: 0,
      },
    });
    for (const url of urls) refuseOtherMethods(scope, url, ['GET', 'HEAD']);
  });
}

/** Answers what the server of the files would answer in its own words, or with a page that leads nowhere. */
function addAssetRules(scope: FastifyInstance): void {
  scope.addHook('onRequest', async (request, reply) => {
    const path = pathOf(request);
    const asked = ['GET', 'HEAD'].includes(request.method);
    if (asked && [prefix, `${prefix}/`].includes(path)) requireAcceptable(request, ['text/html']);
    if (path === `${prefix}/static/`) return reply.callNotFound();
    if (path.includes('%00'))
      throw fault('malformed-http', '', { reason: 'the path holds a null character' });
    // Ranges are not offered, and a wrong one would be refused.
    delete request.raw.headers.range;
  });
}

/** Whether an address is only a part of the page, not a resource to be named. */
export function isPagePart(url: string): boolean {
  return url.startsWith(`${prefix}/`) || url.startsWith('/assets/') || url.startsWith('/examples/');
}

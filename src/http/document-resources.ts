import type { FastifyInstance } from 'fastify';
import { addResource } from './resource.ts';

/** The reference document of the interface, in both its forms. */
export interface ReferenceDocument {
  readonly yaml: string;
  readonly json: string;
}

/** `/openapi.yaml` (RFC 9512) and `/openapi.json`. */
export function addDocumentResources(app: FastifyInstance, document: ReferenceDocument): void {
  const forms = [
    { url: '/openapi.yaml', type: 'application/yaml', text: document.yaml },
    { url: '/openapi.json', type: 'application/json', text: document.json },
  ];
  for (const { url, type, text } of forms) {
    // Bytes, because the framework adds a charset to text, which neither type has.
    const bytes = Buffer.from(text);
    addResource(app, { url, offers: [type], get: async (_request, reply) => reply.type(type).send(bytes) });
  }
}

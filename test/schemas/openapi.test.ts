import { execFileSync } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { parse } from 'yaml';
import { type Operation, readRequest } from '../../src/contract/read-request.ts';
import { statusOfFault } from '../../src/http/statuses.ts';

interface Reply {
  $ref?: string;
  content?: Record<string, { schema: { $ref?: string } }>;
  headers?: Record<string, unknown>;
}
interface OperationObject {
  operationId: string;
  requestBody?: { content: Record<string, { examples: Record<string, { value: unknown }> }> };
  responses: Record<string, Reply>;
}
interface Document {
  openapi: string;
  paths: Record<string, Record<string, OperationObject>>;
  components: {
    schemas: Record<string, Record<string, unknown>>;
    responses: Record<string, Reply>;
  };
}

const top = new URL('../../', import.meta.url);
let folder = '';
let document: Document;

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'bundle-'));
  const script = new URL('schemas/scripts/bundle-openapi.mjs', top).pathname;
  execFileSync(process.execPath, [script, folder], { stdio: 'pipe' });
  document = JSON.parse(readFileSync(join(folder, 'openapi.json'), 'utf8')) as Document;
});
afterAll(() => rmSync(folder, { recursive: true }));

const operations = (): [string, string, OperationObject][] =>
  Object.entries(document.paths).flatMap(([path, methods]) =>
    Object.entries(methods).map(([method, operation]): [string, string, OperationObject] => [
      path,
      method,
      operation,
    ]),
  );

describe('the served document', () => {
  it('is one document: every reference leads into it', () => {
    const references = JSON.stringify(document).match(/"\$ref":"[^"]*"/g) ?? [];
    expect(references.length).toBeGreaterThan(100);
    for (const reference of new Set(references)) {
      const pointer = /^"\$ref":"#\/components\/(\w+)\/([\w-]+)"$/.exec(reference)!;
      const section = document.components[pointer[1] as 'schemas'];
      expect(section).toHaveProperty([pointer[2]]);
    }
  });

  it('says the same as YAML', () => {
    expect(parse(readFileSync(join(folder, 'openapi.yaml'), 'utf8'))).toEqual(document);
  });

  it('names every component as its file and keeps nothing that only a file needs', () => {
    const files = readdirSync(new URL('schemas/', top)).filter((name) => name.endsWith('.json'));
    const titles = files.map((name) => name.slice(0, -5)).toSorted();
    expect(Object.keys(document.components.schemas).toSorted()).toEqual(titles);
    for (const [name, schema] of Object.entries(document.components.schemas)) {
      expect(schema.title).toBe(name);
      expect(schema).not.toHaveProperty('$schema');
      expect(schema).not.toHaveProperty('$defs');
    }
  });

  it('maps the tag of every union to its alternatives', () => {
    expect(document.components.schemas.Member.discriminator).toEqual({
      propertyName: 'kind',
      mapping: {
        cable: '#/components/schemas/Cable',
        bar: '#/components/schemas/Bar',
        shaft: '#/components/schemas/Shaft',
        'shear-column': '#/components/schemas/ShearColumn',
        wave: '#/components/schemas/Wave',
      },
    });
    const unions = Object.values(document.components.schemas).filter((schema) => 'discriminator' in schema);
    for (const { discriminator, oneOf } of unions) {
      const { mapping } = discriminator as { mapping: Record<string, string> };
      const branches = (oneOf as { $ref: string }[]).map(({ $ref }) => $ref);
      expect(Object.values(mapping)).toEqual(branches);
    }
  });

  it('offers the routes of the service', () => {
    expect(operations().map(([path, method]) => `${method} ${path}`)).toEqual([
      'post /v1/modes',
      'post /v1/responses',
      'post /v1/transfer-functions',
      'get /health/live',
      'get /health/ready',
      'get /openapi.yaml',
      'get /openapi.json',
    ]);
  });

  it('answers every failure with a problem document', () => {
    for (const [, , { responses }] of operations()) {
      for (const [status, reply] of Object.entries(responses)) {
        if (Number(status) < 400) continue;
        const { content } = document.components.responses[reply.$ref!.split('/').at(-1)!];
        expect(content).toEqual({
          'application/problem+json': expect.objectContaining({
            schema: { $ref: '#/components/schemas/ProblemDocument' },
          }),
        });
      }
    }
  });

  it('lists every status that a solve can be answered with', () => {
    // 404 and 405 belong to other paths and methods; 431 is answered before a path is known.
    const possible = new Set(
      Object.values(statusOfFault).filter((status) => ![404, 405, 431].includes(status)),
    );
    for (const [, method, { responses }] of operations()) {
      if (method !== 'post') continue;
      const listed = Object.keys(responses).map(Number);
      expect(listed.filter((status) => status >= 400)).toEqual([...possible].toSorted((a, b) => a - b));
    }
  });

  it('holds every example file as an example that can be read', () => {
    const shown = operations().flatMap(([path, , { requestBody }]) =>
      Object.values(requestBody?.content['application/json'].examples ?? {}).map(({ value }) => {
        const operation = path.split('/').at(-1) as Operation;
        expect(() => readRequest(operation, value)).not.toThrow();
        return JSON.stringify(value);
      }),
    );
    const examples = new URL('schemas/examples/', top);
    const files = readdirSync(examples).map((name) =>
      JSON.stringify(JSON.parse(readFileSync(new URL(name, examples), 'utf8'))),
    );
    expect(shown.toSorted()).toEqual(files.toSorted());
  });
});

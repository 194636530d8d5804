import { execFileSync } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { basename, join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { parse } from 'yaml';
import { type Operation, readRequest } from '../../src/contract/read-request.ts';
import { tableNames, tablesOf } from '../../src/encoding/tables.ts';
import { viewsOf } from '../../src/figures/views.ts';
import { readAnswerQuery } from '../../src/http/answer-query.ts';
import { formOf, mediaTypeOf } from '../../src/http/negotiate-answer.ts';
import type { Example } from '../../src/http/pages/example.ts';
import { statusOfFault } from '../../src/http/statuses.ts';
import { formats, formatsOf } from '../../src/pool/answer-form.ts';

interface Reply {
  $ref?: string;
  content?: Record<string, { schema: { $ref?: string } }>;
  headers?: Record<string, unknown>;
}
interface QueryParameter {
  name: string;
  in: string;
  description: string;
  schema: {
    enum?: string[];
    default?: unknown;
    minimum?: number;
    maximum?: number;
    items?: { type: string };
    maxItems?: number;
  };
}
interface OperationObject {
  operationId: string;
  requestBody?: { content: Record<string, { examples: Record<string, { value: unknown }> } | undefined> };
  tags: string[];
  responses: Record<string, Reply>;
}
interface Document {
  openapi: string;
  paths: Record<string, Record<string, OperationObject>>;
  info: { version: string };
  components: {
    parameters: Record<string, QueryParameter>;
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

  it('lists its examples beside it, as they are written', () => {
    const examples = JSON.parse(readFileSync(join(folder, 'examples.json'), 'utf8')) as Example[];
    const names = readdirSync(new URL('schemas/examples/', top)).map((file) => basename(file, '.json'));
    expect(examples.map(({ name }) => name).toSorted()).toEqual(names.toSorted());
    for (const { name, operation, text } of examples) {
      expect(text).toBe(readFileSync(new URL(`schemas/examples/${name}.json`, top), 'utf8'));
      expect(document.paths).toHaveProperty([`/v1/${operation}`]);
    }
  });

  it('offers the routes of the service', () => {
    expect(operations().map(([path, method]) => `${method} ${path}`)).toEqual([
      'post /v1/modes',
      'post /v1/responses',
      'post /v1/transfer-functions',
      'post /v1/checks',
      'get /v1/results/{digest}',
      'post /v1/batches',
      'get /v1/jobs/{id}',
      'delete /v1/jobs/{id}',
      'get /v1/jobs/{id}/events',
      'get /v1/jobs/{id}/result',
      'get /',
      'get /docs',
      'get /examples/{name}.json',
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
    // 404, 405 and 409 belong to other paths and methods; 431 is answered before a path is known.
    const possible = new Set(
      Object.values(statusOfFault).filter((status) => ![404, 405, 409, 431].includes(status)),
    );
    for (const [, method, { responses }] of operations()) {
      if (method !== 'post') continue;
      const listed = Object.keys(responses).map(Number);
      expect(listed.filter((status) => status >= 400)).toEqual([...possible].toSorted((a, b) => a - b));
    }
  });

  it('has the version of the package, which is part of every digest', () => {
    const { version } = JSON.parse(readFileSync(new URL('package.json', top), 'utf8')) as { version: string };
    expect(document.info.version).toBe(version);
  });

  it('describes the query parameters as they are read', () => {
    const { parameters } = document.components;
    const queried = Object.values(parameters).filter((parameter) => parameter.in === 'query');
    expect(() => readAnswerQuery({ x: '' })).toThrow(queried.map(({ name }) => name).join(', '));
    expect(parameters.Format.schema.enum).toEqual(formats);
    expect(parameters.Table.schema.enum).toEqual(tableNames);
    expect(parameters.View.schema.enum!.toSorted()).toEqual(
      [...new Set(Object.values(viewsOf).flat())].toSorted(),
    );
    const figure = formOf('modes', 'svg', {});
    for (const { name, schema, description } of queried) {
      const { minimum, maximum, maxItems } = schema;
      const takes = (value: unknown): boolean => {
        try {
          readAnswerQuery({ [name]: String(value) });
          return true;
        } catch {
          return false;
        }
      };
      for (const value of schema.enum ?? []) expect(takes(value)).toBe(true);
      if (minimum !== undefined && maximum !== undefined) {
        expect([minimum - 1, minimum, maximum, maximum + 1].map(takes)).toEqual([false, true, true, false]);
      }
      if (maxItems !== undefined) {
        expect([maxItems, maxItems + 1].map((length) => takes(Array<number>(length).fill(1)))).toEqual([
          true,
          false,
        ]);
      }
      // Said in words, because a caller that fills defaults in would name them beside another format.
      if (name !== 'format') expect(schema.default).toBeUndefined();
      const stated = /(?:; |\(`)(\w+)(?:`, also)? where none is given/.exec(description ?? '')?.[1];
      if (['width', 'height', 'theme'].includes(name)) {
        expect(String((figure as unknown as { figure: Record<string, unknown> }).figure[name])).toBe(stated);
      }
      if (name === 'table' || name === 'view') {
        for (const choices of Object.values(name === 'table' ? tablesOf : viewsOf)) {
          for (const choice of choices) expect(description).toContain(`\`${choice}\``);
        }
      }
    }
  });

  it('offers every form of an answer wherever there is one', () => {
    for (const [path, , { responses, tags }] of operations()) {
      if (!tags.includes('solves')) continue;
      const operation = path.split('/').at(-1)!;
      const offered = Object.hasOwn(formatsOf, operation) ? formatsOf[operation as Operation] : formats;
      expect(Object.keys(responses['200'].content!)).toEqual(offered.map((format) => mediaTypeOf[format]));
      expect(Object.keys(responses['200'].headers!)).toEqual(
        expect.arrayContaining(['Content-Location', 'ETag', 'Vary']),
      );
    }
  });

  it('holds every example file as an example that can be read', () => {
    const shown = operations().flatMap(([path, , { requestBody }]) =>
      Object.values(requestBody?.content['application/json']?.examples ?? {}).map(({ value }) => {
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

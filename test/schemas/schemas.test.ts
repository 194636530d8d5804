import { execFileSync } from 'node:child_process';
import { readdirSync, readFileSync } from 'node:fs';
import { Ajv2020 } from 'ajv/dist/2020.js';
import { describe, expect, it } from 'vitest';
import { isDimensionName } from '../../src/contract/dimension-at.ts';
import { formFaultWordings } from '../../src/faults/form-faults.ts';
import { badRequests } from '../contract/bad-requests.ts';
import { modes, responses } from '../contract/request-cases.ts';

type Schema = Record<string, unknown> & {
  $ref?: string;
  title?: string;
  description?: string;
  type?: string | string[];
  properties?: Record<string, Schema>;
};

const folder = new URL('../../schemas/', import.meta.url);
const files = readdirSync(folder).filter((name) => name.endsWith('.json'));
const schemas = new Map(
  files.map((file) => [file.slice(0, -5), JSON.parse(readFileSync(new URL(file, folder), 'utf8')) as Schema]),
);

/** The schemas as any client would compile them: every file as it is, nothing rewritten. */
const published = new Ajv2020({
  strict: true,
  strictRequired: false,
  allowUnionTypes: true,
  discriminator: true,
});
published.addVocabulary(['x-dimension', 'x-dimension-per-index']);
for (const [title, schema] of schemas) published.addSchema(schema, `${title}.json`);

const validator = (title: string) => published.getSchema(`${title}.json`)!;
const rootOf = {
  modes: 'ModesRequest',
  responses: 'ResponsesRequest',
  'transfer-functions': 'TransferFunctionsRequest',
  checks: 'ChecksRequest',
};

/** Every schema within a schema, itself included, with the path to it. */
function parts(schema: unknown, path: string): { schema: Schema; path: string }[] {
  if (typeof schema !== 'object' || schema === null) return [];
  const inner = Object.entries(schema).flatMap(([key, value]) => parts(value, `${path}/${key}`));
  return [{ schema: schema as Schema, path }, ...inner];
}

const all = [...schemas].flatMap(([title, schema]) => parts(schema, title));

function reach(title: string, seen = new Set<string>()): Set<string> {
  if (seen.has(title)) return seen;
  seen.add(title);
  for (const { schema } of parts(schemas.get(title), title)) {
    if (schema.$ref !== undefined) reach(schema.$ref.slice(0, -5), seen);
  }
  return seen;
}

describe('the schema files', () => {
  it.each([...schemas])(
    '%s is valid 2020-12, named after its file, without an identifier',
    (title, schema) => {
      expect(published.validateSchema(schema)).toBe(true);
      expect(schema.title).toBe(title);
      expect(schema.$schema).toBe('https://json-schema.org/draft/2020-12/schema');
      expect(schema).not.toHaveProperty('$id');
      expect(() => validator(title)).not.toThrow();
    },
  );

  it('all lead from a request, an answer or the problem document', () => {
    const roots = [...schemas.keys()].filter((title) => /(Request|Answer|Document)$/.test(title));
    const reached = new Set(roots.flatMap((title) => [...reach(title)]));
    expect([...schemas.keys()].filter((title) => !reached.has(title))).toEqual([]);
  });

  it('every property is described', () => {
    const silent = all.flatMap(({ schema, path }) =>
      Object.entries(typeof schema.properties === 'object' ? schema.properties : {})
        .filter(([, property]) => {
          const target = property.$ref === undefined ? property : schemas.get(property.$ref.slice(0, -5));
          return !property.description && !target?.description;
        })
        .map(([key]) => `${path}/${key}`),
    );
    expect(silent).toEqual([]);
  });

  it('every object is closed', () => {
    const open = all.filter(
      ({ schema }) =>
        schema.type === 'object' && schema.oneOf === undefined && schema.additionalProperties !== false,
    );
    expect(open.map(({ path }) => path)).toEqual([]);
  });

  it('every default is told in words', () => {
    const untold = all
      .filter(({ schema }) => 'default' in schema && typeof schema.properties !== 'object')
      .filter(({ schema }) => {
        const target = schema.$ref === undefined ? schema : schemas.get(schema.$ref.slice(0, -5))!;
        return !/Default/.test(`${schema.description ?? ''} ${target.description ?? ''}`);
      });
    expect(untold.map(({ path }) => path)).toEqual([]);
  });

  it('the generated types are up to date', () => {
    const script = new URL('scripts/generate-types.mjs', folder);
    expect(() =>
      execFileSync(process.execPath, [script.pathname, '--check'], { stdio: 'pipe' }),
    ).not.toThrow();
  });
});

describe('dimensions', () => {
  const inRequests = new Set(Object.values(rootOf).flatMap((title) => [...reach(title)]));
  const numbers = all.filter(
    ({ schema, path }) =>
      inRequests.has(path.split('/')[0]) && [schema.type].flat().some((type) => type === 'number'),
  );

  it('every number of a request has one, or is one of the plain numbers listed here', () => {
    const plain = numbers.filter(({ schema }) => schema['x-dimension'] === undefined).map(({ path }) => path);
    expect(plain.toSorted()).toEqual([
      'DampingCriterion/properties/minimum',
      'EffectiveMassCriterion/properties/minimum',
      'LossFactorDamping/properties/value',
      'RatioDamping/properties/value',
      'RatiosDamping/properties/values/items',
      'SeparationCriterion/properties/margin',
      'SeparationCriterion/properties/multiples/items',
      'SeriesByRelativeTolerance/properties/relativeTolerance',
      'VortexCriterion/properties/strouhal',
    ]);
  });

  it('every one is known, and the number may be a text with a unit', () => {
    const measured = all.filter(({ schema }) => schema['x-dimension'] !== undefined);
    expect(measured.length).toBeGreaterThan(50);
    for (const { schema } of measured) {
      expect(isDimensionName(String(schema['x-dimension']))).toBe(true);
      expect(schema.type).toEqual(['number', 'string']);
    }
  });
});

describe('the published schemas and the reader agree', () => {
  it('what the reader takes, a client that holds to the schemas takes too', () => {
    expect(validator('ModesRequest')(modes())).toBe(true);
    expect(validator('ResponsesRequest')(responses())).toBe(true);
    for (const { operation, body } of badRequests.filter(({ status }) => status === 422)) {
      expect(validator(rootOf[operation])(body)).toBe(true);
    }
  });

  it('what breaks the form is invalid for a client too, units and magnitudes apart', () => {
    const beyondSchema = /^(unit|quantity|number|malformed)-/;
    const rows = badRequests.filter(({ faults }) =>
      faults.some(({ code }) => code in formFaultWordings && !beyondSchema.test(code)),
    );
    expect(rows.length).toBeGreaterThan(60);
    // A text has no range before its unit is read.
    const ofTexts = [
      'a negative spring',
      'a negative time',
      'a pulse of negative duration',
      'a moving force before time 0',
    ];
    const readable = rows.filter(({ title }) => !ofTexts.includes(title));
    const accepted = readable.filter(({ operation, body }) => validator(rootOf[operation])(body) === true);
    expect(accepted.map(({ title }) => title)).toEqual([]);
  });
});

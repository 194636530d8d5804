/**
 * Writes src/spec/types.ts from schemas/*.json.
 *
 * The types describe canonical documents: a quantity (`x-dimension`) is a number in SI, a property
 * with a default is always there. Arrays of numbers in answers may be typed arrays (`Numbers`).
 * With --check nothing is written; the exit code is 1 where the file is not up to date.
 */
import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { compile } from 'json-schema-to-typescript';

const schemas = new URL('../', import.meta.url);
const target = new URL('../../src/spec/types.ts', import.meta.url);

const head = `/**
 * Canonical requests, answers and problems: SI numbers, defaults filled in.
 * Generated from schemas/ by "npm run types": do not edit.
 */

/** Numbers of an answer. */
export type Numbers = readonly number[] | Float64Array;
`;

const files = readdirSync(schemas)
  .filter((name) => name.endsWith('.json'))
  .toSorted();
const byName = new Map(
  files.map((name) => [name.slice(0, -5), JSON.parse(readFileSync(new URL(name, schemas), 'utf8'))]),
);
for (const [name, schema] of byName) {
  if (schema.title !== name) throw new Error(`${name}.json: its title must be ${name}, not ${schema.title}`);
}

const scalarTypes = new Set(['number', 'integer', 'string', 'boolean']);

/** A file that holds a number or text without a name worth a type. */
function isScalar(schema) {
  const type = schema['x-dimension'] ? 'number' : schema.type;
  return scalarTypes.has(type) && schema.enum === undefined;
}

/** Names of all files that `name` leads to, itself included. */
function reach(name, seen = new Set()) {
  if (seen.has(name)) return seen;
  seen.add(name);
  JSON.stringify(byName.get(name), (key, value) => {
    if (key === '$ref') reach(value.slice(0, -5), seen);
    return value;
  });
  return seen;
}

const roots = [...byName.keys()].filter((name) => /(Request|Answer|Document)$/.test(name));
const answers = new Set(
  roots.filter((name) => !name.endsWith('Request')).flatMap((name) => [...reach(name)]),
);

/** The schema of the canonical form, for json-schema-to-typescript. */
function canonical(schema, inAnswer) {
  if (schema.$ref !== undefined) {
    const name = schema.$ref.slice(0, -5);
    const to = byName.get(name);
    if (to === undefined) throw new Error(`no schema file ${schema.$ref}`);
    if (isScalar(to)) {
      return canonical(
        { ...to, title: undefined, description: schema.description ?? to.description },
        inAnswer,
      );
    }
    return { ...(schema.description && { description: schema.description }), tsType: name };
  }
  const { title, description, type, enum: values, const: constant } = schema;
  const result = { ...(title && { title }), ...(description && { description }) };
  if (constant !== undefined) return { ...result, const: constant };
  if (schema.oneOf) return { ...result, oneOf: schema.oneOf.map((branch) => canonical(branch, inAnswer)) };
  if (schema['x-dimension']) return { ...result, type: 'number' };
  if ([type].flat().includes('array')) {
    const { items, minItems, maxItems } = schema;
    const numeric = items.type === 'number' && minItems === undefined;
    if (inAnswer && numeric)
      return { ...result, tsType: [type].flat().includes('null') ? 'Numbers | null' : 'Numbers' };
    const tuple = minItems !== undefined && minItems === maxItems ? { minItems, maxItems } : {};
    return { ...result, type, items: canonical(items, inAnswer), ...tuple };
  }
  if (type === 'object') {
    const properties = Object.entries(schema.properties);
    const defaulted = properties.filter(([, property]) => property.default !== undefined).map(([key]) => key);
    return {
      ...result,
      type,
      properties: Object.fromEntries(
        properties.map(([key, property]) => [key, canonical(property, inAnswer)]),
      ),
      required: [...new Set([...schema.required, ...defaulted])],
      additionalProperties: false,
    };
  }
  return { ...result, type, ...(values && { enum: values }) };
}

const named = [...byName.keys()].filter((name) => !isScalar(byName.get(name)));
const definitions = Object.fromEntries(
  named.map((name) => [name, canonical(byName.get(name), answers.has(name))]),
);
const root = {
  title: 'SyntheticRoot',
  type: 'object',
  additionalProperties: false,
  properties: Object.fromEntries(named.map((name) => [name, { $ref: `#/definitions/${name}` }])),
  definitions,
};

const text = await compile(root, 'SyntheticRoot', {
  bannerComment: '',
  style: { singleQuote: true, printWidth: 110 },
  enableConstEnums: false,
  unknownAny: true,
});
const withoutRoot = text.replace(/export interface SyntheticRoot \{[\s\S]*?\n\}\n/, '');
if (withoutRoot.includes('SyntheticRoot')) throw new Error('the synthetic root was not removed');
const types = head + '\n' + withoutRoot.replace(/\n{3,}/g, '\n\n').trim() + '\n';
if (!process.argv.includes('--check')) writeFileSync(target, types);
else if (readFileSync(target, 'utf8') !== types) {
  console.error('src/spec/types.ts is not what the schemas say: run "npm run types".');
  process.exitCode = 1;
}

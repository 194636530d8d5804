import type { ErrorObject } from 'ajv/dist/2020.js';
import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import { noForm } from './choose-alternative.ts';
import { dimensionAt, isDimensionName } from './dimension-at.ts';
import { plainNumber } from './dimensions.ts';
import { type FormsByTitle, formsOf } from './forms.ts';
import type { QuantityParams, RangeLimit, ReadingContext } from './keywords.ts';
import { child, placeName } from './pointer.ts';
import { resolveSchema, type Schema } from './schema-files.ts';
import { showValue } from './show-value.ts';
import { likelyKey } from './likely-key.ts';

/** What naming a fault needs beside the error. */
export interface NamingContext extends ReadingContext {
  readonly forms: FormsByTitle;
}

/**
 * The fault that an error of a validator means, in the words of the catalogue.
 *
 * @returns null for errors that only repeat another one
 */
export function nameFault(error: ErrorObject, context: NamingContext): FaultRecord | null {
  const pointer = error.instancePath;
  const schema = error.parentSchema as Schema;
  const params = error.params as Record<string, never>;
  const key = placeName(pointer);
  const about = schema.description ?? '';
  const data: unknown = error.data;
  switch (error.keyword) {
    case 'required':
      return missingKey(pointer, params.missingProperty, schema, context);
    case 'additionalProperties':
      return unknownKey(pointer, params.additionalProperty, schema, context);
    case 'type':
      return wrongType(pointer, schema, data, context);
    case 'minimum':
    case 'maximum':
    case 'exclusiveMinimum':
    case 'exclusiveMaximum': {
      const broken = { keyword: error.keyword, limit: Number(params.limit) };
      return outOfRange(pointer, broken, data, schema, context);
    }
    case 'x-dimension':
    case 'quantities':
      return nameQuantityFault(pointer, error.params as QuantityParams, schema, context);
    case 'enum':
      return faultRecord('not-one-of', pointer, {
        key,
        found: showValue(data),
        allowed: schema.enum!.join(', '),
      });
    case 'discriminator': {
      const tag = schema.discriminator!.propertyName;
      const found = (data as Record<string, unknown>)[tag];
      if (found === undefined) return null;
      return faultRecord('not-one-of', child(pointer, tag), {
        key: tag,
        found: showValue(found),
        allowed: tagValues(schema).join(', '),
      });
    }
    case 'alternatives':
      return noAlternative(pointer, schema, data, Number(params.chosen));
    case 'minItems':
    case 'maxItems': {
      const code = error.keyword === 'minItems' ? 'too-few-items' : 'too-many-items';
      return faultRecord(code, pointer, {
        key,
        count: (data as unknown[]).length,
        limit: Number(params.limit),
        about,
      });
    }
    case 'uniqueItems': {
      const found = showValue((data as unknown[])[Number(params.i)]);
      return faultRecord('repeated-item', `${pointer}/${Number(params.i)}`, { key, found });
    }
    case 'minProperties':
      return faultRecord('nothing-given', pointer, { key, allowed: keysOf(schema).join(', ') });
    case 'minLength':
    case 'maxLength':
      return faultRecord('text-length', pointer, {
        key,
        wanted: `${Number(schema.minLength)} to ${Number(schema.maxLength)}`,
        count: String(data).length,
      });
    case 'if':
      return null;
    default:
      throw new Error(`no wording for the schema keyword ${error.keyword}`);
  }
}

function keysOf(schema: Schema): string[] {
  return Object.keys(schema.properties ?? {});
}

/** The values of the tag of a union with a discriminator. */
function tagValues({ oneOf = [], discriminator }: Schema): string[] {
  return oneOf.map((branch) => String(resolveSchema(branch).properties?.[discriminator!.propertyName].const));
}

function missingKey(pointer: string, key: string, schema: Schema, { forms }: NamingContext): FaultRecord {
  const named = forms.get(schema.title ?? '')?.find(({ keys }) => sameKeys(keys, keysOf(schema)));
  const form = named !== undefined && named.name !== key ? ` for the form ${named.name}` : '';
  const property = schema.properties?.[key];
  const about =
    property === undefined
      ? `Give one of: ${tagValues(schema).join(', ')}.`
      : (property.description ?? resolveSchema(property).description ?? '');
  return faultRecord('missing-key', child(pointer, key), { key, form, about });
}

function unknownKey(pointer: string, key: string, schema: Schema, { forms }: NamingContext): FaultRecord {
  const siblings = forms.get(schema.title ?? '') ?? [];
  const form = siblings.find(({ keys }) => sameKeys(keys, keysOf(schema)));
  const other = siblings.find(({ keys }) => keys.includes(key));
  const place = child(pointer, key);
  if (form !== undefined && other !== undefined) {
    return faultRecord('other-form', place, { key, form: form.name, other: other.name });
  }
  const allowed = siblings.length > 0 ? [...new Set(siblings.flatMap(({ keys }) => keys))] : keysOf(schema);
  const likely = likelyKey(key, allowed);
  const hint = likely === null ? '' : ` Did you mean ${likely}?`;
  return faultRecord('unknown-key', place, { key: showValue(key), hint, allowed: allowed.join(', ') });
}

function sameKeys(left: readonly string[], right: readonly string[]): boolean {
  return left.length === right.length && left.every((key, index) => key === right[index]);
}

/** What a number of this schema is measured in; empty for plain numbers. */
function unitAt(pointer: string, schema: Schema, context: NamingContext): string {
  const name = schema['x-dimension'] ?? '';
  const dimension = isDimensionName(name) ? dimensionAt(name, context, pointer) : plainNumber;
  return dimension === plainNumber ? '' : dimension.unit;
}

const typeNames: Readonly<Record<string, string>> = {
  object: 'an object',
  array: 'a list',
  number: 'a number',
  integer: 'an integer',
  string: 'a text',
  boolean: 'true or false',
};

function wrongType(pointer: string, schema: Schema, data: unknown, context: NamingContext): FaultRecord {
  const types = schema['x-dimension'] === undefined ? [schema.type ?? []].flat() : ['number'];
  const unit = unitAt(pointer, schema, context);
  const wanted =
    unit === ''
      ? types.map((type) => typeNames[type]).join(' or ')
      : `a number in ${unit}, or a text with a unit such as "12.5 ${unit}"`;
  let hint = '';
  if (data === null) hint = ' Leave the key out where there is nothing to say.';
  else if (typeof data === 'string' && data.trim() !== '' && Number.isFinite(Number(data))) {
    hint = ' Write the number without quotes.';
  }
  const found = data === null ? 'null' : showValue(data);
  const key = pointer === '' ? 'The request' : placeName(pointer);
  return faultRecord('wrong-type', pointer, { key, wanted, found, hint });
}

const comparisons = {
  minimum: (limit: string) => `${limit} or more`,
  exclusiveMinimum: (limit: string) => `above ${limit}`,
  maximum: (limit: string) => `at most ${limit}`,
  exclusiveMaximum: (limit: string) => `below ${limit}`,
};

function outOfRange(
  pointer: string,
  { keyword, limit }: RangeLimit,
  value: unknown,
  schema: Schema,
  context: NamingContext,
): FaultRecord {
  const unit = unitAt(pointer, schema, context);
  const wanted = comparisons[keyword](unit === '' ? String(limit) : `${limit} ${unit}`);
  const found = showValue(context.originals.get(pointer) ?? value);
  const about = schema.description ?? '';
  return faultRecord('out-of-range', pointer, { key: placeName(pointer), wanted, found, about });
}

function nameQuantityFault(
  pointer: string,
  params: QuantityParams,
  schema: Schema,
  context: NamingContext,
): FaultRecord {
  if ('problem' in params) return faultRecord(params.problem.code, pointer, params.problem.values);
  if ('broken' in params) return outOfRange(pointer, params.broken, params.value, schema, context);
  return wrongType(pointer, schema, params.value, context);
}

function noAlternative(pointer: string, schema: Schema, data: unknown, chosen: number): FaultRecord {
  const branches = schema.alternatives as Schema[];
  if (chosen === noForm) {
    const forms = formsOf(branches).map(({ name }) => name);
    const found = Object.keys(data as object);
    return faultRecord('form-missing', pointer, {
      key: placeName(pointer),
      forms: forms.join('; or '),
      found: found.length === 0 ? 'nothing' : found.slice(0, 10).join(', '),
    });
  }
  const types = new Set(
    branches
      .map(resolveSchema)
      .map(({ type, ...rest }) => typeNames[rest['x-dimension'] === undefined ? String(type) : 'number']),
  );
  const about = schema.description === undefined ? '' : ` ${schema.description}`;
  return faultRecord('wrong-type', pointer, {
    key: placeName(pointer),
    wanted: [...types].join(' or '),
    found: showValue(data),
    hint: about,
  });
}

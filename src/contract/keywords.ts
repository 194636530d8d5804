import {
  _,
  type CodeKeywordDefinition,
  type FuncKeywordDefinition,
  type KeywordCxt,
  Name,
} from 'ajv/dist/2020.js';
import { chooseAlternative, describeAlternatives } from './choose-alternative.ts';
import { type DimensionContext, dimensionAt, type DimensionName, isDimensionName } from './dimension-at.ts';
import { type Dimension, perLength } from './dimensions.ts';
import { type QuantityProblem, readQuantity } from './read-quantity.ts';
import type { Schema } from './schema-files.ts';

/** What the keywords know of the request that is being validated; `this` of the validators. */
export interface ReadingContext extends DimensionContext {
  /** Texts that were replaced by their SI values, by pointer. */
  readonly originals: Map<string, string>;
}

/** Params of the errors of `x-dimension` and `quantities`. */
export type QuantityParams =
  | { readonly problem: QuantityProblem }
  | { readonly broken: RangeLimit; readonly value: number }
  | { readonly notNumber: true; readonly value: unknown };

/** A limit of a number: its schema keyword and value. */
export interface RangeLimit {
  readonly keyword: 'minimum' | 'maximum' | 'exclusiveMinimum' | 'exclusiveMaximum';
  readonly limit: number;
}

/** More errors of one list than this are not collected. */
const mostErrors = 100;

function requireDimension(name: string): DimensionName {
  if (!isDimensionName(name)) throw new Error(`x-dimension: ${name} is no dimension`);
  return name;
}

/**
 * `x-dimension`: a text with a unit is replaced by its value in SI, before the limits of the same
 * schema are checked. Numbers pass.
 */
export const dimensionKeyword: FuncKeywordDefinition = {
  keyword: 'x-dimension',
  schemaType: 'string',
  modifying: true,
  errors: true,
  compile(schema: string, parentSchema) {
    const name = requireDimension(schema);
    const validate = function (this: ReadingContext, data: unknown, place: Place): boolean {
      validate.errors = undefined;
      if (typeof data !== 'string') return true;
      const read = readQuantity(data, dimensionAt(name, this, place.instancePath));
      if (typeof read !== 'number') {
        validate.errors = [{ keyword: 'x-dimension', params: { problem: read }, parentSchema }];
        return false;
      }
      this.originals.set(place.instancePath, data);
      place.parentData[place.parentDataProperty] = read;
      return true;
    };
    validate.errors = undefined as object[] | undefined;
    return validate as never;
  },
};

interface Place {
  readonly instancePath: string;
  // oxlint-disable-next-line typescript/no-explicit-any -- an object or a list, as Ajv hands it over
  readonly parentData: any;
  readonly parentDataProperty: string | number;
}

/**
 * `quantities`: the items of a list of numbers, in one loop that stops after 100 errors. The
 * loader writes it in place of `items` where the items are plain numbers or quantities.
 */
export const quantitiesKeyword: FuncKeywordDefinition = {
  keyword: 'quantities',
  type: 'array',
  schemaType: 'object',
  errors: true,
  compile(schema: Schema) {
    const dimension = schema['x-dimension'];
    const name = dimension === undefined ? null : requireDimension(dimension);
    const perIndex = schema['x-dimension-per-index'] !== undefined;
    const limits = rangeLimits(schema);
    const validate = function (this: ReadingContext, list: unknown[], place: Place): boolean {
      const errors: object[] = [];
      let wanted: Dimension | null = null;
      const report = (index: number, params: QuantityParams): void => {
        const instancePath = `${place.instancePath}/${index}`;
        errors.push({ keyword: 'quantities', instancePath, params, parentSchema: schema });
      };
      for (let index = 0; index < list.length && errors.length < mostErrors; index++) {
        let value = list[index];
        let original: string | null = null;
        if (typeof value === 'string' && name !== null) {
          wanted ??= dimensionAt(name, this, place.instancePath);
          const read = readQuantity(value, perIndex ? perLength(wanted, index) : wanted);
          if (typeof read !== 'number') {
            report(index, { problem: read });
            continue;
          }
          original = value;
          list[index] = read;
          value = read;
        }
        if (typeof value !== 'number' || !Number.isFinite(value)) {
          report(index, { notNumber: true, value });
          continue;
        }
        for (const broken of limits) {
          if (!breaks(value, broken)) continue;
          if (original !== null) this.originals.set(`${place.instancePath}/${index}`, original);
          report(index, { broken, value });
        }
      }
      validate.errors = errors;
      return errors.length === 0;
    };
    validate.errors = undefined as object[] | undefined;
    return validate as never;
  },
};

/** The limits that a schema sets to a number. */
export function rangeLimits(schema: Schema): RangeLimit[] {
  const keywords = ['minimum', 'exclusiveMinimum', 'maximum', 'exclusiveMaximum'] as const;
  return keywords
    .filter((keyword) => typeof schema[keyword] === 'number')
    .map((keyword) => ({ keyword, limit: schema[keyword] as number }));
}

function breaks(value: number, { keyword, limit }: RangeLimit): boolean {
  switch (keyword) {
    case 'minimum':
      return value < limit;
    case 'exclusiveMinimum':
      return value <= limit;
    case 'maximum':
      return value > limit;
    case 'exclusiveMaximum':
      return value >= limit;
  }
}

/**
 * `alternatives`: a `oneOf` without a discriminator. One alternative is chosen by what the value
 * looks like, and only that one is validated; the loader writes it in place of `oneOf`.
 */
export const alternativesKeyword: CodeKeywordDefinition = {
  keyword: 'alternatives',
  schemaType: 'array',
  code(cxt: KeywordCxt) {
    const { gen, data, schema } = cxt;
    const described = describeAlternatives(schema as Schema[]);
    const choose = gen.scopeValue('func', { ref: (value: unknown) => chooseAlternative(described, value) });
    const chosen = gen.const('chosen', _`${choose}(${data})`);
    const valid = gen.let('valid', false);
    gen.if(_`${chosen} < 0`, () => {
      cxt.setParams({ chosen });
      cxt.error();
    });
    described.forEach((_alternative, index) => {
      gen.if(_`${chosen} === ${index}`, () => {
        const inner = gen.name('valid');
        const subschema = cxt.subschema({ keyword: 'alternatives', schemaProp: index }, inner);
        cxt.mergeEvaluated(subschema, Name);
        gen.assign(valid, inner);
      });
    });
    cxt.ok(valid);
  },
  error: {
    message: 'must be one of the alternatives',
    params: ({ params }) => _`{chosen: ${params.chosen}}`,
  },
};

import { Ajv2020, type ValidateFunction } from 'ajv/dist/2020.js';
import { alternativesKeyword, dimensionKeyword, quantitiesKeyword } from './keywords.ts';
import { resolveSchema, type Schema, schemas } from './schema-files.ts';

const base = 'https://tailbound.invalid/schemas/';

const ajv = new Ajv2020({
  allErrors: true,
  verbose: true,
  discriminator: true,
  useDefaults: true,
  passContext: true,
  // Optimising the generated code doubles the time to start and gains nothing measurable per request.
  code: { optimize: false },
  strict: true,
  // The files are held to the meta-schema by a test, not at every start.
  validateSchema: false,
  strictRequired: false,
  strictTuples: false,
  allowUnionTypes: true,
});
ajv.addKeyword(dimensionKeyword);
ajv.addKeyword(quantitiesKeyword);
ajv.addKeyword(alternativesKeyword);
ajv.addVocabulary(['x-dimension-per-index']);
for (const [title, schema] of schemas) {
  ajv.addSchema({ ...(rewrite(schema) as object), $id: `${base}${title}.json` });
}

/** The validator of the schema with this title, compiled when it is first asked for. */
export function validatorOf(title: string): ValidateFunction {
  const validate = ajv.getSchema(`${base}${title}.json`);
  if (validate === undefined) throw new Error(`no schema ${title}`);
  return validate as ValidateFunction;
}

/**
 * The same schema in keywords that name one mistake once: `oneOf` without discriminator becomes
 * `alternatives`; items that are numbers become `quantities`; the items of a list that is too
 * long are not looked at.
 */
function rewrite(schema: unknown): unknown {
  if (Array.isArray(schema)) return schema.map(rewrite);
  if (schema === null || typeof schema !== 'object') return schema;
  const { default: fallback, ...rest } = schema as Schema;
  const result: Record<string, unknown> = Object.fromEntries(
    Object.entries(rest).map(([key, value]) => [key, rewrite(value)]),
  );
  if (fallback !== undefined) result.default = fallback;
  if (result.oneOf !== undefined && result.discriminator === undefined) {
    result.alternatives = result.oneOf;
    delete result.oneOf;
  }
  const items = rest.items;
  if (items !== undefined && isNumeric(resolveSchema(items))) {
    result.quantities = resolveSchema(items);
    delete result.items;
  } else if (items !== undefined && rest.maxItems !== undefined) {
    result.if = { type: 'array', maxItems: rest.maxItems };
    // oxlint-disable-next-line unicorn/no-thenable -- the schema keyword beside `if`
    result.then = { items: result.items };
    delete result.items;
  }
  return result;
}

function isNumeric({ type }: Schema): boolean {
  return type === 'number' || (Array.isArray(type) && type.includes('number') && !type.includes('null'));
}

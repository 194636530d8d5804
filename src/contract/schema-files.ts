import { readdirSync, readFileSync } from 'node:fs';

/** A JSON Schema object, as far as this room looks into it. */
export interface Schema {
  readonly title?: string;
  readonly description?: string;
  readonly type?: string | readonly string[];
  readonly properties?: Readonly<Record<string, Schema>>;
  readonly required?: readonly string[];
  readonly oneOf?: readonly Schema[];
  readonly items?: Schema;
  readonly enum?: readonly string[];
  readonly const?: unknown;
  readonly discriminator?: { readonly propertyName: string };
  readonly $ref?: string;
  /** Physical dimension of a quantity, see `DimensionName`. */
  readonly 'x-dimension'?: string;
  readonly [key: string]: unknown;
}

const folder = new URL('../../schemas/', import.meta.url);

/** The schemas by their title; read once, when this room is loaded. */
export const schemas: ReadonlyMap<string, Schema> = new Map(
  readdirSync(folder)
    .filter((file) => file.endsWith('.json'))
    .map((file) => [file.slice(0, -5), JSON.parse(readFileSync(new URL(file, folder), 'utf8')) as Schema]),
);

/** The schema that a `$ref` beside it stands for; the schema itself where there is none. */
export function resolveSchema(schema: Schema): Schema {
  if (schema.$ref === undefined) return schema;
  const target = schemas.get(schema.$ref.slice(0, -5));
  if (target === undefined) throw new Error(`no schema file ${schema.$ref}`);
  return target;
}

import { describeAlternatives } from './choose-alternative.ts';
import { resolveSchema, type Schema, schemas } from './schema-files.ts';

/** One of several forms of an object, as a wording names it. */
export interface Form {
  /** Keys that the form has, all of them. */
  readonly keys: readonly string[];
  /** What tells it from the others: `youngsModulus + area + density`. */
  readonly name: string;
}

/** The forms that an object of a request can have, by the title of each form's schema. */
export type FormsByTitle = ReadonlyMap<string, readonly Form[]>;

/**
 * All forms of the objects that a request can hold.
 *
 * @param root title of the request's schema; forms of other requests are left out
 */
export function formsWithin(root: string): FormsByTitle {
  const forms = new Map<string, readonly Form[]>();
  for (const title of reachable(root)) {
    const { oneOf, discriminator } = schemas.get(title)!;
    if (oneOf === undefined || discriminator !== undefined) continue;
    const named = formsOf(oneOf);
    if (named.length < 2) continue;
    for (const branch of oneOf) forms.set(resolveSchema(branch).title ?? '', named);
  }
  return forms;
}

/** The object forms among the branches of a `oneOf`. */
export function formsOf(branches: readonly Schema[]): Form[] {
  const described = describeAlternatives(branches);
  return branches.map(resolveSchema).flatMap(({ type, properties = {} }, index) => {
    const { required, own } = described[index];
    if (type !== 'object') return [];
    return [{ keys: Object.keys(properties), name: (required.length > 0 ? required : own).join(' + ') }];
  });
}

/** Titles of all schemas that a schema leads to, itself included. */
export function reachable(title: string, seen = new Set<string>()): Set<string> {
  if (seen.has(title)) return seen;
  seen.add(title);
  JSON.stringify(schemas.get(title), (key, value: unknown) => {
    if (key === '$ref') reachable(String(value).slice(0, -5), seen);
    return value;
  });
  return seen;
}

import { resolveSchema, type Schema } from './schema-files.ts';

/** One alternative of a `oneOf` without a discriminator. */
export interface Alternative {
  /** JSON types: `object`, `array`, `null`, … */
  readonly types: readonly string[];
  /** Keys it needs, those that all alternatives need left out. */
  readonly required: readonly string[];
  /** Keys that not all alternatives have. */
  readonly own: readonly string[];
}

/** No alternative has the JSON type of the value. */
export const noSuchType = -1;
/** Nothing in the object says which alternative is meant. */
export const noForm = -2;

/** What tells the alternatives of a `oneOf` apart. */
export function describeAlternatives(branches: readonly Schema[]): Alternative[] {
  const resolved = branches.map(resolveSchema);
  const objects = resolved.filter(({ type }) => type === 'object');
  const inAll = (key: string): boolean =>
    objects.every(({ properties }) => Object.hasOwn(properties ?? {}, key));
  return resolved.map(({ type, properties = {}, required = [] }) => ({
    types: [type ?? []].flat(),
    required: required.filter((key) => !objects.every((other) => other.required?.includes(key))),
    own: Object.keys(properties).filter((key) => !inAll(key)),
  }));
}

/**
 * The alternative that a value means: by its JSON type; among objects, the one with most of its own
 * keys present, then with fewest of its keys missing, then the first.
 *
 * @returns index of the alternative, `noSuchType` or `noForm`
 */
export function chooseAlternative(alternatives: readonly Alternative[], value: unknown): number {
  const type = value === null ? 'null' : Array.isArray(value) ? 'array' : typeof value;
  const fitting = alternatives
    .map((_, index) => index)
    .filter((index) => alternatives[index].types.includes(type));
  if (fitting.length === 0) return noSuchType;
  if (fitting.length === 1) return fitting[0];

  const object = value as object;
  const present = (keys: readonly string[]): number =>
    keys.reduce((count, key) => count + (Object.hasOwn(object, key) ? 1 : 0), 0);
  const scores = fitting.map((index) => {
    const { own, required } = alternatives[index];
    return { index, present: present(own), missing: required.length - present(required) };
  });
  const best = scores.reduce((a, b) =>
    b.present > a.present || (b.present === a.present && b.missing < a.missing) ? b : a,
  );
  return best.present === 0 && best.missing > 0 ? noForm : best.index;
}

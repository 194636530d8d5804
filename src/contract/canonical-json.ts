/**
 * The canonical text of a JSON value (RFC 8785): keys sorted by UTF-16 code units, no blanks,
 * numbers as ECMAScript writes them, texts with the fewest escapes. Equal values have equal texts.
 *
 * @param value plain objects, arrays, texts, finite numbers, booleans, null
 * @throws TypeError for anything that JSON does not have: NaN, infinities, undefined, lone surrogates
 * Cost: O(size · log(keys of the largest object)).
 */
export function canonicalJson(value: unknown): string {
  switch (typeof value) {
    case 'number':
      if (!Number.isFinite(value)) throw new TypeError(`${value} is no JSON number`);
      return JSON.stringify(value);
    case 'boolean':
      return String(value);
    case 'string':
      return text(value);
    case 'object':
      if (value === null) return 'null';
      return Array.isArray(value) ? `[${value.map(canonicalJson).join(',')}]` : object(value);
    default:
      throw new TypeError(`a ${typeof value} is no JSON value`);
  }
}

function object(value: object): string {
  const entries = Object.entries(value as Record<string, unknown>);
  const sorted = entries.toSorted(([left], [right]) => (left < right ? -1 : 1));
  return `{${sorted.map(([key, item]) => `${text(key)}:${canonicalJson(item)}`).join(',')}}`;
}

/** JSON.stringify writes what RFC 8785, section 3.2.2.2, asks for; lone surrogates it would escape. */
function text(value: string): string {
  if (/\p{Surrogate}/u.test(value)) throw new TypeError('a lone surrogate is no text');
  return JSON.stringify(value);
}

import { fault } from '../faults/fault.ts';

const encoder = new TextEncoder();

/**
 * An answer as JSON text in UTF-8, the same text that JSON.stringify gives for plain arrays:
 * shortest decimal numbers that read back to the same double, −0 as 0, keys in order of insertion,
 * keys with the value undefined left out. Typed arrays are written as JSON arrays.
 *
 * @param answer plain objects, arrays, Float64Array and Int32Array, numbers, strings, booleans, null
 * @returns bytes in an ArrayBuffer of their own, so that they can be transferred between threads
 * @throws Fault `result-overflow` naming the key path of the first number that is not finite
 *
 * Cost: one walk and one JSON.stringify; 1.0 to 1.3 times JSON.stringify alone (test/bench).
 */
export function encodeJson(answer: unknown): Uint8Array<ArrayBuffer> {
  return encoder.encode(JSON.stringify(plain(answer, [])));
}

/** One step of a key path: the key or index under which a value stands. */
type Path = (string | number)[];

/** The value with typed arrays as arrays; itself, not a copy, where it holds none. */
function plain(value: unknown, path: Path): unknown {
  if (typeof value === 'number') {
    if (value - value !== 0) throw overflow(path);
    return value;
  }
  if (typeof value !== 'object' || value === null) return value;
  if (value instanceof Float64Array || value instanceof Int32Array) return plainNumbers(value, path);
  return Array.isArray(value) ? plainArray(value, path) : plainObject(value as Record<string, unknown>, path);
}

function plainNumbers(values: Float64Array | Int32Array, path: Path): number[] {
  const copy = new Array<number>(values.length);
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    // x − x is 0 for every finite x and NaN for the rest.
    if (value - value !== 0) throw overflow([...path, i]);
    copy[i] = value;
  }
  return copy;
}

function plainArray(items: readonly unknown[], path: Path): readonly unknown[] {
  let copy: unknown[] | null = null;
  for (let i = 0; i < items.length; i++) {
    const item = items[i];
    if (typeof item === 'number' && item - item === 0) {
      if (copy !== null) copy[i] = item;
      continue;
    }
    path.push(i);
    const flat = plain(item, path);
    path.pop();
    if (flat !== item && copy === null) copy = items.slice();
    if (copy !== null) copy[i] = flat;
  }
  return copy ?? items;
}

function plainObject(
  object: Readonly<Record<string, unknown>>,
  path: Path,
): Readonly<Record<string, unknown>> {
  let copy: Record<string, unknown> | null = null;
  for (const key in object) {
    const item = object[key];
    if (typeof item === 'number' && item - item === 0) continue;
    path.push(key);
    const flat = plain(item, path);
    path.pop();
    if (flat !== item) {
      copy ??= { ...object };
      copy[key] = flat;
    }
  }
  return copy ?? object;
}

function overflow(path: Path): Error {
  const name = path.reduce<string>(
    (text, step) => (typeof step === 'number' ? `${text}[${step}]` : text === '' ? step : `${text}.${step}`),
    '',
  );
  return fault('result-overflow', '', { quantity: name === '' ? 'the answer' : name });
}

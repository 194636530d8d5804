import { fault } from '../faults/fault.ts';

/**
 * An answer as a reader of its JSON has it: typed arrays as arrays, −0 as 0, keys with the value
 * undefined left out. What is made of it is the same, to the last bit, whether the answer comes from
 * the solver or from JSON that was kept.
 *
 * @param answer plain objects, arrays, Float64Array and Int32Array, numbers, texts, booleans, null
 * @throws Fault `result-overflow` naming the first number that is not finite
 * Cost: one walk, O(size), with a copy of everything.
 */
export function asRead(answer: unknown): unknown {
  return read(answer, '');
}

function read(value: unknown, path: string): unknown {
  if (typeof value === 'number') return finite(value, path);
  if (typeof value !== 'object' || value === null) return value ?? null;
  if (Array.isArray(value) || value instanceof Float64Array || value instanceof Int32Array) {
    return readItems(value as ArrayLike<unknown>, path);
  }
  const copy: Record<string, unknown> = {};
  for (const [key, item] of Object.entries(value)) {
    if (item !== undefined) copy[key] = read(item, path === '' ? key : `${path}.${key}`);
  }
  return copy;
}

function readItems(items: ArrayLike<unknown>, path: string): unknown[] {
  const copy = new Array<unknown>(items.length);
  for (let i = 0; i < items.length; i++) {
    const item = items[i];
    // −0 + 0 is 0.
    copy[i] = typeof item === 'number' && item - item === 0 ? item + 0 : read(item, `${path}[${i}]`);
  }
  return copy;
}

function finite(value: number, path: string): number {
  if (value - value !== 0)
    throw fault('result-overflow', '', { quantity: path === '' ? 'the answer' : path });
  return value + 0;
}

import { fault, Fault } from '../faults/fault.ts';
import { findJsonFaults } from './json-syntax.ts';

const decoder = new TextDecoder('utf-8', { fatal: true, ignoreBOM: true });

/**
 * The value of a JSON text (RFC 8259) in UTF-8.
 *
 * @param bytes the whole body of a request, or a line of a batch
 * @param firstLine number of its first line, for the places in faults
 * @throws Fault with every fault of the text and its place: `empty-body`, `not-utf8`, `malformed-json`,
 *   `duplicate-key`, `reserved-key`, `nested-too-deep`, `number-out-of-range`
 *
 * Cost: two passes over the text, O(bytes).
 */
export function readJson(bytes: Uint8Array, firstLine = 1): unknown {
  if (bytes.byteLength === 0) throw fault('empty-body', '');
  const text = decode(bytes);
  if (text.charCodeAt(0) === 0xfeff) {
    const reason = 'found a byte order mark, which JSON must not start with';
    throw fault('malformed-json', '', { line: firstLine, column: 1, reason });
  }
  const faults = findJsonFaults(text, firstLine);
  if (faults.length > 0) throw new Fault(faults);
  return JSON.parse(text);
}

function decode(bytes: Uint8Array): string {
  try {
    return decoder.decode(bytes);
  } catch {
    throw fault('not-utf8', '', { offset: firstBadByte(bytes) });
  }
}

/** Start of the first byte sequence that is no character: bisection over the prefixes that may still go on. */
function firstBadByte(bytes: Uint8Array): number {
  let good = 0;
  let bad = bytes.byteLength + 1;
  while (bad - good > 1) {
    const middle = (good + bad) >> 1;
    if (isValid(bytes.subarray(0, middle), true)) good = middle;
    else bad = middle;
  }
  while (!isValid(bytes.subarray(0, good), false)) good--;
  return good;
}

function isValid(prefix: Uint8Array, mayGoOn: boolean): boolean {
  try {
    new TextDecoder('utf-8', { fatal: true }).decode(prefix, { stream: mayGoOn });
    return true;
  } catch {
    return false;
  }
}

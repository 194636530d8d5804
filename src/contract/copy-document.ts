import type { FaultCode } from '../faults/catalogue.ts';
import { faultRecord, type FaultRecord, type FaultValues } from '../faults/fault.ts';
import { child, placeName } from './pointer.ts';
import { isUsableMagnitude } from './read-quantity.ts';
import { shortText } from './show-value.ts';

/** Deeper nesting than this is no request. */
const deepest = 64;
/** No object of a request has more keys. */
const mostKeys = 100;
/** No list of a request is longer; each has its own limit, which the schema states. */
const mostItems = 1_000_000;
/** Numbers of unusable magnitude beyond this many are passed over. */
const mostFaults = 1_000;

/** A copy of a document and what is wrong with it. */
export interface DocumentCopy {
  /** Incomplete where `fatal`. */
  readonly copy: unknown;
  readonly faults: FaultRecord[];
  /** The structure is so large that naming more faults would cost more than the request is worth. */
  readonly fatal: boolean;
}

/**
 * A copy of a parsed JSON document that may be changed, and what no request may contain: numbers
 * beyond usable magnitudes, malformed texts, reserved keys, values that JSON does not have, structures
 * without limit.
 * −0 becomes 0.
 *
 * @param document anything; it is not changed
 * Cost: O(size of the document).
 */
export function copyDocument(document: unknown): DocumentCopy {
  const state: State = { faults: [], fatal: false, path: [] };
  const copy = copyValue(document, state);
  return { copy, faults: state.faults, fatal: state.fatal };
}

interface State {
  readonly faults: FaultRecord[];
  fatal: boolean;
  /** Keys and indices that lead to the value being copied. */
  readonly path: (string | number)[];
}

function copyValue(value: unknown, state: State): unknown {
  if (typeof value === 'number') return copyNumber(value, state);
  if (value === null || typeof value === 'boolean') return value;
  if (typeof value === 'string') return copyText(value, state);
  if (typeof value !== 'object') {
    const wrong = { wanted: 'a JSON value', found: typeof value, hint: '' };
    state.faults.push(recordHere('wrong-type', state, wrong));
    return null;
  }
  if (state.path.length === deepest) return stop(state, 'nested-too-deep', { limit: deepest });
  if (!Array.isArray(value)) return copyObject(value, state);
  if (value.length <= mostItems) return copyList(value, state);
  return stop(state, 'too-many-items', { count: value.length, limit: mostItems, about: '' });
}

/** A lone surrogate has no UTF-8 and no canonical form (RFC 8785, section 3.2.2.2). */
function copyText(text: string, state: State): string {
  if (/\p{Surrogate}/u.test(text)) {
    state.faults.push(recordHere('malformed-text', state, { text: shortText(text) }));
  }
  return text;
}

function recordHere(code: FaultCode, { path }: State, values: FaultValues): FaultRecord {
  const pointer = path.reduce<string>((parent, step) => child(parent, String(step)), '');
  return faultRecord(code, pointer, { key: placeName(pointer), ...values });
}

function stop(state: State, code: FaultCode, values: FaultValues): null {
  state.faults.push(recordHere(code, state, values));
  state.fatal = true;
  return null;
}

function copyNumber(value: number, state: State): number {
  if (isUsableMagnitude(value)) return value === 0 ? 0 : value;
  if (state.faults.length < mostFaults) {
    state.faults.push(recordHere('number-magnitude', state, { text: String(value) }));
  }
  return value;
}

function copyList(list: readonly unknown[], state: State): unknown[] {
  const copy: unknown[] = [];
  const { path } = state;
  for (let index = 0; index < list.length; index++) {
    const item = list[index];
    if (typeof item === 'number' && isUsableMagnitude(item)) {
      copy.push(item === 0 ? 0 : item);
      continue;
    }
    path.push(index);
    copy.push(copyValue(item, state));
    path.pop();
    if (state.fatal) break;
  }
  return copy;
}

function copyObject(object: object, state: State): object | null {
  const keys = Object.keys(object);
  if (keys.length > mostKeys) return stop(state, 'too-many-keys', { count: keys.length, limit: mostKeys });
  const copy: Record<string, unknown> = {};
  const { path } = state;
  for (const key of keys) {
    path.push(key);
    if (key === '__proto__') state.faults.push(recordHere('reserved-key', state, { key: shortText(key) }));
    else copy[key] = copyValue((object as Record<string, unknown>)[key], state);
    path.pop();
    if (state.fatal) break;
  }
  return copy;
}

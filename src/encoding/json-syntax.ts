import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import { numberEnd, stringEnd, syntaxFault } from './json-tokens.ts';

/** Deepest nesting of arrays and objects that a request may have. */
export const nestingLimit = 64;

const words = ['true', 'false', 'null'];

/** Most faults that one text is reported with. */
const faultLimit = 50;

/** An array or object that is being read. */
interface Container {
  /** Keys seen so far; null in an array. */
  readonly keys: KeySet | null;
  /** Key or index of the value being read. */
  step: string | number;
}

/** Keys of one object: a list while they are few, for most objects are small. */
class KeySet {
  private readonly few: string[] = [];
  private many: Set<string> | null = null;

  /** Adds a key; false where it was there already. */
  add(key: string): boolean {
    if (this.many === null) {
      if (this.few.includes(key)) return false;
      if (this.few.push(key) > 16) this.many = new Set(this.few);
      return true;
    }
    if (this.many.has(key)) return false;
    this.many.add(key);
    return true;
  }
}

/**
 * Reads a JSON text by the grammar of RFC 8259 and reports what JSON.parse lets pass or hides:
 * the line and column of an error, keys that stand twice, the key `__proto__`, numbers beyond
 * double precision, nesting beyond 64 levels.
 *
 * @param firstLine number of the first line of the text
 * @returns records with RFC 6901 pointers, at most 50; empty when JSON.parse reads the text faithfully
 * Cost: one pass over the characters, O(length).
 */
export function findJsonFaults(text: string, firstLine = 1): FaultRecord[] {
  const faults: FaultRecord[] = [];
  const open: Container[] = [];
  let at = skipBlank(text, 0);

  for (;;) {
    // A value starts here, or an array or object closes.
    const first = text.charCodeAt(at);
    if (first === 0x7b || first === 0x5b) {
      if (open.length === nestingLimit)
        return [faultRecord('nested-too-deep', pointer(), { limit: nestingLimit })];
      const isObject = first === 0x7b;
      open.push({ keys: isObject ? new KeySet() : null, step: isObject ? '' : 0 });
      at = skipBlank(text, at + 1);
      if (text.charCodeAt(at) !== (isObject ? 0x7d : 0x5d)) {
        if (isObject) {
          const problem = readKey();
          if (problem !== null) return problem;
        }
        continue;
      }
      open.pop();
      at++;
    } else {
      const end = scalarEnd(first);
      if (end < 0)
        return [
          syntaxFault(
            text,
            ~end,
            ~end === at ? 'a value' : first === 0x22 ? 'the rest of a string' : 'a digit',
            firstLine,
          ),
        ];
      at = end;
    }
    // A value has ended: go on in its container, close it, or finish.
    for (;;) {
      at = skipBlank(text, at);
      const container = open.at(-1);
      if (container === undefined) {
        return at === text.length ? faults : [syntaxFault(text, at, 'the end of the text', firstLine)];
      }
      const next = text.charCodeAt(at);
      if (next === 0x2c) {
        at = skipBlank(text, at + 1);
        if (container.keys === null) {
          container.step = (container.step as number) + 1;
        } else {
          const problem = readKey();
          if (problem !== null) return problem;
        }
        break;
      }
      const isArray = container.keys === null;
      if (next !== (isArray ? 0x5d : 0x7d))
        return [syntaxFault(text, at, isArray ? '"," or "]"' : '"," or "}"', firstLine)];
      open.pop();
      at++;
    }
  }

  /** Reads `"key" :` and stops before the value. */
  function readKey(): FaultRecord[] | null {
    if (text.charCodeAt(at) !== 0x22) return [syntaxFault(text, at, 'a key in double quotes', firstLine)];
    const end = stringEnd(text, at);
    if (end < 0) return [syntaxFault(text, ~end, 'the rest of a key', firstLine)];
    const raw = text.slice(at + 1, end - 1);
    const key = raw.includes('\\') ? (JSON.parse(text.slice(at, end)) as string) : raw;
    const container = open[open.length - 1];
    container.step = key;
    if (!container.keys?.add(key)) report('duplicate-key', { key: JSON.stringify(key) });
    if (key === '__proto__') report('reserved-key', { key: JSON.stringify(key) });
    at = skipBlank(text, end);
    if (text.charCodeAt(at) !== 0x3a) return [syntaxFault(text, at, '":"', firstLine)];
    at = skipBlank(text, at + 1);
    return null;
  }

  /** End of the string, number or word that starts here, or ~position of the error. */
  function scalarEnd(first: number): number {
    if (first === 0x22) return stringEnd(text, at);
    if (first > 0x39) {
      const word = words.find((candidate) => text.startsWith(candidate, at));
      return word === undefined ? ~at : at + word.length;
    }
    const end = numberEnd(text, at);
    // Only an exponent or more than 308 digits can leave the range of double precision.
    if (
      end > 0 &&
      (end - at > 308 || mayOverflow(at, end)) &&
      !Number.isFinite(Number(text.slice(at, end)))
    ) {
      const token = text.slice(at, end);
      report('number-out-of-range', { text: token.length > 40 ? `${token.slice(0, 37)}...` : token });
    }
    return end;
  }

  function mayOverflow(start: number, end: number): boolean {
    for (let i = start; i < end; i++) {
      if ((text.charCodeAt(i) | 0x20) === 0x65) return true;
    }
    return false;
  }

  function report(
    code: 'duplicate-key' | 'reserved-key' | 'number-out-of-range',
    values: Record<string, string>,
  ): void {
    if (faults.length < faultLimit) faults.push(faultRecord(code, pointer(), values));
  }

  function pointer(): string {
    return open.map(({ step }) => `/${String(step).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');
  }
}

/** First position at or after `at` that is no JSON whitespace. */
function skipBlank(text: string, at: number): number {
  for (;;) {
    const code = text.charCodeAt(at);
    if (code !== 0x20 && code !== 0x0a && code !== 0x0d && code !== 0x09) return at;
    at++;
  }
}

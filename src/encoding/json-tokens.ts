import { faultRecord, type FaultRecord } from '../faults/fault.ts';

const isDigit = (code: number): boolean => code >= 0x30 && code <= 0x39;

/**
 * End of the JSON string that starts with a quote at `start` (RFC 8259, section 7).
 *
 * @returns position after the closing quote, or ~position of the first wrong character
 */
export function stringEnd(text: string, start: number): number {
  let at = start + 1;
  for (;;) {
    const code = text.charCodeAt(at);
    if (code === 0x22) return at + 1;
    if (code === 0x5c) {
      const escaped = text[at + 1];
      if (escaped === 'u') {
        if (!/^[0-9a-fA-F]{4}$/.test(text.slice(at + 2, at + 6))) return ~at;
        at += 6;
      } else {
        if (escaped === undefined || !'"\\/bfnrt'.includes(escaped)) return ~at;
        at += 2;
      }
    } else if (code >= 0x20) {
      at++;
    } else {
      // A control character, or NaN past the end of the text.
      return ~Math.min(at, text.length);
    }
  }
}

/**
 * End of the JSON number that starts at `start` (RFC 8259, section 6).
 *
 * @returns position after its last character, or ~position of the first wrong character
 */
export function numberEnd(text: string, start: number): number {
  let at = start;
  if (text.charCodeAt(at) === 0x2d) at++;
  const first = text.charCodeAt(at);
  if (!isDigit(first)) return ~at;
  at = first === 0x30 ? at + 1 : digitsEnd(text, at);
  if (text.charCodeAt(at) === 0x2e) {
    const fraction = at + 1;
    at = digitsEnd(text, fraction);
    if (at === fraction) return ~at;
  }
  if ((text.charCodeAt(at) | 0x20) === 0x65) {
    at++;
    const sign = text.charCodeAt(at);
    if (sign === 0x2b || sign === 0x2d) at++;
    const exponent = at;
    at = digitsEnd(text, exponent);
    if (at === exponent) return ~at;
  }
  return at;
}

function digitsEnd(text: string, at: number): number {
  while (isDigit(text.charCodeAt(at))) at++;
  return at;
}

/** A syntax error at a position: line and column from 1, what stands there, what should. */
export function syntaxFault(text: string, at: number, expected: string, firstLine: number): FaultRecord {
  const before = text.slice(0, at);
  const line = firstLine + before.split('\n').length - 1;
  const column = at - before.lastIndexOf('\n');
  const code = text.codePointAt(at);
  const found =
    code === undefined
      ? 'the end of the text'
      : code < 0x20
        ? `the control character U+${code.toString(16).toUpperCase().padStart(4, '0')}`
        : `"${String.fromCodePoint(code)}"`;
  return faultRecord('malformed-json', '', { line, column, reason: `found ${found}, expected ${expected}` });
}

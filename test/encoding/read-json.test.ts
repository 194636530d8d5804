import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readJson } from '../../src/encoding/read-json.ts';
import { Fault, type FaultRecord } from '../../src/faults/fault.ts';

function faultsOf(body: string | Uint8Array): readonly FaultRecord[] {
  try {
    readJson(typeof body === 'string' ? new TextEncoder().encode(body) : body);
  } catch (error) {
    if (error instanceof Fault) return error.records;
    throw error;
  }
  return [];
}

const accepted = (body: string): boolean => faultsOf(body).length === 0;

function parses(body: string): boolean {
  try {
    JSON.parse(body);
    return true;
  } catch {
    return false;
  }
}

/** Cuts, repeats or replaces one character of a text. */
const damage = fc.record({
  at: fc.nat(),
  kind: fc.constantFrom('cut', 'repeat', 'replace'),
  by: fc.constantFrom(...'{}[]",:0-+.eE\\u \n\ttfn\u0001x'.split('')),
});

describe('reading a JSON body', () => {
  it('gives the value that JSON.parse gives', () => {
    fc.assert(
      fc.property(fc.jsonValue(), fc.constantFrom(undefined, 2, '\t'), (value, indent) => {
        const body = JSON.stringify(value, null, indent);
        fc.pre(!body.includes('__proto__'));
        expect(readJson(new TextEncoder().encode(body))).toEqual(JSON.parse(body));
      }),
      { numRuns: 500 },
    );
  });

  it('accepts exactly what JSON.parse accepts, damaged texts included (RFC 8259)', () => {
    let refused = 0;
    fc.assert(
      fc.property(fc.jsonValue(), fc.array(damage, { minLength: 1, maxLength: 2 }), (value, damages) => {
        let body = JSON.stringify({ k: value, list: [1.5e3, true, null, '\u00e9\n'] }, null, 1);
        for (const { at, kind, by } of damages) {
          const place = at % body.length;
          const keep = kind === 'cut' ? '' : kind === 'repeat' ? body[place] + body[place] : by;
          body = body.slice(0, place) + keep + body.slice(place + 1);
        }
        const faults = faultsOf(body);
        // Doubled keys and huge numbers are refused on purpose, and only where JSON.parse reads the text.
        const onPurpose = faults.length > 0 && faults.every((record) => record.code !== 'malformed-json');
        if (faults.length > 0) refused++;
        expect(onPurpose || accepted(body)).toBe(parses(body));
      }),
      { numRuns: 3000 },
    );
    expect(refused).toBeGreaterThan(500);
  });

  it.each([
    ['{"a":1,}', 1, 8, '"}"', 'a key in double quotes'],
    ['{"a" 1}', 1, 6, '"1"', '":"'],
    ['[1 2]', 1, 4, '"2"', '"," or "]"'],
    ['{"a":1]', 1, 7, '"]"', '"," or "}"'],
    ['{\n  "a": tru\n}', 2, 8, '"t"', 'a value'],
    ['{"a":"b', 1, 8, 'the end of the text', 'the rest of a string'],
    ['["a\tb"]', 1, 4, 'the control character U+0009', 'the rest of a string'],
    ['["\\x"]', 1, 3, '"\\"', 'the rest of a string'],
    ['[01]', 1, 3, '"1"', '"," or "]"'],
    ['[-]', 1, 3, '"]"', 'a digit'],
    ['{} {}', 1, 4, '"{"', 'the end of the text'],
    ['[NaN]', 1, 2, '"N"', 'a value'],
    ["{'a':1}", 1, 2, `"'"`, 'a key in double quotes'],
    ['   ', 1, 4, 'the end of the text', 'a value'],
    ['{"a":1 // note', 1, 8, '"/"', '"," or "}"'],
  ])('says where %j stops being JSON', (body, line, column, found, expected) => {
    expect(faultsOf(body)).toEqual([
      {
        code: 'malformed-json',
        pointer: '',
        detail: `Line ${line}, column ${column}: found ${found}, expected ${expected}. Correct the JSON there (RFC 8259).`,
      },
    ]);
  });

  it('reports every doubled key, reserved key and huge number with its pointer', () => {
    const body = '{"a":[{"b":1,"b":2}],"a/b~":{"x":1e400,"__proto__":{}},"\\u0061":-1e999}';
    expect(faultsOf(body).map(({ code, pointer }) => [code, pointer])).toEqual([
      ['duplicate-key', '/a/0/b'],
      ['number-out-of-range', '/a~1b~0/x'],
      ['reserved-key', '/a~1b~0/__proto__'],
      ['duplicate-key', '/a'],
      ['number-out-of-range', '/a'],
    ]);
  });

  it('finds a doubled key among many', () => {
    const keys = Array.from({ length: 40 }, (_, i) => `"k${i}":${i}`);
    expect(faultsOf(`{${keys.join(',')},"k3":0}`).map((record) => record.pointer)).toEqual(['/k3']);
    expect(accepted(`{${keys.join(',')}}`)).toBe(true);
  });

  it('refuses nesting beyond 64 levels before it costs memory', () => {
    expect(accepted('['.repeat(64) + ']'.repeat(64))).toBe(true);
    expect(faultsOf('['.repeat(4_000_000))[0].code).toBe('nested-too-deep');
    expect(faultsOf('{"a":'.repeat(65))[0].code).toBe('nested-too-deep');
  });

  it('caps the list of faults', () => {
    expect(faultsOf(`[${Array.from({ length: 500 }, () => '1e999').join(',')}]`)).toHaveLength(50);
  });

  it.each([
    ['an empty body', new Uint8Array(0), 'empty-body', ''],
    ['a byte order mark', Uint8Array.of(0xef, 0xbb, 0xbf, 0x7b, 0x7d), 'malformed-json', 'byte order mark'],
    ['Latin-1', Uint8Array.of(0x7b, 0x22, 0xe9, 0x22, 0x7d), 'not-utf8', 'offset 2'],
    ['a surrogate in UTF-8', Uint8Array.of(0x22, 0xed, 0xa0, 0x80, 0x22), 'not-utf8', 'offset 1'],
    ['a character cut off at the end', Uint8Array.of(0x22, 0x61, 0xe2, 0x82), 'not-utf8', 'offset 2'],
    ['UTF-16', Uint8Array.of(0xff, 0xfe, 0x7b, 0, 0x7d, 0), 'not-utf8', 'offset 0'],
  ])('refuses %s', (_title, body, code, wording) => {
    const [record] = faultsOf(body);
    expect(record.code).toBe(code);
    expect(record.detail).toContain(wording);
  });
});

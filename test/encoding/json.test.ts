import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { encodeJson } from '../../src/encoding/json.ts';
import { Fault } from '../../src/faults/fault.ts';

const text = (answer: unknown): string => new TextDecoder().decode(encodeJson(answer));

function overflowOf(answer: unknown): string {
  try {
    encodeJson(answer);
  } catch (error) {
    if (error instanceof Fault) {
      expect(error.records).toHaveLength(1);
      expect(error.records[0].code).toBe('result-overflow');
      return error.records[0].detail;
    }
    throw error;
  }
  return 'no fault';
}

const finite = fc.double({ noNaN: true, noDefaultInfinity: true });

describe('the JSON text of an answer', () => {
  it('is that of JSON.stringify for plain values (ECMA-262, JSON.stringify)', () => {
    const plain = fc.letrec((tie) => ({
      value: fc.oneof(
        { depthSize: 'small' },
        finite,
        fc.string({ unit: 'binary' }),
        fc.boolean(),
        fc.constant(null),
        fc.array(tie('value')),
        fc.dictionary(fc.string({ unit: 'binary' }), tie('value'), { noNullPrototype: true }),
      ),
    })).value;
    fc.assert(
      fc.property(plain, (value) => {
        expect(text(value)).toBe(JSON.stringify(value));
      }),
      { numRuns: 500 },
    );
  });

  it('reads back to the same doubles, bit for bit, from typed matrices at any depth', () => {
    const row = fc.array(finite, { maxLength: 40 });
    fc.assert(
      fc.property(fc.array(row, { maxLength: 8 }), (rows) => {
        const answer = {
          fields: { displacement: { values: rows.map((r) => Float64Array.from(r)), bound: null } },
        };
        const back = JSON.parse(text(answer)) as { fields: { displacement: { values: number[][] } } };
        // JSON has no −0: + 0 turns it into 0 and leaves every other double as it is.
        expect(back.fields.displacement.values).toEqual(rows.map((r) => r.map((x) => x + 0)));
      }),
      { numRuns: 300 },
    );
  });

  it.each([
    [-0, '0'],
    [1e21, '1e+21'],
    [5e-324, '5e-324'],
    [0.1 + 0.2, '0.30000000000000004'],
    [1.7976931348623157e308, '1.7976931348623157e+308'],
    [123456789012345680000, '123456789012345680000'],
  ])('writes %d as %s', (value, written) => {
    expect(text(value)).toBe(written);
    expect(text(Float64Array.of(value))).toBe(`[${written}]`);
  });

  it('writes integers of an Int32Array and leaves undefined keys out', () => {
    expect(text({ a: undefined, b: Int32Array.of(3, -1), c: undefined })).toBe('{"b":[3,-1]}');
  });

  it('does not change the answer it encodes', () => {
    const values = Float64Array.of(1, 2);
    const answer = { mode: { values }, rows: [values] };
    encodeJson(answer);
    expect(answer.mode.values).toBe(values);
    expect(answer.rows[0]).toBe(values);
  });

  it('stands in a buffer of its own, so that a transfer takes nothing else along', () => {
    const bytes = encodeJson({ a: 1 });
    expect(bytes.buffer.byteLength).toBe(bytes.byteLength);
  });

  it.each([
    [{ modes: [{ order: 1 }, { frequency: NaN }] }, 'modes[1].frequency'],
    [
      { fields: { force: { values: [Float64Array.of(1), Float64Array.of(1, Infinity)] } } },
      'fields.force.values[1][1]',
    ],
    [{ peaks: { force: { upper: -Infinity } } }, 'peaks.force.upper'],
    [[1, NaN], '[1]'],
    [Infinity, 'the answer'],
  ])('is refused with the place of a number that is not finite: %#', (answer, path) => {
    expect(overflowOf(answer)).toMatch(`${path} overflows`);
  });
});

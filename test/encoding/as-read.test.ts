import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { asRead } from '../../src/encoding/as-read.ts';
import { encodeJson } from '../../src/encoding/json.ts';

const number = fc.double({ noNaN: true, noDefaultInfinity: true });
const answer = fc.letrec((tie) => ({
  value: fc.oneof(
    { maxDepth: 4 },
    number,
    fc.constant(-0),
    fc.string(),
    fc.boolean(),
    fc.constant(null),
    fc.float64Array({ noNaN: true, noDefaultInfinity: true }),
    fc.int32Array(),
    fc.array(tie('value')),
    fc.dictionary(fc.stringMatching(/^[a-z]{1,6}$/), fc.oneof(tie('value'), fc.constant(undefined))),
  ),
})).value;

describe('an answer as its reader has it', () => {
  it('is what reading its JSON gives, to the last bit', () => {
    fc.assert(
      fc.property(answer, (value) => {
        expect(asRead(value)).toStrictEqual(JSON.parse(new TextDecoder().decode(encodeJson(value))));
      }),
      { numRuns: 300 },
    );
  });

  it('has no minus zero', () => {
    expect(asRead({ a: [-0], b: Float64Array.of(-0), c: -0 })).toStrictEqual({ a: [0], b: [0], c: 0 });
  });

  it('names the number that is not finite as the JSON does', () => {
    for (const wrong of [
      { a: [{ b: Number.NaN }] },
      { a: { b: Float64Array.of(1, Infinity) } },
      Number.NaN,
    ]) {
      const detail = (encode: (value: unknown) => unknown): string => {
        try {
          encode(wrong);
        } catch (error) {
          return (error as Error).message;
        }
        return '';
      };
      expect(detail(asRead)).toMatch(/overflows/);
      expect(detail(asRead)).toBe(detail(encodeJson));
    }
  });
});

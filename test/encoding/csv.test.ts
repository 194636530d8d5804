import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { encodeCsv, textCell } from '../../src/encoding/csv.ts';
import { column, type Table } from '../../src/encoding/table.ts';

const textOf = (table: Table): string => new TextDecoder().decode(encodeCsv(table));

describe('a table as CSV', () => {
  it('has a header with units, CRLF after every line, empty cells for what is not there', () => {
    const table = {
      rows: 4,
      columns: [
        { ...column('time', 's', [0, 0.5]), each: 2 },
        column('position', 'm', [1, 2]),
        column('period', 's', [1e21, null, -1e-7, 5e-324]),
        column('order', null, [1, 2, 3, 4], 'integer'),
      ],
    };
    expect(textOf(table)).toBe(
      [
        'time [s],position [m],period [s],order',
        '0,1,1e+21,1',
        '0,2,,2',
        '0.5,1,-1e-7,3',
        '0.5,2,5e-324,4',
        '',
      ].join('\r\n'),
    );
  });

  it('guards texts that a spreadsheet would run, and quotes what RFC 4180 asks for', () => {
    expect(
      ['=1+1', '+1', '-1', '@x', '\tx', '\rx'].map((text) => textCell(text).replaceAll('"', '')[0]),
    ).toEqual(Array<string>(6).fill("'"));
    expect(textCell('a"b,c')).toBe('"a""b,c"');
    expect(textCell('(m/s2)/(m/s2)')).toBe('(m/s2)/(m/s2)');
  });

  it('gives every number and text back to a general reader', () => {
    const rows = fc.array(
      fc.tuple(fc.double({ noNaN: true, noDefaultInfinity: true }), fc.string(), fc.option(fc.integer())),
      { minLength: 1, maxLength: 50 },
    );
    fc.assert(
      fc.property(rows, (list) => {
        const bytes = encodeCsv({
          rows: list.length,
          columns: [
            column(
              'a',
              'm',
              list.map(([a]) => a + 0),
            ),
            column(
              'b, "c"',
              null,
              list.map(([, b]) => b),
              'text',
            ),
            column(
              'd',
              null,
              list.map(([, , d]) => d),
              'integer',
            ),
          ],
        });
        const [header, ...read] = parse(Buffer.from(bytes), { record_delimiter: '\r\n' });
        expect(header).toEqual(['a [m]', 'b, "c"', 'd']);
        expect(read.map(([a]) => Number(a))).toEqual(list.map(([a]) => a + 0));
        expect(read.map(([, b]) => b)).toEqual(list.map(([, b]) => (/^[=+\-@\t\r]/.test(b) ? `'${b}` : b)));
        expect(read.map(([, , d]) => (d === '' ? null : Number(d)))).toEqual(list.map(([, , d]) => d));
      }),
      { numRuns: 200 },
    );
  });

  it('writes tables longer than what is put together at once', () => {
    const rows = 10_001;
    const values = Float64Array.from({ length: rows }, (_, i) => Math.sin(i));
    const read = parse(Buffer.from(encodeCsv({ rows, columns: [column('x', null, values)] })));
    expect(read.slice(1).map(([x]) => Number(x))).toEqual([...values]);
  });
});

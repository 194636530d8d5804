import { tableFromIPC, Type } from '@uwdata/flechette';
import { describe, expect, it } from 'vitest';
import { encodeArrow } from '../../src/encoding/arrow.ts';
import { column } from '../../src/encoding/table.ts';

const rows = 130;
const numbers = Float64Array.from({ length: rows }, (_, i) => Math.sin(i) * 10 ** ((i % 40) - 20));
const gaps = Array.from({ length: rows }, (_, i) => (i % 3 === 0 ? null : i / 7));
const table = {
  rows,
  columns: [
    { ...column('time', 's', [0, 0.1, 0.2, 0.3, 0.4]), each: 26 },
    column('force', 'N', numbers),
    column('period', 's', gaps),
    column(
      'order',
      null,
      Array.from({ length: rows }, (_, i) => i + 1),
      'integer',
    ),
    { ...column('unit', null, ['√kg', '', '(m/s2)/(m/s2)'], 'text'), each: 2 },
  ],
};

describe('a table as an Arrow stream', () => {
  const read = tableFromIPC(encodeArrow(table, { operation: 'modes', table: 'modes' }));

  it('opens in a reader of another maker with names, types, units and facts about the table', () => {
    expect(read.numRows).toBe(rows);
    const fields = read.schema.fields.map(({ name, type, nullable, metadata }) => [
      name,
      type.typeId,
      nullable,
      Object.fromEntries(metadata ?? []),
    ]);
    expect(fields).toEqual([
      ['time', Type.Float, false, { unit: 's' }],
      ['force', Type.Float, false, { unit: 'N' }],
      ['period', Type.Float, true, { unit: 's' }],
      ['order', Type.Int, false, {}],
      ['unit', Type.Utf8, false, {}],
    ]);
    expect(read.schema.fields[1].type).toMatchObject({ precision: 2 });
    expect(read.schema.fields[3].type).toMatchObject({ bitWidth: 32, signed: true });
    expect(Object.fromEntries(read.schema.metadata ?? [])).toEqual({ operation: 'modes', table: 'modes' });
  });

  it('holds the same bits', () => {
    const values = (name: string): unknown[] =>
      Array.from({ length: rows }, (_, i) => read.getChild(name).at(i));
    expect(values('force')).toStrictEqual([...numbers]);
    expect(values('period')).toStrictEqual(gaps);
    expect(values('order')).toStrictEqual(Array.from({ length: rows }, (_, i) => i + 1));
    expect(values('time')).toStrictEqual(Array.from({ length: rows }, (_, i) => Math.floor(i / 26) / 10));
    expect(values('unit')).toStrictEqual(
      Array.from({ length: rows }, (_, i) => ['√kg', '', '(m/s2)/(m/s2)'][Math.floor(i / 2) % 3]),
    );
  });

  it('may be empty', () => {
    const empty = { rows: 0, columns: [column('x', 'm', []), column('t', null, [], 'text')] };
    const read = tableFromIPC(encodeArrow(empty));
    expect([read.numRows, read.schema.fields.map(({ name }) => name)]).toEqual([0, ['x', 't']]);
  });
});

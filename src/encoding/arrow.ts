import { createRequire } from 'node:module';
import type { Data, DataType, Field } from 'apache-arrow';
import { placeOf, type Column, type Table } from './table.ts';

type Arrow = typeof import('apache-arrow');

let loaded: Arrow | null = null;

/** Loaded with the first table: it takes longer than most answers, and most services never need it. */
function arrow(): Arrow {
  loaded ??= createRequire(import.meta.url)('apache-arrow') as Arrow;
  return loaded;
}

/**
 * A table as an Apache Arrow IPC stream (columnar format 1.x, streaming form) of one batch: float64,
 * int32 and utf8 columns, the unit of a column under the key `unit` of its field's metadata.
 *
 * @param metadata further facts, kept in the metadata of the schema
 * @returns bytes in a buffer of their own
 * Cost: O(cells).
 */
export function encodeArrow(
  table: Table,
  metadata: Readonly<Record<string, string>> = {},
): Uint8Array<ArrayBuffer> {
  const { makeData, RecordBatch, Schema, Struct, tableToIPC, Table: ArrowTable } = arrow();
  const fields = table.columns.map(fieldOf);
  const schema = new Schema(fields, new Map(Object.entries(metadata)));
  const children = table.columns.map((column, i) => dataOf(column, fields[i].type, table.rows));
  const data = makeData({ type: new Struct(fields), length: table.rows, nullCount: 0, children });
  const stream = tableToIPC(new ArrowTable(schema, [new RecordBatch(schema, data)]), 'stream');
  return new Uint8Array(stream);
}

function fieldOf({ name, unit, type, values }: Column): Field {
  const { Field, Float64, Int32, Utf8 } = arrow();
  const types = { number: Float64, integer: Int32, text: Utf8 };
  const units = new Map(unit === null ? [] : [['unit', unit]]);
  return new Field<DataType>(name, new types[type](), hasGaps(values), units);
}

function hasGaps(values: Column['values']): boolean {
  return Array.isArray(values) && values.includes(null);
}

function dataOf(column: Column, type: DataType, rows: number): Data {
  const { makeData, Utf8, vectorFromArray } = arrow();
  if (column.type === 'text') {
    const texts = Array.from({ length: rows }, (_, row) => column.values[placeOf(column, row)]);
    return vectorFromArray(texts as string[], new Utf8()).data[0] ?? makeData({ type });
  }
  const values = column.type === 'integer' ? new Int32Array(rows) : new Float64Array(rows);
  const valid = new Uint8Array(Math.ceil(rows / 64) * 8);
  let nullCount = 0;
  for (let row = 0; row < rows; row++) {
    const value = column.values[placeOf(column, row)] as number | null;
    if (value === null) {
      nullCount++;
      continue;
    }
    values[row] = value;
    valid[row >> 3] |= 1 << (row & 7);
  }
  const nulls = nullCount === 0 ? {} : { nullBitmap: valid, nullCount };
  return makeData({ type, length: rows, data: values, ...nulls } as never);
}

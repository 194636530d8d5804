import { createRequire } from 'node:module';
import type * as ArrowModule from 'apache-arrow';
import type { Data, DataType, Field } from 'apache-arrow';
import { placeOf, type Column, type Table } from './table.ts';

type Arrow = typeof ArrowModule;

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
  return column.type === 'text' ? textData(column, type, rows) : numberData(column, type, rows);
}

function numberData(column: Column, type: DataType, rows: number): Data {
  const { makeData } = arrow();
  const data = column.type === 'integer' ? new Int32Array(rows) : new Float64Array(rows);
  // A bit per row, in whole words of 64 bits.
  const nullBitmap = new Uint8Array(Math.ceil(rows / 64) * 8);
  let nullCount = 0;
  for (let row = 0; row < rows; row++) {
    const value = column.values[placeOf(column, row)] as number | null;
    if (value === null) {
      nullCount++;
      continue;
    }
    data[row] = value;
    nullBitmap[row >> 3] |= 1 << (row & 7);
  }
  const gaps = nullCount === 0 ? {} : { nullBitmap, nullCount };
  return makeData({ type, length: rows, data, ...gaps } as never);
}

function textData(column: Column, type: DataType, rows: number): Data {
  const texts = Array.from(column.values as ArrayLike<string>, (text) => new TextEncoder().encode(text));
  const valueOffsets = new Int32Array(rows + 1);
  for (let row = 0; row < rows; row++) {
    valueOffsets[row + 1] = valueOffsets[row] + texts[placeOf(column, row)].byteLength;
  }
  const data = new Uint8Array(valueOffsets[rows]);
  for (let row = 0; row < rows; row++) data.set(texts[placeOf(column, row)], valueOffsets[row]);
  return arrow().makeData({ type, length: rows, valueOffsets, data, nullCount: 0 } as never);
}

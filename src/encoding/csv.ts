import { placeOf, type Column, type Table } from './table.ts';

/** Rows that are put together before they become bytes. */
const rowsAtOnce = 4096;

const encoder = new TextEncoder();

/**
 * A table as CSV (RFC 4180) in UTF-8: a header with units, such as `displacement [m]`, lines that end
 * in CRLF, numbers as in the JSON (the shortest text that reads back to the same double), an empty cell
 * where there is no value.
 *
 * @returns bytes in a buffer of their own
 * Cost: O(cells); a grid is made text once, not once a row.
 */
export function encodeCsv(table: Table): Uint8Array<ArrayBuffer> {
  const { rows, columns } = table;
  const cells = columns.map((column) => cellsOf(column, rows));
  const pieces = [encoder.encode(`${columns.map((column) => textCell(headerOf(column))).join(',')}\r\n`)];
  for (let start = 0; start < rows; start += rowsAtOnce) {
    let text = '';
    const end = Math.min(rows, start + rowsAtOnce);
    for (let row = start; row < end; row++) {
      for (let i = 0; i < cells.length; i++) {
        text += i === 0 ? '' : ',';
        text += cells[i](row);
      }
      text += '\r\n';
    }
    pieces.push(encoder.encode(text));
  }
  return joined(pieces);
}

/** Gives the cell of a row. What stands in several rows is made text once, the rest as it comes. */
function cellsOf(column: Column, rows: number): (row: number) => string {
  const { values, each } = column;
  if (each === 1 && values.length === rows) return (row) => cellOf(values[row]);
  const texts = Array.from(values as ArrayLike<Cell>, cellOf);
  return (row) => texts[placeOf(column, row)];
}

function headerOf({ name, unit }: Column): string {
  return unit === null ? name : `${name} [${unit}]`;
}

type Cell = string | number | null;

function cellOf(value: Cell): string {
  if (value === null) return '';
  return typeof value === 'string' ? textCell(value) : String(value);
}

/**
 * A text as a cell: quoted where RFC 4180, section 2, asks for it; with an apostrophe in front where a
 * spreadsheet would take it for a formula.
 */
export function textCell(text: string): string {
  const guarded = /^[=+\-@\t\r]/.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(guarded) ? `"${guarded.replaceAll('"', '""')}"` : guarded;
}

function joined(pieces: readonly Uint8Array[]): Uint8Array<ArrayBuffer> {
  const bytes = new Uint8Array(pieces.reduce((sum, { byteLength }) => sum + byteLength, 0));
  let end = 0;
  for (const piece of pieces) {
    bytes.set(piece, end);
    end += piece.byteLength;
  }
  return bytes;
}

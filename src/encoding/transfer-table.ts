import type { Numbers, TransferFunction, TransferFunctionsAnswer } from '../spec/types.ts';
import { column, type Column, type Table } from './table.ts';

/**
 * One row per output and frequency, in this order. The unit stands in every row, and in the names of
 * the columns too where all outputs have the same.
 */
export function transferTable({ frequencies, outputs }: TransferFunctionsAnswer): Table {
  const count = frequencies.length;
  const units = new Set(outputs.map(({ unit }) => unit));
  const unit = units.size === 1 ? outputs[0].unit : null;
  const perOutput = (
    values: Column['values'],
    name: string,
    type: Column['type'],
    unit: string | null,
  ): Column => ({
    ...column(name, unit, values, type),
    each: count,
  });
  const columns = [
    perOutput(
      outputs.map((_, i) => i + 1),
      'output',
      'integer',
      null,
    ),
    perOutput(
      outputs.map(({ at }) => at),
      'at',
      'number',
      'm',
    ),
    perOutput(
      outputs.map(({ quantity }) => quantity),
      'quantity',
      'text',
      null,
    ),
    perOutput(
      outputs.map((output) => output.unit),
      'unit',
      'text',
      null,
    ),
    column('frequency', 'Hz', frequencies),
  ];
  const add = (
    name: string,
    unit: string | null,
    pick: (output: TransferFunction) => Numbers | undefined,
  ): void => {
    if (outputs.some((output) => pick(output) === undefined)) return;
    const values = new Float64Array(outputs.length * count);
    outputs.forEach((output, i) => values.set(pick(output)!, i * count));
    columns.push(column(name, unit, values));
  };
  add('real', unit, ({ real }) => real);
  add('imaginary', unit, ({ imaginary }) => imaginary);
  add('magnitude', unit, ({ magnitude }) => magnitude);
  add('phase', 'rad', ({ phase }) => phase);
  add('bound', unit, ({ bound }) => bound);
  add('truncatedReal', unit, ({ series }) => series?.truncated.real);
  add('truncatedImaginary', unit, ({ series }) => series?.truncated.imaginary);
  add('correctedReal', unit, ({ series }) => series?.corrected.real);
  add('correctedImaginary', unit, ({ series }) => series?.corrected.imaginary);
  if (outputs.every(({ series }) => series !== undefined)) {
    const bounds = outputs.flatMap(({ series }) => series?.bound ?? []);
    columns.push(column('correctedBound', unit, bounds));
  }
  return { rows: outputs.length * count, columns };
}

import { motionQuantities } from '../solutions/quantity-units.ts';
import type { Field, ResponsesAnswer } from '../spec/types.ts';
import { column, type Column, type Table } from './table.ts';

/** What the bound of a field holds for, as it stands in the name of its column. */
const boundNames: Readonly<Record<Field['boundKind'], string>> = {
  pointwise: 'Bound',
  'gauge-average': 'GaugeAverageBound',
  rms: 'RmsBound',
};

/**
 * One row per time and position, in this order: every sampled quantity and beside it the bound of its
 * error, where there is one. The bound of a root-mean-square error is the same in all rows.
 */
export function fieldTable({ fields }: ResponsesAnswer): Table {
  const { positions, times } = fields;
  const rows = positions.length * times.length;
  const columns: Column[] = [
    { ...column('time', 's', times), each: positions.length },
    column('position', 'm', positions),
  ];
  for (const quantity of motionQuantities) {
    const field = fields[quantity];
    if (field === undefined) continue;
    const { unit, values, bound, boundKind, rms } = field;
    const all = new Float64Array(rows);
    values.forEach((row, i) => all.set(row, i * positions.length));
    columns.push(column(quantity, unit, all));
    const limits = bound ?? (rms === undefined ? null : [rms]);
    if (limits !== null) columns.push(column(`${quantity}${boundNames[boundKind]}`, unit, limits));
  }
  return { rows, columns };
}

/** One row per mode used: the coefficients of the initial motion. */
export function coefficientTable(kind: string, { coefficients }: ResponsesAnswer): Table {
  const amplitude = kind === 'shaft' ? 'rad·√(kg·m²)' : 'm·√kg';
  const of = (key: 'angularFrequency' | 'cosine' | 'sine' | 'energy', unit: string): Column =>
    column(
      key,
      unit,
      coefficients.map((coefficient) => coefficient[key]),
    );
  return {
    rows: coefficients.length,
    columns: [
      column(
        'order',
        null,
        coefficients.map(({ order }) => order),
        'integer',
      ),
      of('angularFrequency', 'rad/s'),
      of('cosine', amplitude),
      of('sine', amplitude),
      of('energy', 'J'),
    ],
  };
}

import { fault } from '../../faults/fault.ts';
import type { Field, Numbers, Quantity, ResponsesAnswer, ResponsesRequest } from '../../spec/types.ts';
import { formatNumber } from '../text/format-values.ts';
import { printedUnit } from '../text/units.ts';
import type { View } from '../views.ts';
import { nameOfValues, wordOf } from './quantity-words.ts';
import { nearest } from './value-range.ts';

/** One sampled quantity, its positions in ascending order. */
export interface SampledField {
  /** Name on the axis and unit as printed. */
  readonly name: string;
  readonly unit: string;
  readonly word: string;
  readonly quantity: Quantity;
  readonly gaugeTime: number;
  readonly field: Field;
  readonly times: Numbers;
  /** m, ascending, shape [positions]. */
  readonly positions: Float64Array;
  /** Column of the answer of every position. */
  readonly columns: readonly number[];
}

/** What a request may choose to see. */
export interface Choice {
  /** m. */
  readonly stations?: readonly number[];
  /** s. */
  readonly instants?: readonly number[];
  /** Orders of modes. */
  readonly modes?: readonly number[];
}

/**
 * The field that a view shows: displacement or relative displacement, whichever the sample names first,
 * else the first quantity sampled; the force for `force-history`.
 *
 * Faults: `figure-quantity-not-sampled`.
 */
export function fieldOf(request: ResponsesRequest, answer: ResponsesAnswer, view: View): SampledField {
  const { quantities, gaugeTime } = request.sample;
  const moves = quantities.find((each) => each === 'displacement' || each === 'relativeDisplacement');
  const wanted: Quantity = view === 'force-history' ? 'force' : (moves ?? quantities[0]);
  const field = answer.fields[wanted];
  if (field === undefined) {
    throw fault('figure-quantity-not-sampled', '/sample/quantities', {
      view,
      quantity: wanted,
      sampled: quantities.join(', '),
    });
  }
  const columns = Array.from(answer.fields.positions, (_, q) => q).toSorted(
    (a, b) => answer.fields.positions[a] - answer.fields.positions[b],
  );
  const word = wordOf(wanted, request.member.kind);
  return {
    name: nameOfValues(word, field, gaugeTime),
    unit: printedUnit(field.unit),
    word,
    quantity: wanted,
    gaugeTime,
    field,
    times: answer.fields.times,
    positions: Float64Array.from(columns, (q) => answer.fields.positions[q]),
    columns,
  };
}

/** Refuses a view that needs more than one position or time. */
export function requireSamples(sampled: SampledField, what: 'positions' | 'times', view: View): void {
  const count = what === 'times' ? sampled.times.length : sampled.positions.length;
  if (count >= 2) return;
  const instead = what === 'times' ? 'snapshots' : sampled.times.length > 1 ? 'history' : 'convergence';
  throw fault('figure-needs-samples', `/sample/${what}`, { view, what, instead });
}

/**
 * Indices of the sampled positions nearest to the stations wanted, each once, ascending.
 *
 * Faults: `figure-station-outside`.
 */
export function nearestStations({ positions }: SampledField, stations: readonly number[]): number[] {
  return pick(positions, stations, (at, from, to) =>
    fault('figure-station-outside', '', {
      at: formatNumber(at, 6),
      from: formatNumber(from, 6),
      to: formatNumber(to, 6),
    }),
  );
}

/**
 * Indices of the sampled times nearest to the instants wanted, each once, ascending.
 *
 * Faults: `figure-instant-outside`.
 */
export function nearestInstants({ times }: SampledField, instants: readonly number[]): number[] {
  return pick(times, instants, (at, from, to) =>
    fault('figure-instant-outside', '', {
      time: formatNumber(at, 6),
      from: formatNumber(from, 6),
      to: formatNumber(to, 6),
    }),
  );
}

function pick(
  sampled: Numbers,
  wanted: readonly number[],
  outside: (at: number, from: number, to: number) => Error,
): number[] {
  const from = sampled[0];
  const to = sampled[sampled.length - 1];
  // half a unit of rounding of a decimal number that was typed
  const slack = 1e-9 * Math.max(Math.abs(from), Math.abs(to));
  for (const at of wanted) {
    if (!(at >= from - slack && at <= to + slack)) throw outside(at, from, to);
  }
  return [...new Set(wanted.map((at) => nearest(sampled, at)))].toSorted((a, b) => a - b);
}

/** The values at one place over time, shape [times]. */
export function historyAt({ field, columns }: SampledField, index: number): Float64Array {
  const column = columns[index];
  const history = new Float64Array(field.values.length);
  for (let j = 0; j < history.length; j++) history[j] = field.values[j][column];
  return history;
}

/** The values along the member at one time, shape [positions]. */
export function snapshotAt({ field, columns }: SampledField, time: number): Float64Array {
  const row = field.values[time];
  return Float64Array.from(columns, (q) => row[q]);
}

/** The bound at every position, shape [positions]; null where none exists. */
export function boundAlong({ field, columns }: SampledField): Float64Array | null {
  const { bound } = field;
  return bound && Float64Array.from(columns, (q) => bound[q]);
}

/** Largest and smallest value over the sampled times at every position, shape [positions] each. */
export interface Envelope {
  readonly least: Float64Array;
  readonly most: Float64Array;
}

/** Cost O(times · positions). */
export function envelopeOf({ field, columns }: SampledField): Envelope {
  const least = new Float64Array(columns.length).fill(Infinity);
  const most = new Float64Array(columns.length).fill(-Infinity);
  for (const row of field.values) {
    for (let i = 0; i < columns.length; i++) {
      const value = row[columns[i]];
      if (value < least[i]) least[i] = value;
      if (value > most[i]) most[i] = value;
    }
  }
  return { least, most };
}

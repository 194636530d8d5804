import { tableNames, type TableName } from '../encoding/tables.ts';
import { Fault, faultRecord, type FaultRecord } from '../faults/fault.ts';
import { figureSizes, viewsOf, type View } from '../figures/views.ts';
import { formats, type Format } from '../pool/answer-form.ts';
import { listOf, numberBetween, oneOf, type ReadValue } from './query-values.ts';

/** What the query of a link says about the form of an answer. */
export interface AnswerQuery {
  readonly format?: Format;
  readonly table?: TableName;
  readonly view?: View;
  readonly width?: number;
  readonly height?: number;
  readonly theme?: 'light' | 'dark';
  readonly stations?: readonly number[];
  readonly instants?: readonly number[];
  readonly modes?: readonly number[];
}

/** Most entries of a list: more curves cannot be told apart. */
const mostEntries = 24;

/** Highest order of a mode that a request can have (schemas/ModesByCount.json). */
const highestOrder = 20_000;

const anyNumber = { minimum: -Number.MAX_VALUE, maximum: Number.MAX_VALUE };

function pixels({ least, most }: { readonly least: number; readonly most: number }): ReadValue<unknown> {
  return numberBetween({ minimum: least, maximum: most, whole: true, unit: 'px' });
}

/** Every query parameter and how its value is read. */
const readers: Readonly<Record<keyof AnswerQuery, ReadValue<unknown>>> = {
  format: oneOf(formats),
  table: oneOf(tableNames),
  view: oneOf([...new Set(Object.values(viewsOf).flat())]),
  width: pixels(figureSizes.width),
  height: pixels(figureSizes.height),
  theme: oneOf(['light', 'dark']),
  stations: listOf('positions in m', mostEntries, anyNumber),
  instants: listOf('times in s', mostEntries, anyNumber),
  modes: listOf('orders of modes', mostEntries, { minimum: 1, maximum: highestOrder, whole: true }),
};

/** The parameters of a figure. */
export const figureParameters = [
  'view',
  'width',
  'height',
  'theme',
  'stations',
  'instants',
  'modes',
] as const;

/**
 * The query of a solve or a result.
 *
 * @param query parsed query: texts, lists where a parameter stands several times
 * @throws Fault with every wrong parameter: `unknown-parameter`, `repeated-parameter`, `parameter-value`
 */
export function readAnswerQuery(query: Readonly<Record<string, string | string[]>>): AnswerQuery {
  const faults: FaultRecord[] = [];
  const read: Record<string, unknown> = {};
  for (const [name, value] of Object.entries(query)) {
    const shown = JSON.stringify(name.slice(0, 60));
    if (!Object.hasOwn(readers, name)) {
      const allowed = Object.keys(readers).join(', ');
      faults.push(faultRecord('unknown-parameter', '', { name: shown, allowed }));
    } else if (typeof value !== 'string') {
      faults.push(faultRecord('repeated-parameter', '', { name, count: value.length }));
    } else {
      const outcome = readers[name as keyof AnswerQuery](value);
      if ('value' in outcome) read[name] = outcome.value;
      else faults.push(faultRecord('parameter-value', '', { name, found: shownText(value), ...outcome }));
    }
  }
  if (faults.length > 0) throw new Fault(faults.slice(0, 50));
  return read;
}

export function shownText(text: string): string {
  return JSON.stringify(text.length > 60 ? `${text.slice(0, 60)}…` : text);
}

import type { FigureOptions } from '../figures/draw-figure.ts';
import type { ContentCoding } from '../encoding/compress.ts';
import type { TableName } from '../encoding/tables.ts';

/** Formats of an answer, the default first. */
export const formats = ['json', 'csv', 'arrow', 'svg', 'png', 'xml'] as const;
export type Format = (typeof formats)[number];

const solveFormats = ['json', 'csv', 'arrow', 'svg', 'png'] as const;

/** The formats of every operation, the default first. */
export const formatsOf = {
  modes: solveFormats,
  responses: solveFormats,
  'transfer-functions': solveFormats,
  checks: ['json', 'xml'],
} as const satisfies Readonly<Record<string, readonly Format[]>>;

/** The form of an answer with everything that tells one from another. Plain, so that it crosses threads. */
export type AnswerForm =
  | { readonly format: 'json' }
  | { readonly format: 'xml' }
  | { readonly format: 'csv' | 'arrow'; readonly table: TableName }
  | { readonly format: 'svg' | 'png'; readonly figure: FigureOptions };

/** A form, and the content codings that its reader takes, the preferred first; at least one. */
export interface WantedAnswer {
  readonly form: AnswerForm;
  readonly codings: readonly ContentCoding[];
}

/** The answer as it is computed, without a content coding. */
export const plainJson: WantedAnswer = { form: { format: 'json' }, codings: ['identity'] };

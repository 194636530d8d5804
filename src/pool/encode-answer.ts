import { encodeArrow } from '../encoding/arrow.ts';
import { asRead } from '../encoding/as-read.ts';
import { compress, type ContentCoding } from '../encoding/compress.ts';
import { encodeCsv } from '../encoding/csv.ts';
import { encodeJunit } from '../encoding/junit.ts';
import { encodeJson } from '../encoding/json.ts';
import { tableOf, type TabulatedOperation } from '../encoding/tables.ts';
import { drawFigure } from '../figures/draw-figure.ts';
import { rasterise } from '../figures/rasterise.ts';
import type { ChecksAnswer, ChecksRequest } from '../spec/types.ts';
import type { AnswerForm, WantedAnswer } from './answer-form.ts';

/**
 * The bytes of an answer in the form and the content coding that are wanted, in a buffer of their own.
 *
 * @param answer from the solver, or read back from the JSON of the same answer: the bytes are the same
 * @throws Fault of the form: `result-overflow`, `nothing-to-tabulate`, a figure that the answer cannot show
 */
export function encodeAnswer(
  operation: string,
  request: unknown,
  answer: unknown,
  { form, codings }: WantedAnswer,
): { readonly bytes: Uint8Array<ArrayBuffer>; readonly coding: ContentCoding } {
  const bytes =
    form.format === 'json'
      ? encodeJson(answer)
      : encodeForm(operation as TabulatedOperation, request, asRead(answer), form);
  return compress(bytes, codings);
}

function encodeForm(
  operation: TabulatedOperation,
  request: unknown,
  answer: unknown,
  form: Exclude<AnswerForm, { format: 'json' }>,
): Uint8Array<ArrayBuffer> {
  switch (form.format) {
    case 'xml':
      return encodeJunit(request as ChecksRequest, answer as ChecksAnswer);
    case 'csv':
      return encodeCsv(tableOf(operation, request, answer, form.table));
    case 'arrow':
      return encodeArrow(tableOf(operation, request, answer, form.table), { operation, table: form.table });
    case 'svg':
      return new TextEncoder().encode(drawFigure(operation, request, answer, form.figure));
    case 'png':
      // A copy, because the renderer's own buffer cannot be moved to another thread.
      return new Uint8Array(rasterise(drawFigure(operation, request, answer, form.figure)));
  }
}

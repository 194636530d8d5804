import type { FastifyRequest } from 'fastify';
import type { Operation } from '../contract/read-request.ts';
import type { ContentCoding } from '../encoding/compress.ts';
import { tablesOf, type TabulatedOperation } from '../encoding/tables.ts';
import { fault, Fault, faultRecord, type FaultRecord } from '../faults/fault.ts';
import { viewsOf } from '../figures/views.ts';
import { formats, formatsOf, type AnswerForm, type Format } from '../pool/answer-form.ts';
import { acceptedCodings } from './accept-encoding.ts';
import { figureParameters, shownText, type AnswerQuery } from './answer-query.ts';
import { requireAcceptable } from './media.ts';

/** Media type of every format. */
export const mediaTypeOf: Readonly<Record<Format, string>> = {
  json: 'application/json',
  csv: 'text/csv',
  arrow: 'application/vnd.apache.arrow.stream',
  svg: 'image/svg+xml',
  png: 'image/png',
  xml: 'application/xml',
};

const tableFormats: readonly Format[] = ['csv', 'arrow'];
const figureFormats: readonly Format[] = ['svg', 'png'];
const defaultSize = { width: 1200, height: 700 };

/** The parameters of a query that need certain formats, with these formats. */
function bindingsOf(query: AnswerQuery): readonly (readonly [name: string, formats: readonly Format[]])[] {
  const figure = figureParameters.filter((name) => query[name] !== undefined);
  return [
    ...(query.table === undefined ? [] : [['table', tableFormats] as const]),
    ...figure.map((name) => [name, figureFormats] as const),
  ];
}

/**
 * The format of an answer: that of the query, else the one that the Accept header likes best among
 * those to which the other parameters of the query apply; JSON where it likes several.
 *
 * @param operation null where it is not known yet: then the formats of all are offered
 * @throws Fault `parameter-without-use`, `parameter-value`, `not-acceptable`
 */
export function negotiateFormat(
  request: FastifyRequest,
  query: AnswerQuery,
  operation: Operation | null = null,
): Format {
  const bindings = bindingsOf(query);
  const { format } = query;
  const offered: readonly Format[] = operation === null ? formats : formatsOf[operation];
  if (format !== undefined) chosen('format', format, offered, operation ?? 'a result');
  const fitting = format === undefined ? fittingFormats(bindings, offered) : [format];
  const faults = bindings
    .filter(([, applicable]) => !fitting.some((one) => applicable.includes(one)))
    .map(([name, applicable]) =>
      faultRecord('parameter-without-use', '', { name, format: fitting[0], formats: applicable.join(', ') }),
    );
  if (faults.length > 0) throw new Fault(faults);
  if (format !== undefined) return format;
  const type = requireAcceptable(
    request,
    fitting.map((one) => mediaTypeOf[one]),
  );
  return fitting.find((one) => mediaTypeOf[one] === type)!;
}

/** The formats that the parameters leave; where they contradict each other, those of the first, or all. */
function fittingFormats(
  bindings: ReturnType<typeof bindingsOf>,
  offered: readonly Format[],
): readonly Format[] {
  const all = offered.filter((format) => bindings.every(([, applicable]) => applicable.includes(format)));
  if (all.length > 0) return all;
  const first = offered.filter((format) => bindings[0][1].includes(format));
  return first.length > 0 ? first : offered;
}

/**
 * The content codings that a client takes, the preferred first. Pictures of pixels are never coded:
 * they are compressed already.
 *
 * @throws Fault `coding-not-acceptable`
 */
export function negotiateCodings(request: FastifyRequest, format: Format): readonly ContentCoding[] {
  const offered: readonly ContentCoding[] = format === 'png' ? ['identity'] : ['br', 'gzip', 'identity'];
  const header = request.headers['accept-encoding'];
  const codings = acceptedCodings(header, offered);
  if (codings.length > 0) return codings;
  throw fault('coding-not-acceptable', '', {
    accept: shownText(String(header)),
    offered: offered.join(', '),
  });
}

/**
 * The form of an answer to an operation with all its options, defaults filled in.
 *
 * @throws Fault `parameter-value` where the operation has no such table or view
 */
export function formOf(operation: Operation, format: Format, query: AnswerQuery): AnswerForm {
  switch (format) {
    case 'json':
    case 'xml':
      return { format };
    case 'csv':
    case 'arrow':
      return {
        format,
        table: chosen('table', query.table, tablesOf[operation as TabulatedOperation], operation),
      };
    case 'svg':
    case 'png': {
      const { format: _format, table: _table, ...options } = query;
      const view = chosen('view', query.view, viewsOf[operation as TabulatedOperation], operation);
      return { format, figure: { ...defaultSize, theme: 'light', ...options, view } };
    }
  }
}

function chosen<Name extends string>(
  parameter: string,
  name: Name | undefined,
  offered: readonly Name[],
  operation: string,
): Name {
  if (name === undefined) return offered[0];
  if (offered.includes(name)) return name;
  const wanted = `one of those that ${operation} has: ${offered.join(', ')}`;
  const records: readonly FaultRecord[] = [
    faultRecord('parameter-value', '', { name: parameter, found: shownText(name), wanted }),
  ];
  throw new Fault(records);
}

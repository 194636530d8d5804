import { mostFaults } from '../../contract/read-request.ts';
import { nestingLimit } from '../../encoding/json-syntax.ts';
import { mostLines } from '../../jobs/split-lines.ts';
import { ANSWER_VALUES, FREQUENCY_LIMIT } from '../../solutions/limits.ts';

/** What a limit is read from: the schemas of the reference document. */
export type Schemas = Readonly<
  Record<
    string,
    {
      readonly properties?: Readonly<
        Record<string, { readonly maximum?: number; readonly maxItems?: number }>
      >;
    }
  >
>;

export interface ServiceLimit {
  readonly what: string;
  readonly limit: string;
}

const mebibyte = 1024 * 1024;

/**
 * Every limit of a request, each read where it is enforced.
 *
 * @param schemas of the reference document
 * @param bodyLimit largest body, bytes
 */
export function serviceLimits(schemas: Schemas, bodyLimit: number): ServiceLimit[] {
  const most = (schema: string, key: string): string => {
    const property = schemas[schema]?.properties?.[key];
    const limit = property?.maximum ?? property?.maxItems;
    if (limit === undefined) throw new Error(`The schema ${schema} has no limit on "${key}".`);
    return grouped(limit);
  };
  return [
    { what: 'modes of one request', limit: most('ModesByCount', 'modes') },
    { what: 'segments; attachments', limit: `${most('Cable', 'segments')} each` },
    { what: 'sampled values (positions × times × quantities)', limit: grouped(ANSWER_VALUES) },
    { what: 'loads of one request', limit: most('ResponsesRequest', 'loads') },
    { what: 'samples of a record', limit: most('SampledHistory', 'values') },
    { what: 'outputs of one request', limit: most('TransferFunctionsRequest', 'outputs') },
    { what: 'frequencies; refined ones included', limit: grouped(FREQUENCY_LIMIT) },
    { what: 'outputs × frequencies', limit: grouped(ANSWER_VALUES) },
    { what: 'body; line of a batch', limit: byteText(bodyLimit) },
    { what: 'lines of a batch', limit: grouped(mostLines) },
    { what: 'nesting of a body', limit: `${nestingLimit} levels` },
    { what: 'faults listed at once', limit: String(mostFaults) },
  ];
}

function byteText(bytes: number): string {
  return bytes % mebibyte === 0 ? `${bytes / mebibyte} MiB` : `${grouped(bytes)} bytes`;
}

function grouped(count: number): string {
  return count.toLocaleString('en');
}

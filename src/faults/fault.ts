import { catalogue, type FaultCode } from './catalogue.ts';

/** One thing that is wrong with a request, as it crosses threads: a plain record. */
export interface FaultRecord {
  /** Stable code out of the catalogue; never reused for another meaning. */
  readonly code: FaultCode;
  /** RFC 6901 pointer into the request; empty for the request as a whole. */
  readonly pointer: string;
  /** What is wrong, with the offending value, and what to change. */
  readonly detail: string;
}

/**
 * Thrown when a request cannot be answered. Carries plain records only, because structured
 * clone drops the own fields and the subclass of an Error.
 */
export class Fault extends Error {
  readonly records: readonly FaultRecord[];

  constructor(records: readonly FaultRecord[]) {
    super(records.map((record) => record.detail).join(' '));
    this.name = 'Fault';
    this.records = records;
  }
}

/** Values that a catalogue wording may mention. */
export type FaultValues = Readonly<Record<string, string | number>>;

/**
 * A record with the catalogue's wording filled in.
 *
 * @param code code of the catalogue
 * @param pointer RFC 6901 pointer to the place in the request
 * @param values values for the `{names}` in the wording; every name must be given
 */
export function faultRecord(code: FaultCode, pointer: string, values: FaultValues = {}): FaultRecord {
  const detail = catalogue[code].detail.replace(/\{(\w+)\}/g, (_, name: string) =>
    String(values[name] ?? '?'),
  );
  return { code, pointer, detail };
}

/** A throwable fault of one record. */
export function fault(code: FaultCode, pointer: string, values: FaultValues = {}): Fault {
  return new Fault([faultRecord(code, pointer, values)]);
}

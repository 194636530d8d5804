import type { Operation } from '../../contract/read-request.ts';

/** A complete request that the service shows. */
export interface Example {
  /** Of its file in schemas/examples, without the ending. */
  readonly name: string;
  /** What it shows. */
  readonly title: string;
  readonly operation: Operation;
  /** The request as it is written. */
  readonly text: string;
}

/** Where the text of an example is served. */
export function exampleUrl({ name }: Example): string {
  return `/examples/${name}.json`;
}

/** Where it is sent. */
export function solveUrl({ operation }: Example): string {
  return `/v1/${operation}`;
}

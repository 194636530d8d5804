/** A complete request that the service shows. */
export interface Example {
  /** Of its file in schemas/examples, without the ending. */
  readonly name: string;
  /** What it shows. */
  readonly title: string;
  /** Where it is sent. */
  readonly url: string;
  /** The request as it is written. */
  readonly text: string;
}

/** Where the text of an example is served. */
export function exampleUrl(name: string): string {
  return `/examples/${name}.json`;
}

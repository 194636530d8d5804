import { Fault, faultRecord } from '../faults/fault.ts';
import { BatchEnded } from './batch-ended.ts';

/** Most lines of one batch; blank ones do not count. */
export const mostLines = 100_000;

/** One line of a batch. */
export interface Line {
  /** Its number in the text, the first is 1; blank lines count. */
  readonly number: number;
  /** Its text without the end of the line; null where it was longer than allowed. */
  readonly bytes: Uint8Array | null;
}

const lineFeed = 0x0a;
const carriageReturn = 0x0d;

/**
 * Cuts a text into its lines as it comes; blank lines are passed over.
 *
 * @param source pieces of the text; the next one is taken only when those before have been used up
 * @param limit longest line in bytes
 * @returns what lines each piece completes, never an empty list
 * @throws BatchEnded after the last line that is allowed, and where the source ends with a Fault
 * Cost: holds one piece and one unfinished line.
 */
export async function* splitLines(
  source: AsyncIterable<Uint8Array>,
  limit: number,
): AsyncGenerator<readonly Line[]> {
  let left = mostLines;
  for await (const lines of allLines(source, limit)) {
    if (lines.length <= left) yield lines;
    else {
      if (left > 0) yield lines.slice(0, left);
      throw new BatchEnded([faultRecord('too-many-lines', '', { limit: mostLines })], lines[left].number);
    }
    left -= lines.length;
  }
}

async function* allLines(source: AsyncIterable<Uint8Array>, limit: number): AsyncGenerator<readonly Line[]> {
  const rest = new UnfinishedLine(limit);
  let number = 0;
  for await (const piece of numbered(source, () => number + 1)) {
    const lines: Line[] = [];
    let start = 0;
    for (let end = piece.indexOf(lineFeed); end >= 0; end = piece.indexOf(lineFeed, start)) {
      rest.add(piece.subarray(start, end));
      start = end + 1;
      number++;
      const bytes = rest.take();
      if (bytes === null || !isBlank(bytes)) lines.push({ number, bytes });
    }
    rest.add(piece.subarray(start));
    if (lines.length > 0) yield lines;
  }
  const bytes = rest.take();
  if (bytes === null || !isBlank(bytes)) yield [{ number: number + 1, bytes }];
}

/** The pieces; what goes wrong with them is told with the number of the line. */
async function* numbered(source: AsyncIterable<Uint8Array>, line: () => number): AsyncGenerator<Uint8Array> {
  try {
    yield* source;
  } catch (error) {
    throw error instanceof Fault ? new BatchEnded(error.records, line()) : error;
  }
}

/** Pieces of a line whose end has not come. */
class UnfinishedLine {
  readonly #limit: number;
  #pieces: Uint8Array[] = [];
  #length = 0;

  constructor(limit: number) {
    this.#limit = limit;
  }

  add(piece: Uint8Array): void {
    this.#length += piece.byteLength;
    if (this.#length > this.#limit) this.#pieces = [];
    else if (piece.byteLength > 0) this.#pieces.push(piece);
  }

  /** The line, null where it is too long; a new one begins. */
  take(): Uint8Array | null {
    const pieces = this.#pieces;
    const tooLong = this.#length > this.#limit;
    this.#pieces = [];
    this.#length = 0;
    if (tooLong) return null;
    const line = pieces.length === 1 ? pieces[0] : Buffer.concat(pieces);
    return line.at(-1) === carriageReturn ? line.subarray(0, -1) : line;
  }
}

function isBlank(line: Uint8Array): boolean {
  return line.every((byte) => byte === 0x20 || byte === 0x09 || byte === carriageReturn);
}

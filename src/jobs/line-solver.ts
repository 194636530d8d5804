import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import type { LinesOutcome, SolverPool } from '../pool/solver-pool.ts';
import type { SolvedLines } from '../pool/task.ts';
import { BatchEnded } from './batch-ended.ts';
import { GroupSize } from './group-size.ts';
import { orderedWindow } from './ordered-window.ts';
import type { Line } from './split-lines.ts';
import { writeLines, type ProblemOfLine } from './write-lines.ts';

/** Answers to some lines of a batch, in order, as NDJSON. */
export interface SolvedGroup {
  readonly bytes: Uint8Array;
  /** Number of lines. */
  readonly count: number;
}

export interface LineSolverOptions {
  readonly pool: SolverPool;
  /** Longest time for one line, s. */
  readonly deadline: number;
  /** Longest line, bytes. */
  readonly lineLimit: number;
  readonly problemOf: ProblemOfLine;
  /** Told of a line on which a solver failed. */
  readonly onFailure: (cause: string, line: number) => void;
}

/** Thrown where lines are not wanted any more. */
export class NotWanted extends Error {}

/** Groups of lines that are under way or wait to be taken, for each worker: one heavy line must not idle the rest. */
const groupsPerWorker = 4;

/** Bytes of answers that wait to be taken before no further line is begun. */
const mostWaitingBytes = 8 * 1024 * 1024;

/**
 * Solves lines of batches on all workers. Small lines go to a worker in groups; a group that fails as a
 * whole (a crash, a deadline) is tried again line by line, so that a line never suffers from another.
 */
export class LineSolver {
  readonly #options: LineSolverOptions;
  readonly #size = new GroupSize();

  constructor(options: LineSolverOptions) {
    this.#options = options;
  }

  get lineLimit(): number {
    return this.#options.lineLimit;
  }

  /**
   * The answers to lines, in order, begun only as fast as they are taken.
   *
   * @param gone aborts when they are not wanted any more
   * @param onStart told when a worker begins on some of them
   * @throws NotWanted; BatchEnded where the service stops
   */
  async *solve(
    lines: AsyncIterable<readonly Line[]>,
    gone: AbortSignal,
    onStart?: () => void,
  ): AsyncGenerator<SolvedGroup> {
    const source = lines[Symbol.asyncIterator]();
    let atHand: readonly Line[] = [];
    const begin = async (): Promise<{ work: Promise<SolvedGroup> } | null> => {
      if (atHand.length === 0) {
        const next = await source.next();
        if (next.done) return null;
        atHand = next.value;
      }
      const group = atHand.slice(0, this.#size.of(atHand));
      atHand = atHand.slice(group.length);
      return { work: this.#solveGroup(group, gone, onStart) };
    };
    try {
      yield* orderedWindow(begin, {
        pieces: groupsPerWorker * this.#options.pool.workers,
        bytes: mostWaitingBytes,
        sizeOf: ({ bytes }) => bytes.byteLength,
      });
    } finally {
      // Not awaited: where the next line does not come, it would not return.
      void source.return?.();
    }
  }

  async #solveGroup(group: readonly Line[], gone: AbortSignal, onStart?: () => void): Promise<SolvedGroup> {
    const { pool, deadline, problemOf, lineLimit } = this.#options;
    const numbers = group.map(({ number }) => number);
    if (group.length === 1 && group[0].bytes === null) {
      return this.#refused(numbers[0], [faultRecord('line-too-long', '', { limit: lineLimit })]);
    }
    const outcome: LinesOutcome = group.some(({ bytes }) => bytes === null)
      ? { kind: 'faults', records: [] }
      : await pool.run(taskOf(group), { background: true, deadline, gone, onStart });
    switch (outcome.kind) {
      case 'lines':
        this.#size.record(group.length, outcome);
        return { bytes: writeLines(numbers, outcome, problemOf), count: group.length };
      case 'gone':
        throw new NotWanted();
      case 'faults':
        if (outcome.records[0]?.code === 'stopping') throw new BatchEnded(outcome.records, numbers[0]);
        if (group.length > 1) return this.#oneByOne(group, gone, onStart);
        this.#options.onFailure(outcome.cause ?? outcome.records[0].detail, numbers[0]);
        return this.#refused(numbers[0], outcome.records, idOf(group[0]));
    }
  }

  async #oneByOne(group: readonly Line[], gone: AbortSignal, onStart?: () => void): Promise<SolvedGroup> {
    const parts: Uint8Array[] = [];
    for (const line of group) parts.push((await this.#solveGroup([line], gone, onStart)).bytes);
    return { bytes: Buffer.concat(parts), count: group.length };
  }

  #refused(number: number, records: readonly FaultRecord[], id: string | null = null): SolvedGroup {
    const lines: SolvedLines['lines'] = [{ id, records }];
    const bytes = writeLines([number], { bytes: new Uint8Array(0), lines }, this.#options.problemOf);
    return { bytes, count: 1 };
  }
}

/** The lines in a buffer of their own, which moves to the worker. */
function taskOf(group: readonly Line[]) {
  const bytes = new Uint8Array(group.reduce((length, line) => length + line.bytes!.byteLength, 0));
  let end = 0;
  const lines = group.map(({ number, bytes: line }) => {
    bytes.set(line!, end);
    end += line!.byteLength;
    return { number, end };
  });
  return { kind: 'lines', bytes, lines } as const;
}

/** The id of a line that a worker could not answer. */
function idOf({ bytes }: Line): string | null {
  try {
    const id = (JSON.parse(Buffer.from(bytes!).toString()) as { id?: unknown } | null)?.id;
    return typeof id === 'string' ? id : null;
  } catch {
    return null;
  }
}

import type { FaultRecord } from '../faults/fault.ts';
import { plainJson } from '../pool/answer-form.ts';
import type { Answers } from './answers.ts';
import { NotWanted, type LineSolver, type SolvedGroup } from './line-solver.ts';
import type { Line } from './split-lines.ts';

/** What came of a solve: the digest of its result, or faults. */
export type SolveEnd = { readonly digest: string } | { readonly records: readonly FaultRecord[] };

/** Does the work of jobs, in either engine, giving way to requests that somebody waits for. */
export class JobSolver {
  readonly #answers: Answers;
  readonly #lines: LineSolver;
  readonly #deadline: number;

  /** @param deadline longest time for one solve, s */
  constructor(answers: Answers, lines: LineSolver, deadline: number) {
    this.#answers = answers;
    this.#lines = lines;
    this.#deadline = deadline;
  }

  get lineLimit(): number {
    return this.#lines.lineLimit;
  }

  /** The requests of results. */
  get results(): Pick<Answers, 'find' | 'keep'> {
    return this.#answers;
  }

  /**
   * Solves one request and keeps its result.
   *
   * @throws NotWanted
   */
  async solve(
    operation: string,
    body: Uint8Array,
    gone: AbortSignal,
    onStart?: () => void,
  ): Promise<SolveEnd> {
    // A copy, because the buffer of a task moves to the worker.
    const outcome = await this.#answers.toBody(operation, new Uint8Array(body), plainJson, {
      background: true,
      deadline: this.#deadline,
      gone,
      onStart,
    });
    switch (outcome.kind) {
      case 'answered':
        return { digest: outcome.digest };
      case 'faults':
        return { records: outcome.records };
      case 'gone':
        throw new NotWanted();
    }
  }

  /** The answers to lines of a batch, in order. @throws NotWanted; BatchEnded where the service stops */
  lines(
    lines: AsyncIterable<readonly Line[]>,
    gone: AbortSignal,
    onStart?: () => void,
  ): AsyncGenerator<SolvedGroup> {
    return this.#lines.solve(lines, gone, onStart);
  }
}

import type { SolvedLines } from '../pool/task.ts';
import type { Line } from './split-lines.ts';

/**
 * Time that a group should take a worker, s: long beside the 0.1 ms that handing it over costs, short
 * for a single request that waits behind it; and the bytes of its lines and of its answers.
 */
const wantedSeconds = 0.02;
const wantedBytes = 256 * 1024;

const mostLines = 64;

/** Weight of the newest group in the running means; tuned by eye, no source. */
const newestWeight = 0.3;

/** How many lines go to a worker at once, from what those before have cost. */
export class GroupSize {
  #secondsPerLine = wantedSeconds;
  #bytesPerLine = wantedBytes;

  /** Number of the first lines that make a group, ≥ 1. */
  of(lines: readonly Line[]): number {
    const fitting = Math.min(
      mostLines,
      lines.length,
      wantedSeconds / this.#secondsPerLine,
      wantedBytes / this.#bytesPerLine,
    );
    let bytes = lines[0].bytes?.byteLength ?? 0;
    let count = 1;
    while (count + 1 <= fitting && bytes <= wantedBytes) bytes += lines[count++].bytes?.byteLength ?? 0;
    return count;
  }

  record(count: number, { seconds, bytes }: Pick<SolvedLines, 'seconds' | 'bytes'>): void {
    this.#secondsPerLine += newestWeight * (seconds / count - this.#secondsPerLine);
    this.#bytesPerLine += newestWeight * (bytes.byteLength / count - this.#bytesPerLine);
  }
}

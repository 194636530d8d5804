import type { FaultRecord } from '../faults/fault.ts';
import type { SolvedLine, SolvedLines } from '../pool/task.ts';
import type { ProblemDocument } from '../spec/types.ts';

/** The problem document of a line, with its status; http/ says which. */
export type ProblemOfLine = (records: readonly FaultRecord[], line: number) => ProblemDocument;

/**
 * The answers to lines as NDJSON. The bytes of an answer stand in it as the worker has made them.
 *
 * @param numbers numbers of the lines
 */
export function writeLines(
  numbers: readonly number[],
  { bytes, lines }: Pick<SolvedLines, 'bytes' | 'lines'>,
  problemOf: ProblemOfLine,
): Uint8Array {
  const parts: Uint8Array[] = [];
  let at = 0;
  for (const [index, line] of lines.entries()) {
    if ('records' in line) {
      parts.push(Buffer.from(problemLine(line, numbers[index], problemOf)));
      continue;
    }
    parts.push(Buffer.from(`{"id":${JSON.stringify(line.id)},"status":200,"answer":`));
    parts.push(bytes.subarray(at, at + line.length), lineEnd);
    at += line.length;
  }
  return Buffer.concat(parts);
}

const lineEnd = Buffer.from('}\n');

function problemLine(
  { id, records }: Extract<SolvedLine, { records: unknown }>,
  number: number,
  problemOf: ProblemOfLine,
): string {
  const problem = problemOf(records, number);
  return `${JSON.stringify({ id, status: problem.status, problem })}\n`;
}

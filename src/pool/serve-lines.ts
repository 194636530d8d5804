import { canonicalJson } from '../contract/canonical-json.ts';
import { readBatchLine } from '../contract/read-batch-line.ts';
import { encodeJson } from '../encoding/json.ts';
import { readJson } from '../encoding/read-json.ts';
import { Fault } from '../faults/fault.ts';
import type { LinesTask, SolvedLine, SolvedLines, SolverOperations } from './task.ts';

/**
 * Answers several lines of a batch, each by itself: a line that cannot be read or solved has faults,
 * the others their answers, one after another in one buffer.
 *
 * @throws what is no Fault; the lines are then tried one by one
 */
export function answerLines(
  operations: SolverOperations,
  { bytes, lines }: LinesTask,
): Omit<SolvedLines, 'seconds'> {
  const answers: Uint8Array[] = [];
  let start = 0;
  const solved = lines.map(({ number, end }): SolvedLine => {
    const line = bytes.subarray(start, end);
    start = end;
    const result = answerLine(operations, line, number);
    if ('records' in result) return result;
    answers.push(result.answer);
    return { id: result.id, length: result.answer.byteLength };
  });
  return { kind: 'lines', bytes: joined(answers), lines: solved };
}

function answerLine(
  operations: SolverOperations,
  bytes: Uint8Array,
  number: number,
): { readonly id: string; readonly answer: Uint8Array } | Extract<SolvedLine, { records: unknown }> {
  let id: string | null = null;
  try {
    const document = readJson(bytes, number);
    id = idOf(document);
    const line = readBatchLine(document, Object.keys(operations));
    const { read, solve } = operations[line.operation];
    const answer = withinRequest(() => {
      // From the canonical text, as for any other request: equal requests are solved from equal objects.
      const request = JSON.parse(canonicalJson(read(line.request))) as unknown;
      return encodeJson(solve(request));
    });
    return { id: line.id, answer };
  } catch (error) {
    if (error instanceof Fault) return { id, records: error.records };
    throw error;
  }
}

/** The id of a line that may be wrong otherwise. */
function idOf(document: unknown): string | null {
  const id = (document as { id?: unknown } | null)?.id;
  return typeof id === 'string' ? id : null;
}

/** Lets faults of a request point into the line that holds it. */
function withinRequest<Value>(work: () => Value): Value {
  try {
    return work();
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    throw new Fault(error.records.map((record) => ({ ...record, pointer: `/request${record.pointer}` })));
  }
}

function joined(parts: readonly Uint8Array[]): Uint8Array<ArrayBuffer> {
  const whole = new Uint8Array(parts.reduce((length, part) => length + part.byteLength, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.byteLength;
  }
  return whole;
}

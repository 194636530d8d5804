import { Fault, type FaultRecord } from '../faults/fault.ts';

/** Thrown where a batch cannot go on from a certain line; the lines before are answered. */
export class BatchEnded extends Fault {
  /** Number of the first line that is not answered. */
  readonly line: number;

  constructor(records: readonly FaultRecord[], line: number) {
    super(records);
    this.line = line;
  }
}

import { Fault, type FaultRecord } from '../../src/faults/fault.ts';

/** The records of the fault that a reader throws; fails if it does not. */
export function faultsOf(read: () => unknown): readonly FaultRecord[] {
  try {
    read();
  } catch (error) {
    if (error instanceof Fault) return error.records;
    throw error;
  }
  throw new Error('no fault was raised');
}

import type { Operation } from '../../src/contract/read-request.ts';
import type { FaultCode } from '../../src/faults/catalogue.ts';

/** A fault that a wrong request must be answered with. */
export interface ExpectedFault {
  readonly code: FaultCode;
  /** RFC 6901 pointer into the request. */
  readonly pointer: string;
  /** What the wording must say: the offending value and the remedy. */
  readonly wording: RegExp;
}

/** A wrong request with all its faults and no other. */
export interface BadRequest {
  readonly title: string;
  readonly operation: Operation;
  readonly body: unknown;
  readonly status: 400 | 422;
  readonly faults: readonly ExpectedFault[];
}

export type Changes = Record<string, unknown>;

export const fixed = { type: 'fixed' };
export const free = { type: 'free' };

export const cable = (changes: Changes = {}): Changes => ({
  kind: 'cable',
  tension: 2.4e6,
  segments: [{ length: 45, massPerLength: 58 }],
  ends: { near: fixed, far: fixed },
  ...changes,
});
export const bar = (segment: Changes, changes: Changes = {}): Changes => ({
  kind: 'bar',
  segments: [{ length: 3, ...segment }],
  ends: { near: fixed, far: free },
  ...changes,
});
export const shaft = (segment: Changes, changes: Changes = {}): Changes => ({
  kind: 'shaft',
  segments: [{ length: 2, ...segment }],
  ends: { near: fixed, far: free },
  ...changes,
});
export const steelShaft = { shearModulus: 8e10, density: 7850, outerDiameter: 0.1 };
export const steelBar = { youngsModulus: 2.1e11, area: 0.01, density: 7850 };
export const column = (segment: Changes): Changes => ({
  kind: 'shear-column',
  segments: [{ length: 5, ...segment }],
  ends: { near: fixed, far: free },
});

export const modes = (changes: Changes = {}): Changes => ({
  member: cable(),
  series: { modes: 4 },
  ...changes,
});
export const responses = (changes: Changes = {}): Changes => ({
  member: cable(),
  initial: { displacement: { type: 'pull', at: 15, amplitude: 0.02 } },
  sample: { times: { end: 2, count: 11 } },
  ...changes,
});
/** A request of transfer functions. */
export const transfer = (changes: Changes = {}): Changes => ({
  member: cable(),
  input: { type: 'point-force', at: 15 },
  outputs: [{ at: 20, quantity: 'displacement' }],
  frequencies: [1, 2, 3],
  ...changes,
});

/** A table of wrong requests and what adds one to it; each fault is [code, pointer, wording]. */
export function table(): { rows: BadRequest[]; bad: AddRow } {
  const rows: BadRequest[] = [];
  return {
    rows,
    bad(title, operation, body, status, ...faults) {
      rows.push({
        title,
        operation,
        body,
        status,
        faults: faults.map(([code, pointer, wording]) => ({ code, pointer, wording })),
      });
    },
  };
}

type AddRow = (
  title: string,
  operation: Operation,
  body: unknown,
  status: 400 | 422,
  ...faults: [FaultCode, string, RegExp][]
) => void;

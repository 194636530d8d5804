import { readRequest } from '../../src/contract/read-request.ts';
import { solveChecks } from '../../src/solutions/checks.ts';
import type { CriterionResult } from '../../src/spec/types.ts';

type Body = Readonly<Record<string, unknown>>;

/** The results of criteria held against a request, in their order; ids are given here. */
export function resultsOf(operation: string, request: Body, criteria: readonly Body[]): CriterionResult[] {
  const named = criteria.map((criterion, index) => ({ id: `criterion ${index}`, ...criterion }));
  return solveChecks(readRequest('checks', { operation, request, criteria: named })).criteria;
}

/** The verdicts alone. */
export function verdictsOf(operation: string, request: Body, criteria: readonly Body[]): string[] {
  return resultsOf(operation, request, criteria).map(({ verdict }) => verdict);
}

/** A taut string of 2 m, 400 N and 0.01 kg/m: wave speed 200 m/s, f_n = 50 n Hz. */
export const tautString = {
  kind: 'cable',
  tension: 400,
  segments: [{ length: 2, massPerLength: 0.01 }],
  ends: { near: { type: 'fixed' }, far: { type: 'fixed' } },
};

import { describe, expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { ResponsesAnswer, ResponsesRequest } from '../../src/spec/types.ts';
import { attackCase } from '../support/attack-cases.ts';

const SEED = 1822;

/** Requests of the random attack, displacement only, without the sum over many samples. */
function requests(count: number): ResponsesRequest[] {
  return Array.from({ length: count }, (_, index) => {
    const { short } = attackCase(SEED, index);
    return { ...short, checks: false, sample: { ...short.sample, quantities: ['displacement'] } };
  });
}

function solveWith(request: ResponsesRequest, series: ResponsesRequest['series']): ResponsesAnswer {
  return solveResponses({ ...request, series });
}

/** The part of the motion that tolerances refer to: the ceiling; the bound over the member is what is compared. */
describe('the adaptive length of random members', { timeout: 60_000 }, () => {
  it.each([1e-1, 1e-2])('is the smallest that meets a relative tolerance of %s', (tolerance) => {
    let converged = 0;
    for (const request of requests(60)) {
      const answer = solveWith(request, { relativeTolerance: tolerance, maxModes: 1500 });
      const { verdict, modesUsed, modesNeeded, displacementBound } = answer.convergence;
      const ceiling = answer.convergence.ceiling!;
      if (verdict === 'complete') continue;
      if (verdict === 'converged') {
        converged++;
        // A member whose elastic part is at rest has a ceiling of 0 and nothing to meet.
        if (ceiling > 0) expect(displacementBound).toBeLessThanOrEqual(tolerance * ceiling);
        expect(modesNeeded).toBeUndefined();
        if (modesUsed > 1) {
          const fewer = solveWith(request, { modes: modesUsed - 1 });
          expect(fewer.convergence.displacementBound).toBeGreaterThan(
            tolerance * fewer.convergence.ceiling! * (1 - 1e-9),
          );
        }
        // The same length asked for by number gives the same answer.
        const same = solveWith(request, { modes: modesUsed });
        expect(same.convergence.displacementBound).toBe(displacementBound);
        expect(Array.from(same.fields.displacement!.values[0])).toEqual(
          Array.from(answer.fields.displacement!.values[0]),
        );
      } else {
        expect(['mode-limit', 'rounding-limit']).toContain(verdict);
        expect(displacementBound).toBeGreaterThan(tolerance * ceiling);
        if (verdict === 'mode-limit') {
          expect(modesUsed).toBe(1500);
          expect(modesNeeded!).toBeGreaterThan(1500);
        }
      }
    }
    expect(converged).toBeGreaterThan(30);
  });

  it('estimates the modes needed, mostly within a factor of two', () => {
    const ratios: number[] = [];
    for (const request of requests(60)) {
      const short = solveWith(request, { relativeTolerance: 1e-3, maxModes: 100 });
      if (short.convergence.verdict !== 'mode-limit') continue;
      expect(short.convergence.modesNeeded).toBeGreaterThan(100);
      const enough = solveWith(request, { relativeTolerance: 1e-3, maxModes: 8000 });
      if (enough.convergence.verdict !== 'converged') continue;
      ratios.push(short.convergence.modesNeeded! / enough.convergence.modesUsed);
    }
    // common practice, no source: an estimate that is off by more than this would not help to choose maxModes.
    const near = ratios.filter((ratio) => ratio > 0.5 && ratio < 2);
    expect(ratios.length).toBeGreaterThan(20);
    expect(near.length / ratios.length).toBeGreaterThan(0.7);
  });
});

import { expect, it } from 'vitest';
import { worstVerdict } from '../../src/certificate/verdict.ts';
import type { Verdict } from '../../src/spec/types.ts';

it('from the best to the worst: complete, converged, mode-limit, rounding-limit, irregular-data', () => {
  const order: Verdict[] = ['complete', 'converged', 'mode-limit', 'rounding-limit', 'irregular-data'];
  order.forEach((better, i) => {
    expect(worstVerdict([better])).toBe(better);
    order.slice(i).forEach((worse) => {
      expect(worstVerdict([better, worse])).toBe(worse);
      expect(worstVerdict([worse, better, worse])).toBe(worse);
    });
  });
});

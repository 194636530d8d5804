import { describe, expect, it } from 'vitest';
import { catalogue } from '../../src/faults/catalogue.ts';
import { statusOfFault } from '../../src/http/statuses.ts';

describe('the table of statuses', () => {
  it('gives every fault of the catalogue one status, and lists no other', () => {
    expect(Object.keys(statusOfFault).toSorted()).toEqual(Object.keys(catalogue).toSorted());
  });

  it('uses statuses of errors only', () => {
    for (const status of Object.values(statusOfFault)) {
      expect(status).toBeGreaterThanOrEqual(400);
      expect(status).toBeLessThan(600);
    }
  });
});

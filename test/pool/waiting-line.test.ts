import { describe, expect, it } from 'vitest';
import { WaitingLine } from '../../src/pool/waiting-line.ts';

describe('the line before the workers', () => {
  it('lets four of five pass who do not give way, and is first come, first served among each', () => {
    const line = new WaitingLine<string>();
    for (let i = 1; i <= 3; i++) line.add(`b${i}`, true);
    for (let i = 1; i <= 9; i++) line.add(`s${i}`, false);
    expect(line.length).toBe(9);
    const order = Array.from({ length: 13 }, () => line.take());
    expect(order).toEqual([
      's1',
      's2',
      's3',
      's4',
      'b1',
      's5',
      's6',
      's7',
      's8',
      'b2',
      's9',
      'b3',
      undefined,
    ]);
  });

  it('forgets who leaves', () => {
    const line = new WaitingLine<string>();
    line.add('a', false);
    line.add('b', true);
    line.add('c', false);
    line.remove('a');
    line.remove('b');
    line.remove('nobody');
    expect(line.all()).toEqual(['c']);
  });
});

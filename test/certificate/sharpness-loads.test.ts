import { describe, expect, it } from 'vitest';
import { readRequest } from '../../src/contract/read-request.ts';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { ResponsesAnswer } from '../../src/spec/types.ts';
import { record, recordRequest } from '../bench/record-request.js';

/** The worst error of a displacement over all places and times, and the bound at its place. */
function worstError(short: ResponsesAnswer, long: ResponsesAnswer): { error: number; bound: number } {
  const field = short.fields.displacement!;
  const truth = long.fields.displacement!;
  let worst = { error: 0, bound: 0 };
  field.values.forEach((row, j) => {
    row.forEach((value, q) => {
      // what is certain of it: the longer series has a bound of its own
      const error = Math.abs(value - truth.values[j][q]) - truth.bound![q];
      if (error > worst.error) worst = { error, bound: field.bound![q] };
    });
  });
  return worst;
}

function solve(body: object, modes: number): ResponsesAnswer {
  return solveResponses(readRequest('responses', { ...body, series: { modes } }));
}

function expectSharp(body: object, longModes: number): void {
  const long = solve(body, longModes);
  for (const modes of [20, 200]) {
    const { error, bound } = worstError(solve(body, modes), long);
    expect(bound, `N = ${modes}`).toBeGreaterThanOrEqual(error);
    expect(bound / error, `N = ${modes}`).toBeLessThan(10);
  }
}

describe('a harmonic followed over 1,000 periods: the bound is below ten times the worst error', () => {
  const cable = { kind: 'cable', tension: 400, segments: [{ length: 10, massPerLength: 1 }] };
  const ends = { near: { type: 'fixed' }, far: { type: 'fixed' } };
  const history = { type: 'harmonic', amplitude: 1 };
  const loads = {
    'a point force': (frequency: number) => ({
      type: 'point-force',
      at: 3.7,
      history: { ...history, frequency },
    }),
    'a distributed force': (frequency: number) => ({
      type: 'distributed-force',
      profile: { type: 'uniform', value: 1 },
      history: { ...history, frequency },
    }),
    'a moved end': (frequency: number) => ({
      type: 'end-motion',
      end: 'near',
      quantity: 'displacement',
      history: { ...history, frequency, phase: -Math.PI / 2 },
    }),
  };
  for (const [name, load] of Object.entries(loads)) {
    // the lowest frequency is 1 Hz: below it, between modes, and between higher ones
    for (const frequency of [0.47, 1.3, 12.35]) {
      for (const ratio of [0, 0.01]) {
        it(`${name} at ${frequency} Hz, damping ratio ${ratio}`, () => {
          const beginning = Array.from({ length: 1000 }, (_, j) => j * 0.0003);
          const end = Array.from({ length: 500 }, (_, j) => (1000 / frequency) * (0.9 + (0.1 * j) / 499));
          const body = {
            member: { ...cable, ends, damping: { type: 'ratio', value: ratio } },
            loads: [load(frequency)],
            sample: {
              positions: { count: 21 },
              times: [...beginning, ...end],
              quantities: ['displacement'],
            },
            checks: false,
          };
          expectSharp(body, 1200);
        });
      }
    }
  }
});

it(`a record of ${record.samples} points at the base of twelve layers: the bound is below ten times the worst error`, () => {
  const body = recordRequest(['displacement'], false) as { sample: object };
  // where and when it is worst: near the base, in the strongest half second
  const positions = [...Array.from({ length: 40 }, (_, i) => i * i * 0.004), 10, 20, 30, 40, 50];
  const times = Array.from({ length: 1500 }, (_, j) => 250 + j * 0.0003);
  expectSharp({ ...body, sample: { positions, times, quantities: ['displacement'] } }, 800);
});

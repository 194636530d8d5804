import { performance } from 'node:perf_hooks';
import { plainJson, type WantedAnswer } from './answer-form.ts';
import { runTask } from './serve-task.ts';
import type { SolverOperations } from './task.ts';

/** Rounds until the compiler has seen the solver often enough, and the longest time for them, ms; tuned by trial. */
const rounds = 40;
const longest = 150;

const member = {
  kind: 'bar',
  segments: [
    { length: '3 m', youngsModulus: '210 GPa', area: '2000 mm2', density: '7850 kg/m3' },
    { length: 2, axialStiffness: 2.1e8, massPerLength: 7.85, area: 0.001, foundation: 1e5 },
  ],
  ends: { near: { type: 'fixed' }, far: { type: 'attached', mass: '4 kg', spring: 1e5 } },
  attachments: [{ at: 1.5, mass: 2 }],
  damping: { type: 'ratio', value: 0.01 },
};

/** A small request of every operation that solves one member. */
const solves = {
  modes: {
    member,
    series: { modes: 24 },
    shapes: { positions: { count: 11 } },
    energyShares: true,
    participation: { ends: 'near' },
  },
  responses: {
    member,
    initial: { displacement: { type: 'pull', at: 5, amplitude: 0.001 } },
    loads: [
      { type: 'point-force', at: 2.5, history: { type: 'harmonic', amplitude: '3 kN', frequency: 40 } },
      {
        type: 'end-motion',
        end: 'near',
        quantity: 'acceleration',
        history: { type: 'samples', interval: 0.001, values: [0, 0.4, -0.3, 0.1] },
      },
    ],
    series: { modes: 24 },
    sample: {
      positions: { count: 11 },
      times: { start: 0, end: 0.01, count: 11 },
      quantities: ['displacement', 'velocity', 'force'],
      gaugeTime: 0.001,
    },
  },
  'transfer-functions': {
    member: { ...member, damping: { type: 'loss-factor', value: 0.02 } },
    input: { type: 'end-motion', end: 'near', quantity: 'acceleration' },
    outputs: [
      { at: 5, quantity: 'displacement' },
      { at: 1, quantity: 'force' },
    ],
    frequencies: { from: 20, to: 900, count: 60, spacing: 'logarithmic' },
    refine: true,
    series: { modes: 12 },
  },
};

const picture: WantedAnswer = {
  form: { format: 'png', figure: { view: 'history', width: 320, height: 240, theme: 'light' } },
  codings: ['identity'],
};

/** A small request of every operation. */
const requests: Readonly<Record<string, object>> = {
  ...solves,
  checks: {
    operation: 'responses',
    request: { ...solves.responses, loads: [] },
    criteria: [
      { id: 'displacement', type: 'peak', quantity: 'displacement', limit: '2 mm' },
      { id: 'force', type: 'peak', quantity: 'force', limit: '900 kN', at: '1 m' },
      { id: 'separation', type: 'separation', bands: [['20 Hz', '25 Hz']], margin: 0.1 },
      { id: 'damping', type: 'damping', minimum: 0.005, upTo: '900 Hz' },
    ],
  },
};

/** The body of a small request of an operation. */
export function warmUpBody(operation: string): Uint8Array<ArrayBuffer> {
  return new TextEncoder().encode(JSON.stringify(requests[operation]));
}

/**
 * Solves small requests until the solver is compiled, so that the first request of a new worker is
 * not slow. Throws where one of them is not answered: a worker that cannot solve must not serve.
 */
export function warmUp(operations: SolverOperations): void {
  for (const operation of Object.keys(operations)) {
    const body = warmUpBody(operation);
    const end = performance.now() + longest;
    for (let round = 0; round < rounds && performance.now() < end; round++) {
      const result = runTask(operations, { kind: 'body', operation, body, wanted: plainJson, version: '' });
      if (result.kind !== 'answer')
        throw new Error(`warm-up of ${operation} failed: ${JSON.stringify(result)}`);
    }
  }
  // the first figure of a thread reads the font
  const body = warmUpBody('responses');
  const drawn = runTask(operations, {
    kind: 'body',
    operation: 'responses',
    body,
    wanted: picture,
    version: '',
  });
  if (drawn.kind !== 'answer') throw new Error(`warm-up of figures failed: ${JSON.stringify(drawn)}`);
}

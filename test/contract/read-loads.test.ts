import { describe, expect, it } from 'vitest';
import { canonicalJson } from '../../src/contract/canonical-json.ts';
import { readRequest } from '../../src/contract/read-request.ts';
import type { DistributedForce, EndMotion, History, SampledHistory } from '../../src/spec/types.ts';
import { cable, type Changes, fixed, free, responses, shaft, steelShaft, transfer } from './request-cases.ts';

const sample = { times: { end: 2, count: 11 } };
const loadsOf = (loads: unknown[], changes: Changes = {}) =>
  readRequest('responses', { member: cable(), sample, loads, ...changes }).loads;
const supported = (history: unknown, initial: unknown = {}) =>
  loadsOf([{ type: 'end-motion', end: 'far', quantity: 'displacement', history }], { initial });

/** Every load with every history, in texts with units. */
const inUnits = [
  {
    type: 'point-force',
    at: '15 m',
    history: { type: 'harmonic', amplitude: '3 kN', frequency: '90 /min', phase: '90 deg', start: '20 ms' },
  },
  {
    type: 'distributed-force',
    profile: { type: 'polynomial', coefficients: ['1.5 kN/m', '-20 N/m2'], to: '30 m' },
    history: { type: 'ramp', amplitude: 0.5, duration: '1.5 s' },
  },
  {
    type: 'distributed-force',
    profile: { type: 'pull', at: '15 m', amplitude: '2 kN/m' },
    history: { type: 'step', amplitude: -2 },
  },
  { type: 'body-force', history: { type: 'half-sine-pulse', amplitude: '2 [g]', duration: '11 ms' } },
  {
    type: 'end-motion',
    end: 'near',
    quantity: 'displacement',
    history: { type: 'samples', interval: '10 ms', values: [0, '2 mm', 0.004, '1e-3 m'] },
  },
  {
    type: 'end-motion',
    end: 'far',
    quantity: 'acceleration',
    history: { type: 'rectangular-pulse', amplitude: '50 cm/s2', duration: '0.1 min', start: 1 },
  },
  { type: 'moving-force', force: '-2 kN', speed: '-72 km/h', start: '500 ms' },
];
const inSi = [
  {
    type: 'point-force',
    at: 15,
    history: { type: 'harmonic', amplitude: 3000, frequency: 1.5, phase: Math.PI / 2, start: 0.02 },
  },
  {
    type: 'distributed-force',
    profile: { type: 'polynomial', coefficients: [1500, -20], from: 0, to: 30 },
    history: { type: 'ramp', amplitude: 0.5, duration: 1.5, start: 0 },
  },
  {
    type: 'distributed-force',
    profile: { type: 'pull', at: 15, amplitude: 2000 },
    history: { type: 'step', amplitude: -2, start: 0 },
  },
  // Standard acceleration of free fall, 9.80665 m/s² (ISO 80000-3).
  { type: 'body-force', history: { type: 'half-sine-pulse', amplitude: 19.6133, duration: 0.011, start: 0 } },
  {
    type: 'end-motion',
    end: 'near',
    quantity: 'displacement',
    history: { type: 'samples', interval: 0.01, values: [0, 0.002, 0.004, 0.001], start: 0 },
  },
  {
    type: 'end-motion',
    end: 'far',
    quantity: 'acceleration',
    history: { type: 'rectangular-pulse', amplitude: 0.5, duration: 6, start: 1 },
  },
  { type: 'moving-force', force: -2000, speed: -20, start: 0.5 },
];

describe('loads in the canonical request', () => {
  it('are in SI with their defaults, whatever their units', () => {
    expect(loadsOf(inUnits)).toEqual(inSi);
    expect(loadsOf(inSi)).toEqual(inSi);
  });

  it('need no initial motion, and an initial motion needs no loads', () => {
    expect(readRequest('responses', { member: cable(), sample, loads: inSi }).initial).toEqual({});
    expect(readRequest('responses', responses()).loads).toEqual([]);
    const both = readRequest('responses', responses({ initial: {}, loads: inSi }));
    expect(canonicalJson(readRequest('responses', both))).toBe(canonicalJson(both));
  });

  it('of a shaft are torques and turns', () => {
    const member = shaft(steelShaft, { ends: { near: fixed, far: fixed } });
    const turned = loadsOf(
      [
        { type: 'point-force', at: 1, history: { type: 'step', amplitude: '2 kN.m' } },
        {
          type: 'distributed-force',
          profile: { type: 'uniform', value: '3 kN.m/m' },
          history: { type: 'step', amplitude: 1 },
        },
        { type: 'body-force', history: { type: 'step', amplitude: '180 deg/s2' } },
        {
          type: 'end-motion',
          end: 'near',
          quantity: 'displacement',
          history: { type: 'ramp', amplitude: '90 deg', duration: 1 },
        },
        {
          type: 'end-motion',
          end: 'far',
          quantity: 'acceleration',
          history: { type: 'step', amplitude: '2 rad/s2' },
        },
        { type: 'moving-force', force: '1 kN.m', speed: 1 },
      ],
      { member },
    );
    expect(
      turned.map((load) => ('history' in load ? (load.history as { amplitude: number }).amplitude : 0)),
    ).toEqual([2000, 1, Math.PI, Math.PI / 2, 2, 0]);
    expect((turned[1] as DistributedForce).profile).toMatchObject({ value: 3000 });
    expect(turned[5]).toMatchObject({ force: 1000 });
  });

  it('act at the node that their positions mean', () => {
    const segments = Array.from({ length: 3 }, () => ({ length: 0.1, massPerLength: 1 }));
    const member = cable({ segments, ends: { near: fixed, far: free } });
    const [first, second] = loadsOf(
      [
        { type: 'point-force', at: 0.3, history: { type: 'step', amplitude: 1 } },
        {
          type: 'distributed-force',
          profile: { type: 'polyline', positions: [0.1 - 1e-16, 0.2 + 5e-16, 0.3], values: [0, 1, 0] },
          history: { type: 'step', amplitude: 1 },
        },
      ],
      { member },
    );
    const end = 0.1 + 0.1 + 0.1;
    expect(end).not.toBe(0.3);
    expect(first).toMatchObject({ at: end });
    expect((second as DistributedForce).profile).toMatchObject({ positions: [0.1, 0.2, end] });
  });

  it('take a force that enters while the last gauge still averages', () => {
    const late = { type: 'moving-force', force: 1, speed: 5, start: 2.1 };
    expect(loadsOf([late], { sample: { ...sample, gaugeTime: 0.1 } })).toEqual([late]);
  });
});

describe('an end displacement that does not jump is taken', () => {
  const amplitude = 0.01;
  const begins = { displacement: { type: 'polynomial', coefficients: [0, 0.01 / 45] } };
  it.each<[string, unknown, unknown?]>([
    ['a sine', { type: 'harmonic', amplitude, frequency: 3, phase: '-90 deg' }],
    ['a sine of many turns of phase', { type: 'harmonic', amplitude, frequency: 3, phase: -200.5 * Math.PI }],
    ['a sine that starts late', { type: 'harmonic', amplitude, frequency: 3, phase: '90 deg', start: 1 }],
    ['a cosine from where the member is', { type: 'harmonic', amplitude, frequency: 3 }, begins],
    ['a record from where the member is', { type: 'samples', interval: 1, values: [0.01, 0] }, begins],
    ['a record that begins at the rounding of 0', { type: 'samples', interval: 1, values: [1e-18, 0.01] }],
    ['a step of nothing', { type: 'step', amplitude: 0 }],
    ['a half sine', { type: 'half-sine-pulse', amplitude, duration: 1 }],
    [
      'a ramp beside shapes that are 0 at the end',
      { type: 'ramp', amplitude, duration: 1 },
      {
        displacement: [
          { type: 'pull', at: 20, amplitude: 0.1 },
          { type: 'half-sine', amplitude: 0.2, halfWaves: 3 },
          { type: 'polyline', positions: [0, 5, 45], values: [0, 1, 0] },
          { type: 'polynomial', coefficients: [0, 45, -1] },
        ],
      },
    ],
  ])('%s', (_title, history, initial) => {
    expect(supported(history, initial)).toHaveLength(1);
  });

  it('while an acceleration may jump', () => {
    for (const history of [
      { type: 'step', amplitude },
      { type: 'harmonic', amplitude, frequency: 3 },
      { type: 'samples', interval: 0.1, values: [5, 0], start: 1 },
    ]) {
      const load = { type: 'end-motion', end: 'both', quantity: 'acceleration', history };
      expect(loadsOf([load])).toHaveLength(1);
    }
  });
});

describe('a long record', () => {
  const values = Array.from({ length: 200_000 }, (_, index) => Math.sin(index / 100));
  const history = (list: unknown[]) => ({ type: 'samples', interval: 0.005, values: list });
  const shaken = (list: unknown[]) => ({
    member: cable(),
    sample,
    loads: [{ type: 'end-motion', end: 'near', quantity: 'acceleration', history: history(list) }],
  });

  it('is read whole, within 60 ms', () => {
    const body = shaken(values);
    let shortest = Infinity;
    for (let round = 0; round < 8; round++) {
      const begin = performance.now();
      const { loads } = readRequest('responses', body);
      shortest = Math.min(shortest, performance.now() - begin);
      expect(((loads[0] as EndMotion).history as SampledHistory).values).toEqual(values);
    }
    expect(shortest).toBeLessThan(60);
  });

  it('may be in units', () => {
    const { loads } = readRequest('responses', shaken(Array.from({ length: 200_000 }, () => '0.1 [g]')));
    const read = (loads[0] as EndMotion).history as History & { values: number[] };
    expect(new Set(read.values)).toEqual(new Set([0.980665]));
  });
});

describe('a request of transfer functions', () => {
  it('has its defaults filled in and its units in SI', () => {
    const read = readRequest(
      'transfer-functions',
      transfer({
        member: cable({ damping: { type: 'loss-factor', value: 0.02 } }),
        input: { type: 'outcrop-motion', end: 'far', impedance: '2 kN.s/m', quantity: 'acceleration' },
        outputs: [{ at: '450 cm', quantity: 'force' }],
        frequencies: { from: '0.5 Hz', to: '3000 /min', count: 5 },
      }),
    );
    expect(read).toMatchObject({
      member: { damping: { type: 'loss-factor', value: 0.02 } },
      input: { impedance: 2000 },
      outputs: [{ at: 4.5, quantity: 'force' }],
      frequencies: { from: 0.5, to: 50, count: 5, spacing: 'linear' },
      refine: false,
    });
    expect(canonicalJson(readRequest('transfer-functions', read))).toBe(canonicalJson(read));
  });

  it('takes 0 Hz under a force and a displacement', () => {
    const inputs = [
      { type: 'point-force', at: 3 },
      { type: 'end-motion', end: 'both', quantity: 'displacement' },
      { type: 'outcrop-motion', end: 'near', impedance: 1, quantity: 'displacement' },
    ];
    for (const input of inputs) {
      const { frequencies } = readRequest('transfer-functions', transfer({ input, frequencies: [0, 1] }));
      expect(frequencies).toEqual([0, 1]);
    }
  });

  it('has outputs and input at the node that their positions mean', () => {
    const segments = Array.from({ length: 3 }, () => ({ length: 0.1, massPerLength: 1 }));
    const read = readRequest(
      'transfer-functions',
      transfer({
        member: cable({ segments, ends: { near: fixed, far: free } }),
        input: { type: 'point-force', at: '0.3 m' },
        outputs: [{ at: 0.3, quantity: 'force' }],
      }),
    );
    const end = 0.1 + 0.1 + 0.1;
    expect(read.input).toEqual({ type: 'point-force', at: end });
    expect(read.outputs).toEqual([{ at: end, quantity: 'force' }]);
  });

  it('measures the half-space under a shaft in newton metre seconds', () => {
    const read = readRequest(
      'transfer-functions',
      transfer({
        member: shaft(steelShaft),
        input: { type: 'outcrop-motion', end: 'near', impedance: '3 kN.m.s/rad', quantity: 'displacement' },
        outputs: [{ at: 2, quantity: 'stress' }],
      }),
    );
    expect(read.input).toMatchObject({ impedance: 3000 });
  });
});

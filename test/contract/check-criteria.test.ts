import { describe, expect, it } from 'vitest';
import { identifyRequest } from '../../src/contract/identify-request.ts';
import { readRequest } from '../../src/contract/read-request.ts';
import { Fault } from '../../src/faults/fault.ts';
import type { PeakCriterion } from '../../src/spec/types.ts';
import { tautString } from '../support/checks.ts';

const modes = { member: tautString, series: { modes: 3 } };
const responses = {
  member: tautString,
  initial: { displacement: { type: 'pull', at: 1, amplitude: 0.01 } },
  sample: { times: [0, 1], quantities: ['displacement', 'force'] },
};
const transfer = {
  member: { ...tautString, damping: { type: 'loss-factor', value: 0.02 } },
  input: { type: 'point-force', at: 1 },
  outputs: [
    { at: 1, quantity: 'displacement' },
    { at: 0.5, quantity: 'force' },
  ],
  frequencies: [10],
};
const peak = { id: 'a', type: 'peak', quantity: 'displacement', limit: 1 };
const range = { id: 'a', type: 'frequency-range', order: 1, min: 1 };
const separation = { id: 'a', type: 'separation', bands: [[1, 2]], margin: 0.1 };
const vortex = { id: 'a', type: 'vortex', diameter: 0.1, strouhal: 0.2, wind: [1, 2] };

const of = (operation: string, request: object, ...criteria: object[]) => ({ operation, request, criteria });

function faultsOf(body: unknown): Fault['records'] {
  try {
    readRequest('checks', body);
    return [];
  } catch (error) {
    if (error instanceof Fault) return error.records;
    throw error;
  }
}

type Row = [title: string, body: unknown, code: string, pointer: string, wording: RegExp];
const rows: Row[] = [
  [
    'no operation',
    { request: modes, criteria: [range] },
    'missing-key',
    '/operation',
    /modes, responses, transfer/,
  ],
  ['an unknown operation', of('statics', modes, range), 'not-one-of', '/operation', /"statics"/],
  ['no request', { operation: 'modes', criteria: [range] }, 'missing-key', '/request', /request is missing/],
  ['no criteria', of('modes', modes), 'too-few-items', '/criteria', /at least 1/],
  ['an unknown key', { ...of('modes', modes, range), limit: 1 }, 'unknown-key', '/limit', /criteria/],
  [
    'an unknown type',
    of('modes', modes, { id: 'a', type: 'peek' }),
    'not-one-of',
    '/criteria/0/type',
    /frequency-range/,
  ],
  ['no type', of('modes', modes, { id: 'a' }), 'missing-key', '/criteria/0/type', /peak/],
  [
    'no id',
    of('modes', modes, { ...range, id: undefined }),
    'missing-key',
    '/criteria/0/id',
    /Name of the criterion/,
  ],
  ['an empty id', of('modes', modes, { ...range, id: '' }), 'text-length', '/criteria/0/id', /1 to 200/],
  [
    'two criteria of one name',
    of('modes', modes, range, { ...range, max: 9 }),
    'criterion-repeated',
    '/criteria/1/id',
    /criterion 0/,
  ],
  [
    'a wrong report',
    { ...of('modes', modes, range), undetermined: 'pass' },
    'not-one-of',
    '/undetermined',
    /fail, skip/,
  ],
  [
    'a fault of the request within',
    of('modes', { ...modes, series: { modes: 0 } }, range),
    'out-of-range',
    '/request/series/modes',
    /1 or more/,
  ],
  [
    'a member within that cannot be solved',
    of('modes', { ...modes, member: { ...tautString, attachments: [{ at: 3, mass: 1 }] } }, range),
    'attachment-outside',
    '/request/member/attachments/0/at',
    /3 m/,
  ],
  [
    'a peak of modes',
    of('modes', modes, peak),
    'criterion-misplaced',
    '/criteria/0/type',
    /"peak" is held against responses, but the operation is "modes"/,
  ],
  [
    'a transfer function of responses',
    of('responses', responses, { id: 'a', type: 'transfer', band: [1, 2], limit: 1 }),
    'criterion-misplaced',
    '/criteria/0/type',
    /transfer-functions/,
  ],
  [
    'effective mass of responses',
    of('responses', responses, { id: 'a', type: 'effective-mass', minimum: 0.9 }),
    'criterion-misplaced',
    '/criteria/0/type',
    /modes/,
  ],
  [
    'a quantity that is not sampled',
    of('responses', responses, { ...peak, quantity: 'velocity' }),
    'criterion-not-sampled',
    '/criteria/0/quantity',
    /displacement, force, but the criterion is on velocity/,
  ],
  [
    'a limit of 0',
    of('responses', responses, { ...peak, limit: 0 }),
    'out-of-range',
    '/criteria/0/limit',
    /above 0 m/,
  ],
  [
    'a negative limit',
    of('responses', responses, { ...peak, limit: '-3 mm' }),
    'out-of-range',
    '/criteria/0/limit',
    /-3 mm/,
  ],
  [
    'a limit of the wrong unit',
    of('responses', responses, { ...peak, limit: '3 kN' }),
    'unit-dimension',
    '/criteria/0/limit',
    /a force, but a length/,
  ],
  [
    'a limit of force in metres',
    of('responses', responses, { ...peak, quantity: 'force', limit: '3 mm' }),
    'unit-dimension',
    '/criteria/0/limit',
    /a length, but a force/,
  ],
  [
    'a position beyond the member',
    of('responses', responses, { ...peak, at: 3 }),
    'position-outside',
    '/criteria/0/at',
    /3 m/,
  ],
  [
    'one of several positions beyond it',
    of('responses', responses, { ...peak, at: [1, 3] }),
    'position-outside',
    '/criteria/0/at/1',
    /3 m/,
  ],
  [
    'positions that are neither number nor list',
    of('responses', responses, { ...peak, at: { from: 0 } }),
    'wrong-type',
    '/criteria/0/at',
    /a number or a list/,
  ],
  [
    'a gauge for a displacement',
    of('responses', responses, { ...peak, gaugeTime: 1e-3 }),
    'gauge-without-use',
    '/criteria/0/gaugeTime',
    /displacement is bounded at every instant/,
  ],
  [
    'a range without limits',
    of('modes', modes, { ...range, min: undefined }),
    'criterion-without-limit',
    '/criteria/0',
    /"min" nor "max"/,
  ],
  [
    'a range reversed',
    of('modes', modes, { ...range, min: 5, max: 4 }),
    'range-reversed',
    '/criteria/0/max',
    /5 Hz and ends below it, at 4 Hz/,
  ],
  ['mode 0', of('modes', modes, { ...range, order: 0 }), 'out-of-range', '/criteria/0/order', /1 or more/],
  [
    'a band reversed',
    of('modes', modes, {
      ...separation,
      bands: [
        [1, 2],
        [4, 3],
      ],
    }),
    'range-reversed',
    '/criteria/0/bands/1',
    /bands 1 begins at 4 Hz/,
  ],
  [
    'a band of one frequency',
    of('modes', modes, { ...separation, bands: [[1]] }),
    'too-few-items',
    '/criteria/0/bands/0',
    /at least 2/,
  ],
  [
    'a margin of everything',
    of('modes', modes, { ...separation, margin: 1 }),
    'out-of-range',
    '/criteria/0/margin',
    /below 1/,
  ],
  [
    'the multiple 0',
    of('modes', modes, { ...separation, multiples: [0] }),
    'out-of-range',
    '/criteria/0/multiples/0',
    /0\.01/,
  ],
  [
    'wind reversed',
    of('modes', modes, { ...vortex, wind: ['9 m/s', 2] }),
    'range-reversed',
    '/criteria/0/wind',
    /9 m\/s and ends below it, at 2 m\/s/,
  ],
  [
    'no diameter',
    of('modes', modes, { ...vortex, diameter: 0 }),
    'out-of-range',
    '/criteria/0/diameter',
    /above 0 m/,
  ],
  [
    'vortices of a bar',
    of(
      'modes',
      {
        member: {
          kind: 'bar',
          segments: [{ length: 1, axialStiffness: 1, massPerLength: 1 }],
          ends: tautString.ends,
        },
        series: { modes: 1 },
      },
      vortex,
    ),
    'vortex-on-kind',
    '/criteria/0/type',
    /a bar is solved for other motions/,
  ],
  [
    'effective mass without participation',
    of('modes', modes, { id: 'a', type: 'effective-mass', minimum: 0.9 }),
    'criterion-without-participation',
    '/criteria/0/type',
    /"participation"/,
  ],
  [
    'more effective mass than there is',
    of('modes', modes, { id: 'a', type: 'effective-mass', minimum: 1.1 }),
    'out-of-range',
    '/criteria/0/minimum',
    /at most 1/,
  ],
  [
    'damping of all modes of responses',
    of('responses', responses, { id: 'a', type: 'damping', minimum: 0.01 }),
    'criterion-without-band',
    '/criteria/0',
    /"upTo"/,
  ],
  [
    'the ratio of a loss factor',
    of('transfer-functions', transfer, { id: 'a', type: 'damping', minimum: 0.01, upTo: 9 }),
    'criterion-on-loss-factor',
    '/criteria/0/type',
    /no damping ratio/,
  ],
  [
    'one limit for displacement and force',
    of('transfer-functions', transfer, { id: 'a', type: 'transfer', band: [1, 2], limit: 1 }),
    'criterion-outputs-mixed',
    '/criteria/0',
    /displacement, force/,
  ],
  [
    'an output that does not exist',
    of('transfer-functions', transfer, { id: 'a', type: 'transfer', band: [1, 2], limit: 1, output: 2 }),
    'criterion-output-missing',
    '/criteria/0/output',
    /no output 2; the request has 2/,
  ],
  [
    'a transfer band reversed',
    of('transfer-functions', transfer, { id: 'a', type: 'transfer', band: [3, 2], limit: 1, output: 0 }),
    'range-reversed',
    '/criteria/0/band',
    /3 Hz/,
  ],
  [
    'a transfer limit of the wrong unit',
    of('transfer-functions', transfer, { id: 'a', type: 'transfer', band: [1, 2], limit: '3 mm', output: 0 }),
    'unit-dimension',
    '/criteria/0/limit',
    /\(m\)\/\(N\)/,
  ],
];

describe('wrong checks are answered with exactly their faults', () => {
  it.each(rows)('%s', (_title, body, code, pointer, wording) => {
    const records = faultsOf(JSON.parse(JSON.stringify(body)));
    expect(records.map((record) => [record.code, record.pointer])).toEqual([[code, pointer]]);
    expect(records[0].detail).toMatch(wording);
    expect(records[0].detail).not.toMatch(/undefined|\{\w+\}|\?\s*$|\[object/);
  });

  it('lists those of the request within and those of the criteria together', () => {
    const body = of(
      'modes',
      { ...modes, member: { ...tautString, tension: -1 } },
      { ...range, order: 0 },
      separation,
    );
    expect(faultsOf(body).map(({ pointer }) => pointer)).toEqual([
      '/request/member/tension',
      '/criteria/0/order',
      '/criteria/1/id',
    ]);
  });
});

describe('equal checks', () => {
  const digest = (criterion: object) =>
    identifyRequest('checks', readRequest('checks', of('responses', responses, criterion)), '1').digest;

  it('have one digest: units, defaults and a single position aside', () => {
    expect(digest({ ...peak, limit: '1000 mm', at: '50 cm' })).toBe(digest({ ...peak, limit: 1, at: [0.5] }));
  });

  it('keep the canonical request within', () => {
    const read = readRequest('checks', of('responses', responses, { ...peak, at: 1 }));
    expect(read.request).toEqual(readRequest('responses', responses));
    expect((read.criteria[0] as PeakCriterion).at).toEqual([1]);
    expect(read.undetermined).toBe('fail');
  });
});

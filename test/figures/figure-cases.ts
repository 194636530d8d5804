import { readFileSync } from 'node:fs';
import { readRequest } from '../../src/contract/read-request.ts';
import { solveModes } from '../../src/solutions/modes.ts';
import { solveResponses } from '../../src/solutions/responses.ts';
import { solveTransferFunctions } from '../../src/solutions/transfer-functions.ts';
import type { FigureOperation } from '../../src/figures/views.ts';

/** A solved request whose figures are drawn. */
export interface FigureCase {
  readonly name: string;
  readonly operation: FigureOperation;
  readonly request: unknown;
  readonly answer: unknown;
}

const fixed = { type: 'fixed' };
const free = { type: 'free' };
const cable = {
  kind: 'cable',
  tension: 2.4e6,
  segments: [{ length: 45, massPerLength: 58 }],
  ends: { near: fixed, far: fixed },
};
const rod = {
  kind: 'bar',
  segments: [{ length: 12, youngsModulus: 2.1e11, area: 0.002, density: 7850 }],
  ends: { near: free, far: free },
};
const attached = {
  kind: 'cable',
  tension: 3e5,
  segments: [
    { length: 9, massPerLength: 12, name: 'span of the <old> line' },
    { length: 14, massPerLength: 20, name: 'span & extension' },
  ],
  ends: { near: { type: 'attached', mass: 40, spring: 2e5 }, far: { type: 'attached', spring: 4e5 } },
  attachments: [
    { at: 4, mass: 30, name: 'lamp "A"' },
    { at: 4.3, mass: 30, name: 'a second lamp with a rather long name' },
    { at: 12, spring: 3e4, name: 'stay <A&B>' },
    { at: 18.5, mass: 80, spring: 5e4, name: 'signal bridge' },
  ],
};
const layers = Array.from({ length: 12 }, (_, i) => ({
  length: 1.5 + (i % 4),
  shearWaveSpeed: 520 - 33 * i,
  density: 2100 - 25 * i,
  name: ['weathered rock', 'gravel', 'stiff clay', 'sand', 'silt', 'peat'][i % 6],
}));
const column = {
  kind: 'shear-column',
  segments: layers,
  ends: { near: fixed, far: free },
  damping: { type: 'ratio', value: 0.03 },
};
const discs = {
  kind: 'shaft',
  segments: [
    { length: 0.35, shearModulus: 8e10, density: 7850, outerDiameter: 0.05 },
    { length: 0.25, shearModulus: 8e10, density: 7850, outerDiameter: 0.07, innerDiameter: 0.03 },
  ],
  ends: { near: { type: 'attached', inertia: 0.4 }, far: { type: 'attached', inertia: 0.2, spring: 900 } },
};
const shapes = { positions: { count: 101 } };
const pull = (amplitude: number) => ({ displacement: { type: 'pull', at: 15, amplitude } });
const sample = (quantities: string[], extra = {}) => ({
  positions: { count: 61 },
  times: { end: 1.2, count: 241 },
  quantities,
  ...extra,
});

/** Bodies by name; each exercises something that a drawing can get wrong. */
const bodies: readonly (readonly [name: string, operation: FigureOperation, body: unknown])[] = [
  [
    'many-attachments',
    'modes',
    {
      member: {
        ...cable,
        attachments: Array.from({ length: 120 }, (_, i) => ({
          at: 0.2 + 0.37 * i,
          mass: 3,
          spring: i % 3 === 0 ? 100 : 0,
          name: `hanger number ${i}`,
        })),
      },
      series: { modes: 12 },
      shapes,
    },
  ],
  [
    'long-names',
    'responses',
    {
      member: {
        ...cable,
        attachments: [
          { at: 15, mass: 30, name: 'W'.repeat(90) },
          { at: 30, mass: 30, name: 'Ω 漢字 '.repeat(12) },
        ],
      },
      initial: pull(0.1),
      series: { modes: 8 },
      sample: sample(['displacement']),
    },
  ],
  [
    'lumps',
    'responses',
    {
      member: {
        kind: 'wave',
        segments: [
          { length: 1e-3, stiffness: 1e-9, inertia: 0 },
          { length: 2e-3, stiffness: 2e-9, inertia: 0 },
        ],
        ends: { near: fixed, far: { type: 'attached', mass: 1e-12 } },
        attachments: [{ at: 1e-3, mass: 3e-12 }],
      },
      initial: { massVelocities: [{ at: 1e-3, velocity: 1e-6 }] },
      sample: {
        positions: { count: 11 },
        times: { end: 1e-3, count: 101 },
        quantities: ['displacement', 'force'],
      },
    },
  ],
  ['modes-1', 'modes', { member: cable, series: { modes: 1 }, shapes }],
  [
    'modes-64',
    'modes',
    { member: cable, series: { modes: 64 }, shapes: { ...shapes, normalisation: 'peak' } },
  ],
  ['modes-rigid', 'modes', { member: rod, series: { modes: 5 }, shapes, participation: { ends: 'uniform' } }],
  [
    'modes-layers',
    'modes',
    { member: column, series: { modes: 20 }, shapes, participation: { ends: 'near' } },
  ],
  ['modes-attached', 'modes', { member: attached, series: { modes: 7 }, shapes }],
  [
    'modes-shaft-force',
    'modes',
    { member: discs, series: { modes: 3 }, shapes: { ...shapes, quantities: ['force'] } },
  ],
  ['modes-2000', 'modes', { member: cable, series: { modes: 2000 } }],
  [
    'pull-attached',
    'responses',
    {
      member: attached,
      initial: pull(0.02),
      sample: sample(['displacement', 'force'], { gaugeTime: 0.004 }),
    },
  ],
  [
    'pull-1-mode',
    'responses',
    { member: cable, initial: pull(0.1), series: { modes: 1 }, sample: sample(['displacement', 'force']) },
  ],
  [
    'pull-64-modes',
    'responses',
    {
      member: cable,
      initial: pull(0.1),
      series: { modes: 64 },
      sample: sample(['displacement', 'velocity', 'force']),
    },
  ],
  [
    'pull-loose',
    'responses',
    { member: cable, initial: pull(0.1), series: { modes: 4 }, sample: sample(['displacement']) },
  ],
  [
    'struck-rod',
    'responses',
    {
      member: rod,
      initial: { velocity: { type: 'uniform', value: 3, from: 0, to: 1 } },
      sample: {
        positions: { count: 41 },
        times: { end: 0.02, count: 301 },
        quantities: ['displacement', 'stress'],
        gaugeTime: 1e-4,
      },
    },
  ],
  [
    'column-shaken',
    'responses',
    {
      member: column,
      loads: [
        {
          type: 'end-motion',
          end: 'near',
          quantity: 'acceleration',
          history: { type: 'harmonic', amplitude: 1.5, frequency: 2.2 },
        },
      ],
      sample: {
        positions: { count: 60 },
        times: { end: 4, count: 801 },
        quantities: ['relativeDisplacement', 'force'],
        gaugeTime: 0.02,
      },
    },
  ],
  [
    'column-released',
    'responses',
    {
      member: column,
      initial: { displacement: { type: 'pull', at: 30, force: 2e6 } },
      sample: sample(['displacement']),
    },
  ],
  [
    'zeros',
    'responses',
    {
      member: cable,
      initial: { velocity: { type: 'uniform', value: 0 } },
      sample: sample(['displacement', 'force']),
    },
  ],
  [
    'tiny',
    'responses',
    { member: cable, initial: pull(1e-12), sample: sample(['displacement', 'force'], { gaugeTime: 0.004 }) },
  ],
  [
    'huge',
    'responses',
    { member: cable, initial: pull(1e12), sample: sample(['displacement', 'force'], { gaugeTime: 0.004 }) },
  ],
  [
    'few-samples',
    'responses',
    {
      member: cable,
      initial: pull(0.1),
      sample: { positions: [30, 7.5, 15], times: [0, 0.1, 0.25], quantities: ['displacement'] },
    },
  ],
  [
    'late',
    'responses',
    {
      member: cable,
      initial: pull(0.1),
      sample: {
        positions: { count: 31 },
        times: { start: 100_000, end: 100_000.5, count: 101 },
        quantities: ['displacement'],
      },
    },
  ],
  [
    'transfer-three',
    'transfer-functions',
    {
      member: {
        ...attached,
        damping: { type: 'rayleigh', massCoefficient: 0.4, stiffnessCoefficient: 1e-4 },
      },
      input: { type: 'point-force', at: 12 },
      outputs: [
        { at: 12, quantity: 'displacement' },
        { at: 4, quantity: 'displacement' },
        { at: 18.5, quantity: 'acceleration' },
        { at: 9, quantity: 'force' },
      ],
      frequencies: { from: 0.2, to: 30, count: 900, spacing: 'logarithmic' },
    },
  ],
  [
    'transfer-series',
    'transfer-functions',
    {
      member: { ...cable, damping: { type: 'ratio', value: 0.01 } },
      input: { type: 'point-force', at: 15 },
      outputs: [{ at: 15, quantity: 'displacement' }],
      frequencies: { from: 0.5, to: 6, count: 400 },
      series: { modes: 3 },
    },
  ],
  [
    'transfer-narrow',
    'transfer-functions',
    {
      member: column,
      input: { type: 'end-motion', end: 'near', quantity: 'acceleration' },
      outputs: [{ at: 30, quantity: 'acceleration' }],
      frequencies: { from: 1000, to: 1000.01, count: 5 },
    },
  ],
];

const solvers = {
  modes: solveModes,
  responses: solveResponses,
  'transfer-functions': solveTransferFunctions,
} as unknown as Record<FigureOperation, (request: unknown) => unknown>;

function solved(name: string, operation: FigureOperation, body: unknown): FigureCase {
  const request = readRequest(operation, body);
  return { name, operation, request, answer: solvers[operation](request) };
}

/** One case by its name. */
export function figureCase(name: string): FigureCase {
  const found = bodies.find(([each]) => each === name);
  if (found === undefined) throw new Error(`no figure case "${name}"`);
  return solved(...found);
}

/** An example of the reference page, solved. */
export function exampleCase(name: string, operation: FigureOperation): FigureCase {
  const text = readFileSync(new URL(`../../schemas/examples/${name}.json`, import.meta.url), 'utf8');
  return solved(name, operation, JSON.parse(text));
}

/** All hard cases and the examples. */
export function allCases(): FigureCase[] {
  return [
    ...bodies.map((body) => solved(...body)),
    exampleCase('stay-cable-release', 'responses'),
    exampleCase('struck-pile', 'responses'),
    exampleCase('shaken-soil-column', 'responses'),
    exampleCase('load-crossing-cable', 'responses'),
    exampleCase('machine-on-tie-rod', 'responses'),
    exampleCase('layered-soil-modes', 'modes'),
    exampleCase('soil-column-transfer', 'transfer-functions'),
  ];
}

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalJson } from '../../src/contract/canonical-json.ts';
import { type Operation, readRequest } from '../../src/contract/read-request.ts';
import { Fault } from '../../src/faults/fault.ts';
import { badRequests } from './bad-requests.ts';
import { cable, modes, responses, transfer } from './request-cases.ts';

/** Freezes a document to its last leaf, so that any change of it throws. */
function deepFreeze<T>(value: T): T {
  if (typeof value === 'object' && value !== null) Object.values(Object.freeze(value)).forEach(deepFreeze);
  return value;
}

const series = (given: object) => readRequest('responses', responses({ series: given })).series;

describe('the canonical request', () => {
  it('has every default filled in', () => {
    expect(readRequest('responses', responses())).toEqual({
      member: {
        kind: 'cable',
        tension: 2.4e6,
        segments: [{ length: 45, massPerLength: 58, foundation: 0, drag: 0 }],
        ends: { near: { type: 'fixed' }, far: { type: 'fixed' } },
        attachments: [],
      },
      initial: { displacement: { type: 'pull', at: 15, amplitude: 0.02 } },
      loads: [],
      series: { relativeTolerance: 1e-3, maxModes: 4096 },
      sample: {
        positions: { count: 101 },
        times: { start: 0, end: 2, count: 11 },
        quantities: ['displacement'],
        gaugeTime: 0,
      },
      checks: true,
    });
    const { shapes, energyShares } = readRequest('modes', modes({ shapes: { positions: [3] } }));
    expect(shapes).toEqual({ positions: [3], normalisation: 'mass', quantities: ['displacement'] });
    expect(energyShares).toBe(false);
  });

  it('fills the defaults of the alternative that is meant', () => {
    expect(series({})).toEqual({ relativeTolerance: 1e-3, maxModes: 4096 });
    expect(series({ maxModes: 7 })).toEqual({ relativeTolerance: 1e-3, maxModes: 7 });
    expect(series({ tolerances: { force: '2 kN' } })).toEqual({
      tolerances: { force: 2000 },
      maxModes: 4096,
    });
    expect(series({ modes: 5 })).toEqual({ modes: 5 });
    const layer = { length: 1, shearWaveSpeed: '200 m/s', density: '1.9 t/m3' };
    const member = {
      kind: 'shear-column',
      segments: [layer],
      ends: { near: { type: 'fixed' }, far: { type: 'free' } },
    };
    expect(readRequest('modes', modes({ member })).member.segments[0]).toEqual({
      length: 1,
      shearWaveSpeed: 200,
      density: 1900,
      area: 1,
      foundation: 0,
      drag: 0,
    });
  });

  it('is the same for SI numbers and for texts with units', () => {
    const inUnits = responses({
      member: cable({
        tension: '2.4 MN',
        segments: [{ length: '45000 mm', massPerLength: '58e-3 t/m', foundation: '1.2 kN/m2' }],
        ends: { near: { type: 'fixed' }, far: { type: 'attached', mass: '0.12 t', spring: '1 MN/m' } },
        attachments: [{ at: '12.5 m', mass: '30 kg' }],
        damping: { type: 'rayleigh', massCoefficient: '0.02 1/s', stiffnessCoefficient: '0.1 ms' },
      }),
      initial: {
        displacement: [
          { type: 'polynomial', coefficients: ['0 m', '2 mm/m', '-3e-2 mm/m2'], to: '45 m' },
          { type: 'polyline', positions: ['0 m', '20 m', '45 m'], values: [0, '1.5 cm', 0] },
        ],
        velocity: { type: 'uniform', value: '3.6 km/h', from: '1 m' },
        massVelocities: [{ at: '12.5 m', velocity: '1 m/s' }],
        impulses: [{ at: '12.5 m', impulse: '2 kN.s', width: '100 mm' }],
      },
      sample: { positions: ['1 m', 2], times: ['0 s', '10 ms', 1], gaugeTime: '2 ms' },
    });
    const inSi = responses({
      member: cable({
        tension: 2.4e6,
        segments: [{ length: 45, massPerLength: 58, foundation: 1200 }],
        ends: { near: { type: 'fixed' }, far: { type: 'attached', mass: 120, spring: 1e6 } },
        attachments: [{ at: 12.5, mass: 30 }],
        damping: { type: 'rayleigh', massCoefficient: 0.02, stiffnessCoefficient: 0.0001 },
      }),
      initial: {
        displacement: [
          { type: 'polynomial', coefficients: [0, 0.002, -0.00003], to: 45 },
          { type: 'polyline', positions: [0, 20, 45], values: [0, 0.015, 0] },
        ],
        velocity: { type: 'uniform', value: 1, from: 1 },
        massVelocities: [{ at: 12.5, velocity: 1 }],
        impulses: [{ at: 12.5, impulse: 2000, width: 0.1 }],
      },
      sample: { positions: [1, 2], times: [0, 0.01, 1], gaugeTime: 0.002 },
    });
    expect(canonicalJson(readRequest('responses', inUnits))).toBe(
      canonicalJson(readRequest('responses', inSi)),
    );
  });

  it('measures a shaft in radians, newton metres and their like', () => {
    const member = {
      kind: 'shaft',
      segments: [{ length: 2, shearModulus: '80 GPa', density: '7850 kg/m3', outerDiameter: '4 [in_i]' }],
      ends: { near: { type: 'fixed' }, far: { type: 'attached', inertia: '3 kg.m2', spring: '2 kN.m/rad' } },
      attachments: [{ at: 1, spring: '5 kN.m' }],
    };
    const read = readRequest('responses', {
      member,
      initial: {
        displacement: [
          { type: 'pull', at: 1, force: '2 kN.m' },
          { type: 'half-sine', amplitude: '180 deg' },
        ],
        velocity: { type: 'uniform', value: '90 deg/s', from: 1 },
        impulses: [{ at: 2, impulse: '1 kN.m.s' }],
      },
      series: { tolerances: { displacement: '1 mrad', force: '10 N.m' } },
      sample: { times: [1] },
    });
    expect(read.member).toMatchObject({
      segments: [{ outerDiameter: 0.1016 }],
      ends: { far: { inertia: 3, spring: 2000 } },
      attachments: [{ spring: 5000 }],
    });
    expect(read.initial).toEqual({
      displacement: [
        { type: 'pull', at: 1, force: 2000 },
        { type: 'half-sine', amplitude: Math.PI, halfWaves: 1 },
      ],
      velocity: { type: 'uniform', value: Math.PI / 2, from: 1 },
      impulses: [{ at: 2, impulse: 1000 }],
    });
    expect(read.series).toMatchObject({ tolerances: { displacement: 0.001, force: 10 } });
  });

  it('has positions near a node at the node', () => {
    const segments = Array.from({ length: 3 }, () => ({ length: 0.1, massPerLength: 1 }));
    const end = 0.1 + 0.1 + 0.1;
    const member = cable({
      segments,
      attachments: [
        { at: 0.1 + 1e-17, mass: 1 },
        { at: 0.2 + 2e-16, mass: 1 },
      ],
    });
    const request = readRequest('responses', {
      member,
      initial: {
        displacement: { type: 'polyline', positions: [0, 0.1 + 0.1 + 5e-16, end - 5e-16], values: [0, 1, 0] },
        massVelocities: [{ at: 0.2 - 5e-16, velocity: 1 }],
      },
      sample: { positions: [0.1 - 1e-15, 0.15, 0.3], times: [0] },
    });
    const node = request.member.attachments[1].at;
    expect(request.initial.displacement).toMatchObject({ positions: [0, node, end] });
    expect(request.initial.massVelocities).toEqual([{ at: node, velocity: 1 }]);
    expect(request.sample.positions).toEqual([0.1, 0.15, end]);
    expect(end).not.toBe(0.3);
  });

  it('has no negative zero and no key of its own', () => {
    const request = readRequest(
      'responses',
      responses({ initial: { displacement: { type: 'uniform', value: -0 } } }),
    );
    expect(Object.is((request.initial.displacement as { value: number }).value, 0)).toBe(true);
    expect(Object.keys(request).toSorted()).toEqual([
      'checks',
      'initial',
      'loads',
      'member',
      'sample',
      'series',
    ]);
  });

  it('is read again as itself', () => {
    const once = readRequest('responses', responses());
    expect(canonicalJson(readRequest('responses', once))).toBe(canonicalJson(once));
  });
});

/** What becomes of a body; a request that is read must be read again as itself. */
function outcome(operation: Operation, body: unknown): 'read' | 'refused' {
  try {
    const read = readRequest(operation, deepFreeze(body));
    expect(canonicalJson(readRequest(operation, read))).toBe(canonicalJson(read));
    return 'read';
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    expect(error.records.length).toBeGreaterThan(0);
    for (const { pointer, detail } of error.records) {
      expect(pointer).toMatch(/^(\/([^~/]|~[01])*)*$/);
      expect(detail.length).toBeGreaterThan(10);
    }
    return 'refused';
  }
}

function codesOf(body: unknown): string[] {
  try {
    readRequest('modes', body);
    return [];
  } catch (error) {
    if (error instanceof Fault) return error.records.map(({ code }) => code);
    throw error;
  }
}

describe('no body makes the reader throw anything but Fault, or change the body', () => {
  it('any JSON value', () => {
    const anything = fc.oneof(
      fc.jsonValue(),
      fc.anything(),
      fc.json().map((text) => JSON.parse(text)),
    );
    fc.assert(
      fc.property(
        fc.constantFrom<Operation>('modes', 'responses', 'transfer-functions'),
        anything,
        (operation, body) => {
          expect(outcome(operation, body)).toBe('refused');
        },
      ),
      { numRuns: 1000 },
    );
  });

  it('requests with one thing changed', () => {
    // Lists at the limits of their length are left out: they take long and are tested by themselves.
    const bodies = badRequests
      .filter(({ body }) => JSON.stringify(body).length < 10_000)
      .map(({ operation, body }) => ({ operation, body }));
    const good = [
      { operation: 'modes' as const, body: modes({ shapes: { positions: [1, '2 m'] } }) },
      {
        operation: 'responses' as const,
        body: responses({ series: { tolerances: { displacement: '1 mm' } } }),
      },
      ...allLoads().map((load) => ({ operation: 'responses' as const, body: responses({ loads: [load] }) })),
      {
        operation: 'transfer-functions' as const,
        body: transfer({ frequencies: { from: 1, to: 5, count: 4 }, series: { modes: 3 } }),
      },
    ];
    const strange = fc.oneof(
      fc.constantFrom<unknown>(
        null,
        true,
        -1,
        0,
        0.5,
        1e300,
        NaN,
        '',
        '3 m',
        '1e3',
        'm',
        [],
        {},
        [[]],
        [{}],
        '3 kg',
      ),
      fc.jsonValue({ maxDepth: 2 }),
    );
    let read = 0;
    fc.assert(
      fc.property(
        fc.constantFrom(...bodies, ...good),
        fc.nat(),
        strange,
        fc.string(),
        (row, place, value, key) => {
          const body: unknown = structuredClone(row.body);
          const holders = objectsWithin(body);
          if (holders.length === 0) return;
          const holder = holders[place % holders.length] as Record<string, unknown>;
          const keys = Object.keys(holder);
          const target = keys[place % (keys.length + 1)] ?? key;
          if (target === '__proto__') return;
          if (value === null && target in holder) delete holder[target];
          else holder[target] = value;
          if (outcome(row.operation, body) === 'read') read++;
        },
      ),
      { numRuns: 3000 },
    );
    expect(read).toBeGreaterThan(0);
  });

  it('structures beyond measure', () => {
    let deep: unknown = 1;
    for (let i = 0; i < 100_000; i++) deep = [deep];
    expect(codesOf(modes({ member: deep }))).toEqual(['nested-too-deep']);
    const cyclic: Record<string, unknown> = {};
    cyclic.member = cyclic;
    expect(codesOf(cyclic)).toEqual(['nested-too-deep']);
    const wide = Object.fromEntries(Array.from({ length: 5000 }, (_, index) => [`k${index}`, 1]));
    expect(codesOf(modes({ member: wide }))).toEqual(['too-many-keys']);
    const proto: unknown = JSON.parse('{"member": {"__proto__": {"kind": "cable"}}, "series": {"modes": 1}}');
    expect(codesOf(proto)).toEqual(['reserved-key', 'missing-key']);
    expect(codesOf(modes({ series: { modes: Infinity } }))).toEqual(['number-magnitude']);
    const long = Array.from({ length: 1_000_001 }, () => 0);
    expect(codesOf(modes({ shapes: { positions: long } }))).toEqual(['too-many-items']);
  });
});

/** A load of every type, with a history of every type. */
function allLoads(): object[] {
  const histories = [
    { type: 'harmonic', amplitude: 1, frequency: 2, phase: '-90 deg' },
    { type: 'ramp', amplitude: 1, duration: '1 s' },
    { type: 'half-sine-pulse', amplitude: 1, duration: 1, start: 0.5 },
    { type: 'samples', interval: 0.1, values: [0, 1, 2] },
  ];
  return [
    ...histories.flatMap((history) => [
      { type: 'point-force', at: '3 m', history },
      { type: 'end-motion', end: 'near', quantity: 'displacement', history },
    ]),
    {
      type: 'distributed-force',
      profile: { type: 'uniform', value: '1 kN/m' },
      history: { type: 'step', amplitude: 1 },
    },
    { type: 'body-force', history: { type: 'rectangular-pulse', amplitude: '1 [g]', duration: 1 } },
    { type: 'moving-force', force: '1 kN', speed: '3 m/s' },
  ];
}

/** Every object and list within a document, itself included. */
function objectsWithin(value: unknown): object[] {
  if (typeof value !== 'object' || value === null) return [];
  return [value, ...Object.values(value).flatMap(objectsWithin)];
}

import { describe, expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import type {
  Damping,
  InitialMotion,
  Member,
  Quantity,
  ResponsesAnswer,
  ResponsesRequest,
  Shape,
} from '../../src/spec/types.ts';
import type { PlainMember } from '../support/plain-member.ts';
import { responsesRequest } from '../support/requests.ts';
import { plainTrial, uniformTrial, type TrialMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;

const stepped: TrialMember = {
  segments: [
    [1, 2, 3],
    [0.75, 5, 0.5, 40],
    [1.5, 3, 1],
  ],
  far: 'free',
  masses: { 1: 0.5, 3: 0.7 },
  springs: { 2: 4 },
};
const positions = [0, 0.3, 1, 1.4, 1.75, 2.2, 3.25];
const times = [0, 0.4, 1.7, 6, 19.5];
const quantities: Quantity[] = ['displacement', 'velocity', 'acceleration', 'force'];

interface Case {
  trial?: TrialMember;
  plain?: PlainMember;
  damping?: Damping;
  initial: InitialMotion;
  modes?: number;
  gaugeTime?: number;
  at?: number[];
  times?: number[];
  quantities?: Quantity[];
  checks?: boolean;
}

function request(given: Case): ResponsesRequest {
  return responsesRequest({
    member: given.plain ?? plainTrial(given.trial ?? stepped),
    ...(given.damping && { damping: given.damping }),
    initial: given.initial,
    modes: given.modes ?? 40,
    positions: given.at ?? positions,
    times: given.times ?? times,
    quantities: given.quantities ?? quantities,
    gaugeTime: given.gaugeTime ?? 0,
    checks: given.checks ?? false,
  });
}

const solve = (given: Case): ResponsesAnswer => solveResponses(request(given));

function values(answer: ResponsesAnswer, quantity: Quantity): number[] {
  return answer.fields[quantity]!.values.flatMap((row) => Array.from(row));
}

function peak(list: readonly number[]): number {
  return list.reduce((top, value) => Math.max(top, Math.abs(value)), 0);
}

/** Largest difference over the peak of what is expected. */
function difference(found: readonly number[], expected: readonly number[]): number {
  expect(found).toHaveLength(expected.length);
  const scale = peak(expected) || 1;
  return peak(found.map((value, i) => value - expected[i])) / scale;
}

const pull: Shape = { type: 'pull', at: 0.6, amplitude: 0.02 };
const bump: Shape = { type: 'polynomial', coefficients: [1.5625, -7.5, 11.5, -6, 1], from: 0.5, to: 2.5 };
const strike: Shape = { type: 'uniform', value: 0.3, from: 1.2, to: 2.9 };

describe('invariances', () => {
  it('the same request gives the same bytes, whatever was solved between', () => {
    const wanted = request({
      initial: { displacement: pull, velocity: strike },
      gaugeTime: 0.1,
      checks: true,
    });
    const text = JSON.stringify(solveResponses(wanted));
    solve({ initial: { velocity: bump }, modes: 7 });
    expect(JSON.stringify(solveResponses(wanted))).toBe(text);
  });

  it('another system of units changes no digit that counts', () => {
    // metres to millimetres, seconds to milliseconds, kilograms to tonnes
    const [metre, second, mass] = [1e3, 1e3, 1e-3];
    const force = (mass * metre) / second ** 2;
    const plain = plainTrial(stepped);
    const scaled: PlainMember = {
      ...plain,
      segments: plain.segments.map(({ length, stiffness, inertia, foundation }) => ({
        length: length * metre,
        stiffness: stiffness * force,
        inertia: (inertia * mass) / metre,
        foundation: (foundation * force) / metre ** 2,
      })),
      masses: plain.masses.map((value) => value * mass),
      springs: plain.springs.map((value) => (value * force) / metre),
    };
    const initial = (unit: number, rate: number): InitialMotion => ({
      displacement: { type: 'pull', at: 0.6 * unit, amplitude: 0.02 * unit },
      velocity: { type: 'uniform', value: 0.3 * rate, from: 1.2 * unit, to: 2.9 * unit },
    });
    const damping: Damping = { type: 'ratios', values: [0.01, 0.03] };
    const one = solve({ initial: initial(1, 1), damping });
    const other = solve({
      plain: scaled,
      damping,
      initial: initial(metre, metre / second),
      at: positions.map((x) => x * metre),
      times: times.map((t) => t * second),
    });
    const units: Record<string, number> = {
      displacement: metre,
      velocity: metre / second,
      acceleration: metre / second ** 2,
      force,
    };
    for (const quantity of quantities) {
      const found = values(other, quantity).map((value) => value / units[quantity]);
      expect(difference(found, values(one, quantity))).toBeLessThan(1e-11);
      const [a, b] = [one.peaks[quantity]!.upper, other.peaks[quantity]!.upper];
      if (a === null) expect(b).toBeNull();
      else expect(b! / units[quantity] / a).toBeCloseTo(1, 9);
      const [boundA, boundB] = [one.fields[quantity]!.bound, other.fields[quantity]!.bound];
      if (boundA) boundA.forEach((bound, q) => expect(boundB![q] / units[quantity]).toBeCloseTo(bound, 9));
    }
    expect(other.convergence.energy.capturedFraction).toBeCloseTo(
      one.convergence.energy.capturedFraction,
      12,
    );
  });

  it('a member and a motion seen from the other end are mirrored, the force with the other sign', () => {
    const plain = plainTrial(stepped);
    const length = 3.25;
    const mirrored: PlainMember = {
      segments: plain.segments.toReversed(),
      masses: plain.masses.toReversed(),
      springs: plain.springs.toReversed(),
      nearFixed: plain.farFixed,
      farFixed: plain.nearFixed,
    };
    const at = [0.3, 0.9, 1.4, 2.2, 3];
    const there = solve({ initial: { displacement: pull, velocity: strike }, at });
    const back = solve({
      plain: mirrored,
      initial: {
        displacement: { ...pull, at: length - 0.6 },
        velocity: { ...strike, from: length - 2.9, to: length - 1.2 },
      },
      at: at.map((x) => length - x).toReversed(),
    });
    for (const quantity of quantities) {
      const sign = quantity === 'force' ? -1 : 1;
      const flipped = back.fields[quantity]!.values.flatMap((row) =>
        Array.from(row)
          .toReversed()
          .map((value) => sign * value),
      );
      expect(difference(flipped, values(there, quantity))).toBeLessThan(1e-11);
    }
  });

  it('motions add up: fields, coefficients', () => {
    const [a, b, sum] = [
      { displacement: pull, massVelocities: [{ at: 3.25, velocity: 0.2 }] },
      { displacement: bump, velocity: strike, massVelocities: [{ at: 3.25, velocity: -0.5 }] },
      {
        displacement: [pull, bump],
        velocity: strike,
        massVelocities: [{ at: 3.25, velocity: 0.2 - 0.5 }],
      },
    ].map((initial) => solve({ initial, damping: { type: 'ratio', value: 0.02 } }));
    for (const quantity of quantities) {
      const added = values(a, quantity).map((value, i) => value + values(b, quantity)[i]);
      expect(difference(values(sum, quantity), added)).toBeLessThan(1e-12);
    }
    sum.coefficients.forEach(({ cosine, sine }, n) => {
      expect(cosine).toBeCloseTo(a.coefficients[n].cosine + b.coefficients[n].cosine, 13);
      expect(sine).toBeCloseTo(a.coefficients[n].sine + b.coefficients[n].sine, 13);
    });
  });

  it('a motion of twice the size is twice the motion, of four times the energy', () => {
    const one = solve({ initial: { displacement: pull, velocity: strike } });
    const two = solve({
      initial: { displacement: { ...pull, amplitude: 0.04 }, velocity: { ...strike, value: 0.6 } },
    });
    for (const quantity of quantities) {
      expect(
        difference(
          values(two, quantity),
          values(one, quantity).map((value) => 2 * value),
        ),
      ).toBeLessThan(1e-14);
    }
    expect(two.convergence.energy.total / one.convergence.energy.total).toBeCloseTo(4, 12);
    expect(two.convergence.ceiling! / one.convergence.ceiling!).toBeCloseTo(2, 12);
  });

  it('undamped motion runs backwards: the state at T with its velocity turned returns after T', () => {
    // a sum of half sines stays one: every state can be given exactly
    const string = uniformTrial(2, {}, [2, 8, 0.5]);
    const parts = [
      { halfWaves: 1, displacement: 0.01, velocity: 0.3 },
      { halfWaves: 2, displacement: -0.02, velocity: 0.1 },
      { halfWaves: 5, displacement: 0.004, velocity: -0.2 },
    ];
    const span = 1.234;
    const motion = (list: typeof parts): InitialMotion => ({
      displacement: list.map(({ halfWaves, displacement }) => ({
        type: 'half-sine',
        halfWaves,
        amplitude: displacement,
      })),
      velocity: list.map(({ halfWaves, velocity }) => ({
        type: 'half-sine',
        halfWaves,
        amplitude: velocity,
      })),
    });
    const turned = parts.map(({ halfWaves, displacement, velocity }) => {
      const omega = 2 * Math.PI * halfWaves;
      const [c, s] = [Math.cos(omega * span), Math.sin(omega * span)];
      return {
        halfWaves,
        displacement: displacement * c + (velocity / omega) * s,
        velocity: -(velocity * c - displacement * omega * s),
      };
    });
    const at = [0.2, 0.5, 0.9, 1.3, 1.8];
    const [start] = solve({ trial: string, initial: motion(parts), modes: 8, at, times: [0] }).fields
      .displacement!.values;
    const [end] = solve({ trial: string, initial: motion(turned), modes: 8, at, times: [span] }).fields
      .displacement!.values;
    expect(difference(Array.from(end), Array.from(start))).toBeLessThan(1e-13);
  });

  it('a plucked string returns after 2L/c and stands mirrored below after L/c (d’Alembert)', () => {
    const at = [0.1, 0.25, 0.4, 0.5, 0.7];
    const { fields } = solve({
      trial: uniformTrial(1),
      initial: { displacement: { type: 'pull', at: 0.3, amplitude: 0.02 } },
      modes: 200,
      at: [...at, ...at.map((x) => 1 - x)].toSorted((a, b) => a - b),
      times: [0, 1, 2, 2001],
      quantities: ['displacement'],
    });
    const [first, half, whole, late] = fields.displacement!.values.map((row) => Array.from(row));
    expect(difference(whole, first)).toBeLessThan(1e-13);
    expect(
      difference(
        half,
        first.toReversed().map((value) => -value),
      ),
    ).toBeLessThan(1e-13);
    expect(difference(late, half)).toBeLessThan(1e-11);
  });

  it('times and positions as lists or as grids give the same', () => {
    const grid = solveResponses({
      ...request({ initial: { displacement: pull } }),
      sample: {
        positions: { count: 14 },
        times: { start: 0.5, end: 4, count: 8 },
        quantities: ['displacement', 'force'],
        gaugeTime: 0,
      },
    });
    const list = solve({
      initial: { displacement: pull },
      at: Array.from({ length: 14 }, (_, q) => (3.25 * q) / 13),
      times: Array.from({ length: 8 }, (_, j) => 0.5 + (3.5 * j) / 7),
      quantities: ['displacement', 'force'],
    });
    for (const quantity of ['displacement', 'force'] as const) {
      expect(difference(values(grid, quantity), values(list, quantity))).toBeLessThan(1e-14);
    }
    expect(grid.fields.positions[13]).toBe(3.25);
    expect(grid.fields.times[7]).toBe(4);
  });
});

describe('initial values come back at time 0', () => {
  it('displacement and velocity within their bounds', () => {
    const smooth: Shape = { type: 'half-sine', amplitude: 0.02, halfWaves: 1 };
    const answer = solve({
      trial: uniformTrial(2),
      initial: { displacement: smooth, velocity: { ...smooth, amplitude: 0.4 } },
      modes: 12,
      at: [0.1, 0.5, 0.8],
      times: [0],
    });
    [0.1, 0.5, 0.8].forEach((x, q) => {
      const sine = Math.sin(Math.PI * x);
      const expected = {
        displacement: 0.02 * sine,
        velocity: 0.4 * sine,
        acceleration: -0.02 * Math.PI ** 2 * sine,
      };
      for (const quantity of ['displacement', 'velocity', 'acceleration'] as const) {
        const { values: rows, bound } = answer.fields[quantity]!;
        expect(Math.abs(rows[0][q] - expected[quantity])).toBeLessThanOrEqual(bound![q]);
      }
    });
  });

  it('a mass starts with its own velocity', () => {
    const bead: TrialMember = {
      segments: [
        [1, 5, 0],
        [1, 5, 0],
      ],
      masses: { 1: 2 },
    };
    const { fields } = solve({
      trial: bead,
      initial: { impulses: [{ at: 1, impulse: 3 }] },
      at: [0.5, 1],
      times: [0],
      quantities: ['velocity'],
    });
    expect(fields.velocity!.values[0][1]).toBeCloseTo(1.5, 14);
    // the massless string follows
    expect(fields.velocity!.values[0][0]).toBeCloseTo(0.75, 14);
  });
});

describe('exact motions of one mass (M q″ + C q′ + K q = 0) lie within their bounds', () => {
  const bead: TrialMember = { segments: [[1, 1, 0]], far: 'free', masses: { 1: 1 } };

  /** ζ, t and q for q(0) = 1, q′(0) = 0, ω = 1 (mpmath at 40 digits; see motion-values.py). */
  it.each([
    [0.2, 3, -0.5151321167841942984],
    [1, 2, 0.40600584970983807568],
    [1 + 1e-12, 2, 0.40600584971019900185],
    [1 + 1e-9, 2, 0.40600585007073219396],
    [1.0001, 2, 0.40604193695346036519],
    [1.5, 1, 0.78664559930336833332],
  ])('ζ = %s at t = %s', (value, t, expected) => {
    const { fields, convergence } = solve({
      trial: bead,
      damping: { type: 'ratio', value },
      initial: { displacement: { type: 'pull', at: 1, amplitude: 1 } },
      modes: 1,
      at: [1],
      times: [t],
      quantities: ['displacement'],
    });
    const { values: rows, bound } = fields.displacement!;
    expect(convergence.verdict).toBe('complete');
    expect(bound![0]).toBeLessThan(1e-12);
    // the number above is rounded once
    expect(Math.abs(rows[0][0] - expected)).toBeLessThanOrEqual(bound![0] + EPS);
  });
});

describe('long times', () => {
  it.each([1, 1e4, 1e8])('after %s periods a half-sine is within its bound of where it began', (periods) => {
    const { fields } = solve({
      trial: uniformTrial(1),
      initial: { displacement: { type: 'half-sine', amplitude: 1, halfWaves: 1 } },
      modes: 3,
      at: [0.2, 0.5, 0.9],
      times: [2 * periods],
      quantities: ['displacement'],
    });
    const { values: rows, bound } = fields.displacement!;
    [0.2, 0.5, 0.9].forEach((x, q) => {
      const error = Math.abs(rows[0][q] - Math.sin(Math.PI * x));
      expect(error).toBeLessThanOrEqual(bound![q]);
      // the phase is known to some roundings of ωt, the floor of subtraction stands beside it
      expect(bound![q]).toBeLessThan(2e-7 + 64 * EPS * 2 * Math.PI * periods);
    });
  });
});

describe('peaks', () => {
  const cases: [string, Case][] = [
    ['pull', { initial: { displacement: pull } }],
    ['bump and strike', { initial: { displacement: bump, velocity: strike } }],
    ['damped', { initial: { displacement: pull }, damping: { type: 'ratios', values: [0.05, 1.5, 0.3] } }],
    [
      'Rayleigh',
      {
        initial: { displacement: pull },
        damping: { type: 'rayleigh', massCoefficient: 0.2, stiffnessCoefficient: 0.02 },
      },
    ],
    ['averages', { initial: { displacement: pull, velocity: strike }, gaugeTime: 0.3 }],
    [
      'smooth',
      {
        trial: uniformTrial(2),
        initial: {
          displacement: { type: 'half-sine', amplitude: 0.1, halfWaves: 2 },
          velocity: { type: 'half-sine', amplitude: 1, halfWaves: 1 },
        },
        at: [0.1, 0.5, 0.77],
      },
    ],
    [
      'drifting',
      {
        trial: { ...uniformTrial(3, { near: 'free', far: 'free' }), masses: { 1: 2 } },
        initial: { impulses: [{ at: 1 / 3, impulse: 3 }] },
        gaugeTime: 0.2,
        at: [0, 0.4, 1],
      },
    ],
  ];

  it.each(cases)('%s: value, place and time are those of the largest sample', (_, given) => {
    const answer = solve(given);
    const { positions: xs, times: ts } = answer.fields;
    for (const quantity of quantities) {
      const { value, at, time } = answer.peaks[quantity]!;
      expect(Math.abs(value)).toBe(peak(values(answer, quantity)));
      const row = Array.from(ts).indexOf(time);
      const column = Array.from(xs).indexOf(at);
      expect(answer.fields[quantity]!.values[row][column]).toBe(value);
    }
  });

  it.each(cases)(
    '%s: the upper limit holds on a grid of 161 places and 400 times, and to more modes',
    (_, given) => {
      const coarse = solve(given);
      const last = (given.times ?? times)[(given.times ?? times).length - 1];
      const length = (given.trial ?? stepped).segments.reduce((sum, [l]) => sum + l, 0);
      const fine = solve({
        ...given,
        modes: 160,
        at: Array.from({ length: 161 }, (_place, q) => Math.min(length, (length * q) / 160)),
        times: Array.from({ length: 400 }, (_time, j) => (last * j) / 399),
      });
      for (const quantity of quantities) {
        const { upper } = coarse.peaks[quantity]!;
        if (upper === null) continue;
        const { values: rows, bound } = fine.fields[quantity]!;
        let worst = 0;
        for (const row of rows) {
          row.forEach((value, q) => {
            worst = Math.max(worst, (Math.abs(value) - (bound?.[q] ?? 0)) / upper);
          });
        }
        expect(worst).toBeLessThanOrEqual(1);
        // and it says something: within 100 of what was met
        expect(upper).toBeLessThan(100 * peak(rows.flatMap((row) => Array.from(row))));
      }
    },
  );
});

describe('convergence', () => {
  it('energy: captured and tail make up the total; ceiling and bound belong to the displacement', () => {
    const answer = solve({
      initial: { displacement: pull, velocity: strike },
      at: Array.from({ length: 66 }, (_, q) => q / 20),
    });
    const { energy, ceiling, displacementBound } = answer.convergence;
    expect(energy.captured + energy.tail).toBeCloseTo(energy.total, 12);
    expect(energy.capturedFraction).toBe(energy.captured / energy.total);
    expect(energy.captured).toBeCloseTo(
      answer.coefficients.reduce((sum, mode) => sum + mode.energy, 0),
      14,
    );
    expect(peak(values(answer, 'displacement'))).toBeLessThanOrEqual(ceiling! + displacementBound!);
    expect(peak(Array.from(answer.fields.displacement!.bound!))).toBeLessThanOrEqual(
      displacementBound! * (1 + 1e-9),
    );
  });

  it('the overall verdict is the worst of the quantities asked for', () => {
    const converged = solve({
      initial: { displacement: pull },
      modes: 2000,
      at: [1],
      quantities: ['displacement'],
    });
    expect(converged.convergence.verdict).toBe('converged');
    const force = solve({
      initial: { displacement: pull },
      modes: 2000,
      at: [1],
      quantities: ['displacement', 'force'],
    });
    expect(force.fields.displacement!.verdict).toBe('converged');
    expect(force.fields.force!.verdict).toBe('irregular-data');
    expect(force.convergence.verdict).toBe('irregular-data');
    expect(force.fields.force).toMatchObject({ boundKind: 'rms', bound: null });
    expect(force.fields.force!.rms).toBeGreaterThan(0);
  });

  it('without checks their results are null, with them they are of the order of rounding', () => {
    const initial = { displacement: pull, velocity: strike };
    const off = solve({ initial }).convergence;
    expect([off.balance, off.orthogonality, off.residual]).toEqual([null, null, null]);
    const on = solve({ initial, checks: true }).convergence;
    expect(on.balance!.maxRelativeDrift).toBeLessThan(1e-12);
    expect(on.orthogonality).toBeLessThan(1e-12);
    expect(on.residual).toBeLessThan(1e-11);
  });

  it('a relative tolerance is met by the stated bound, and more modes lie within both', () => {
    const wanted: ResponsesRequest = {
      ...request({ initial: { displacement: pull }, quantities: ['displacement'] }),
      series: { relativeTolerance: 1e-2, maxModes: 4096 },
    };
    const answer = solveResponses(wanted);
    const { modesUsed, verdict, ceiling, displacementBound } = answer.convergence;
    expect(verdict).toBe('converged');
    expect(displacementBound).toBeLessThanOrEqual(1e-2 * ceiling!);
    const longer = solve({
      initial: { displacement: pull },
      modes: 20 * modesUsed,
      quantities: ['displacement'],
    });
    answer.fields.displacement!.values.forEach((row, j) =>
      row.forEach((value, q) => {
        const both = answer.fields.displacement!.bound![q] + longer.fields.displacement!.bound![q];
        expect(Math.abs(value - longer.fields.displacement!.values[j][q])).toBeLessThanOrEqual(both);
      }),
    );
  });

  it('a half-sine of many half waves is solved, not refused', () => {
    for (const halfWaves of [59, 164, 999]) {
      const answer = solve({
        trial: uniformTrial(1, {}, [45.3, 8, 0.5]),
        initial: { displacement: { type: 'half-sine', amplitude: 0.1, halfWaves } },
        modes: 1000,
        at: [10],
        times: [0],
        quantities: ['displacement'],
      });
      expect(answer.convergence.energy.capturedFraction).toBeCloseTo(1, 12);
    }
  });
});

describe('notices', () => {
  it('massless-stretch-settled names the energy that is left out', () => {
    const bead: TrialMember = {
      segments: [
        [1, 5, 0],
        [1, 5, 0],
      ],
      masses: { 1: 2 },
    };
    const { notices } = solve({ trial: bead, initial: { displacement: { ...pull, at: 0.5 } }, at: [1] });
    expect(notices.map(({ code }) => code)).toContain('massless-stretch-settled');
    const { notices: none } = solve({
      trial: bead,
      initial: { displacement: { ...pull, at: 1 } },
      at: [1],
      modes: 1,
    });
    expect(none).toEqual([]);
  });

  it('rigid-body-motion only where the member drifts', () => {
    const free = uniformTrial(2, { near: 'free', far: 'free' });
    const codes = (initial: InitialMotion): string[] =>
      solve({ trial: free, initial, at: [0.5] }).notices.map(({ code }) => code);
    expect(codes({ velocity: { type: 'uniform', value: 1, from: 0 } })).toEqual(['rigid-body-motion']);
    expect(codes({ displacement: { type: 'uniform', value: 1, from: 0 } })).toEqual([]);
  });

  it('finite-modes where fewer modes exist than were asked for', () => {
    const bead: TrialMember = { segments: [[1, 1, 0]], far: 'free', masses: { 1: 1 } };
    const { notices, convergence } = solve({
      trial: bead,
      initial: { displacement: { ...pull, at: 1 } },
      at: [1],
    });
    expect(notices).toEqual([
      {
        code: 'finite-modes',
        detail: 'All inertia is lumped, so the member has 1 modes; all of them are used.',
      },
    ]);
    expect(convergence).toMatchObject({ verdict: 'complete', modesUsed: 1 });
  });
});

describe('trade members', () => {
  it('stress of a shaft is torque (D/2)/J, units follow the kind', () => {
    const member: Member = {
      kind: 'shaft',
      segments: [
        {
          length: 2,
          shearModulus: 80e9,
          density: 7850,
          outerDiameter: 0.1,
          innerDiameter: 0,
          foundation: 0,
          drag: 0,
        },
      ],
      ends: { near: { type: 'fixed' }, far: { type: 'free' } },
      attachments: [],
    };
    const { fields, peaks } = solveResponses({
      member,
      initial: { displacement: { type: 'pull', at: 2, amplitude: 0.01 } },
      loads: [],
      series: { modes: 60 },
      sample: { positions: [0, 1], times: [0, 1e-4], quantities: ['force', 'stress'], gaugeTime: 1e-4 },
      checks: false,
    });
    const factor = 0.05 / ((Math.PI * 0.1 ** 4) / 32);
    for (const j of [0, 1]) {
      for (const q of [0, 1]) {
        expect(fields.stress!.values[j][q] / fields.force!.values[j][q] / factor).toBeCloseTo(1, 12);
      }
    }
    expect(fields.stress!.bound![1] / fields.force!.bound![1] / factor).toBeCloseTo(1, 12);
    expect(peaks.stress!.upper! / peaks.force!.upper! / factor).toBeCloseTo(1, 12);
    expect([fields.force!.unit, fields.stress!.unit]).toEqual(['N.m', 'Pa']);
  });
});

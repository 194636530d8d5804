import { describe, expect, it } from 'vitest';
import { solveModes } from '../../src/solutions/modes.ts';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { Load } from '../../src/spec/types.ts';
import { entryMember } from '../support/entries.ts';
import {
  entryHistory,
  entryString,
  loadedRequest,
  sampledAt,
  uniformMember,
  withDrag,
} from '../support/forced-requests.ts';
import { referenceEntries, referenceEntry } from '../support/reference.ts';
import { requestMember, responsesRequest } from '../support/requests.ts';

/** Rounding of tabulated values and decimal inputs, of the largest value. */
const TABLE = 2e-13;

function peak(values: readonly number[]): number {
  return Math.max(...values.map(Math.abs));
}

describe('transient point forces against travelling waves', () => {
  const entries = referenceEntries('forced').filter((entry) => /^e-1\d$/.test(entry.id));
  const cases = entries.flatMap((entry) => [20, 400].map((modes) => [entry.id, modes, entry] as const));

  it.each(cases)('%s with %i modes lies within its bound', (_, modes, entry) => {
    const points = entry.inputs.points_x_t as [number, number][];
    const load: Load = {
      type: 'point-force',
      at: entry.inputs.x_force,
      history: entryHistory(entry.inputs.load),
    };
    const answer = solveResponses(
      loadedRequest({ member: entryMember(entry), loads: [load], points, modes }),
    );
    expect(answer.fields.displacement!.boundKind).toBe('pointwise');
    const scale = peak(entry.expected.u);
    points.forEach(([x, t], i) => {
      const { value, bound } = sampledAt(answer, 'displacement', x, t);
      const exact: number = entry.expected.u[i];
      expect(Math.abs(value - exact)).toBeLessThanOrEqual(bound + TABLE * scale);
      expect(Math.abs(exact)).toBeLessThanOrEqual(answer.peaks.displacement!.upper! + TABLE * scale);
      // and the bound says something: with 400 modes it is below a hundredth of the motion
      if (modes === 400) expect(bound).toBeLessThan(0.01 * scale);
    });
  });

  it('e-15: a ramp over one fundamental period leaves no vibration', () => {
    const entry = referenceEntry('forced', 'e-15');
    const points = entry.inputs.points_x_t as [number, number][];
    const load: Load = {
      type: 'point-force',
      at: entry.inputs.x_force,
      history: entryHistory(entry.inputs.load),
    };
    const answer = solveResponses(
      loadedRequest({
        member: entryMember(entry),
        loads: [load],
        points,
        modes: 200,
        quantities: ['displacement', 'velocity', 'force'],
      }),
    );
    points.forEach(([x, t], i) => {
      if (t < entry.inputs.load.tr) return;
      expect(sampledAt(answer, 'displacement', x, t).value).toBeCloseTo(entry.expected.u[i], 15);
      expect(sampledAt(answer, 'velocity', x, t).value).toBeCloseTo(0, 10);
      expect(sampledAt(answer, 'force', x, t).value / entry.expected.force[i]).toBeCloseTo(1, 10);
    });
  });
});

describe('single modes: a lump on a massless spring', () => {
  const single = (omega: number) => ({
    segments: [{ length: 1, stiffness: omega * omega, inertia: 0, foundation: 0 }],
    masses: [0, 1],
    springs: [0, 0],
    nearFixed: true,
    farFixed: false,
  });

  it('e-20: step, half-sine pulse and ramp, three damping ratios, to 1e-12', () => {
    const entry = referenceEntry('forced', 'e-20');
    const { omega } = entry.inputs as { omega: number };
    const period = (2 * Math.PI) / omega;
    for (const row of entry.expected.rows) {
      const t = row.t_over_T * period;
      const duration = (row.duration_over_T ?? 0) * period;
      const history = entryHistory({ type: row.load, P: omega * omega, td: duration, tr: duration });
      const answer = solveResponses(
        loadedRequest({
          member: single(omega),
          damping: { type: 'ratio', value: row.zeta },
          loads: [{ type: 'point-force', at: 1, history }],
          points: [[1, t]],
          modes: 1,
          quantities: ['displacement', 'velocity'],
        }),
      );
      const q = sampledAt(answer, 'displacement', 1, t);
      expect(Math.abs(q.value - row.q)).toBeLessThanOrEqual(1e-12 * Math.max(1, Math.abs(row.q)));
      expect(Math.abs(sampledAt(answer, 'velocity', 1, t).value - row.qdot)).toBeLessThanOrEqual(
        1e-12 * omega,
      );
      expect(answer.convergence.verdict).toBe('complete');
    }
  });

  it('e-21: shock spectrum of the half-sine pulse', () => {
    const entry = referenceEntry('forced', 'e-21');
    const omega = 2 * Math.PI;
    for (const row of entry.expected.rows) {
      const duration: number = row.td_over_T;
      const times = Array.from({ length: 4001 }, (_, i) => (i / 4000) * duration);
      const answer = solveResponses(
        loadedRequest({
          member: single(omega),
          loads: [
            {
              type: 'point-force',
              at: 1,
              history: { type: 'half-sine-pulse', amplitude: omega * omega, start: 0, duration },
            },
          ],
          points: times.map((t) => [1, t] as const),
          modes: 1,
          quantities: ['displacement', 'velocity'],
        }),
      );
      const { value, upper } = answer.peaks.displacement!;
      // the grid misses the crest by (ωh)²/8 at most, h a 4,000th of the pulse
      expect(value).toBeLessThanOrEqual(row.primary_max * (1 + 1e-12));
      expect(value).toBeGreaterThan(row.primary_max * (1 - 1e-5));
      expect(upper!).toBeGreaterThanOrEqual(row.primary_max * (1 - 1e-12));
      const left = Math.hypot(
        sampledAt(answer, 'displacement', 1, duration).value,
        sampledAt(answer, 'velocity', 1, duration).value / omega,
      );
      expect(Math.abs(left - row.residual_amplitude)).toBeLessThan(1e-11);
    }
  });
});

describe('motion of the base', () => {
  it('e-32: participation factors and effective masses of a uniform column', () => {
    const entry = referenceEntry('forced', 'e-32');
    const { H, rhoA } = entry.inputs;
    const answer = solveModes({
      member: requestMember(uniformMember(H, 7.2e7, rhoA, false)),
      series: { modes: 8 },
      energyShares: false,
      shapes: { positions: [H], normalisation: 'mass', quantities: ['displacement'] },
      participation: { ends: 'near' },
    });
    expect(answer.participation!.mass).toBeCloseTo(entry.expected.total_mass, 8);
    answer.modes.forEach((mode, n) => {
      const { factor, effectiveMass, effectiveMassFraction, cumulativeFraction } = mode.participation!;
      // with φ(top) = 1 the factor is Γ = m(r,φ) φ(top) of the mass-normalised shape
      const top = mode.shape!.displacement![0];
      expect(Math.abs((factor * top) / Math.abs(entry.expected.Gamma[n]))).toBeCloseTo(1, 12);
      // φ(top) = 1 for every mode in the table, whose signs alternate with sin((2n − 1)π/2)
      expect(factor * top * entry.expected.Gamma[n]).toBeGreaterThan(0);
      expect(effectiveMass / entry.expected.m_eff[n]).toBeCloseTo(1, 12);
      expect(effectiveMassFraction / entry.expected.m_eff_fraction[n]).toBeCloseTo(1, 12);
      expect(cumulativeFraction / entry.expected.cumulative_fraction[n]).toBeCloseTo(1, 12);
    });
  });

  it.each([60, 400])('e-33: a versine, as two harmonic accelerations that add up, %i modes', (modes) => {
    const entry = referenceEntry('forced', 'e-33');
    const { H, c, rho, base } = entry.inputs;
    const member = uniformMember(H, rho * c * c, rho, false);
    const points = entry.inputs.points_x_t as [number, number][];
    const omega = (2 * Math.PI) / base.duration;
    const amplitude = 0.5 * base.amplitude * omega * omega;
    const answers = [
      [amplitude, 0],
      [-amplitude, base.duration],
    ].map(([size, start]) =>
      solveResponses(
        loadedRequest({
          member,
          points,
          modes,
          loads: [
            {
              type: 'end-motion',
              end: 'near',
              quantity: 'acceleration',
              history: { type: 'harmonic', amplitude: size, frequency: 1 / base.duration, phase: 0, start },
            },
          ],
        }),
      ),
    );
    points.forEach(([x, t], i) => {
      const [one, two] = answers.map((answer) => sampledAt(answer, 'displacement', x, t));
      const error = Math.abs(one.value + two.value - entry.expected.u[i]);
      expect(error).toBeLessThanOrEqual(one.bound + two.bound + 1e-13);
      if (modes === 400) expect(error).toBeLessThan(1e-7 * base.amplitude);
    });
  });

  it.each([20, 400])('e-34: a ramp held, %i modes', (modes) => {
    const entry = referenceEntry('forced', 'e-34');
    const { H, c, rho, base } = entry.inputs;
    const points = entry.inputs.points_x_t as [number, number][];
    const answer = solveResponses(
      loadedRequest({
        member: uniformMember(H, rho * c * c, rho, false),
        points,
        modes,
        loads: [
          {
            type: 'end-motion',
            end: 'near',
            quantity: 'displacement',
            history: { type: 'ramp', amplitude: base.amplitude, start: 0, duration: base.duration },
          },
        ],
      }),
    );
    points.forEach(([x, t], i) => {
      const { value, bound } = sampledAt(answer, 'displacement', x, t);
      expect(Math.abs(value - entry.expected.u[i])).toBeLessThanOrEqual(bound + 1e-14);
      if (modes === 400) expect(bound).toBeLessThan(0.05 * base.amplitude);
    });
  });
});

describe('e-40: a force that crosses a string', () => {
  const entry = referenceEntry('forced', 'e-40');
  const { L, P } = entry.inputs;
  // rows of a speed, those under the load as points of their own
  const rows = entry.expected.rows as {
    v_over_c: number;
    v?: number;
    t?: number;
    x?: number;
    u?: number;
    under_load?: { position_over_L: number; u: number }[];
  }[];
  const pointsOf = (ratio: number): { x: number; t: number; u: number }[] =>
    rows
      .filter((row) => row.v_over_c === ratio)
      .flatMap((row) =>
        row.under_load
          ? row.under_load.map(({ position_over_L: share, u }) => ({
              x: share * L,
              t: (share * L) / (ratio * entry.expected.c),
              u,
            }))
          : [{ x: row.x!, t: row.t!, u: row.u! }],
      );
  const answerOf = (ratio: number, modes: number) =>
    solveResponses(
      loadedRequest({
        member: entryString(entry),
        loads: [{ type: 'moving-force', force: P, speed: ratio * entry.expected.c, start: 0 }],
        points: pointsOf(ratio).map(({ x, t }) => [x, t] as const),
        modes,
      }),
    );

  it.each([
    [0.3, 20],
    [0.3, 400],
    [0.8, 20],
    [0.8, 400],
    [1.2, 20],
    [1.2, 400],
  ])('at %f of the wave speed with %i modes it lies within its bound', (ratio, modes) => {
    const answer = answerOf(ratio, modes);
    for (const { x, t, u } of pointsOf(ratio)) {
      const { value, bound } = sampledAt(answer, 'displacement', x, t);
      expect(Math.abs(value - u)).toBeLessThanOrEqual(bound + 1e-14);
      if (modes === 400) expect(bound).toBeLessThan(2e-3);
    }
  });

  it('at the wave speed no pointwise bound is claimed, and the values converge', () => {
    const answer = answerOf(1, 4000);
    expect(answer.fields.displacement!.verdict).toBe('irregular-data');
    expect(answer.fields.displacement!.bound).toBeNull();
    for (const { x, t, u } of pointsOf(1)) {
      expect(Math.abs(sampledAt(answer, 'displacement', x, t).value - u)).toBeLessThan(3e-5);
    }
  });
});

describe('damped motion', () => {
  it('e-41: a step force on a string with one ratio in every mode', () => {
    const entry = referenceEntry('forced', 'e-41');
    const { P, x0, zeta } = entry.inputs;
    const points = entry.inputs.points_x_t as [number, number][];
    const load: Load = { type: 'point-force', at: x0, history: { type: 'step', amplitude: P, start: 0 } };
    const damping = { type: 'ratio', value: zeta } as const;
    const [few, many] = [20, 1500].map((modes) =>
      solveResponses(
        loadedRequest({
          member: entryString(entry),
          damping,
          loads: [load],
          points,
          modes,
          quantities: ['displacement', 'velocity'],
        }),
      ),
    );
    points.forEach(([x, t], i) => {
      const u: number = entry.expected.u[i];
      const short = sampledAt(few, 'displacement', x, t);
      expect(Math.abs(short.value - u)).toBeLessThanOrEqual(short.bound + 1e-16);
      expect(Math.abs(sampledAt(many, 'displacement', x, t).value / u - 1)).toBeLessThan(1e-11);
      const v: number = entry.expected.v[i];
      expect(Math.abs(sampledAt(many, 'velocity', x, t).value - v)).toBeLessThan(1e-11);
    });
  });

  it.each(['e-42', 'e-43'])('%s: free decay of a half-sine under drag', (id) => {
    const entry = referenceEntry('forced', id);
    const { L, c_per_length: drag, h } = entry.inputs;
    const times = entry.expected.rows.map((row: { t: number }) => row.t) as number[];
    const request = withDrag(
      responsesRequest({
        member: entryString(entry),
        initial: { displacement: { type: 'half-sine', amplitude: h, halfWaves: 1 } },
        modes: 3,
        positions: [0.5 * L],
        times,
        quantities: ['displacement', 'velocity'],
      }),
      drag,
    );
    const answer = solveResponses(request);
    for (const row of entry.expected.rows) {
      expect(sampledAt(answer, 'displacement', 0.5 * L, row.t).value / row.u_mid).toBeCloseTo(1, 11);
      expect(sampledAt(answer, 'velocity', 0.5 * L, row.t).value / row.v_mid).toBeCloseTo(1, 11);
    }
    const modes = solveModes({
      member: request.member,
      series: { modes: 4 },
      energyShares: false,
    });
    entry.expected.eigenvalues.forEach(({ zeta }: { zeta: number }, n: number) => {
      expect(modes.modes[n].dampingRatio! / zeta).toBeCloseTo(1, 13);
    });
  });
});

import { describe, expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { Quantity } from '../../src/spec/types.ts';
import { entryInitial, entryMember } from '../support/entries.ts';
import { referenceEntries, referenceEntry, type ReferenceEntry } from '../support/reference.ts';
import { responsesRequest } from '../support/requests.ts';
import type { TravellingWaves } from '../support/travelling-waves.ts';
import { wavesOfEntry } from '../support/wave-entries.ts';

const MODES = [5, 20, 100, 1000];

/** Rounding of the tabulated values and of the decimal inputs (positions, times, lengths): some eps of the peak. */
const TABLE_ROUNDING = 1e-14;

function peak(values: readonly number[]): number {
  return Math.max(...values.map(Math.abs));
}

describe('displacements lie within their certified bounds of the travelling-wave solution', () => {
  const entries = referenceEntries('exact-fields').filter((entry) => /^d-0\d$/.test(entry.id));
  const cases = entries.flatMap((entry) => MODES.map((modes) => [entry.id, modes, entry] as const));

  it.each(cases)('%s with %i modes', (_, modes, entry) => {
    const points = entry.inputs.points_x_t as [number, number][];
    const answer = solveResponses(
      responsesRequest({
        member: entryMember(entry),
        initial: entryInitial(entry),
        modes,
        positions: points.map(([x]) => x).toSorted((a, b) => a - b),
        times: points.map(([, t]) => t).toSorted((a, b) => a - b),
        quantities: ['displacement'],
        checks: true,
      }),
    );
    const field = answer.fields.displacement!;
    const positions = Array.from(answer.fields.positions);
    const times = Array.from(answer.fields.times);
    const waves = wavesOfEntry(entry, times[times.length - 1]);
    const expected: number[] = entry.expected.u;
    expect(field.boundKind).toBe('pointwise');
    points.forEach(([x, t], i) => {
      const error = Math.abs(field.values[times.indexOf(t)][positions.indexOf(x)] - expected[i]);
      expect(error).toBeLessThanOrEqual(field.bound![positions.indexOf(x)] + TABLE_ROUNDING * peak(expected));
    });
    // Every other pair of sampled position and time against the same solution by characteristics.
    times.forEach((t, row) =>
      positions.forEach((x, column) => {
        const error = Math.abs(field.values[row][column] - waves.displacement(x, t));
        expect(error).toBeLessThanOrEqual(field.bound![column] + 1e-13 * peak(expected));
        expect(Math.abs(waves.displacement(x, t))).toBeLessThanOrEqual(
          answer.peaks.displacement!.upper! + 1e-13 * peak(expected),
        );
      }),
    );
    expect(answer.convergence.displacementBound).toBeGreaterThanOrEqual(
      peak(Array.from(field.bound!)) * (1 - 1e-12),
    );
  });
});

describe('gauge averages of velocity and force lie within their certified bounds', () => {
  const entries = referenceEntries('exact-fields').filter((entry) => /^d-0\d$/.test(entry.id));
  const cases = entries.flatMap((entry) => [20, 100, 1000].map((modes) => [entry.id, modes, entry] as const));

  it.each(cases)('%s with %i modes', (_, modes, entry) => {
    const points = entry.inputs.points_x_t as [number, number][];
    const times = points.map(([, t]) => t).toSorted((a, b) => a - b);
    const positions = points.map(([x]) => x).toSorted((a, b) => a - b);
    const gaugeTime = 0.3 * times[0];
    const answer = solveResponses(
      responsesRequest({
        member: entryMember(entry),
        initial: entryInitial(entry),
        modes,
        positions,
        times: [0, ...times],
        quantities: ['velocity', 'force'],
        gaugeTime,
      }),
    );
    const waves = wavesOfEntry(entry, times[times.length - 1] + gaugeTime);
    const exact: Record<'velocity' | 'force', (x: number, start: number) => number> = {
      velocity: (x, start) => waves.velocityAverage(x, start, start + gaugeTime),
      force: (x, start) => waves.forceAverage(x, start, start + gaugeTime),
    };
    for (const quantity of ['velocity', 'force'] as const) {
      const field = answer.fields[quantity]!;
      expect(field.boundKind).toBe('gauge-average');
      const scale = peak(entry.expected[quantity === 'velocity' ? 'v' : 'force']) || 1;
      [0, ...times].forEach((t, row) =>
        positions.forEach((x, column) => {
          const value = exact[quantity](x, Math.max(0, t - gaugeTime / 2));
          const error = Math.abs(field.values[row][column] - value);
          // The average is a difference of displacements over τ: rounding of u over τ.
          expect(error).toBeLessThanOrEqual(field.bound![column] + 1e-11 * scale);
          expect(Math.abs(value)).toBeLessThanOrEqual(answer.peaks[quantity]!.upper! + 1e-11 * scale);
        }),
      );
    }
  });
});

describe('data with kinks and jumps have no pointwise bound of velocity and force', () => {
  it.each(['d-01', 'd-02', 'd-07', 'd-09'])('%s is called irregular and its r.m.s. bound holds', (id) => {
    const entry: ReferenceEntry = referenceEntry('exact-fields', id);
    const member = entryMember(entry);
    const period =
      4 * member.segments.reduce((sum, s) => sum + s.length * Math.sqrt(s.inertia / s.stiffness), 0);
    const times = [0.0317 * period, 0.1931 * period, 0.4173 * period];
    const count = 4000;
    const samples = member.segments.flatMap((segment, i) => {
      const start = member.segments.slice(0, i).reduce((sum, s) => sum + s.length, 0);
      return Array.from({ length: count }, (_, j) => ({
        x: start + ((j + 0.5) / count) * segment.length,
        mass: (segment.inertia * segment.length) / count,
        compliance: segment.length / segment.stiffness / count,
      }));
    });
    const quantities: Quantity[] = ['velocity', 'force'];
    const answer = solveResponses(
      responsesRequest({
        member,
        initial: entryInitial(entry),
        modes: 20,
        positions: samples.map(({ x }) => x),
        times,
        quantities,
      }),
    );
    const waves: TravellingWaves = wavesOfEntry(entry, period);
    for (const quantity of ['velocity', 'force'] as const) {
      const field = answer.fields[quantity]!;
      expect(field.verdict).toBe('irregular-data');
      expect(field.boundKind).toBe('rms');
      expect(field.bound).toBeNull();
      expect(answer.peaks[quantity]!.upper).toBeNull();
      times.forEach((t, row) => {
        let sum = 0;
        let weights = 0;
        samples.forEach(({ x, mass, compliance }, column) => {
          const weight = quantity === 'velocity' ? mass : compliance;
          sum += weight * (field.values[row][column] - waves[quantity](x, t)) ** 2;
          weights += weight;
        });
        // Midpoint samples meet the fronts to one cell in 4,000.
        expect(Math.sqrt(sum / weights)).toBeLessThanOrEqual(field.rms! * 1.01);
      });
    }
    expect(answer.convergence.verdict).toBe('irregular-data');
  });
});

describe('other exact motions', () => {
  it('a mass on a string struck by a hammer (d-30)', () => {
    const entry = referenceEntry('exact-fields', 'd-30');
    const times = entry.inputs.t as number[];
    const { x, t } = entry.inputs.field_point;
    for (const modes of MODES) {
      const { fields } = solveResponses(
        responsesRequest({
          member: entryMember(entry),
          initial: { massVelocities: [{ at: 0.8, velocity: entry.inputs.V_mass }] },
          modes,
          positions: [0.8, x],
          times,
          quantities: ['displacement'],
        }),
      );
      const field = fields.displacement!;
      times.forEach((_, row) => {
        const error = Math.abs(field.values[row][0] - entry.expected.u_mass[row]);
        expect(error).toBeLessThanOrEqual(field.bound![0] + 1e-16);
      });
      const error = Math.abs(field.values[times.indexOf(t)][1] - entry.expected.u_field);
      expect(error).toBeLessThanOrEqual(field.bound![1] + 1e-16);
    }
  });

  it('a hanging rod released under its weight, seen from its static stretch (d-31)', () => {
    const entry = referenceEntry('exact-fields', 'd-31');
    const { L: length, EA: stiffness, rhoA: inertia, g } = entry.inputs as Record<string, number>;
    const points = entry.inputs.points_x_t as [number, number][];
    const factor = (inertia * g) / stiffness;
    // u = u_s + w with u_s = (ρg/EA)(Lx − x²/2); w starts from −u_s at rest and is free motion.
    const weight = (x: number): number => factor * (length * x - (x * x) / 2);
    for (const modes of MODES) {
      const positions = [...new Set(points.map(([x]) => x))].toSorted((a, b) => a - b);
      const times = [...new Set(points.map(([, t]) => t))].toSorted((a, b) => a - b);
      const { fields, peaks } = solveResponses(
        responsesRequest({
          member: entryMember(entry),
          initial: {
            displacement: { type: 'polynomial', coefficients: [0, -factor * length, factor / 2], from: 0 },
          },
          modes,
          positions,
          times,
          quantities: ['displacement', 'velocity', 'force'],
        }),
      );
      points.forEach(([x, t], i) => {
        const row = times.indexOf(t);
        const column = positions.indexOf(x);
        const error = Math.abs(fields.displacement!.values[row][column] + weight(x) - entry.expected.u[i]);
        expect(error).toBeLessThanOrEqual(fields.displacement!.bound![column] + 1e-20);
      });
      // The tip swings to twice the static stretch: |w| ≤ its static value.
      expect(peaks.displacement!.upper!).toBeGreaterThanOrEqual(entry.expected.static_tip * (1 - 1e-12));
    }
  });
});

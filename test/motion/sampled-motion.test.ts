import { describe, expect, it } from 'vitest';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { ModeSeries, type Mode } from '../../src/modes/mode-series.ts';
import { evaluateShape } from '../../src/modes/mode-shape.ts';
import { evenPositions, placeStations, type Stations } from '../../src/modes/stations.ts';
import { readInitialState } from '../../src/motion/initial-state.ts';
import { dampingRate } from '../../src/motion/modal-damping.ts';
import { freeMotion } from '../../src/motion/modal-motion.ts';
import { ModalProjection, type ModalStart } from '../../src/motion/modal-projection.ts';
import type { FieldKind } from '../../src/motion/field-kind.ts';
import { sampleMotion } from '../../src/motion/sampled-motion.ts';
import type { Damping, InitialMotion } from '../../src/spec/types.ts';
import { panelRule } from '../modes/quadrature.ts';
import { uniformTrial, waveMember, type TrialMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;

const stepped: TrialMember = {
  segments: [
    [1, 2, 3],
    [0.75, 5, 0.5, 40],
    [1.5, 3, 1],
  ],
  far: 'free',
  masses: { 1: 0.5 },
};
const initial: InitialMotion = {
  displacement: { type: 'pull', at: 2, amplitude: 0.3 },
  velocity: { type: 'half-sine', amplitude: 0.4, halfWaves: 2 },
};

type Started = { mode: Mode; start: ModalStart };

function started(member: WaveMember, motion: InitialMotion, count: number): Started[] {
  const { displacement, velocity } = readInitialState(member, motion);
  const projection = new ModalProjection(member, displacement, velocity);
  const series = new ModeSeries(member);
  return Array.from({ length: count }, () => {
    const mode = series.next()!;
    return { mode, start: projection.project(mode.shape) };
  });
}

/** Without loads a relative displacement is the displacement. */
type PlainKind = Exclude<FieldKind, 'relativeDisplacement'>;

/** One entry of each field, and the sum of the magnitudes, by a plain sum over the modes. */
function plainEntry(
  member: WaveMember,
  modes: readonly Started[],
  [i, d]: [number, number],
  t: number,
): Record<PlainKind, [number, number]> {
  const sums: Record<PlainKind, [number, number]> = {
    displacement: [0, 0],
    velocity: [0, 0],
    acceleration: [0, 0],
    force: [0, 0],
  };
  const out = new Float64Array(2);
  const [q, v] = [new Float64Array(1), new Float64Array(1)];
  for (const { mode, start } of modes) {
    const { omega, order } = mode.frequency;
    const rate = dampingRate(member.damping, order, omega);
    freeMotion(start.position, start.velocity, omega, rate, Float64Array.of(t), q, v);
    evaluateShape(member, mode.shape, i, d, out);
    const terms: Record<PlainKind, number> = {
      displacement: out[0] * q[0],
      velocity: out[0] * v[0],
      acceleration: -out[0] * (omega * omega * q[0] + rate * v[0]),
      force: out[1] * (q[0] + member.damping.stiffnessCoefficient * v[0]),
    };
    // amplitudes, since a term may pass zero where its phase is known to rounding only
    const high = Math.hypot(out[0], out[1] / (omega || 1));
    const amplitude = Math.sqrt(2 * start.energy);
    const sizes: Record<PlainKind, number> = {
      displacement: (high * amplitude) / (omega || 1),
      velocity: high * amplitude,
      acceleration: high * amplitude * (omega + rate),
      force: high * amplitude * 3 * (1 + member.damping.stiffnessCoefficient * omega),
    };
    for (const kind of Object.keys(sums) as PlainKind[]) {
      sums[kind][0] += terms[kind];
      sums[kind][1] += sizes[kind];
    }
  }
  return sums;
}

const kinds: PlainKind[] = ['displacement', 'velocity', 'acceleration', 'force'];

const dampings: [string, Damping | undefined][] = [
  ['undamped', undefined],
  ['ratios', { type: 'ratios', values: [0.02, 0.3, 1.2, 0.05] }],
  ['rayleigh', { type: 'rayleigh', massCoefficient: 0.3, stiffnessCoefficient: 0.01 }],
];

describe('fields are the sums over the modes', () => {
  it.each(dampings)('%s', (_, damping) => {
    const member = waveMember({ ...stepped, ...(damping && { damping }) });
    const modes = started(member, initial, 150);
    const stations = placeStations(member, evenPositions(member, 27));
    const times = Float64Array.from({ length: 31 }, (_time, j) => (12 * j) / 30);
    const fields = sampleMotion(member, modes, stations, times, kinds, 0, () => {});
    let worst = 0;
    for (let j = 0; j < times.length; j += 3) {
      for (let x = 0; x < 27; x++) {
        const seat: [number, number] = [stations.segment[x], stations.distance[x]];
        const plain = plainEntry(member, modes, seat, times[j]);
        for (const kind of kinds) {
          const found = fields.get(kind)![j * 27 + x];
          const [value, size] = plain[kind];
          // 150 terms, each with the phase error of its own evaluation (ω t up to 2,500)
          worst = Math.max(worst, Math.abs(found - value) / (EPS * size * 64 + 1e-13 * size));
        }
      }
    }
    expect(worst).toBeLessThan(1);
  });

  it('rigid-body drift is included', () => {
    const member = waveMember(uniformTrial(2, { near: 'free', far: 'free' }));
    const modes = started(member, { velocity: { type: 'uniform', value: 3, from: 0 } }, 4);
    const fields = sampleMotion(
      member,
      modes,
      placeStations(member, [0, 0.3, 1]),
      Float64Array.of(0, 1, 50),
      kinds,
      0,
      () => {},
    );
    [0, 3, 150].forEach((expected, j) => {
      for (let x = 0; x < 3; x++) {
        expect(fields.get('displacement')![3 * j + x]).toBeCloseTo(expected, 11);
        expect(fields.get('velocity')![3 * j + x]).toBeCloseTo(3, 13);
        expect(fields.get('force')![3 * j + x]).toBeCloseTo(0, 13);
      }
    });
  });
});

describe('averages over a gauge time are those of the instantaneous fields', () => {
  it.each(dampings)('%s', (_, damping) => {
    const member = waveMember({ ...stepped, ...(damping && { damping }) });
    const modes = started(member, initial, 12);
    const stations = placeStations(member, [0.2, 1, 1.4, 2.9]);
    const gauge = 0.7;
    // the first windows begin at 0, the window being clamped there
    const times = Float64Array.of(0, 0.2, 0.35, 1.3, 4);
    const averages = sampleMotion(member, modes, stations, times, kinds, gauge, () => {});
    times.forEach((t, j) => {
      const begin = Math.max(0, t - gauge / 2);
      const points = panelRule(begin, begin + gauge, 12);
      const instants = sampleMotion(
        member,
        modes,
        stations,
        Float64Array.from(points, ({ x }) => x),
        kinds,
        0,
        () => {},
      );
      for (let x = 0; x < 4; x++) {
        for (const kind of ['velocity', 'acceleration', 'force'] as const) {
          const field = instants.get(kind)!;
          const mean = points.reduce((sum, { weight }, m) => sum + weight * field[4 * m + x], 0) / gauge;
          const size = field.reduce((top, value) => Math.max(top, Math.abs(value)), 0);
          expect(Math.abs(averages.get(kind)![4 * j + x] - mean)).toBeLessThan(1e-12 * size);
        }
        // a displacement is never averaged
        const plain = plainEntry(member, modes, [stations.segment[x], stations.distance[x]], t);
        expect(Math.abs(averages.get('displacement')![4 * j + x] - plain.displacement[0])).toBeLessThan(
          1e-13,
        );
      }
    });
  });
});

describe('tiles', () => {
  const member = waveMember(stepped);
  const modes = started(member, initial, 70);

  function expectNoSeam(stations: Stations, times: Float64Array, rows: number[], columns: number[]): void {
    const seen: [number, number, number][] = [];
    const fields = sampleMotion(
      member,
      modes,
      stations,
      times,
      ['displacement', 'force'],
      0,
      (mode, u, p, first) => {
        expect(p).toHaveLength(u.length);
        seen.push([mode.frequency.order, first, u.length]);
      },
    );
    const width = stations.segment.length;
    for (const row of rows) {
      for (const column of columns) {
        const seat: [number, number] = [stations.segment[column], stations.distance[column]];
        const plain = plainEntry(member, modes, seat, times[row]);
        for (const kind of ['displacement', 'force'] as const) {
          const [value, size] = plain[kind];
          expect(Math.abs(fields.get(kind)![row * width + column] - value)).toBeLessThan(1e-12 * size);
        }
      }
    }
    // every mode meets every station once
    for (const { mode } of modes) {
      const own = seen.filter(([order]) => order === mode.frequency.order);
      expect(own.map(([, first]) => first)).toEqual(width > 2048 ? [0, 2048] : [0]);
      expect(own.reduce((sum, [, , length]) => sum + length, 0)).toBe(width);
    }
  }

  it('of many stations join without seam', () => {
    const stations = placeStations(member, evenPositions(member, 2100));
    expectNoSeam(stations, Float64Array.of(0.3, 2), [0, 1], [0, 1, 2046, 2047, 2048, 2049, 2099]);
  });

  it('of many times join without seam', () => {
    const times = Float64Array.from({ length: 2100 }, (_, j) => 0.002 * j);
    expectNoSeam(placeStations(member, [0.4, 2]), times, [0, 2046, 2047, 2048, 2049, 2099], [0, 1]);
  });

  it('an entry has the same bits whatever other times and uneven stations are asked', () => {
    const positions = [0.1, 0.35, 1.2, 2.2, 3];
    const times = Float64Array.of(0, 0.1, 0.7, 3);
    const all = sampleMotion(member, modes, placeStations(member, positions), times, kinds, 0, () => {});
    const one = sampleMotion(
      member,
      modes,
      placeStations(member, [2.2]),
      Float64Array.of(0.7),
      ['force'],
      0,
      () => {},
    );
    expect(one.get('force')![0]).toBe(all.get('force')![2 * 5 + 3]);
  });
});

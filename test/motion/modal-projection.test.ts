import { describe, expect, it } from 'vitest';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { ModeSeries, type Mode } from '../../src/modes/mode-series.ts';
import { readInitialState } from '../../src/motion/initial-state.ts';
import { ModalProjection } from '../../src/motion/modal-projection.ts';
import type { InitialMotion, Shape } from '../../src/spec/types.ts';
import { travelTime } from '../../src/spectrum/spectrum-size.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';
import { motionValues } from './motion-values.ts';

const EPS = Number.EPSILON;

function modes(member: WaveMember, orders: readonly number[]): Mode[] {
  const series = new ModeSeries(member);
  const list: Mode[] = [];
  for (let n = 1; n <= Math.max(...orders); n++) {
    const mode = series.next()!;
    if (orders.includes(n)) list.push(mode);
  }
  return list;
}

function projection(member: WaveMember, initial: InitialMotion): ModalProjection {
  const { displacement, velocity } = readInitialState(member, initial);
  return new ModalProjection(member, displacement, velocity);
}

describe('powers of x on part of a uniform member, degree 0 … 20, agree with 25-digit values', () => {
  const member = waveMember(uniformTrial(1, {}, [2, 3, 0.5]));
  const orders = [1, 2, 7, 50, 400];
  const found = modes(member, orders);

  it.each(orders.map((order, index) => [order, index] as const))('mode %i', (order, index) => {
    let worst = 0;
    for (const [n, degree, expected] of motionValues.uniform) {
      if (n !== order) continue;
      const coefficients = Array.from({ length: degree + 1 }, (_, d) => (d === degree ? 1 : 0));
      const velocity: Shape = { type: 'polynomial', coefficients, from: 0.25, to: 1.75 };
      const start = projection(member, { velocity }).project(found[index].shape);
      const phase = order * Math.PI;
      // the terms of ∫ρ g φ, their phases known to some roundings
      const width = Math.min(1.5, (2 + 2 * degree) / (phase / 2));
      const scale = 0.5 * Math.SQRT2 * 1.75 ** degree * width;
      worst = Math.max(worst, Math.abs(start.velocity - Number(expected)) / (EPS * scale * (32 + 8 * phase)));
      expect(start.position).toBe(0);
    }
    expect(worst).toBeLessThan(1);
  });
});

describe('a stepped member with foundation, masses and a spring agrees with 25-digit mass products', () => {
  const member = waveMember({
    segments: [
      [1, 2, 3],
      [0.75, 5, 0.5, 40],
      [1.5, 3, 1],
    ],
    far: 'free',
    masses: { 1: 0.5, 3: 0.25 },
    springs: { 2: 4 },
  });
  const shapes: Record<string, Shape> = {
    polyline: { type: 'polyline', positions: [0, 0.5, 1.25, 2, 3.25], values: [0, 0.75, -0.5, 1, 0.25] },
    polynomial: { type: 'polynomial', coefficients: [0, 1, -0.5, 0.25, 0.125, -0.0625, 0.015625], from: 0 },
    bump: { type: 'polynomial', coefficients: [1.5625, -7.5, 11.5, -6, 1], from: 0.5, to: 2.5 },
    'half-sine': { type: 'half-sine', amplitude: 1, halfWaves: 3 },
    uniform: { type: 'uniform', value: 1, from: 0.5, to: 2.5 },
  };
  const orders = motionValues.stepped.map(({ order }) => order);
  const found = modes(member, orders);
  const time = travelTime(member);

  it('the frequencies are those of the table', () => {
    motionValues.stepped.forEach(({ omega }, index) => {
      expect(Math.abs(found[index].frequency.omega / Number(omega) - 1)).toBeLessThan(8 * EPS);
    });
  });

  it.each(['polyline', 'polynomial', 'bump', 'half-sine'] as const)('displacement %s', (name) => {
    const all = projection(member, { displacement: shapes[name] });
    motionValues.stepped.forEach(({ products }, index) => {
      const { shape, frequency } = found[index];
      const start = all.project(shape);
      // the strain form, divided by ω²; its terms and their phases carry some roundings
      const scale = (start.positionScale / frequency.omega) * (64 + 8 * frequency.omega * time);
      expect(Math.abs(start.position - Number(products[name]))).toBeLessThan(EPS * scale);
      expect(start.velocity).toBe(0);
      expect(start.energy).toBeCloseTo(0.5 * (frequency.omega * start.position) ** 2, 14);
    });
  });

  it.each(['polyline', 'polynomial', 'bump', 'half-sine', 'uniform'] as const)('velocity %s', (name) => {
    const all = projection(member, { velocity: shapes[name] });
    motionValues.stepped.forEach(({ products }, index) => {
      const { shape, frequency } = found[index];
      const start = all.project(shape);
      const scale = start.velocityScale * (64 + 8 * frequency.omega * time);
      expect(Math.abs(start.velocity - Number(products[name]))).toBeLessThan(EPS * scale);
      expect(start.energy).toBeCloseTo(0.5 * start.velocity ** 2, 14);
    });
  });

  it('the scale of rounding is at least the term itself and not absurdly more', () => {
    for (const shape of Object.values(shapes)) {
      const all = projection(member, { velocity: shape });
      found.forEach((mode) => {
        const { velocity, velocityScale } = all.project(mode.shape);
        expect(velocityScale).toBeGreaterThanOrEqual(Math.abs(velocity));
        // sums of magnitudes of all pieces, coefficients and the mass: a few ten
        expect(velocityScale).toBeLessThan(1e3);
      });
    }
  });

  it('shapes, velocities, masses and impulses add up', () => {
    const whole = projection(member, {
      displacement: [shapes.polyline, shapes['half-sine']],
      velocity: [shapes.uniform, shapes.bump],
    });
    const parts = [
      projection(member, { displacement: shapes.polyline, velocity: shapes.uniform }),
      projection(member, { displacement: shapes['half-sine'], velocity: shapes.bump }),
    ];
    for (const { shape } of found) {
      const sum = whole.project(shape);
      const [a, b] = parts.map((part) => part.project(shape));
      expect(Math.abs(sum.position - a.position - b.position)).toBeLessThan(1e-13);
      expect(Math.abs(sum.velocity - a.velocity - b.velocity)).toBeLessThan(1e-13);
    }
  });

  it('a velocity of a mass alone is M v φ, an impulse J φ', () => {
    const struck = projection(member, { massVelocities: [{ at: 1, velocity: 3 }] });
    const hit = projection(member, { impulses: [{ at: 3.25, impulse: 0.75 }] });
    for (const { shape } of found) {
      expect(struck.project(shape).velocity).toBeCloseTo(0.5 * 3 * shape.ends[2], 14);
      expect(hit.project(shape).velocity).toBeCloseTo(0.75 * shape.ends[10], 14);
    }
  });
});

describe('a pull at x needs no integral', () => {
  it('a_n = F φ_n(x)/ω_n²', () => {
    const [length, k, rho, at, force] = [2, 3, 0.5, 0.7, 4];
    const member = waveMember(uniformTrial(2, {}, [length, k, rho]));
    const all = projection(member, { displacement: { type: 'pull', at, force } });
    modes(member, [1, 2, 3, 10, 100]).forEach(({ shape, frequency }) => {
      const n = frequency.order;
      const high = Math.sqrt(2 / (rho * length)) * Math.sin((n * Math.PI * at) / length);
      const omega = (n * Math.PI * Math.sqrt(k / rho)) / length;
      const expected = (force * high) / omega ** 2;
      expect(Math.abs(all.project(shape).position - expected)).toBeLessThan(
        (EPS * (32 + 16 * n) * force * 1.5) / omega ** 2,
      );
    });
  });

  it('equals the polyline of the same shape', () => {
    const member = waveMember({
      segments: [
        [1, 2, 3],
        [2, 2, 1],
      ],
      far: 'free',
      springs: { 2: 0.5 },
    });
    // springs in a row: 1/K + L/k; the far end moves by its share
    const pull = projection(member, { displacement: { type: 'pull', at: 1.5, amplitude: 0.02 } });
    const far = 0.02 * (2 / 1.5 / (2 / 1.5 + 0.5));
    const line = projection(member, {
      displacement: { type: 'polyline', positions: [0, 1.5, 3], values: [0, 0.02, far] },
    });
    for (const { shape } of modes(member, [1, 2, 3, 4, 20, 80])) {
      const [a, b] = [pull.project(shape).position, line.project(shape).position];
      expect(Math.abs(a - b)).toBeLessThan(1e-15);
    }
  });
});

describe('half sines on a uniform member are single modes', () => {
  it.each([1, 3, 40, 500])('%i half waves', (halfWaves) => {
    const member = waveMember(uniformTrial(3, {}, [2, 3, 0.5]));
    const all = projection(member, { displacement: { type: 'half-sine', amplitude: 0.1, halfWaves } });
    const near = [halfWaves - 1, halfWaves, halfWaves + 1].filter((n) => n > 0);
    for (const { shape, frequency } of modes(member, near)) {
      const expected = frequency.order === halfWaves ? 0.1 * Math.sqrt(0.5) : 0;
      // sinc of the difference of phases: some roundings of the phase
      expect(Math.abs(all.project(shape).position - expected)).toBeLessThan(
        0.1 * EPS * (64 + 16 * Math.PI * halfWaves),
      );
    }
  });
});

it('a rigid-body mode starts at m(f, φ) with velocity m(g, φ): mean position and momentum over √m', () => {
  const member = waveMember({
    segments: [
      [1, 2, 3],
      [2, 5, 1],
    ],
    near: 'free',
    far: 'free',
    masses: { 0: 1, 2: 2 },
  });
  const all = projection(member, {
    displacement: { type: 'polynomial', coefficients: [1, 2], from: 0 },
    velocity: { type: 'uniform', value: 3, from: 0, to: 1 },
    impulses: [{ at: 3, impulse: 5 }],
  });
  const [rigid] = modes(member, [1]);
  const start = all.project(rigid.shape);
  // ∫ρ(1 + 2x) = 3·2 + [x + x²]₁³ = 16, masses 1·1 + 2·7; momentum 3·3 + 1·3 + 5; m = 8
  expect(start.position).toBeCloseTo((6 + 10 + 1 + 14) / Math.sqrt(8), 14);
  expect(start.velocity).toBeCloseTo(17 / Math.sqrt(8), 14);
  expect(start.energy).toBeCloseTo(17 ** 2 / 16, 13);
});

it('Parseval: the energies of the modes sum up to the whole, from below', () => {
  const member = waveMember({
    segments: [
      [1, 2, 3],
      [0.75, 5, 0.5, 40],
      [1.5, 3, 1],
    ],
    far: 'free',
    masses: { 1: 0.5 },
    springs: { 3: 4 },
  });
  const initial: InitialMotion = {
    displacement: [
      { type: 'pull', at: 0.4, amplitude: 0.3 },
      { type: 'polyline', positions: [0, 1.2, 2, 3.25], values: [0, 0.1, -0.2, 0.3] },
    ],
    velocity: { type: 'uniform', value: 0.7, from: 1.1, to: 2.5 },
  };
  const total = readInitialState(member, initial).energies[0];
  const all = projection(member, initial);
  const series = new ModeSeries(member);
  let sum = 0;
  for (let n = 0; n < 1000; n++) sum += all.project(series.next()!.shape).energy;
  expect(sum).toBeLessThan(total);
  // kinks and jumps: what is left falls as 1/N
  expect(sum).toBeGreaterThan(total * (1 - 5 / 1000));
});

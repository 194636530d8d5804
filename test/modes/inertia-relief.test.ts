import { describe, expect, it } from 'vitest';
import { InertiaRelief } from '../../src/modes/inertia-relief.ts';
import { ModeSeries } from '../../src/modes/mode-series.ts';
import { evaluateShape } from '../../src/modes/mode-shape.ts';
import { RandomStream } from '../support/random.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;
const free = { near: 'free', far: 'free' } as const;

const roundings = (found: number, expected: number): number =>
  expected === 0 ? (found === 0 ? 0 : Infinity) : Math.abs(found / expected - 1) / EPS;

describe('a free bar under a unit force balanced by its inertia', () => {
  it.each([1, 3, 8])('in %i segments: G⊥ = (L/k)(1/3 − ξ + ξ²), H⊥ = m ξ(1 − ξ), ξ = x/L', (count) => {
    const [length, k, rho] = [4, 5, 3];
    const member = waveMember(uniformTrial(count, free, [length, k, rho]));
    const relief = new InertiaRelief(member);
    for (let i = 0; i < count; i++) {
      for (const share of [0, 0.25, 0.5, 0.9, 1]) {
        const d = share * member.length[i];
        const xi = (member.position[i] + d) / length;
        expect(roundings(relief.flexibility(i, d), (length / k) * (1 / 3 - xi + xi * xi))).toBeLessThan(32);
        const flux = relief.fluxInertia(i, d);
        expect(Math.abs(flux - length * rho * xi * (1 - xi))).toBeLessThan(32 * EPS * length * rho);
      }
    }
  });

  it('two masses on a spring: G⊥ at one of them is (m₂/m)²/K, H⊥ = m₁m₂/m', () => {
    const member = waveMember({ segments: [[0.5, 6, 0]], ...free, masses: { 0: 1, 1: 4 } });
    const relief = new InertiaRelief(member);
    expect(roundings(relief.flexibility(0, 0), 0.64 / 12)).toBeLessThan(4);
    expect(roundings(relief.flexibility(0, 0.5), 0.04 / 12)).toBeLessThan(4);
    expect(roundings(relief.fluxInertia(0, 0.2), 4 / 5)).toBeLessThan(4);
  });

  it('an end without mass carries no force: H⊥ = 0 there', () => {
    const relief = new InertiaRelief(waveMember(uniformTrial(2, free)));
    expect(relief.fluxInertia(0, 0)).toBe(0);
    expect(relief.fluxInertia(1, 0.5)).toBe(0);
  });
});

it('the influence of a free uniform bar integrates to −(1 − ξ) z, then + ξ (z − x)', () => {
  const relief = new InertiaRelief(
    waveMember({
      near: 'free',
      far: 'free',
      segments: [
        [1, 5, 2],
        [3, 5, 2],
      ],
    }),
  );
  // L = 4: a force at z < x has the influence −(1 − ξ) on the flux at x, at z > x the influence ξ
  expect(relief.influenceIntegral(1, 1, 0, 0.6)).toBeCloseTo(-0.5 * 0.6, 14);
  expect(relief.influenceIntegral(1, 1, 1, 2.5)).toBeCloseTo(-0.5 * 2 + 0.5 * 1.5, 14);
});

it('G⊥ and H⊥ are the sums of φ²/ω² and p²/ω⁴ over the elastic modes, to their last term', () => {
  const random = new RandomStream(8);
  const member = waveMember({
    segments: Array.from({ length: 4 }, () => [
      random.between(0.5, 2),
      random.decades(-1, 1),
      random.decades(-1, 1),
    ]),
    ...free,
    masses: { 1: 0.4, 4: 2 },
  });
  const relief = new InertiaRelief(member);
  const series = new ModeSeries(member);
  const stations: [number, number][] = [
    [0, 0.1],
    [1, 0.3],
    [2, 0.2],
    [3, 0.4],
  ];
  const sums = stations.map(() => [0, 0]);
  const out = new Float64Array(2);
  const count = 1500;
  for (let n = 0; n < count; n++) {
    const mode = series.next()!;
    if (mode.frequency.omega === 0) continue;
    stations.forEach(([i, d], q) => {
      evaluateShape(member, mode.shape, i, d, out);
      sums[q][0] += out[0] ** 2 / mode.shape.lambda;
      sums[q][1] += out[1] ** 2 / mode.shape.lambda ** 2;
    });
  }
  stations.forEach(([i, d], q) => {
    const [g, h] = [relief.flexibility(i, d), relief.fluxInertia(i, d)];
    // what is left falls as 1/N: positive, and below a few terms of the last mean size
    expect(g - sums[q][0]).toBeGreaterThan(0);
    expect(g - sums[q][0]).toBeLessThan((20 * g) / count);
    expect(h - sums[q][1]).toBeGreaterThan(0);
    expect(h - sums[q][1]).toBeLessThan((20 * h) / count);
  });
});

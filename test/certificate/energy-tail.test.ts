import { describe, expect, it } from 'vitest';
import { EnergyTail } from '../../src/certificate/energy-tail.ts';

const EPS = Number.EPSILON;

/** Energies of a string plucked at a third: E_n ∝ sin²(nπ/3)/n², ω_n = n (Morse, Vibration and Sound, § 3). */
function pluck(n: number): number {
  return Math.sin((n * Math.PI) / 3) ** 2 / (n * n);
}
/** Σ sin²(nπ/3)/n² = π² · (1/3)(2/3)/2 (Fourier series of the triangle). */
const PLUCK = Math.PI ** 2 / 9;

describe('what is left of the energy', () => {
  it('is the total less what was taken, within its floor of the sum of what follows', () => {
    const tail = new EnergyTail([PLUCK, null, null]);
    let taken = 0;
    for (let n = 1; n <= 400; n++) {
      tail.add(pluck(n), n * n, 0, 0);
      taken += pluck(n);
      const left = tail.energy((n + 1) ** 2);
      expect(Math.abs(left - (PLUCK - taken))).toBeLessThan(80 * EPS * PLUCK);
      // Σ beyond N is below ∫ 1/n², and the floor is above 0
      expect(left).toBeLessThan(1 / n + 80 * EPS * PLUCK);
    }
    expect(tail.captured).toBeCloseTo(taken, 14);
    expect(tail.atFloor).toBe(false);
  });

  it('never falls below the floor of 64 roundings of the total', () => {
    const tail = new EnergyTail([1, null, null]);
    expect(tail.energy(4)).toBe(1 + 64 * EPS);
    tail.add(1, 1, 0, 0);
    expect(tail.energy(4)).toBeGreaterThanOrEqual(64 * EPS);
    expect(tail.energy(4)).toBeLessThan(80 * EPS);
    expect(tail.atFloor).toBe(true);
    expect(tail.excess).toBeLessThan(0);
  });

  it('the floor grows by the error of each energy and by the coupling of close neighbours', () => {
    const plain = new EnergyTail([1, null, null]);
    const slack = new EnergyTail([1, null, null]);
    const coupled = new EnergyTail([1, null, null]);
    for (const tail of [plain, slack, coupled]) tail.add(0.5, 1, 0, 0);
    plain.add(0.5, 1, 0, 0);
    slack.add(0.5, 1, 1e-6, 0);
    coupled.add(0.5, 1, 0, 1e-6);
    expect(slack.energy(4) - plain.energy(4)).toBeCloseTo(1e-6, 18);
    // 2 |m(φ, φ')| √(E E')
    expect(coupled.energy(4) - plain.energy(4)).toBeCloseTo(1e-6, 18);
  });

  it('energy captured beyond the total is told, not clamped', () => {
    const tail = new EnergyTail([1, null, null]);
    tail.add(0.9, 1, 0, 0);
    expect(tail.excess).toBeLessThan(0);
    tail.add(0.2, 1, 0, 0);
    expect(tail.excess).toBeGreaterThan(0.09);
  });
});

describe('higher levels of smooth data', () => {
  // E_n = n⁻⁶ with ω_n = n: Σ n⁻⁶ = π⁶/945, Σ n⁻⁴ = π⁴/90, Σ n⁻² = π²/6 (Euler)
  const totals = [Math.PI ** 6 / 945, Math.PI ** 4 / 90, Math.PI ** 2 / 6] as const;

  it('bound the lower ones, E⁰ ≤ E¹/ω² ≤ E²/ω⁴, below the floor of subtraction', () => {
    const tail = new EnergyTail(totals);
    const count = 3000;
    for (let n = 1; n <= count; n++) tail.add(n ** -6, n * n, 0, 0);
    const next = (count + 1) ** 2;
    // Σ beyond N of n⁻² is 1/N − …, of n⁻⁶ it is N⁻⁵/5
    expect(tail.second()).toBeGreaterThan(1 / (count + 1));
    expect(tail.second()).toBeLessThan(1 / count + 1e-11);
    expect(tail.first(next)).toBeLessThanOrEqual(tail.second() / next);
    expect(tail.energy(next)).toBeLessThanOrEqual(tail.second() / next ** 2);
    expect(tail.energy(next)).toBeGreaterThan(0.2 * (count + 1) ** -5);
    expect(tail.energy(next)).toBeLessThan(64 * EPS * totals[0]);
  });

  it('are infinite where the data are not smooth enough', () => {
    const kinked = new EnergyTail([1, null, null]);
    expect(kinked.first(1)).toBe(Infinity);
    expect(kinked.second()).toBe(Infinity);
    const once = new EnergyTail([1, 2, null]);
    expect(once.first(1)).toBe(2 * (1 + 64 * EPS));
    expect(once.second()).toBe(Infinity);
    expect(once.energy(4)).toBeCloseTo(0.5, 12);
  });
});

describe('energy that is missing tells of a wrong shape', () => {
  it('with every mode taken: what is left beyond the floor', () => {
    const tail = new EnergyTail([1, null, null]);
    tail.add(0.75, 1, 0, 0);
    expect(tail.missing(Infinity)).toBeCloseTo(0.25, 12);
    tail.add(0.25, 4, 0, 0);
    expect(tail.missing(Infinity)).toBeLessThan(0);
  });

  it('before that only beyond what the smoothness of the data allows, E¹_tail/ω²', () => {
    const tail = new EnergyTail([1, 2, null]);
    tail.add(0.5, 1, 0, 0);
    // left 0.5 of E⁰ and 1.5 of E¹: at ω² = 4 it may be 0.375, at ω² = 3 it may be 0.5
    expect(tail.missing(4)).toBeCloseTo(0.125, 12);
    expect(tail.missing(2)).toBeLessThan(0);
    const rough = new EnergyTail([1, null, null]);
    rough.add(0.5, 1, 0, 0);
    expect(rough.missing(1e300)).toBe(-Infinity);
  });

  it('the rounding of the data widens the floors', () => {
    const tail = new EnergyTail([1, 2, 3], [1e-6, 1e-5, 1e-4]);
    tail.add(1, 1, 0, 0);
    expect(tail.energy(1e-9)).toBeCloseTo(1e-6, 12);
    expect(tail.second()).toBeCloseTo(2 + 1e-4, 9);
    expect(tail.excess).toBeLessThan(-1e-6);
  });
});

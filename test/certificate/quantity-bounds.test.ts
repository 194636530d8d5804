import { describe, expect, it } from 'vitest';
import { tailFactors, type TailEnergies } from '../../src/certificate/quantity-bounds.ts';
import type { ModalDamping } from '../../src/members/wave-member.ts';

const none: ModalDamping = { ratios: [], massCoefficient: 0, stiffnessCoefficient: 0 };
const smooth: TailEnergies = { energy: 8, first: 50, second: 200, nextOmega: 10 };
const once: TailEnergies = { ...smooth, second: Infinity };
const rough: TailEnergies = { ...smooth, first: Infinity, second: Infinity };
// √2E, √2E¹, √2E²
const [e0, e1, e2] = [4, 10, 20];

describe('displacement has a pointwise bound whatever the data and the damping', () => {
  it.each([none, { ...none, ratios: [6] }, { ...none, massCoefficient: 3, stiffnessCoefficient: 2 }])(
    '%o',
    (damping) => {
      for (const gauge of [0, 0.5]) {
        expect(tailFactors('displacement', rough, damping, 3, gauge, false)).toMatchObject({
          kind: 'pointwise',
          onFlexibility: e0,
          onFluxInertia: 0,
          exists: true,
        });
      }
    },
  );
});

describe('velocity', () => {
  it('at the instant needs E¹, else only its mean square is bounded', () => {
    expect(tailFactors('velocity', once, none, 3, 0, false)).toMatchObject({
      kind: 'pointwise',
      onFlexibility: e1,
      exists: true,
    });
    expect(tailFactors('velocity', rough, none, 3, 0, false)).toMatchObject({
      kind: 'rms',
      exists: false,
      rmsNumerator: e0,
    });
  });

  it('averaged over τ takes 2/τ of the displacement, or E¹ if that is smaller', () => {
    expect(tailFactors('velocity', rough, none, 3, 0.5, false)).toMatchObject({
      kind: 'gauge-average',
      onFlexibility: 4 * e0,
      exists: true,
    });
    expect(tailFactors('velocity', once, none, 3, 0.5, false).onFlexibility).toBe(e1);
    expect(tailFactors('velocity', once, none, 3, 8, false).onFlexibility).toBe(1);
  });
});

describe('force', () => {
  it('goes with the flux inertia and E¹ at the instant', () => {
    expect(tailFactors('force', once, none, 3, 0, false)).toMatchObject({
      kind: 'pointwise',
      onFlexibility: 0,
      onFluxInertia: e1,
    });
    expect(tailFactors('stress', rough, none, 3, 0, true)).toMatchObject({ kind: 'rms', rmsNumerator: e0 });
  });

  it('averaged under a damping ratio takes √(1 + 4ζ²), the largest ζ above N', () => {
    const damping = { ...none, ratios: [9, 9, 9, 0.2, 0.75] };
    expect(tailFactors('force', rough, damping, 3, 0.5, false).onFluxInertia).toBeCloseTo(
      4 * e0 * Math.sqrt(1 + 4 * 0.75 ** 2),
      12,
    );
  });

  it('averaged under Rayleigh damping takes √(1 + (α/ω)²), no β: the total flux', () => {
    const damping = { ...none, massCoefficient: 20, stiffnessCoefficient: 1 };
    expect(tailFactors('force', rough, damping, 3, 0.5, false).onFluxInertia).toBeCloseTo(
      4 * e0 * Math.sqrt(5),
      12,
    );
  });

  it('at the instant under β needs E² as well unless the motion starts from rest', () => {
    const damping = { ...none, massCoefficient: 20, stiffnessCoefficient: 0.3 };
    expect(tailFactors('force', smooth, damping, 3, 0, false).onFluxInertia).toBeCloseTo(e1 + 0.3 * e2, 12);
    expect(tailFactors('force', once, damping, 3, 0, false).exists).toBe(false);
    expect(tailFactors('force', once, damping, 3, 0, true).onFluxInertia).toBeCloseTo(e1 * Math.sqrt(5), 12);
    // and then not even the mean square of the total flux is bounded by E⁰
    expect(tailFactors('force', rough, damping, 3, 0, false).rmsNumerator).toBe(Infinity);
    expect(tailFactors('force', rough, damping, 3, 0, true).rmsNumerator).toBeCloseTo(e0 * Math.sqrt(5), 12);
  });
});

describe('acceleration', () => {
  it('at the instant needs E², its average E¹', () => {
    expect(tailFactors('acceleration', smooth, none, 3, 0, false).onFlexibility).toBe(e2);
    expect(tailFactors('acceleration', once, none, 3, 0, false)).toMatchObject({
      exists: false,
      kind: 'rms',
      rmsNumerator: e1,
    });
    expect(tailFactors('acceleration', once, none, 3, 0.5, false)).toMatchObject({
      kind: 'gauge-average',
      onFlexibility: 4 * e1,
    });
    expect(tailFactors('acceleration', rough, none, 3, 0.5, false).exists).toBe(false);
  });

  it('takes √(1 + 4ζ²) with an initial velocity, nothing more from rest, no bound under β', () => {
    const ratio = { ...none, ratios: [0.75] };
    expect(tailFactors('acceleration', smooth, ratio, 3, 0, false).onFlexibility).toBeCloseTo(
      e2 * Math.sqrt(3.25),
      12,
    );
    expect(tailFactors('acceleration', smooth, ratio, 3, 0, true).onFlexibility).toBe(e2);
    const beta = { ...none, stiffnessCoefficient: 0.3 };
    expect(tailFactors('acceleration', smooth, beta, 3, 0, false).exists).toBe(false);
    expect(tailFactors('acceleration', smooth, beta, 3, 0, true).onFlexibility).toBe(e2);
  });
});

it('an exhausted tail needs no bound: 0 even where a level does not exist', () => {
  const nothing: TailEnergies = { energy: 0, first: 0, second: 0, nextOmega: 10 };
  const beta = { ...none, stiffnessCoefficient: 0.3 };
  for (const quantity of ['displacement', 'velocity', 'acceleration', 'force', 'stress'] as const) {
    const factors = tailFactors(quantity, nothing, beta, 3, 0, false);
    expect(factors).toMatchObject({ exists: true, onFlexibility: 0, onFluxInertia: 0 });
  }
});

/**
 * The factors against single modes: whatever a, v, ζ, |q| ≤ √2E/ω, |q′| ≤ √2E; the mean of −(q″ + c q′)/ω²
 * over τ is at most (2/τ) √(1 + (c/ω)²) √2E/ω².
 */
it('no single damped mode exceeds its factor (free motion by its exponentials)', () => {
  let worst = 0;
  for (const zeta of [0, 0.1, 0.7, 1.5, 4]) {
    for (const tau of [0.05, 0.7, 3]) {
      for (let j = 0; j < 40; j++) {
        const [a, v] = [Math.cos(j), Math.sin(j)];
        const factors = tailFactors(
          'force',
          { ...rough, energy: 0.5, nextOmega: 1 },
          { ...none, ratios: [zeta] },
          0,
          tau,
          false,
        );
        const root = Math.sqrt(Math.abs(1 - zeta * zeta));
        const [c, s] =
          zeta < 1
            ? [(t: number) => Math.cos(root * t), (t: number) => Math.sin(root * t) / root]
            : [(t: number) => Math.cosh(root * t), (t: number) => Math.sinh(root * t) / root];
        const q = (t: number): number => Math.exp(-zeta * t) * (a * c(t) + (v + zeta * a) * s(t));
        const u = (t: number): number => Math.exp(-zeta * t) * (v * c(t) - (a + zeta * v) * s(t));
        for (let t = 0; t < 6; t += 0.1) {
          const mean = -(u(t + tau) - u(t) + 2 * zeta * (q(t + tau) - q(t))) / tau;
          worst = Math.max(worst, Math.abs(mean) / factors.onFluxInertia);
        }
      }
    }
  }
  expect(worst).toBeLessThan(1);
  expect(worst).toBeGreaterThan(0.5);
});

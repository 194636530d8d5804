import { describe, expect, it } from 'vitest';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { ModeSeries } from '../../src/modes/mode-series.ts';
import { evaluateShape, segmentMeanSquare, type ModeShape } from '../../src/modes/mode-shape.ts';
import { movingInertia, participationFactor, type MovingEnds } from '../../src/modes/participation.ts';
import { StaticResponse } from '../../src/modes/static-response.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';
import { integrate } from './quadrature.ts';

const EPS = Number.EPSILON;

function shapes(member: WaveMember, count: number): ModeShape[] {
  const series = new ModeSeries(member);
  return Array.from({ length: count }, () => series.next()!.shape);
}

/** Effective mass fractions of the first modes. */
function fractions(member: WaveMember, ends: MovingEnds, count: number): number[] {
  const mass = movingInertia(member, ends);
  return shapes(member, count).map((shape) => participationFactor(member, shape, ends) ** 2 / mass);
}

describe('effective masses of uniform members', () => {
  it('fixed–free on a moving support: 8/(π²(2n − 1)²) (A. K. Chopra, Dynamics of Structures, shear beam; from memory)', () => {
    const member = waveMember(uniformTrial(3, { far: 'free' }, [12, 4e8, 900]));
    expect(movingInertia(member, 'near')).toBeCloseTo(10_800, 9);
    fractions(member, 'near', 20).forEach((fraction, index) => {
      const odd = 2 * index + 1;
      expect(Math.abs(fraction * Math.PI ** 2 * odd * odd - 8)).toBeLessThan(EPS * (64 + 64 * odd));
    });
  });

  it('fixed–fixed, both ends moving: 8/(π²n²) for odd n, nothing for even n', () => {
    const member = waveMember(uniformTrial(2));
    fractions(member, 'both', 16).forEach((fraction, index) => {
      const n = index + 1;
      const expected = n % 2 === 1 ? 8 / (Math.PI * n) ** 2 : 0;
      expect(Math.abs(fraction - expected)).toBeLessThan(64 * EPS);
    });
  });

  it('fixed–fixed, one end moving: 6/(π²n²) of ρL/3', () => {
    const member = waveMember(uniformTrial(4));
    for (const end of ['near', 'far'] as const) {
      expect(Math.abs(movingInertia(member, end) - 1 / 3)).toBeLessThan(4 * EPS);
      fractions(member, end, 16).forEach((fraction, index) => {
        expect(Math.abs(fraction - 6 / (Math.PI * (index + 1)) ** 2)).toBeLessThan(64 * EPS);
      });
    }
  });

  it('a free member moving as a whole is its rigid-body mode alone', () => {
    const member = waveMember({ ...uniformTrial(3, { near: 'free', far: 'free' }), masses: { 1: 0.7 } });
    expect(movingInertia(member, 'uniform')).toBeCloseTo(1.7, 14);
    fractions(member, 'uniform', 8).forEach((fraction, index) => {
      expect(Math.abs(fraction - (index === 0 ? 1 : 0))).toBeLessThan(64 * EPS);
    });
  });
});

const stepped = waveMember({
  segments: [
    [1, 2, 3],
    [0.6, 5, 0.4, 50],
    [0.3, 1, 0],
    [2, 3, 1],
  ],
  masses: { 1: 0.5, 3: 0.8 },
  springs: { 2: 4 },
});

it('the factor is m(r, φ) with the static shape r, integrated independently', () => {
  const response = new StaticResponse(stepped);
  const out = new Float64Array(2);
  for (const ends of ['near', 'far', 'both'] as const) {
    const nodes = new Float64Array(5);
    for (const end of ['near', 'far'] as const) {
      if (ends === end || ends === 'both') response.endMotion(end).forEach((value, j) => (nodes[j] += value));
    }
    const line = (i: number, x: number): number => {
      const a = Math.sqrt(stepped.foundation[i] / stepped.stiffness[i]);
      const l = stepped.length[i];
      if (a === 0) return nodes[i] + ((nodes[i + 1] - nodes[i]) * x) / l;
      return (nodes[i] * Math.sinh(a * (l - x)) + nodes[i + 1] * Math.sinh(a * x)) / Math.sinh(a * l);
    };
    let inertia = 0;
    for (let i = 0; i < 4; i++) {
      inertia += stepped.inertia[i] * integrate((x) => line(i, x) ** 2, 0, stepped.length[i], 4);
      inertia += stepped.mass[i] * nodes[i] ** 2;
    }
    expect(Math.abs(movingInertia(stepped, ends) / inertia - 1)).toBeLessThan(64 * EPS);
    shapes(stepped, 12).forEach((shape, index) => {
      let factor = 0;
      for (let i = 0; i < 4; i++) {
        const product = (x: number): number => {
          evaluateShape(stepped, shape, i, x, out);
          return out[0] * line(i, x);
        };
        factor += stepped.inertia[i] * integrate(product, 0, stepped.length[i], 12);
        factor += stepped.mass[i] * nodes[i] * shape.ends[4 * i];
      }
      const found = participationFactor(stepped, shape, ends);
      expect(Math.abs(found - factor)).toBeLessThan(1e-13 * (index + 1) * Math.sqrt(inertia));
    });
  }
});

it('the fractions of all modes sum to 1 (Bessel), never above', () => {
  for (const ends of ['near', 'far', 'both'] as const) {
    const sum = fractions(stepped, ends, 800).reduce((total, fraction) => total + fraction, 0);
    expect(sum).toBeLessThanOrEqual(1 + 1e-12);
    // what is left falls as 1/N
    expect(sum).toBeGreaterThan(1 - 5 / 800);
  }
});

it('the uniform factor is ∫ρφ + ΣMφ where nothing is held', () => {
  const member = waveMember({
    segments: [
      [1, 2, 3],
      [0.6, 5, 0.4, 5000],
      [2, 3, 1, 1e-9],
    ],
    near: 'free',
    far: 'free',
    masses: { 0: 0.5, 3: 0.8 },
  });
  const out = new Float64Array(2);
  for (const shape of shapes(member, 15)) {
    let factor = member.mass[0] * shape.ends[0] + member.mass[3] * shape.ends[10];
    for (let i = 0; i < 3; i++) {
      const value = (x: number): number => {
        evaluateShape(member, shape, i, x, out);
        return out[0];
      };
      factor += member.inertia[i] * integrate(value, 0, member.length[i], 16);
    }
    expect(Math.abs(participationFactor(member, shape, 'uniform') - factor)).toBeLessThan(1e-13);
  }
});

it('inertia shares of the segments and the masses sum to 1', () => {
  for (const shape of shapes(stepped, 10)) {
    let sum = 0;
    for (let i = 0; i < 4; i++)
      sum +=
        stepped.inertia[i] * stepped.length[i] * segmentMeanSquare(stepped, i, shape.lambda, shape.ends) +
        stepped.mass[i] * shape.ends[4 * i] ** 2;
    expect(Math.abs(sum - 1)).toBeLessThan(64 * EPS);
  }
});

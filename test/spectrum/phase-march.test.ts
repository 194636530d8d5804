import { describe, expect, it } from 'vitest';
import { PhaseMarch } from '../../src/spectrum/phase-march.ts';
import { waveMember } from './trial-members.ts';

const EPS = Number.EPSILON;

/** One segment of length 2, stiffness 3, inertia 5, foundation s. */
function single(foundation = 0): PhaseMarch {
  return new PhaseMarch(waveMember({ segments: [[2, 3, 5, foundation]], far: 'free' }));
}

describe('one travelling segment from a fixed end', () => {
  it.each([0.3, 1.5, 3.1, 3.2, 9.3, 9.5, 100.1])('passes the half turns of its phase %s', (phase) => {
    const omega = phase / (2 * Math.sqrt(5 / 3));
    const march = single();
    march.start(true, 0, 0);
    march.cross(0, omega * omega, omega);
    // u = sin κx/(kκ), g = cos κx: u is kept positive, the half turns are counted apart
    expect(march.turns).toBe(Math.floor(phase / Math.PI));
    expect(march.u).toBeGreaterThanOrEqual(0);
    const impedance = 3 * (phase / 2);
    const sign = Math.floor(phase / Math.PI) % 2 === 0 ? 1 : -1;
    // the angle is known to its own rounding
    expect(Math.abs(march.u * impedance - sign * Math.sin(phase))).toBeLessThan(EPS * (4 + 2 * phase));
    expect(Math.abs(march.g - sign * Math.cos(phase))).toBeLessThan(EPS * (4 + 2 * phase));
    // ∫ρu² = ρ l (1 − sin 2a/2a)/(2 (kκ)²)
    const inertia = (5 * 2 * (1 - Math.sin(2 * phase) / (2 * phase))) / (2 * impedance * impedance);
    expect(Math.abs(march.mass / inertia - 1)).toBeLessThan(EPS * (64 + 2 * phase));
  });
});

describe('one evanescent segment', () => {
  it.each([1.5, 30, 700, 5000])('keeps the ratio of flux to displacement through a decay of %s', (decay) => {
    const march = single((decay / 2) ** 2 * 3);
    const impedance = 3 * (decay / 2);
    march.start(true, 0, 0);
    march.cross(0, 0, 0);
    expect(Math.abs(march.g / march.u / (impedance / Math.tanh(decay)) - 1)).toBeLessThan(8 * EPS);
    march.start(false, 0, 0);
    march.cross(0, 0, 0);
    expect(Math.abs(march.g / march.u / (impedance * Math.tanh(decay)) - 1)).toBeLessThan(8 * EPS);
    expect(march.turns).toBe(0);
  });

  it('turns by half when the flux of a lump drives the displacement through zero', () => {
    const march = single(300);
    march.start(false, -1e6, 0);
    march.cross(0, 0, 0);
    expect(march.turns).toBe(1);
    expect(march.u).toBeGreaterThan(0);
  });

  it('a purely decaying vector that dies out is replaced by what grows', () => {
    const march = single((5000 / 2) ** 2 * 3);
    march.start(false, -3 * (5000 / 2), 0);
    march.cross(0, 0, 0);
    expect(march.u).toBeGreaterThan(0);
    expect(Number.isFinite(march.u) && Number.isFinite(march.g)).toBe(true);
  });
});

it('a lump changes the flux by (K − λM)u and adds Mu² to the inertia', () => {
  const member = waveMember({
    segments: [
      [1, 1, 1],
      [1, 1, 1],
    ],
    masses: { 1: 4 },
    springs: { 1: 7 },
  });
  const march = new PhaseMarch(member);
  march.start(false, 0, 0);
  march.cross(0, 0, 0);
  const [u, g, mass] = [march.u, march.g, march.mass];
  march.lump(1, 9);
  expect(march.u).toBe(u);
  expect(march.g).toBe(g + (7 - 36) * u);
  expect(march.mass).toBe(mass + 4 * u * u);
});

it('the liveliest segment is the one with the largest inertia share', () => {
  const member = waveMember({
    segments: [
      [1, 1, 1],
      [1, 1, 50],
      [1, 1, 1],
    ],
  });
  const march = new PhaseMarch(member);
  march.start(true, 0, 0);
  for (let i = 0; i < 3; i++) march.cross(i, 0.01, 0.1);
  expect(march.bestSegment).toBe(1);
});

it('vectors stay finite over a thousand segments whose stiffness swings by 1e12', () => {
  const member = waveMember({
    segments: Array.from({ length: 1000 }, (_, i) => [1, i % 2 === 0 ? 1e6 : 1e-6, 1, 0]),
    far: 'free',
  });
  const march = new PhaseMarch(member);
  march.start(true, 0, 0);
  for (let i = 0; i < 1000; i++) march.cross(i, 1e4, 1e2);
  for (const value of [march.u, march.g, march.mass, march.error]) {
    expect(Number.isFinite(value)).toBe(true);
  }
  expect(march.mass).toBeGreaterThan(0);
});

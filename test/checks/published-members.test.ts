import { describe, expect, it } from 'vitest';
import { solveModes } from '../../src/solutions/modes.ts';
import { entryMember } from '../support/entries.ts';
import { expectClose, solveFrequencies } from '../support/frequencies.ts';
import { lengthOf } from '../support/plain-member.ts';
import { referenceEntries, referenceEntry } from '../support/reference.ts';
import { modesRequest, requestMember } from '../support/requests.ts';

const uniform = referenceEntries('uniform-ends').filter(
  (entry) => entry.expected.rigid_body_modes !== undefined,
);

describe('published special members', () => {
  it('the beaded string without string mass has 2√(T/md) sin(jπ/42) and no other mode (Lagrange)', () => {
    const entry = referenceEntry('piecewise-members', 'b-08');
    const member = entryMember(entry);
    const massless = {
      ...member,
      segments: member.segments.map((segment) => ({ ...segment, inertia: 0 })),
    };
    const answer = solveModes(modesRequest(massless, 40));
    expect(answer.modes).toHaveLength(20);
    expect(answer.convergence.modesInTotal).toBe(20);
    (entry.expected.massless_limit_omega as number[]).forEach((value, i) =>
      expectClose(answer.modes[i].angularFrequency, value),
    );
  });

  it('a double well gives the eigenvalues published to 12 decimals (b-31)', () => {
    const entry = referenceEntry('piecewise-members', 'b-31');
    const { omega } = solveFrequencies(entryMember(entry), 6);
    (entry.published.lambda_12_decimals as string[]).forEach((value, i) =>
      expect(Math.abs(omega[i] ** 2 - Number(value))).toBeLessThan(1e-12),
    );
  });

  it('a massless half gives λ = μ² + 1 with tan(μ/2) + μ tanh(1/2) = 0 (Pryce, problem 54)', () => {
    const { omega } = solveFrequencies(entryMember(referenceEntry('piecewise-members', 'b-30')), 8);
    for (const value of omega) {
      const mu = Math.sqrt(value * value - 1);
      // Residual against its own slope in μ: about the relative error of μ.
      const residual = Math.tan(mu / 2) + mu * Math.tanh(0.5);
      const slope = 0.5 / Math.cos(mu / 2) ** 2 + Math.tanh(0.5);
      expect(Math.abs(residual / slope)).toBeLessThan(1e-12 * mu);
    }
  });

  it.each(['b-20', 'b-21'])('layered soil %s has its exact period', (id) => {
    const entry = referenceEntry('piecewise-members', id);
    const layers = entry.inputs.layers_from_surface as { H: number; Vs: number }[];
    const rho: number = entry.inputs.rho;
    const { modes } = solveModes({
      member: {
        kind: 'shear-column',
        segments: layers.toReversed().map(({ H, Vs }) => ({
          length: H,
          shearWaveSpeed: Vs,
          density: rho,
          area: 1,
          foundation: 0,
          drag: 0,
        })),
        ends: { near: { type: 'fixed' }, far: { type: 'free' } },
        attachments: [],
      },
      series: { modes: 3 },
      energyShares: false,
    });
    (entry.expected.omega as number[]).forEach((value, i) => expectClose(modes[i].angularFrequency, value));
    expectClose(modes[0].period ?? 0, entry.expected.T1_exact);
    expectClose(modes[0].frequency, 1 / entry.expected.T1_exact);
  });

  it('frequency in Hz, period and enclosure belong to the angular frequency', () => {
    for (const entry of uniform.filter((each) => each.expected.f_hz !== undefined)) {
      const rigid: number = entry.expected.rigid_body_modes;
      const { modes } = solveModes(modesRequest(entryMember(entry), 12 + rigid));
      (entry.expected.f_hz as number[]).forEach((value, i) => {
        const mode = modes[i + rigid];
        expectClose(mode.frequency, value);
        expectClose(mode.period ?? 0, 1 / value);
        expect(mode.enclosure[0]).toBeLessThanOrEqual(mode.angularFrequency);
        expect(mode.enclosure[1]).toBeGreaterThanOrEqual(mode.angularFrequency);
      });
      if (rigid === 1) {
        expect(modes[0]).toMatchObject({
          angularFrequency: 0,
          frequency: 0,
          period: null,
          dampingRatio: null,
        });
      }
    }
  });

  it('the summary carries length, travel time and total mass', () => {
    const entry = referenceEntry('piecewise-members', 'b-17');
    const plain = entryMember(entry);
    const { member } = solveModes({
      member: requestMember(plain),
      series: { modes: 1 },
      energyShares: false,
    });
    expectClose(member.length, lengthOf(plain), 1e-15);
    expectClose(member.travelTime, 1.2 * Math.sqrt(15.7 / 4.2e8) + 0.8 * Math.sqrt(5.4 / 1.4e8), 1e-15);
    expectClose(member.totalMass, 1.2 * 15.7 + 0.8 * 5.4 + 30, 1e-15);
  });
});

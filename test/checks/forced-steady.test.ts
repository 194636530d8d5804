import { describe, expect, it } from 'vitest';
import { solveTransferFunctions } from '../../src/solutions/transfer-functions.ts';
import type { Damping, TransferFunction, TransferFunctionsRequest } from '../../src/spec/types.ts';
import { entryMember } from '../support/entries.ts';
import { entryString, transferRequest, uniformMember } from '../support/forced-requests.ts';
import { referenceEntry } from '../support/reference.ts';

interface ComplexValue {
  readonly re: number;
  readonly im: number;
}

/** The distance of an output at a frequency from a value, relative to its modulus. */
function distance(output: TransferFunction, index: number, value: ComplexValue): number {
  return (
    Math.hypot(output.real[index] - value.re, output.imaginary[index] - value.im) /
    Math.hypot(value.re, value.im)
  );
}

function times(value: ComplexValue, factor: number): ComplexValue {
  return { re: value.re * factor, im: value.im * factor };
}

describe('harmonic point force on a string', () => {
  const dampings: Record<string, Damping | undefined> = {
    'e-01': undefined,
    'e-02': undefined,
    'e-03': { type: 'loss-factor', value: 0.04 },
    'e-04': { type: 'ratio', value: 0.01 },
  };

  it.each(Object.keys(dampings))('%s to 1e-11', (id) => {
    const entry = referenceEntry('forced', id);
    for (const row of entry.expected.rows) {
      const request = transferRequest(
        entryString(entry),
        dampings[id],
        { type: 'point-force', at: entry.inputs.x0 },
        [row.x],
        [row.Omega],
      );
      const drag = entry.inputs.damping.c_per_length ?? 0;
      const member = {
        ...request.member,
        segments: request.member.segments.map((segment) => ({ ...segment, drag })),
      } as TransferFunctionsRequest['member'];
      const [output] = solveTransferFunctions({ ...request, member }).outputs;
      const exact = times(row.U ?? { re: row.u, im: 0 }, 1 / entry.inputs.P);
      expect(distance(output, 0, exact)).toBeLessThan(1e-11);
      expect(output.magnitude[0]).toBeCloseTo(Math.hypot(output.real[0], output.imaginary[0]), 14);
      expect(output.phase[0]).toBeCloseTo(Math.atan2(output.imaginary[0] + 0, output.real[0]), 12);
    }
  });
});

describe('harmonic point force on members of several segments', () => {
  it.each(['e-05', 'e-06'])('%s: exact, 50 modes and their remainder', (id) => {
    const entry = referenceEntry('forced', id);
    const input = { type: 'point-force', at: entry.inputs.x_force } as const;
    for (const row of entry.expected.rows) {
      const plain = solveTransferFunctions(
        transferRequest(entryMember(entry), undefined, input, [row.x], [row.Omega], 50),
      ).outputs[0];
      expect(distance(plain, 0, { re: row.u_undamped_exact, im: 0 })).toBeLessThan(1e-11);
      const { truncated, corrected, bound } = plain.series!;
      expect(Math.abs(truncated.real[0] / row.u_undamped_50_modes - 1)).toBeLessThan(1e-11);
      // what the corrected sum takes from the static shape is the table's remainder
      const scale = Math.abs(row.u_undamped_50_modes);
      expect(
        Math.abs(corrected.real[0] - truncated.real[0] - row.static_residual_after_50_modes),
      ).toBeLessThan(1e-11 * scale);
      expect(Math.abs(corrected.real[0] - row.u_undamped_exact)).toBeLessThanOrEqual(
        bound[0]! + 1e-14 * scale,
      );

      const damped = solveTransferFunctions(
        transferRequest(
          entryMember(entry),
          { type: 'ratio', value: entry.inputs.zeta },
          input,
          [row.x],
          [row.Omega],
          50,
        ),
      ).outputs[0];
      const { real, imaginary } = damped.series!.truncated;
      const exact: ComplexValue = row.U_modal_zeta_50_modes;
      expect(
        Math.hypot(real[0] - exact.re, imaginary[0] - exact.im) / Math.hypot(exact.re, exact.im),
      ).toBeLessThan(1e-11);
    }
  });
});

describe('shaken soil columns', () => {
  it('e-30: top over rigid base with the complex modulus', () => {
    const entry = referenceEntry('forced', 'e-30');
    const { H, Vs, rho } = entry.inputs;
    for (const row of entry.expected.rows) {
      const [output] = solveTransferFunctions(
        transferRequest(
          uniformMember(H, rho * Vs * Vs, rho, false),
          { type: 'loss-factor', value: 2 * row.xi },
          { type: 'end-motion', end: 'near', quantity: 'displacement' },
          [H],
          [row.omega],
        ),
      ).outputs;
      expect(distance(output, 0, row.H_complex_modulus)).toBeLessThan(1e-12);
      // Kramer 1996, sec. 7.2 (from memory): 1/√(cos² kH + (ξkH)²), for small damping
      if (row.xi <= 0.05 && row.omega_over_omega1 <= 1) {
        expect(Math.abs(output.magnitude[0] / row.abs_H_kramer_approx - 1)).toBeLessThan(0.01);
      }
    }
  });

  it('e-31: top over rock outcrop through an elastic base', () => {
    const entry = referenceEntry('forced', 'e-31');
    const { H, Vs, rho, Vr, rho_r: rock, xi } = entry.inputs;
    for (const row of entry.expected.rows) {
      const omega = (row.omega_over_omega1 * Math.PI * Vs) / (2 * H);
      const [output] = solveTransferFunctions(
        transferRequest(
          uniformMember(H, rho * Vs * Vs, rho, false),
          { type: 'loss-factor', value: 2 * xi },
          { type: 'outcrop-motion', end: 'near', impedance: rock * Vr, quantity: 'displacement' },
          [H],
          [omega],
        ),
      ).outputs;
      expect(distance(output, 0, row.H)).toBeLessThan(1e-12);
    }
  });
});

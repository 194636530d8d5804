import { describe, expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { ModalCoefficient, ResponsesAnswer } from '../../src/spec/types.ts';
import { entryInitial, entryMember } from '../support/entries.ts';
import { pairEnergyEntries, plainMember, referenceEntries, referenceEntry } from '../support/reference.ts';
import { responsesRequest } from '../support/requests.ts';

function solve(entry: Parameters<typeof entryMember>[0], modes: number): ResponsesAnswer {
  return solveResponses(
    responsesRequest({
      member: entryMember(entry),
      initial: entryInitial(entry),
      modes,
      positions: [0],
      times: [0],
      quantities: ['displacement'],
    }),
  );
}

/**
 * 1e-11 of the coefficient itself, with 1e-14 of the largest one for those that are zero or nearly so: the
 * phase of mode n is known to θ_n·(some eps), θ_200 = 630.
 */
function expectCoefficients(found: number[], expected: number[]): void {
  const scale = Math.max(...expected.map(Math.abs));
  expected.forEach((value, i) =>
    expect(Math.abs(found[i] - value)).toBeLessThanOrEqual(1e-11 * Math.abs(value) + 1e-14 * scale),
  );
}

const listed = referenceEntries('modal-coefficients').filter((entry) => Array.isArray(entry.expected.n));

describe('coefficients and energies agree with the table to 1e-11', () => {
  it.each(listed.map((entry) => [entry.id, entry] as const))('%s', (_, entry) => {
    const { expected } = entry;
    const rigid = expected.rigid_body === undefined ? 0 : 1;
    const orders = expected.n as number[];
    const { coefficients, convergence } = solve(entry, 200 + rigid);
    const listedModes = orders.map((n): ModalCoefficient => coefficients[n - 1 + rigid]);
    orders.forEach((n, i) => expect(listedModes[i].order).toBe(n + rigid));
    const none = orders.map(() => 0);
    const largest = Math.max(
      ...[...(expected.a_massnorm ?? none), ...(expected.b_massnorm ?? none)].map(Math.abs),
    );
    expectCoefficients(
      [...listedModes.map((mode) => mode.cosine), largest],
      [...(expected.a_massnorm ?? none), largest],
    );
    expectCoefficients(
      [...listedModes.map((mode) => mode.sine), largest],
      [...(expected.b_massnorm ?? none), largest],
    );
    expectCoefficients(
      listedModes.map((mode) => mode.energy),
      expected.E_n,
    );
    const total: number = expected.total_energy;
    expect(Math.abs(convergence.energy.total - total)).toBeLessThan(1e-13 * total);
    for (const [count, value] of Object.entries(expected.energy_captured_first_N as Record<string, number>)) {
      // Captured energies of the table hold the rigid-body energy besides N modes.
      const captured = coefficients
        .slice(0, Number(count) + rigid)
        .reduce((sum, mode) => sum + mode.energy, 0);
      expect(Math.abs(captured - value)).toBeLessThan(1e-11 * value);
    }
    const { rigid_body: body } = expected;
    if (body !== undefined) {
      const [first] = coefficients;
      expect(first.angularFrequency).toBe(0);
      expect(first.cosine).toBeCloseTo(body.a0_massnorm, 15);
      // u = (a₀ + b₀ t) φ: the sine entry of a rigid-body mode is its modal velocity.
      expect(first.sine).toBeCloseTo(body.adot0_massnorm, 12);
    }
  });

  it('half sines of a uniform string are single modes (c-18, c-18b)', () => {
    for (const id of ['c-18', 'c-18b']) {
      const entry = referenceEntry('modal-coefficients', id);
      const { coefficients, convergence } = solve(entry, 50);
      const order: number = entry.inputs.initial_displacement.n;
      coefficients.forEach((mode) => {
        const value = mode.order === order ? entry.expected.a_massnorm : 0;
        expect(Math.abs(mode.cosine - value)).toBeLessThan(1e-15);
        expect(mode.sine).toBe(0);
      });
      const total: number = entry.expected.total_energy;
      expect(Math.abs(convergence.energy.total - total)).toBeLessThan(1e-13 * total);
    }
  });

  it('a quarter sine is projected with the end mass (c-19)', () => {
    const entry = referenceEntry('modal-coefficients', 'c-19');
    const { coefficients, convergence } = solve(entry, 10);
    expectCoefficients(
      coefficients.map((mode) => mode.cosine),
      entry.expected.a_massnorm,
    );
    expectCoefficients(
      coefficients.map((mode) => mode.energy),
      entry.expected.E_n,
    );
    const total: number = entry.expected.total_energy;
    expect(Math.abs(convergence.energy.total - total)).toBeLessThan(1e-13 * total);
  });

  it('the plucked string has a_n = 2h sin(nπQ)/(n²π²Q(1 − Q)) (formula in print, see the table)', () => {
    const { coefficients } = solve(referenceEntry('modal-coefficients', 'c-01'), 200);
    const [h, q, length, rho] = [0.012, 0.3, 2, 0.25];
    coefficients.forEach(({ order: n, cosine }) => {
      const formula = (2 * h * Math.sin(n * Math.PI * q)) / (n * n * Math.PI ** 2 * q * (1 - q));
      // sin(nπx/L) has modal mass ρL/2. sin(nπQ) itself is known to nπ·eps.
      expect(Math.abs(cosine - formula * Math.sqrt((rho * length) / 2))).toBeLessThan(1e-13 / n);
    });
  });
});

describe('inside a pair that doubles cannot part only the sum of the energies is defined', () => {
  it.each(pairEnergyEntries().map((entry) => [entry.id, entry] as const))('%s', (_, entry) => {
    const highest = Math.max(...entry.clusters.flatMap(({ orders }) => orders));
    const { coefficients, convergence } = solveResponses(
      responsesRequest({
        member: plainMember(entry.member),
        initial: {
          displacement: {
            type: 'polyline',
            positions: [...entry.displacement.positions],
            values: [...entry.displacement.values],
          },
        },
        modes: highest,
        positions: [0],
        times: [0],
        quantities: ['displacement'],
      }),
    );
    expect(Math.abs(convergence.energy.total - entry.energy)).toBeLessThan(1e-13 * entry.energy);
    let captured = 0;
    for (const { orders, energy } of entry.clusters) {
      const sum = orders.reduce((total, order) => total + coefficients[order - 1].energy, 0);
      captured += sum;
      expect(Math.abs(sum - energy)).toBeLessThan(1e-11 * energy + 1e-14 * entry.energy);
    }
    expect(captured).toBeLessThanOrEqual(entry.energy * (1 + 1e-13));
    expect(convergence.energy.captured).toBeLessThanOrEqual(convergence.energy.total * (1 + 1e-13));
  });
});

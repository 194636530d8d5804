import { describe, expect, it } from 'vitest';
import { solveModes } from '../../src/solutions/modes.ts';
import { solveTransferFunctions } from '../../src/solutions/transfer-functions.ts';
import type { Damping, TransferInput } from '../../src/spec/types.ts';
import { transferRequest, uniformMember } from '../support/forced-requests.ts';
import { lengthOf, travelTime } from '../support/plain-member.ts';
import { randomMember } from '../support/random-members.ts';
import { RandomStream } from '../support/random.ts';
import { requestMember } from '../support/requests.ts';

describe('closed forms of a uniform member, L = 2, k = 3, ρ = 12', () => {
  const [length, stiffness, inertia] = [2, 3, 12];
  const number = (omega: number): number => omega * Math.sqrt(inertia / stiffness);
  const omegas = [0.01, 0.3, 1, 2.9, 17, 400];

  it('fixed–fixed under a point force: sin κx sin κ(L − z)/(kκ sin κL)', () => {
    const member = uniformMember(length, stiffness, inertia, true);
    const [x, z] = [0.7, 1.1];
    const { outputs } = solveTransferFunctions(
      transferRequest(member, undefined, { type: 'point-force', at: z }, [x, 1.6], omegas),
    );
    omegas.forEach((omega, i) => {
      const kappa = number(omega);
      const below = Math.sin(kappa * x) * Math.sin(kappa * (length - z));
      const above = Math.sin(kappa * z) * Math.sin(kappa * (length - 1.6));
      const base = stiffness * kappa * Math.sin(kappa * length);
      const size = 1 / Math.abs(base);
      expect(Math.abs(outputs[0].real[i] - below / base)).toBeLessThan(1e-12 * size);
      expect(Math.abs(outputs[1].real[i] - above / base)).toBeLessThan(1e-12 * size);
      expect(outputs[0].imaginary[i] + 0).toBe(0);
    });
  });

  it('fixed–free shaken at its base: cos κ(L − x)/cos κL', () => {
    const member = uniformMember(length, stiffness, inertia, false);
    const input: TransferInput = { type: 'end-motion', end: 'near', quantity: 'displacement' };
    const { outputs } = solveTransferFunctions(transferRequest(member, undefined, input, [0.4, 2], omegas));
    omegas.forEach((omega, i) => {
      const kappa = number(omega);
      const base = Math.cos(kappa * length);
      expect(Math.abs(outputs[0].real[i] - Math.cos(kappa * 1.6) / base)).toBeLessThan(
        1e-12 / Math.abs(base),
      );
      expect(Math.abs(outputs[1].real[i] - 1 / base)).toBeLessThan(1e-12 / Math.abs(base));
    });
  });

  it('on bedding below its cut-off: sinh λx sinh λ(L − z)/(kλ sinh λL), however strong the decay', () => {
    for (const foundation of [30, 3e6]) {
      const plain = uniformMember(length, stiffness, inertia, true);
      const member = { ...plain, segments: [{ ...plain.segments[0], foundation }] };
      const omega = 0.5;
      const lambda = Math.sqrt((foundation - inertia * omega * omega) / stiffness);
      const [x, z] = [0.9, 1];
      const { outputs } = solveTransferFunctions(
        transferRequest(member, undefined, { type: 'point-force', at: z }, [x, z], [omega]),
      );
      // e^{−λ|x−z|}/(2kλ) times factors that differ from 1 by e^{−2λ…}
      const part = (a: number): number => -Math.expm1(-2 * lambda * a);
      const exact = (at: number): number =>
        (Math.exp(-lambda * Math.abs(z - at)) * part(at) * part(length - z)) /
        (2 * stiffness * lambda * part(length));
      expect(outputs[0].real[0] / exact(x)).toBeCloseTo(1, 11);
      expect(outputs[1].real[0] / exact(z)).toBeCloseTo(1, 12);
    }
  });
});

describe('random members', () => {
  const cases = Array.from({ length: 60 }, (_, index) => index);

  it('no truncated or corrected series leaves its bound, reciprocity holds', () => {
    const failures: string[] = [];
    let compared = 0;
    for (const index of cases) {
      const random = new RandomStream(31, index);
      const member = randomMember(
        random,
        random.pick(['general', 'uniform', 'twin-wells', 'massless-segments', 'rigid']),
      );
      const time = travelTime(member);
      const damping: Damping | undefined = random.pick([
        undefined,
        { type: 'ratio', value: random.decades(-3, -0.3) },
        { type: 'rayleigh', massCoefficient: 0.1 / time, stiffnessCoefficient: 1e-3 * time },
      ]);
      const [x, z] = [0.31, 0.83].map((share) => share * lengthOf(member));
      const omegas = [0.2, 1.7, 9.3].map((turns) => turns / time);
      const modes = random.integer(3, 60);
      const [forth, back] = [
        [x, z],
        [z, x],
      ].map(
        ([at, from]) =>
          solveTransferFunctions(
            transferRequest(member, damping, { type: 'point-force', at: from }, [at], omegas, modes),
          ).outputs[0],
      );
      omegas.forEach((_, i) => {
        const { corrected, bound } = forth.series!;
        const exact = [forth.real[i], forth.imaginary[i]];
        const size = Math.hypot(...exact);
        const other = Math.hypot(exact[0] - back.real[i], exact[1] - back.imaginary[i]);
        if (other > 1e-8 * size + (forth.bound?.[i] ?? 0) + (back.bound?.[i] ?? 0))
          failures.push(`case ${index}: reciprocity ${other / size}`);
        const error = Math.hypot(corrected.real[i] - exact[0], corrected.imaginary[i] - exact[1]);
        compared++;
        if (error > bound[i]! + (forth.bound?.[i] ?? 0) + 1e-12 * size)
          failures.push(`case ${index}, Ω ${omegas[i]}, ${JSON.stringify(damping)}: ${error} > ${bound[i]}`);
      });
    }
    expect(failures).toEqual([]);
    expect(compared).toBe(180);
  });

  it('refine resolves every peak of a lightly damped member to 1 %', () => {
    const member = uniformMember(2, 900, 0.25, true);
    const request = {
      ...transferRequest(
        member,
        { type: 'loss-factor', value: 2e-3 },
        { type: 'point-force', at: 0.6 },
        [0.9],
        [],
      ),
      frequencies: { from: 5, to: 100, count: 40, spacing: 'linear' as const },
      refine: true,
    };
    const { frequencies, outputs } = solveTransferFunctions(request);
    const found = Array.from(frequencies as ArrayLike<number>);
    expect(found).toEqual(found.toSorted((a, b) => a - b));
    const { modes } = solveModes({
      member: requestMember(member),
      series: { modes: 6 },
      energyShares: false,
    });
    for (const { frequency } of modes) {
      const near = found
        .map((f, i) => ({ f, size: outputs[0].magnitude[i] }))
        .filter(({ f }) => Math.abs(f / frequency - 1) < 0.02);
      const top = Math.max(...near.map(({ size }) => size));
      const dense = solveTransferFunctions({
        ...request,
        refine: false,
        frequencies: Array.from({ length: 801 }, (_, i) => frequency * (1 + (i - 400) * 1e-5)),
      });
      const crest = Math.max(...Array.from(dense.outputs[0].magnitude));
      expect(top / crest).toBeGreaterThan(0.99);
    }
  });
});

import { describe, expect, it } from 'vitest';
import { solveModes } from '../../src/solutions/modes.ts';
import { compareWithDecimal } from '../support/decimal.ts';
import { entryMember } from '../support/entries.ts';
import { lengthOf, type PlainMember } from '../support/plain-member.ts';
import {
  enclosedFrequencies,
  plainMember,
  randomMemberEntries,
  referenceEntries,
  referenceEntry,
  type ReferenceEntry,
} from '../support/reference.ts';
import { modesRequest, requestMember } from '../support/requests.ts';

/** Frequencies (rad/s) and enclosures, the rigid-body modes first. */
function solve(member: PlainMember, count: number): { omega: number[]; enclosures: [number, number][] } {
  const { modes } = solveModes(modesRequest(member, count));
  modes.forEach((mode, i) => expect(mode.order).toBe(i + 1));
  return {
    omega: modes.map((mode) => mode.angularFrequency),
    enclosures: modes.map((mode) => mode.enclosure),
  };
}

/**
 * Inputs of the tables are decimals; their rounding to double moves a frequency by a few 1e-16 relative,
 * the solver may add some ulp a segment. 1e-12 is the demand.
 */
const RELATIVE = 1e-12;

function expectClose(value: number, expected: number, relative = RELATIVE): void {
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(relative * Math.abs(expected));
}

/** A certified enclosure is wide by rounding only: some ulp of the phase a segment, 1e-12 at the very most. */
function expectEnclosed([low, high]: [number, number], decimal: string): void {
  expect(compareWithDecimal(low, decimal)).not.toBe(1);
  expect(compareWithDecimal(high, decimal)).not.toBe(-1);
  expect(high - low).toBeLessThanOrEqual(1e-12 * high);
}

const enclosed = enclosedFrequencies();
const uniform = referenceEntries('uniform-ends').filter(
  (entry) => entry.expected.rigid_body_modes !== undefined,
);
const piecewise = referenceEntries('piecewise-members').filter(
  (entry) => entry.inputs.segments !== undefined,
);

describe('frequencies agree with the tables to 1e-12 and their enclosures hold the 32-digit values', () => {
  it.each([...uniform, ...piecewise].map((entry) => [entry.id, entry] as const))('%s', (id, entry) => {
    const expected: number[] = entry.expected.omega ?? entry.expected.z;
    const rigid: number = entry.expected.rigid_body_modes;
    const { omega, enclosures } = solve(entryMember(entry), expected.length + rigid);
    expect(omega.length).toBe(expected.length + rigid);
    for (let i = 0; i < rigid; i++) expect(omega[i]).toBe(0);
    expected.forEach((value, i) => expectClose(omega[rigid + i], value));
    const decimals = enclosed.get(id);
    expect(decimals).toHaveLength(expected.length);
    decimals?.forEach((decimal, i) => expectEnclosed(enclosures[rigid + i], decimal));
  });
});

describe('frequencies of random members', () => {
  it.each(randomMemberEntries().map((entry) => [entry.id, entry] as const))('%s', (_, entry) => {
    const highest = entry.omega[entry.omega.length - 1][0];
    const { omega, enclosures } = solve(plainMember(entry.member), highest);
    if (entry.rigid_body_modes === 1) expect(omega[0]).toBe(0);
    for (const [order, decimal] of entry.omega) {
      expectClose(omega[order - 1], Number(decimal));
      expectEnclosed(enclosures[order - 1], decimal);
    }
  });
});

describe('pairs of close frequencies', () => {
  const pairs = piecewise.flatMap((entry) =>
    ((entry.expected.close_pairs ?? []) as { pair: [number, number]; relative_gap: number }[]).map(
      (pair) => [entry.id, pair.pair, pair.relative_gap, entry] as const,
    ),
  );

  it.each(pairs)('%s %s: the relative gap is %s', (_, [first, second], gap, entry) => {
    const { omega } = solve(entryMember(entry), second);
    const found = (omega[second - 1] - omega[first - 1]) / omega[first - 1];
    // Each frequency carries its own rounding, about 2e-15 of itself; b-05b knows its input to 2e-16 of 1e-12.
    expect(Math.abs(found - gap)).toBeLessThanOrEqual(4e-15 + 1e-5 * gap);
    expect(found).toBeGreaterThanOrEqual(0);
  });
});

/** Members with L = k = ρ = 1 that a printed table of roots describes. */
function tableMember(left: string, right: string, kappa: number, mu: number): PlainMember {
  return {
    segments: [{ length: 1, stiffness: 1, inertia: 1, foundation: 0 }],
    masses: [0, right === 'mass' ? mu : 0],
    springs: [0, right === 'spring' ? kappa : 0],
    nearFixed: left === 'fixed',
    farFixed: false,
  };
}

describe('printed tables of roots', () => {
  /** Watts, Essentials of Applied Mathematics for Scientists and Engineers, 2007, tables A.1 and A.2. */
  const rows = referenceEntries('uniform-ends').filter((entry) => entry.id.startsWith('a-tab-'));

  it.each(rows.map((entry) => [entry.id, entry] as const))('%s', (_, entry: ReferenceEntry) => {
    const members: { left: string; right: string; kappa?: number; mu?: number }[] = entry.expected
      .equivalent_members ?? [{ left: 'free', right: 'free' }];
    const printed: number[] = entry.published.z_printed_4dec;
    const off = new Set(
      ((entry.published.exceptions ?? []) as string[]).map(
        (text) => Number(/root (\d+)/.exec(text)?.[1]) - 1,
      ),
    );
    for (const { left, right, kappa = 0, mu = 0 } of members) {
      const rigid = left === 'free' && right === 'mass' ? 1 : 0;
      const { omega } = solve(tableMember(left, right, kappa, mu), printed.length + rigid);
      // Half a unit of the fourth decimal; one unit where the print is known to be a unit high.
      printed.forEach((value, i) =>
        expect(Math.abs(omega[i + rigid] - value)).toBeLessThanOrEqual(off.has(i) ? 1e-4 : 5.0001e-5),
      );
      (entry.expected.z as number[]).forEach((value, i) => {
        if (i + rigid < omega.length) expectClose(omega[i + rigid], value);
      });
    }
  });

  it('Abramowitz & Stegun 1964, table 4.19, roots of tan x = λx, λ = −1 (digits from memory)', () => {
    const { published } = referenceEntry('uniform-ends', 'a-as419');
    const { omega } = solve(tableMember('fixed', 'spring', 1, 0), 5);
    (published.z_printed_5dec_from_memory as number[]).forEach((value, i) =>
      expect(Math.abs(omega[i] - value)).toBeLessThan(6e-6),
    );
  });

  it('Abramowitz & Stegun 1964, table 4.20, roots of cot x = λx, λ = 1: a bar with an end mass (digits from memory)', () => {
    const { published } = referenceEntry('uniform-ends', 'a-as420');
    const { omega } = solve(tableMember('fixed', 'mass', 0, 1), 5);
    (published.z_printed_5dec_from_memory as number[]).forEach((value, i) =>
      expect(Math.abs(omega[i] - value)).toBeLessThan(6e-6),
    );
  });

  it('OEIS A069855, z tan z = 1, and A196504, z + tan z = 0', () => {
    const cotangent = referenceEntry('uniform-ends', 'a-oeis-A069855').published.z as string;
    const tangent = referenceEntry('uniform-ends', 'a-oeis-A196504').published.z as string;
    const mass = solve(tableMember('fixed', 'mass', 0, 1), 1);
    const spring = solve(tableMember('fixed', 'spring', 1, 0), 1);
    const freeSpring = solve(tableMember('free', 'spring', 1, 0), 1);
    const freeMass = solve(tableMember('free', 'mass', 0, 1), 2);
    expectEnclosed(mass.enclosures[0], cotangent);
    expectEnclosed(freeSpring.enclosures[0], cotangent);
    expectEnclosed(spring.enclosures[0], tangent);
    expectEnclosed(freeMass.enclosures[1], tangent);
    expectClose(mass.omega[0], Number(cotangent), 1e-15);
    expectClose(spring.omega[0], Number(tangent), 1e-15);
  });
});

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
    const { omega } = solve(entryMember(entry), 6);
    (entry.published.lambda_12_decimals as string[]).forEach((value, i) =>
      expect(Math.abs(omega[i] ** 2 - Number(value))).toBeLessThan(1e-12),
    );
  });

  it('a massless half gives λ = μ² + 1 with tan(μ/2) + μ tanh(1/2) = 0 (Pryce, problem 54)', () => {
    const { omega } = solve(entryMember(referenceEntry('piecewise-members', 'b-30')), 8);
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

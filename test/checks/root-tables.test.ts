import { describe, expect, it } from 'vitest';
import { expectClose, expectEnclosed, solveFrequencies } from '../support/frequencies.ts';
import type { PlainMember } from '../support/plain-member.ts';
import { referenceEntries, referenceEntry, type ReferenceEntry } from '../support/reference.ts';

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
      const { omega } = solveFrequencies(tableMember(left, right, kappa, mu), printed.length + rigid);
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
    const { omega } = solveFrequencies(tableMember('fixed', 'spring', 1, 0), 5);
    (published.z_printed_5dec_from_memory as number[]).forEach((value, i) =>
      expect(Math.abs(omega[i] - value)).toBeLessThan(6e-6),
    );
  });

  it('Abramowitz & Stegun 1964, table 4.20, roots of cot x = λx, λ = 1: a bar with an end mass (digits from memory)', () => {
    const { published } = referenceEntry('uniform-ends', 'a-as420');
    const { omega } = solveFrequencies(tableMember('fixed', 'mass', 0, 1), 5);
    (published.z_printed_5dec_from_memory as number[]).forEach((value, i) =>
      expect(Math.abs(omega[i] - value)).toBeLessThan(6e-6),
    );
  });

  it('OEIS A069855, z tan z = 1, and A196504, z + tan z = 0', () => {
    const cotangent = referenceEntry('uniform-ends', 'a-oeis-A069855').published.z as string;
    const tangent = referenceEntry('uniform-ends', 'a-oeis-A196504').published.z as string;
    const mass = solveFrequencies(tableMember('fixed', 'mass', 0, 1), 1);
    const spring = solveFrequencies(tableMember('fixed', 'spring', 1, 0), 1);
    const freeSpring = solveFrequencies(tableMember('free', 'spring', 1, 0), 1);
    const freeMass = solveFrequencies(tableMember('free', 'mass', 0, 1), 2);
    expectEnclosed(mass.enclosures[0], cotangent);
    expectEnclosed(freeSpring.enclosures[0], cotangent);
    expectEnclosed(spring.enclosures[0], tangent);
    expectEnclosed(freeMass.enclosures[1], tangent);
    expectClose(mass.omega[0], Number(cotangent), 1e-15);
    expectClose(spring.omega[0], Number(tangent), 1e-15);
  });
});

import { describe, expect, it } from 'vitest';
import { Fault } from '../../src/faults/fault.ts';
import { readMember } from '../../src/members/read-member.ts';
import { placeStations } from '../../src/modes/stations.ts';
import { stressFactors } from '../../src/modes/stress-factors.ts';
import type { Member } from '../../src/spec/types.ts';

const EPS = Number.EPSILON;
const common = {
  ends: { near: { type: 'fixed' }, far: { type: 'fixed' } },
  attachments: [],
} as const;
const plain = { foundation: 0, drag: 0 };

function factors(member: object, positions: number[]): number[] {
  const read = readMember({ ...common, ...member } as unknown as Member);
  return Array.from(stressFactors(read, placeStations(read, positions)));
}

describe('stress per force', () => {
  it('is 1/A in bars, by area or by material, on the near side of a node', () => {
    const found = factors(
      {
        kind: 'bar',
        segments: [
          { length: 1, axialStiffness: 1e6, massPerLength: 1, area: 0.004, ...plain },
          { length: 1, youngsModulus: 210e9, density: 7850, area: 0.002, ...plain },
        ],
      },
      [0, 0.5, 1, 1.5],
    );
    expect(found).toEqual([250, 250, 250, 500]);
  });

  it('is (D/2)/J in shafts, J = π(D⁴ − d⁴)/32 (W. C. Young, Roark’s Formulas, torsion of circular bars)', () => {
    const [found] = factors(
      {
        kind: 'shaft',
        segments: [
          { length: 1, shearModulus: 80e9, density: 7850, outerDiameter: 0.1, innerDiameter: 0.06, ...plain },
        ],
      },
      [0.5],
    );
    const polar = (Math.PI * (0.1 ** 4 - 0.06 ** 4)) / 32;
    expect(Math.abs(found / (0.05 / polar) - 1)).toBeLessThan(8 * EPS);
  });

  it('is 1/A in shear columns', () => {
    const segment = { length: 1, shearModulus: 80e6, density: 1900, area: 2, ...plain };
    expect(factors({ kind: 'shear-column', segments: [segment] }, [0.5])).toEqual([0.5]);
  });
});

describe('without a section stress is refused, with the place and what to give', () => {
  const segment = { length: 1, ...plain };
  it.each([
    ['cable', { tension: 1e5, segments: [{ ...segment, massPerLength: 1 }] }, 'ask for "force"'],
    ['bar', { segments: [{ ...segment, axialStiffness: 1, massPerLength: 1 }] }, 'give its "area"'],
    ['shaft', { segments: [{ ...segment, torsionalStiffness: 1, inertiaPerLength: 1 }] }, '"outerDiameter"'],
    ['shear-column', { segments: [{ ...segment, shearStiffness: 1, massPerLength: 1 }] }, 'give its "area"'],
    ['wave', { segments: [{ ...segment, stiffness: 1, inertia: 1 }] }, 'ask for "force"'],
  ] as const)('%s', (kind, rest, remedy) => {
    let caught: unknown;
    try {
      factors({ kind, ...rest }, [0.25]);
    } catch (error) {
      caught = error;
    }
    expect(caught).toBeInstanceOf(Fault);
    const [record] = (caught as Fault).records;
    expect(record).toMatchObject({ code: 'stress-without-section', pointer: '/sample/quantities' });
    expect(record.detail).toContain('0.25 m');
    expect(record.detail).toContain('segment 0');
    expect(record.detail).toContain(remedy);
  });

  it('names the segment of the request, counted through splits at attachments', () => {
    const member = {
      kind: 'bar',
      segments: [
        { length: 1, axialStiffness: 1, massPerLength: 1, area: 1, ...plain },
        { length: 1, axialStiffness: 1, massPerLength: 1, ...plain },
      ],
      attachments: [{ at: 0.5, mass: 1, spring: 0, dashpot: 0 }],
    };
    expect(factors(member, [0.2, 0.7, 1])).toEqual([1, 1, 1]);
    expect(() => factors(member, [0.2, 1.5])).toThrow(/segment 1/);
  });
});

import { describe, expect, it } from 'vitest';
import type { Fault } from '../../src/faults/fault.ts';
import { lossFactor } from '../../src/members/modal-damping.ts';
import { samePlace, snapToNode } from '../../src/members/node-layout.ts';
import { readMember } from '../../src/members/read-member.ts';
import type { Bar, Cable, Member, Shaft, ShearColumn, Wave } from '../../src/spec/types.ts';

const bare = { foundation: 0, drag: 0 };
const fixed = { type: 'fixed' } as const;
const free = { type: 'free' } as const;
const nothing = { mass: 0, spring: 0, dashpot: 0 };

const cable = (change: Partial<Cable> = {}): Cable => ({
  kind: 'cable',
  tension: 2.4e6,
  segments: [{ length: 45, massPerLength: 58, ...bare }],
  ends: { near: fixed, far: fixed },
  attachments: [],
  ...change,
});

/** Polar second moment of a ring: the integral of r² dA = 2πr³ dr from d/2 to D/2. */
const polar = (outer: number, inner: number): number => (Math.PI / 2) * ((outer / 2) ** 4 - (inner / 2) ** 4);

const codes = (member: Member): [string, string][] => {
  try {
    readMember(member);
    return [];
  } catch (error) {
    return (error as Fault).records.map(({ code, pointer }) => [code, pointer]);
  }
};

describe('trade properties become stiffness and inertia', () => {
  it('a cable has its tension everywhere', () => {
    const member = readMember(
      cable({
        segments: [
          { length: 10, massPerLength: 58, ...bare },
          { length: 5, massPerLength: 70, foundation: 3, drag: 0, name: 'saddle' },
        ],
      }),
    );
    expect([...member.stiffness]).toEqual([2.4e6, 2.4e6]);
    expect([...member.inertia]).toEqual([58, 70]);
    expect([...member.foundation]).toEqual([0, 3]);
    expect([...member.stressFactor]).toEqual([0, 0]);
    expect([...member.position]).toEqual([0, 10, 15]);
    expect([...member.length]).toEqual([10, 5]);
  });

  it('both forms of a bar agree, and stress needs the area', () => {
    const bar: Bar = {
      kind: 'bar',
      segments: [
        { length: 2, youngsModulus: 2.1e11, area: 0.01, density: 7850, ...bare },
        { length: 2, axialStiffness: 2.1e9, massPerLength: 78.5, area: 0.01, ...bare },
        { length: 2, axialStiffness: 2.1e9, massPerLength: 78.5, ...bare },
      ],
      ends: { near: fixed, far: free },
      attachments: [],
    };
    const member = readMember(bar);
    expect([...member.stiffness]).toEqual([2.1e9, 2.1e9, 2.1e9]);
    expect([...member.inertia]).toEqual([78.5, 78.5, 78.5]);
    expect([...member.stressFactor]).toEqual([100, 100, 0]);
    expect([member.nearFixed, member.farFixed]).toEqual([true, false]);
  });

  it('a hollow shaft has J = π(D⁴ − d⁴)/32 and the stress of its outer surface', () => {
    const shaft: Shaft = {
      kind: 'shaft',
      segments: [
        { length: 1, shearModulus: 8e10, density: 7850, outerDiameter: 0.1, innerDiameter: 0.06, ...bare },
        { length: 1, shearModulus: 8e10, density: 7850, outerDiameter: 0.1, innerDiameter: 0, ...bare },
        { length: 1, torsionalStiffness: 4e5, inertiaPerLength: 0.04, ...bare },
      ],
      ends: { near: free, far: { type: 'attached', inertia: 12, spring: 5, dashpot: 0 } },
      attachments: [{ at: 1, inertia: 3, spring: 7, dashpot: 0 }],
    };
    const member = readMember(shaft);
    expect(member.stiffness[0] / (8e10 * polar(0.1, 0.06))).toBeCloseTo(1, 14);
    expect(member.inertia[1] / (7850 * polar(0.1, 0))).toBeCloseTo(1, 14);
    // Printed handbook form for the solid shaft: τ = 16 T/(π d³).
    expect(member.stressFactor[1] / (16 / (Math.PI * 0.1 ** 3))).toBeCloseTo(1, 14);
    expect(member.stressFactor[2]).toBe(0);
    expect([...member.mass]).toEqual([0, 3, 0, 12]);
    expect([...member.spring]).toEqual([0, 7, 0, 5]);
  });

  it('a thin-walled shaft keeps the digits of its wall: J → 2π r³ t', () => {
    const wall = 1e-9;
    const [outer, inner] = [1, 1 - 2 * wall];
    const member = readMember({
      kind: 'shaft',
      segments: [
        { length: 1, shearModulus: 1, density: 1, outerDiameter: outer, innerDiameter: inner, ...bare },
      ],
      ends: { near: fixed, far: free },
      attachments: [],
    });
    const exactWall = (outer - inner) / 2;
    const meanRadius = (outer + inner) / 4;
    expect(member.stiffness[0] / (2 * Math.PI * meanRadius ** 3 * exactWall)).toBeCloseTo(1, 13);
  });

  it('the three forms of a shear column agree: G = ρV²', () => {
    const column: ShearColumn = {
      kind: 'shear-column',
      segments: [
        { length: 5, shearWaveSpeed: 200, density: 1900, area: 2, ...bare },
        { length: 5, shearModulus: 7.6e7, density: 1900, area: 2, ...bare },
        { length: 5, shearStiffness: 1.52e8, massPerLength: 3800, ...bare },
      ],
      ends: { near: fixed, far: free },
      attachments: [],
    };
    const member = readMember(column);
    expect([...member.stiffness]).toEqual([1.52e8, 1.52e8, 1.52e8]);
    expect([...member.inertia]).toEqual([3800, 3800, 3800]);
    expect([...member.stressFactor]).toEqual([0.5, 0.5, 0]);
  });

  it('a wave member is taken as it is', () => {
    const wave: Wave = {
      kind: 'wave',
      segments: [{ length: 1, stiffness: 3, inertia: 0.5, foundation: 0.25, drag: 0 }],
      ends: { near: free, far: free },
      attachments: [],
    };
    const member = readMember(wave);
    expect([member.stiffness[0], member.inertia[0], member.foundation[0]]).toEqual([3, 0.5, 0.25]);
  });
});

describe('attachments become nodes', () => {
  it('splits segments and adds up what stands at one place, whatever the order', () => {
    const member = readMember(
      cable({
        segments: [
          { length: 10, massPerLength: 1, ...bare },
          { length: 10, massPerLength: 2, ...bare },
        ],
        attachments: [
          { ...nothing, at: 15, mass: 4 },
          { ...nothing, at: 10, spring: 6 },
          { ...nothing, at: 2.5, mass: 1 },
          { ...nothing, at: 15, mass: 5, spring: 2 },
        ],
      }),
    );
    expect([...member.position]).toEqual([0, 2.5, 10, 15, 20]);
    expect([...member.length]).toEqual([2.5, 7.5, 5, 5]);
    expect([...member.origin]).toEqual([0, 0, 1, 1]);
    expect([...member.mass]).toEqual([0, 1, 0, 9, 0]);
    expect([...member.spring]).toEqual([0, 0, 6, 2, 0]);
    expect([...member.attachmentNode]).toEqual([3, 2, 1, 3]);
    expect([...member.attachmentSpring]).toEqual([0, 6, 0, 2]);
    expect(member.segmentCount).toBe(4);
  });

  it('an attachment a few rounding units off a boundary stands on it, one further off does not', () => {
    const segments = Array.from({ length: 3 }, () => ({ length: 0.1, massPerLength: 1, ...bare }));
    const placed = (at: number) =>
      readMember(cable({ segments, attachments: [{ ...nothing, at, mass: 1 }] }));
    for (const at of [0.2, 0.1 + 0.1, 0.2 - 0.29 * samePlace, 0.2 + 0.29 * samePlace]) {
      expect(placed(at).segmentCount).toBe(3);
      expect(placed(at).mass[2]).toBe(1);
    }
    expect(placed(0.2 - 0.4 * samePlace).segmentCount).toBe(4);
    expect(placed(0.2 + 0.4 * samePlace).segmentCount).toBe(4);
  });

  it('two attachments that differ by rounding share a node', () => {
    const member = readMember(
      cable({
        attachments: [
          { ...nothing, at: 15 + 1e-14, mass: 1 },
          { ...nothing, at: 15, mass: 2 },
        ],
      }),
    );
    expect(member.segmentCount).toBe(2);
    expect([...member.mass]).toEqual([0, 3, 0]);
  });

  it('sums of a thousand decimal lengths reach the exact far end', () => {
    const segments = Array.from({ length: 1000 }, () => ({ length: 0.1, massPerLength: 1, ...bare }));
    const { position } = readMember(cable({ segments }));
    expect(position[1000]).toBe(100);
    expect(position[300]).toBe(30);
  });

  it('a position near a node means the node, another one stays', () => {
    const nodes = Float64Array.of(0, 2.5, 10, 20);
    expect(snapToNode(10 + 1e-14, nodes)).toBe(10);
    expect(snapToNode(10 - 1e-14, nodes)).toBe(10);
    expect(snapToNode(20 + 1e-14, nodes)).toBe(20);
    expect(snapToNode(1e-14, nodes)).toBe(0);
    expect(snapToNode(7, nodes)).toBe(7);
    expect(snapToNode(25, nodes)).toBe(25);
  });
});

describe('damping that leaves the modes uncoupled', () => {
  it('is handed on', () => {
    expect(readMember(cable()).damping).toEqual({ ratios: [], massCoefficient: 0, stiffnessCoefficient: 0 });
    const damped = (damping: Member['damping']) => readMember(cable({ damping })).damping;
    expect(damped({ type: 'ratio', value: 0.01 }).ratios).toEqual([0.01]);
    expect(damped({ type: 'ratios', values: [0.01, 0.02] }).ratios).toEqual([0.01, 0.02]);
    expect(damped({ type: 'rayleigh', massCoefficient: 2, stiffnessCoefficient: 3 })).toEqual({
      ratios: [],
      massCoefficient: 2,
      stiffnessCoefficient: 3,
    });
  });

  it('drag that is one multiple of the inertia adds to the mass coefficient', () => {
    const segments = [
      { length: 1, massPerLength: 0.3, foundation: 0, drag: 0.6 },
      { length: 1, massPerLength: 0.7, foundation: 0, drag: 1.4 },
      { length: 1, massPerLength: 0, ...bare },
    ];
    const damping = { type: 'rayleigh', massCoefficient: 1, stiffnessCoefficient: 0 } as const;
    expect(readMember(cable({ segments, damping })).damping.massCoefficient).toBeCloseTo(3, 14);
  });
});

describe('what cannot be solved as posed is refused', () => {
  const dragged = [{ length: 45, massPerLength: 58, foundation: 0, drag: 5 }];

  it('names every fault with its place', () => {
    expect(codes(cable({ attachments: [{ ...nothing, at: 46 }] }))).toEqual([
      ['attachment-outside', '/member/attachments/0/at'],
    ]);
    expect(codes(cable({ attachments: [{ ...nothing, at: 45 }] }))).toEqual([
      ['attachment-at-end', '/member/attachments/0/at'],
    ]);
    expect(codes(cable({ attachments: [{ ...nothing, at: 1e-15 }] }))).toEqual([
      ['attachment-at-end', '/member/attachments/0/at'],
    ]);
    expect(codes(cable({ segments: [{ length: 45, massPerLength: 0, ...bare }] }))).toEqual([
      ['no-inertia', '/member'],
    ]);
    expect(codes(cable({ segments: [{ length: 45, massPerLength: 0, foundation: 0, drag: 1 }] }))).toEqual([
      ['drag-without-inertia', '/member/segments/0/drag'],
      ['no-inertia', '/member'],
    ]);
    expect(codes(cable({ damping: { type: 'loss-factor', value: 0.02 } }))).toEqual([
      ['loss-factor-in-time', '/member/damping'],
    ]);
  });

  it('a loss factor describes a steady state only, and is no part of modal damping', () => {
    const lossy = cable({ damping: { type: 'loss-factor', value: 0.02 }, segments: dragged });
    expect(lossFactor(lossy)).toBe(0.02);
    expect(lossFactor(cable({ damping: { type: 'ratio', value: 0.02 } }))).toBe(0);
    expect(lossFactor(cable())).toBe(0);
    expect(readMember(lossy, 'steady')).toEqual(readMember(cable({ segments: dragged })));
    const dashpot = { ...nothing, at: 5, dashpot: 3 };
    expect(() => readMember({ ...lossy, attachments: [dashpot] }, 'steady')).toThrow(/dashpot 3/);
  });

  it('drag beside a node mass couples the modes, beside a fixed end it does not', () => {
    expect(codes(cable({ segments: dragged }))).toEqual([]);
    expect(codes(cable({ segments: dragged, attachments: [{ ...nothing, at: 5, mass: 1 }] }))).toEqual([
      ['drag-not-modal', '/member/segments/0/drag'],
    ]);
    const far = { type: 'attached', ...nothing, mass: 2 } as const;
    expect(codes(cable({ segments: dragged, ends: { near: fixed, far } }))).toEqual([
      ['drag-not-modal', '/member/segments/0/drag'],
    ]);
    const uneven = [{ length: 1, massPerLength: 1, ...bare }, ...dragged];
    expect(codes(cable({ segments: uneven }))).toEqual([['drag-not-modal', '/member/segments/1/drag']]);
  });

  it('dashpots are refused, and so is modal damping beside them', () => {
    const far = { type: 'attached', ...nothing, dashpot: 2 } as const;
    const ends = { near: fixed, far };
    expect(codes(cable({ ends }))).toEqual([['dashpot-unsupported', '/member/ends/far/dashpot']]);
    const attachments = [{ ...nothing, at: 5, dashpot: 3 }];
    expect(codes(cable({ attachments, damping: { type: 'ratio', value: 0.1 } }))).toEqual([
      ['dashpot-unsupported', '/member/attachments/0/dashpot'],
      ['damping-mixed', '/member/damping'],
    ]);
  });

  it('a shaft without a wall and a segment without room are refused', () => {
    const shaft = (innerDiameter: number): Shaft => ({
      kind: 'shaft',
      segments: [
        { length: 1, shearModulus: 8e10, density: 7850, outerDiameter: 0.1, innerDiameter, ...bare },
      ],
      ends: { near: fixed, far: free },
      attachments: [],
    });
    expect(codes(shaft(0.1))).toEqual([['inner-diameter-too-large', '/member/segments/0/innerDiameter']]);
    expect(codes(shaft(0.09))).toEqual([]);
    const segments = [
      { length: 1e-13, massPerLength: 1, ...bare },
      { length: 45, massPerLength: 58, ...bare },
    ];
    expect(codes(cable({ segments }))).toEqual([['segment-too-short', '/member/segments/0/length']]);
  });

  it('a section that leaves double precision is refused', () => {
    const bar: Bar = {
      kind: 'bar',
      segments: [{ length: 1, youngsModulus: 1e60, area: 1e60, density: 1e-60, ...bare }],
      ends: { near: fixed, far: free },
      attachments: [],
    };
    expect(codes(bar)).toEqual([['section-magnitude', '/member/segments/0']]);
  });
});

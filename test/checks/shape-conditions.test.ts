import { describe, expect, it } from 'vitest';
import { solveModes } from '../../src/solutions/modes.ts';
import type { Mode } from '../../src/spec/types.ts';
import { gaussLegendre } from '../support/gauss.ts';
import { lengthOf, nodePositions, type PlainMember } from '../support/plain-member.ts';
import { randomMember, type MemberFamily } from '../support/random-members.ts';
import { RandomStream } from '../support/random.ts';
import { modesRequest } from '../support/requests.ts';

const FAMILIES: readonly MemberFamily[] = [
  'general',
  'rigid',
  'nearly-rigid',
  'massless-segments',
  'twin-wells',
  'lumps-only',
  'uniform',
  'commensurate',
];
const CASES = Number(process.env['SHAPE_CASES'] ?? 150);
const MODES = 24;
/** Cases beyond the first ones that a joint in the wrong place turns into garbage. */
const HARD: Partial<Record<MemberFamily, number[]>> = {
  general: [178, 199, 386, 399, 403, 421, 501, 518, 626, 636, 649, 847, 907, 976],
  'massless-segments': [
    174, 181, 187, 193, 234, 245, 312, 369, 426, 471, 486, 539, 614, 654, 678, 686, 692, 707, 771,
  ],
  'twin-wells': [244, 274, 568, 669, 778, 832],
  'lumps-only': [178, 236, 260, 370, 579, 868],
};

function cases(family: MemberFamily): number[] {
  return [...Array.from({ length: CASES }, (_, index) => index), ...(HARD[family] ?? [])];
}

function member(family: MemberFamily, index: number): PlainMember {
  return randomMember(new RandomStream(1911 + FAMILIES.indexOf(family), index), family);
}

interface Place {
  readonly x: number;
  readonly segment: number;
}

/** Both sides of every interior node, an ulp-scale step beyond it for the far side, and Gauss points between. */
function places(
  plain: PlainMember,
  perSegment: number,
): { near: Place[]; far: Place[]; inside: (Place & { weight: number })[] } {
  const nodes = nodePositions(plain);
  const step = 1e-13 * lengthOf(plain);
  const inner = nodes.slice(1, -1);
  const { points, weights } = gaussLegendre(perSegment);
  return {
    near: inner.map((x, i) => ({ x, segment: i })),
    far: inner.map((x, i) => ({ x: x + step, segment: i + 1 })),
    inside: plain.segments.flatMap(({ length }, segment) =>
      points.map((point, q) => ({
        x: nodes[segment] + point * length,
        segment,
        weight: weights[q] * length,
      })),
    ),
  };
}

function values(mode: Mode, quantity: 'displacement' | 'force'): number[] {
  return Array.from(mode.shape?.[quantity] ?? []);
}

describe.each(FAMILIES)('shapes of %s members', { timeout: 60_000 }, (family) => {
  it('carry their force over every node: p⁺ − p⁻ = (K − ω²M) φ', () => {
    for (const index of cases(family)) {
      const plain = member(family, index);
      const { near, far, inside } = places(plain, 12);
      if (near.length === 0) continue;
      const positions = [...near, ...far, ...inside].map(({ x }) => x);
      const { modes } = solveModes(modesRequest(plain, MODES, { positions }));
      for (const mode of modes) {
        const [phi, force] = [values(mode, 'displacement'), values(mode, 'force')];
        const lambda = mode.angularFrequency ** 2;
        const lumpForces = near.map(
          (_, i) => Math.max(plain.springs[i + 1], lambda * plain.masses[i + 1]) * Math.abs(phi[i]),
        );
        // 1e-8 of the largest force, as for the tables; lumps push with forces of their own.
        const scale = Math.max(...force.map(Math.abs), ...lumpForces);
        const peak = Math.max(...phi.map(Math.abs));
        near.forEach((_, i) => {
          const lump = plain.springs[i + 1] - lambda * plain.masses[i + 1];
          const error = Math.abs(force[near.length + i] - force[i] - lump * phi[i]);
          // A heavy lump moves by very little of the peak and turns the rounding of that into force.
          const allowed = 1e-8 * scale + 1e-10 * Math.abs(lump) * peak;
          if (!(error <= allowed)) {
            expect.fail(`${family} ${index}, mode ${mode.order}, node ${i + 1}: ${error} > ${allowed}`);
          }
        });
      }
    }
  });

  it('are orthonormal in the mass product, lumps included', () => {
    for (const index of cases(family)) {
      const plain = member(family, index);
      const { inside } = places(plain, 48);
      const nodes = nodePositions(plain);
      const positions = [...nodes, ...inside.map(({ x }) => x)];
      const { modes } = solveModes(modesRequest(plain, 12, { positions, quantities: ['displacement'] }));
      // 48 Gauss points a segment carry a product of two shapes of up to some 24 half-waves.
      for (let a = 0; a < modes.length; a++) {
        const first = values(modes[a], 'displacement');
        for (let b = a; b < modes.length; b++) {
          const second = values(modes[b], 'displacement');
          let product = 0;
          nodes.forEach((_, node) => (product += plain.masses[node] * first[node] * second[node]));
          inside.forEach(({ segment, weight }, q) => {
            const i = nodes.length + q;
            product += plain.segments[segment].inertia * weight * first[i] * second[i];
          });
          const error = Math.abs(product - (a === b ? 1 : 0));
          if (!(error <= 1e-8)) {
            expect.fail(`${family} ${index}, modes ${modes[a].order} and ${modes[b].order}: ${product}`);
          }
        }
      }
    }
  });
});

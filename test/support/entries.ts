import type { InitialMotion } from '../../src/spec/types.ts';
import type { PlainShape } from './initial-shapes.ts';
import { nodePositions, type PlainMember } from './plain-member.ts';
import type { ReferenceEntry } from './reference.ts';

function held(end: unknown): boolean {
  return end === 'fixed' || (typeof end === 'object' && (end as { type: string }).type === 'fixed');
}

/** The member of an entry: either `segments` with node lists, or L, k, rho with ends of K and M. */
export function entryMember(entry: ReferenceEntry): PlainMember {
  const { inputs } = entry;
  const nearFixed = held(inputs.left);
  const farFixed = held(inputs.right);
  if (inputs.segments !== undefined) {
    const segments = (inputs.segments as { L: number; k: number; rho: number; s?: number }[]).map(
      (segment) => ({
        length: segment.L,
        stiffness: segment.k,
        inertia: segment.rho,
        foundation: segment.s ?? 0,
      }),
    );
    const none = Array.from({ length: segments.length + 1 }, () => 0);
    return {
      segments,
      masses: inputs.node_masses ?? none,
      springs: inputs.node_springs ?? none,
      nearFixed,
      farFixed,
    };
  }
  return {
    segments: [
      {
        length: inputs.L,
        stiffness: inputs.k ?? inputs.T ?? inputs.EA,
        inertia: inputs.rho ?? inputs.rhoA,
        foundation: 0,
      },
    ],
    masses: [inputs.left?.M ?? 0, inputs.right?.M ?? 0],
    springs: [inputs.left?.K ?? 0, inputs.right?.K ?? 0],
    nearFixed: inputs.left === undefined ? true : nearFixed,
    farFixed: inputs.right === undefined ? true : farFixed,
  };
}

function lengthOfEntry(entry: ReferenceEntry): number {
  return entryMember(entry).segments.reduce((sum, segment) => sum + segment.length, 0);
}

/** Initial displacement of an entry as shapes of the interface. */
export function entryDisplacement(entry: ReferenceEntry): PlainShape[] {
  const given =
    entry.inputs.initial_displacement ??
    (entry.inputs.x0 === undefined ? undefined : { type: 'triangle', ...entry.inputs });
  if (given === undefined) return [];
  const length = lengthOfEntry(entry);
  switch (given.type) {
    case 'triangle':
      return [{ type: 'polyline', positions: [0, given.x0, length], values: [0, given.h, 0] }];
    case 'parabola':
      return [
        {
          type: 'polynomial',
          coefficients: [0, (4 * given.h) / length, (-4 * given.h) / length ** 2],
          from: 0,
        },
      ];
    case 'samples':
      return [{ type: 'polyline', positions: given.x, values: given.u }];
    case 'linear':
      return [{ type: 'polyline', positions: [0, length], values: [0, given.slope * length] }];
    case 'polynomial':
      return [{ type: 'polynomial', coefficients: given.c, from: 0 }];
    case 'sine':
      // The quarter sine of c-19 is half of a half-sine wave: sin(π x/2L).
      return [{ type: 'half-sine', amplitude: given.h, halfWaves: given.n ?? 0.5 }];
    default:
      throw new Error(`entry ${entry.id}: displacement ${given.type}`);
  }
}

/** Initial velocity of an entry as shapes, and the velocities of single node masses. */
export function entryVelocity(entry: ReferenceEntry): {
  shapes: PlainShape[];
  nodes: { node: number; velocity: number }[];
} {
  const { inputs } = entry;
  const given =
    inputs.initial_velocity ?? (inputs.xa === undefined ? undefined : { type: 'uniform', ...inputs });
  if (given === undefined) return { shapes: [], nodes: [] };
  switch (given.type) {
    case 'uniform':
      return { shapes: [{ type: 'uniform', value: given.V, from: given.xa, to: given.xb }], nodes: [] };
    case 'strips':
      return {
        shapes: (given.strips as [number, number, number][]).map(([from, to, value]) => ({
          type: 'uniform',
          value,
          from,
          to,
        })),
        nodes: [],
      };
    case 'node mass only':
      return { shapes: [], nodes: [{ node: given.node, velocity: given.V }] };
    default:
      throw new Error(`entry ${entry.id}: velocity ${given.type}`);
  }
}

/** Initial motion of an entry as the interface takes it. */
export function entryInitial(entry: ReferenceEntry): InitialMotion {
  const displacement = entryDisplacement(entry);
  const { shapes, nodes } = entryVelocity(entry);
  const positions = nodePositions(entryMember(entry));
  return {
    ...(displacement.length > 0 ? { displacement } : {}),
    ...(shapes.length > 0 ? { velocity: shapes } : {}),
    ...(nodes.length > 0
      ? { massVelocities: nodes.map(({ node, velocity }) => ({ at: positions[node], velocity })) }
      : {}),
  };
}

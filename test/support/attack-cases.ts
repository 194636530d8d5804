import type { Quantity, ResponsesRequest } from '../../src/spec/types.ts';
import type { RmsWeights } from './compare-series.ts';
import { lengthOf, nodePositions, totalMass, travelTime, type PlainMember } from './plain-member.ts';
import { randomDamping, randomMember, type MemberFamily } from './random-members.ts';
import { randomMotion, smoothMotion } from './random-motion.ts';
import { RandomStream } from './random.ts';
import { responsesRequest } from './requests.ts';

/** A request with few modes and the same with many. */
export interface AttackCase {
  readonly family: string;
  readonly short: ResponsesRequest;
  readonly long: ResponsesRequest;
  /** Present where the positions are a fine grid for r.m.s. values. */
  readonly weights?: RmsWeights;
}

/** Share of each family among the cases. */
const FAMILIES: readonly (readonly [MemberFamily | 'smooth' | 'long-time', number])[] = [
  ['general', 40],
  ['rigid', 10],
  ['nearly-rigid', 7],
  ['massless-segments', 10],
  ['twin-wells', 8],
  ['lumps-only', 5],
  ['smooth', 12],
  ['uniform', 4],
  ['long-time', 4],
];

function pickFamily(random: RandomStream): (typeof FAMILIES)[number][0] {
  const total = FAMILIES.reduce((sum, [, share]) => sum + share, 0);
  let left = random.unit() * total;
  for (const [family, share] of FAMILIES) {
    left -= share;
    if (left < 0) return family;
  }
  return 'general';
}

/** A time that waves or, without them, the lumps need for the member. */
function ownTime(member: PlainMember): number {
  const compliance = member.segments.reduce((sum, each) => sum + each.length / each.stiffness, 0);
  return travelTime(member) || Math.sqrt(totalMass(member) * compliance);
}

/** Midpoints of a fine grid and what they stand for: mass, and compliance. Node masses are added. */
export function fineGrid(member: PlainMember, cells: number): { positions: number[]; weights: RmsWeights } {
  const nodes = nodePositions(member);
  const positions: number[] = [];
  const velocity: number[] = [];
  const force: number[] = [];
  const time = travelTime(member);
  member.segments.forEach((segment, i) => {
    const share = (segment.length * Math.sqrt(segment.inertia / segment.stiffness)) / (time || 1);
    const count = Math.max(8, Math.round(cells * share));
    for (let j = 0; j < count; j++) {
      positions.push(nodes[i] + ((j + 0.5) / count) * segment.length);
      velocity.push((segment.inertia * segment.length) / count);
      force.push(segment.length / segment.stiffness / count);
    }
  });
  member.masses.forEach((mass, node) => {
    if (mass === 0) return;
    positions.push(nodes[node]);
    velocity.push(mass);
    force.push(0);
  });
  const order = positions.map((_, i) => i).toSorted((a, b) => positions[a] - positions[b]);
  return {
    positions: order.map((i) => positions[i]),
    weights: { velocity: order.map((i) => velocity[i]), force: order.map((i) => force[i]) },
  };
}

/** Random stations, the nodes, and places just off the nodes on both sides. */
function stations(random: RandomStream, member: PlainMember): number[] {
  const length = lengthOf(member);
  const nodes = nodePositions(member);
  const positions = new Set<number>(nodes);
  for (let i = 0; i < 6; i++) positions.add(random.unit() * length);
  for (const node of nodes) {
    if (!random.chance(0.3)) continue;
    const offset = length * random.pick([1e-9, 1e-3]);
    if (node > offset) positions.add(node - offset);
    if (node + offset < nodes[nodes.length - 1]) positions.add(node + offset);
  }
  return [...positions].toSorted((a, b) => a - b);
}

function modesKept(random: RandomStream): number {
  const draw = random.unit();
  if (draw < 0.75) return random.integer(1, 20);
  if (draw < 0.99) return random.integer(20, 120);
  if (draw < 0.9985) return random.integer(120, 800);
  return random.integer(800, 5000);
}

/** Case number `index` of the stream of a seed. */
export function attackCase(seed: number, index: number): AttackCase {
  const random = new RandomStream(seed, index);
  const family = pickFamily(random);
  const member = randomMember(random, family === 'smooth' || family === 'long-time' ? 'uniform' : family);
  const damping = family === 'long-time' && random.chance(0.7) ? undefined : randomDamping(random, member);
  const initial =
    family === 'smooth' || family === 'long-time'
      ? smoothMotion(random, member)
      : randomMotion(random, member);
  const time = ownTime(member);
  const quantities: Quantity[] = ['displacement', 'velocity', 'force', 'acceleration'];
  const fine = random.chance(0.06);
  const gaugeTime = fine || random.chance(0.4) ? 0 : time * random.decades(-2, 0.5);
  const count = fine ? random.integer(1, 40) : modesKept(random);
  const longer = fine
    ? Math.max(160, 4 * count)
    : Math.min(Math.max(8 * count, 400), count > 2500 ? 2 * count : 5000);
  const latest = family === 'long-time' ? random.decades(2, 8) : random.decades(-0.5, 1.5);
  const times = [0, ...Array.from({ length: 7 }, () => random.unit() * latest * 2 * time)].toSorted(
    (a, b) => a - b,
  );
  const grid = fine ? fineGrid(member, 3 * longer) : undefined;
  const positions = grid?.positions ?? stations(random, member);
  const common = { member, ...(damping && { damping }), initial, positions, times, quantities, gaugeTime };
  return {
    family,
    short: responsesRequest({ ...common, modes: count, checks: random.chance(0.1) }),
    long: responsesRequest({ ...common, modes: longer }),
    ...(grid && { weights: grid.weights }),
  };
}

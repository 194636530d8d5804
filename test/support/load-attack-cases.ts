import type { Quantity } from '../../src/spec/types.ts';
import { fineGrid, type AttackCase } from './attack-cases.ts';
import { lengthOf, nodePositions, totalMass, travelTime, type PlainMember } from './plain-member.ts';
import { randomLoads } from './random-loads.ts';
import { randomDamping, randomMember, type MemberFamily } from './random-members.ts';
import { randomMotion } from './random-motion.ts';
import { RandomStream } from './random.ts';
import { responsesRequest } from './requests.ts';

const FAMILIES: readonly MemberFamily[] = [
  'general',
  'general',
  'general',
  'uniform',
  'uniform',
  'rigid',
  'nearly-rigid',
  'massless-segments',
  'twin-wells',
  'lumps-only',
];

function ownTime(member: PlainMember): number {
  const compliance = member.segments.reduce((sum, each) => sum + each.length / each.stiffness, 0);
  return travelTime(member) || Math.sqrt(totalMass(member) * compliance);
}

function stations(random: RandomStream, member: PlainMember): number[] {
  const length = lengthOf(member);
  const nodes = nodePositions(member);
  const positions = new Set<number>(nodes);
  for (let i = 0; i < 6; i++) positions.add(random.unit() * length);
  return [...positions].toSorted((a, b) => a - b);
}

/** Case number `index` of the stream of a seed: a member under loads, with few modes and with many. */
export function loadAttackCase(seed: number, index: number): AttackCase {
  const random = new RandomStream(seed, index);
  const family = random.pick(FAMILIES);
  const member = randomMember(random, family);
  const damping = randomDamping(random, member);
  const time = ownTime(member);
  const loads = randomLoads(random, member, time);
  const initial = random.chance(0.25) ? randomMotion(random, member) : {};
  const quantities: Quantity[] = [
    'displacement',
    'relativeDisplacement',
    'velocity',
    'force',
    'acceleration',
  ];
  const fine = random.chance(0.06);
  const gaugeTime = fine || random.chance(0.4) ? 0 : time * random.decades(-2, 0.5);
  const count = random.chance(0.85) ? random.integer(1, 12) : random.integer(12, 40);
  const longer = fine
    ? Math.max(160, 4 * count)
    : random.chance(0.1)
      ? Math.max(8 * count, 400)
      : Math.max(5 * count, 80);
  const latest = random.decades(-0.5, 1.3);
  const times = [0, ...Array.from({ length: 9 }, () => random.unit() * latest * 2 * time)].toSorted(
    (a, b) => a - b,
  );
  const grid = fine ? fineGrid(member, 3 * longer) : undefined;
  const common = {
    member,
    ...(damping && { damping }),
    initial,
    positions: grid?.positions ?? stations(random, member),
    times,
    quantities,
    gaugeTime,
  };
  const kinds = [...new Set(loads.map((load) => load.type))].toSorted().join('+');
  return {
    family: `${family}, ${kinds}`,
    short: { ...responsesRequest({ ...common, modes: count, checks: random.chance(0.1) }), loads },
    long: { ...responsesRequest({ ...common, modes: longer }), loads },
    ...(grid && { weights: grid.weights }),
  };
}

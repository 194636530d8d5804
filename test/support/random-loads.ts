import type { History, Load, MotionQuantity, Shape } from '../../src/spec/types.ts';
import { lengthOf, nodePositions, segmentAt, totalMass, type PlainMember } from './plain-member.ts';
import type { RandomStream } from './random.ts';

/** A random walk, white noise, a smooth wave or a tent. */
function record(random: RandomStream, count: number, size: number, start: number): number[] {
  const kind = random.pick(['walk', 'noise', 'wave', 'tent']);
  const turns = random.decades(-1, 1);
  let level = start;
  return Array.from({ length: count }, (_, i) => {
    if (i === 0) return start;
    const share = i / (count - 1);
    switch (kind) {
      case 'walk':
        level += (size / Math.sqrt(count)) * random.between(-1, 1);
        return level;
      case 'noise':
        return size * random.between(-1, 1);
      case 'wave':
        return start + size * Math.sin(2 * Math.PI * turns * share);
      default:
        return start + size * Math.min(share, 1 - share);
    }
  });
}

/**
 * A history of any type.
 *
 * @param time a time the member needs, s
 * @param continuous whether it must start at 0 and not jump (a support's displacement)
 */
export function randomHistory(
  random: RandomStream,
  size: number,
  time: number,
  continuous: boolean,
): History {
  const start = random.chance(0.5) ? 0 : time * random.between(0, 3);
  const duration = time * random.decades(-2, 1);
  const amplitude = size * random.pick([1, -1, 0.3]);
  const types = ['harmonic', 'ramp', 'half-sine-pulse', 'few', 'many'] as const;
  switch (random.pick(continuous ? types : [...types, 'step', 'rectangular-pulse'])) {
    case 'harmonic':
      return {
        type: 'harmonic',
        amplitude,
        frequency: random.decades(-1.5, 1.5) / time,
        phase: continuous ? random.pick([-1, 1]) * (Math.PI / 2) : random.between(-4, 4),
        start,
      };
    case 'ramp':
      return { type: 'ramp', amplitude, start, duration };
    case 'half-sine-pulse':
      return { type: 'half-sine-pulse', amplitude, start, duration };
    case 'step':
      return { type: 'step', amplitude, start };
    case 'rectangular-pulse':
      return { type: 'rectangular-pulse', amplitude, start, duration };
    case 'few': {
      const count = random.integer(2, 8);
      const values = record(random, count, amplitude, continuous ? 0 : amplitude * random.between(-1, 1));
      return { type: 'samples', interval: duration / count, values, start };
    }
    default: {
      const count = random.integer(65, 300);
      const values = record(random, count, amplitude, continuous ? 0 : amplitude * random.between(-1, 1));
      return { type: 'samples', interval: (time * random.decades(-1, 1)) / count, values, start };
    }
  }
}

/** A force per length; jumps and kinks are allowed. */
function profile(random: RandomStream, member: PlainMember, size: number): Shape {
  const length = lengthOf(member);
  const from = random.between(0, 0.7) * length;
  const to = Math.min(length, from + random.between(0.05, 1) * length);
  switch (random.pick(['uniform', 'stretch', 'half-sine', 'polyline', 'polynomial', 'pull'])) {
    case 'uniform':
      return { type: 'uniform', value: size, from: 0 };
    case 'stretch':
      return { type: 'uniform', value: size, from, to };
    case 'half-sine':
      return { type: 'half-sine', amplitude: size, halfWaves: random.integer(1, 5) };
    case 'polyline':
      return {
        type: 'polyline',
        positions: [from, 0.5 * (from + to), to],
        values: [size, -size, 0.5 * size],
      };
    case 'polynomial':
      return {
        type: 'polynomial',
        coefficients: [size, -size / length, (0.3 * size) / length ** 2],
        from: 0,
      };
    default:
      return isHeld(member)
        ? { type: 'pull', at: random.between(0.1, 0.9) * length, amplitude: size }
        : { type: 'uniform', value: size, from: 0 };
  }
}

function isHeld(member: PlainMember): boolean {
  return (
    member.nearFixed ||
    member.farFixed ||
    member.springs.some((each) => each > 0) ||
    member.segments.some((each) => each.foundation > 0)
  );
}

/** A random load of the given type; null where the member has no place for it. */
export function randomLoad(
  random: RandomStream,
  member: PlainMember,
  type: Load['type'],
  time: number,
): Load | null {
  const length = lengthOf(member);
  const nodes = nodePositions(member);
  const { stiffness } = member.segments[segmentAt(member, 0.4 * length)];
  const force = 0.01 * stiffness * random.decades(-0.5, 0.5);
  switch (type) {
    case 'point-force': {
      const inner = nodes.slice(member.nearFixed ? 1 : 0, member.farFixed ? -1 : undefined);
      const at =
        inner.length > 0 && random.chance(0.4) ? random.pick(inner) : random.between(0.02, 0.98) * length;
      return { type, at, history: randomHistory(random, force, time, false) };
    }
    case 'distributed-force':
      return {
        type,
        profile: profile(random, member, force / length),
        history: randomHistory(random, 1, time, false),
      };
    case 'body-force':
      return { type, history: randomHistory(random, force / totalMass(member), time, false) };
    case 'end-motion': {
      const ends = [
        ...(member.nearFixed ? (['near'] as const) : []),
        ...(member.farFixed ? (['far'] as const) : []),
        ...(member.nearFixed && member.farFixed ? (['both'] as const) : []),
      ];
      if (ends.length === 0) return null;
      const quantity = random.pick<MotionQuantity>(['displacement', 'acceleration']);
      const size = 0.01 * length;
      const history =
        quantity === 'displacement'
          ? randomHistory(random, size, time, true)
          : randomHistory(random, size / time ** 2, time, false);
      return { type, end: random.pick(ends), quantity, history };
    }
    case 'moving-force': {
      const segment = random.pick(member.segments);
      const speed =
        segment.inertia > 0
          ? Math.sqrt(segment.stiffness / segment.inertia) *
            random.pick([random.between(0.05, 0.95), random.between(1.05, 3), 0.5, 0.999, 1])
          : length / time;
      return {
        type,
        force,
        speed: random.pick([-1, 1]) * speed,
        start: random.chance(0.5) ? 0 : random.between(0, 2) * time,
      };
    }
  }
}

/** Zero to three loads more than one; at most one support motion. */
export function randomLoads(random: RandomStream, member: PlainMember, time: number): Load[] {
  const types: Load['type'][] = [
    'point-force',
    'distributed-force',
    'body-force',
    'end-motion',
    'end-motion',
    'moving-force',
  ];
  const count = random.chance(0.7) ? 1 : random.integer(2, 4);
  const loads: Load[] = [];
  while (loads.length < count) {
    const load = randomLoad(random, member, random.pick(types), time);
    if (load === null) continue;
    if (load.type === 'end-motion' && loads.some((each) => each.type === 'end-motion')) continue;
    loads.push(load);
  }
  return loads;
}

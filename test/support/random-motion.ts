import type { Impulse, InitialMotion, MassVelocity, Shape } from '../../src/spec/types.ts';
import { isRestrained, lengthOf, nodePositions, segmentAt, type PlainMember } from './plain-member.ts';
import type { RandomStream } from './random.ts';

/** A stretch [from, to] inside the member, at least a hundredth of it long. */
function stretch(random: RandomStream, length: number): [number, number] {
  const from = random.between(0, 0.9) * length;
  return [from, Math.min(length, from + random.between(0.01, 1) * (length - from) + 0.01 * length)];
}

/** A stretch for a polynomial in x: not so narrow that its coefficients in double would no longer describe it. */
function wideStretch(random: RandomStream, length: number): [number, number] {
  if (random.chance(0.5)) return [0, length];
  const to = random.between(0.2, 1) * length;
  return [random.between(0, 0.6) * to, to];
}

/** Coefficients in x of scale·((x − a)(b − x)/h²)^power, h = (b − a)/2: 1 times scale in the middle. */
function bump(a: number, b: number, scale: number, power: number): number[] {
  const half = ((b - a) / 2) ** 2;
  const factor = [-(a * b) / half, (a + b) / half, -1 / half];
  let result = [scale];
  for (let step = 0; step < power; step++) {
    const next = Array.from({ length: result.length + 2 }, () => 0);
    result.forEach((value, i) => factor.forEach((other, j) => (next[i + j] += value * other)));
    result = next;
  }
  return result;
}

/** A displacement shape without jumps, zero at fixed ends. */
function displacementShape(random: RandomStream, member: PlainMember, size: number): Shape {
  const length = lengthOf(member);
  const nodes = nodePositions(member);
  const kinds = [
    'half-sine',
    'polyline',
    'polyline',
    'bump',
    'bump',
    ...(isRestrained(member) ? ['pull', 'pull'] : []),
  ];
  const free = !member.nearFixed && !member.farFixed;
  switch (random.pick(free ? [...kinds, 'offset', 'parabola'] : kinds)) {
    case 'half-sine':
      return { type: 'half-sine', amplitude: size, halfWaves: random.integer(1, 4) };
    case 'pull': {
      const inner = nodes.slice(member.nearFixed ? 1 : 0, member.farFixed ? -1 : undefined);
      const at =
        inner.length > 0 && random.chance(0.4) ? random.pick(inner) : random.between(0.02, 0.98) * length;
      return { type: 'pull', at, amplitude: size };
    }
    case 'bump': {
      const [from, to] = wideStretch(random, length);
      return { type: 'polynomial', coefficients: bump(from, to, size, random.pick([1, 2, 3])), from, to };
    }
    case 'offset':
      return { type: 'uniform', value: size, from: 0 };
    case 'parabola':
      return {
        type: 'polynomial',
        coefficients: [
          size * random.between(-1, 1),
          (size / length) * random.between(-1, 1),
          size / length ** 2,
        ],
        from: 0,
      };
    default: {
      const inner = Array.from({ length: random.integer(1, 5) }, () => random.between(0.01, 0.99) * length);
      const positions = [0, ...new Set(inner), length].toSorted((a, b) => a - b);
      const last = positions.length - 1;
      return {
        type: 'polyline',
        positions,
        values: positions.map((_, i) =>
          (i === 0 && member.nearFixed) || (i === last && member.farFixed) ? 0 : size * random.between(-1, 1),
        ),
      };
    }
  }
}

function velocityShape(random: RandomStream, member: PlainMember, size: number): Shape {
  const length = lengthOf(member);
  const [from, to] = stretch(random, length);
  const wide = wideStretch(random, length);
  switch (random.pick(['uniform', 'uniform', 'whole', 'half-sine', 'bump', 'polyline'])) {
    case 'whole':
      return { type: 'uniform', value: size, from: 0 };
    case 'half-sine':
      return { type: 'half-sine', amplitude: size, halfWaves: random.integer(1, 3) };
    case 'bump':
      return {
        type: 'polynomial',
        coefficients: bump(wide[0], wide[1], size, random.pick([1, 2])),
        from: wide[0],
        to: wide[1],
      };
    case 'polyline':
      return { type: 'polyline', positions: [from, to], values: [size * random.between(-1, 1), size] };
    default:
      return { type: 'uniform', value: size, from, to };
  }
}

function impulseOf(
  random: RandomStream,
  member: PlainMember,
  masses: readonly number[],
  size: number,
): Impulse {
  const nodes = nodePositions(member);
  if (masses.length > 0 && random.chance(0.5)) return { at: nodes[random.pick(masses)], impulse: size };
  const at = random.between(0.2, 0.8) * lengthOf(member);
  const segment = segmentAt(member, at);
  const room = Math.min(at - nodes[segment], nodes[segment + 1] - at);
  if (member.segments[segment].inertia > 0 && room > 0) {
    return { at, impulse: size, width: 2 * room * random.between(0.1, 0.99) };
  }
  const heavy = member.segments.findIndex((each) => each.inertia > 0);
  if (heavy < 0) return { at: nodes[random.pick(masses)], impulse: size };
  const middle = (nodes[heavy] + nodes[heavy + 1]) / 2;
  return { at: middle, impulse: size, width: 0.5 * member.segments[heavy].length };
}

/** Initial displacement, velocity, mass velocities and impulses in any mixture, at least one of them. */
export function randomMotion(random: RandomStream, member: PlainMember): InitialMotion {
  const nodes = nodePositions(member);
  const masses = nodes.map((_, node) => node).filter((node) => member.masses[node] > 0);
  const length = lengthOf(member);
  // Displacements of a thousandth of the member; velocities that belong to such displacements.
  const size = 1e-3 * length * random.decades(-2, 2);
  const stiff = member.segments.reduce((sum, each) => sum + each.length / each.stiffness, 0);
  const inertia =
    member.segments.reduce((sum, each) => sum + each.length * each.inertia, 0) +
    member.masses.reduce((sum, mass) => sum + mass, 0);
  const speed = size / Math.sqrt(stiff * inertia);
  const motion: InitialMotion = {};
  const moved = random.chance(0.65);
  if (moved) {
    const shapes = Array.from({ length: random.pick([1, 1, 1, 2]) }, () =>
      displacementShape(random, member, size * random.between(-1, 1)),
    );
    motion.displacement = shapes.length === 1 ? shapes[0] : shapes;
  }
  const struck = !moved || random.chance(0.35);
  if (struck) {
    const what = random.integer(0, 2);
    if (what === 0 || masses.length === 0) motion.velocity = velocityShape(random, member, speed);
    else if (what === 1) {
      const velocities: MassVelocity[] = masses
        .filter((_, i) => i === 0 || random.chance(0.5))
        .map((node) => ({ at: nodes[node], velocity: speed * random.between(-1, 1) }));
      motion.massVelocities = velocities;
    }
    if (what === 2)
      motion.impulses = [impulseOf(random, member, masses, speed * inertia * random.decades(-2, 0))];
  }
  return motion;
}

/** Initial motion of a uniform fixed member that is smooth enough for pointwise bounds of every quantity. */
export function smoothMotion(random: RandomStream, member: PlainMember): InitialMotion {
  const length = lengthOf(member);
  const size = 1e-3 * length;
  const [{ stiffness, inertia }] = member.segments;
  const speed = (size / length) * Math.sqrt(stiffness / inertia);
  const sine = (amplitude: number): Shape => ({
    type: 'half-sine',
    amplitude,
    halfWaves: random.integer(1, 5),
  });
  const smooth = (amplitude: number): Shape => {
    const [from, to] = wideStretch(random, length);
    return { type: 'polynomial', coefficients: bump(from, to, amplitude, random.pick([2, 3, 4])), from, to };
  };
  const shape = (amplitude: number): Shape => (random.chance(0.4) ? sine(amplitude) : smooth(amplitude));
  return {
    ...(random.chance(0.8) ? { displacement: shape(size) } : { displacement: sine(size) }),
    ...(random.chance(0.5) ? { velocity: shape(speed) } : {}),
  };
}

import type { Damping } from '../../src/spec/types.ts';
import { lengthOf, totalMass, travelTime, type PlainMember, type PlainSegment } from './plain-member.ts';
import type { RandomStream } from './random.ts';

/** What a random member is meant to provoke. */
export type MemberFamily =
  | 'general'
  | 'rigid'
  | 'nearly-rigid'
  | 'massless-segments'
  | 'twin-wells'
  | 'lumps-only'
  | 'uniform'
  | 'commensurate';

interface Ends {
  readonly nearFixed: boolean;
  readonly farFixed: boolean;
}

function randomSegments(random: RandomStream, count: number): PlainSegment[] {
  // Contrasts of stiffness and inertia up to 1e6, in any unit system.
  const half = random.pick([0, 0.5, 1.5, 3]);
  const units = {
    length: random.decades(-1, 2),
    stiffness: random.decades(-3, 9),
    inertia: random.decades(-3, 3),
  };
  return Array.from({ length: count }, () => {
    const length = units.length * random.between(0.05, 1.5);
    const stiffness = units.stiffness * random.decades(-half, half);
    const bedded = random.chance(0.2);
    return {
      length,
      stiffness,
      inertia: units.inertia * random.decades(-half, half),
      foundation: bedded ? (stiffness / length ** 2) * random.decades(-2, 3) : 0,
    };
  });
}

function withLumps(
  random: RandomStream,
  segments: PlainSegment[],
  ends: Ends,
  springs: boolean,
): PlainMember {
  const bare: PlainMember = { segments, masses: [], springs: [], ...ends };
  const mass = totalMass(bare) || 1;
  const stiffness = 1 / segments.reduce((sum, segment) => sum + segment.length / segment.stiffness, 0);
  const held = (node: number): boolean =>
    (node === 0 && ends.nearFixed) || (node === segments.length && ends.farFixed);
  const nodes = Array.from({ length: segments.length + 1 }, (_, node) => node);
  return {
    ...bare,
    masses: nodes.map((node) => (!held(node) && random.chance(0.35) ? mass * random.decades(-3, 3) : 0)),
    springs: nodes.map((node) =>
      springs && !held(node) && random.chance(0.25) ? stiffness * random.decades(-3, 3) : 0,
    ),
  };
}

function withSpring(member: PlainMember, random: RandomStream, share: number): PlainMember {
  const stiffness = 1 / member.segments.reduce((sum, segment) => sum + segment.length / segment.stiffness, 0);
  const at = random.integer(0, member.segments.length);
  return {
    ...member,
    springs: member.springs.map((spring, node) => (node === at ? stiffness * share : spring)),
  };
}

/** Two equal wells beside a barrier of foundation: pairs of frequencies down to no gap at all. */
function twinWells(random: RandomStream): PlainMember {
  const length = random.decades(-1, 1);
  const stiffness = random.decades(-2, 6);
  const inertia = random.decades(-2, 2);
  const well: PlainSegment = { length, stiffness, inertia, foundation: 0 };
  const barrier: PlainSegment = {
    length: length * random.between(0.3, 1.2),
    stiffness,
    inertia,
    foundation: (stiffness / length ** 2) * random.decades(1.5, 3.5),
  };
  const detuned = random.chance(0.3) ? { ...well, length: length * (1 + random.decades(-14, -8)) } : well;
  const collar = random.chance(0.3) ? inertia * length * random.decades(-1, 1) : 0;
  return {
    segments: [well, barrier, detuned],
    masses: [0, collar, collar, 0],
    springs: [0, 0, 0, 0],
    nearFixed: true,
    farFixed: true,
  };
}

/** Travel times in whole steps and no foundation: the motion is known exactly by characteristics. */
function commensurate(random: RandomStream): PlainMember {
  const step = random.decades(-4, 1);
  const speed = random.decades(-1, 3);
  const impedance = random.decades(-2, 5);
  const half = random.pick([0, 0.5, 1.5]);
  const segments = Array.from({ length: random.integer(1, 4) }, () => {
    const ownSpeed = speed * random.decades(-half, half);
    const ownImpedance = impedance * random.decades(-half, half);
    return {
      length: ownSpeed * step * random.integer(2, 6),
      stiffness: ownImpedance * ownSpeed,
      inertia: ownImpedance / ownSpeed,
      foundation: 0,
    };
  });
  const ends = { nearFixed: random.chance(0.5), farFixed: random.chance(0.5) };
  const held = (node: number): boolean =>
    (node === 0 && ends.nearFixed) || (node === segments.length && ends.farFixed);
  const nodes = Array.from({ length: segments.length + 1 }, (_, node) => node);
  // Lumps whose own time, M/Z or Z/K, is not shorter than a step, or the cells of the oracle would not resolve it.
  const impedances = segments.map(({ stiffness, inertia }) => Math.sqrt(stiffness * inertia));
  const around = (node: number): number => (impedances[node - 1] ?? 0) + (impedances[node] ?? 0);
  return {
    segments,
    masses: nodes.map((node) =>
      !held(node) && random.chance(0.35) ? around(node) * step * random.decades(0, 2) : 0,
    ),
    springs: nodes.map((node) =>
      !held(node) && random.chance(0.25) ? (around(node) / step) * random.decades(-4, 0) : 0,
    ),
    ...ends,
  };
}

export function randomMember(random: RandomStream, family: MemberFamily): PlainMember {
  const ends = random.pick<Ends>([
    { nearFixed: true, farFixed: true },
    { nearFixed: true, farFixed: false },
    { nearFixed: false, farFixed: true },
    { nearFixed: false, farFixed: false },
  ]);
  const free = { nearFixed: false, farFixed: false };
  switch (family) {
    case 'general': {
      const member = withLumps(random, randomSegments(random, random.integer(1, 6)), ends, true);
      return member.nearFixed || member.farFixed ? member : withSpring(member, random, random.decades(-2, 2));
    }
    case 'rigid': {
      const segments = randomSegments(random, random.integer(1, 5)).map((each) => ({
        ...each,
        foundation: 0,
      }));
      return withLumps(random, segments, free, false);
    }
    case 'nearly-rigid': {
      const segments = randomSegments(random, random.integer(1, 4)).map((each) => ({
        ...each,
        foundation: 0,
      }));
      return withSpring(withLumps(random, segments, free, false), random, random.pick([1e-13, 1e-10, 1e-6]));
    }
    case 'massless-segments': {
      const segments = randomSegments(random, random.integer(2, 6));
      const light = segments.map((segment) => (random.chance(0.4) ? { ...segment, inertia: 0 } : segment));
      const some = light.some((segment) => segment.inertia > 0) ? light : [segments[0], ...light.slice(1)];
      const member = withLumps(random, some, ends, true);
      return member.nearFixed || member.farFixed ? member : withSpring(member, random, random.decades(-2, 2));
    }
    case 'twin-wells':
      return twinWells(random);
    case 'lumps-only': {
      const segments = randomSegments(random, random.integer(2, 6)).map((each) => ({ ...each, inertia: 0 }));
      const member = withLumps(random, segments, ends, true);
      const masses = [...member.masses];
      masses[random.integer(1, segments.length - 1)] ||= random.decades(-2, 2);
      const moving = { ...member, masses };
      return moving.nearFixed || moving.farFixed ? moving : withSpring(moving, random, 1);
    }
    case 'uniform': {
      const [segment] = randomSegments(random, 1);
      return {
        segments: [{ ...segment, foundation: random.chance(0.2) ? segment.foundation : 0 }],
        masses: [0, 0],
        springs: [0, 0],
        nearFixed: true,
        farFixed: true,
      };
    }
    case 'commensurate':
      return commensurate(random);
  }
}

/** None, ratios from 0 to far above critical, or Rayleigh damping of either kind or both. */
export function randomDamping(random: RandomStream, member: PlainMember): Damping | undefined {
  const time = travelTime(member) || lengthOf(member);
  switch (random.pick(['none', 'none', 'none', 'ratio', 'ratio', 'ratios', 'alpha', 'beta', 'both'])) {
    case 'ratio':
      return {
        type: 'ratio',
        value: random.pick([0, random.decades(-4, -1), random.between(0.1, 0.99), 1, 1 + 1e-9, 0.999, 2, 10]),
      };
    case 'ratios':
      return {
        type: 'ratios',
        values: Array.from({ length: random.integer(1, 6) }, () =>
          random.pick([0, random.decades(-3, 1), 0.02]),
        ),
      };
    case 'alpha':
      return { type: 'rayleigh', massCoefficient: random.decades(-3, 1) / time, stiffnessCoefficient: 0 };
    case 'beta':
      return { type: 'rayleigh', massCoefficient: 0, stiffnessCoefficient: random.decades(-5, 0) * time };
    case 'both':
      return {
        type: 'rayleigh',
        massCoefficient: random.decades(-3, 1) / time,
        stiffnessCoefficient: random.decades(-5, -1) * time,
      };
    default:
      return undefined;
  }
}

import { expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { InitialMotion, Quantity } from '../../src/spec/types.ts';
import { initialState, type PlainShape } from '../support/initial-shapes.ts';
import { isRestrained, nodePositions, travelTime, type PlainMember } from '../support/plain-member.ts';
import { randomMember } from '../support/random-members.ts';
import { RandomStream } from '../support/random.ts';
import { responsesRequest } from '../support/requests.ts';
import { TravellingWaves } from '../support/travelling-waves.ts';

const CASES = Number(process.env['EXACT_CASES'] ?? 150);
const SEED = Number(process.env['SEED'] ?? 1866);

/** Places that waves reach in whole quarter steps, so that fronts stay on the cells of the oracle. */
function lattice(member: PlainMember): number[] {
  const nodes = nodePositions(member);
  return member.segments.flatMap(({ length, stiffness, inertia }, i) => {
    const step = commonStep(member) * Math.sqrt(stiffness / inertia);
    const count = Math.round(length / step);
    return Array.from({ length: count }, (_, j) => nodes[i] + j * step);
  });
}

/** The generator makes every travel time 2 to 6 equal steps: find the step back. */
function commonStep(member: PlainMember): number {
  const times = member.segments.map(
    ({ length, stiffness, inertia }) => length * Math.sqrt(inertia / stiffness),
  );
  for (let parts = 2; parts <= 6; parts++) {
    const step = times[0] / parts;
    const fits = (time: number): boolean => Math.abs(time / step - Math.round(time / step)) < 1e-9;
    if (times.every((time) => fits(time) && Math.round(time / step) <= 6 && Math.round(time / step) >= 2))
      return step;
  }
  throw new Error('travel times have no common step');
}

function randomShapes(random: RandomStream, member: PlainMember, places: readonly number[]): PlainShape[] {
  const nodes = nodePositions(member);
  const length = nodes[nodes.length - 1];
  const inner = places.filter((x) => x > 0);
  const kind = random.pick(['pull', 'polyline', 'half-sine']);
  if (kind === 'pull' && isRestrained(member))
    return [{ type: 'pull', at: random.pick(inner), amplitude: 1 }];
  if (kind === 'half-sine') return [{ type: 'half-sine', amplitude: 1, halfWaves: random.integer(1, 3) }];
  const positions = [...new Set([0, random.pick(inner), random.pick(inner), length])].toSorted(
    (a, b) => a - b,
  );
  return [
    {
      type: 'polyline',
      positions,
      values: positions.map((x) =>
        (x === 0 && member.nearFixed) || (x === length && member.farFixed) ? 0 : random.between(-1, 1),
      ),
    },
  ];
}

it(`no bound is exceeded by the exact travelling waves of ${CASES} random members, seed ${SEED}`, () => {
  const failures: string[] = [];
  const worst = new Map<string, number>();
  for (let index = 0; index < CASES; index++) {
    const random = new RandomStream(SEED, index);
    const member = randomMember(random, 'commensurate');
    const nodes = nodePositions(member);
    const places = lattice(member);
    const time = travelTime(member);
    const displacement = random.chance(0.6) ? randomShapes(random, member, places) : [];
    const [from, to] = [random.pick(places), random.pick(places)].toSorted((a, b) => a - b);
    // A stretch that ends at a node mass leaves open whether the mass moves along: keep such ends clear.
    const clear = (x: number): boolean => !nodes.some((node, i) => node === x && member.masses[i] > 0);
    const velocity: PlainShape[] =
      displacement.length === 0 || random.chance(0.4)
        ? from < to && clear(from) && clear(to)
          ? [{ type: 'uniform', value: 1, from, to }]
          : [{ type: 'uniform', value: 1, from: 0 }]
        : [];
    const masses = nodes.map((_, i) => i).filter((i) => member.masses[i] > 0);
    const struck = masses.length > 0 && random.chance(0.5) ? random.pick(masses) : undefined;
    const strike = random.between(-3, 3);
    // A mass velocity replaces what the velocity shape gives the mass; an impulse adds to it.
    const blow = random.chance(0.5);
    const initial: InitialMotion = {
      ...(displacement.length > 0 && { displacement }),
      ...(velocity.length > 0 && { velocity }),
      ...(struck !== undefined && !blow && { massVelocities: [{ at: nodes[struck], velocity: strike }] }),
      ...(struck !== undefined &&
        blow && { impulses: [{ at: nodes[struck], impulse: strike * member.masses[struck] }] }),
    };
    const quantities: Quantity[] = ['displacement', 'velocity', 'force'];
    const gaugeTime = random.pick([0.03, 0.2, 1]) * time;
    const times = Array.from({ length: 12 }, () => random.unit() * 6 * time);
    const positions = [
      ...new Set([...nodes, ...Array.from({ length: 6 }, () => random.unit() * nodes[nodes.length - 1])]),
    ];
    positions.sort((a, b) => a - b);
    const answer = solveResponses(
      responsesRequest({
        member,
        initial,
        modes: random.pick([1, 4, 12, 40, 150, 600]),
        positions,
        times,
        quantities,
        gaugeTime,
      }),
    );
    const strikes: (number | undefined)[] = [];
    const shapes = initialState(member, [], velocity);
    if (struck !== undefined) strikes[struck] = strike + (blow ? shapes.velocity(nodes[struck]) : 0);
    const state = initialState(member, displacement, velocity, strikes);
    const waves = new TravellingWaves(member, state, 6 * time + gaugeTime, 2);
    // Sizes that the oracle's sums pass through: shapes of size 1, strikes, and differences of u over τ; a
    // force is the difference of two waves of the size Z v.
    const impedance = Math.max(...member.segments.map((each) => Math.sqrt(each.stiffness * each.inertia)));
    const moved = displacement.length > 0 ? 1 : Math.abs(strike) * time;
    const speed = Math.abs(strike) + 1 + moved / gaugeTime;
    const sizes = { displacement: moved, velocity: speed, force: impedance * speed };
    for (const quantity of ['displacement', 'velocity', 'force'] as const) {
      const field = answer.fields[quantity]!;
      const rounding = 1e-12 * sizes[quantity];
      times.forEach((t, row) => {
        const start = Math.max(0, t - gaugeTime / 2);
        positions.forEach((x, column) => {
          const average = field.boundKind === 'gauge-average';
          const exact =
            quantity === 'displacement'
              ? waves.displacement(x, t)
              : quantity === 'velocity'
                ? average
                  ? waves.velocityAverage(x, start, start + gaugeTime)
                  : waves.velocity(x, t)
                : average
                  ? waves.forceAverage(x, start, start + gaugeTime)
                  : waves.force(x, t);
          const error = Math.abs(field.values[row][column] - exact);
          const bound = field.bound![column] + rounding;
          const key = `${quantity} ${field.boundKind}`;
          if (bound > 0) worst.set(key, Math.max(worst.get(key) ?? 0, error / bound));
          if (!(error <= bound))
            failures.push(`case ${index}, ${key}, x = ${x}, t = ${t}: ${error} > ${bound}`);
          const upper = answer.peaks[quantity]!.upper!;
          if (!(Math.abs(exact) <= upper + rounding)) {
            failures.push(
              `case ${index}, ${quantity} upper, x = ${x}, t = ${t}: ${Math.abs(exact)} > ${upper}`,
            );
          }
        });
      });
    }
  }
  process.stdout.write(`largest error over bound: ${JSON.stringify([...worst])}\n`);
  expect(failures.slice(0, 20)).toEqual([]);
  expect(worst.get('displacement pointwise')).toBeGreaterThan(0.5);
}, 120_000);

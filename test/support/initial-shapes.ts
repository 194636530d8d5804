import { lengthOf, nodePositions, type PlainMember } from './plain-member.ts';
import type { InitialState } from './travelling-waves.ts';

/** Shapes of the interface that the oracles understand. */
export type PlainShape =
  | { type: 'pull'; at: number; amplitude: number }
  | { type: 'half-sine'; amplitude: number; halfWaves: number }
  | { type: 'polyline'; positions: number[]; values: number[] }
  | { type: 'polynomial'; coefficients: number[]; from: number; to?: number }
  | { type: 'uniform'; value: number; from: number; to?: number };

/** A function on the member, smooth between its breaks. */
export interface PlainFunction {
  readonly value: (x: number) => number;
  readonly slope: (x: number) => number;
  readonly breaks: readonly number[];
}

function polyline(positions: readonly number[], values: readonly number[]): PlainFunction {
  const piece = (x: number): number => {
    let i = 0;
    while (i < positions.length - 2 && x > positions[i + 1]) i++;
    return i;
  };
  const inside = (x: number): boolean => x >= positions[0] && x <= positions[positions.length - 1];
  const slope = (x: number): number => {
    const i = piece(x);
    return (values[i + 1] - values[i]) / (positions[i + 1] - positions[i]);
  };
  return {
    value: (x) => (inside(x) ? values[piece(x)] + slope(x) * (x - positions[piece(x)]) : 0),
    slope: (x) => (inside(x) ? slope(x) : 0),
    breaks: positions,
  };
}

/**
 * Static shape of a member without foundation under a force at a point, scaled to `amplitude` there:
 * straight between nodes. Solved as a chain of springs k/L with the point as one more node.
 */
function pull(member: PlainMember, at: number, amplitude: number): PlainFunction {
  const nodes = nodePositions(member);
  const positions = [...new Set([...nodes, at])].toSorted((a, b) => a - b);
  const springAt = (x: number): number => member.springs[nodes.indexOf(x)] ?? 0;
  const springBetween = (a: number, b: number): number => {
    const middle = (a + b) / 2;
    const segment = member.segments[nodes.findIndex((x) => x > middle) - 1];
    return segment.stiffness / Math.abs(b - a);
  };
  // Compliance seen from `at` towards each end, one node after the other.
  const shape = Array.from({ length: positions.length }, () => 0);
  const centre = positions.indexOf(at);
  shape[centre] = amplitude;
  const towards = (indices: readonly number[], held: boolean): void => {
    // indices run from the end to the point; stiffness of everything beyond each node.
    const beyond: number[] = [];
    indices.forEach((index, i) => {
      const own = springAt(positions[index]);
      if (i === 0) {
        beyond.push(held ? Infinity : own);
        return;
      }
      const link = springBetween(positions[indices[i - 1]], positions[index]);
      const previous = beyond[i - 1];
      beyond.push(own + (previous === Infinity ? link : (link * previous) / (link + previous)));
    });
    for (let i = indices.length - 2; i >= 0; i--) {
      const link = springBetween(positions[indices[i]], positions[indices[i + 1]]);
      const share = beyond[i] === Infinity ? 0 : link / (link + beyond[i]);
      shape[indices[i]] = shape[indices[i + 1]] * share;
    }
  };
  const order = positions.map((_, i) => i);
  towards(order.slice(0, centre + 1), member.nearFixed);
  towards(order.slice(centre).toReversed(), member.farFixed);
  return polyline(positions, shape);
}

function polynomial(coefficients: readonly number[], from: number, to: number): PlainFunction {
  const inside = (x: number): boolean => x >= from && x <= to;
  return {
    value: (x) => (inside(x) ? coefficients.reduceRight((sum, value) => sum * x + value, 0) : 0),
    slope: (x) =>
      inside(x) ? coefficients.reduceRight((sum, value, i) => (i > 0 ? sum * x + i * value : sum), 0) : 0,
    breaks: [from, to],
  };
}

/** The function that a shape describes on a member (a pull only without foundation). */
export function shapeFunction(shape: PlainShape, member: PlainMember): PlainFunction {
  const length = lengthOf(member);
  switch (shape.type) {
    case 'pull':
      return pull(member, shape.at, shape.amplitude);
    case 'half-sine': {
      const kappa = (shape.halfWaves * Math.PI) / length;
      return {
        value: (x) => shape.amplitude * Math.sin(kappa * x),
        slope: (x) => shape.amplitude * kappa * Math.cos(kappa * x),
        breaks: [],
      };
    }
    case 'polyline':
      return polyline(shape.positions, shape.values);
    case 'polynomial':
      return polynomial(shape.coefficients, shape.from, shape.to ?? length);
    case 'uniform':
      return polynomial([shape.value], shape.from, shape.to ?? length);
  }
}

function sum(functions: readonly ((x: number) => number)[], x: number): number {
  return functions.reduce((total, each) => total + each(x), 0);
}

/** Initial state of sums of shapes; node velocities that differ from the velocity shape by node. */
export function initialState(
  member: PlainMember,
  displacement: readonly PlainShape[],
  velocity: readonly PlainShape[],
  nodeVelocities: readonly (number | undefined)[] = [],
): InitialState {
  const f = displacement.map((shape) => shapeFunction(shape, member));
  const g = velocity.map((shape) => shapeFunction(shape, member));
  return {
    displacement: (x) =>
      sum(
        f.map((each) => each.value),
        x,
      ),
    slope: (x) =>
      sum(
        f.map((each) => each.slope),
        x,
      ),
    velocity: (x) =>
      sum(
        g.map((each) => each.value),
        x,
      ),
    nodeVelocities,
    breaks: [...f, ...g].flatMap((each) => each.breaks),
  };
}

import type { WaveMember } from '../members/wave-member.ts';
import {
  add,
  divide,
  exponential,
  modulus,
  multiply,
  ONE,
  scale,
  squareRoot,
  subtract,
  ZERO,
  type Complex,
} from '../numerics/complex.ts';
import { complexStiffness, lumpStiffness, waveNumberSquareOf, type SteadyFactors } from './steady-member.ts';

/** Displacement and flux (total, k̂ u′) at one place. */
export interface SteadyState {
  readonly displacement: Complex;
  readonly flux: Complex;
}

/** One evaluated output: state and error of displacement and flux. */
export interface BoundedState extends SteadyState {
  readonly displacementError: number;
  readonly fluxError: number;
}

/** A solution marched from one end: displacement and flux in its direction, times e^{log}. */
interface Flow {
  readonly u: Complex;
  readonly g: Complex;
  readonly log: number;
}

/** Phase or decay below which the entire functions cos a and sin a / a are summed as series. */
const SMALL_SQUARE = 1;

/**
 * Exact steady motion of a member with complex coefficients (dynamic stiffness method): solutions are
 * marched in closed form from both ends, as growing and decaying waves where they decay, and joined
 * by their Wronskian W = u_R g_L + u_L g_R, so neither many wavelengths nor strong decay cost digits.
 *
 *   U(x; z) = u_L(min) u_R(max)/W,   P = g_L(x) u_R(z)/W before the force, −u_L(z) g_R(x)/W after it.
 *
 * Cost: O(segments) once, O(1) a station.
 */
export class SteadyResponse {
  private readonly member: WaveMember;
  readonly factors: SteadyFactors;
  private readonly near: Flow[] = [];
  private readonly far: Flow[] = [];

  constructor(member: WaveMember, factors: SteadyFactors) {
    this.member = member;
    this.factors = factors;
    const n = member.segmentCount;
    let flow = this.begin(member.nearFixed, 0);
    for (let i = 0; i < n; i++) {
      this.near[i] = flow;
      flow = this.pass(this.cross(i, member.length[i], flow), i + 1);
    }
    flow = this.begin(member.farFixed, n);
    for (let i = n - 1; i >= 0; i--) {
      this.far[i] = flow;
      flow = this.pass(this.cross(i, member.length[i], flow), i);
    }
  }

  /** State at (segment i, distance) under a unit force at (segment j, other). */
  underForce(i: number, distance: number, j: number, other: number): SteadyState {
    const load = this.meet(j, other);
    const here = this.meet(i, distance);
    const wronskian = add(multiply(load.right.u, load.left.g), multiply(load.left.u, load.right.g));
    if (i < j || (i === j && distance <= other)) {
      const factor = scale(divide(load.right.u, wronskian), Math.exp(here.left.log - load.left.log));
      return { displacement: multiply(here.left.u, factor), flux: multiply(here.left.g, factor) };
    }
    const factor = scale(divide(load.left.u, wronskian), Math.exp(here.right.log - load.right.log));
    return {
      displacement: multiply(here.right.u, factor),
      flux: scale(multiply(here.right.g, factor), -1),
    };
  }

  /** State at (segment i, distance) under a unit motion of a fixed end, the other end as it is. */
  underEndMotion(i: number, distance: number, end: 'near' | 'far'): SteadyState {
    const here = this.meet(i, distance);
    const last = this.member.segmentCount - 1;
    if (end === 'near') {
      const base = this.cross(0, this.member.length[0], this.far[0]);
      const factor = scale(divide(ONE, base.u), Math.exp(here.right.log - base.log));
      return {
        displacement: multiply(here.right.u, factor),
        flux: scale(multiply(here.right.g, factor), -1),
      };
    }
    const base = this.cross(last, this.member.length[last], this.near[last]);
    const factor = scale(divide(ONE, base.u), Math.exp(here.left.log - base.log));
    return { displacement: multiply(here.left.u, factor), flux: multiply(here.left.g, factor) };
  }

  /** Force that a unit motion of a fixed end takes from the support, N/m: the driving-point stiffness. */
  endStiffness(end: 'near' | 'far'): Complex {
    const last = this.member.segmentCount - 1;
    const base =
      end === 'near'
        ? this.cross(0, this.member.length[0], this.far[0])
        : this.cross(last, this.member.length[last], this.near[last]);
    return divide(base.g, base.u);
  }

  private begin(fixed: boolean, node: number): Flow {
    if (fixed) return { u: ZERO, g: ONE, log: 0 };
    return { u: ONE, g: lumpStiffness(this.member, node, this.factors), log: 0 };
  }

  private pass(flow: Flow, node: number): Flow {
    const { mass, spring } = this.member;
    if (mass[node] === 0 && spring[node] === 0) return flow;
    return { ...flow, g: add(flow.g, multiply(lumpStiffness(this.member, node, this.factors), flow.u)) };
  }

  private meet(i: number, distance: number): { left: Flow; right: Flow } {
    return {
      left: this.cross(i, distance, this.near[i]),
      right: this.cross(i, this.member.length[i] - distance, this.far[i]),
    };
  }

  private cross(i: number, stretch: number, flow: Flow): Flow {
    if (stretch <= 0) return flow;
    const stiffness = complexStiffness(this.member, i, this.factors);
    const density = waveNumberSquareOf(this.member, i, this.factors);
    const square = divide(scale(density, stretch * stretch), stiffness);
    let next: Flow;
    if (modulus(square) < SMALL_SQUARE) {
      const [c, s] = entire(square);
      const e = scale(divide(flow.g, stiffness), stretch);
      next = {
        u: add(multiply(flow.u, c), multiply(e, s)),
        g: subtract(multiply(flow.g, c), scale(multiply(multiply(density, s), flow.u), stretch)),
        log: flow.log,
      };
    } else {
      // u = α e^{iκx} + β e^{−iκx} with Im κ ≤ 0, so that α grows; e^{|Im κ| x} is taken out
      const root = squareRoot(square);
      const kappa = root.im > 0 ? scale(root, -1) : root;
      const impedance = multiply(scale(stiffness, 1 / stretch), kappa);
      const wave = divide(flow.g, { re: -impedance.im, im: impedance.re });
      const growth = -kappa.im;
      const turn = exponential({ re: 0, im: kappa.re });
      const back = exponential({ re: -2 * growth, im: -kappa.re });
      const alpha = multiply(scale(add(flow.u, wave), 0.5), turn);
      const beta = multiply(scale(subtract(flow.u, wave), 0.5), back);
      next = {
        u: add(alpha, beta),
        g: multiply({ re: -impedance.im, im: impedance.re }, subtract(alpha, beta)),
        log: flow.log + growth,
      };
    }
    const size = modulus(next.u) * (modulus(stiffness) / this.member.length[i]) + modulus(next.g);
    if (size > 0 && (size > 1e70 || size < 1e-70)) {
      return { u: scale(next.u, 1 / size), g: scale(next.g, 1 / size), log: next.log + Math.log(size) };
    }
    return next;
  }
}

/** cos a and sin a / a of a complex a² of modulus below 1. */
function entire(square: Complex): [Complex, Complex] {
  let c = ONE;
  let s = ONE;
  for (let m = 11; m >= 1; m--) {
    c = subtract(ONE, scale(multiply(square, c), 1 / ((2 * m - 1) * (2 * m))));
    s = subtract(ONE, scale(multiply(square, s), 1 / (2 * m * (2 * m + 1))));
  }
  return [c, s];
}

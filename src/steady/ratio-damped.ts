import type { WaveMember } from '../members/wave-member.ts';
import { complex, divide, multiply, subtract, ZERO, type Complex } from '../numerics/complex.ts';
import { SteadyResponse, type SteadyState } from './steady-response.ts';

/** A steady state of the undamped member at a complex ω²: what its resolvent is made of. */
export type StateAt = (response: SteadyResponse) => SteadyState;

/** A sum over all modes with the bound of its quadrature. */
export interface RatioDampedState {
  readonly displacement: Complex;
  readonly flux: Complex;
  /** Error of displacement and flux by the quadrature. */
  readonly displacementError: number;
  readonly fluxError: number;
}

/** Ratio up to which the closed form is used; beyond it the poles come too near the path. */
export const LARGEST_CLOSED_RATIO = 0.7;

/** Nodes begin this far below the lowest and end this far above the highest frequency, in ln a. */
const BELOW = 14;
const BELOW_DRIFTING = 38;
const ABOVE = 20;

/**
 * Steady motion with the same damping ratio ζ in every mode, summed over ALL modes without solving for
 * one:
 *
 *   T = Σ φ_n F_n/(ω_n² − Ω² + 2iζω_nΩ).
 *
 * The part even in ω_n is a pair of resolvents g(λ) = Σ φF/(ω_n² − λ) of the undamped member at
 * λ₁ = Ω²(√(1−ζ²) − iζ)² and its conjugate; the odd part is turned into resolvents by
 * 1/ω = (2/π)∫₀^∞ da/(ω² + a²):
 *
 *   T = E − 2iζΩ S,  E = Im[(λ₁ − Ω²) g(λ₁)]/Im λ₁,
 *   S = Im[√λ₁ g(λ₁)]/Im λ₁ − (2/π)∫₀^∞ a² g(−a²)/|(−a² − λ₁)|² da.
 *
 * Every g is exact ({@link SteadyResponse}). The integral is taken by the trapezoidal rule in ln a,
 * which converges as e^{−2π arccos ζ/h}; the error stated is the difference to the rule of twice the
 * step, whose own error is the square root of it.
 *
 * Needs 0 < ζ ≤ {@link LARGEST_CLOSED_RATIO}. Cost: some 500 static solutions once, two multiplications
 * a node and one march a frequency.
 */
export class RatioDamped {
  private readonly member: WaveMember;
  private readonly ratio: number;
  private readonly step: number;
  private readonly nodes: Float64Array;
  private readonly fixed: SteadyResponse[];

  /**
   * @param lowest, @param highest Ω of the frequencies to come, rad/s
   * @param drifts whether the member has a rigid-body mode
   */
  constructor(member: WaveMember, ratio: number, lowest: number, highest: number, drifts: boolean) {
    this.member = member;
    this.ratio = ratio;
    // 2h must still reach rounding: e^{−π arccos ζ/h} = 1e-16
    this.step = (Math.PI * Math.acos(ratio)) / 37;
    const from = Math.log(lowest) - (drifts ? BELOW_DRIFTING : BELOW);
    const to = Math.log(highest) + ABOVE;
    const count = 2 * Math.ceil((to - from) / (2 * this.step));
    this.nodes = Float64Array.from({ length: count }, (_, j) => Math.exp(from + j * this.step));
    this.fixed = Array.from(this.nodes, (a) => undamped(member, complex(-a * a)));
  }

  /** The state at each node of the path, for one pair of places; used again for every frequency. */
  atNodes(state: StateAt): { readonly displacement: Float64Array; readonly flux: Float64Array } {
    const states = this.fixed.map(state);
    return {
      displacement: Float64Array.from(states, (s) => s.displacement.re),
      flux: Float64Array.from(states, (s) => s.flux.re),
    };
  }

  /** T at Ω (rad/s > 0), displacement and flux. */
  at(
    omega: number,
    state: StateAt,
    nodes: { readonly displacement: Float64Array; readonly flux: Float64Array },
  ): RatioDampedState {
    const { ratio } = this;
    const z: Complex = { re: omega * Math.sqrt((1 - ratio) * (1 + ratio)), im: -ratio * omega };
    const lambda = multiply(z, z);
    const resolvent = state(undamped(this.member, lambda));
    const displacement = this.combine(omega, z, lambda, resolvent.displacement, nodes.displacement);
    const flux = this.combine(omega, z, lambda, resolvent.flux, nodes.flux);
    return {
      displacement: displacement.value,
      flux: flux.value,
      displacementError: displacement.error,
      fluxError: flux.error,
    };
  }

  private combine(
    omega: number,
    z: Complex,
    lambda: Complex,
    g: Complex,
    nodes: Float64Array,
  ): { value: Complex; error: number } {
    const even = multiply(subtract(lambda, complex(omega * omega)), g).im / lambda.im;
    const first = multiply(z, g).im / lambda.im;
    let fine = 0;
    let coarse = 0;
    for (let j = 0; j < nodes.length; j++) {
      const a = this.nodes[j];
      const re = a * a + lambda.re;
      // a² g/|a² + λ|², da = a d(ln a)
      const term = ((a / omega) ** 3 * omega ** 3 * nodes[j]) / (re * re + lambda.im * lambda.im);
      fine += term;
      if (j % 2 === 0) coarse += term;
    }
    const weight = (2 / Math.PI) * this.step;
    const odd = first - weight * fine;
    const factor = 2 * this.ratio * omega;
    const rounding = 1e-14 * (Math.abs(even) + factor * (Math.abs(first) + weight * Math.abs(fine)));
    return {
      value: { re: even, im: -factor * odd },
      error: factor * weight * Math.abs(fine - 2 * coarse) + rounding,
    };
  }
}

/** The undamped member at a complex ω². */
export function undamped(member: WaveMember, lambda: Complex): SteadyResponse {
  return new SteadyResponse(member, { stiffness: complex(1), lambda });
}

/** 1/(ω² − Ω² + 2iζωΩ). */
export function modalReceptance(omega: number, ratio: number, excitation: number): Complex {
  if (omega === 0 && excitation === 0) return ZERO;
  return divide(complex(1), {
    re: (omega - excitation) * (omega + excitation),
    im: 2 * ratio * omega * excitation,
  });
}

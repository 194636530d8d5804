import type { WaveMember } from '../members/wave-member.ts';
import { complex, multiply, scale, type Complex } from '../numerics/complex.ts';

/** Factors that damping puts on the coefficients of a steady motion e^{iΩt}. */
export interface SteadyFactors {
  /** On stiffness, foundation and springs. */
  readonly stiffness: Complex;
  /** ω² with the factor of inertia and node masses, 1/s². */
  readonly lambda: Complex;
}

/**
 * Damping in a steady motion with e^{+iΩt}: a loss factor η makes every stiffness k(1 + iη);
 * Rayleigh damping k(1 + iβΩ) and ρ(1 − iα/Ω); uniform drag is α. Exact, closed form.
 *
 * @param omega Ω, rad/s ≥ 0
 */
export function steadyFactors(member: WaveMember, omega: number, lossFactor: number): SteadyFactors {
  const { massCoefficient, stiffnessCoefficient } = member.damping;
  return {
    stiffness: complex(1, lossFactor + stiffnessCoefficient * omega),
    lambda: complex(omega * omega, -massCoefficient * omega),
  };
}

/** (λ ρ − ŝ)/k̂ of segment i divided by the stiffness factor, complex. */
export function waveNumberSquareOf(member: WaveMember, i: number, factors: SteadyFactors): Complex {
  const bedding = scale(factors.stiffness, member.foundation[i]);
  return {
    re: factors.lambda.re * member.inertia[i] - bedding.re,
    im: factors.lambda.im * member.inertia[i] - bedding.im,
  };
}

/** Dynamic stiffness K̂ − λM of a lump. */
export function lumpStiffness(member: WaveMember, node: number, factors: SteadyFactors): Complex {
  const spring = scale(factors.stiffness, member.spring[node]);
  const mass = scale(factors.lambda, member.mass[node]);
  return { re: spring.re - mass.re, im: spring.im - mass.im };
}

/** Flux of a unit slope, k̂ = k times the stiffness factor. */
export function complexStiffness(member: WaveMember, i: number, factors: SteadyFactors): Complex {
  return multiply(complex(member.stiffness[i]), factors.stiffness);
}

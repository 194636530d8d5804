import type { WaveMember } from '../members/wave-member.ts';
import { largestRatioAbove, ratioOf } from '../motion/modal-damping.ts';
import {
  add,
  complex,
  divide,
  modulus,
  multiply,
  scale,
  subtract,
  ZERO,
  type Complex,
} from '../numerics/complex.ts';
import { steadyFactors } from '../steady/steady-member.ts';
import type { SteadyState } from '../steady/steady-response.ts';
import { passesOver } from './transfer-resonance.ts';
import type { TransferModes } from './transfer-modes.ts';

/** One frequency of a truncated series at one output, for unit force or unit end displacement. */
export interface TruncatedState {
  readonly truncated: SteadyState;
  /** With the static part of the modes left out. */
  readonly corrected: SteadyState;
  /** Bounds of the corrected displacement and flux; infinite where Ω reaches the modes left out. */
  readonly displacementBound: number;
  readonly fluxBound: number;
}

/**
 * The series of N modes with and without its static remainder; s and λ̂ are the complex factors of the
 * damping on stiffness and on ω², D_n = ω_n² s − λ̂ + 2iζ_nω_nΩ, ρ = |λ̂|/ω_{N+1}² < |s|.
 *
 * - force: Σ φF/D, and + (w − Σ φF/ω²)/s. A later mode then errs by at most
 *   (|λ̂| + 2ζω_nΩ)/(ω_n⁴ |s| (|s| − ρ)), which with √(ΔC ΔG) bounds the displacement and, one 1/ω_n
 *   given to F_n, with ω_{N+1} √(ΔC ΔH) the flux;
 * - end motion: Σ φΓ (1 + Ω²/D), and r + Σ φΓ Ω²/D. Later modes: Ω²/(|s| − ρ) times
 *   √(ΔG (m(r,r) − ΣΓ²))/ω_{N+1} and √(ΔH (m(r,r) − ΣΓ²)).
 *
 * @param still static state under the input: w of a unit force (elastic part for an unrestrained
 *   member), r of a unit end motion
 */
export function truncatedState(
  member: WaveMember,
  modes: TransferModes,
  input: 'force' | 'motion',
  output: number,
  omega: number,
  lossFactor: number,
  still: { readonly displacement: number; readonly flux: number },
): TruncatedState {
  const { stiffness, lambda } = steadyFactors(member, omega, lossFactor);
  const square = omega * omega;
  let u: Complex = ZERO;
  let p: Complex = ZERO;
  let staticU = 0;
  let staticP = 0;
  modes.modes.forEach((mode, n) => {
    const { omega: own, order } = mode.frequency;
    const denominator = add(
      subtract(scale(stiffness, mode.shape.lambda), lambda),
      complex(0, 2 * ratioOf(member.damping, order) * own * omega),
    );
    // a resonance that the input does not drive: 0/0 in the sum, nothing in the motion
    const resting = modes.idle[n] && denominator.im === 0 && passesOver(own, omega);
    const receptance = resting ? ZERO : divide(complex(input === 'force' ? 1 : square), denominator);
    const phi = modes.factor[n] * modes.displacement[n][output];
    const flux = modes.factor[n] * modes.flux[n][output];
    u = add(u, scale(receptance, phi));
    p = add(p, scale(receptance, flux));
    const weight = input === 'motion' ? 1 : mode.shape.lambda > 0 ? 1 / mode.shape.lambda : 0;
    staticU += weight * phi;
    staticP += weight * flux;
  });
  const total = (displacement: Complex, flux: Complex): SteadyState => ({
    displacement,
    flux: multiply(flux, stiffness),
  });
  const restU = still.displacement - staticU;
  const restP = still.flux - staticP;
  const [onDisplacement, onFlux] = remainder(member, modes, input, omega, stiffness, lambda);
  const nextLambda = modes.nextOmega * modes.nextOmega;
  const source = Math.sqrt(modes.inputTail);
  const bounds = {
    displacementBound: times(
      onDisplacement,
      source * Math.sqrt(modes.tails.flexibilityTail(output, nextLambda)),
    ),
    fluxBound: times(onFlux, source * Math.sqrt(modes.tails.fluxTail(output))),
  };
  if (input === 'motion') {
    return {
      truncated: total(add(u, complex(staticU)), add(p, complex(staticP))),
      corrected: total(add(u, complex(still.displacement)), add(p, complex(still.flux))),
      ...bounds,
    };
  }
  const inverse = divide(complex(1), stiffness);
  return {
    truncated: total(u, p),
    corrected: total(add(u, scale(inverse, restU)), add(p, scale(inverse, restP))),
    ...bounds,
  };
}

/** Factors of √(ΔC ΔG) and √(ΔC ΔH) in the bounds of {@link truncatedState}. */
function remainder(
  member: WaveMember,
  modes: TransferModes,
  input: 'force' | 'motion',
  omega: number,
  stiffness: Complex,
  lambda: Complex,
): [number, number] {
  if (modes.nextOmega === Number.POSITIVE_INFINITY) return [0, 0];
  const next = modes.nextOmega;
  const size = modulus(stiffness);
  const reach = modulus(lambda) / (next * next);
  if (reach >= size) return [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  if (input === 'motion') {
    const factor = (omega * omega) / (size - reach);
    return [factor / next, factor * size];
  }
  // damping terms of both kinds have one sign, so they only add to the modulus of ω²s − Re λ̂
  const rate = 2 * largestRatioAbove(member.damping, modes.modes.length) * omega;
  const share = (modulus(lambda) + rate * next) / (next * next);
  const factor = share / (size * (size - reach));
  return [factor, factor * next * size];
}

function times(a: number, b: number): number {
  return a === 0 || b === 0 ? 0 : a * b;
}

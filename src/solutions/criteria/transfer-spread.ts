import type { WaveMember } from '../../members/wave-member.ts';
import { largestRatioAbove, ratioOf } from '../../motion/modal-damping.ts';
import { complex, divide, modulus, subtract } from '../../numerics/complex.ts';
import { steadyFactors } from '../../steady/steady-member.ts';
import type { TransferModes } from '../transfer-modes.ts';

/** A stretch of frequencies a ≤ Ω ≤ b about its middle, rad/s. */
export interface Stretch {
  readonly from: number;
  readonly to: number;
}

/** How far displacement and flux can differ within a stretch from what they are in its middle. */
export interface Spread {
  readonly displacement: number;
  readonly flux: number;
}

const ENDLESS: Spread = { displacement: Number.POSITIVE_INFINITY, flux: Number.POSITIVE_INFINITY };

/**
 * Bounds how far a transfer function can move within a stretch of frequencies, Ω within h of its middle m.
 *
 * It is a sum over modes of c_n = φ_n(x) F_n times a receptance, and of each the change is known:
 *
 * - without ratios, with s = 1 + i(η + βΩ) and w = (Ω² − iαΩ)/s, the flux under a force is Σ c/(ω² − w), the
 *   displacement 1/s of that; under an end motion r + Σ c w/(ω² − w), the flux s times that.
 *   |Δ 1/(ω² − w)| ≤ ρ/(|ω² − w_m|(|ω² − w_m| − ρ)), ρ = h sup|w′|;
 * - with ratios Σ c/D and r + Σ c Ω²/D, D = ω² − Ω² + i(α + 2ζω)Ω, in the same way with ρ = h sup|D′|.
 *
 * The modes left out are bounded by Cauchy–Schwarz and what the flexibilities have left, as in
 * `transfer-truncated.ts`: |ω² − w| ≥ ω²(1 − q), q = sup|w|/ω²_{N+1}. Infinite where a resonance may lie within.
 *
 * Cost: O(modes).
 *
 * @param motion whether the input is the motion of an end
 * @param middle |u| and |p| in the middle of the stretch, per unit force or unit end displacement
 */
export function spreadWithin(
  member: WaveMember,
  modes: TransferModes,
  motion: boolean,
  output: number,
  lossFactor: number,
  { from, to }: Stretch,
  middle: Spread,
): Spread {
  const { massCoefficient: alpha, stiffnessCoefficient: beta, ratios } = member.damping;
  const ratioed = ratios.some((value) => value > 0);
  const m = 0.5 * (from + to);
  const h = 0.5 * (to - from) * (1 + 8 * Number.EPSILON);
  const least = Math.hypot(1, lossFactor + beta * from);
  const most = Math.hypot(1, lossFactor + beta * to);
  const lambda = Math.hypot(to * to, alpha * to);
  const factors = steadyFactors(member, m, lossFactor);
  const w = ratioed ? factors.lambda : divide(factors.lambda, factors.stiffness);
  const slope = ratioed ? 2 * to + alpha : (2 * to + alpha) / least + (beta * lambda) / (least * least);
  const squares = 2 * to * h;
  let u = 0;
  let p = 0;
  for (let n = 0; n < modes.modes.length; n++) {
    if (modes.idle[n]) continue;
    const { omega, order } = modes.modes[n].frequency;
    const own = ratioed ? 2 * ratioOf(member.damping, order) * omega : 0;
    const distance = modulus(subtract(complex(omega * omega, own * m), w));
    const move = h * (slope + own);
    if (!(distance > move)) return ENDLESS;
    const nearest = distance - move;
    const change = move / (distance * nearest);
    const factor = !motion ? change : ratioed ? squares / nearest + m * m * change : omega * omega * change;
    u += factor * Math.abs(modes.factor[n] * modes.displacement[n][output]);
    p += factor * Math.abs(modes.factor[n] * modes.flux[n][output]);
  }
  const next = modes.nextOmega;
  if (next < Number.POSITIVE_INFINITY) {
    const q = (ratioed ? to * to : lambda / least) / (next * next);
    if (!(q < 1)) return ENDLESS;
    const rest = 1 - q;
    const zeta = ratioed ? largestRatioAbove(member.damping, modes.modes.length) : 0;
    // ρ/ω² of a mode left out, at most
    const soft = h * (slope / (next * next) + (2 * zeta) / next);
    const part = !motion
      ? soft / (rest * rest)
      : ratioed
        ? squares / rest + (to * to * soft) / (rest * rest)
        : (h * slope) / (rest * rest);
    const source = Math.sqrt(modes.inputTail);
    u += (motion ? part / next : part) * source * Math.sqrt(modes.tails.flexibilityTail(output, next * next));
    p += (motion ? part : part * next) * source * Math.sqrt(modes.tails.fluxTail(output));
  }
  if (ratioed) return { displacement: u, flux: p };
  const turn = (beta * h) / least;
  return motion
    ? { displacement: u, flux: turn * middle.flux + most * p }
    : { displacement: (turn / least) * most * middle.displacement + u / least, flux: p };
}

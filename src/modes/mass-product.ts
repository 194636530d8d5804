import type { WaveMember } from '../members/wave-member.ts';
import { GAUSS_20 } from '../numerics/gauss-legendre.ts';
import { ENDS, evaluateShape, waveNumberSquare, type ModeShape } from './mode-shape.ts';

/** Mass inner product ∫ρ φ ψ + Σ M φ ψ of two shapes. Cost O(segments). */
export function massProduct(member: WaveMember, a: ModeShape, b: ModeShape): number {
  let product = member.nearFixed ? 0 : member.mass[0] * a.ends[0] * b.ends[0];
  for (let i = 0; i < member.segmentCount; i++) {
    if (member.inertia[i] > 0) product += member.inertia[i] * segmentProduct(member, i, a, b);
    if (i + 1 < member.segmentCount || !member.farFixed) {
      product += member.mass[i + 1] * a.ends[ENDS * i + 2] * b.ends[ENDS * i + 2];
    }
  }
  return product;
}

/**
 * ∫ φ ψ over segment i. Two travelling waves A sin(κx + φ₀) give
 * ½ A B l [cos(Δ at mid) sinc(Δκ l/2) − cos(Σ at mid) sinc(Σκ l/2)], which does not cancel for near
 * wave numbers; all else by 20-point Gauss panels of phase or decay at most 3.
 */
function segmentProduct(member: WaveMember, i: number, a: ModeShape, b: ModeShape): number {
  const l = member.length[i];
  const k = member.stiffness[i];
  const squareA = waveNumberSquare(member, i, a.lambda);
  const squareB = waveNumberSquare(member, i, b.lambda);
  const phaseA = Math.sqrt(Math.abs(squareA)) * l;
  const phaseB = Math.sqrt(Math.abs(squareB)) * l;
  if (squareA > 0 && squareB > 0 && phaseA > 1 && phaseB > 1) {
    const sineA = a.ends[ENDS * i];
    const cosineA = (a.ends[ENDS * i + 1] * l) / (k * phaseA);
    const sineB = b.ends[ENDS * i];
    const cosineB = (b.ends[ENDS * i + 1] * l) / (k * phaseB);
    const difference = 0.5 * (phaseA - phaseB);
    const sum = 0.5 * (phaseA + phaseB);
    // cos and sin of the phase differences and sums at the near end
    const dc = cosineA * cosineB + sineA * sineB;
    const ds = sineA * cosineB - cosineA * sineB;
    const sc = cosineA * cosineB - sineA * sineB;
    const ss = sineA * cosineB + cosineA * sineB;
    const midDifference = dc * Math.cos(difference) - ds * Math.sin(difference);
    const midSum = sc * Math.cos(sum) - ss * Math.sin(sum);
    const sincDifference = difference === 0 ? 1 : Math.sin(difference) / difference;
    return 0.5 * l * (midDifference * sincDifference - (midSum * Math.sin(sum)) / sum);
  }
  const panels = Math.ceil(Math.max(phaseA, phaseB) / 3) || 1;
  const outA = new Float64Array(2);
  const outB = new Float64Array(2);
  let total = 0;
  for (let panel = 0; panel < panels; panel++) {
    for (let q = 0; q < GAUSS_20.nodes.length; q++) {
      const x = ((panel + GAUSS_20.nodes[q]) * l) / panels;
      evaluateShape(member, a, i, x, outA);
      evaluateShape(member, b, i, x, outB);
      total += GAUSS_20.weights[q] * outA[0] * outB[0];
    }
  }
  return (total * l) / panels;
}

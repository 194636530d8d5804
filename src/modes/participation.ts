import type { WaveMember } from '../members/wave-member.ts';
import { cosine, meanSquare, meanSquareBetween, sinc } from '../numerics/wave-functions.ts';
import { totalMass } from '../spectrum/spectrum-size.ts';
import { ENDS, waveNumberSquare, type ModeShape } from './mode-shape.ts';
import { StaticResponse } from './static-response.ts';

/** Which ends move by one unit; uniform: every point does, no end being fixed. */
export type MovingEnds = 'near' | 'far' | 'both' | 'uniform';

/**
 * Inertia m(r, r) = ∫ρr² + ΣMr² of the static shape r of a unit motion of the ends, kg
 * (shaft: kg·m²). Moving ends are fixed ends and carry no mass here. Cost O(segments).
 */
export function movingInertia(member: WaveMember, ends: MovingEnds): number {
  if (ends === 'uniform') return totalMass(member);
  const response = new StaticResponse(member);
  const nodes = new Float64Array(member.segmentCount + 1);
  for (const end of ['near', 'far'] as const) {
    if (ends !== end && ends !== 'both') continue;
    response.endMotion(end).forEach((value, j) => (nodes[j] += value));
  }
  let inertia = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    const l = member.length[i];
    const a = Math.sqrt(member.foundation[i] / member.stiffness[i]) * l;
    inertia += member.inertia[i] * l * staticMeanSquare(nodes[i], nodes[i + 1], a);
    if (i + 1 < member.segmentCount || !member.farFixed) {
      inertia += member.mass[i + 1] * nodes[i + 1] * nodes[i + 1];
    }
  }
  if (!member.nearFixed) inertia += member.mass[0] * nodes[0] * nodes[0];
  return inertia;
}

function staticMeanSquare(first: number, second: number, a: number): number {
  if (a > 1) return meanSquareBetween(first, second, a);
  const c = cosine(-a * a);
  const s = sinc(-a * a);
  return meanSquare(first, (second - first * c) / s, -a * a, c, s);
}

/**
 * Participation factor m(r, φ_n), √kg (shaft: √(kg·m²)). For moving fixed ends it is the support flux
 * over ω²: Γ = p_n(0)/ω_n² at the near end, −p_n(L)/ω_n² at the far end; for uniform motion ∫ρφ + ΣMφ.
 */
export function participationFactor(member: WaveMember, shape: ModeShape, ends: MovingEnds): number {
  const last = ENDS * (member.segmentCount - 1);
  if (ends === 'uniform') return uniformFactor(member, shape);
  const near = ends === 'far' ? 0 : shape.ends[1];
  const far = ends === 'near' ? 0 : shape.ends[last + 3];
  return (near - far) / shape.lambda;
}

function uniformFactor(member: WaveMember, shape: ModeShape): number {
  const { ends, lambda } = shape;
  let factor = member.mass[0] * ends[0];
  for (let i = 0; i < member.segmentCount; i++) {
    const l = member.length[i];
    factor += member.mass[i + 1] * ends[ENDS * i + 2];
    if (member.inertia[i] === 0) continue;
    const k2 = waveNumberSquare(member, i, lambda);
    const square = k2 * l * l;
    if (Math.abs(square) > 1) {
      factor += (member.inertia[i] * (ends[ENDS * i + 1] - ends[ENDS * i + 3])) / (member.stiffness[i] * k2);
    } else {
      // mean of C and of ξ S over the stretch: sinc and (1 − cos a)/a²
      const half = sinc(square / 4);
      const mean =
        ends[ENDS * i] * sinc(square) + ((ends[ENDS * i + 1] * l) / member.stiffness[i]) * 0.5 * half * half;
      factor += member.inertia[i] * l * mean;
    }
  }
  return factor;
}

import type { WaveMember } from '../members/wave-member.ts';
import { cosine, meanSquare, meanSquareBetween, sinc } from '../numerics/wave-functions.ts';

/** Numbers held a segment: u and p at its near end, u and p at its far end. */
export const ENDS = 4;

/** From this decay κ l on, a segment's shape is held by its two end values, not by (u, p) at one end. */
export const STRONG_DECAY = 1;

/** A mode shape with unit modal mass. */
export interface ModeShape {
  /** ω², 1/s². */
  readonly lambda: number;
  /** φ and p = k φ′ at both ends of each segment, shape [segments × 4]: u near, p near, u far, p far. */
  readonly ends: Float64Array;
  /**
   * How far the two marched sides miss each other at the joint: the amplitude that the missing force
   * would drive in a mode living in the joining segment, relative to this one, |Δp|/(ω² √(ρ l)).
   */
  readonly mismatch: number;
}

/** κ² = (ω² ρ − s)/k of segment i, 1/m²; negative where the shape is evanescent. */
export function waveNumberSquare(member: WaveMember, i: number, lambda: number): number {
  return (lambda * member.inertia[i] - member.foundation[i]) / member.stiffness[i];
}

/** The rigid-body mode: φ = 1/√m, no flux. */
export function rigidShape(member: WaveMember, mass: number): ModeShape {
  const ends = new Float64Array(ENDS * member.segmentCount);
  const height = 1 / Math.sqrt(mass);
  for (let i = 0; i < member.segmentCount; i++) {
    ends[ENDS * i] = height;
    ends[ENDS * i + 2] = height;
  }
  return { lambda: 0, ends, mismatch: 0 };
}

/** ∫ρφ² + ΣMφ² of a shape, kg (shaft: kg·m²). Cost O(segments). */
export function modalMass(member: WaveMember, lambda: number, ends: Float64Array): number {
  let mass = member.nearFixed ? 0 : member.mass[0] * ends[0] * ends[0];
  for (let i = 0; i < member.segmentCount; i++) {
    const u = ends[ENDS * i + 2];
    if (member.inertia[i] > 0) {
      mass += member.inertia[i] * member.length[i] * segmentMeanSquare(member, i, lambda, ends);
    }
    if (i + 1 < member.segmentCount || !member.farFixed) mass += member.mass[i + 1] * u * u;
  }
  return mass;
}

/** (1/l)∫φ² over segment i. */
export function segmentMeanSquare(member: WaveMember, i: number, lambda: number, ends: Float64Array): number {
  const l = member.length[i];
  const square = waveNumberSquare(member, i, lambda) * l * l;
  const u = ends[ENDS * i];
  if (square < -STRONG_DECAY) return meanSquareBetween(u, ends[ENDS * i + 2], Math.sqrt(-square));
  const slope = (ends[ENDS * i + 1] * l) / member.stiffness[i];
  return meanSquare(u, slope, square, cosine(square), sinc(square));
}

/** (1/l)∫p² over segment i, for the strain energy ½ ∫p²/k. */
export function segmentMeanSquareFlux(
  member: WaveMember,
  i: number,
  lambda: number,
  ends: Float64Array,
): number {
  const l = member.length[i];
  const k2 = waveNumberSquare(member, i, lambda);
  const square = k2 * l * l;
  const p = ends[ENDS * i + 1];
  if (square < -STRONG_DECAY) return meanSquareBetween(p, ends[ENDS * i + 3], Math.sqrt(-square));
  const slope = -member.stiffness[i] * k2 * l * ends[ENDS * i];
  return meanSquare(p, slope, square, cosine(square), sinc(square));
}

/**
 * Displacement and flux of a shape at a distance from the near end of segment i, into `out`
 * (φ in 1/√kg, p in N/√kg). Held by both end values where the shape is strongly evanescent.
 */
export function evaluateShape(
  member: WaveMember,
  shape: ModeShape,
  i: number,
  distance: number,
  out: Float64Array,
): void {
  const { ends } = shape;
  const at = ENDS * i;
  const k = member.stiffness[i];
  const l = member.length[i];
  const k2 = waveNumberSquare(member, i, shape.lambda);
  const u = ends[at];
  const p = ends[at + 1];
  const square = k2 * l * l;
  if (square < -STRONG_DECAY) {
    const kappa = Math.sqrt(-k2);
    const rest = Math.exp(-2 * kappa * l);
    const nearer = Math.exp(-kappa * distance) / (1 - rest);
    const farther = Math.exp(-kappa * (l - distance)) / (1 - rest);
    const fade = Math.exp(-2 * kappa * (l - distance));
    const grow = Math.exp(-2 * kappa * distance);
    const far = ends[at + 2];
    out[0] = u * nearer * (1 - fade) + far * farther * (1 - grow);
    out[1] = k * kappa * (far * farther * (1 + grow) - u * nearer * (1 + fade));
    return;
  }
  const local = k2 * distance * distance;
  const c = cosine(local);
  const s = sinc(local) * distance;
  out[0] = u * c + (p / k) * s;
  out[1] = p * c - k * k2 * u * s;
}

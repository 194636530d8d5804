import type { WaveMember } from '../members/wave-member.ts';
import {
  ENDS,
  segmentMeanSquare,
  segmentMeanSquareFlux,
  waveNumberSquare,
  type ModeShape,
} from './mode-shape.ts';

/** How the strain energy of a mode is shared; sums to 1. */
export interface StrainShares {
  /** Per segment of the wave member, foundation included, shape [segments]. */
  readonly segments: Float64Array;
  /** Per node spring, shape [segments + 1]. */
  readonly nodes: Float64Array;
}

/** Strain energy ½∫p²/k + ½∫sφ² + ½ΣKφ² of an elastic mode, shared out. Cost O(segments). */
export function strainShares(member: WaveMember, shape: ModeShape): StrainShares {
  const n = member.segmentCount;
  const segments = new Float64Array(n);
  const nodes = new Float64Array(n + 1);
  let total = 0;
  for (let i = 0; i < n; i++) {
    const l = member.length[i];
    segments[i] =
      (l / member.stiffness[i]) * segmentMeanSquareFlux(member, i, shape.lambda, shape.ends) +
      (member.foundation[i] > 0
        ? member.foundation[i] * l * segmentMeanSquare(member, i, shape.lambda, shape.ends)
        : 0);
    total += segments[i];
  }
  for (let j = 0; j <= n; j++) {
    const u = nodeDisplacement(shape, j);
    nodes[j] = member.spring[j] * u * u;
    total += nodes[j];
  }
  for (let i = 0; i < n; i++) segments[i] /= total;
  for (let j = 0; j <= n; j++) nodes[j] /= total;
  return { segments, nodes };
}

/** φ at node j. */
export function nodeDisplacement(shape: ModeShape, j: number): number {
  return j === 0 ? shape.ends[0] : shape.ends[ENDS * (j - 1) + 2];
}

/** Largest |φ| over the member: segment ends and the crests of travelling waves. Cost O(segments). */
export function peakDisplacement(member: WaveMember, shape: ModeShape): number {
  let peak = Math.abs(shape.ends[0]);
  for (let i = 0; i < member.segmentCount; i++) {
    const k2 = waveNumberSquare(member, i, shape.lambda);
    const u = shape.ends[ENDS * i];
    const p = shape.ends[ENDS * i + 1];
    const pFar = shape.ends[ENDS * i + 3];
    peak = Math.max(peak, Math.abs(shape.ends[ENDS * i + 2]));
    if (k2 > 0 && (p * pFar <= 0 || Math.sqrt(k2) * member.length[i] > Math.PI)) {
      peak = Math.max(peak, Math.hypot(u, p / (member.stiffness[i] * Math.sqrt(k2))));
    }
  }
  return peak;
}

/** Largest |p| of a segment's flux, N. */
export function segmentPeakFlux(member: WaveMember, shape: ModeShape, i: number): number {
  const u = shape.ends[ENDS * i];
  const p = shape.ends[ENDS * i + 1];
  const peak = Math.max(Math.abs(p), Math.abs(shape.ends[ENDS * i + 3]));
  const k2 = waveNumberSquare(member, i, shape.lambda);
  const crosses = u * shape.ends[ENDS * i + 2] <= 0 || Math.sqrt(k2) * member.length[i] > Math.PI;
  if (k2 <= 0 || !crosses) return peak;
  return Math.max(peak, Math.hypot(member.stiffness[i] * Math.sqrt(k2) * u, p));
}

/** Largest |p| of a shape over the member. Cost O(segments). */
export function peakFlux(member: WaveMember, shape: ModeShape): number {
  let peak = 0;
  for (let i = 0; i < member.segmentCount; i++) peak = Math.max(peak, segmentPeakFlux(member, shape, i));
  return peak;
}

/** Largest |φ′| of a shape over the member. Cost O(segments). */
export function peakSlope(member: WaveMember, shape: ModeShape): number {
  let peak = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    peak = Math.max(peak, segmentPeakFlux(member, shape, i) / member.stiffness[i]);
  }
  return peak;
}

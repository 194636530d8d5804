import type { WaveMember } from '../members/wave-member.ts';
import type { Stations } from '../modes/stations.ts';
import type { TailFlexibility } from './tail-flexibility.ts';

/** Largest tail flexibility and flux inertia over the whole member, ends and all stations between. */
export interface MemberTail {
  /** Bound on ΔG anywhere, m/N. */
  readonly flexibility: number;
  /** Bound on ΔH anywhere, kg. */
  readonly fluxInertia: number;
}

/** Control stations: both ends of each segment and places between. */
export function controlStations(member: WaveMember, between = 3): Stations {
  const per = between + 2;
  const count = per * member.segmentCount;
  const position = new Float64Array(count);
  const segment = new Int32Array(count);
  const distance = new Float64Array(count);
  for (let i = 0, q = 0; i < member.segmentCount; i++) {
    for (let m = 0; m < per; m++, q++) {
      // uneven fractions, so that no low mode is met at its nodes only
      const fraction = m === 0 ? 0 : m === per - 1 ? 1 : (m - 0.11 * (m % 2)) / (per - 1);
      segment[q] = i;
      distance[q] = fraction === 1 ? member.length[i] : fraction * member.length[i];
      position[q] = member.position[i] + distance[q];
    }
  }
  return { position, segment, distance };
}

/**
 * Suprema of the tails over the member from their values at control stations
 * ({@link controlStations} with the same `between`).
 *
 * Within a segment where every later mode travels, k(ω²ρ − s) φ² + p² is constant, so for any x* in it
 *   ΔG ≤ ΔG(x*) + ΔH(x*)/(Z² (1 − s/(ρ ω_{N+1}²))),   ΔH ≤ ΔH(x*) + Z² ΔG(x*),   Z² = kρ;
 * everywhere, with g the distance of neighbouring stations and κ_s = √(s/k),
 *   √ΔG ≤ max of both + √(tanh(κ_s g/2)/(2√(ks)))   (√(g/4k) without bedding),
 * a displacement being the static interpolation of both, which is no larger, and a part held at both;
 * |√ΔH(x) − √ΔH(y)| ≤ √∫ρ + √(∫s²/ρ)/ω_{N+1}², or without inertia s |x − y| √ΔG/ω_{N+1}.
 * The smaller of the two. Cost: O(stations).
 */
export function memberTail(
  member: WaveMember,
  tails: TailFlexibility,
  nextLambda: number,
  between = 3,
): MemberTail {
  const per = between + 2;
  let flexibility = 0;
  let fluxInertia = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    const k = member.stiffness[i];
    const rho = member.inertia[i];
    const s = member.foundation[i];
    let peakG = 0;
    let peakH = 0;
    let joinedG = Number.POSITIVE_INFINITY;
    let joinedH = Number.POSITIVE_INFINITY;
    const travelling = rho > 0 ? 1 - s / (rho * nextLambda) : 0;
    for (let q = per * i; q < per * (i + 1); q++) {
      const g = tails.flexibilityTail(q, nextLambda);
      const h = tails.fluxTail(q);
      peakG = Math.max(peakG, g);
      peakH = Math.max(peakH, h);
      if (travelling > 0) {
        joinedG = Math.min(joinedG, g + h / (k * rho * travelling));
        joinedH = Math.min(joinedH, h + k * rho * g);
      }
    }
    if (rho === 0) {
      // between the ends the shapes are static: ΔG ≤ the larger end; the flux is constant without bedding
      const ends = Math.max(
        tails.flexibilityTail(per * i, nextLambda),
        tails.flexibilityTail(per * (i + 1) - 1, nextLambda),
      );
      flexibility = Math.max(flexibility, ends);
      const drift = s * member.length[i] * Math.sqrt(ends / nextLambda);
      fluxInertia = Math.max(fluxInertia, (Math.sqrt(peakH) + drift) ** 2);
      continue;
    }
    // between neighbouring stations: the larger of the two and what is flexible with both held
    const gap = (1.11 * member.length[i]) / (between + 1);
    const bedding = Math.sqrt(s / k);
    const held =
      s > 0
        ? Math.sqrt(Math.tanh(0.5 * bedding * gap) / (2 * Math.sqrt(k * s)))
        : Math.sqrt((0.25 * gap) / k);
    const nearG = (Math.sqrt(peakG) + held) ** 2;
    const half = 0.5 * gap;
    const nearH =
      (Math.sqrt(peakH) + Math.sqrt(half * rho) + Math.sqrt((half * s * s) / rho) / nextLambda) ** 2;
    flexibility = Math.max(flexibility, Math.min(nearG, joinedG));
    fluxInertia = Math.max(fluxInertia, Math.min(nearH, joinedH));
  }
  return { flexibility, fluxInertia };
}

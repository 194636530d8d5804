import type { WaveMember } from '../members/wave-member.ts';

/** Time for a wave to pass the member, s: Σ l √(ρ/k). */
export function travelTime(member: WaveMember): number {
  let time = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    time += member.length[i] * Math.sqrt(member.inertia[i] / member.stiffness[i]);
  }
  return time;
}

/** Whether nothing ties the member to the ground, so that it has a rigid-body mode (ω = 0). */
export function canDriftFreely(member: WaveMember): boolean {
  return (
    !member.nearFixed &&
    !member.farFixed &&
    member.spring.every((spring) => spring === 0) &&
    member.foundation.every((foundation) => foundation === 0)
  );
}

/** Number of modes: infinite with distributed inertia, else the number of lumps that can move. */
export function modeCount(member: WaveMember): number {
  if (member.inertia.some((inertia) => inertia > 0)) return Number.POSITIVE_INFINITY;
  return member.mass.filter((mass) => mass > 0).length;
}

/** Total inertia that can move, kg (shaft: kg·m²). */
export function totalMass(member: WaveMember): number {
  let mass = 0;
  for (let i = 0; i < member.segmentCount; i++) mass += member.inertia[i] * member.length[i];
  for (let i = 0; i <= member.segmentCount; i++) mass += member.mass[i];
  return mass;
}

/**
 * A first trial for the lowest elastic frequency, rad/s > 0: √(restraint/mass) of the member taken
 * as one spring and one mass, or the first half wave where that is lower. Only a starting point.
 */
export function firstFrequencyEstimate(member: WaveMember): number {
  let flexibility = 0;
  let restraint = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    flexibility += member.length[i] / member.stiffness[i];
    restraint += member.foundation[i] * member.length[i];
  }
  for (let i = 0; i <= member.segmentCount; i++) restraint += member.spring[i];
  const time = travelTime(member);
  const elastic = 1 / Math.sqrt(flexibility * totalMass(member));
  if (member.nearFixed || member.farFixed || restraint === 0) {
    return time > 0 ? Math.min(Math.PI / time, Math.PI * elastic) : elastic;
  }
  return Math.min(Math.sqrt(restraint / totalMass(member)), Math.PI * elastic);
}

import type { Member } from '../spec/types.ts';
import type { SegmentProperties } from './segment-properties.ts';
import type { ModalDamping } from './wave-member.ts';

/**
 * The drag coefficient α = d/ρ in 1/s where drag is modal damping, else null.
 *
 * Drag leaves the modes uncoupled where it is the same multiple of the inertia in every segment
 * that has inertia and no node carries a mass; a mass without a dashpot C = αM of its own couples
 * them. The multiples may differ by rounding of decimal input (1e-12 relative).
 */
export function modalDrag(segments: readonly SegmentProperties[], nodeMass: boolean): number | null {
  let alpha: number | null = null;
  for (const { drag, inertia } of segments) {
    if (inertia === 0) {
      if (drag > 0) return null;
      continue;
    }
    const multiple = drag / inertia;
    alpha ??= multiple;
    if (Math.abs(multiple - alpha) > 1e-12 * alpha) return null;
  }
  return alpha !== null && alpha > 0 && nodeMass ? null : (alpha ?? 0);
}

/**
 * The damping of every mode: what the member states, plus modal drag, which is damping
 * proportional to mass.
 *
 * @param member no dashpots; a loss factor is no part of modal damping
 * @param dragCoefficient α of modal drag in 1/s
 */
export function modalDamping(member: Member, dragCoefficient: number): ModalDamping {
  const damping = member.damping;
  const none = { ratios: [], massCoefficient: dragCoefficient, stiffnessCoefficient: 0 };
  switch (damping?.type) {
    case 'ratio':
      return { ...none, ratios: [damping.value] };
    case 'ratios':
      return { ...none, ratios: damping.values };
    case 'rayleigh':
      return {
        ratios: [],
        massCoefficient: damping.massCoefficient + dragCoefficient,
        stiffnessCoefficient: damping.stiffnessCoefficient,
      };
    case 'loss-factor':
    case undefined:
      return none;
  }
}

/** Loss factor η of a member: its stiffness, foundation and springs are (1 + iη) times their values; 0 without one. */
export function lossFactor({ damping }: Member): number {
  return damping?.type === 'loss-factor' ? damping.value : 0;
}

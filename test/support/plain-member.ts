/**
 * A member as the oracles see it: uniform segments and the lumps at the nodes between them.
 * Written from the equation ρ u_tt = (k u_x)_x − s u alone; shares nothing with src.
 */
export interface PlainMember {
  readonly segments: readonly PlainSegment[];
  /** Mass at nodes 0 … n; 0 at fixed ends. */
  readonly masses: readonly number[];
  /** Spring to ground at nodes 0 … n; 0 at fixed ends. */
  readonly springs: readonly number[];
  readonly nearFixed: boolean;
  readonly farFixed: boolean;
}

export interface PlainSegment {
  readonly length: number;
  readonly stiffness: number;
  readonly inertia: number;
  readonly foundation: number;
}

/** Positions of nodes 0 … n. */
export function nodePositions(member: PlainMember): number[] {
  const positions = [0];
  for (const segment of member.segments) positions.push(positions[positions.length - 1] + segment.length);
  return positions;
}

export function lengthOf(member: PlainMember): number {
  return nodePositions(member)[member.segments.length];
}

/** Mass that can move, lumps included. */
export function totalMass(member: PlainMember): number {
  const spread = member.segments.reduce((sum, segment) => sum + segment.inertia * segment.length, 0);
  return member.masses.reduce((sum, mass) => sum + mass, spread);
}

/** Travel time ∫ √(ρ/k) dx. */
export function travelTime(member: PlainMember): number {
  return member.segments.reduce(
    (sum, segment) => sum + segment.length * Math.sqrt(segment.inertia / segment.stiffness),
    0,
  );
}

export function isRestrained(member: PlainMember): boolean {
  return (
    member.nearFixed ||
    member.farFixed ||
    member.springs.some((spring) => spring > 0) ||
    member.segments.some((segment) => segment.foundation > 0)
  );
}

/** Index of the segment that holds x, the left one at a node (the right one for x = 0). */
export function segmentAt(member: PlainMember, x: number): number {
  const positions = nodePositions(member);
  let index = 0;
  while (index < member.segments.length - 1 && x > positions[index + 1]) index++;
  return index;
}

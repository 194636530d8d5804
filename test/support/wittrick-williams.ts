import type { PlainMember } from './plain-member.ts';

/**
 * Bounds of the number of frequencies below ω without any solving: with every node held each segment has
 * floor(κL/π) of them, κ² = (ω²ρ − s)/k, and releasing a node adds at most one (Courant's minimax).
 */
export function countWithNodesHeld(member: PlainMember, omega: number): { held: number; free: number } {
  let held = 0;
  for (const { length, stiffness, inertia, foundation } of member.segments) {
    const square = (omega * omega * inertia - foundation) / stiffness;
    if (square > 0) held += Math.floor((Math.sqrt(square) * length) / Math.PI);
  }
  const nodes = member.segments.length + 1 - (member.nearFixed ? 1 : 0) - (member.farFixed ? 1 : 0);
  return { held, free: nodes };
}

/**
 * Number of natural frequencies below ω, in plain double.
 *
 * Wittrick & Williams, Q. J. Mech. Appl. Math. 24 (1971) 263-284: the count with all nodes held plus the
 * negative pivots of the dynamic stiffness matrix, here tridiagonal. Loses digits where ω is next to a
 * frequency of a segment with both ends held, so use it on members whose segments differ.
 */
export function countBelow(member: PlainMember, omega: number): number {
  const lambda = omega * omega;
  const last = member.segments.length;
  const diagonal = member.masses.map((mass, i) => member.springs[i] - lambda * mass);
  const off: number[] = [];
  let count = countWithNodesHeld(member, omega).held;
  member.segments.forEach(({ length, stiffness, inertia, foundation }, i) => {
    const square = (lambda * inertia - foundation) / stiffness;
    const kappa = Math.sqrt(Math.abs(square));
    const own =
      square === 0
        ? stiffness / length
        : square > 0
          ? (stiffness * kappa) / Math.tan(kappa * length)
          : (stiffness * kappa) / Math.tanh(kappa * length);
    const cross =
      square === 0
        ? -stiffness / length
        : square > 0
          ? (-stiffness * kappa) / Math.sin(kappa * length)
          : (-stiffness * kappa) / Math.sinh(kappa * length);
    diagonal[i] += own;
    diagonal[i + 1] += own;
    off.push(cross);
  });
  let pivot = NaN;
  for (let i = member.nearFixed ? 1 : 0; i <= (member.farFixed ? last - 1 : last); i++) {
    pivot = diagonal[i] - (Number.isNaN(pivot) ? 0 : off[i - 1] ** 2 / pivot);
    if (pivot < 0) count++;
  }
  return count;
}

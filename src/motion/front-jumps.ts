import type { WaveMember } from '../members/wave-member.ts';
import { placeStation } from '../modes/stations.ts';
import type { AppliedLoad } from './applied-loads.ts';
import type { InitialState } from './initial-state.ts';
import { pieceSlope, pieceValue, type PiecewiseField } from './piecewise-field.ts';

/** A front that starts to travel: the force jumps by Z times the jump of the velocity as it passes. */
export interface FrontJump {
  /** Where it starts, m. */
  readonly at: number;
  /** Z Δv, N (shaft: N·m). */
  readonly force: number;
}

/** Jumps below this share of the largest are rounding. */
const NOTHING = 1e-9;

/**
 * The fronts that are known to start in a motion, Z = √(kρ) (d'Alembert's solution of the wave equation):
 *
 * - where the initial velocity jumps by Δg, the force jumps by Z₁Z₂/(Z₁ + Z₂) Δg; beside a mass that
 *   moves with a velocity of its own, and at a fixed end, by Z Δg;
 * - where a force F is let go of at t = 0 or the initial slope jumps, by Z_i/(Z₁ + Z₂) F on side i;
 * - where a support's velocity jumps by Δv, by Z Δv at that end.
 *
 * At a place without inertia on one side, and at a mass that moves with its surroundings, none starts.
 * Cost: O(pieces + kicks).
 *
 * @param span latest time, s
 * @returns in ascending position, the largest one of each place
 */
export function frontJumps(
  member: WaveMember,
  state: InitialState,
  loads: readonly AppliedLoad[],
  span: number,
): FrontJump[] {
  const found = new Map<number, number>();
  const add = (at: number, force: number): void => {
    found.set(at, Math.max(found.get(at) ?? 0, Math.abs(force)));
  };
  const n = member.segmentCount;
  velocityFronts(member, state, add);
  slopeFronts(member, state.displacement.pieces, add);
  for (const pull of state.displacement.pulls) {
    const at = member.position[pull.segment] + pull.distance;
    const { i, d } = placeStation(member, at);
    const node = d >= member.length[i] ? i + 1 : d <= 0 ? i : -1;
    if (node >= 0 && member.mass[node] > 0) continue;
    add(at, largestShare(member, i, node < 0 ? i : i + 1) * pull.force);
  }
  for (const load of loads) {
    if (load.support === null) continue;
    const { pieces } = load.support.shape;
    const kick = load.kicks(span).reduce((most, { amount }) => Math.max(most, Math.abs(amount)), 0);
    const near = Math.abs(pieceValue(pieces[0], 0).value);
    const far = Math.abs(pieceValue(pieces[pieces.length - 1], pieces[pieces.length - 1].length).value);
    if (member.nearFixed) add(0, kick * near * impedance(member, 0));
    if (member.farFixed) add(member.position[n], kick * far * impedance(member, n - 1));
  }
  const largest = Math.max(0, ...found.values());
  return [...found]
    .filter(([, force]) => force > NOTHING * largest)
    .map(([at, force]) => ({ at, force }))
    .toSorted((a, b) => a.at - b.at);
}

/** Z of a segment, kg/s; 0 without inertia and beyond the ends. */
function impedance(member: WaveMember, segment: number): number {
  if (segment < 0 || segment >= member.segmentCount) return 0;
  return Math.sqrt(member.stiffness[segment] * member.inertia[segment]);
}

/** The larger share of a jump of the force that goes to one of two sides; 0 where no side has inertia. */
function largestShare(member: WaveMember, left: number, right: number): number {
  const [one, other] = [impedance(member, left), impedance(member, right)];
  return one + other > 0 ? Math.max(one, other) / (one + other) : 0;
}

type Add = (at: number, force: number) => void;

function velocityFronts(member: WaveMember, { velocity }: InitialState, add: Add): void {
  const n = member.segmentCount;
  const before: (number | null)[] = Array.from({ length: n + 1 }, () => null);
  const after: (number | null)[] = Array.from({ length: n + 1 }, () => null);
  let left: { segment: number; value: number } | null = null;
  for (const piece of velocity.pieces) {
    const { segment } = piece;
    const near = pieceValue(piece, 0).value;
    if (piece.start === 0) after[segment] = near;
    else if (left !== null && left.segment === segment) {
      add(member.position[segment] + piece.start, 0.5 * impedance(member, segment) * (near - left.value));
    }
    left = { segment, value: pieceValue(piece, piece.length).value };
    before[segment + 1] = left.value;
  }
  for (let j = 0; j <= n; j++) {
    const [one, other] = [impedance(member, j - 1), impedance(member, j)];
    const held = (j === 0 && member.nearFixed) || (j === n && member.farFixed);
    const own = held ? 0 : member.mass[j] > 0 ? velocity.masses[j] : null;
    if (own !== null) {
      if (before[j] !== null) add(member.position[j], one * (own - before[j]!));
      if (after[j] !== null) add(member.position[j], other * (own - after[j]!));
    } else if (before[j] !== null && after[j] !== null && one + other > 0) {
      add(member.position[j], ((one * other) / (one + other)) * (after[j]! - before[j]!));
    }
  }
}

function slopeFronts(member: WaveMember, pieces: PiecewiseField, add: Add): void {
  let left: { segment: number; flux: number } | null = null;
  for (const piece of pieces) {
    const { segment } = piece;
    const k = member.stiffness[segment];
    const flux = k * pieceSlope(piece, 0).value;
    const node = piece.start === 0 ? segment : -1;
    const at = member.position[segment] + piece.start;
    if (left === null) {
      if (!member.nearFixed && member.mass[0] === 0 && member.spring[0] === 0 && member.inertia[0] > 0)
        add(at, flux);
    } else if (node < 0) add(at, 0.5 * (flux - left.flux));
    else if (member.mass[node] === 0 && member.spring[node] === 0) {
      add(at, largestShare(member, left.segment, segment) * (flux - left.flux));
    }
    left = { segment, flux: k * pieceSlope(piece, piece.length).value };
  }
  const n = member.segmentCount;
  if (
    left !== null &&
    !member.farFixed &&
    member.mass[n] === 0 &&
    member.spring[n] === 0 &&
    member.inertia[n - 1] > 0
  ) {
    add(member.position[n], left.flux);
  }
}

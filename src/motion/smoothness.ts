import type { WaveMember } from '../members/wave-member.ts';
import { placeStation } from '../modes/stations.ts';
import type { MasslessStretch } from '../modes/massless-stretches.ts';
import { settlePieces, type HeldForce } from './initial-displacement.ts';
import { pieceSlope, pieceValue, type Piece, type PiecewiseField } from './piecewise-field.ts';

/** A field with a value of its own for each node mass, shape [segments + 1]. */
export interface MassField {
  readonly pieces: PiecewiseField;
  readonly masses: Float64Array;
}

/** An acceleration with the rounding of its node values, shape [segments + 1]. */
export interface AccelerationField extends MassField {
  readonly errors: Float64Array;
}

/** Units of rounding, times the terms summed, within which two values count as equal. */
const EQUAL = 1024 * Number.EPSILON;
/** Rounding of a flux against the terms it is summed from. */
const ROUNDING = 8 * Number.EPSILON;

/**
 * The field as a member can keep it if it has finite strain energy: continuous, 0 at fixed ends, all
 * masses moving with it; massless stretches follow statically. Null when it has not.
 */
export function inEnergySpace(
  member: WaveMember,
  field: MassField,
  stretches: readonly MasslessStretch[],
): PiecewiseField | null {
  const n = member.segmentCount;
  const value = new Float64Array(n + 1).fill(Number.NaN);
  const scale = new Float64Array(n + 1);
  let previous: Piece | null = null;
  const meet = (node: number, sample: { value: number; scale: number }): boolean => {
    if (Number.isNaN(value[node])) {
      value[node] = sample.value;
      scale[node] = sample.scale;
      return true;
    }
    return Math.abs(value[node] - sample.value) <= EQUAL * (scale[node] + sample.scale);
  };
  if (member.nearFixed) value[0] = 0;
  if (member.farFixed) value[n] = 0;
  for (let j = 0; j <= n; j++) {
    if (member.mass[j] > 0) {
      value[j] = field.masses[j];
      scale[j] = Math.abs(field.masses[j]);
    }
  }
  for (const piece of field.pieces) {
    if (member.inertia[piece.segment] === 0) continue;
    const near = pieceValue(piece, 0);
    if (piece.start === 0) {
      if (!meet(piece.segment, near)) return null;
    } else if (previous !== null) {
      const before = pieceValue(previous, previous.length);
      if (Math.abs(before.value - near.value) > EQUAL * (before.scale + near.scale)) return null;
    }
    previous = piece;
    if (endsSegment(member, piece) && !meet(piece.segment + 1, pieceValue(piece, piece.length))) return null;
  }
  for (let j = 0; j <= n; j++) if (Number.isNaN(value[j])) value[j] = 0;
  return settlePieces(member, field.pieces, value, stretches);
}

/**
 * The acceleration ((k f′)′ − s f)/ρ, ([k f′] − K f − F)/M at masses, that a settled displacement
 * gives at t = 0 if it lies in the domain of the wave operator: no kink but at masses, flux at
 * massless nodes equal to the spring force, end conditions met, no force held off the masses.
 * Null when it does not.
 */
export function acceleration(
  member: WaveMember,
  pieces: PiecewiseField,
  pulls: readonly HeldForce[],
): AccelerationField | null {
  const n = member.segmentCount;
  const flux = new Float64Array(n + 1);
  const scale = new Float64Array(n + 1);
  // a massless stretch has its flux from the difference of its node values, which may be small beside them
  const differenced = new Float64Array(n + 1);
  const value = new Float64Array(n + 1);
  let previous: Piece | null = null;
  for (const piece of pieces) {
    const k = member.stiffness[piece.segment];
    const near = pieceSlope(piece, 0);
    const far = pieceSlope(piece, piece.length);
    if (piece.start === 0) {
      flux[piece.segment] += k * near.value;
      scale[piece.segment] += k * near.scale;
      value[piece.segment] = pieceValue(piece, 0).value;
      if (member.inertia[piece.segment] === 0) {
        const held =
          (k * (pieceValue(piece, 0).scale + pieceValue(piece, piece.length).scale)) / piece.length;
        differenced[piece.segment] += held;
        differenced[piece.segment + 1] += held;
      }
    } else if (previous !== null) {
      const before = pieceSlope(previous, previous.length);
      if (Math.abs(before.value - near.value) > EQUAL * (before.scale + near.scale)) return null;
    }
    if (endsSegment(member, piece)) {
      flux[piece.segment + 1] -= k * far.value;
      scale[piece.segment + 1] += k * far.scale;
      value[piece.segment + 1] = pieceValue(piece, piece.length).value;
    }
    previous = piece;
  }
  for (const pull of pulls) {
    if (pull.force === 0) continue;
    const node = nodeOf(member, pull);
    if (node < 0) return null;
    flux[node] -= pull.force;
    scale[node] += Math.abs(pull.force);
  }
  const masses = new Float64Array(n + 1);
  const errors = new Float64Array(n + 1);
  for (let j = 0; j <= n; j++) {
    if ((j === 0 && member.nearFixed) || (j === n && member.farFixed)) continue;
    const rest = flux[j] - member.spring[j] * value[j];
    if (member.mass[j] > 0) {
      masses[j] = rest / member.mass[j];
      const terms = scale[j] + differenced[j] + Math.abs(member.spring[j] * value[j]);
      errors[j] = (ROUNDING * terms) / member.mass[j];
    } else if (Math.abs(rest) > EQUAL * (scale[j] + Math.abs(member.spring[j] * value[j]))) return null;
  }
  return { pieces: pieces.map((piece) => accelerated(member, piece)), masses, errors };
}

function accelerated(member: WaveMember, piece: Piece): Piece {
  const rho = member.inertia[piece.segment];
  if (rho === 0) return { ...piece, powers: [], waves: [], magnitude: 0 };
  const k = member.stiffness[piece.segment];
  const s = member.foundation[piece.segment];
  const h2 = piece.length * piece.length;
  const powers = piece.powers.map((c, j) => {
    const second = (piece.powers[j + 2] ?? 0) * (j + 1) * (j + 2);
    return ((k / h2) * second - s * c) / rho;
  });
  const waves = piece.waves.map((term) => {
    const factor = -(k * term.square + s) / rho;
    return {
      square: term.square,
      value: factor * term.value,
      slope: factor * term.slope,
      farValue: factor * term.farValue,
    };
  });
  const degree = piece.powers.length - 1;
  const magnitude = (piece.magnitude * ((k / h2) * Math.max(0, degree * (degree - 1)) + s)) / rho;
  return { ...piece, powers, waves, magnitude };
}

function endsSegment(member: WaveMember, piece: Piece): boolean {
  return piece.start + piece.length >= member.length[piece.segment] * (1 - 1e-12);
}

function nodeOf(member: WaveMember, pull: HeldForce): number {
  if (pull.distance === 0) return pull.segment;
  const { i, d } = placeStation(member, member.position[pull.segment] + pull.distance);
  return d >= member.length[i] ? i + 1 : -1;
}

import type { WaveMember } from '../members/wave-member.ts';
import type { StaticResponse } from '../modes/static-response.ts';
import type { InitialDisplacement } from './initial-displacement.ts';
import {
  pieceSlope,
  piecePhase,
  pieceValue,
  type Piece,
  type PiecewiseField,
  type Sampled,
} from './piecewise-field.ts';
import { gauss } from './wave-integrals.ts';

/**
 * Strain form a(f, f) = ∫k f′² + ∫s f² + ΣK f² of an initial displacement, twice its energy, J.
 *
 * For the static shape w of a force F at z, a(w, f) = F f(z) whatever f is, so held forces need no
 * integral: a(f,f) = ΣΣ F_i F_j G(z_i, z_j) + 2 Σ F_i r(z_i) + a(r, r), r the given pieces.
 * Cost: O(pieces) Gauss panels, O(pulls²).
 */
export function strainForm(
  member: WaveMember,
  field: InitialDisplacement,
  response: StaticResponse | null,
): number {
  let form = piecesStrainForm(member, field.pieces);
  if (response === null) return form;
  for (const pull of field.pulls) {
    form += 2 * pull.force * valueAt(field.pieces, pull.segment, pull.distance);
    for (const other of field.pulls) {
      form +=
        pull.force *
        other.force *
        response.mutualFlexibility(pull.segment, pull.distance, other.segment, other.distance);
    }
  }
  return form;
}

/** Bound on the rounding of {@link strainForm}: products of pulls to 64·2⁻⁵², pieces to their terms. */
export function strainFormRounding(
  member: WaveMember,
  field: InitialDisplacement,
  response: StaticResponse | null,
): number {
  const rounding = strainRounding(member, field.pieces);
  if (response === null || field.pulls.length === 0) return rounding;
  let scale = 0;
  for (const pull of field.pulls) {
    const force = Math.abs(pull.force);
    scale += 2 * force * scaleAt(field.pieces, pull.segment, pull.distance);
    const sag = response.flexibility(pull.segment, pull.distance);
    // |G(z, y)| ≤ √G(z, z) √G(y, y): the sum of all products is at most the square of a sum
    scale += field.pulls.length * force * force * sag;
  }
  return rounding + 64 * Number.EPSILON * scale;
}

/** a(r, r) of pieces alone. */
export function piecesStrainForm(member: WaveMember, pieces: PiecewiseField): number {
  let form = 0;
  for (const piece of pieces) {
    const k = member.stiffness[piece.segment];
    const s = member.foundation[piece.segment];
    form += gauss(piece.length, squaredPhase(piece), (xi) => {
      const slope = pieceSlope(piece, xi).value;
      const value = s > 0 ? pieceValue(piece, xi).value : 0;
      return k * slope * slope + s * value * value;
    });
    const end = member.spring[piece.segment + 1];
    if (end > 0 && piece.start + piece.length >= member.length[piece.segment] * (1 - 1e-12)) {
      const value = pieceValue(piece, piece.length).value;
      form += end * value * value;
    }
  }
  const first = pieceValue(pieces[0], 0).value;
  return form + member.spring[0] * first * first;
}

/** Mass form m(g, g) = ∫ρ g² + ΣM v² of a density and its node values, twice the kinetic energy, J. */
export function massForm(member: WaveMember, pieces: PiecewiseField, masses: Float64Array): number {
  let form = 0;
  for (const piece of pieces) {
    const rho = member.inertia[piece.segment];
    if (rho === 0) continue;
    form += rho * gauss(piece.length, squaredPhase(piece), (xi) => pieceValue(piece, xi).value ** 2);
  }
  for (let j = 0; j <= member.segmentCount; j++) form += member.mass[j] * masses[j] * masses[j];
  return form;
}

/** Phase of a squared piece; a square of degree above 39 takes two panels of the 20-point rule. */
function squaredPhase(piece: Piece): number {
  return 2 * piecePhase(piece) + (piece.powers.length > 19 ? 4 : 0);
}

/**
 * Bound on the rounding of {@link piecesStrainForm}: the pieces are known to 8·2⁻⁵² of their terms.
 */
export function strainRounding(member: WaveMember, pieces: PiecewiseField): number {
  let rounding = 0;
  for (const piece of pieces) {
    const k = member.stiffness[piece.segment];
    const s = member.foundation[piece.segment];
    rounding += gauss(piece.length, squaredPhase(piece), (xi) => {
      const slope = pieceSlope(piece, xi);
      const value = pieceValue(piece, xi);
      return k * errorOfSquare(slope) + s * errorOfSquare(value);
    });
  }
  return rounding;
}

/** Bound on the rounding of {@link massForm}. */
export function massRounding(member: WaveMember, pieces: PiecewiseField): number {
  let rounding = 0;
  for (const piece of pieces) {
    const rho = member.inertia[piece.segment];
    if (rho === 0) continue;
    rounding += rho * gauss(piece.length, squaredPhase(piece), (xi) => errorOfSquare(pieceValue(piece, xi)));
  }
  return rounding;
}

function errorOfSquare({ value, scale }: Sampled): number {
  const error = 8 * Number.EPSILON * scale;
  return error * (2 * Math.abs(value) + error);
}

/** Value of a field at a distance in a segment. */
export function valueAt(pieces: PiecewiseField, segment: number, distance: number): number {
  return sampleAt(pieces, segment, distance)?.value ?? 0;
}

/** Sum of the absolute terms of a field at a distance in a segment. */
function scaleAt(pieces: PiecewiseField, segment: number, distance: number): number {
  return sampleAt(pieces, segment, distance)?.scale ?? 0;
}

function sampleAt(pieces: PiecewiseField, segment: number, distance: number): Sampled | undefined {
  for (const piece of pieces) {
    if (piece.segment === segment && distance <= piece.start + piece.length * (1 + 1e-14)) {
      return pieceValue(piece, Math.max(0, Math.min(piece.length, distance - piece.start)));
    }
  }
  return undefined;
}

import type { WaveMember } from '../members/wave-member.ts';
import { StaticResponse } from '../modes/static-response.ts';
import type { LoadShape } from './load-shape.ts';
import type { StaticState } from './loaded-static.ts';
import { massForm } from './field-energy.ts';
import { pieceSlope, pieceValue, type Piece, type WaveTerm } from './piecewise-field.ts';

/** The static shape r of a unit motion of one or both fixed ends. */
export interface SupportShape {
  /** r on each segment, one piece each. */
  readonly pieces: readonly Piece[];
  /** r at the nodes, shape [segments + 1]. */
  readonly nodes: Float64Array;
  /** ρ r and M r: the inertia load of a unit acceleration. */
  readonly load: LoadShape;
  /** m(r, r), kg. */
  readonly inertia: number;
}

/** r(x) with springs and foundation; 1 along a member held by nothing else. Cost O(segments). */
export function supportShape(member: WaveMember, end: 'near' | 'far' | 'both'): SupportShape {
  const response = new StaticResponse(member);
  const n = member.segmentCount;
  const nodes = new Float64Array(n + 1);
  for (const one of ['near', 'far'] as const) {
    if (end === one || end === 'both') response.endMotion(one).forEach((value, j) => (nodes[j] += value));
  }
  const pieces: Piece[] = [];
  const inertial: Piece[] = [];
  for (let i = 0; i < n; i++) {
    const piece = staticPiece(member, i, nodes[i], nodes[i + 1]);
    pieces.push(piece);
    inertial.push(scaledPiece(piece, member.inertia[i]));
  }
  // fixed ends, the moving ones among them, carry no mass of their own
  const inertia = massForm(member, pieces, nodes);
  const load: LoadShape = {
    pieces: inertial,
    nodes: nodes.map((value, j) => value * member.mass[j]),
    point: null,
    smooth: true,
    massNorm: inertia,
  };
  return { pieces, nodes, load, inertia };
}

/** r and its flux at a place. */
export function supportState(
  member: WaveMember,
  shape: SupportShape,
  segment: number,
  distance: number,
): StaticState {
  const piece = shape.pieces[segment];
  return {
    displacement: pieceValue(piece, distance).value,
    flux: member.stiffness[segment] * pieceSlope(piece, distance).value,
  };
}

function staticPiece(member: WaveMember, segment: number, near: number, far: number): Piece {
  const length = member.length[segment];
  const square = -member.foundation[segment] / member.stiffness[segment];
  if (square === 0)
    return {
      segment,
      start: 0,
      length,
      powers: [near, far - near],
      waves: [],
      magnitude: Math.abs(near) + Math.abs(far),
    };
  const a = Math.min(Math.sqrt(-square) * length, 700);
  const slope = ((far - near * Math.cosh(a)) * (a / Math.sinh(a))) / length;
  const wave: WaveTerm = { square, value: near, slope, farValue: far };
  return { segment, start: 0, length, powers: [], waves: [wave], magnitude: 0 };
}

export function scaledPiece(piece: Piece, factor: number): Piece {
  return {
    ...piece,
    powers: piece.powers.map((c) => c * factor),
    magnitude: piece.magnitude * factor,
    waves: piece.waves.map((term) => ({
      square: term.square,
      value: term.value * factor,
      slope: term.slope * factor,
      farValue: term.farValue * factor,
    })),
  };
}

import { fault } from '../faults/fault.ts';
import type { WaveMember } from '../members/wave-member.ts';
import type { MasslessStretch } from '../modes/massless-stretches.ts';
import type { StaticResponse } from '../modes/static-response.ts';
import type { PullShape, Shape } from '../spec/types.ts';
import {
  nodeValuesOf,
  pieceSlope,
  pieceValue,
  type Piece,
  type PiecewiseField,
  type WaveTerm,
} from './piecewise-field.ts';
import { listOf, place, shapePieces, shapePointer, type GivenShape } from './shape-pieces.ts';

/** A static force held until t = 0, whose shape of rest is part of the initial displacement. */
export interface HeldForce {
  readonly segment: number;
  /** Distance from the near end of the segment, m. */
  readonly distance: number;
  /** N (shaft: N·m). */
  readonly force: number;
}

/** The initial displacement: given pieces plus the static shapes of held forces. */
export interface InitialDisplacement {
  readonly pieces: PiecewiseField;
  readonly pulls: readonly HeldForce[];
}

/** Units of rounding, times the terms summed, within which a value counts as 0 or continuous. */
const CONTINUITY = 256 * Number.EPSILON;

/**
 * Reads the shapes of the initial displacement.
 *
 * Faults: `pull-without-restraint`, `pull-at-fixed-end`, `infinite-energy` (a jump, or a fixed end
 * that is displaced).
 */
export function readDisplacement(
  member: WaveMember,
  shapes: Shape | readonly Shape[] | undefined,
  response: StaticResponse | null,
  supports: readonly StartedSupport[] = [],
): InitialDisplacement {
  const list = listOf(shapes);
  const given = list.filter((shape): shape is GivenShape => shape.type !== 'pull');
  const pieces = shapePieces(member, given, [], (from, to, segment) => ({
    waves: supports.map((support) => supportTerm(member, support, from, to, segment)),
  }));
  requireContinuity(member, pieces);
  const pulls: HeldForce[] = [];
  list.forEach((shape, index) => {
    if (shape.type !== 'pull') return;
    pulls.push(readPull(member, shape, response, shapePointer('displacement', shapes, index)));
  });
  return { pieces, pulls };
}

/** A support that is already displaced at t = 0: the motion is counted from its static shape. */
export interface StartedSupport {
  readonly pieces: readonly Piece[];
  /** y(0), m. */
  readonly position: number;
}

/** −y(0) r on a cell. */
function supportTerm(
  member: WaveMember,
  support: StartedSupport,
  from: number,
  to: number,
  segment: number,
): WaveTerm {
  const piece = support.pieces[segment];
  const start = Math.max(0, from - member.position[segment]);
  const end = Math.min(member.length[segment], to - member.position[segment]);
  return {
    square: -member.foundation[segment] / member.stiffness[segment],
    value: -support.position * pieceValue(piece, start).value,
    slope: -support.position * pieceSlope(piece, start).value,
    farValue: -support.position * pieceValue(piece, end).value,
  };
}

function readPull(
  member: WaveMember,
  shape: PullShape,
  response: StaticResponse | null,
  shapeAt: string,
): HeldForce {
  const pointer = `${shapeAt}/at`;
  if (response === null) throw fault('pull-without-restraint', pointer, { at: shape.at });
  const { segment, distance } = place(member, shape.at);
  const flexibility = response.flexibility(segment, distance);
  if (flexibility === 0) throw fault('pull-at-fixed-end', pointer, { at: shape.at });
  if ('force' in shape) return { segment, distance, force: shape.force };
  return { segment, distance, force: shape.amplitude / flexibility };
}

function requireContinuity(member: WaveMember, pieces: PiecewiseField): void {
  const refuse = (at: number, reason: string, remedy: string): never => {
    throw fault('infinite-energy', '/initial/displacement', { at, reason, remedy });
  };
  // a breakpoint may stand beside its node by the rounding of positions
  const slip = 128 * Number.EPSILON * member.position[member.segmentCount];
  const slack = (piece: Piece, xi: number): number =>
    CONTINUITY * pieceValue(piece, xi).scale + slip * pieceSlope(piece, xi).scale;
  const first = pieces[0];
  const last = pieces[pieces.length - 1];
  const begin = pieceValue(first, 0).value;
  const end = pieceValue(last, last.length).value;
  const release = 'Let it end at 0 there, or change the end.';
  if (member.nearFixed && Math.abs(begin) > slack(first, 0)) {
    refuse(0, `is ${begin} at the fixed near end`, release);
  }
  if (member.farFixed && Math.abs(end) > slack(last, last.length)) {
    refuse(member.position[member.segmentCount], `is ${end} at the fixed far end`, release);
  }
  for (let c = 1; c < pieces.length; c++) {
    const [before, after] = [pieces[c - 1], pieces[c]];
    const near = pieceValue(before, before.length).value;
    const far = pieceValue(after, 0).value;
    if (Math.abs(far - near) <= slack(before, before.length) + slack(after, 0)) continue;
    refuse(
      member.position[after.segment] + after.start,
      `jumps from ${near} to ${far}`,
      'Join the values, for example by a polyline with a short slope.',
    );
  }
}

/**
 * The displacement that the member keeps for t > 0: in massless stretches the static interpolation
 * of the end nodes, held forces inside one shared between its end nodes. The strain energy given up
 * is radiated at once by the massless parts.
 */
export function settle(
  member: WaveMember,
  given: InitialDisplacement,
  stretches: readonly MasslessStretch[],
): InitialDisplacement {
  if (stretches.length === 0) return given;
  const pulls: HeldForce[] = [];
  for (const pull of given.pulls) {
    const stretch = stretches.find((run) => pull.segment >= run.first && pull.segment <= run.last);
    if (!stretch) {
      pulls.push(pull);
      continue;
    }
    const share = (nodes: Float64Array): number =>
      interpolate(member, stretch, nodes, pull.segment).at(pull.distance);
    const near = pull.force * share(stretch.nearShape);
    const far = pull.force * share(stretch.farShape);
    if (near !== 0) pulls.push({ segment: stretch.first, distance: 0, force: near });
    if (far !== 0) pulls.push({ segment: stretch.last, distance: member.length[stretch.last], force: far });
  }
  const value = nodeValuesOf(given.pieces, member.segmentCount);
  if (member.nearFixed) value[0] = 0;
  if (member.farFixed) value[member.segmentCount] = 0;
  return { pieces: settlePieces(member, given.pieces, value, stretches), pulls };
}

/** Pieces with the massless stretches replaced by the static interpolation of the given node values. */
export function settlePieces(
  member: WaveMember,
  given: PiecewiseField,
  value: Float64Array,
  stretches: readonly MasslessStretch[],
): PiecewiseField {
  if (stretches.length === 0) return given;
  const pieces: Piece[] = given.filter((piece) => member.inertia[piece.segment] > 0);
  for (const stretch of stretches) {
    const near = value[stretch.first];
    const far = value[stretch.last + 1];
    const nodes = stretch.nearShape.map((shape, j) => near * shape + far * stretch.farShape[j]);
    // the node values are known to the rounding of the terms they were summed from
    const magnitude = reachAround(given, stretch);
    for (let i = stretch.first; i <= stretch.last; i++) {
      const { piece } = interpolate(member, stretch, nodes, i);
      pieces.push({ ...piece, magnitude: piece.magnitude + magnitude });
    }
  }
  pieces.sort((a, b) => a.segment - b.segment || a.start - b.start);
  return pieces;
}

/** Largest sum of absolute terms of the pieces on and beside a stretch. */
function reachAround(given: PiecewiseField, stretch: MasslessStretch): number {
  let reach = 0;
  for (const piece of given) {
    if (piece.segment < stretch.first - 1 || piece.segment > stretch.last + 1) continue;
    reach = Math.max(reach, pieceValue(piece, 0).scale, pieceValue(piece, piece.length).scale);
  }
  return reach;
}

/** The static curve between two node values on one massless segment. */
function interpolate(
  member: WaveMember,
  stretch: MasslessStretch,
  nodes: Float64Array,
  segment: number,
): { piece: Piece; at: (distance: number) => number } {
  const near = nodes[segment - stretch.first];
  const far = nodes[segment - stretch.first + 1];
  const length = member.length[segment];
  const square = -member.foundation[segment] / member.stiffness[segment];
  const waves: WaveTerm[] = [];
  const powers: number[] = [];
  if (square === 0) {
    powers.push(near, far - near);
  } else {
    const a = Math.sqrt(-square) * length;
    const slope = ((far - near * Math.cosh(Math.min(a, 700))) * a) / Math.sinh(Math.min(a, 700)) / length;
    waves.push({ square, value: near, slope, farValue: far });
  }
  const magnitude = powers.reduce((sum, c) => sum + Math.abs(c), 0);
  const piece: Piece = { segment, start: 0, length, powers, waves, magnitude };
  return { piece, at: (distance) => pieceValue(piece, distance).value };
}

import { cosine, sinc } from '../numerics/wave-functions.ts';

/** A solution of y″ + κ² y = 0 on a cell, κ² of either sign: a sine, a line or a hyperbolic sine. */
export interface WaveTerm {
  /** κ², 1/m². */
  readonly square: number;
  /** Value at the cell's near end. */
  readonly value: number;
  /** Slope at the cell's near end, per m. */
  readonly slope: number;
  /** Value at the cell's far end, exact where the term decays. */
  readonly farValue: number;
}

/** A smooth function on one cell of the member, a cell lying within one segment. */
export interface Piece {
  readonly segment: number;
  /** Distance of the cell's near end from the near end of its segment, m. */
  readonly start: number;
  /** Length h of the cell, m. */
  readonly length: number;
  /** Coefficients of 1, t, t², … with t = ξ/h, ξ from the cell's near end. */
  readonly powers: readonly number[];
  readonly waves: readonly WaveTerm[];
  /** Sum of the absolute terms that the powers were made of: the scale of their rounding. */
  readonly magnitude: number;
}

/** A function on the whole member: cells in ascending order, covering every segment. */
export type PiecewiseField = readonly Piece[];

/** Value and magnitude (sum of the absolute terms, the scale of its rounding). */
export interface Sampled {
  readonly value: number;
  readonly scale: number;
}

/** Decay over the cell from which a wave term is evaluated from both its ends. */
const STRONG_DECAY = 1;

/** Value of a wave term at ξ. */
export function waveValue(term: WaveTerm, length: number, xi: number): number {
  if (xi === length) return term.farValue;
  const square = term.square * length * length;
  if (square < -STRONG_DECAY) {
    const kappa = Math.sqrt(-term.square);
    const rest = -Math.expm1(-2 * kappa * length);
    const near = -Math.expm1(-2 * kappa * (length - xi)) * Math.exp(-kappa * xi);
    const far = -Math.expm1(-2 * kappa * xi) * Math.exp(-kappa * (length - xi));
    return (term.value * near + term.farValue * far) / rest;
  }
  const local = term.square * xi * xi;
  return term.value * cosine(local) + term.slope * xi * sinc(local);
}

/** Slope of a wave term at ξ. */
export function waveSlope(term: WaveTerm, length: number, xi: number): number {
  const square = term.square * length * length;
  if (square < -STRONG_DECAY) {
    const kappa = Math.sqrt(-term.square);
    const rest = -Math.expm1(-2 * kappa * length);
    const near = (1 + Math.exp(-2 * kappa * (length - xi))) * Math.exp(-kappa * xi);
    const far = (1 + Math.exp(-2 * kappa * xi)) * Math.exp(-kappa * (length - xi));
    return (kappa * (term.farValue * far - term.value * near)) / rest;
  }
  const local = term.square * xi * xi;
  return term.slope * cosine(local) - term.square * term.value * xi * sinc(local);
}

/** The term's derivative as a wave term. */
export function derivativeOf(term: WaveTerm, length: number): WaveTerm {
  return {
    square: term.square,
    value: waveSlope(term, length, 0),
    slope: -term.square * term.value,
    farValue: waveSlope(term, length, length),
  };
}

/** Σ c_j t^j. */
export function horner(powers: readonly number[], t: number): number {
  let value = 0;
  for (let j = powers.length - 1; j >= 0; j--) value = value * t + powers[j];
  return value;
}

/** Coefficients of d/dt. */
export function derivedPowers(powers: readonly number[]): number[] {
  return powers.slice(1).map((c, j) => c * (j + 1));
}

/** Value of a piece at ξ. */
export function pieceValue(piece: Piece, xi: number): Sampled {
  const t = xi / piece.length;
  let value = horner(piece.powers, t);
  let scale = piece.magnitude;
  for (const term of piece.waves) {
    value += waveValue(term, piece.length, xi);
    scale += amplitude(term);
  }
  return { value, scale };
}

/** Slope of a piece at ξ, per m. */
export function pieceSlope(piece: Piece, xi: number): Sampled {
  const t = xi / piece.length;
  const powers = derivedPowers(piece.powers);
  let value = horner(powers, t) / piece.length;
  let scale = (piece.magnitude * Math.max(0, piece.powers.length - 1)) / piece.length;
  for (const term of piece.waves) {
    value += waveSlope(term, piece.length, xi);
    scale += amplitude(term) * Math.sqrt(Math.abs(term.square)) + Math.abs(term.slope);
  }
  return { value, scale };
}

/** Whether the piece is 0 everywhere. */
export function isZero(piece: Piece): boolean {
  return (
    piece.powers.every((c) => c === 0) && piece.waves.every((term) => term.value === 0 && term.slope === 0)
  );
}

/** Phase or decay of the quickest term over the cell; decides how finely it is integrated. */
export function piecePhase(piece: Piece): number {
  let phase = 0;
  for (const term of piece.waves) phase = Math.max(phase, Math.sqrt(Math.abs(term.square)) * piece.length);
  return phase;
}

function amplitude(term: WaveTerm): number {
  const kappa = Math.sqrt(Math.abs(term.square));
  return term.square > 0
    ? Math.hypot(term.value, term.slope / kappa)
    : Math.abs(term.value) + Math.abs(term.farValue);
}

/** Values at the nodes, shape [segments + 1]. */
export function nodeValuesOf(pieces: PiecewiseField, segmentCount: number): Float64Array {
  const nodes = new Float64Array(segmentCount + 1);
  for (const piece of pieces) {
    if (piece.start === 0) nodes[piece.segment] = pieceValue(piece, 0).value;
    nodes[piece.segment + 1] = pieceValue(piece, piece.length).value;
  }
  return nodes;
}

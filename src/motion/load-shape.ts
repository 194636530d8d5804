import type { WaveMember } from '../members/wave-member.ts';
import { evaluateShape, waveNumberSquare, type ModeShape } from '../modes/mode-shape.ts';
import { nodeDisplacement } from '../modes/shape-figures.ts';
import { isZero, type PiecewiseField, type WaveTerm } from './piecewise-field.ts';
import { pieceTimesWave } from './wave-integrals.ts';

/** Where a load acts: a density on the segments, forces at nodes, or one force at a place. */
export interface LoadShape {
  /** N/m (shaft: N·m/m) per unit history. */
  readonly pieces: PiecewiseField;
  /** N (N·m) per unit history, shape [segments + 1]. */
  readonly nodes: Float64Array;
  /** A unit force at one place, or null. */
  readonly point: { readonly segment: number; readonly distance: number } | null;
  /**
   * Whether the load shape, as ρ times an acceleration field, has finite mass norm ∫f²/ρ + Σf²/M:
   * a density on inertia and node forces on masses. Velocity and force then have pointwise bounds.
   */
  readonly smooth: boolean;
  /** ∫f²/ρ + Σf²/M, 1/kg · N²; 0 where not smooth. */
  readonly massNorm: number;
}

/** F_n = ∫f φ_n + Σ f_j φ_n(z_j) + φ_n(z): the modal force per unit history. Cost O(pieces). */
export function modalForce(member: WaveMember, shape: ModeShape, load: LoadShape): number {
  let force = 0;
  const pair = new Float64Array(2);
  for (const piece of load.pieces) {
    if (isZero(piece)) continue;
    const k = member.stiffness[piece.segment];
    const square = waveNumberSquare(member, piece.segment, shape.lambda);
    evaluateShape(member, shape, piece.segment, piece.start, pair);
    const [value, flux] = pair;
    evaluateShape(member, shape, piece.segment, piece.start + piece.length, pair);
    const wave: WaveTerm = { square, value, slope: flux / k, farValue: pair[0] };
    force += pieceTimesWave(piece, wave);
  }
  for (let j = 0; j <= member.segmentCount; j++) {
    if (load.nodes[j] !== 0) force += load.nodes[j] * nodeDisplacement(shape, j);
  }
  if (load.point !== null) {
    evaluateShape(member, shape, load.point.segment, load.point.distance, pair);
    force += pair[0];
  }
  return force;
}

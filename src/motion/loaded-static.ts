import type { WaveMember } from '../members/wave-member.ts';
import { InertiaRelief } from '../modes/inertia-relief.ts';
import { StaticResponse } from '../modes/static-response.ts';
import { GAUSS_20, GAUSS_8 } from '../numerics/gauss-legendre.ts';
import { canDriftFreely, totalMass } from '../spectrum/spectrum-size.ts';
import type { LoadShape } from './load-shape.ts';
import { isZero, piecePhase, pieceValue, type Piece, type PiecewiseField } from './piecewise-field.ts';
import { gauss } from './wave-integrals.ts';

/** Powers of a piece with which the eight-point rule is exact: its square times ξ² has degree 15 at most. */
const FEW_POWERS = 7;

/** Static displacement and flux (near side at a node) under a unit history. */
export interface StaticState {
  readonly displacement: number;
  readonly flux: number;
}

/** The static response of a member to one load shape, with its compliance C = ∫f w, m/N. */
export interface LoadedStatic {
  readonly compliance: number;
  at(segment: number, distance: number): StaticState;
}

/**
 * Rounding of the compliance of a load, m/N: 64·2⁻⁵² of it, or of the terms it is summed from where parts of
 * the load may cancel, its whole force squared on the whole flexibility and softness.
 *
 * @param flexibility largest G over the member, held parts included, m/N
 */
export function complianceRounding(
  member: WaveMember,
  load: { readonly still: LoadedStatic | null; readonly cancels: boolean; readonly totalForce: number },
  flexibility: number,
): number {
  if (load.still === null) return 0;
  let softness = 0;
  for (let i = 0; i < member.segmentCount; i++) softness += member.length[i] / member.stiffness[i];
  const terms = load.cancels ? load.totalForce ** 2 * (flexibility + softness) : load.still.compliance;
  return 64 * Number.EPSILON * terms;
}

/**
 * Static response under a load shape; for an unrestrained member its elastic part, the load balanced
 * by inertia (mass-orthogonal to the rigid-body mode).
 *
 * Restrained: w(x) = G(x,x) (A(x) + B(x)) with A, B the load before and after x weighted by the static
 * solutions u_L(z)/u_L(x), u_R(z)/u_R(x) ≤ 1; all from {@link StaticResponse}.
 * Cost: O(pieces) Gauss panels once, O(1) panels a station.
 */
export function loadedStatic(member: WaveMember, load: LoadShape): LoadedStatic {
  if (load.point !== null) return pointStatic(member, load.point);
  return canDriftFreely(member) ? new BalancedStatic(member, load) : new RestrainedStatic(member, load);
}

function pointStatic(member: WaveMember, point: NonNullable<LoadShape['point']>): LoadedStatic {
  const source = canDriftFreely(member) ? new InertiaRelief(member) : new StaticResponse(member);
  const { segment: j, distance: z } = point;
  return {
    compliance: source.flexibility(j, z),
    at: (i, x) => ({
      displacement: source.mutualFlexibility(i, x, j, z),
      flux: source.influence(i, x, j, z),
    }),
  };
}

/** Pieces by segment. */
function bySegment(member: WaveMember, pieces: PiecewiseField): Piece[][] {
  const lists: Piece[][] = Array.from({ length: member.segmentCount }, () => []);
  for (const piece of pieces) if (!isZero(piece)) lists[piece.segment].push(piece);
  return lists;
}

/** ∫ weight · f over the part of a segment between two distances. */
function weighed(
  pieces: readonly Piece[],
  from: number,
  to: number,
  decay: number,
  weight: (distance: number) => number,
): number {
  let total = 0;
  for (const piece of pieces) {
    const a = Math.max(from, piece.start);
    const b = Math.min(to, piece.start + piece.length);
    if (b <= a) continue;
    const phase = ((piecePhase(piece) + decay * piece.length) * (b - a)) / piece.length;
    // without bedding every weight is a polynomial, at most two degrees above the piece
    const few = decay === 0 && piece.waves.length === 0 && piece.powers.length <= FEW_POWERS;
    const rule = few ? GAUSS_8 : GAUSS_20;
    total += gauss(
      b - a,
      phase,
      (xi) => weight(a + xi) * pieceValue(piece, a + xi - piece.start).value,
      rule,
    );
  }
  return total;
}

class RestrainedStatic implements LoadedStatic {
  readonly compliance: number;
  private readonly member: WaveMember;
  private readonly response: StaticResponse;
  private readonly pieces: Piece[][];
  /** A at the near end of each segment (its node force included), B at its far end. */
  private readonly before: Float64Array;
  private readonly after: Float64Array;

  constructor(member: WaveMember, load: LoadShape) {
    const n = member.segmentCount;
    this.member = member;
    this.response = new StaticResponse(member);
    this.pieces = bySegment(member, load.pieces);
    this.before = new Float64Array(n);
    this.after = new Float64Array(n);
    let sum = member.nearFixed ? 0 : load.nodes[0];
    for (let i = 0; i < n; i++) {
      this.before[i] = sum;
      sum = this.gatherBefore(i, member.length[i]) + (i + 1 < n ? load.nodes[i + 1] : 0);
    }
    sum = member.farFixed ? 0 : load.nodes[n];
    for (let i = n - 1; i >= 0; i--) {
      this.after[i] = sum;
      sum = this.gatherAfter(i, 0) + (i > 0 ? load.nodes[i] : 0);
    }
    let compliance = 0;
    for (let i = 0; i < n; i++) {
      const decay = Math.sqrt(member.foundation[i] / member.stiffness[i]);
      compliance += weighed(
        this.pieces[i],
        0,
        member.length[i],
        2 * decay,
        (x) => this.at(i, x).displacement,
      );
      compliance +=
        load.nodes[i + 1] === 0 ? 0 : load.nodes[i + 1] * this.at(i, member.length[i]).displacement;
    }
    if (load.nodes[0] !== 0) compliance += load.nodes[0] * this.at(0, 0).displacement;
    this.compliance = compliance;
  }

  at(segment: number, distance: number): StaticState {
    const a = this.gatherBefore(segment, distance);
    const b = this.gatherAfter(segment, distance);
    const { flexibility, nearShare } = this.response.split(segment, distance);
    return { displacement: flexibility * (a + b), flux: nearShare * b - (1 - nearShare) * a };
  }

  private gatherBefore(i: number, distance: number): number {
    const { response } = this;
    const decay = Math.sqrt(this.member.foundation[i] / this.member.stiffness[i]);
    return (
      this.before[i] * response.nearRatio(i, 0, distance) +
      weighed(this.pieces[i], 0, distance, decay, (z) => response.nearRatio(i, z, distance))
    );
  }

  private gatherAfter(i: number, distance: number): number {
    const { response, member } = this;
    const l = member.length[i];
    const decay = Math.sqrt(member.foundation[i] / member.stiffness[i]);
    return (
      this.after[i] * response.farRatio(i, l, distance) +
      weighed(this.pieces[i], distance, l, decay, (z) => response.farRatio(i, z, distance))
    );
  }
}

/** Unrestrained: the load less its mean acceleration times the inertia. */
class BalancedStatic implements LoadedStatic {
  readonly compliance: number;
  private readonly member: WaveMember;
  private readonly pieces: Piece[][];
  private readonly acceleration: number;
  /** Flux and displacement at the near end of each segment, node passed. */
  private readonly flux: Float64Array;
  private readonly place: Float64Array;

  constructor(member: WaveMember, load: LoadShape) {
    const n = member.segmentCount;
    this.member = member;
    this.pieces = bySegment(member, load.pieces);
    this.flux = new Float64Array(n);
    this.place = new Float64Array(n);
    const mass = totalMass(member);
    let total = 0;
    for (let i = 0; i < n; i++) total += weighed(this.pieces[i], 0, member.length[i], 0, () => 1);
    for (let j = 0; j <= n; j++) total += load.nodes[j];
    this.acceleration = total / mass;
    const node = (j: number): number => load.nodes[j] - this.acceleration * member.mass[j];

    let flux = -node(0);
    let place = 0;
    let moment = 0;
    for (let i = 0; i < n; i++) {
      this.flux[i] = flux;
      this.place[i] = place;
      const end = this.raw(i, member.length[i]);
      moment += member.mass[i] * place + member.inertia[i] * this.area(i);
      flux = end.flux - node(i + 1);
      place = end.displacement;
    }
    moment += member.mass[n] * place;
    for (let i = 0; i < n; i++) this.place[i] -= moment / mass;

    let compliance = load.nodes[0] * this.at(0, 0).displacement;
    for (let i = 0; i < n; i++) {
      compliance += weighed(this.pieces[i], 0, member.length[i], 0, (x) => this.at(i, x).displacement);
      if (load.nodes[i + 1] !== 0)
        compliance += load.nodes[i + 1] * this.at(i, member.length[i]).displacement;
    }
    this.compliance = Math.max(0, compliance);
  }

  at(segment: number, distance: number): StaticState {
    return this.raw(segment, distance);
  }

  private raw(i: number, d: number): StaticState {
    const { member } = this;
    const pull = this.acceleration * member.inertia[i];
    const load = weighed(this.pieces[i], 0, d, 0, () => 1) - pull * d;
    const arm = weighed(this.pieces[i], 0, d, 0, (z) => d - z) - 0.5 * pull * d * d;
    return {
      displacement: this.place[i] + (this.flux[i] * d - arm) / member.stiffness[i],
      flux: this.flux[i] - load,
    };
  }

  /** ∫w over segment i. */
  private area(i: number): number {
    const { member } = this;
    const l = member.length[i];
    const pull = this.acceleration * member.inertia[i];
    const second = weighed(this.pieces[i], 0, l, 0, (z) => 0.5 * (l - z) ** 2) - (pull * l ** 3) / 6;
    return this.place[i] * l + (0.5 * this.flux[i] * l * l - second) / member.stiffness[i];
  }
}

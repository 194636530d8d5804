import type { WaveMember } from '../members/wave-member.ts';
import type { AppliedLoad } from '../motion/applied-loads.ts';
import type { Quantity, Verdict } from '../spec/types.ts';
import type { KeptSeries, RigidPart } from './kept-modes.ts';
import { loadRounding, type LoadedPlace } from './load-rounding.ts';
import type { Rounding } from './rounding.ts';
import { tailFactors, type BoundKind, type TailFactors } from './quantity-bounds.ts';
import { largestRatioAbove } from '../motion/modal-damping.ts';
import type { TailFlexibility } from './tail-flexibility.ts';

const EPS = Number.EPSILON;

/** The certificate of one quantity. */
export interface QuantityCertificate {
  /** Largest error per station, SI; null where no bound exists for the place. */
  readonly bound: Float64Array | null;
  readonly kind: BoundKind;
  /** Largest r.m.s. error over the member, where the kind is rms. */
  readonly rms: number | null;
  readonly verdict: Verdict;
}

/**
 * The error of a quantity at every station: tail of the series plus rounding of what was summed.
 *
 * @param tails tail flexibilities at the stations, all kept modes taken out
 * @param factor stress per force at the stations, or null
 * @param span latest sampled time, gauge time included, s
 */
export function certify(
  quantity: Quantity,
  member: WaveMember,
  series: KeptSeries,
  tails: TailFlexibility,
  gaugeTime: number,
  released: boolean,
  span: number,
  factor: Float64Array | null,
  loads: readonly AppliedLoad[] = [],
  flexibility = 0,
): QuantityCertificate {
  const { tail, verdict } = series;
  const factors = tailFactors(
    quantity,
    tail.energies,
    member.damping,
    tail.kept,
    gaugeTime,
    released,
    tail.loads,
  );
  const complete = verdict === 'complete';
  if (!factors.exists && !complete) {
    return {
      bound: null,
      kind: factors.kind,
      rms: rmsOf(quantity, member, series, factors, factor),
      verdict: 'irregular-data',
    };
  }
  const nextLambda = tail.energies.nextOmega * tail.energies.nextOmega;
  const noise = roundingFactors(quantity, member, series.rounding, tail.whole.energies.nextOmega, gaugeTime);
  const drift = rigidRounding(quantity, tail.rigid, span, gaugeTime, member.damping.massCoefficient);
  const place = loadedPlace(member, flexibility, span, gaugeTime);
  const outside = drift + loadRounding(quantity, loads, series.modes[0], place);
  const bound = new Float64Array(tails.stations.segment.length);
  for (let q = 0; q < bound.length; q++) {
    const g = complete ? 0 : Math.sqrt(tails.flexibilityTail(q, nextLambda));
    const h = complete ? 0 : Math.sqrt(tails.fluxTail(q));
    const left = weigh(factors.onFlexibility, g) + weigh(factors.onFluxInertia, h);
    const rounding =
      quantity === 'force' || quantity === 'stress'
        ? noise * Math.sqrt(tails.reachFlux[q])
        : noise * Math.sqrt(tails.whole[q]);
    bound[q] = (left + rounding + outside) * (factor?.[q] ?? 1) * (1 + 8 * EPS);
  }
  const kind = complete && factors.kind === 'rms' ? 'pointwise' : factors.kind;
  return { bound, kind, rms: null, verdict };
}

/**
 * Sum of magnitudes times rounding, as the factor of √G (displacement and its rates) or √H (flux).
 *
 * @param lowest lowest elastic frequency, rad/s
 */
export function roundingFactors(
  quantity: Quantity,
  member: WaveMember,
  rounding: Rounding,
  lowest: number,
  gaugeTime: number,
): number {
  const beta = member.damping.stiffnessCoefficient;
  const drag = 1 + 2 * largestRatioAbove(member.damping, 0) + member.damping.massCoefficient / lowest;
  const gauge = 2 / gaugeTime;
  switch (quantity) {
    case 'displacement':
    case 'relativeDisplacement':
      return rounding.level(0);
    case 'velocity':
      return gaugeTime > 0 ? gauge * rounding.level(0) : rounding.level(1);
    case 'acceleration':
      return gaugeTime > 0 ? gauge * rounding.level(1) : drag * rounding.level(2) + beta * rounding.level(3);
    case 'force':
    case 'stress':
      return gaugeTime > 0 ? gauge * drag * rounding.level(0) : rounding.level(1) + beta * rounding.level(2);
  }
}

/** Rounding of the rigid-body part of a quantity. */
export function rigidRounding(
  quantity: Quantity,
  rigid: RigidPart,
  span: number,
  gaugeTime: number,
  drag: number,
): number {
  const path = rigid.position + rigid.velocity * span;
  switch (quantity) {
    case 'displacement':
    case 'relativeDisplacement':
      return 64 * EPS * path;
    case 'velocity':
      return 64 * EPS * (rigid.velocity + (gaugeTime > 0 ? (2 * path) / gaugeTime : 0));
    case 'acceleration':
      return 64 * EPS * rigid.velocity * (drag + (gaugeTime > 0 ? 2 / gaugeTime : 0));
    case 'force':
    case 'stress':
      return 0;
  }
}

function rmsOf(
  quantity: Quantity,
  member: WaveMember,
  series: KeptSeries,
  factors: TailFactors,
  factor: Float64Array | null,
): number | null {
  if (factors.kind !== 'rms' || !Number.isFinite(factors.rmsNumerator)) return null;
  let flexibility = 0;
  let mass = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    flexibility += member.length[i] / member.stiffness[i];
    mass += member.inertia[i] * member.length[i];
  }
  for (const lump of member.mass) mass += lump;
  const flux = quantity === 'force' || quantity === 'stress';
  const rounding = series.rounding.level(quantity === 'acceleration' ? 1 : 0);
  const scale = factor ? member.stressFactor.reduce((largest, value) => Math.max(largest, value), 0) : 1;
  return ((factors.rmsNumerator + rounding) / Math.sqrt(flux ? flexibility : mass)) * scale;
}

/** Factor times size, 0 where either is 0. */
function weigh(factor: number, size: number): number {
  return factor === 0 || size === 0 ? 0 : factor * size;
}

/** What rounding under loads needs to know of the member. */
export function loadedPlace(
  member: WaveMember,
  flexibility: number,
  span: number,
  gaugeTime: number,
): LoadedPlace {
  let softness = 0;
  let steepest = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    softness += member.length[i] / member.stiffness[i];
    steepest = Math.max(steepest, 1 / member.stiffness[i]);
  }
  return { flexibility, softness, steepest, span, gaugeTime, length: member.position[member.segmentCount] };
}

import type { WaveMember } from '../members/wave-member.ts';
import { peakDisplacement, peakFlux } from '../modes/shape-figures.ts';
import type { AppliedLoad } from '../motion/applied-loads.ts';
import { largestRatioAbove } from '../motion/modal-damping.ts';
import { stillPeak, supportRise } from '../motion/still-peaks.ts';
import type { Quantity } from '../spec/types.ts';
import { loadedPlace, rigidRounding, roundingFactors } from './field-bounds.ts';
import type { KeptSeries } from './kept-modes.ts';
import { loadRounding } from './load-rounding.ts';
import { coordinateReach, type ModeReach } from './loaded-reach.ts';
import { tailFactors } from './quantity-bounds.ts';
import { freeRiseBetween, riseBetween, type SampledGrid } from './sampled-limit.ts';

/** What the peak limits of all quantities need. */
export interface PeakBasis {
  readonly member: WaveMember;
  readonly series: KeptSeries;
  /** Largest G over the member, m/N. */
  readonly flexibility: number;
  /** The same with what massless stretches add between held ends. */
  readonly wholeFlexibility?: number;
  readonly loads?: readonly AppliedLoad[];
  /** How far each kept mode goes, and the grid that was sampled. */
  readonly reaches: readonly ModeReach[];
  readonly grid: SampledGrid;
  readonly gaugeTime: number;
  readonly released: boolean;
  /** Latest sampled time, gauge time included, s. */
  readonly span: number;
}

/** Where a peak is looked for: by default anywhere on the member. */
export interface PeakPlace {
  /** G and H of the whole elastic motion there, m/N and kg. */
  readonly flexibility: number;
  readonly fluxInertia: number;
  /** ΔG and ΔH there. */
  readonly tailFlexibility: number;
  readonly tailFlux: number;
  /** Stress per force there. */
  readonly stressFactor: number;
  /** |φ_n| and |p_n| of the n-th kept mode there. */
  readonly displacementOf: (n: number) => number;
  readonly fluxOf: (n: number) => number;
  /** Whether it is a single place, where nothing rises between stations. */
  readonly single: boolean;
}

function anywhere({ member, series, flexibility }: PeakBasis): PeakPlace {
  const { tail, modes } = series;
  return {
    flexibility,
    fluxInertia: tail.whole.member.fluxInertia,
    tailFlexibility: tail.member.flexibility,
    tailFlux: tail.member.fluxInertia,
    stressFactor: Math.max(...member.stressFactor),
    displacementOf: (n) => peakDisplacement(member, modes[n].mode.shape),
    fluxOf: (n) => peakFlux(member, modes[n].mode.shape),
    single: false,
  };
}

/**
 * An upper limit on |quantity| over the whole member, or at one place, and all times up to the span: the smaller of
 * the ceiling known from the energies alone and the sum of the kept modes' amplitudes plus the tail
 * bound. Under loads the amplitudes are those seen at the samples and what the loads can add from one to
 * the next, and the limit of a displacement may come from the samples themselves; the times are those from
 * the first sample on. Of averages where a gauge time is given. Null where no limit exists.
 *
 * @param sampled largest |value| + bound on the sampled grid, or of the samples at the place
 * @param place by default the whole member
 */
export function peakLimit(
  quantity: Quantity,
  basis: PeakBasis,
  sampled: number,
  place: PeakPlace = anywhere(basis),
): number | null {
  const { member, series, gaugeTime, released, span, loads = [] } = basis;
  const { rigid } = series.tail;
  const { damping } = member;
  const flux = quantity === 'force' || quantity === 'stress';
  const scale = quantity === 'stress' ? place.stressFactor : 1;

  const { whole } = series.tail;
  const all = tailFactors(quantity, whole.energies, damping, 0, gaugeTime, released, whole.loads);
  const ceiling = all.exists
    ? product(all.onFlexibility, Math.sqrt(place.flexibility)) +
      product(all.onFluxInertia, Math.sqrt(place.fluxInertia))
    : Number.POSITIVE_INFINITY;

  const { tail } = series;
  const rest = tailFactors(quantity, tail.energies, damping, tail.kept, gaugeTime, released, tail.loads);
  const left =
    series.verdict === 'complete'
      ? 0
      : rest.exists
        ? product(rest.onFlexibility, Math.sqrt(place.tailFlexibility)) +
          product(rest.onFluxInertia, Math.sqrt(place.tailFlux))
        : Number.POSITIVE_INFINITY;
  const modal = left + modalSum(quantity, basis, place);
  const still = stillPeak(
    member,
    loads,
    quantity,
    basis.wholeFlexibility ?? basis.flexibility,
    gaugeTime,
    span,
  );
  const pushed = rigidPush(basis);
  const path = rigid.position + rigid.velocity * span + 0.5 * pushed * span * span;
  const speed = rigid.velocity + pushed * span;
  const drift = {
    displacement: path,
    relativeDisplacement: path,
    velocity: speed,
    acceleration: speed * damping.massCoefficient + pushed,
    force: 0,
    stress: 0,
  }[quantity];
  const rounding =
    roundingFactors(quantity, member, series.rounding, whole.energies.nextOmega, gaugeTime) *
      Math.sqrt(flux ? whole.member.fluxInertia : basis.flexibility) +
    rigidRounding(quantity, rigid, span, gaugeTime, damping.massCoefficient) +
    loadRounding(
      quantity,
      loads,
      series.modes[0],
      loadedPlace(member, basis.wholeFlexibility ?? basis.flexibility, span, gaugeTime),
    );
  // the modes under loads hold the rigid-body mode already
  const moving = loads.length > 0 ? Math.min(ceiling + drift, modal) : Math.min(ceiling, modal) + drift;
  const known = Math.min(
    (moving + still + rounding) * scale,
    sampledLimit(quantity, basis, sampled, left, place),
  );
  const limit = known * (1 + 1e-12);
  return Number.isFinite(limit) ? limit : null;
}

/** Amplitudes of the kept modes, added up: those of free motion, or under loads how far they were seen to go. */
function modalSum(quantity: Quantity, basis: PeakBasis, place: PeakPlace): number {
  const { member, series, reaches, gaugeTime, loads = [] } = basis;
  const flux = quantity === 'force' || quantity === 'stress';
  return series.modes.reduce((sum, kept, n) => {
    const { omega, order } = kept.mode.frequency;
    const loaded = loads.length > 0;
    if (omega === 0 && (!loaded || flux)) return sum;
    const amplitude = loaded
      ? coordinateReach(quantity, member, kept, reaches[n], gaugeTime)
      : modalAmplitude(quantity, omega, Math.sqrt(2 * kept.start.energy), member, order);
    return sum + (flux ? place.fluxOf(n) : place.displacementOf(n)) * amplitude;
  }, 0);
}

/**
 * Limit from the samples, of a displacement and in free motion of velocity, force and stress: the largest with its bound, what the kept modes and the supports
 * rise between the samples, and twice what the modes left out have, their quasi-static part included.
 */
function sampledLimit(
  quantity: Quantity,
  basis: PeakBasis,
  sampled: number,
  left: number,
  place: PeakPlace,
): number {
  const { member, series, reaches, grid, loads = [], span, gaugeTime } = basis;
  const flux = quantity === 'force' || quantity === 'stress';
  if (quantity !== 'displacement' && quantity !== 'relativeDisplacement') {
    if (loads.length > 0) return Number.POSITIVE_INFINITY;
    const heightAt = place.single ? (flux ? place.fluxOf : place.displacementOf) : null;
    const rise = freeRiseBetween(quantity, member, series.modes, reaches, grid, gaugeTime, heightAt);
    const scale = quantity === 'stress' ? place.stressFactor : 1;
    return sampled + (rise + 2 * left) * scale;
  }
  // a massless stretch has a quasi-static part of its own beside the modes
  if (loads.length > 0 && member.inertia.some((rho) => rho === 0)) return Number.POSITIVE_INFINITY;
  const { tail } = series;
  const still = product(tail.loads.still, Math.sqrt(place.tailFlexibility));
  const distance = place.single ? 0 : Math.max(0.5 * grid.spacing, grid.edge);
  const supported = quantity === 'displacement' ? supportRise(member, loads, grid.step, distance, span) : 0;
  const rise = riseBetween(member, series.modes, reaches, grid, place.single ? place.displacementOf : null);
  return sampled + rise + supported + 2 * (left + still);
}

/** Largest acceleration of the rigid-body mode under the loads, m/s². */
function rigidPush(basis: PeakBasis): number {
  const [first] = basis.series.modes;
  if (first.mode.frequency.omega > 0) return 0;
  const height = first.mode.shape.ends[0];
  return (basis.loads ?? []).reduce((sum, load, index) => {
    const drive = load.moving
      ? Math.abs(load.moving.force) * height
      : Math.abs(first.factors[index]) * (load.measures?.largest ?? 0);
    return sum + drive * height;
  }, 0);
}

/** Largest |q|, |q′|, |q″| or |q + β q′| of a mode of amplitude √2E. */
function modalAmplitude(
  quantity: Quantity,
  omega: number,
  amplitude: number,
  member: WaveMember,
  order: number,
): number {
  const { damping } = member;
  const beta = damping.stiffnessCoefficient;
  const rate = damping.massCoefficient / omega + 2 * largestRatioAbove(damping, order - 1) + beta * omega;
  switch (quantity) {
    case 'displacement':
    case 'relativeDisplacement':
      return amplitude / omega;
    case 'velocity':
      return amplitude;
    case 'acceleration':
      return amplitude * omega * Math.hypot(1, rate);
    case 'force':
    case 'stress':
      return (amplitude / omega) * Math.hypot(1, beta * omega);
  }
}

function product(factor: number, size: number): number {
  return factor === 0 || size === 0 ? 0 : factor * size;
}

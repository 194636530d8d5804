import type { WaveMember } from '../members/wave-member.ts';
import { ENDS, waveNumberSquare, type ModeShape } from '../modes/mode-shape.ts';
import { peakDisplacement } from '../modes/shape-figures.ts';
import type { AppliedLoad } from '../motion/applied-loads.ts';
import { largestRatioAbove } from '../motion/modal-damping.ts';
import { stillPeak } from '../motion/still-peaks.ts';
import type { Quantity } from '../spec/types.ts';
import type { KeptSeries } from './kept-modes.ts';
import { tailFactors } from './quantity-bounds.ts';

/** What the peak limits of all quantities need. */
export interface PeakBasis {
  readonly member: WaveMember;
  readonly series: KeptSeries;
  /** Largest G over the member, m/N. */
  readonly flexibility: number;
  /** The same with what massless stretches add between held ends. */
  readonly wholeFlexibility?: number;
  readonly loads?: readonly AppliedLoad[];
  readonly gaugeTime: number;
  readonly released: boolean;
  /** Latest sampled time, gauge time included, s. */
  readonly span: number;
}

/**
 * An upper limit on |quantity| over the whole member and all times up to the span: the smaller of
 * the ceiling known from the energies alone and the sum of the kept modes' amplitudes plus the tail
 * bound. Of averages where a gauge time is given. Null where no limit exists.
 */
export function peakLimit(quantity: Quantity, basis: PeakBasis): number | null {
  const { member, series, gaugeTime, released, span, loads = [] } = basis;
  const { rigid } = series.tail;
  const { damping } = member;
  const flux = quantity === 'force' || quantity === 'stress';
  const scale = quantity === 'stress' ? Math.max(...member.stressFactor) : 1;

  const { whole } = series.tail;
  const all = tailFactors(quantity, whole.energies, damping, 0, gaugeTime, released, whole.loads);
  const ceiling = all.exists
    ? product(all.onFlexibility, Math.sqrt(basis.flexibility)) +
      product(all.onFluxInertia, Math.sqrt(whole.member.fluxInertia))
    : Number.POSITIVE_INFINITY;

  const { tail } = series;
  const rest = tailFactors(quantity, tail.energies, damping, tail.kept, gaugeTime, released, tail.loads);
  const left =
    series.verdict === 'complete'
      ? 0
      : rest.exists
        ? product(rest.onFlexibility, Math.sqrt(tail.member.flexibility)) +
          product(rest.onFluxInertia, Math.sqrt(tail.member.fluxInertia))
        : Number.POSITIVE_INFINITY;
  let modal = loads.length > 0 ? Number.POSITIVE_INFINITY : left;
  if (Number.isFinite(modal)) {
    for (const { mode, start } of series.modes) {
      const { omega } = mode.frequency;
      if (omega === 0) continue;
      const shape = flux ? peakFlux(member, mode.shape) : peakDisplacement(member, mode.shape);
      modal +=
        shape * modalAmplitude(quantity, omega, Math.sqrt(2 * start.energy), member, mode.frequency.order);
    }
  }
  const still = stillPeak(
    member,
    loads,
    quantity,
    basis.wholeFlexibility ?? basis.flexibility,
    gaugeTime,
    span,
  );
  const elastic = Math.min(ceiling, modal) + still;
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
  const limit = (elastic + drift) * scale * (1 + 1e-12);
  return Number.isFinite(limit) ? limit : null;
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

/** Largest |p| of a shape over the member. Cost O(segments). */
function peakFlux(member: WaveMember, shape: ModeShape): number {
  let peak = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    const u = shape.ends[ENDS * i];
    const p = shape.ends[ENDS * i + 1];
    peak = Math.max(peak, Math.abs(p), Math.abs(shape.ends[ENDS * i + 3]));
    const k2 = waveNumberSquare(member, i, shape.lambda);
    if (k2 > 0) {
      const impedance = member.stiffness[i] * Math.sqrt(k2);
      if (u * shape.ends[ENDS * i + 2] <= 0 || Math.sqrt(k2) * member.length[i] > Math.PI) {
        peak = Math.max(peak, Math.hypot(impedance * u, p));
      }
    }
  }
  return peak;
}

function product(factor: number, size: number): number {
  return factor === 0 || size === 0 ? 0 : factor * size;
}

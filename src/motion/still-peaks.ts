import type { WaveMember } from '../members/wave-member.ts';
import type { Quantity } from '../spec/types.ts';
import type { AppliedLoad } from './applied-loads.ts';
import { historyAmount } from './history-measures.ts';
import { complianceRounding } from './loaded-static.ts';
import { supportState } from './support-shape.ts';

/**
 * An upper limit of the quasi-static part that is added outside the modes, anywhere on the member up to
 * the span: max|p| √(C G) of a load's displacement (|w| ≤ √(C G)), its whole force for the flux (no
 * influence line exceeds 1), |y| max|r| of a support, P G of a moving force; velocities with the rates,
 * averages with the change over the gauge time. Infinite where p jumps and no gauge time is given.
 *
 * @param flexibility largest G over the member, m/N
 */
export function stillPeak(
  member: WaveMember,
  loads: readonly AppliedLoad[],
  quantity: Quantity,
  flexibility: number,
  gaugeTime: number,
  span: number,
): number {
  return loads.reduce((sum, load) => sum + peakOf(member, load, quantity, flexibility, gaugeTime, span), 0);
}

function peakOf(
  member: WaveMember,
  load: AppliedLoad,
  quantity: Quantity,
  flexibility: number,
  gaugeTime: number,
  span: number,
): number {
  const flux = quantity === 'force' || quantity === 'stress';
  if (load.moving !== null) {
    const force = Math.abs(load.moving.force);
    if (quantity === 'displacement' || quantity === 'relativeDisplacement') return force * flexibility;
    if (quantity === 'velocity' && gaugeTime > 0) return (2 * force * flexibility) / gaugeTime;
    // no influence line exceeds 1; the acceleration is that of the modes
    return flux && gaugeTime > 0 ? force : Infinity;
  }
  const { measures, still } = load;
  if (measures === null || still === null) return Infinity;
  const reach = Math.sqrt((still.compliance + complianceRounding(member, load, flexibility)) * flexibility);
  const amount = historyAmount(measures);
  const support = load.support === null ? null : load.support.motion.peaks(span);
  const shape = load.support === null ? 0 : largestSupport(member, load, false);
  switch (quantity) {
    case 'relativeDisplacement':
      return measures.largest * reach;
    case 'displacement':
      return measures.largest * reach + (support?.position ?? 0) * shape;
    case 'velocity': {
      const rate =
        gaugeTime > 0
          ? Math.min(measures.largestRate + amount.jumps / gaugeTime, amount.whole / gaugeTime)
          : amount.jumps > 0
            ? Infinity
            : measures.largestRate;
      return rate * reach + (support?.velocity ?? 0) * shape;
    }
    case 'acceleration':
      return gaugeTime > 0 ? ((2 * (support?.velocity ?? 0)) / gaugeTime) * shape : Infinity;
    case 'force':
    case 'stress': {
      const kicks = gaugeTime > 0 ? measures.weighedKicks(0) / gaugeTime : 0;
      const beta = member.damping.stiffnessCoefficient;
      const carried =
        support === null
          ? 0
          : (support.position + beta * support.velocity) * largestSupport(member, load, true);
      return (measures.largest + kicks) * load.totalForce + carried;
    }
  }
}

/** Largest |r| or |k r′| of a support's static shape: both are largest at segment ends. */
function largestSupport(member: WaveMember, load: AppliedLoad, flux: boolean): number {
  const shape = load.support?.shape;
  if (!shape) return 0;
  let largest = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    for (const distance of [0, member.length[i]]) {
      const state = supportState(member, shape, i, distance);
      largest = Math.max(largest, Math.abs(flux ? state.flux : state.displacement));
    }
  }
  return largest;
}

/**
 * What y(t) r(x) of the supports rises between the samples of a grid: |r| min(|y′| h/2, |y″| h²/8) and
 * |y r′| times the distance to a station, m.
 *
 * @param step longest time between samples, s
 * @param distance from any place to the nearest station at most, m
 */
export function supportRise(
  member: WaveMember,
  loads: readonly AppliedLoad[],
  step: number,
  distance: number,
  span: number,
): number {
  return loads.reduce((sum, load) => {
    if (load.support === null) return sum;
    const { position, velocity } = load.support.motion.peaks(span);
    const measures = load.measures;
    const smooth = measures !== null && measures.weighedKicks(0) === 0;
    const acceleration = smooth
      ? measures.largest + member.damping.massCoefficient * velocity
      : Number.POSITIVE_INFINITY;
    const inTime = Math.min(0.5 * velocity * step, smooth ? 0.125 * acceleration * step * step : Infinity);
    let slope = 0;
    for (let i = 0; i < member.segmentCount; i++) {
      for (const at of [0, member.length[i]]) {
        const { flux } = supportState(member, load.support.shape, i, at);
        slope = Math.max(slope, Math.abs(flux) / member.stiffness[i]);
      }
    }
    return sum + largestSupport(member, load, false) * inTime + position * slope * distance;
  }, 0);
}

import type { WaveMember } from '../members/wave-member.ts';
import { peakDisplacement, peakSlope } from '../modes/shape-figures.ts';
import type { AppliedLoad } from '../motion/applied-loads.ts';
import { changeWithin, historyAmount } from '../motion/history-measures.ts';
import { dampingRate } from '../motion/modal-damping.ts';
import type { SampledReach } from '../motion/instant.ts';
import type { Quantity } from '../spec/types.ts';
import type { KeptMode } from './kept-modes.ts';

/** The loads' change between neighbouring sampled instants, one entry a load. */
export interface Between {
  /** Longest time from a sampled instant to the next, gauge time included, s. */
  readonly gap: number;
  readonly gaugeTime: number;
  /** Latest time, gauge time included, s. */
  readonly span: number;
  readonly changes: readonly {
    readonly variation: number;
    readonly kicks: number;
    /** Largest |p|, largest |p′|, sum of the jumps of p, variation of p over the gauge time. */
    readonly largest: number;
    readonly rate: number;
    readonly jumps: number;
    readonly gauged: number;
  }[];
}

/** Measures the loads between the sampled instants. Cost: O(samples) of the histories. */
export function measureBetween(
  loads: readonly AppliedLoad[],
  times: Float64Array,
  gaugeTime: number,
): Between {
  let gap = 0;
  for (let j = 1; j < times.length; j++) gap = Math.max(gap, times[j] - times[j - 1]);
  gap += gaugeTime;
  const changes = loads.map(({ measures }) =>
    measures === null
      ? { variation: 0, kicks: 0, largest: 0, rate: 0, jumps: 0, gauged: 0 }
      : {
          ...changeWithin(measures, gap),
          largest: measures.largest,
          rate: measures.largestRate,
          jumps: historyAmount(measures).jumps,
          gauged: changeWithin(measures, gaugeTime).variation,
        },
  );
  const span = (times.length > 0 ? times[times.length - 1] : 0) + gaugeTime;
  return { gap, gaugeTime, span, changes };
}

/** How far a kept mode and its loads go in the sampled time span, between the samples too. */
export interface ModeReach {
  readonly omega: number;
  /** sup|(q − ΣF p/ω², q′/ω)|; of a rigid-body mode sup|q|. */
  readonly position: number;
  /** ω times that; of a rigid-body mode sup|q′|. */
  readonly velocity: number;
  /** sup|ΣF p|, sup|ΣF p′| and the variation of ΣF p over the gauge time. */
  readonly push: number;
  readonly rate: number;
  readonly gauged: number;
  /** Σ|kicks of q′| in a gap. */
  readonly kicked: number;
}

/**
 * In the norm (q − ΣF p/ω², q′/ω) free motion never grows, and the loads add at most F (variation of p)/ω²
 * and F |kick|/ω from one sampled instant to the next. Where the samples lie far apart, what the loads can
 * give it at all is less.
 */
export function reachOfMode(
  member: WaveMember,
  kept: KeptMode,
  sampled: SampledReach | undefined,
  loads: readonly AppliedLoad[],
  between: Between,
): ModeReach {
  const { mode, factors, start, forced } = kept;
  const { omega } = mode.frequency;
  const { gap, gaugeTime } = between;
  let push = 0;
  let moved = 0;
  let kicked = 0;
  let rate = 0;
  let gauged = 0;
  loads.forEach((load, index) => {
    if (load.moving !== null) {
      const force = Math.abs(load.moving.force);
      const height = peakDisplacement(member, mode.shape);
      const change = peakSlope(member, mode.shape) * load.moving.pace;
      // it may enter or leave where the shape is not 0
      moved += force * (change * gap + 2 * height);
      rate += force * change;
      gauged += force * Math.min(change * gaugeTime + 2 * height, 2 * height);
      push += force * height;
      return;
    }
    const factor = Math.abs(factors[index]);
    const change = between.changes[index];
    moved += factor * change.variation;
    kicked += factor * change.kicks;
    rate += factor * change.rate;
    gauged += factor * Math.min(change.gauged, 2 * change.largest);
    push += factor * change.largest;
  });
  const shared = { omega, push, rate, gauged, kicked };
  if (omega === 0) {
    const velocity = (sampled?.velocity ?? Math.abs(start.velocity)) + push * gap + kicked;
    const position =
      sampled === undefined
        ? Math.abs(start.position) + velocity * between.span
        : sampled.position + velocity * gap;
    return { ...shared, velocity, position };
  }
  const soft = 1 / (omega * omega);
  const position = Math.min(
    (sampled?.position ?? Infinity) + moved * soft + kicked / omega,
    (Math.sqrt(2 * start.energy) + forced) / omega + push * soft,
  );
  return { ...shared, position, velocity: omega * position };
}

/**
 * Largest |coordinate| of a quantity of a mode: what φ_n(x), or p_n(x) for the flux, is multiplied by. Of
 * the flux of a rigid-body mode 0.
 */
export function coordinateReach(
  quantity: Quantity,
  member: WaveMember,
  kept: KeptMode,
  reach: ModeReach,
  gaugeTime: number,
): number {
  const { mode } = kept;
  const { omega, position, velocity, push, rate, gauged, kicked } = reach;
  const flux = quantity === 'force' || quantity === 'stress';
  const gauge = gaugeTime > 0 ? 1 / gaugeTime : 0;
  if (omega === 0) {
    if (flux) return 0;
    if (quantity === 'velocity') return velocity;
    if (quantity !== 'acceleration') return position;
    return velocity * member.damping.massCoefficient + push + kicked * gauge;
  }
  const soft = 1 / (omega * omega);
  const damped = dampingRate(member.damping, mode.frequency.order, omega) / omega;
  switch (quantity) {
    case 'displacement':
    case 'relativeDisplacement':
      return position;
    case 'velocity':
      return gaugeTime > 0
        ? Math.min(2 * position * gauge, velocity + soft * gauged * gauge)
        : velocity + soft * rate;
    case 'acceleration': {
      const instant = omega * velocity * Math.hypot(1, damped);
      return gaugeTime > 0 ? Math.min(2 * velocity * gauge, instant + kicked * gauge) : instant;
    }
    case 'force':
    case 'stress': {
      const average = kicked * gauge * soft;
      const total = Math.hypot(1, member.damping.stiffnessCoefficient * omega);
      return position * total + average;
    }
  }
}

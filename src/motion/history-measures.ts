import { modulus, multiply } from '../numerics/complex.ts';
import type { Kick } from './forced-motion.ts';
import type { HistoryPart } from './history.ts';

/** How much a drive p(t) changes from rest up to a time: what bounds of the modes left out need. */
export interface HistoryMeasures {
  /** Jumps of p with the jump of p′ at the same instant. */
  readonly jumps: readonly { readonly value: number; readonly slope: number }[];
  /** Variation of p between jumps, and of p′ between jumps (jumps of p′ alone included). */
  readonly variation: number;
  readonly slopeVariation: number;
  /** Largest |p| and |p′|. */
  readonly largest: number;
  readonly largestRate: number;
  /** sup over t of Σ e^{−γ(t−s)}|kick| of q′. */
  weighedKicks(gamma: number): number;
  /** Amplitude and Ω, when p is one harmonic that never ends. */
  readonly harmonic: { readonly amplitude: number; readonly omega: number } | null;
  /**
   * sup over t of ∫e^{−γ(t−s)} (|dp| a + |dp′| b), jumps included, for long records; for others the
   * same without the weight. One for each of up to three weightings, for about the cost of one.
   */
  weighed(gamma: number, weightings: readonly Weighting[]): number[];
}

/** Weights a of |dp| and b of |dp′|. */
export interface Weighting {
  readonly onValue: number;
  readonly onSlope: number;
}

/** |dp| alone. */
export const VALUES_ONLY: Weighting = { onValue: 1, onSlope: 0 };

/** Measures of a drive of a few parts up to the span, s. */
export function measureParts(
  parts: readonly HistoryPart[],
  kicks: readonly Kick[],
  span: number,
): HistoryMeasures {
  const jumps: { value: number; slope: number }[] = [];
  let variation = 0;
  let slopeVariation = 0;
  let largest = 0;
  let largestRate = 0;
  let value = 0;
  let slope = 0;
  let reached = Number.NEGATIVE_INFINITY;
  const jump = (toValue: number, toSlope: number): void => {
    const size = Math.abs(toValue - value);
    // a joint smooth to rounding is no jump
    if (size > 1e-13 * Math.max(Math.abs(value), Math.abs(toValue))) {
      jumps.push({ value: size, slope: Math.abs(toSlope - slope) });
    } else {
      slopeVariation += Math.abs(toSlope - slope);
    }
  };
  for (const part of parts) {
    if (part.from > span) break;
    if (part.from > reached && Number.isFinite(reached)) {
      jump(0, 0);
      value = 0;
      slope = 0;
    }
    const h = Math.min(part.to, span) - part.from;
    const ends = partEnds(part, h);
    jump(ends.value0, ends.slope0);
    variation += ends.variation;
    slopeVariation += ends.slopeVariation;
    largest = Math.max(largest, ends.largest);
    largestRate = Math.max(largestRate, ends.largestRate);
    value = ends.value1;
    slope = ends.slope1;
    reached = part.to;
  }
  if (reached <= span) jump(0, 0);
  const total = kicks.reduce((sum, kick) => (kick.time <= span ? sum + Math.abs(kick.amount) : sum), 0);
  return {
    jumps,
    variation,
    slopeVariation,
    largest,
    largestRate,
    weighedKicks: () => total,
    harmonic: harmonicOf(parts),
    weighed: (gamma, weightings) =>
      weightings.map(({ onValue, onSlope }) => {
        const sudden = jumps.reduce(
          (sum, one) => sum + Math.hypot(one.value * onValue, one.slope * onSlope),
          0,
        );
        const held = Math.min(span, gamma > 0 ? 1 / gamma : Number.POSITIVE_INFINITY);
        const steady = Math.min(variation, largestRate * held) * onValue;
        return sudden + steady + slopeVariation * onSlope;
      }),
  };
}

interface PartEnds {
  readonly value0: number;
  readonly slope0: number;
  readonly value1: number;
  readonly slope1: number;
  readonly variation: number;
  readonly slopeVariation: number;
  readonly largest: number;
  readonly largestRate: number;
}

function partEnds(part: HistoryPart, h: number): PartEnds {
  if (part.kind === 'linear') {
    const value1 = part.value + h * (part.slope + 0.5 * h * part.curve);
    const slope1 = part.slope + h * part.curve;
    const largestRate = Math.max(Math.abs(part.slope), Math.abs(slope1));
    return {
      value0: part.value,
      slope0: part.slope,
      value1,
      slope1,
      variation: part.curve === 0 ? Math.abs(value1 - part.value) : largestRate * h,
      slopeVariation: Math.abs(slope1 - part.slope),
      largest: Math.max(Math.abs(part.value), Math.abs(value1)) + 0.125 * h * h * Math.abs(part.curve),
      largestRate,
    };
  }
  let sum: PartEnds = {
    value0: 0,
    slope0: 0,
    value1: 0,
    slope1: 0,
    variation: 0,
    slopeVariation: 0,
    largest: 0,
    largestRate: 0,
  };
  for (const { amplitude, rate } of part.forcings) {
    const size = modulus(amplitude);
    const omega = rate.im;
    const phase = Math.atan2(amplitude.im, amplitude.re);
    const end = phase + omega * h;
    const growth = Math.exp(Math.max(0, rate.re * h));
    const speed = multiply(rate, amplitude);
    const turn = {
      re: Math.exp(rate.re * h) * Math.cos(omega * h),
      im: Math.exp(rate.re * h) * Math.sin(omega * h),
    };
    const pure = rate.re === 0;
    const pace = modulus(rate) * size * growth;
    sum = {
      value0: sum.value0 + amplitude.re,
      slope0: sum.slope0 + speed.re,
      value1: sum.value1 + multiply(amplitude, turn).re,
      slope1: sum.slope1 + multiply(speed, turn).re,
      variation: sum.variation + (pure ? size * cosineVariation(phase, end) : pace * h),
      slopeVariation:
        sum.slopeVariation +
        (pure
          ? size * Math.abs(omega) * cosineVariation(phase + 0.5 * Math.PI, end + 0.5 * Math.PI)
          : pace * modulus(rate) * h),
      largest: sum.largest + size * growth,
      largestRate: sum.largestRate + pace,
    };
  }
  return sum;
}

/** Total variation of cos between two angles. */
function cosineVariation(from: number, to: number): number {
  const gathered = (angle: number): number => {
    const halves = Math.floor(angle / Math.PI);
    return 2 * halves + (1 - Math.cos(angle - halves * Math.PI));
  };
  return Math.abs(gathered(to) - gathered(from));
}

function harmonicOf(parts: readonly HistoryPart[]): HistoryMeasures['harmonic'] {
  const [only] = parts;
  if (parts.length !== 1 || only.kind !== 'wave' || Number.isFinite(only.to)) return null;
  if (only.forcings.length !== 1 || only.forcings[0].rate.re !== 0) return null;
  return { amplitude: modulus(only.forcings[0].amplitude), omega: Math.abs(only.forcings[0].rate.im) };
}

/** Jumps of p together, and its whole variation. */
export function historyAmount(measures: HistoryMeasures): { readonly jumps: number; readonly whole: number } {
  const jumps = measures.jumps.reduce((sum, jump) => sum + jump.value, 0);
  return { jumps, whole: jumps + measures.variation };
}

/**
 * Variation of p, and sum of the kicks of q′, within any window of a given length at most: from the rate,
 * or from e ∫e^{−(t−s)/window}, whichever is less.
 */
export function changeWithin(
  measures: HistoryMeasures,
  window: number,
): { readonly variation: number; readonly kicks: number } {
  if (window === 0) return { variation: 0, kicks: 0 };
  const { jumps, whole } = historyAmount(measures);
  return {
    variation: Math.min(
      whole,
      measures.largestRate * window + jumps,
      Math.E * measures.weighed(1 / window, [VALUES_ONLY])[0],
    ),
    kicks: Math.min(measures.weighedKicks(0), Math.E * measures.weighedKicks(1 / window)),
  };
}

import type { WaveMember } from '../members/wave-member.ts';
import { PhaseSweep } from './phase-sweep.ts';
import { canDriftFreely, firstFrequencyEstimate, modeCount, travelTime } from './spectrum-size.ts';

/** A natural frequency with the interval whose two sides were counted. */
export interface NaturalFrequency {
  /** Mode number, from 1. */
  readonly order: number;
  /** ω_n, rad/s; 0 for a rigid-body mode. */
  readonly omega: number;
  /** At most n − 1 natural frequencies lie below it, rad/s. */
  readonly lower: number;
  /** At least n natural frequencies lie below it, rad/s. */
  readonly upper: number;
  /** Segment in which most of the mode's inertia moves. */
  readonly joint: number;
}

/** Sweeps after which a bracket is halved whatever the interpolation says. */
const PATIENCE = 6;
/** Sweeps allowed a mode; a bracket of doubles is exhausted by bisection long before. */
const SWEEP_LIMIT = 400;

/**
 * The natural frequencies of a member in ascending order, each bracketed by count, none missed.
 *
 * Each is refined on the counted phase ({@link PhaseSweep}) by inverse cubic Hermite interpolation
 * on the last two sweeps, safeguarded by the bracket; then both sides of an interval as wide as the
 * rounding error of the phase allows are counted. If the counts do not confirm it, the search goes
 * on with what they taught.
 *
 * Accuracy: about 2⁻⁵² ω (4 + condition), the half width of the interval.
 * Cost: 5 to 9 sweeps a mode, O(segments) each, more where a barrier or a heavy lump parts the member
 * into wells (up to some 50 for a pair closer than rounding).
 */
export class NaturalFrequencies {
  /** Number of modes of the member: infinite unless all inertia is lumped. */
  readonly total: number;
  /** Time for a wave to pass the member, s. */
  readonly travelTime: number;
  private readonly phase: PhaseSweep;
  private readonly firstGuess: number;
  private readonly longestSlope: number;
  private order = 0;
  private previous = 0;
  private beforePrevious = 0;
  private joint = 0;
  /** Largest trial known to have fewer than `order + 1` frequencies below it. */
  private floor = 0;
  private floorResidual = Number.NaN;
  /** Trials beyond the present mode: ω with the count below, any order. */
  private ahead: { omega: number; below: number; phase: number }[] = [];

  constructor(member: WaveMember) {
    this.phase = new PhaseSweep(member);
    this.total = modeCount(member);
    this.travelTime = travelTime(member);
    this.longestSlope = this.travelTime > 0 ? 1.5 * this.travelTime : Number.POSITIVE_INFINITY;
    this.firstGuess = firstFrequencyEstimate(member);
    if (canDriftFreely(member)) this.order = -1;
  }

  /** Sweeps made so far. */
  get sweeps(): number {
    return this.phase.sweeps;
  }

  /** Number of natural frequencies strictly below ω (rad/s > 0). Cost: one sweep. */
  countBelow(omega: number): number {
    this.phase.sweep(omega, 1, this.joint);
    return Math.min(this.phase.below, this.total);
  }

  /** The next mode, or null when the member has no more. */
  next(): NaturalFrequency | null {
    if (this.order === -1) {
      this.order = 1;
      return { order: 1, omega: 0, lower: 0, upper: 0, joint: 0 };
    }
    if (this.order >= this.total) return null;
    const found = this.find(this.order + 1);
    this.order++;
    this.beforePrevious = this.previous;
    this.previous = found.omega;
    return found;
  }

  private guess(n: number): number {
    if (this.previous === 0) return this.firstGuess;
    const even = this.travelTime > 0 ? Math.PI / this.travelTime : this.previous;
    const last = n > 2 && this.beforePrevious > 0 ? this.previous - this.beforePrevious : even;
    // the mean spacing of high modes; lumps make low ones wider or closer
    return this.previous + (this.travelTime * this.previous > 6 ? even : Math.min(even, 2 * last));
  }

  private find(n: number): NaturalFrequency {
    const { phase } = this;
    let low = this.floor;
    let lowResidual = this.floorResidual;
    let high = Number.POSITIVE_INFINITY;
    let highResidual = Number.NaN;
    const learn = (omega: number): void => {
      if (phase.below >= n) {
        if (omega < high) {
          high = omega;
          highResidual = phase.residual;
        }
        this.ahead.push({ omega, below: phase.below, phase: phase.residual + n * Math.PI });
      } else if (omega > low) {
        low = omega;
        lowResidual = phase.residual;
      }
    };
    this.ahead = this.ahead.filter((trial) => {
      if (trial.below >= n && trial.omega < high) {
        high = trial.omega;
        highResidual = trial.phase - n * Math.PI;
      } else if (trial.below < n && trial.omega > low) {
        low = trial.omega;
        lowResidual = trial.phase - n * Math.PI;
      }
      return trial.below >= n;
    });
    const between = (): number => {
      if (high === Number.POSITIVE_INFINITY) return 2 * Math.max(low, this.firstGuess);
      if (low === 0) return high * 0.25;
      return high > 4 * low ? Math.sqrt(low * high) : low + 0.5 * (high - low);
    };

    let joint = -1;
    let omega = this.guess(n);
    if (!(omega > low && omega < high)) {
      const share = lowResidual / (lowResidual - highResidual);
      omega = share > 0.01 && share < 0.99 ? low + share * (high - low) : between();
    }
    let lastOmega = 0;
    let lastResidual = 0;
    let lastSlope = 0;
    let lastJoint = -1;
    let shrinkFrom = Number.POSITIVE_INFINITY;
    let patience = PATIENCE;
    for (let step = 0; step < SWEEP_LIMIT; step++) {
      if (joint < 0) joint = phase.survey(omega, n, this.longestSlope);
      else phase.sweep(omega, n, joint);
      learn(omega);
      const { residual, slope } = phase;
      let target = omega - residual / slope;
      let certainty = Math.abs(residual) < 1 ? residual * residual : 1;
      if (lastJoint === joint && lastOmega !== omega) {
        const cubic = inverseHermite(omega, residual, slope, lastOmega, lastResidual, lastSlope);
        if (Number.isFinite(cubic) && Math.abs(cubic - target) < 0.5 * Math.abs(omega - target) + 1e-300) {
          target = cubic;
          certainty *= Math.min(1, lastResidual * lastResidual);
        }
      }
      // what is left after the interpolation, rad, must vanish beside the width to be counted
      const width = 4 * Number.EPSILON * omega * slope + phase.noise;
      const settled = 30 * certainty < width || Math.abs(target - omega) < 2 * Number.EPSILON * omega;
      if (settled && target > low * (1 - 1e-12) && target < high * (1 + 1e-12)) {
        const proven = this.enclose(n, target, joint, learn);
        if (proven) {
          this.joint = phase.liveliest;
          return proven;
        }
        if (adjacent(low, high)) return this.closed(n, low, high);
        patience = 0;
      }
      lastOmega = omega;
      lastResidual = residual;
      lastSlope = slope;
      lastJoint = joint;
      if (high - low < 0.5 * shrinkFrom) {
        shrinkFrom = high - low;
        patience = PATIENCE;
      } else {
        patience--;
      }
      if (patience <= 0 || !(target > low && target < high)) {
        if (adjacent(low, high)) return this.closed(n, low, high);
        joint = -1;
        target = this.fallback(low, lowResidual, high, highResidual, patience <= 0, between);
        if (patience <= 0) patience = PATIENCE;
      }
      omega = target;
    }
    return this.closed(n, low, high);
  }

  /** A trial inside the bracket when interpolation leaves it. */
  private fallback(
    low: number,
    lowResidual: number,
    high: number,
    highResidual: number,
    halve: boolean,
    between: () => number,
  ): number {
    const share = lowResidual / (lowResidual - highResidual);
    if (halve || !(share > 0.05 && share < 0.95)) return between();
    return low + share * (high - low);
  }

  /** Counts both sides of an interval around ω; null when the counts do not confirm it. */
  private enclose(
    n: number,
    omega: number,
    joint: number,
    learn: (omega: number) => void,
  ): NaturalFrequency | null {
    const { phase } = this;
    const half = Math.max(4 * Number.EPSILON * omega + phase.noise / phase.slope, Number.MIN_VALUE);
    const lower = omega - half;
    const upper = omega + half;
    phase.sweep(lower, n, joint);
    learn(lower);
    if (phase.below >= n) return null;
    const residualBelow = phase.residual;
    phase.sweep(upper, n, joint);
    learn(upper);
    if (phase.below < n) return null;
    const share = residualBelow / (residualBelow - phase.residual);
    const centre = share >= 0 && share <= 1 ? lower + share * (upper - lower) : omega;
    this.floor = lower;
    this.floorResidual = residualBelow - Math.PI;
    return { order: n, omega: centre, lower, upper, joint: phase.liveliest };
  }

  /** The bracket itself, when no double lies between its sides; widened by the rounding of ω. */
  private closed(n: number, low: number, high: number): NaturalFrequency {
    const half = 4 * Number.EPSILON * high;
    this.floor = low - half;
    this.floorResidual = Number.NaN;
    this.joint = this.phase.liveliest;
    return { order: n, omega: high, lower: low - half, upper: high + half, joint: this.phase.liveliest };
  }
}

function adjacent(low: number, high: number): boolean {
  return high < Number.POSITIVE_INFINITY && high - low <= Number.EPSILON * high;
}

/** x at which the cubic through two points of known slope, read as x(y), passes y = 0. */
function inverseHermite(x0: number, y0: number, s0: number, x1: number, y1: number, s1: number): number {
  const h = y1 - y0;
  const t = -y0 / h;
  const d0 = h / s0;
  const d1 = h / s1;
  const dx = x1 - x0;
  const t2 = t * t;
  return x0 + dx * t2 * (3 - 2 * t) + d0 * t * (1 - t) * (1 - t) - d1 * t2 * (1 - t);
}

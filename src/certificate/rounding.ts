import type { Mode } from '../modes/mode-series.ts';
import type { ModalStart } from '../motion/modal-projection.ts';

const EPS = Number.EPSILON;

/** A balance off by so many rounding floors is a fault; below it is rounding, and widens the bound. */
export const FAULT_MARGIN = 16;

/**
 * Rounding of the computed fields, mode by mode: ω_n is known to δω_n, so its phase is off by up to
 * t δω_n after the time t; shape and coefficients are off by the phase error over the member and by
 * the rounding of their closed forms. By Cauchy–Schwarz the sum over the kept modes is at most
 *
 *   √G(x) √Σ ε_n²  (displacement),   √H(x) √Σ ω_n² ε_n²  (force),   ε_n in √J,
 *
 * and summing N products costs (64 + N/64) 2⁻⁵² of the sums of magnitudes (blocks of 64).
 */
export class Rounding {
  private readonly span: number;
  private readonly travelTime: number;
  private readonly segments: number;
  private readonly squares = [0, 0, 0, 0];
  private readonly magnitudes = [0, 0, 0, 0];
  private count = 0;
  /** Error of the mode added last: of E_n, J. */
  slack = 0;

  /**
   * @param span latest sampled time, s
   * @param travelTime wave travel time of the member, s
   * @param segments number of segments
   */
  constructor(span: number, travelTime: number, segments: number) {
    this.span = span;
    this.travelTime = travelTime;
    this.segments = segments;
  }

  /**
   * Adds a kept mode.
   *
   * @param forced amplitude √J that loads can give it
   */
  add(mode: Mode, start: ModalStart, forced = 0): void {
    const { omega, lower, upper } = mode.frequency;
    const half = 0.5 * (upper - lower);
    const shapeError = shapeRounding(mode, this.travelTime, this.segments) + 64 * EPS;
    const coefficient = shapeError * (start.positionScale + start.velocityScale);
    const phase = Math.min(2, this.span * (half + 4 * EPS * omega) + 16 * EPS);
    const amplitude = Math.sqrt(2 * start.energy);
    const error = (amplitude + forced) * (phase + shapeError) + coefficient;
    this.slack = amplitude * coefficient + coefficient * coefficient;
    const lambda = omega * omega;
    let weight = 1;
    for (let level = 0; level < 4; level++) {
      this.squares[level] += weight * error * error;
      this.magnitudes[level] += weight * (amplitude + forced) ** 2;
      weight *= lambda;
    }
    this.count++;
  }

  /** √Σ(ω^level ε)² with the summation error, √J s^{−level}. */
  level(level: 0 | 1 | 2 | 3): number {
    return Math.sqrt(this.squares[level]) + (64 + this.count / 64) * EPS * Math.sqrt(this.magnitudes[level]);
  }
}

/**
 * Relative error of the values of a shape, against its amplitude about the place: the error of ω
 * turns the phase by ω T of it and the ratio of neighbouring node values by a few of it, and each
 * segment marched rounds once.
 */
export function shapeRounding(mode: Mode, travelTime: number, segments: number): number {
  const { omega, lower, upper } = mode.frequency;
  const relative = (0.5 * (upper - lower)) / (omega || 1) + EPS;
  return (omega * travelTime + 4) * relative + 4 * EPS * segments;
}

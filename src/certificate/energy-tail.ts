import { FAULT_MARGIN } from './rounding.ts';

const EPS = Number.EPSILON;

/**
 * Energy of the initial state at three levels of smoothness and what the kept modes leave of it:
 *
 *   E⁰ = E = Σ E_n,   E¹ = Σ ω_n² E_n,   E² = Σ ω_n⁴ E_n
 *
 * with the totals known in closed form from the data, so that E_tail = E − Σ_{n≤N} E_n exactly. A
 * level is null where the data are not smooth enough for it.
 *
 * The floor 64·2⁻⁵² E + Σ|√2E_n δ_n| covers the rounding of the total and of the coefficients and
 * the mass coupling of close neighbours. A higher level bounds a lower one,
 * E⁰_tail ≤ E¹_tail/ω_{N+1}² ≤ E²_tail/ω_{N+1}⁴, and goes below its subtraction floor.
 */
export class EnergyTail {
  /** Totals of the levels without rigid-body motion, J, J/s², J/s⁴. */
  readonly total: readonly [number, number | null, number | null];
  /** Energy of the elastic modes added, J. */
  captured = 0;
  private readonly rest: [number, number, number];
  private readonly floor: [number, number, number];
  private previousEnergy = 0;

  constructor(
    total: readonly [number, number | null, number | null],
    roundings: readonly [number, number, number] = [0, 0, 0],
  ) {
    this.total = total;
    this.rest = [total[0], total[1] ?? 0, total[2] ?? 0];
    this.floor = [
      64 * EPS * total[0] + roundings[0],
      64 * EPS * (total[1] ?? 0) + roundings[1],
      64 * EPS * (total[2] ?? 0) + roundings[2],
    ];
  }

  /**
   * Takes an elastic mode out.
   *
   * @param energy E_n, J
   * @param lambda ω_n²
   * @param slack error of E_n from its coefficients, J
   * @param coupling mass product with the mode before
   */
  add(energy: number, lambda: number, slack: number, coupling: number): void {
    this.captured += energy;
    const shared = 2 * Math.abs(coupling) * Math.sqrt(energy * Math.max(this.previousEnergy, this.rest[0]));
    let weight = 1;
    for (let level = 0; level < 3; level++) {
      this.rest[level] -= weight * energy;
      this.floor[level] += weight * (slack + shared + 4 * EPS * energy);
      weight *= lambda;
    }
    this.previousEnergy = energy;
  }

  /** Bound on E_tail, J, given ω_{N+1}². */
  energy(nextLambda: number): number {
    return Math.min(
      this.plain(0),
      this.first(nextLambda) / nextLambda,
      this.second() / (nextLambda * nextLambda),
    );
  }

  /** Bound on E¹_tail; infinite where the data are not smooth enough. */
  first(nextLambda: number): number {
    if (this.total[1] === null) return Number.POSITIVE_INFINITY;
    return Math.min(this.plain(1), this.second() / nextLambda);
  }

  /** Bound on E²_tail; infinite where the data are not smooth enough. */
  second(): number {
    return this.total[2] === null ? Number.POSITIVE_INFINITY : this.plain(2);
  }

  /** Whether rounding, not the modes left out, makes most of the energy tail. */
  get atFloor(): boolean {
    return this.rest[0] < this.floor[0];
  }

  /** Energy captured far beyond the total and its floor, J; above 0 only if something is wrong. */
  get excess(): number {
    return -this.rest[0] - FAULT_MARGIN * this.floor[0];
  }

  /**
   * Energy that is missing, J, above 0 only if something is wrong: with every mode taken what is left
   * beyond the floor; before that what is left beyond both floors and the limit E¹_tail/ω_{N+1}².
   */
  missing(nextLambda: number): number {
    const limit = nextLambda === Number.POSITIVE_INFINITY ? 0 : this.first(nextLambda) / nextLambda;
    return this.rest[0] - FAULT_MARGIN * this.floor[0] - limit;
  }

  private plain(level: 0 | 1 | 2): number {
    return Math.abs(this.rest[level]) + this.floor[level];
  }
}

import type { WaveMember } from '../members/wave-member.ts';
import type { AppliedLoad } from '../motion/applied-loads.ts';
import { dissipatedEnergy } from '../motion/dissipation.ts';
import { dampingRate } from '../motion/modal-damping.ts';
import { Instant, type MovedMode } from '../motion/instant.ts';
import { GAUSS_20 } from '../numerics/gauss-legendre.ts';

/** Phase of the quickest mode over one panel of time. */
const PANEL = 8;
/** Panels of time over which the power of loads is integrated at most, and at least. */
const PANELS = 100;
const FEWEST_PANELS = 10;
/** Products of modes and quadrature nodes that the integral may spend beyond that. */
const WORK = 40_000;

/**
 * What loads and damping do to the energy of each mode, integrated in time from the power itself,
 *
 *   taken(t) = ∫₀ᵗ (c q′² − F p q′) dt,
 *
 * by Gauss panels that end where a load changes its formula (impulses of a support beside it), not
 * from the energy left. Without loads what damping takes is closed form and any sampled instants serve;
 * with loads the instants are those of the first panels, 100 at most and fewer of long series.
 */
export class PowerBalance {
  /** Instants at which the balance is drawn, s. */
  readonly instants: Float64Array;
  /** Σ taken of the modes added, J, at the instants. */
  readonly taken: Float64Array;
  /** Largest work of the loads on any one side, J. */
  largestWork = 0;
  private readonly member: WaveMember;
  private readonly at: Instant;
  private readonly nodes: Instant | null;
  private readonly weights: Float64Array;
  /** Number of quadrature nodes before each instant. */
  private readonly until: Int32Array;
  private readonly kicks: { readonly index: number; readonly amounts: readonly number[] }[] = [];
  private readonly kickTimes: Float64Array;
  private readonly kickInstant: Instant | null;
  private readonly worked: Float64Array;

  /**
   * @param highest highest frequency of the modes, rad/s
   * @param most instants at most
   * @param modes number of modes that will be added
   */
  constructor(
    member: WaveMember,
    loads: readonly AppliedLoad[],
    times: Float64Array,
    highest: number,
    most: number,
    modes: number,
  ) {
    this.member = member;
    const loaded = loads.length > 0;
    const count = Math.floor(WORK / (GAUSS_20.nodes.length * modes));
    const { panels, end } = loaded
      ? panelsOf(loads, times, highest, Math.max(FEWEST_PANELS, Math.min(PANELS, count)))
      : { panels: [], end: Infinity };
    const inside = times.filter((t) => t <= end);
    this.instants = Float64Array.from(inside.length > 0 ? pick(inside, most) : [end]);
    this.taken = new Float64Array(this.instants.length);
    this.worked = new Float64Array(this.instants.length);
    this.at = new Instant(member, loads, this.instants);

    const cuts = [...new Set([...panels, ...(loaded ? this.instants : [])])]
      .filter((t) => t >= 0)
      .toSorted((a, b) => a - b);
    const nodes: number[] = [];
    const weights: number[] = [];
    for (let c = 0; c + 1 < cuts.length; c++) {
      const width = cuts[c + 1] - cuts[c];
      GAUSS_20.nodes.forEach((node, q) => {
        nodes.push(cuts[c] + node * width);
        weights.push(GAUSS_20.weights[q] * width);
      });
    }
    this.weights = Float64Array.from(weights);
    this.nodes = loaded ? new Instant(member, loads, Float64Array.from(nodes)) : null;
    this.until = Int32Array.from(this.instants, (t) => nodes.filter((node) => node < t).length);

    const last = this.instants[this.instants.length - 1];
    const sudden = new Map<number, number[]>();
    loads.forEach((load, index) => {
      for (const { time, amount } of load.kicks(last)) {
        const amounts = sudden.get(time) ?? loads.map(() => 0);
        amounts[index] += amount;
        sudden.set(time, amounts);
      }
    });
    this.kickTimes = Float64Array.from([...sudden.keys()].toSorted((a, b) => a - b));
    this.kickTimes.forEach((time, index) =>
      this.kicks.push({ index, amounts: sudden.get(time) as number[] }),
    );
    this.kickInstant = this.kickTimes.length > 0 ? new Instant(member, loads, this.kickTimes) : null;
  }

  /** Adds a mode; its q and q′ at the instants. */
  add(moved: MovedMode): { readonly q: Float64Array; readonly v: Float64Array } {
    const { omega, order } = moved.mode.frequency;
    const rate = dampingRate(this.member.damping, order, omega);
    this.at.run(moved, rate);
    if (this.nodes === null) {
      const { position, velocity } = moved.start;
      if (rate > 0) {
        this.instants.forEach(
          (t, j) => (this.taken[j] += dissipatedEnergy(position, velocity, omega, rate, t)),
        );
      }
      return this.at;
    }
    this.nodes.run(moved, rate);
    const { v, driven } = this.nodes;
    const { weights } = this;
    let taken = 0;
    let worked = 0;
    let node = 0;
    const impulses = this.impulses(moved, rate);
    for (let j = 0; j < this.instants.length; j++) {
      for (; node < this.until[j]; node++) {
        const work = driven[node] * v[node];
        taken += weights[node] * (rate * v[node] * v[node] - work);
        worked += weights[node] * work;
      }
      let sudden = 0;
      for (let k = 0; k < this.kickTimes.length && this.kickTimes[k] <= this.instants[j]; k++)
        sudden += impulses[k];
      this.taken[j] += taken - sudden;
      this.worked[j] += worked + sudden;
      this.largestWork = Math.max(this.largestWork, Math.abs(this.worked[j]));
    }
    return this.at;
  }

  /** ½(q′₊² − q′₋²) of a mode at each kick. */
  private impulses(moved: MovedMode, rate: number): Float64Array {
    if (this.kickInstant === null) return new Float64Array(0);
    this.kickInstant.run(moved, rate);
    const { v } = this.kickInstant;
    return Float64Array.from(this.kicks, ({ index, amounts }) => {
      const change = amounts.reduce((sum, amount, load) => sum + amount * (moved.factors?.[load] ?? 0), 0);
      const before = v[index] - change;
      return 0.5 * (v[index] * v[index] - before * before);
    });
  }
}

/** Ends of panels from 0 on, at every event of a load, and where they stop. */
function panelsOf(
  loads: readonly AppliedLoad[],
  times: Float64Array,
  highest: number,
  most: number,
): { panels: number[]; end: number } {
  const span = times.reduce((latest, t) => Math.max(latest, t), 0);
  const events = loads
    .flatMap((load) => load.events(span, most))
    .filter((t) => t > 0 && t < span)
    .toSorted((a, b) => a - b);
  const quickest = loads.reduce((rate, load) => Math.max(rate, load.quickest), highest);
  const width = PANEL / quickest;
  const panels = [0];
  let next = 0;
  while (panels.length <= most && panels[panels.length - 1] < span) {
    const from = panels[panels.length - 1];
    while (next < events.length && events[next] <= from) next++;
    panels.push(Math.min(from + width, events[next] ?? span, span));
  }
  return { panels, end: panels[panels.length - 1] };
}

/** Up to `count` of the times, evenly chosen, first and last among them. */
function pick(times: Float64Array, count: number): number[] {
  if (times.length <= count) return Array.from(times);
  if (count === 1) return [times[times.length - 1]];
  return Array.from({ length: count }, (_, j) => times[Math.round((j * (times.length - 1)) / (count - 1))]);
}

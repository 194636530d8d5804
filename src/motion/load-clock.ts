import type { WaveMember } from '../members/wave-member.ts';
import { evaluateShape } from '../modes/mode-shape.ts';
import type { Mode } from '../modes/mode-series.ts';
import { placeStation } from '../modes/stations.ts';
import type { AppliedLoad } from './applied-loads.ts';
import type { DriveTable } from './history.ts';
import type { LoadMover, ModalCoordinate } from './load-mover.ts';

/** Motion tables of one modal coordinate at one set of times. */
export type MotionTable = readonly [Float64Array, Float64Array];

/**
 * The loads as seen by one modal coordinate after the other: adds their motion to tables of q and q′
 * and gives the quasi-static part Σ F p/ω² that is taken exactly elsewhere.
 */
export class LoadClock {
  private readonly member: WaveMember;
  private readonly loads: readonly AppliedLoad[];
  private readonly movers: LoadMover[];
  /** p and p′ of each load at the times. */
  private readonly drives: DriveTable[];
  private readonly times: Float64Array;
  private readonly pair = new Float64Array(2);
  /** Σ F p of the mode added last, at the times. */
  readonly driven: Float64Array;
  private readonly rates: Float64Array;
  private last: { readonly mode: Mode; readonly factors: readonly number[] } | null = null;

  constructor(member: WaveMember, loads: readonly AppliedLoad[], times: Float64Array) {
    this.member = member;
    this.loads = loads;
    this.times = times;
    this.movers = loads.map((load) => load.moverAt(times));
    this.drives = loads.map((load) => load.drivesAt(times));
    this.driven = new Float64Array(times.length);
    this.rates = new Float64Array(times.length);
  }

  /** Names the modes added next, at most as many as run through a record at once. */
  expect(modes: readonly ModalCoordinate[]): void {
    for (const mover of this.movers) mover.expect?.(modes);
  }

  /** Adds the motion of a mode under all loads to its tables. */
  add(mode: Mode, rate: number, factors: readonly number[], table: MotionTable): void {
    const { driven } = this;
    this.last = { mode, factors };
    const alone = this.loads.length === 1 && this.loads[0].moving === null;
    if (!alone) driven.fill(0);
    this.loads.forEach((load, index) => {
      const factor = factors[index];
      this.movers[index].add(mode, rate, factor, table[0], table[1]);
      if (load.moving !== null) {
        this.addMoving(mode, load.moving, driven, null);
        return;
      }
      const { value } = this.drives[index];
      if (alone) {
        for (let j = 0; j < value.length; j++) driven[j] = factor * value[j];
      } else {
        for (let j = 0; j < value.length; j++) driven[j] += factor * value[j];
      }
    });
  }

  /** Σ F p′ of the mode added last, at the times; summed when asked for, which only velocities do. */
  drivenRate(): Float64Array {
    const { rates, last } = this;
    rates.fill(0);
    this.loads.forEach((load, index) => {
      if (last === null) return;
      if (load.moving !== null) {
        this.addMoving(last.mode, load.moving, null, rates);
        return;
      }
      const factor = last.factors[index];
      const { rate } = this.drives[index];
      for (let j = 0; j < rate.length; j++) rates[j] += factor * rate[j];
    });
    return rates;
  }

  /** Adds P φ_n of a moving force's place, or its rate P v φ_n′. */
  private addMoving(
    mode: Mode,
    moving: NonNullable<AppliedLoad['moving']>,
    values: Float64Array | null,
    rates: Float64Array | null,
  ): void {
    const { member, pair } = this;
    this.times.forEach((t, j) => {
      const x = moving.placeAt(t);
      if (x === null) return;
      const { i, d } = placeStation(member, x);
      evaluateShape(member, mode.shape, i, d, pair);
      if (values) values[j] += moving.force * pair[0];
      if (rates) rates[j] += (moving.force * moving.velocity * pair[1]) / member.stiffness[i];
    });
  }
}

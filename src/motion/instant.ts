import type { WaveMember } from '../members/wave-member.ts';
import type { Mode } from '../modes/mode-series.ts';
import type { AppliedLoad } from './applied-loads.ts';
import type { ModalCoordinate } from './load-mover.ts';
import { FreeMotionTable } from './free-motion-table.ts';
import { LoadClock } from './load-clock.ts';
import type { ModalStart } from './modal-projection.ts';

/** A mode with its initial state and its factor of each load. */
export interface MovedMode {
  readonly mode: Mode;
  readonly start: ModalStart;
  readonly factors?: readonly number[];
}

/** Tables of one modal coordinate, free motion and loads, at one set of times. */
export class Instant {
  readonly q: Float64Array;
  readonly v: Float64Array;
  private readonly free: FreeMotionTable;
  private readonly loads: LoadClock | null;
  private readonly none: Float64Array;

  constructor(member: WaveMember, loads: readonly AppliedLoad[], times: Float64Array, integrates: boolean) {
    this.q = new Float64Array(times.length);
    this.v = new Float64Array(times.length);
    this.none = new Float64Array(times.length);
    this.free = new FreeMotionTable(times);
    this.loads = loads.length > 0 ? new LoadClock(member, loads, times, integrates) : null;
  }

  get driven(): Float64Array {
    return this.loads?.driven ?? this.none;
  }

  drivenRate(): Float64Array {
    return this.loads?.drivenRate() ?? this.none;
  }

  expect(modes: readonly ModalCoordinate[]): void {
    this.loads?.expect(modes);
  }

  run(moved: MovedMode, rate: number): void {
    const { position, velocity } = moved.start;
    if (position === 0 && velocity === 0) {
      this.q.fill(0);
      this.v.fill(0);
    } else {
      this.free.fill(position, velocity, moved.mode.frequency.omega, rate, this.q, this.v);
    }
    this.loads?.add(moved.mode, rate, moved.factors ?? [], [this.q, this.v]);
  }

  /** ∫P φ_n(x(t)) between the times of another set and these. */
  movingIntegral(from: Instant): Float64Array {
    const here = this.loads?.movingIntegrals ?? this.none;
    const there = from.loads?.movingIntegrals ?? this.none;
    return here.map((value, j) => value - there[j]);
  }
}

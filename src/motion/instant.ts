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

/** How far a mode goes at a set of instants. */
export interface SampledReach {
  /** Largest |(q − ΣF p/ω², q′/ω)| of an elastic mode, largest |q| of the rigid-body mode. */
  readonly position: number;
  /** ω times that; largest |q′| of the rigid-body mode. */
  readonly velocity: number;
}

/** Tables of one modal coordinate, free motion and loads, at one set of times. */
export class Instant {
  readonly q: Float64Array;
  readonly v: Float64Array;
  private readonly free: FreeMotionTable;
  private readonly loads: LoadClock | null;
  private readonly none: Float64Array;

  constructor(member: WaveMember, loads: readonly AppliedLoad[], times: Float64Array) {
    this.q = new Float64Array(times.length);
    this.v = new Float64Array(times.length);
    this.none = new Float64Array(times.length);
    this.free = new FreeMotionTable(times);
    this.loads = loads.length > 0 ? new LoadClock(member, loads, times) : null;
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

  /** How far the mode run last goes, λ = ω². */
  reach(lambda: number): SampledReach {
    const { q, v, driven } = this;
    const soft = lambda > 0 ? 1 / lambda : 0;
    let square = 0;
    let fastest = 0;
    for (let j = 0; j < q.length; j++) {
      const rest = q[j] - soft * driven[j];
      const norm = rest * rest + soft * v[j] * v[j];
      if (norm > square) square = norm;
      const speed = Math.abs(v[j]);
      if (speed > fastest) fastest = speed;
    }
    const position = Math.sqrt(square);
    return { position, velocity: lambda > 0 ? Math.sqrt(lambda) * position : fastest };
  }
}

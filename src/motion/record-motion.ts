import { linearStep, type LinearStep } from './linear-step.ts';
import { sampleBefore } from './history.ts';
import { FreeMotionTable } from './free-motion-table.ts';

/** What a record drives: on [start + i·interval, …) p = value_i + slope_i s + curve_i s²/2, kicks before it. */
export interface RecordDrive {
  readonly start: number;
  readonly interval: number;
  /** Shape [intervals]. */
  readonly value: Float64Array;
  readonly slope: Float64Array;
  readonly curve: Float64Array | null;
  /** Jump of q′ at the beginning of each interval and at the end, shape [intervals + 1]. */
  readonly kick: Float64Array | null;
  /** p after the record, constant. */
  readonly after: number;
}

/** Distinct offsets of sampled times within an interval up to which steps are computed once a mode. */
const OFFSET_LIMIT = 64;

/**
 * Motion of modal coordinates from rest under a long sampled record by the exact recurrence of
 * Nigam and Jennings (1969), for any damping: 8 multiplications a sample and mode, no error of
 * discretisation.
 */
export class RecordMotion {
  private readonly drive: RecordDrive;
  private readonly times: Float64Array;
  /** Interval that each time lies in, and the index of its offset; −1 before the record. */
  private readonly interval: Int32Array;
  private readonly offsetIndex: Int32Array;
  private readonly offsets: number[] = [];
  private readonly afterFrom: number;
  private readonly afterTable: FreeMotionTable;
  private readonly free: [Float64Array, Float64Array];

  constructor(drive: RecordDrive, times: Float64Array) {
    this.drive = drive;
    this.times = times;
    const count = drive.value.length;
    this.interval = new Int32Array(times.length);
    this.offsetIndex = new Int32Array(times.length);
    const known = new Map<number, number>();
    let afterFrom = times.length;
    times.forEach((t, j) => {
      const place = (t - drive.start) / drive.interval;
      const i = sampleBefore(place);
      this.interval[j] = i < 0 ? -1 : i;
      if (i >= count && j < afterFrom) afterFrom = j;
      // offsets are told apart to 1e-9 of an interval
      const key = Math.round(Math.max(0, place - i) * 1e9);
      let index = known.get(key);
      if (index === undefined) {
        index = this.offsets.length;
        known.set(key, index);
        this.offsets.push(
          Math.max(0, t - drive.start - i * drive.interval) < 1e-9 * drive.interval
            ? 0
            : t - drive.start - i * drive.interval,
        );
      }
      this.offsetIndex[j] = index;
    });
    this.afterFrom = afterFrom;
    const end = drive.start + count * drive.interval;
    const after = times.slice(afterFrom).map((t) => Math.max(0, t - end));
    this.afterTable = new FreeMotionTable(after);
    this.free = [new Float64Array(after.length), new Float64Array(after.length)];
  }

  /** Adds factor · (q, q′) of a mode to the tables. */
  add(omega: number, rate: number, factor: number, q: Float64Array, v: Float64Array): void {
    const { drive, interval, times } = this;
    const { value, slope, curve, kick } = drive;
    const step = linearStep(omega, rate, drive.interval);
    const steps: LinearStep[] | null =
      this.offsets.length <= OFFSET_LIMIT ? this.offsets.map((h) => linearStep(omega, rate, h)) : null;
    const pp = step.positionOfPosition;
    const pv = step.positionOfVelocity;
    const vp = step.velocityOfPosition;
    const vv = step.velocityOfVelocity;
    const pl = step.positionOfLoad;
    const vl = step.velocityOfLoad;
    const pr = step.positionOfRate;
    const vr = step.velocityOfRate;
    const pc = step.positionOfCurve;
    let position = 0;
    let velocity = kick ? kick[0] : 0;
    let j = 0;
    while (j < times.length && interval[j] < 0) j++;
    const count = value.length;
    for (let i = 0; i < count && j < times.length; i++) {
      const a = value[i];
      const b = slope[i];
      const c = curve ? curve[i] : 0;
      while (j < this.afterFrom && interval[j] === i) {
        const one = steps
          ? steps[this.offsetIndex[j]]
          : linearStep(omega, rate, this.offsets[this.offsetIndex[j]]);
        q[j] +=
          factor *
          (one.positionOfPosition * position +
            one.positionOfVelocity * velocity +
            one.positionOfLoad * a +
            one.positionOfRate * b +
            one.positionOfCurve * c);
        v[j] +=
          factor *
          (one.velocityOfPosition * position +
            one.velocityOfVelocity * velocity +
            one.velocityOfLoad * a +
            one.velocityOfRate * b +
            one.positionOfRate * c);
        j++;
      }
      const next = pp * position + pv * velocity + pl * a + pr * b + pc * c;
      velocity = vp * position + vv * velocity + vl * a + vr * b + pr * c;
      position = next;
      if (kick) velocity += kick[i + 1];
    }
    this.addAfter(omega, rate, factor, position, velocity, q, v);
  }

  private addAfter(
    omega: number,
    rate: number,
    factor: number,
    position: number,
    velocity: number,
    q: Float64Array,
    v: Float64Array,
  ): void {
    const [p, w] = this.free;
    if (p.length === 0) return;
    const { after } = this.drive;
    if (after !== 0 && omega === 0) {
      const end = this.drive.start + this.drive.value.length * this.drive.interval;
      for (let j = this.afterFrom; j < this.times.length; j++) {
        const one = linearStep(omega, rate, this.times[j] - end);
        q[j] +=
          factor *
          (one.positionOfPosition * position +
            one.positionOfVelocity * velocity +
            one.positionOfLoad * after);
        v[j] +=
          factor *
          (one.velocityOfPosition * position +
            one.velocityOfVelocity * velocity +
            one.velocityOfLoad * after);
      }
      return;
    }
    const rest = after === 0 ? 0 : after / (omega * omega);
    this.afterTable.fill(position - rest, velocity, omega, rate, p, w);
    for (let m = 0, j = this.afterFrom; m < p.length; m++, j++) {
      q[j] += factor * (p[m] + rest);
      v[j] += factor * w[m];
    }
  }
}

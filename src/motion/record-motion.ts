import type { ModalCoordinate } from './load-mover.ts';
import { FreeMotionTable } from './free-motion-table.ts';
import { linearStep, type LinearStep } from './linear-step.ts';
import { RecordTimes } from './record-times.ts';

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

/** Modes that run through the record at once: one alone waits for its own last sum at every sample. */
export const RECORD_LANES = 2;

/** Motion of one mode under the record at the times, per unit of its factor, and its state on the way. */
interface Lane {
  omega: number;
  rate: number;
  /** Step to each offset, or null where they are too many to hold. */
  steps: readonly LinearStep[] | null;
  position: number;
  velocity: number;
  readonly q: Float64Array;
  readonly v: Float64Array;
}

/**
 * Motion of modal coordinates from rest under a long sampled record by the exact recurrence of
 * Nigam and Jennings (1969), for any damping: 8 multiplications a sample and mode, no error of
 * discretisation. Each mode's numbers are the same in whichever company it runs.
 */
export class RecordMotion {
  private readonly drive: RecordDrive;
  private readonly at: RecordTimes;
  private readonly afterTable: FreeMotionTable;
  private readonly free: [Float64Array, Float64Array];
  private readonly lanes: readonly Lane[];

  /** @param times ascending */
  constructor(drive: RecordDrive, times: Float64Array) {
    this.drive = drive;
    this.at = new RecordTimes(drive, times);
    this.afterTable = new FreeMotionTable(this.at.after);
    this.free = [new Float64Array(this.at.after.length), new Float64Array(this.at.after.length)];
    this.lanes = Array.from({ length: RECORD_LANES }, () => ({
      omega: Number.NaN,
      rate: Number.NaN,
      steps: null,
      position: 0,
      velocity: 0,
      q: new Float64Array(times.length),
      v: new Float64Array(times.length),
    }));
  }

  /** Runs modes that are to be added next through the record together, at most {@link RECORD_LANES}. */
  expect(modes: readonly ModalCoordinate[]): void {
    const { offsets } = this.at;
    this.lanes.forEach((lane, index) => {
      const { omega, rate } = modes[index] ?? { omega: Number.NaN, rate: Number.NaN };
      lane.omega = omega;
      lane.rate = rate;
      lane.steps = offsets && index < modes.length ? offsets.map((h) => linearStep(omega, rate, h)) : null;
      lane.position = 0;
      lane.velocity = this.drive.kick ? this.drive.kick[0] : 0;
    });
    this.run(modes.length);
    if (this.at.after.length > 0) this.lanes.slice(0, modes.length).forEach((lane) => this.runAfter(lane));
  }

  /** Adds factor · (q, q′) of a mode to the tables. */
  add(omega: number, rate: number, factor: number, q: Float64Array, v: Float64Array): void {
    const same = (lane: Lane): boolean => lane.omega === omega && lane.rate === rate;
    if (!this.lanes.some(same)) this.expect([{ omega, rate }]);
    const { q: place, v: speed } = this.lanes.find(same) as Lane;
    for (let j = this.at.first; j < q.length; j++) {
      q[j] += factor * place[j];
      v[j] += factor * speed[j];
    }
  }

  /** Carries the lanes from sampled time to sampled time; those not taken stay at 0 and are not looked at. */
  private run(taken: number): void {
    const { drive, at } = this;
    const { value, slope, curve, kick } = drive;
    const [one, two] = this.lanes;
    const a = linearStep(one.omega, one.rate, drive.interval);
    const b = taken > 1 ? linearStep(two.omega, two.rate, drive.interval) : REST;
    const app = a.positionOfPosition;
    const apv = a.positionOfVelocity;
    const apl = a.positionOfLoad;
    const apr = a.positionOfRate;
    const avp = a.velocityOfPosition;
    const avv = a.velocityOfVelocity;
    const avl = a.velocityOfLoad;
    const avr = a.velocityOfRate;
    const bpp = b.positionOfPosition;
    const bpv = b.positionOfVelocity;
    const bpl = b.positionOfLoad;
    const bpr = b.positionOfRate;
    const bvp = b.velocityOfPosition;
    const bvv = b.velocityOfVelocity;
    const bvl = b.velocityOfLoad;
    const bvr = b.velocityOfRate;
    let { position: p1, velocity: v1 } = one;
    let { position: p2, velocity: v2 } = two;
    let i = 0;
    for (let j = at.first; j <= at.afterFrom; j++) {
      const last = j === at.afterFrom;
      if (last && at.after.length === 0) break;
      const to = last ? value.length : at.interval[j];
      if (curve === null && kick === null) {
        for (; i < to; i++) {
          const load = value[i];
          const climb = slope[i];
          const q1 = app * p1 + apv * v1 + apl * load + apr * climb;
          v1 = avp * p1 + avv * v1 + avl * load + avr * climb;
          p1 = q1;
          const q2 = bpp * p2 + bpv * v2 + bpl * load + bpr * climb;
          v2 = bvp * p2 + bvv * v2 + bvl * load + bvr * climb;
          p2 = q2;
        }
      } else {
        for (; i < to; i++) {
          const load = value[i];
          const climb = slope[i];
          const bend = curve === null ? 0 : curve[i];
          const blow = kick === null ? 0 : kick[i + 1];
          const q1 = app * p1 + apv * v1 + apl * load + apr * climb + a.positionOfCurve * bend;
          v1 = avp * p1 + avv * v1 + avl * load + avr * climb + apr * bend + blow;
          p1 = q1;
          const q2 = bpp * p2 + bpv * v2 + bpl * load + bpr * climb + b.positionOfCurve * bend;
          v2 = bvp * p2 + bvv * v2 + bvl * load + bvr * climb + bpr * bend + blow;
          p2 = q2;
        }
      }
      if (!last && at.offset[j] === 0) {
        one.q[j] = p1;
        one.v[j] = v1;
        two.q[j] = p2;
        two.v[j] = v2;
        continue;
      }
      one.position = p1;
      one.velocity = v1;
      two.position = p2;
      two.velocity = v2;
      if (last) break;
      this.sample(one, j, to);
      if (taken > 1) this.sample(two, j, to);
    }
  }

  /** The state at time j, its offset after the beginning of interval i. */
  private sample(lane: Lane, j: number, i: number): void {
    const { drive, at } = this;
    const { position, velocity, steps } = lane;
    const step = steps === null ? linearStep(lane.omega, lane.rate, at.offset[j]) : steps[at.offsetIndex[j]];
    const load = drive.value[i];
    const climb = drive.slope[i];
    const bend = drive.curve ? drive.curve[i] : 0;
    lane.q[j] =
      step.positionOfPosition * position +
      step.positionOfVelocity * velocity +
      step.positionOfLoad * load +
      step.positionOfRate * climb +
      step.positionOfCurve * bend;
    lane.v[j] =
      step.velocityOfPosition * position +
      step.velocityOfVelocity * velocity +
      step.velocityOfLoad * load +
      step.velocityOfRate * climb +
      step.positionOfRate * bend;
  }

  /** Motion after the record, from the state at its end. */
  private runAfter(lane: Lane): void {
    const [p, w] = this.free;
    const { at } = this;
    const { after } = this.drive;
    const { omega, rate, position, velocity, q, v } = lane;
    if (after !== 0 && omega === 0) {
      at.after.forEach((h, m) => {
        const one = linearStep(omega, rate, h);
        q[at.afterFrom + m] =
          one.positionOfPosition * position + one.positionOfVelocity * velocity + one.positionOfLoad * after;
        v[at.afterFrom + m] =
          one.velocityOfPosition * position + one.velocityOfVelocity * velocity + one.velocityOfLoad * after;
      });
      return;
    }
    const rest = after === 0 ? 0 : after / (omega * omega);
    this.afterTable.fill(position - rest, velocity, omega, rate, p, w);
    for (let m = 0, j = at.afterFrom; m < p.length; m++, j++) {
      q[j] = p[m] + rest;
      v[j] = w[m];
    }
  }
}

/** The step of a lane without a mode. */
const REST: LinearStep = {
  positionOfPosition: 0,
  velocityOfPosition: 0,
  positionOfVelocity: 0,
  velocityOfVelocity: 0,
  positionOfLoad: 0,
  velocityOfLoad: 0,
  positionOfRate: 0,
  velocityOfRate: 0,
  positionOfCurve: 0,
};

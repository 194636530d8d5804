import { ForcedRecurrence } from '../numerics/forced-recurrence.ts';
import { LANES, type Forcing } from '../numerics/plain-recurrence.ts';
import { FreeMotionTable } from './free-motion-table.ts';
import { linearStep, type LinearStep } from './linear-step.ts';
import type { ModalCoordinate } from './load-mover.ts';
import { RecordTimes } from './record-times.ts';

/**
 * What a record drives: on [start + i·interval, …) p = value_i + slope_i s + curve_i s²/2; the kicks are
 * jumps of q′ at the beginning of each interval and at the end.
 */
export interface RecordDrive extends Forcing {
  readonly start: number;
  readonly interval: number;
  /** p after the record, constant. */
  readonly after: number;
}

/** Modes that run through the record at once. */
export const RECORD_LANES = LANES;

/** Motion of one mode under the record at the times, per unit of its factor. */
interface Lane {
  omega: number;
  rate: number;
  readonly q: Float64Array;
  readonly v: Float64Array;
}

/** The records under way, each with its copy for the kernel: motions at several sets of times share it. */
const recurrences = new WeakMap<RecordDrive, ForcedRecurrence>();

function recurrenceOf(drive: RecordDrive): ForcedRecurrence {
  let known = recurrences.get(drive);
  if (known === undefined) {
    known = new ForcedRecurrence(drive);
    recurrences.set(drive, known);
  }
  return known;
}

/**
 * Motion of modal coordinates from rest under a long sampled record by the exact recurrence of
 * Nigam and Jennings (1969), for any damping: 8 multiplications a sample and mode, no error of
 * discretisation. Each mode's numbers are the same in whichever company it runs.
 */
export class RecordMotion {
  private readonly drive: RecordDrive;
  private readonly at: RecordTimes;
  private readonly recurrence: ForcedRecurrence;
  /** Intervals before each time in the record, and all of them if a time comes after it. */
  private readonly stops: Int32Array;
  /** Whether any time lies between two samples. */
  private readonly between: boolean;
  private readonly afterTable: FreeMotionTable;
  private readonly free: [Float64Array, Float64Array];
  private readonly lanes: readonly Lane[];

  /** @param times ascending */
  constructor(drive: RecordDrive, times: Float64Array, recurrence = recurrenceOf(drive)) {
    this.drive = drive;
    this.at = new RecordTimes(drive, times);
    const { first, afterFrom, interval, offset, after } = this.at;
    this.recurrence = recurrence;
    this.stops = new Int32Array(afterFrom - first + (after.length > 0 ? 1 : 0)).fill(drive.value.length);
    this.stops.set(interval.subarray(first, afterFrom));
    this.between = offset.some((s) => s > 0);
    this.afterTable = new FreeMotionTable(after);
    this.free = [new Float64Array(after.length), new Float64Array(after.length)];
    this.lanes = Array.from({ length: RECORD_LANES }, () => ({
      omega: Number.NaN,
      rate: Number.NaN,
      q: new Float64Array(times.length),
      v: new Float64Array(times.length),
    }));
  }

  /** Runs modes that are to be added next through the record together, at most {@link RECORD_LANES}. */
  expect(modes: readonly ModalCoordinate[]): void {
    const { drive, at, recurrence, stops } = this;
    const { steps, states } = recurrence;
    this.lanes.forEach((lane, index) => {
      const { omega, rate } = modes[index] ?? { omega: Number.NaN, rate: Number.NaN };
      lane.omega = omega;
      lane.rate = rate;
      const taken = index < modes.length;
      setStep(steps, index, taken ? linearStep(omega, rate, drive.interval) : REST);
      states[index] = 0;
      states[LANES + index] = taken && drive.kick ? drive.kick[0] : 0;
    });
    const tables = recurrence.run(stops);
    for (let index = 0; index < modes.length; index++) {
      const lane = this.lanes[index];
      lane.q.set(tables.subarray(index * stops.length, (index + 1) * stops.length), at.first);
      lane.v.set(
        tables.subarray((LANES + index) * stops.length, (LANES + index + 1) * stops.length),
        at.first,
      );
      // a table that had to grow moves the states
      if (at.after.length > 0)
        this.runAfter(lane, recurrence.states[index], recurrence.states[LANES + index]);
      if (this.between) this.sampleBetween(lane);
    }
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

  /** Carries the states on from the sample before each time that lies between two. */
  private sampleBetween(lane: Lane): void {
    const { drive, at } = this;
    const { omega, rate, q, v } = lane;
    const steps = at.offsets && at.offsets.map((h) => linearStep(omega, rate, h));
    for (let j = at.first; j < at.afterFrom; j++) {
      if (at.offset[j] === 0) continue;
      const step = steps === null ? linearStep(omega, rate, at.offset[j]) : steps[at.offsetIndex[j]];
      const i = at.interval[j];
      const position = q[j];
      const velocity = v[j];
      const load = drive.value[i];
      const climb = drive.slope[i];
      const bend = drive.curve ? drive.curve[i] : 0;
      q[j] =
        step.positionOfPosition * position +
        step.positionOfVelocity * velocity +
        step.positionOfLoad * load +
        step.positionOfRate * climb +
        step.positionOfCurve * bend;
      v[j] =
        step.velocityOfPosition * position +
        step.velocityOfVelocity * velocity +
        step.velocityOfLoad * load +
        step.velocityOfRate * climb +
        step.positionOfRate * bend;
    }
  }

  /** Motion after the record, from the state at its end. */
  private runAfter(lane: Lane, position: number, velocity: number): void {
    const [p, w] = this.free;
    const { at } = this;
    const { after } = this.drive;
    const { omega, rate, q, v } = lane;
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

/** The numbers of a lane's step, in the order of the recurrence. */
function setStep(steps: Float64Array, lane: number, step: LinearStep): void {
  [
    step.positionOfPosition,
    step.positionOfVelocity,
    step.positionOfLoad,
    step.positionOfRate,
    step.velocityOfPosition,
    step.velocityOfVelocity,
    step.positionOfCurve,
  ].forEach((number, index) => (steps[index * LANES + lane] = number));
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

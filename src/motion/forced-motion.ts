import { FreeMotionTable } from './free-motion-table.ts';
import type { HistoryPart } from './history.ts';
import { linearStep } from './linear-step.ts';
import { freeMotion } from './modal-motion.ts';
import { movedFromRest, nearResonance, particularAmplitude, type WaveForcing } from './wave-forcing.ts';
import { exponential, multiply, type Complex } from '../numerics/complex.ts';

/** A sudden change of q′, as by an impulse, per unit of the mode's factor. */
export interface Kick {
  readonly time: number;
  readonly amount: number;
}

/** A stretch between two events with the sampled times in it. */
interface Stretch {
  readonly from: number;
  readonly to: number;
  /** Index of its part, or −1 where nothing acts. */
  readonly part: number;
  /** Time of the stretch's beginning after the part's. */
  readonly lead: number;
  readonly kick: number;
  /** Sampled times within, as indices [first, last). */
  readonly first: number;
  readonly last: number;
  readonly relative: Float64Array;
  readonly table: FreeMotionTable;
}

/** ω h and, over-damped, ω² h/c below which the particular solution would cancel against the free one. */
const SOFT = 0.6;

/**
 * Motion of modal coordinates from rest under a history of a few parts (and kicks), exact at every
 * time: q″ + c q′ + ω² q = p(t). Within a part the particular solution plus free motion, or, where that
 * cancels (soft modes, rigid-body modes, resonance), the motion from rest itself; states are carried
 * from part to part.
 *
 * @param times sampled times, ascending
 * Cost a mode: one sine and cosine a time and part, less on even grids.
 */
export class ForcedMotion {
  private readonly stretches: Stretch[] = [];
  private readonly position: Float64Array;
  private readonly velocity: Float64Array;
  private readonly parts: readonly HistoryPart[];

  constructor(parts: readonly HistoryPart[], kicks: readonly Kick[], times: Float64Array) {
    this.parts = parts;
    const events = new Set<number>();
    for (const part of parts) {
      events.add(part.from);
      if (Number.isFinite(part.to)) events.add(part.to);
    }
    for (const kick of kicks) events.add(kick.time);
    const begins = Array.from(events).toSorted((a, b) => a - b);
    begins.forEach((from, e) => {
      const to = begins[e + 1] ?? Number.POSITIVE_INFINITY;
      const part = parts.findIndex((one) => one.from <= from && from < one.to);
      const kick = kicks.reduce((sum, one) => (one.time === from ? sum + one.amount : sum), 0);
      const first = firstAtLeast(times, from);
      const last = firstAtLeast(times, to);
      const relative = times.slice(first, last).map((t) => t - from);
      const lead = part < 0 ? 0 : from - parts[part].from;
      this.stretches.push({
        from,
        to,
        part,
        lead,
        kick,
        first,
        last,
        relative,
        table: new FreeMotionTable(relative),
      });
    });
    this.position = new Float64Array(times.length);
    this.velocity = new Float64Array(times.length);
  }

  /** Adds factor · (q, q′) of a mode to the tables. `parts` may replace the parts' amplitudes (same times). */
  add(
    omega: number,
    rate: number,
    factor: number,
    q: Float64Array,
    v: Float64Array,
    parts: readonly HistoryPart[] = this.parts,
  ): void {
    let position = 0;
    let velocity = 0;
    for (const stretch of this.stretches) {
      velocity += stretch.kick;
      const part = stretch.part < 0 ? null : parts[stretch.part];
      const quiet = position === 0 && velocity === 0 && part === null;
      const { relative, first } = stretch;
      const end = Number.isFinite(stretch.to) ? stretch.to - stretch.from : 0;
      if (!quiet && relative.length > 0) {
        const p = this.position.subarray(0, relative.length);
        const w = this.velocity.subarray(0, relative.length);
        this.over(stretch, part, omega, rate, position, velocity, relative, p, w, stretch.table);
        for (let j = 0; j < relative.length; j++) {
          q[first + j] += factor * p[j];
          v[first + j] += factor * w[j];
        }
      }
      if (!quiet && end > 0) {
        const at = Float64Array.of(end);
        const p = new Float64Array(1);
        const w = new Float64Array(1);
        this.over(stretch, part, omega, rate, position, velocity, at, p, w, null);
        position = p[0];
        velocity = w[0];
      }
    }
  }

  /** q and q′ at times after the stretch's beginning. */
  private over(
    stretch: Stretch,
    part: HistoryPart | null,
    omega: number,
    rate: number,
    position: number,
    velocity: number,
    times: Float64Array,
    q: Float64Array,
    v: Float64Array,
    table: FreeMotionTable | null,
  ): void {
    const free = (a: number, b: number): void => {
      if (table) table.fill(a, b, omega, rate, q, v);
      else freeMotion(a, b, omega, rate, times, q, v);
    };
    if (part === null) {
      free(position, velocity);
    } else if (part.kind === 'linear') {
      const { lead } = stretch;
      const slope = part.slope + lead * part.curve;
      const value = part.value + lead * (part.slope + 0.5 * lead * part.curve);
      overLine(omega, rate, position, velocity, { value, slope, curve: part.curve }, times, q, v, free);
    } else {
      const forcings = part.forcings.map((forcing) => advanced(forcing, stretch.lead));
      overWaves(omega, rate, position, velocity, forcings, times, q, v, free);
    }
  }
}

function overLine(
  omega: number,
  rate: number,
  position: number,
  velocity: number,
  line: { value: number; slope: number; curve: number },
  times: Float64Array,
  q: Float64Array,
  v: Float64Array,
  free: (a: number, b: number) => void,
): void {
  const reach = times[times.length - 1];
  const lambda = omega * omega;
  const soft = omega * reach < SOFT || (rate > 2 * omega && (lambda / rate) * reach < SOFT);
  if (soft) {
    for (let j = 0; j < times.length; j++) {
      const step = linearStep(omega, rate, times[j]);
      q[j] =
        step.positionOfPosition * position +
        step.positionOfVelocity * velocity +
        step.positionOfLoad * line.value +
        step.positionOfRate * line.slope +
        step.positionOfCurve * line.curve;
      v[j] =
        step.velocityOfPosition * position +
        step.velocityOfVelocity * velocity +
        step.velocityOfLoad * line.value +
        step.velocityOfRate * line.slope +
        step.positionOfRate * line.curve;
    }
    return;
  }
  // particular solution: A + B t + C t²/2 with ω² C = curve, ω² B + c C = slope, ω² A + c B + C = value
  const c = line.curve / lambda;
  const b = (line.slope - rate * c) / lambda;
  const a = (line.value - rate * b - c) / lambda;
  free(position - a, velocity - b);
  for (let j = 0; j < times.length; j++) {
    const t = times[j];
    q[j] += a + t * (b + 0.5 * t * c);
    v[j] += b + t * c;
  }
}

function overWaves(
  omega: number,
  rate: number,
  position: number,
  velocity: number,
  forcings: readonly WaveForcing[],
  times: Float64Array,
  q: Float64Array,
  v: Float64Array,
  free: (a: number, b: number) => void,
): void {
  const distant = forcings.filter((forcing) => !nearResonance(omega, rate, forcing));
  const amplitudes = distant.map((forcing) => particularAmplitude(omega, rate, forcing));
  let a = position;
  let b = velocity;
  amplitudes.forEach((amplitude, m) => {
    a -= amplitude.re;
    b -= multiply(distant[m].rate, amplitude).re;
  });
  free(a, b);
  amplitudes.forEach((amplitude, m) => {
    const { rate: speed } = distant[m];
    const moving = multiply(speed, amplitude);
    for (let j = 0; j < times.length; j++) {
      const turn = exponential({ re: speed.re * times[j], im: speed.im * times[j] });
      q[j] += amplitude.re * turn.re - amplitude.im * turn.im;
      v[j] += moving.re * turn.re - moving.im * turn.im;
    }
  });
  for (const forcing of forcings) {
    if (distant.includes(forcing)) continue;
    for (let j = 0; j < times.length; j++) {
      const moved = movedFromRest(omega, rate, forcing, times[j]);
      q[j] += moved.position;
      v[j] += moved.velocity;
    }
  }
}

function advanced(forcing: WaveForcing, lead: number): WaveForcing {
  if (lead === 0) return forcing;
  const turn: Complex = exponential({ re: forcing.rate.re * lead, im: forcing.rate.im * lead });
  return { amplitude: multiply(forcing.amplitude, turn), rate: forcing.rate };
}

/** Index of the first time not before t. */
function firstAtLeast(times: Float64Array, t: number): number {
  let low = 0;
  let high = times.length;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (times[mid] >= t) high = mid;
    else low = mid + 1;
  }
  return low;
}

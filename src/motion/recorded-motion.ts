import { sampleBefore, type SampledRecord } from './history.ts';
import type { RecordDrive } from './record-motion.ts';

/** A support motion and its derivatives at a set of times. */
export interface MotionTable {
  readonly position: Float64Array;
  readonly velocity: Float64Array;
  readonly acceleration: Float64Array;
  readonly jerk: Float64Array;
}

/** A table of rest. */
export function emptyTable(count: number): MotionTable {
  const [position, velocity, acceleration, jerk] = Array.from({ length: 4 }, () => new Float64Array(count));
  return { position, velocity, acceleration, jerk };
}

/** Limits of |y| and |y′|, m and m/s. */
interface SupportPeaks {
  readonly position: number;
  readonly velocity: number;
}

/**
 * A support motion given by a long record: accelerations straight between samples, integrated exactly
 * (piecewise cubic displacement), or displacements straight between samples (velocity jumps at each).
 * Cost: O(samples) once, O(1) a time.
 */
export class RecordedMotion {
  private readonly start: number;
  private readonly interval: number;
  /** State at the samples, shape [samples]; of a displacement record velocity holds from the sample on. */
  private readonly position: Float64Array;
  private readonly velocity: Float64Array;
  private readonly acceleration: Float64Array | null;
  /** The peaks asked for last: every limit asks for those of the same span. */
  private known: { readonly span: number; readonly peaks: SupportPeaks } | null = null;

  constructor(record: SampledRecord, quantity: 'displacement' | 'acceleration') {
    const { start, interval: h, values } = record;
    const count = values.length;
    this.start = start;
    this.interval = h;
    this.velocity = new Float64Array(count);
    if (quantity === 'displacement') {
      this.position = values;
      this.acceleration = null;
      for (let i = 0; i + 1 < count; i++) this.velocity[i] = (values[i + 1] - values[i]) / h;
      return;
    }
    const position = new Float64Array(count);
    const { velocity } = this;
    this.position = position;
    this.acceleration = values;
    let place = 0;
    let speed = 0;
    for (let i = 0; i + 1 < count; i++) {
      const a = values[i];
      const b = values[i + 1];
      place += h * (speed + (h * (2 * a + b)) / 6);
      speed += 0.5 * h * (a + b);
      position[i + 1] = place;
      velocity[i + 1] = speed;
    }
  }

  /** y, y′, y″ and, from the right, y‴ at each time. */
  table(times: Float64Array): MotionTable {
    const { position, velocity, acceleration, start, interval: h } = this;
    const table = emptyTable(times.length);
    const last = position.length - 1;
    for (let j = 0; j < times.length; j++) {
      const place = (times[j] - start) / h;
      const i = sampleBefore(place);
      if (i < 0) continue;
      if (i >= last) {
        const s = acceleration === null ? 0 : times[j] - (start + last * h);
        table.position[j] = position[last] + velocity[last] * s;
        table.velocity[j] = velocity[last];
        continue;
      }
      const s = Math.max(0, (place - i) * h);
      if (acceleration === null) {
        table.position[j] = position[i] + velocity[i] * s;
        table.velocity[j] = velocity[i];
        continue;
      }
      const a = acceleration[i];
      const jerk = (acceleration[i + 1] - a) / h;
      table.position[j] = position[i] + s * (velocity[i] + s * (0.5 * a + (s * jerk) / 6));
      table.velocity[j] = velocity[i] + s * (a + 0.5 * s * jerk);
      table.acceleration[j] = a + s * jerk;
      table.jerk[j] = jerk;
    }
    return table;
  }

  /** Limits of |y| and |y′| up to a time. */
  peaks(span: number): SupportPeaks {
    if (this.known?.span !== span) this.known = { span, peaks: this.findPeaks(span) };
    return this.known.peaks;
  }

  private findPeaks(span: number): SupportPeaks {
    const { position, velocity, acceleration, start, interval: h } = this;
    let placed = 0;
    let moved = 0;
    let pace = 0;
    const last = position.length - 1;
    // compared in place: a fraction of the time of Math.max in a long loop
    for (let i = 0; i <= last && start + i * h <= span; i++) {
      const place = Math.abs(position[i]);
      placed = placed > place ? placed : place;
      const speed = Math.abs(velocity[i]);
      moved = moved > speed ? moved : speed;
      if (acceleration === null) continue;
      const now = Math.abs(acceleration[i]);
      pace = pace > now ? pace : now;
      const next = Math.abs(acceleration[i < last ? i + 1 : last]);
      pace = pace > next ? pace : next;
    }
    moved += h * pace;
    // within an interval, and on after the record
    const drift = Math.max(0, span - (this.start + last * h)) * Math.abs(velocity[last]);
    return { position: placed + h * moved + drift, velocity: moved };
  }

  /** ∫y up to each time. */
  integrals(times: Float64Array): Float64Array {
    const { position, velocity, acceleration, interval: h } = this;
    const last = position.length - 1;
    const within = (i: number, s: number): number => {
      const a = acceleration === null ? 0 : acceleration[i];
      const jerk = acceleration === null ? 0 : (acceleration[i + 1] - a) / h;
      return s * (position[i] + s * (0.5 * velocity[i] + s * (a / 6 + (s * jerk) / 24)));
    };
    const sums = new Float64Array(position.length);
    for (let i = 0; i < last; i++) sums[i + 1] = sums[i] + within(i, h);
    return times.map((t) => {
      const place = (t - this.start) / h;
      const i = sampleBefore(place);
      if (i < 0) return 0;
      if (i < last) return sums[i] + within(i, Math.max(0, (place - i) * h));
      const s = t - this.start - last * h;
      return sums[last] + s * (position[last] + 0.5 * s * velocity[last]);
    });
  }

  /** y″ + α y′ and the jumps of y′. */
  drive(drag: number): RecordDrive {
    const { velocity, acceleration, interval: h } = this;
    const count = velocity.length - 1;
    if (acceleration === null) {
      const value = new Float64Array(count);
      const slope = new Float64Array(count);
      const kick = new Float64Array(count + 1);
      for (let i = 0; i < count; i++) {
        value[i] = drag * velocity[i];
        kick[i] = velocity[i] - (i > 0 ? velocity[i - 1] : 0);
      }
      kick[count] = -velocity[count - 1];
      return { start: this.start, interval: h, value, slope, curve: null, kick, after: 0 };
    }
    if (drag === 0) {
      const slope = new Float64Array(count);
      for (let i = 0; i < count; i++) slope[i] = (acceleration[i + 1] - acceleration[i]) / h;
      const value = acceleration.subarray(0, count);
      return { start: this.start, interval: h, value, slope, curve: null, kick: null, after: 0 };
    }
    const value = new Float64Array(count);
    const slope = new Float64Array(count);
    const curve = new Float64Array(count);
    for (let i = 0; i < count; i++) {
      const jerk = (acceleration[i + 1] - acceleration[i]) / h;
      value[i] = acceleration[i] + drag * velocity[i];
      slope[i] = jerk + drag * acceleration[i];
      curve[i] = drag * jerk;
    }
    return { start: this.start, interval: h, value, slope, curve, kick: null, after: drag * velocity[count] };
  }
}

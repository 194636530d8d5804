import { sampleBefore, type SampledRecord } from './history.ts';
import type { RecordDrive } from './record-motion.ts';

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
    this.position = new Float64Array(count);
    this.acceleration = values;
    for (let i = 0; i + 1 < count; i++) {
      const a = values[i];
      const b = values[i + 1];
      this.position[i + 1] = this.position[i] + h * (this.velocity[i] + (h * (2 * a + b)) / 6);
      this.velocity[i + 1] = this.velocity[i] + 0.5 * h * (a + b);
    }
  }

  /** y, y′, y″ at a time. */
  at(t: number): { position: number; velocity: number; acceleration: number } {
    const { position, velocity, acceleration, interval: h } = this;
    const last = position.length - 1;
    const place = (t - this.start) / h;
    const i = sampleBefore(place);
    if (i < 0) return { position: 0, velocity: 0, acceleration: 0 };
    if (i >= last) {
      const s = acceleration === null ? 0 : t - (this.start + last * h);
      return { position: position[last] + velocity[last] * s, velocity: velocity[last], acceleration: 0 };
    }
    const s = Math.max(0, (place - i) * h);
    if (acceleration === null) {
      return { position: position[i] + velocity[i] * s, velocity: velocity[i], acceleration: 0 };
    }
    const a = acceleration[i];
    const jerk = (acceleration[i + 1] - a) / h;
    return {
      position: position[i] + s * (velocity[i] + s * (0.5 * a + (s * jerk) / 6)),
      velocity: velocity[i] + s * (a + 0.5 * s * jerk),
      acceleration: a + s * jerk,
    };
  }

  /** Limits of |y| and |y′| up to a time. */
  peaks(span: number): SupportPeaks {
    if (this.known?.span !== span) this.known = { span, peaks: this.findPeaks(span) };
    return this.known.peaks;
  }

  private findPeaks(span: number): SupportPeaks {
    const { position, velocity, acceleration, interval: h } = this;
    let placed = 0;
    let moved = 0;
    let pace = 0;
    const last = position.length - 1;
    for (let i = 0; i <= last && this.start + i * h <= span; i++) {
      placed = Math.max(placed, Math.abs(position[i]));
      moved = Math.max(moved, Math.abs(velocity[i]));
      if (acceleration !== null)
        pace = Math.max(pace, Math.abs(acceleration[i]), Math.abs(acceleration[Math.min(i + 1, last)]));
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

  /** y‴ from the right. */
  jerkAt(t: number): number {
    const { acceleration, interval: h } = this;
    if (acceleration === null) return 0;
    const i = sampleBefore((t - this.start) / h);
    return i < 0 || i >= acceleration.length - 1 ? 0 : (acceleration[i + 1] - acceleration[i]) / h;
  }

  /** y″ + α y′ and the jumps of y′. */
  drive(drag: number): RecordDrive {
    const { velocity, acceleration, interval: h } = this;
    const count = velocity.length - 1;
    const value = new Float64Array(count);
    const slope = new Float64Array(count);
    if (acceleration === null) {
      const kick = new Float64Array(count + 1);
      for (let i = 0; i < count; i++) {
        value[i] = drag * velocity[i];
        kick[i] = velocity[i] - (i > 0 ? velocity[i - 1] : 0);
      }
      kick[count] = -velocity[count - 1];
      return { start: this.start, interval: h, value, slope, curve: null, kick, after: 0 };
    }
    const curve = drag > 0 ? new Float64Array(count) : null;
    for (let i = 0; i < count; i++) {
      const jerk = (acceleration[i + 1] - acceleration[i]) / h;
      value[i] = acceleration[i] + drag * velocity[i];
      slope[i] = jerk + drag * acceleration[i];
      if (curve) curve[i] = drag * jerk;
    }
    return { start: this.start, interval: h, value, slope, curve, kick: null, after: drag * velocity[count] };
  }
}

import {
  add,
  complex,
  divide,
  exponential,
  modulus,
  multiply,
  scale,
  subtract,
  type Complex,
} from '../numerics/complex.ts';
import type { Kick } from './forced-motion.ts';
import type { HistoryPart, LinearPart, TimeHistory } from './history.ts';
import type { RecordDrive } from './record-motion.ts';
import { emptyTable, RecordedMotion, type MotionTable } from './recorded-motion.ts';
import type { WaveForcing } from './wave-forcing.ts';

/** Motion of a support at one time, m, m/s, m/s². */
export interface SupportState {
  readonly position: number;
  readonly velocity: number;
  readonly acceleration: number;
}

/** One part of a support motion with its state at the part's beginning. */
interface MotionPart {
  readonly from: number;
  readonly to: number;
  readonly position: number;
  readonly velocity: number;
  /** Acceleration a + b s + Re Σ z e^{rs}, s from the part's beginning. */
  readonly acceleration: number;
  readonly jerk: number;
  readonly forcings: readonly WaveForcing[];
}

/**
 * The motion y(t) of a support, its derivatives and what it drives: q″ + … = −Γ (y″ + α y′), impulses
 * where y′ jumps.
 *
 * An acceleration is integrated exactly from rest, without baseline correction; a displacement starts
 * from its first value. Cost: O(parts) once, O(log parts) a time.
 */
export class SupportMotion {
  /** y″ + α y′ as parts, and the jumps of y′; empty for a long record. */
  readonly drive: readonly HistoryPart[];
  readonly kicks: readonly Kick[];
  /** The same of a long record. */
  readonly record: RecordDrive | null;
  private readonly parts: MotionPart[];
  private readonly recorded: RecordedMotion | null;

  /**
   * @param quantity what the history is of
   * @param drag α, 1/s
   */
  constructor(history: TimeHistory, quantity: 'displacement' | 'acceleration', drag: number) {
    if (history.record !== null) {
      this.parts = [];
      this.drive = [];
      this.kicks = [];
      this.recorded = new RecordedMotion(history.record, quantity);
      this.record = this.recorded.drive(drag);
      return;
    }
    this.recorded = null;
    this.record = null;
    this.parts = quantity === 'acceleration' ? integrate(history.parts) : differentiate(history.parts);
    this.kicks = quantity === 'acceleration' ? [] : kicksOf(this.parts);
    this.drive = this.parts.flatMap((part) => driveOf(part, drag));
  }

  /** Limits of |y| and |y′| up to a time: the largest on a grid and what may lie between. */
  peaks(span: number): { readonly position: number; readonly velocity: number } {
    if (this.recorded !== null) return this.recorded.peaks(span);
    let position = 0;
    let velocity = 0;
    for (const part of this.parts) {
      if (part.from > span) break;
      const length = Math.min(part.to, span) - part.from;
      const quickest = part.forcings.reduce((most, { rate }) => Math.max(most, Math.abs(rate.im)), 0);
      const count = Math.min(4096, Math.max(32, Math.ceil(length * quickest * 4)));
      const gap = length / count;
      const pace =
        Math.abs(part.acceleration) +
        Math.abs(part.jerk) * length +
        part.forcings.reduce((sum, { amplitude }) => sum + Math.hypot(amplitude.re, amplitude.im), 0);
      let placed = 0;
      let moved = 0;
      for (let m = 0; m <= count; m++) {
        const state = stateIn(part, m * gap);
        placed = Math.max(placed, Math.abs(state.position));
        moved = Math.max(moved, Math.abs(state.velocity));
      }
      moved += 0.5 * gap * pace;
      velocity = Math.max(velocity, moved);
      position = Math.max(position, placed + 0.5 * gap * moved);
    }
    return { position, velocity };
  }

  /** ∫y up to each time, m·s. */
  integrals(times: Float64Array): Float64Array {
    if (this.recorded !== null) return this.recorded.integrals(times);
    return times.map((t) => {
      let total = 0;
      for (const part of this.parts) {
        const s = Math.min(t, part.to) - part.from;
        if (s > 0) total += integralIn(part, s);
      }
      return total;
    });
  }

  /** y‴ from the right. */
  private jerkAt(t: number): number {
    const part = this.parts.findLast((one) => one.from <= t);
    if (part === undefined) return 0;
    const s = t - part.from;
    return part.forcings.reduce((sum, { amplitude, rate }) => {
      const now = multiply(amplitude, exponential({ re: rate.re * s, im: rate.im * s }));
      return sum + multiply(rate, now).re;
    }, part.jerk);
  }

  /** y, y′, y″ and, from the right, y‴ (0 between samples of a displacement) at each time. */
  table(times: Float64Array): MotionTable {
    if (this.recorded !== null) return this.recorded.table(times);
    const table = emptyTable(times.length);
    times.forEach((t, j) => {
      const { position, velocity, acceleration } = this.at(t);
      table.position[j] = position;
      table.velocity[j] = velocity;
      table.acceleration[j] = acceleration;
      table.jerk[j] = this.jerkAt(t);
    });
    return table;
  }

  at(t: number): SupportState {
    if (this.recorded !== null) {
      const { position, velocity, acceleration } = this.recorded.table(Float64Array.of(t));
      return { position: position[0], velocity: velocity[0], acceleration: acceleration[0] };
    }
    const { parts } = this;
    if (parts.length === 0 || t < parts[0].from) return { position: 0, velocity: 0, acceleration: 0 };
    let low = 0;
    let high = parts.length - 1;
    while (low < high) {
      const mid = (low + high + 1) >> 1;
      if (parts[mid].from <= t) low = mid;
      else high = mid - 1;
    }
    return stateIn(parts[low], t - parts[low].from);
  }
}

function stateIn(part: MotionPart, s: number): SupportState {
  let position = part.position + s * (part.velocity + s * (0.5 * part.acceleration + (s * part.jerk) / 6));
  let velocity = part.velocity + s * (part.acceleration + 0.5 * s * part.jerk);
  let acceleration = part.acceleration + s * part.jerk;
  for (const { amplitude, rate } of part.forcings) {
    const z = scale(rate, s);
    acceleration += multiply(amplitude, exponential(z)).re;
    velocity += s * multiply(amplitude, remainderQuotient(z, 1)).re;
    position += s * s * multiply(amplitude, remainderQuotient(z, 2)).re;
  }
  return { position, velocity, acceleration };
}

/** ∫y over the first s of a part. */
function integralIn(part: MotionPart, s: number): number {
  const quadratic = part.acceleration / 6 + (s * part.jerk) / 24;
  let total = s * (part.position + s * (0.5 * part.velocity + s * quadratic));
  for (const { amplitude, rate } of part.forcings) {
    total += s * s * s * multiply(amplitude, remainderQuotient(scale(rate, s), 3)).re;
  }
  return total;
}

/** (e^z − 1)/z, (e^z − 1 − z)/z², (e^z − 1 − z − z²/2)/z³: entire, by series for small z. */
function remainderQuotient(z: Complex, order: 1 | 2 | 3): Complex {
  const factorial = [1, 1, 2, 6][order];
  if (modulus(z) < 1) {
    let sum = complex(1);
    for (let m = 18; m >= 1; m--) sum = add(complex(1), scale(multiply(z, sum), 1 / (order + m)));
    return scale(sum, 1 / factorial);
  }
  let quotient = exponential(z);
  for (let m = 0; m < order; m++) quotient = divide(subtract(quotient, complex(1 / [1, 1, 2][m])), z);
  return quotient;
}

/** Parts of an acceleration history, integrated from rest; silence between and after them drifts on. */
function integrate(given: readonly HistoryPart[]): MotionPart[] {
  const parts: MotionPart[] = [];
  let position = 0;
  let velocity = 0;
  const push = (part: Omit<MotionPart, 'position' | 'velocity'>): void => {
    const whole = { ...part, position, velocity };
    parts.push(whole);
    if (Number.isFinite(part.to)) ({ position, velocity } = stateIn(whole, part.to - part.from));
  };
  given.forEach((part, index) => {
    push(
      part.kind === 'linear'
        ? { from: part.from, to: part.to, acceleration: part.value, jerk: part.slope, forcings: [] }
        : { from: part.from, to: part.to, acceleration: 0, jerk: 0, forcings: part.forcings },
    );
    const next = given[index + 1]?.from ?? Number.POSITIVE_INFINITY;
    if (part.to < next) push({ from: part.to, to: next, acceleration: 0, jerk: 0, forcings: [] });
  });
  return parts;
}

/** Parts of a displacement history, differentiated twice within each. */
function differentiate(given: readonly HistoryPart[]): MotionPart[] {
  const parts: MotionPart[] = [];
  given.forEach((part, index) => {
    if (part.kind === 'linear') {
      parts.push({
        from: part.from,
        to: part.to,
        position: part.value,
        velocity: part.slope,
        acceleration: 0,
        jerk: 0,
        forcings: [],
      });
    } else {
      let position = 0;
      let velocity = 0;
      const forcings = part.forcings.map(({ amplitude, rate }) => {
        position += amplitude.re;
        velocity += multiply(rate, amplitude).re;
        return { amplitude: multiply(multiply(rate, rate), amplitude), rate };
      });
      parts.push({ from: part.from, to: part.to, position, velocity, acceleration: 0, jerk: 0, forcings });
    }
    const next = given[index + 1]?.from ?? Number.POSITIVE_INFINITY;
    if (part.to < next) {
      parts.push({
        from: part.to,
        to: next,
        position: 0,
        velocity: 0,
        acceleration: 0,
        jerk: 0,
        forcings: [],
      });
    }
  });
  return parts;
}

function kicksOf(parts: readonly MotionPart[]): Kick[] {
  const kicks: Kick[] = [];
  let before = 0;
  for (const part of parts) {
    if (part.velocity !== before) kicks.push({ time: part.from, amount: part.velocity - before });
    before = Number.isFinite(part.to) ? stateIn(part, part.to - part.from).velocity : 0;
  }
  // rounding of a smooth joint is no kick
  const size = kicks.reduce((most, kick) => Math.max(most, Math.abs(kick.amount)), 0);
  return kicks.filter((kick) => Math.abs(kick.amount) > 1e-13 * size);
}

/** y″ + α y′ on a part. */
function driveOf(part: MotionPart, drag: number): HistoryPart[] {
  const { from, to } = part;
  if (part.forcings.length === 0) {
    const line: LinearPart = {
      kind: 'linear',
      from,
      to,
      value: part.acceleration + drag * part.velocity,
      slope: part.jerk + drag * part.acceleration,
      curve: drag * part.jerk,
    };
    return line.value === 0 && line.slope === 0 && line.curve === 0 ? [] : [line];
  }
  if (drag === 0) return [{ kind: 'wave', from, to, forcings: part.forcings }];
  let constant = drag * part.velocity;
  const forcings = part.forcings.map(({ amplitude, rate }) => {
    const integral: Complex = divide(amplitude, rate);
    constant -= drag * integral.re;
    return {
      amplitude: { re: amplitude.re + drag * integral.re, im: amplitude.im + drag * integral.im },
      rate,
    };
  });
  return [
    {
      kind: 'wave',
      from,
      to,
      forcings: [...forcings, { amplitude: complex(constant), rate: scale(complex(1), 0) }],
    },
  ];
}

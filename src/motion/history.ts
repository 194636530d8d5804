import { complex, divide, exponential, multiply, subtract, type Complex } from '../numerics/complex.ts';
import type { History } from '../spec/types.ts';
import type { WaveForcing } from './wave-forcing.ts';

/** A stretch of time on which a history is a straight line; `value` and `slope` at its beginning. */
export interface LinearPart {
  readonly kind: 'linear';
  readonly from: number;
  readonly to: number;
  readonly value: number;
  readonly slope: number;
  /** Second derivative; 0 for the histories of a request, used where they are integrated. */
  readonly curve: number;
}

/** A stretch on which it is Re(z e^{a (t − from)}). */
export interface WavePart {
  readonly kind: 'wave';
  readonly from: number;
  readonly to: number;
  readonly forcings: readonly WaveForcing[];
}

export type HistoryPart = LinearPart | WavePart;

/** A record of equally spaced samples, straight between them. */
export interface SampledRecord {
  readonly start: number;
  readonly interval: number;
  readonly values: Float64Array;
  /** Whether the last value goes on after the record (end displacements), or 0. */
  readonly holds: boolean;
}

/** A history in time: a few parts, or a record; 0 wherever no part is. */
export interface TimeHistory {
  readonly parts: readonly HistoryPart[];
  readonly record: SampledRecord | null;
}

const FOREVER = Number.POSITIVE_INFINITY;

/**
 * The parts of a history. A record with a handful of samples becomes parts; `holdLast` continues it
 * with its last value (end displacements), else it is 0 after its last sample.
 */
export function readHistory(history: History, holdLast = false): TimeHistory {
  if (history.type !== 'samples') return { parts: partsOf(history), record: null };
  const values = Float64Array.from(history.values);
  const { start, interval } = history;
  if (values.length > 64) {
    return { parts: [], record: { start, interval, values, holds: holdLast } };
  }
  return { parts: recordParts({ start, interval, values, holds: holdLast }), record: null };
}

function partsOf(history: Exclude<History, { type: 'samples' }>): HistoryPart[] {
  const { amplitude, start } = history;
  switch (history.type) {
    case 'harmonic': {
      const rate = complex(0, 2 * Math.PI * history.frequency);
      const phase = { re: amplitude * Math.cos(history.phase), im: amplitude * Math.sin(history.phase) };
      return [{ kind: 'wave', from: start, to: FOREVER, forcings: [{ amplitude: phase, rate }] }];
    }
    case 'step':
      return [line(start, FOREVER, amplitude, 0)];
    case 'ramp': {
      const end = start + history.duration;
      return [line(start, end, 0, amplitude / history.duration), line(end, FOREVER, amplitude, 0)];
    }
    case 'half-sine-pulse': {
      const rate = complex(0, Math.PI / history.duration);
      return [
        {
          kind: 'wave',
          from: start,
          to: start + history.duration,
          forcings: [{ amplitude: complex(0, -amplitude), rate }],
        },
      ];
    }
    case 'rectangular-pulse':
      return [line(start, start + history.duration, amplitude, 0)];
  }
}

function line(from: number, to: number, value: number, slope: number): LinearPart {
  return { kind: 'linear', from, to, value, slope, curve: 0 };
}

/** The straight lines between the samples of a record, and what follows it. */
export function recordParts(record: SampledRecord): LinearPart[] {
  const { start, interval, values, holds } = record;
  const parts: LinearPart[] = [];
  for (let i = 0; i + 1 < values.length; i++) {
    parts.push(
      line(
        start + i * interval,
        start + (i + 1) * interval,
        values[i],
        (values[i + 1] - values[i]) / interval,
      ),
    );
  }
  const end = start + (values.length - 1) * interval;
  if (holds) parts.push(line(end, FOREVER, values[values.length - 1], 0));
  return parts;
}

/** A drive and its rate at a set of times. */
export interface DriveTable {
  readonly value: Float64Array;
  readonly rate: Float64Array;
}

/** Value and rate of a history at each time, from the right. */
export function historyTable(history: TimeHistory, times: Float64Array): DriveTable {
  const value = new Float64Array(times.length);
  const rate = new Float64Array(times.length);
  if (history.record !== null) {
    fillFromRecord(history.record, times, value, rate);
    return { value, rate };
  }
  times.forEach((t, j) => {
    const now = historyAt(history, t);
    value[j] = now.value;
    rate[j] = now.rate;
  });
  return { value, rate };
}

/** Value and rate of a history at a time, from the right. */
export function historyAt(history: TimeHistory, t: number): { value: number; rate: number } {
  const { record } = history;
  if (record !== null) {
    const { value, rate } = historyTable(history, Float64Array.of(t));
    return { value: value[0], rate: rate[0] };
  }
  for (const part of history.parts) {
    if (t < part.from || t >= part.to) continue;
    const h = t - part.from;
    if (part.kind === 'linear') {
      return {
        value: part.value + h * (part.slope + 0.5 * h * part.curve),
        rate: part.slope + h * part.curve,
      };
    }
    let value = 0;
    let rate = 0;
    for (const { amplitude, rate: a } of part.forcings) {
      const now: Complex = multiply(amplitude, exponential({ re: a.re * h, im: a.im * h }));
      value += now.re;
      rate += multiply(a, now).re;
    }
    return { value, rate };
  }
  return { value: 0, rate: 0 };
}

function fillFromRecord(
  { start, interval, values, holds }: SampledRecord,
  times: Float64Array,
  value: Float64Array,
  rate: Float64Array,
): void {
  const last = values.length - 1;
  for (let j = 0; j < times.length; j++) {
    const place = (times[j] - start) / interval;
    const i = sampleBefore(place);
    if (i < 0) continue;
    if (i >= last) {
      value[j] = holds ? values[last] : 0;
      continue;
    }
    rate[j] = (values[i + 1] - values[i]) / interval;
    value[j] = values[i] + rate[j] * Math.max(0, (place - i) * interval);
  }
}

/** Index of the sample at or before a place in a record; a place within rounding of a sample is on it. */
export function sampleBefore(place: number): number {
  const nearest = Math.round(place);
  return Math.abs(place - nearest) < 1e-9 ? nearest : Math.floor(place);
}

/** ∫p from the history's beginning up to a time, for every time given. */
export function historyIntegrals(history: TimeHistory, times: Float64Array): Float64Array {
  if (history.record !== null) return recordIntegrals(history.record, times);
  return times.map((t) => {
    let total = 0;
    for (const part of history.parts) {
      const h = Math.min(t, part.to) - part.from;
      if (h <= 0) continue;
      if (part.kind === 'linear') {
        total += h * (part.value + h * (0.5 * part.slope + (h * part.curve) / 6));
        continue;
      }
      for (const { amplitude, rate } of part.forcings) {
        // ∫Re(z e^{rs}) = Re(z (e^{rh} − 1)/r), by sine and cosine of half the angle for small h
        const middle = exponential({ re: 0.5 * rate.re * h, im: 0.5 * rate.im * h });
        const turned = multiply(amplitude, middle);
        const half = 0.5 * rate.im * h;
        if (rate.re === 0) total += turned.re * h * (half === 0 ? 1 : Math.sin(half) / half);
        else total += divide(multiply(amplitude, subtract(multiply(middle, middle), complex(1))), rate).re;
      }
    }
    return total;
  });
}

function recordIntegrals(record: SampledRecord, times: Float64Array): Float64Array {
  const { start, interval: h, values, holds } = record;
  const last = values.length - 1;
  const sums = new Float64Array(values.length);
  for (let i = 0; i < last; i++) sums[i + 1] = sums[i] + 0.5 * h * (values[i] + values[i + 1]);
  return times.map((t) => {
    const place = (t - start) / h;
    const i = sampleBefore(place);
    if (i < 0) return 0;
    if (i >= last) return sums[last] + (holds ? values[last] * (t - start - last * h) : 0);
    const s = Math.max(0, (place - i) * h);
    return sums[i] + s * (values[i] + (0.5 * s * (values[i + 1] - values[i])) / h);
  });
}

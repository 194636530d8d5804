import { ticks as evenTicks } from 'd3-array';
import { scaleLinear, scaleLog } from 'd3-scale';
import { formatNumber, formatQuantity, formatTicks } from '../text/format-values.ts';
import { textWidth } from '../text/font.ts';
import { inUnit, readableUnit, superscript } from '../text/units.ts';
import { sizes } from './theme.ts';

/** What an axis measures. */
export interface AxisSpec {
  /** The quantity in words, "displacement". */
  readonly name: string;
  /** Its unit as printed; the axis chooses the prefix. */
  readonly unit: string;
  /** Range of values shown, in the unit. */
  readonly from: number;
  readonly to: number;
  readonly logarithmic?: boolean;
  /** Only whole numbers are ticked: numbers of modes. */
  readonly whole?: boolean;
  /** Ticks at these values where they fit, instead of round numbers. */
  readonly marks?: readonly { readonly value: number; readonly label: string }[];
}

export interface Tick {
  /** px along the axis. */
  readonly at: number;
  readonly label: string;
}

/** An axis laid out on a stretch of the sheet. */
export interface Axis {
  /** "displacement (mm)". */
  readonly title: string;
  readonly ticks: readonly Tick[];
  /** Place of a value, px; values beyond a range that is not finite in its scale stay at the edge. */
  readonly place: (value: number) => number;
}

/** Which way an axis runs; upright ones grow upwards. */
export type Direction = 'across' | 'upright';

const gapBetweenLabels = 10;

/**
 * Lays an axis out between two places (px, start and end of the range) with as many ticks as fit without
 * touching. Cost O(ticks).
 */
export function layOutAxis(spec: AxisSpec, start: number, end: number, direction: Direction): Axis {
  const length = Math.abs(end - start);
  if (spec.logarithmic === true) return logarithmicAxis(spec, start, end, direction);
  const { exponent, symbol, offset } = readingOf(spec);
  const from = inUnit(spec.from - offset, exponent);
  const to = inUnit(spec.to - offset, exponent);
  const scale = scaleLinear([from, to], [start, end]);
  const place = (value: number) => scale(inUnit(value - offset, exponent));
  const name = offset === 0 ? spec.name : `${spec.name} − ${exactly(offset, spec.unit)}`;
  const title = symbol === '' ? name : `${name} (${symbol})`;
  if (spec.marks !== undefined) {
    const marks = spec.marks.map(({ value, label }) => ({ at: place(value), label }));
    let stride = 1;
    while (stride < marks.length && !fits(everyNth(marks, stride), direction)) stride++;
    return { title, ticks: everyNth(marks, stride), place };
  }
  const most = Math.max(2, Math.min(10, Math.floor(length / (direction === 'across' ? 55 : 26))));
  let best: Tick[] = [];
  for (const count of countsFrom(most)) {
    for (const values of tickChoices(Math.min(from, to), Math.max(from, to), count, spec.whole === true)) {
      const labels = formatTicks(values);
      const list = values.map((value, i) => ({ at: scale(value), label: labels[i] }));
      if (!fits(list, direction)) continue;
      if (list.length >= 2) return { title, ticks: list, place };
      if (best.length === 0) best = list;
    }
  }
  return { title, ticks: best, place };
}

/** Numbers of ticks to try: fewer and fewer, then more, so that a range is hardly left with its zero alone. */
function countsFrom(most: number): number[] {
  const fewer = Array.from({ length: most }, (_, i) => most - i);
  const more = Array.from({ length: Math.max(0, 6 - most) }, (_, i) => most + 1 + i);
  return [...fewer, ...more];
}

/** Round values in a range, and every second or third of a finer series, zero among them. */
function tickChoices(from: number, to: number, count: number, whole: boolean): number[][] {
  return [1, 2, 3].map((stride) => {
    const values = evenTicks(from, to, stride * count).filter((value) => !whole || Number.isInteger(value));
    const zero = Math.max(values.indexOf(0), 0);
    return values.filter((_, i) => (i - zero) % stride === 0);
  });
}

function everyNth<Item>(list: readonly Item[], stride: number): Item[] {
  return list.filter((_, i) => i % stride === 0);
}

/** Whether neighbouring labels keep their distance. */
function fits(list: readonly Tick[], direction: Direction): boolean {
  return list.every((tick, i) => {
    if (i === 0) return true;
    const apart = Math.abs(tick.at - list[i - 1].at);
    if (direction === 'upright') return apart >= sizes.tick + 2.5;
    const half = (textWidth(tick.label, sizes.tick) + textWidth(list[i - 1].label, sizes.tick)) / 2;
    return apart >= half + gapBetweenLabels;
  });
}

/**
 * The unit of an axis. A range that is narrow beside its distance from zero is read from its start, for its
 * ticks would differ in their last digits only.
 */
function readingOf({ from, to, unit }: AxisSpec): { exponent: number; symbol: string; offset: number } {
  const span = to - from;
  const size = Math.max(Math.abs(from), Math.abs(to));
  if (span > 0 && span < 1e-4 * size) return { ...readableUnit(span, unit), offset: from };
  return { ...readableUnit(size, unit), offset: 0 };
}

function exactly(value: number, unit: string): string {
  return formatQuantity(value, unit, 15);
}

function logarithmicAxis(spec: AxisSpec, start: number, end: number, direction: Direction): Axis {
  const { from, to, unit } = spec;
  const scale = scaleLog([from, to], [start, end]).clamp(true);
  const place = (value: number) => scale(Math.max(value, Number.MIN_VALUE));
  const decades = Math.log10(to / from);
  const wide = decades > 3.2;
  // over many decades every tick has its own prefix, where the unit takes one
  const own = wide && /^[A-Za-z]{1,3}$/.test(unit);
  const { exponent, symbol } = wide ? { exponent: 0, symbol: unit } : readableUnit(to, unit);
  const title = symbol === '' || own ? spec.name : `${spec.name} (${symbol})`;
  for (const digits of wide ? [[1]] : [[1, 2, 5], [1, 3], [1]]) {
    for (let every = 1; every <= (digits.length > 1 ? 1 : 512); every++) {
      const values = decadeTicks(from, to, digits, every);
      const list = values.map((value) => ({ at: place(value), label: label(value) }));
      if (list.length >= 2 && fits(list, direction)) return { title, ticks: list, place };
    }
  }
  // less than a decade: round numbers of a linear axis on the logarithmic scale
  for (let count = 5; count >= 1; count--) {
    const values = evenTicks(from, to, count);
    const list = values.map((value) => ({ at: place(value), label: label(value) }));
    if (fits(list, direction)) return { title, ticks: list, place };
  }
  return { title, ticks: [], place };

  function label(value: number): string {
    if (!wide) return formatNumber(inUnit(value, exponent), 4);
    if (own) return formatQuantity(value, unit);
    const power = Math.round(Math.log10(value));
    return Math.abs(Math.log10(value) - power) < 1e-9
      ? power >= 0 && power <= 3
        ? formatNumber(value)
        : `10${superscript(power)}`
      : formatNumber(value, 2);
  }
}

function decadeTicks(from: number, to: number, digits: readonly number[], every: number): number[] {
  const values: number[] = [];
  const first = Math.ceil(Math.log10(from) - 1e-9);
  for (let power = Math.floor(Math.log10(from)); power <= Math.ceil(Math.log10(to)); power++) {
    if ((power - first) % every !== 0) continue;
    for (const digit of digits) {
      const value = Number(`${digit}e${power}`);
      if (value >= from * (1 - 1e-12) && value <= to * (1 + 1e-12)) values.push(value);
    }
  }
  return values;
}

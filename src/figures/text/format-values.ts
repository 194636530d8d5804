import { format } from 'd3-format';
import { decimalExponent, inUnit, readableUnit } from './units.ts';

/**
 * A value with its unit as an engineer writes it: "21.6 m", "0.45 mm" as "450 µm", "0 m". Zeros at the
 * end are left out.
 *
 * @param unit as printed; the prefix is chosen
 * @param digits significant digits
 */
export function formatQuantity(value: number, unit: string, digits = 3): string {
  // rounded first, so that 999.96 becomes 1.00 k and not 1000
  const rounded = Number(value.toPrecision(digits));
  const { exponent, symbol } = readableUnit(Math.abs(rounded), unit);
  const number = formatNumber(inUnit(rounded, exponent), digits);
  if (symbol.startsWith('10')) return `${number}·${symbol}`;
  return symbol === '' ? number : `${number} ${symbol}`;
}

/** A plain number with so many significant digits, thousands grouped, zeros at the end left out. */
export function formatNumber(value: number, digits = 3): string {
  if (!Number.isFinite(value)) return String(value);
  const size = Math.abs(value);
  if (size !== 0 && (size >= 1e9 || size < 1e-4)) return scientific(value, digits);
  const decimals = size === 0 ? 0 : Math.max(0, digits - 1 - decimalExponent(size));
  return format(`,.${Math.min(decimals, 20)}~f`)(Number(value.toPrecision(digits)));
}

function scientific(value: number, digits: number): string {
  const [mantissa, exponent] = value.toExponential(digits - 1).split('e');
  const number = mantissa.includes('.') ? mantissa.replace(/\.?0+$/, '') : mantissa;
  return `${number}e${Number(exponent)}`.replaceAll('-', '−');
}

/**
 * A value of a series with as many digits as tell it from its neighbours, three at least.
 *
 * @param step distance of the neighbours, in the unit
 */
export function formatAmong(value: number, step: number, unit: string): string {
  const digits = step > 0 && value !== 0 ? decimalExponent(Math.abs(value)) - decimalExponent(step) + 2 : 3;
  return formatQuantity(value, unit, Math.min(15, Math.max(3, digits)));
}

/** How many of a thing, "1 mode", "12 modes". */
export function countOf(count: number, one: string, many = `${one}s`): string {
  return `${format(',')(count)} ${count === 1 ? one : many}`;
}

/**
 * Labels of ticks: all with the decimals that their step needs and no more, so that neighbours differ.
 *
 * @param ticks ascending, evenly spaced
 */
export function formatTicks(ticks: readonly number[]): string[] {
  if (ticks.length === 0) return [];
  const step = ticks.length > 1 ? Math.abs(ticks[1] - ticks[0]) : Math.abs(ticks[0]);
  const decimals = decimalsOf(step);
  const write = format(`,.${decimals}f`);
  return ticks.map((tick) => (Math.abs(tick) < 1e-9 * step ? '0' : write(tick)));
}

/** Decimals that a step of one digit (1, 2, 2.5 or 5 times a power of ten) needs. */
function decimalsOf(step: number): number {
  if (step === 0) return 0;
  const digits = Number(step.toPrecision(6)).toExponential();
  const [mantissa, exponent] = digits.split('e');
  return Math.min(20, Math.max(0, (mantissa.split('.')[1]?.length ?? 0) - Number(exponent)));
}

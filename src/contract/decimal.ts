import type { Unit } from './unit-table.ts';

/** 10^39·π, truncated (OEIS A000796). */
const piDigits = 3141592653589793238462643383279502884197n;
const piScale = 10n ** 39n;

const decimalPattern = /^(-?)(\d+)(?:\.(\d+))?(?:[eE]([+-]?\d+))?$/;

/** Whether a text is a number as JSON writes it (RFC 8259, section 6). */
export function isDecimal(text: string): boolean {
  return /^-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?$/.test(text);
}

/**
 * What turns the text of a number in a unit into SI: the double nearest to the exact product of
 * decimal and factor. `45.3` mm gives the very double that the literal 0.0453 gives, so that a
 * request has one canonical form however it is written.
 *
 * The product is formed in integers to 45 digits and rounded once, by the parser of the language
 * (ECMA-262, Number of a string: correctly rounded); a trailing digit keeps the direction of what
 * was cut.
 *
 * @returns a function of a JSON number with an exponent within ±400; infinite where it overflows;
 *   cost below a microsecond for powers of ten, a few for other factors
 */
export function decimalScaler(unit: Unit): (text: string) => number {
  const power = powerOfTen(unit);
  return power === null ? (text) => scaleExactly(text, unit) : (text) => shiftPoint(text, power);
}

/** p where the factor of the unit is 10^p, else null. */
function powerOfTen({ numerator, denominator, pi }: Unit): number | null {
  const [up, down] = [numerator.toString(), denominator.toString()];
  if (pi !== 0 || !/^10*$/.test(up) || !/^10*$/.test(down)) return null;
  return up.length - down.length;
}

function shiftPoint(text: string, power: number): number {
  const mark = text.search(/[eE]/);
  const value =
    mark < 0
      ? Number(`${text}e${power}`)
      : Number(`${text.slice(0, mark)}e${Number(text.slice(mark + 1)) + power}`);
  return value === 0 ? 0 : value;
}

function scaleExactly(text: string, unit: Unit): number {
  const [, sign, whole, fraction = '', exponent = '0'] = decimalPattern.exec(text)!;
  let numerator = BigInt(whole + fraction) * unit.numerator;
  let denominator = unit.denominator;
  for (let i = 0; i < Math.abs(unit.pi); i++) {
    numerator *= unit.pi > 0 ? piDigits : piScale;
    denominator *= unit.pi > 0 ? piScale : piDigits;
  }
  const shift = 45 + digits(denominator) - digits(numerator);
  if (shift > 0) numerator *= 10n ** BigInt(shift);
  else denominator *= 10n ** BigInt(-shift);
  const sticky = numerator % denominator === 0n ? '0' : '1';
  const power = Number(exponent) - fraction.length - shift - 1;
  const size = Number(`${numerator / denominator}${sticky}e${power}`);
  return sign === '-' && size !== 0 ? -size : size;
}

function digits(value: bigint): number {
  return value.toString().length;
}

/** SI prefixes by powers of 1000 (BIPM, The International System of Units, 9th edition, 2019, table 7). */
const prefixes: readonly (readonly [exponent: number, symbol: string])[] = [
  [-24, 'y'],
  [-21, 'z'],
  [-18, 'a'],
  [-15, 'f'],
  [-12, 'p'],
  [-9, 'n'],
  [-6, 'µ'],
  [-3, 'm'],
  [0, ''],
  [3, 'k'],
  [6, 'M'],
  [9, 'G'],
  [12, 'T'],
  [15, 'P'],
  [18, 'E'],
  [21, 'Z'],
  [24, 'Y'],
];

/** Units that are read plainly over a wider range than 1 to 1000: from, up to. */
const plainRange: Readonly<Record<string, readonly [from: number, to: number]>> = {
  m: [1, 1e4],
  'm/s': [1, 1e4],
  kg: [1, 1e4],
  s: [1, 1e7],
  rad: [1, 1e5],
  '/√kg': [1e-1, 1e3],
  '/√(kg·m²)': [1e-1, 1e3],
  '%': [1e-2, 1e3],
  '': [1e-3, 1e4],
};

/** Units whose multiples have no name in use: seconds are never kiloseconds. */
const noMultiples = new Set(['s', 'rad', 'rad/s', 'rad/s²']);

/** A unit in which values of one size read well: value in the unit = value / 10^exponent. */
export interface ReadableUnit {
  readonly exponent: number;
  /** As printed, "mm", "10⁻³ /√kg"; empty for a pure number of usual size. */
  readonly symbol: string;
}

const superscripts: Readonly<Record<string, string>> = {
  '-': '⁻',
  '0': '⁰',
  '1': '¹',
  '2': '²',
  '3': '³',
  '4': '⁴',
  '5': '⁵',
  '6': '⁶',
  '7': '⁷',
  '8': '⁸',
  '9': '⁹',
};

export function superscript(number: number): string {
  return String(number).replace(/[-\d]/g, (character) => superscripts[character]);
}

/** A unit in UCUM code as it is printed: "m/s2" → "m/s²", "N.m" → "N·m"; a ratio of like units is no unit. */
export function printedUnit(code: string): string {
  const ratio = /^\((.+)\)\/\((.+)\)$/.exec(code) ?? /^([^/]+)\/([^/]+)$/.exec(code);
  if (code === '1' || (ratio !== null && ratio[1] === ratio[2])) return '';
  return code
    .replace(/\(([A-Za-z]+)\)/g, '$1')
    .replace(/([A-Za-z])(-?\d+)/g, (_, letter: string, power: string) => letter + superscript(Number(power)))
    .replaceAll('.', '·');
}

/**
 * The unit in which a value of this size has one to three digits before the point: a prefix by powers of
 * 1000 where the unit takes one, a power of ten before it where it does not.
 *
 * @param size largest magnitude to be read, in the unit; 0 keeps the unit
 * @param unit as printed
 */
export function readableUnit(size: number, unit: string): ReadableUnit {
  const [from, to] = plainRange[unit] ?? [1, 1e3];
  if (!(size > 0) || (size >= from && size < to)) return plain(unit);
  const exponent = 3 * Math.floor(decimalExponent(size) / 3);
  if (unit.startsWith('kg')) return readableMass(exponent, unit);
  const prefix = prefixes.find(([power]) => power === exponent)?.[1];
  if (exponent === 0) return plain(unit);
  if (prefix !== undefined && /^\(?[A-Za-z]/.test(unit) && !(exponent > 0 && noMultiples.has(unit))) {
    return { exponent, symbol: unit.replace(/^\(?/, (opening) => opening + prefix) };
  }
  return powerOfTen(exponent, unit);
}

/** Masses: grams below the kilogram; tonnes, kilotonnes above. */
function readableMass(exponent: number, unit: string): ReadableUnit {
  const rest = unit.slice(2);
  if (exponent === 0) return { exponent, symbol: unit };
  const grams = prefixes.find(([power]) => power === exponent + 3)?.[1];
  if (exponent < 0 && grams !== undefined) return { exponent, symbol: `${grams}g${rest}` };
  if (exponent === 6) return { exponent: 3, symbol: `t${rest}` };
  const tonnes = prefixes.find(([power]) => power === exponent - 3)?.[1];
  if (exponent > 0 && tonnes !== undefined) return { exponent, symbol: `${tonnes}t${rest}` };
  return powerOfTen(exponent, unit);
}

/** A unit that is a reciprocal begins with its stroke; a number stands before it. */
function plain(unit: string): ReadableUnit {
  return { exponent: 0, symbol: unit.startsWith('/') ? `1${unit}` : unit };
}

function powerOfTen(exponent: number, unit: string): ReadableUnit {
  const blank = unit === '' || unit.startsWith('/') ? '' : ' ';
  return { exponent, symbol: `10${superscript(exponent)}${blank}${unit}` };
}

/** ⌊log₁₀ size⌋ from the decimal digits, so that powers of ten are never off by one. */
export function decimalExponent(size: number): number {
  return Number(size.toExponential().split('e')[1]);
}

/** value / 10^exponent; by division for small powers, which are exact, so that 1e-3 reads 1. */
export function inUnit(value: number, exponent: number): number {
  if (exponent < -300) return value * 1e300 * 10 ** (-exponent - 300);
  return exponent < 0 ? value * 10 ** -exponent : value / 10 ** exponent;
}

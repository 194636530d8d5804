import { type Atom, atoms, dimensionless, misspellings, prefixPowers, type Unit } from './unit-table.ts';

const one: Unit = { numerator: 1n, denominator: 1n, pi: 0, exponents: dimensionless };

/** Exponents beyond this mean a slip, not a unit. */
const largestExponent = 9;

/**
 * The unit of a UCUM code: products `.`, quotients `/` (left to right), exponents (`mm2`, `s-1`),
 * parentheses, prefixes, a leading `/` or `1/`. No other factors, no annotations.
 *
 * @param code for instance `kN`, `N/mm2`, `kg/m3`, `kN.m/rad`
 * @returns null when the code is not understood; cost O(length of the code)
 */
export function readUnit(code: string): Unit | null {
  if (code.length > 60) return null;
  const reader = { code, next: code.startsWith('1/') ? 1 : 0 };
  const unit = readTerm(reader);
  return reader.next === code.length ? unit : null;
}

interface Reader {
  readonly code: string;
  next: number;
}

function readTerm(reader: Reader): Unit | null {
  let result: Unit | null = one;
  let divide = reader.code[reader.next] === '/';
  if (divide) reader.next++;
  for (;;) {
    const component = readComponent(reader);
    if (component === null) return null;
    result = multiply(result, component, divide ? -1 : 1);
    const operator = reader.code[reader.next];
    if (operator !== '.' && operator !== '/') return result;
    divide = operator === '/';
    reader.next++;
  }
}

function readComponent(reader: Reader): Unit | null {
  if (reader.code[reader.next] === '(') {
    reader.next++;
    const inner = readTerm(reader);
    return inner !== null && reader.code[reader.next++] === ')' ? inner : null;
  }
  const pattern = /(\[[a-z_]+\]|[A-Za-z]+)([+-]?\d{1,2})?/y;
  pattern.lastIndex = reader.next;
  const match = pattern.exec(reader.code);
  if (match === null) return null;
  reader.next = pattern.lastIndex;
  const unit = readSimpleUnit(match[1]);
  const exponent = match[2] === undefined ? 1 : Number(match[2]);
  if (unit === null || exponent === 0 || Math.abs(exponent) > largestExponent) return null;
  return multiply(one, unit, exponent);
}

/** An atom, or a prefix and an atom that takes it. */
function readSimpleUnit(symbol: string): Unit | null {
  const whole = atoms.get(symbol);
  if (whole !== undefined) return whole;
  for (const [prefix, power] of prefixPowers) {
    const rest = symbol.startsWith(prefix) ? atoms.get(symbol.slice(prefix.length)) : undefined;
    if (rest?.prefixes.includes(prefix)) return scale(rest, power);
  }
  return null;
}

function scale(unit: Atom, power: number): Unit {
  const factor = 10n ** BigInt(Math.abs(power));
  return {
    ...unit,
    numerator: power > 0 ? unit.numerator * factor : unit.numerator,
    denominator: power < 0 ? unit.denominator * factor : unit.denominator,
  };
}

function multiply(left: Unit, right: Unit, exponent: number): Unit {
  const size = BigInt(Math.abs(exponent));
  const [up, down] =
    exponent > 0 ? [right.numerator, right.denominator] : [right.denominator, right.numerator];
  const { m, kg, s, rad, cycle } = right.exponents;
  return {
    numerator: left.numerator * up ** size,
    denominator: left.denominator * down ** size,
    pi: left.pi + exponent * right.pi,
    exponents: {
      m: left.exponents.m + exponent * m,
      kg: left.exponents.kg + exponent * kg,
      s: left.exponents.s + exponent * s,
      rad: left.exponents.rad + exponent * rad,
      cycle: left.exponents.cycle + exponent * cycle,
    },
  };
}

/** The code that was probably meant, or null: another case, a trade spelling, typographic signs. */
export function suggestUnit(code: string): string | null {
  const plain = code
    .replaceAll(/[·⋅*×]/g, '.')
    .replaceAll('²', '2')
    .replaceAll('³', '3')
    .replaceAll('⁴', '4')
    .replaceAll('^', '')
    .replaceAll('µ', 'u')
    .replaceAll('μ', 'u')
    .replaceAll(' ', '');
  const mended = plain
    .split(/([./()])/)
    .map(mendPart)
    .join('');
  return mended !== code && readUnit(mended) !== null ? mended : null;
}

function mendPart(part: string): string {
  const [, symbol, exponent] = /^(.*?)([+-]?\d*)$/.exec(part)!;
  if (symbol === '' || readUnit(symbol) !== null) return part;
  const spelled = misspellings.get(symbol) ?? misspellings.get(symbol.toLowerCase());
  if (spelled !== undefined) return spelled + exponent;
  const lower = symbol.toLowerCase();
  for (const known of commonSymbols) if (known.toLowerCase() === lower) return known + exponent;
  return part;
}

/** Symbols whose case is often wrong, likeliest first. */
const commonSymbols = [
  'kN',
  'MN',
  'N',
  'MPa',
  'GPa',
  'kPa',
  'Pa',
  'kg',
  'mm',
  'cm',
  'm',
  'km',
  's',
  'ms',
  'Hz',
  'kHz',
  'rad',
  'deg',
  'min',
  'h',
  'g',
  't',
  'J',
  'kJ',
];

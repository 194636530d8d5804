import ucum from '@lhncbc/ucum-lhc';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimalScaler } from '../../src/contract/decimal.ts';
import { dimensions } from '../../src/contract/dimensions.ts';
import { readUnit, suggestUnit } from '../../src/contract/unit-grammar.ts';
import { atoms, type Exponents, prefixPowers } from '../../src/contract/unit-table.ts';

/** An independent implementation of UCUM, used as oracle. */
const oracle = ucum.UcumLhcUtils.getInstance();

/** The SI unit of the exponents as a UCUM code; a frequency is one in Hz. */
function siCode({ m, kg, s, rad, cycle }: Exponents): string {
  if (cycle === 1) return 'Hz';
  const parts = Object.entries({ kg, m, s, rad }).filter(([, exponent]) => exponent !== 0);
  return parts.map(([base, exponent]) => `${base}${exponent}`).join('.');
}

function expectAgreement(code: string): void {
  const unit = readUnit(code);
  if (unit === null) throw new Error(`${code} is not read`);
  const { toVal } = oracle.convertUnitTo(code, 1, siCode(unit.exponents));
  if (toVal === null) throw new Error(`the oracle does not convert ${code}`);
  const factor = decimalScaler(unit)('1');
  // The oracle multiplies doubles: a few rounding units.
  expect({ code, near: Math.abs(toVal / factor - 1) < 16 * Number.EPSILON }).toEqual({ code, near: true });
}

const products = [
  'N/mm2',
  'kg/m3',
  'g/cm3',
  'm4',
  'kN.m',
  'kN.m/rad',
  'N.m.s/rad',
  'kg.m2',
  'kN.s/m2',
  '[lbf_av]/[in_i]',
  '[lbf_av].[ft_i]',
  '[lb_av]/[ft_i]3',
  '[in_i]2',
  'km/h',
  'deg/s',
  '/s',
  '1/s',
  's-1',
  '/min',
  'm/(s.s)',
  'kg.m.s-2',
  'MN.m2/rad',
];

describe('units agree with an independent implementation of UCUM', () => {
  it('every symbol, bare and with every prefix it takes', () => {
    for (const [symbol, { prefixes }] of atoms) {
      expectAgreement(symbol);
      for (const prefix of prefixes) expectAgreement(prefix + symbol);
    }
  });

  it('products, quotients, exponents and parentheses', () => {
    for (const code of products) expectAgreement(code);
  });

  it('every unit that an error message recommends', () => {
    for (const { unit, examples, exponents } of Object.values(dimensions)) {
      for (const code of [unit, ...examples]) {
        expectAgreement(code);
        const { m, kg, s } = readUnit(code)!.exponents;
        expect({ code, m, kg, s }).toEqual({ code, m: exponents.m, kg: exponents.kg, s: exponents.s });
      }
    }
  });

  it('what UCUM refuses is refused here too', () => {
    const refused = ['KN', 'mpa', 'kip', 'cm^4', 'm**2', 'N/', '.N', 'N..m', 'kkg', 'm(', '(m', 'm)'];
    for (const code of refused) {
      const { status } = oracle.validateUnitString(code);
      expect({ code, valid: status === 'valid', unit: readUnit(code) }).toEqual({
        code,
        valid: false,
        unit: null,
      });
    }
  });

  it('customary units take no prefix, and a tonne only those in use', () => {
    for (const code of ['k[in_i]', 'mmin', 'ft', 'pt', 'mdeg'])
      expect({ code, unit: readUnit(code) }).toEqual({ code, unit: null });
    expect(readUnit('kt')).not.toBeNull();
  });

  it('prefixes are powers of ten', () => {
    for (const [prefix, power] of prefixPowers) {
      expect(decimalScaler(readUnit(`${prefix}m`)!)('1')).toBe(Number(`1e${power}`));
    }
  });
});

const powers: Readonly<Record<string, number>> = { mm: -3, kN: 3, MPa: 6, us: -6, mm2: -6, 'g/cm3': 3 };

describe('factors are exact', () => {
  // Definitions: NIST Special Publication 811 (2008), appendix B.8, values printed in bold (exact);
  // the pound-force and the psi follow from the exact pound, inch and standard gravity.
  it.each([
    ['1', '[in_i]', 0.0254],
    ['1', '[ft_i]', 0.3048],
    ['1', '[yd_i]', 0.9144],
    ['1', '[mi_i]', 1609.344],
    ['1', '[lb_av]', 0.45359237],
    ['1', '[lbf_av]', 4.4482216152605],
    ['1', 'kgf', 9.80665],
    ['1', 'bar', 100000],
    ['12', '[in_i]', 0.3048],
    ['45.3', 'mm', 0.0453],
    ['0.1', 'MN', 100000],
    ['1.1', 'kN', 1100],
    ['2.4e3', 'kN', 2.4e6],
    ['-7.85', 'g/cm3', -7850],
    ['90', 'deg', Math.PI / 2],
    ['180', 'deg', Math.PI],
    ['36', 'km/h', 10],
  ])('%s %s is %d', (number, code, value) => {
    expect(decimalScaler(readUnit(code)!)(number)).toBe(value);
  });

  // Correctly rounded quotients of integers, from Python: float(Fraction('35.7') *
  // Fraction(45359237, 10**8) * Fraction(980665, 10**5) / Fraction(254, 10**4)**2) and so on.
  it.each([
    ['1', '[psi]', 6894.757293168362],
    ['35.7', '[psi]', 246142.8353661105],
    ['0.283', '[lb_av]/[in_i]3', 7833.413032987483],
    ['17.3', '[lbf_av].[ft_i]', 23.455650506133228],
  ])('%s %s is %d, correctly rounded', (number, code, value) => {
    expect(decimalScaler(readUnit(code)!)(number)).toBe(value);
  });

  it('a decimal in a metric unit is the double nearest to its SI decimal', () => {
    const decimal = fc.tuple(fc.integer({ min: -999999, max: 999999 }), fc.integer({ min: -8, max: 8 }));
    fc.assert(
      fc.property(decimal, fc.constantFrom(...Object.keys(powers)), ([mantissa, exponent], code) => {
        const power = powers[code];
        const expected = Number(`${mantissa}e${exponent + power}`);
        expect(decimalScaler(readUnit(code)!)(`${mantissa}e${exponent}`)).toBe(expected === 0 ? 0 : expected);
      }),
    );
  });
});

describe('a unit that was probably meant is suggested', () => {
  it.each([
    ['Kg/m3', 'kg/m3'],
    ['KN', 'kN'],
    ['mpa', 'MPa'],
    ['N/mm²', 'N/mm2'],
    ['N·m', 'N.m'],
    ['N*m', 'N.m'],
    ['kNm', 'kN.m'],
    ['cm^2', 'cm2'],
    ['µm', 'um'],
    ['in', '[in_i]'],
    ['ft', '[ft_i]'],
    ['lb/ft3', '[lb_av]/[ft_i]3'],
    ['psi', '[psi]'],
    ['sec', 's'],
    ['kg / m', 'kg/m'],
    ['°', 'deg'],
    ['tonne', 't'],
  ])('%s: %s', (code, suggestion) => {
    expect(readUnit(code)).toBeNull();
    expect(suggestUnit(code)).toBe(suggestion);
  });

  it('nothing is suggested for what means nothing', () => {
    expect(suggestUnit('furlongs')).toBeNull();
    expect(suggestUnit('%')).toBeNull();
  });
});

import { readUnit } from './unit-grammar.ts';
import { dimensionless, type Exponents, type Unit } from './unit-table.ts';

/** A physical dimension that a quantity of a request can have. */
export interface Dimension {
  /** In words, with its article. */
  readonly name: string;
  /** Its SI unit as a UCUM code. */
  readonly unit: string;
  /** Other units that suit it. */
  readonly examples: readonly string[];
  readonly exponents: Exponents;
}

function dimension(name: string, unit: string, ...examples: string[]): Dimension {
  return { name, unit, examples, exponents: readUnit(unit)!.exponents };
}

/** The dimensions that have a name; a unit in words is the first that fits. */
export const dimensions = {
  length: dimension('a length', 'm', 'mm', 'cm', 'km', '[in_i]', '[ft_i]'),
  area: dimension('an area', 'm2', 'mm2', 'cm2', '[in_i]2', '[ft_i]2'),
  time: dimension('a time', 's', 'ms', 'us', 'min', 'h'),
  rate: dimension('a rate', '/s', '1/s', '/ms', '/min'),
  frequency: dimension('a frequency', 'Hz', 'kHz', '/s', '/min'),
  speed: dimension('a speed', 'm/s', 'mm/s', 'km/s', 'km/h', '[ft_i]/s'),
  mass: dimension('a mass', 'kg', 'g', 't', '[lb_av]'),
  massPerLength: dimension('a mass per length', 'kg/m', 't/m', 'g/m', '[lb_av]/[ft_i]'),
  density: dimension('a density', 'kg/m3', 't/m3', 'g/cm3', '[lb_av]/[ft_i]3'),
  force: dimension('a force', 'N', 'kN', 'MN', 'kgf', '[lbf_av]'),
  modulus: dimension('a modulus', 'Pa', 'MPa', 'GPa', 'N/mm2', '[psi]'),
  foundation: dimension('a stiffness per length', 'N/m2', 'kN/m2', 'MPa', 'N/mm2'),
  drag: dimension('a resistance per length', 'N.s/m2', 'kN.s/m2', 'Pa.s'),
  springStiffness: dimension('a stiffness', 'N/m', 'kN/m', 'MN/m', 'N/mm', '[lbf_av]/[in_i]'),
  dashpotConstant: dimension('a dashpot constant', 'N.s/m', 'kN.s/m', 'N.s/mm'),
  impulse: dimension('an impulse', 'N.s', 'kN.s', 'kg.m/s'),
  angle: dimension('an angle', 'rad', 'mrad', 'deg'),
  angularVelocity: dimension('an angular velocity', 'rad/s', 'deg/s', 'mrad/s'),
  torque: dimension('a torque', 'N.m', 'kN.m', 'N.mm', '[lbf_av].[ft_i]'),
  angularImpulse: dimension('an angular impulse', 'N.m.s', 'kN.m.s'),
  massMomentOfInertia: dimension('a mass moment of inertia', 'kg.m2', 't.m2', 'kg.mm2'),
  inertiaPerLength: dimension('a mass moment of inertia per length', 'kg.m', 'kg.m2/m', 'kg.mm2/m'),
  torsionalStiffness: dimension('a torsional stiffness', 'N.m2', 'kN.m2', 'MN.m2', 'N.m2/rad'),
  torsionalSpringStiffness: dimension('a torsional spring stiffness', 'N.m/rad', 'kN.m/rad', 'N.m'),
  torsionalDashpotConstant: dimension('a torsional dashpot constant', 'N.m.s/rad', 'kN.m.s/rad'),
  torsionalFoundation: dimension('a torsional stiffness per length', 'N.m/rad/m', 'N', 'kN'),
  torsionalDrag: dimension('a torsional resistance per length', 'N.s', 'N.m.s/rad/m', 'kN.s'),
  acceleration: dimension('an acceleration', 'm/s2', 'mm/s2', 'cm/s2', '[g]'),
  angularAcceleration: dimension('an angular acceleration', 'rad/s2', 'deg/s2', 'mrad/s2'),
  forcePerLength: dimension('a force per length', 'N/m', 'kN/m', 'N/mm', '[lbf_av]/[ft_i]'),
  torquePerLength: dimension('a torque per length', 'N.m/m', 'kN.m/m', 'N', 'kN'),
  impedance: dimension('an impedance', 'N.s/m', 'kN.s/m', 'MN.s/m', 'kg/s'),
  torsionalImpedance: dimension('a torsional impedance', 'N.m.s/rad', 'kN.m.s/rad', 'N.m.s'),
} as const;

/** A number that takes no unit. */
export const plainNumber: Dimension = {
  name: 'a plain number',
  unit: '1',
  examples: [],
  exponents: dimensionless,
};

/** A dimension divided by a power of length: the coefficient of x^power in a polynomial. */
export function perLength(of: Dimension, power: number): Dimension {
  if (power === 0) return of;
  const divisor = power === 1 ? 'm' : `m${power}`;
  const unit = `${of.unit}/${divisor}`;
  const exponents = { ...of.exponents, m: of.exponents.m - power };
  const examples = [`${of.examples[0]}/${divisor}`];
  return { name: `${of.name} per ${divisor}`, unit, examples, exponents };
}

/** One dimension over another; a plain number where both are the same. */
export function quotient(of: Dimension, by: Dimension): Dimension {
  const [top, bottom] = [of.exponents, by.exponents];
  const exponents = {
    m: top.m - bottom.m,
    kg: top.kg - bottom.kg,
    s: top.s - bottom.s,
    rad: top.rad - bottom.rad,
    cycle: top.cycle - bottom.cycle,
  };
  if (of.unit === by.unit) return plainNumber;
  const over = (unit: string, divisor: string): string => `(${unit})/(${divisor})`;
  return {
    name: `${of.name} per ${by.name.replace(/^an? /, '')}`,
    unit: over(of.unit, by.unit),
    examples: [over(of.examples[0], by.unit)],
    exponents,
  };
}

/**
 * Whether a unit measures a dimension. Angles count as 1, except that a frequency is not measured
 * in rad/s, and Hz measures nothing but a frequency.
 */
export function measures(unit: Unit, wanted: Dimension): boolean {
  const { m, kg, s, rad, cycle } = unit.exponents;
  const { exponents } = wanted;
  if (m !== exponents.m || kg !== exponents.kg || s !== exponents.s) return false;
  return exponents.cycle === 1 ? rad === 0 && (cycle === 0 || cycle === 1) : cycle === 0;
}

/** What a unit measures, in words; its base units where the table has no name for it. */
export function describeUnit(unit: Unit): string {
  const { m, kg, s, rad, cycle } = unit.exponents;
  const named = Object.values(dimensions).find(
    ({ exponents }) =>
      measures(unit, { name: '', unit: '', examples: [], exponents }) &&
      (exponents.rad !== 0) === (rad !== 0),
  );
  if (named !== undefined) return named.name;
  const bases = Object.entries({ kg, m, s, rad, cycle }).filter(([, exponent]) => exponent !== 0);
  if (bases.length === 0) return 'a plain number';
  return `in ${bases.map(([base, exponent]) => (exponent === 1 ? base : base + exponent)).join('.')}`;
}

/**
 * Units by their case-sensitive UCUM code (The Unified Code for Units of Measure, version 2.1,
 * https://ucum.org/ucum) with exact factors to SI.
 */

/** Exponents of the base units; `rad` and `cycle` count as 1 except to tell Hz from rad/s. */
export interface Exponents {
  readonly m: number;
  readonly kg: number;
  readonly s: number;
  readonly rad: number;
  readonly cycle: number;
}

/** value in SI = value · numerator/denominator · π^pi; exact. */
export interface Unit {
  readonly numerator: bigint;
  readonly denominator: bigint;
  /** Power of π in the factor. */
  readonly pi: number;
  readonly exponents: Exponents;
}

export const dimensionless: Exponents = { m: 0, kg: 0, s: 0, rad: 0, cycle: 0 };

/** A unit that stands for itself in the grammar. */
export interface Atom extends Unit {
  /** Powers of ten that a prefix may give it, e.g. `k`; empty for customary units. */
  readonly prefixes: readonly string[];
}

/** UCUM prefixes as powers of ten. */
export const prefixPowers: ReadonlyMap<string, number> = new Map([
  ['Y', 24],
  ['Z', 21],
  ['E', 18],
  ['P', 15],
  ['T', 12],
  ['G', 9],
  ['M', 6],
  ['k', 3],
  ['h', 2],
  ['da', 1],
  ['d', -1],
  ['c', -2],
  ['m', -3],
  ['u', -6],
  ['n', -9],
  ['p', -12],
  ['f', -15],
  ['a', -18],
  ['z', -21],
  ['y', -24],
]);

const allPrefixes = [...prefixPowers.keys()];

function atom(
  exponents: Partial<Exponents>,
  numerator: bigint,
  denominator: bigint,
  prefixes: readonly string[] = [],
  pi = 0,
): Atom {
  return { numerator, denominator, pi, exponents: { ...dimensionless, ...exponents }, prefixes };
}

const force = { kg: 1, m: 1, s: -2 };
const pressure = { kg: 1, m: -1, s: -2 };

/** Every unit that can be written, without prefix. */
export const atoms: ReadonlyMap<string, Atom> = new Map([
  ['m', atom({ m: 1 }, 1n, 1n, allPrefixes)],
  ['g', atom({ kg: 1 }, 1n, 1000n, allPrefixes)],
  ['s', atom({ s: 1 }, 1n, 1n, allPrefixes)],
  ['rad', atom({ rad: 1 }, 1n, 1n, allPrefixes)],
  ['Hz', atom({ s: -1, cycle: 1 }, 1n, 1n, allPrefixes)],
  ['N', atom(force, 1n, 1n, allPrefixes)],
  ['Pa', atom(pressure, 1n, 1n, allPrefixes)],
  ['J', atom({ kg: 1, m: 2, s: -2 }, 1n, 1n, allPrefixes)],
  ['W', atom({ kg: 1, m: 2, s: -3 }, 1n, 1n, allPrefixes)],
  ['bar', atom(pressure, 100_000n, 1n, allPrefixes)],
  // Tonne; only the prefixes in use, so that "ft" is not read as a femtotonne.
  ['t', atom({ kg: 1 }, 1000n, 1n, ['k', 'M'])],
  ['gf', atom(force, 980_665n, 100_000_000n, allPrefixes)],
  ['[g]', atom({ m: 1, s: -2 }, 980_665n, 100_000n)],
  ['min', atom({ s: 1 }, 60n, 1n)],
  ['h', atom({ s: 1 }, 3600n, 1n)],
  ['d', atom({ s: 1 }, 86_400n, 1n)],
  ['deg', atom({ rad: 1 }, 1n, 180n, [], 1)],
  ['[in_i]', atom({ m: 1 }, 254n, 10_000n)],
  ['[ft_i]', atom({ m: 1 }, 3048n, 10_000n)],
  ['[yd_i]', atom({ m: 1 }, 9144n, 10_000n)],
  ['[mi_i]', atom({ m: 1 }, 1_609_344n, 1000n)],
  ['[lb_av]', atom({ kg: 1 }, 45_359_237n, 100_000_000n)],
  ['[ston_av]', atom({ kg: 1 }, 90_718_474n, 100_000n)],
  ['[lbf_av]', atom(force, 45_359_237n * 980_665n, 10_000_000_000_000n)],
  ['[psi]', atom(pressure, 45_359_237n * 980_665n * 10n ** 8n, 10n ** 13n * 254n * 254n)],
]);

/** What people write for a unit, and the code that means it. */
export const misspellings: ReadonlyMap<string, string> = new Map([
  ['in', '[in_i]'],
  ['inch', '[in_i]'],
  ['"', '[in_i]'],
  ['ft', '[ft_i]'],
  ['foot', '[ft_i]'],
  ["'", '[ft_i]'],
  ['yd', '[yd_i]'],
  ['mi', '[mi_i]'],
  ['lb', '[lb_av]'],
  ['lbs', '[lb_av]'],
  ['lbm', '[lb_av]'],
  ['lbf', '[lbf_av]'],
  ['psi', '[psi]'],
  ['ton', 't'],
  ['tonne', 't'],
  ['sec', 's'],
  ['hr', 'h'],
  ['°', 'deg'],
  ['Nm', 'N.m'],
  ['kNm', 'kN.m'],
  ['MNm', 'MN.m'],
  ['kgf', 'kgf'],
  ['cps', 'Hz'],
]);

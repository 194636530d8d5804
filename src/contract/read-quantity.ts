import type { FaultCode } from '../faults/catalogue.ts';
import type { FaultValues } from '../faults/fault.ts';
import { decimalScaler, isDecimal } from './decimal.ts';
import { type Dimension, describeUnit, measures, plainNumber } from './dimensions.ts';
import { shortText } from './show-value.ts';
import { readUnit, suggestUnit } from './unit-grammar.ts';
import type { Unit } from './unit-table.ts';

/** Numbers beyond these magnitudes would overflow or vanish in products of a few of them. */
const largestMagnitude = 1e60;
const smallestMagnitude = 1e-60;

/** Whether products of a few numbers of this size stay within double precision. */
export function isUsableMagnitude(value: number): boolean {
  const size = Math.abs(value);
  return size === 0 || (size >= smallestMagnitude && size <= largestMagnitude);
}

/** Why a text is not a quantity. */
export interface QuantityProblem {
  readonly code: FaultCode;
  readonly values: FaultValues;
}

/** A number as JSON would write it or nearly, blanks, and the code of a unit. */
const quantityPattern = /^([+-]?[\d.]+(?:[eE][+-]?\d+)?) *((?:1\/|[^\s\d,]).*)?$/;

/**
 * The SI value of a text such as `2.4 MN`: a JSON number, then a UCUM code.
 *
 * @param text the whole text; the space between number and unit may be left out
 * @param wanted the dimension that the value must have
 * @returns the value, correctly rounded, or what is wrong; cost about a microsecond
 */
export function readQuantity(text: string, wanted: Dimension): number | QuantityProblem {
  if (wanted === plainNumber) return problem('number-wanted', text, wanted, {});
  const match = text.length > 120 ? null : quantityPattern.exec(text);
  if (match === null || !isDecimal(match[1])) {
    return problem('quantity-unreadable', text, wanted, { example: `"12.5 ${wanted.unit}"` });
  }
  const [, number, code] = match;
  if (code === undefined) return problem('unit-missing', text, wanted, { number });
  const known = knownUnit(code);
  if (known === null) {
    const suggestion = suggestUnit(code);
    const hint = suggestion === null ? '' : ` Did you mean ${suggestion}?`;
    return problem('unit-unknown', text, wanted, { code: code.slice(0, 40), hint });
  }
  if (!measures(known.unit, wanted)) {
    return problem('unit-dimension', text, wanted, { found: describeUnit(known.unit) });
  }
  const exponent = Number(/[eE](.*)$/.exec(number)?.[1] ?? 0);
  const value = Math.abs(exponent) > 400 ? Infinity : known.toSi(number);
  return isUsableMagnitude(value) ? value : problem('number-magnitude', text, wanted, {});
}

function problem(code: FaultCode, text: string, wanted: Dimension, values: FaultValues): QuantityProblem {
  const allowed = [wanted.unit, ...wanted.examples].join(', ');
  return {
    code,
    values: { text: shortText(text), wanted: wanted.name, unit: wanted.unit, allowed, ...values },
  };
}

interface KnownUnit {
  readonly unit: Unit;
  /** Turns the text of a number in this unit into SI. */
  readonly toSi: (number: string) => number;
}

const units = new Map<string, KnownUnit | null>();

/** `readUnit` with a memory of bounded size. */
function knownUnit(code: string): KnownUnit | null {
  const known = units.get(code);
  if (known !== undefined) return known;
  const unit = readUnit(code);
  const entry = unit === null ? null : { unit, toSi: decimalScaler(unit) };
  if (units.size < 1000) units.set(code, entry);
  return entry;
}

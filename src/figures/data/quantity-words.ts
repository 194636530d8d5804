import type { Field, Member, Numbers, Quantity, ResponsesAnswer } from '../../spec/types.ts';
import { countOf, formatQuantity } from '../text/format-values.ts';
import { printedUnit } from '../text/units.ts';
import { memberInWords } from './member-outline.ts';
import { extentOf } from './value-range.ts';

const forces: Readonly<Record<Member['kind'], string>> = {
  cable: 'transverse force',
  bar: 'axial force',
  shaft: 'torque',
  'shear-column': 'shear force',
  wave: 'force',
};

/** The trade's word for a quantity of a member. */
export function wordOf(quantity: Quantity, kind: Member['kind']): string {
  const turns = kind === 'shaft';
  switch (quantity) {
    case 'displacement':
      return turns ? 'rotation' : 'displacement';
    case 'relativeDisplacement':
      return turns ? 'relative rotation' : 'relative displacement';
    case 'velocity':
      return turns ? 'angular velocity' : 'velocity';
    case 'acceleration':
      return turns ? 'angular acceleration' : 'acceleration';
    case 'force':
      return forces[kind];
    case 'stress':
      return kind === 'bar' ? 'axial stress' : kind === 'shaft' ? 'torsional shear stress' : 'shear stress';
  }
}

/** "Displacement". */
export function capital(word: string): string {
  return word.charAt(0).toUpperCase() + word.slice(1);
}

/** Member, verdict and number of modes of a response. */
export function responseInWords(member: Member, { convergence }: ResponsesAnswer): string {
  return `${memberInWords(member)} · ${convergence.verdict} · ${countOf(convergence.modesUsed, 'mode')}`;
}

/** The name of the values on an axis; averages say so. */
export function nameOfValues(word: string, field: Field, gaugeTime: number): string {
  return field.boundKind === 'gauge-average' ? `${word}, ${formatQuantity(gaugeTime, 's')} average` : word;
}

/**
 * What is known about the error of some values.
 *
 * @param bound those of the bounds that concern what is shown
 */
export function boundInWords(field: Field, bound: Numbers | null, gaugeTime: number): string {
  const unit = printedUnit(field.unit);
  if (field.boundKind === 'rms') {
    const rms =
      field.rms === undefined ? '' : `: r.m.s. error over the member ≤ ${roundedUp(field.rms, unit)}`;
    return `No bound holds at single instants${rms}.`;
  }
  if (bound === null || bound.length === 0) return 'No bound exists for these values.';
  const most = roundedUp(extentOf(bound)[1], unit);
  return field.boundKind === 'gauge-average'
    ? `Averages over the gauge time of ${formatQuantity(gaugeTime, 's')}; bound ±${most} of the averages.`
    : `Bound ±${most}, certified.`;
}

/** A bound with two digits is rounded up, so that the words hold too. */
export function roundedUp(value: number, unit: string): string {
  if (!(value > 0)) return formatQuantity(0, unit);
  const [mantissa, exponent] = value.toExponential().split('e');
  const up = Number(`${Math.ceil(Number(mantissa) * 10 - 1e-9)}e${Number(exponent) - 1}`);
  return formatQuantity(Number.isFinite(up) && up > 0 ? up : value, unit, 2);
}

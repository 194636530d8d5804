import type { WaveMember } from '../members/wave-member.ts';
import type { Quantity } from '../spec/types.ts';

/** Every quantity of a motion, in the order in which tables show them. */
export const motionQuantities = [
  'displacement',
  'relativeDisplacement',
  'velocity',
  'acceleration',
  'force',
  'stress',
] as const satisfies readonly Quantity[];

const LINEAR: Record<Quantity, string> = {
  displacement: 'm',
  velocity: 'm/s',
  acceleration: 'm/s2',
  force: 'N',
  stress: 'Pa',
  relativeDisplacement: 'm',
};

const ANGULAR: Record<Quantity, string> = {
  displacement: 'rad',
  velocity: 'rad/s',
  acceleration: 'rad/s2',
  force: 'N.m',
  stress: 'Pa',
  relativeDisplacement: 'rad',
};

/** SI unit of a quantity in UCUM code; a shaft turns, all others move. */
export function unitOf(quantity: Quantity, kind: WaveMember['kind']): string {
  return kind === 'shaft' ? ANGULAR[quantity] : LINEAR[quantity];
}

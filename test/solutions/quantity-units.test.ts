import { expect, it } from 'vitest';
import { unitOf } from '../../src/solutions/quantity-units.ts';

/** UCUM codes; a shaft turns (rad counts as its own code), all other members move. */
it.each([
  ['displacement', 'm', 'rad'],
  ['velocity', 'm/s', 'rad/s'],
  ['acceleration', 'm/s2', 'rad/s2'],
  ['force', 'N', 'N.m'],
  ['stress', 'Pa', 'Pa'],
] as const)('%s', (quantity, linear, angular) => {
  for (const kind of ['cable', 'bar', 'shear-column', 'wave'] as const) {
    expect(unitOf(quantity, kind)).toBe(linear);
  }
  expect(unitOf(quantity, 'shaft')).toBe(angular);
});

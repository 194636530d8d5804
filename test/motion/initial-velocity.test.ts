import { describe, expect, it } from 'vitest';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { StaticResponse } from '../../src/modes/static-response.ts';
import { readVelocity } from '../../src/motion/initial-velocity.ts';
import { pieceValue, type PiecewiseField } from '../../src/motion/piecewise-field.ts';
import type { InitialMotion } from '../../src/spec/types.ts';
import { canDriftFreely } from '../../src/spectrum/spectrum-size.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';
import { integrate } from '../modes/quadrature.ts';
import { faultsOf } from './faults.ts';

const EPS = Number.EPSILON;

const member = waveMember({
  segments: [
    [1, 2, 3],
    [1, 2, 0.5],
    [1, 2, 0],
    [1, 2, 1],
  ],
  far: 'free',
  masses: { 1: 5, 4: 2 },
});

const read = (of: WaveMember, initial: InitialMotion): ReturnType<typeof readVelocity> =>
  readVelocity(of, initial, canDriftFreely(of) ? null : new StaticResponse(of));

function valueAt(of: WaveMember, field: PiecewiseField, x: number): number {
  const piece = field.find((cell) => {
    const start = of.position[cell.segment] + cell.start;
    return x >= start && x <= start + cell.length;
  })!;
  return pieceValue(piece, x - of.position[piece.segment] - piece.start).value;
}

/** ∫ρ g, kg·m/s. */
function momentum(of: WaveMember, field: PiecewiseField): number {
  return field.reduce(
    (sum, cell) =>
      sum + of.inertia[cell.segment] * integrate((xi) => pieceValue(cell, xi).value, 0, cell.length),
    0,
  );
}

describe('node masses take the value of the velocity shape at their place', () => {
  it('where it is continuous', () => {
    const { masses } = read(member, { velocity: { type: 'polynomial', coefficients: [1, 2], from: 0 } });
    expect(Array.from(masses)).toEqual([0, 3, 0, 0, 9]);
  });

  it('where it begins or ends at the mass: the side that is not 0', () => {
    expect(read(member, { velocity: { type: 'uniform', value: 4, from: 0, to: 1 } }).masses[1]).toBe(4);
    expect(read(member, { velocity: { type: 'uniform', value: 4, from: 1, to: 2 } }).masses[1]).toBe(4);
  });

  it('where it jumps between two values: their mean', () => {
    const velocity = [
      { type: 'uniform', value: 4, from: 0, to: 1 },
      { type: 'uniform', value: 10, from: 1, to: 2 },
    ] as const;
    expect(read(member, { velocity: [...velocity] }).masses[1]).toBe(7);
  });

  it('outside the shape: 0', () => {
    expect(
      Array.from(read(member, { velocity: { type: 'uniform', value: 4, from: 1.5, to: 2 } }).masses),
    ).toEqual([0, 0, 0, 0, 0]);
  });
});

describe('velocities of masses and impulses', () => {
  it('a mass velocity replaces what the shape gives, impulses add J/M, several of them too', () => {
    const { masses, pieces } = read(member, {
      velocity: { type: 'uniform', value: 1, from: 0 },
      massVelocities: [{ at: 1, velocity: -3 }],
      impulses: [
        { at: 1, impulse: 10 },
        { at: 1, impulse: 5, width: 0 },
        { at: 4, impulse: -1 },
      ],
    });
    expect(Array.from(masses)).toEqual([0, -3 + 2 + 1, 0, 0, 1 - 0.5]);
    expect(valueAt(member, pieces, 0.5)).toBe(1);
  });

  it('a place within 64 roundings of the length is the mass itself', () => {
    const { masses } = read(member, { impulses: [{ at: 1 + 100 * EPS, impulse: 10 }] });
    expect(masses[1]).toBe(2);
  });

  it('an impulse at x = 0 acts on the mass of the near end', () => {
    const bar = waveMember({ ...uniformTrial(1, { near: 'free', far: 'free' }), masses: { 0: 4 } });
    expect(Array.from(read(bar, { impulses: [{ at: 0, impulse: 2 }] }).masses)).toEqual([0.5, 0]);
  });

  it('with a width it is J/(width ρ), the whole impulse as momentum, over a change of inertia too', () => {
    const { masses, pieces } = read(member, { impulses: [{ at: 0.9, impulse: 6, width: 0.8 }] });
    expect(valueAt(member, pieces, 0.7)).toBeCloseTo(6 / 0.8 / 3, 15);
    expect(valueAt(member, pieces, 1.2)).toBeCloseTo(6 / 0.8 / 0.5, 14);
    expect(valueAt(member, pieces, 0.4)).toBe(0);
    expect(valueAt(member, pieces, 1.4)).toBe(0);
    expect(momentum(member, pieces)).toBeCloseTo(6, 13);
    // spread over the inertia beside it, it leaves the mass alone: momentum is what was given
    expect(masses[1]).toBe(0);
  });

  it('two widths that overlap add up', () => {
    const bar = waveMember(uniformTrial(1));
    const { pieces } = read(bar, {
      impulses: [
        { at: 0.4, impulse: 1, width: 0.4 },
        { at: 0.6, impulse: 1, width: 0.4 },
      ],
    });
    expect(valueAt(bar, pieces, 0.3)).toBeCloseTo(2.5, 15);
    expect(valueAt(bar, pieces, 0.5)).toBeCloseTo(5, 15);
    expect(momentum(bar, pieces)).toBeCloseTo(2, 14);
  });
});

describe('a velocity pull is the static shape with that velocity at its place', () => {
  it('straight on a string', () => {
    const string = waveMember(uniformTrial(2, {}, [2, 8, 1]));
    const { pieces } = read(string, { velocity: { type: 'pull', at: 0.5, amplitude: 3 } });
    for (const [x, value] of [
      [0.25, 1.5],
      [0.5, 3],
      [1, 2],
      [1.5, 1],
    ]) {
      expect(Math.abs(valueAt(string, pieces, x) - value)).toBeLessThan(32 * EPS);
    }
  });

  it.each([0.3, 60, 1e5])('hyperbolic on a bedding of %s', (s) => {
    const string = waveMember(uniformTrial(3, {}, [2, 8, 1, s]));
    const { pieces, masses } = read(string, { velocity: { type: 'pull', at: 0.5, amplitude: 3 } });
    const kappa = Math.sqrt(s / 8);
    const share = (a: number, b: number): number =>
      (Math.exp(kappa * (a - b)) * -Math.expm1(-2 * kappa * a)) / -Math.expm1(-2 * kappa * b);
    for (const x of [0.1, 0.4, 0.5, 0.6, 1.1, 1.9]) {
      const expected = 3 * (x <= 0.5 ? share(x, 0.5) : share(2 - x, 1.5));
      expect(Math.abs(valueAt(string, pieces, x) - expected)).toBeLessThan(3 * EPS * (64 + 16 * kappa));
    }
    expect(Array.from(masses)).toEqual([0, 0, 0, 0]);
  });
});

describe('faults', () => {
  it('force-in-velocity names the force', () => {
    expect(faultsOf(() => read(member, { velocity: [{ type: 'pull', at: 0.5, force: 3 }] }))).toEqual([
      {
        code: 'force-in-velocity',
        pointer: '/initial/velocity/0/force',
        detail:
          'The velocity shape of the pull at 0.5 m is given by a force. Give its amplitude, the velocity at that place, in m/s (shaft: rad/s).',
      },
    ]);
  });

  it('pull-without-restraint and pull-at-fixed-end', () => {
    const free = waveMember(uniformTrial(2, { near: 'free', far: 'free' }));
    const [loose] = faultsOf(() => read(free, { velocity: { type: 'pull', at: 0.5, amplitude: 3 } }));
    expect(loose).toMatchObject({ code: 'pull-without-restraint', pointer: '/initial/velocity/at' });
    const [held] = faultsOf(() => read(member, { velocity: { type: 'pull', at: 0, amplitude: 3 } }));
    expect(held).toMatchObject({ code: 'pull-at-fixed-end', pointer: '/initial/velocity/at' });
  });

  it('all faults of masses and impulses come at once, each with its place', () => {
    const records = faultsOf(() =>
      read(member, {
        massVelocities: [
          { at: 1, velocity: 1 },
          { at: 0, velocity: 1 },
          { at: 0.5, velocity: 1 },
        ],
        impulses: [
          { at: 2, impulse: 1 },
          { at: 0.1, impulse: 1, width: 0.5 },
          { at: 1.9, impulse: 1, width: 0.5 },
          { at: 3.9, impulse: 1, width: 0.5 },
          { at: 4, impulse: 1 },
        ],
      }),
    );
    expect(records).toEqual([
      {
        code: 'mass-velocity-on-no-mass',
        pointer: '/initial/massVelocities/1/at',
        detail: 'There is no mass at 0 m that could have a velocity of its own. Masses stand at: 1 m, 4 m.',
      },
      {
        code: 'mass-velocity-on-no-mass',
        pointer: '/initial/massVelocities/2/at',
        detail: 'There is no mass at 0.5 m that could have a velocity of its own. Masses stand at: 1 m, 4 m.',
      },
      {
        code: 'impulse-on-no-mass',
        pointer: '/initial/impulses/0/at',
        detail:
          'The impulse at 2 m meets no mass; its kinetic energy would be infinite. Give it a width, or place it on an attachment with mass.',
      },
      {
        code: 'impulse-off-inertia',
        pointer: '/initial/impulses/1/width',
        detail:
          'The impulse at 0.1 m with width 0.5 m reaches over the end of the member. Move it or make it narrower.',
      },
      {
        code: 'impulse-off-inertia',
        pointer: '/initial/impulses/2/width',
        detail:
          'The impulse at 1.9 m with width 0.5 m reaches over a massless stretch (segment 2). Move it or make it narrower.',
      },
      {
        code: 'impulse-off-inertia',
        pointer: '/initial/impulses/3/width',
        detail:
          'The impulse at 3.9 m with width 0.5 m reaches over the end of the member. Move it or make it narrower.',
      },
    ]);
  });

  it('a member without masses says so', () => {
    const bar = waveMember(uniformTrial(1));
    const [record] = faultsOf(() => read(bar, { massVelocities: [{ at: 0.5, velocity: 1 }] }));
    expect(record.detail).toContain('Masses stand at: nowhere.');
  });

  it('a width may touch the ends and the edge of a massless stretch', () => {
    expect(() => read(member, { impulses: [{ at: 0.25, impulse: 1, width: 0.5 }] })).not.toThrow();
    expect(() => read(member, { impulses: [{ at: 1.75, impulse: 1, width: 0.5 }] })).not.toThrow();
    expect(() => read(member, { impulses: [{ at: 3.5, impulse: 1, width: 1 }] })).not.toThrow();
  });
});

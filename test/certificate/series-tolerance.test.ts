import { describe, expect, it } from 'vitest';
import type { TailState } from '../../src/certificate/kept-modes.ts';
import { NO_LOADS } from '../../src/certificate/load-tail-factors.ts';
import { Rounding } from '../../src/certificate/rounding.ts';
import {
  displacementBound,
  displacementCeiling,
  shortfallOf,
} from '../../src/certificate/series-tolerance.ts';
import type { ResponsesSeries } from '../../src/spec/types.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';

const member = waveMember(uniformTrial(1));

/** A tail without rounding: √(2E ΔG) = 0.01, ceiling √(2·50·1) = 10. */
function tail(first = Infinity, energy = 5e-3): TailState {
  return {
    kept: 5,
    energies: { energy, first, second: Infinity, nextOmega: 20 },
    member: { flexibility: 0.01, fluxInertia: 4 },
    rounding: new Rounding(1, 1, 1),
    loads: NO_LOADS,
    rigid: { position: 0, velocity: 0 },
    whole: {
      energies: { energy: 50, first, second: Infinity, nextOmega: 3 },
      member: { flexibility: 1, fluxInertia: 9 },
      loads: NO_LOADS,
      silent: false,
    },
  };
}

const ratio = (wanted: ResponsesSeries, of: TailState, gaugeTime = 0): number =>
  shortfallOf(wanted, member, 1, gaugeTime, true, 1)(of).ratio;

it('the bound is √(2E ΔG) and the ceiling √(2E G) of the elastic motion', () => {
  expect(displacementBound(tail(), 1, 1)).toBeCloseTo(0.01, 15);
  expect(displacementCeiling(tail(), 1)).toBeCloseTo(10, 14);
});

describe('how far the bound is from its tolerance', () => {
  it('relative: bound over tolerance times ceiling', () => {
    expect(ratio({ relativeTolerance: 1e-3, maxModes: 9 }, tail())).toBeCloseTo(1, 12);
    expect(ratio({ relativeTolerance: 1e-2, maxModes: 9 }, tail())).toBeCloseTo(0.1, 12);
  });

  it('a number of modes is judged by a relative 1e-3', () => {
    expect(ratio({ modes: 9 }, tail())).toBeCloseTo(1, 12);
  });

  it('absolute displacement', () => {
    expect(ratio({ tolerances: { displacement: 0.004 }, maxModes: 9 }, tail())).toBeCloseTo(2.5, 12);
  });

  it('absolute force at the instant: √(2E¹ ΔH)', () => {
    // √(2·8·4) = 8
    const found = ratio({ tolerances: { force: 2 }, maxModes: 9 }, tail(8));
    expect(found).toBeCloseTo(4, 12);
    // the larger of both
    expect(ratio({ tolerances: { force: 2, displacement: 0.001 }, maxModes: 9 }, tail(8))).toBeCloseTo(
      10,
      12,
    );
  });

  it('absolute force as an average: (2/τ)√(2E ΔH)', () => {
    // √(2·5e-3·4) = 0.2
    expect(ratio({ tolerances: { force: 2 }, maxModes: 9 }, tail(), 0.1)).toBeCloseTo(2, 12);
  });

  it('a force without any bound does not count; alone it leaves the usual displacement tolerance', () => {
    expect(ratio({ tolerances: { force: 1e-9 }, maxModes: 9 }, tail())).toBeCloseTo(1, 12);
    expect(ratio({ tolerances: { force: 1e-9, displacement: 0.02 }, maxModes: 9 }, tail())).toBeCloseTo(
      0.5,
      12,
    );
  });

  it('an elastic motion of rounding size meets any relative tolerance, but no absolute one by itself', () => {
    const silent: TailState = { ...tail(), whole: { ...tail().whole, silent: true } };
    expect(ratio({ relativeTolerance: 1e-9, maxModes: 9 }, silent)).toBe(0);
    expect(ratio({ tolerances: { displacement: 0.004 }, maxModes: 9 }, silent)).toBeCloseTo(2.5, 12);
  });

  it('nothing missing is enough', () => {
    expect(ratio({ relativeTolerance: 1e-9, maxModes: 9 }, tail(0, 0))).toBe(0);
  });
});

it('the path of a rigid-body motion brings its rounding', () => {
  const drifting: TailState = { ...tail(), rigid: { position: 1, velocity: 2 } };
  const more = displacementBound(drifting, 1, 1e12) - displacementBound(tail(), 1, 1e12);
  expect(more / (64 * Number.EPSILON * 2e12)).toBeCloseTo(1, 9);
});

it('the share of rounding is told apart', () => {
  const found = shortfallOf({ relativeTolerance: 1e-3, maxModes: 9 }, member, 1, 0, true, 1)(tail());
  expect(found.roundingRatio).toBe(0);
});

import { describe, expect, it } from 'vitest';
import { resultsOf, tautString, verdictsOf } from '../../support/checks.ts';

describe('a peak of displacement', () => {
  /** A plucked string never goes beyond its first shape (d'Alembert's solution): 10 mm, at 0.6 m. */
  const request = {
    member: tautString,
    initial: { displacement: { type: 'pull', at: 0.6, amplitude: 0.01 } },
    sample: { times: { end: 0.03, count: 61 }, quantities: ['displacement', 'velocity', 'force'] },
  };
  const peak = (limit: unknown, more: object = {}) => ({
    type: 'peak',
    quantity: 'displacement',
    limit,
    ...more,
  });

  it('passes, fails, and is undetermined at the value itself', () => {
    const verdicts = verdictsOf('responses', request, [peak('11 mm'), peak('9.9 mm'), peak('10 mm')]);
    expect(verdicts).toEqual(['pass', 'fail', 'undetermined']);
  });

  it('states what is certain', () => {
    const [pass, , open] = resultsOf('responses', request, [peak('11 mm'), peak('9.9 mm'), peak(0.01)]);
    expect(pass.demand! + pass.bound!).toBeLessThanOrEqual(0.011);
    expect(pass.demand! + pass.bound!).toBeGreaterThanOrEqual(0.01);
    expect(pass.utilisation).toBeCloseTo(pass.demand! / 0.011, 12);
    expect(pass.statement).toMatch(/stays at or below 0\.011 m anywhere on the member from 0 s to 0\.03 s/);
    expect(open.remedy).toMatch(/samples|modes/);
  });

  it('adds modes by itself up to maxModes, and says when these are too few', () => {
    const few = (maxModes: number) => ({ ...request, series: { relativeTolerance: 0.3, maxModes } });
    const [enough] = resultsOf('responses', few(4096), [peak('9.45 mm', { at: 1.3 })]);
    expect(enough.verdict).toBe('pass');
    const [short] = resultsOf('responses', few(4), [peak('9.45 mm', { at: 1.3 })]);
    expect(short.verdict).toBe('undetermined');
    expect(short.remedy).toMatch(/More modes: \d were used, as many as the request allows; raise "maxModes"/);
  });

  it('looks at positions that are not sampled', () => {
    // Half a period later the first shape stands mirrored: at 1.3 m as high as at first at 0.7 m, 10 mm × 1.3/1.4.
    const hold = (limit: number) => peak(limit, { at: ['1.3 m'] });
    expect(verdictsOf('responses', request, [hold(9.4e-3), hold(9.2e-3)])).toEqual(['pass', 'fail']);
  });
});

describe('a peak of velocity', () => {
  /** u = A sin(πx/L) cos(ωt), ω = 100π: |u_t| ≤ Aω everywhere, reached at mid-span. */
  const request = {
    member: tautString,
    initial: { displacement: { type: 'half-sine', amplitude: 0.01, halfWaves: 1 } },
    sample: { times: { end: 0.03, count: 61 }, quantities: ['velocity', 'acceleration', 'force'] },
  };
  const most = Math.PI;

  it('passes, fails, and is undetermined', () => {
    const peak = (limit: number) => ({ type: 'peak', quantity: 'velocity', limit });
    const verdicts = verdictsOf('responses', request, [peak(1.001 * most), peak(0.999 * most), peak(most)]);
    expect(verdicts).toEqual(['pass', 'fail', 'undetermined']);
  });

  it('and acceleration and force of a smooth motion need no gauge', () => {
    // |u_tt| ≤ Aω², |T u_x| ≤ T A π/L at the ends.
    const verdicts = verdictsOf('responses', request, [
      { type: 'peak', quantity: 'acceleration', limit: 1.001 * most * 100 * Math.PI },
      { type: 'peak', quantity: 'acceleration', limit: 0.999 * most * 100 * Math.PI },
      { type: 'peak', quantity: 'force', limit: 1.001 * 2 * Math.PI, at: 0 },
      { type: 'peak', quantity: 'force', limit: 0.999 * 2 * Math.PI },
    ]);
    expect(verdicts).toEqual(['pass', 'fail', 'pass', 'fail']);
  });
});

describe('a peak of force behind a front', () => {
  /**
   * A rod of impedance Z struck at its end by a mass M with velocity v: the force there jumps to Z v and decays
   * as Z v e^(−Zt/M) until the wave comes back (St. Venant; Timoshenko and Goodier, Theory of Elasticity, from
   * memory). Its largest average over τ is that of the first τ, M v (1 − e^(−Zτ/M))/τ.
   */
  const [stiffness, inertia, mass, speed, length] = [4e8, 16, 40, 2, 10];
  const impedance = Math.sqrt(stiffness * inertia);
  const request = {
    member: {
      kind: 'bar',
      segments: [{ length, axialStiffness: stiffness, massPerLength: inertia, area: 0.002 }],
      ends: { near: { type: 'attached', mass }, far: { type: 'fixed' } },
    },
    initial: { massVelocities: [{ at: 0, velocity: speed }] },
    // 5000 m/s: the wave comes back after 4 ms.
    sample: { times: { end: 3e-3, count: 121 }, quantities: ['force', 'stress'] },
  };
  const gaugeTime = 2e-4;
  const largest = (mass * speed * (1 - Math.exp((-impedance * gaugeTime) / mass))) / gaugeTime;

  it('cannot be said without a gauge time, however wide the limit', () => {
    const [result] = resultsOf('responses', request, [{ type: 'peak', quantity: 'force', limit: 1e9 }]);
    expect(result).toMatchObject({ verdict: 'undetermined', demand: null, bound: null, utilisation: null });
    expect(result.remedy).toMatch(/gaugeTime/);
  });

  it('passes or fails as an average, and says so, with the jump of the front beside it', () => {
    const peak = (share: number, more: object = {}) => ({
      type: 'peak',
      quantity: 'force',
      at: [0],
      gaugeTime,
      limit: share * largest,
      ...more,
    });
    const [pass, fail, open] = resultsOf('responses', request, [peak(1.25), peak(0.96), peak(1)]);
    expect([pass.verdict, fail.verdict, open.verdict]).toEqual(['pass', 'fail', 'undetermined']);
    expect(pass.demand! / largest).toBeCloseTo(1, 1);
    expect(pass.demand! + pass.bound!).toBeGreaterThanOrEqual(largest);
    expect(pass.statement).toMatch(/averaged over 0\.0002 s.* It is the average that passes/);
    expect(pass.fronts).toEqual([{ at: 0, force: expect.closeTo(impedance * speed, 6) }]);
    expect(pass.statement).toContain(`${impedance * speed} N at 0 m`);
  });

  it('of stress is that of the force over the area', () => {
    const stress = (share: number) => ({
      type: 'peak',
      quantity: 'stress',
      at: 0,
      gaugeTime,
      limit: (share * largest) / 0.002,
    });
    expect(verdictsOf('responses', request, [stress(1.25), stress(0.96)])).toEqual(['pass', 'fail']);
  });
});

it('under a load a peak lies between what is sampled and what is certified', () => {
  // A step of 1 N at mid-span at once: twice the static deflection F L/(4 T) (undamped, by symmetry of the sum).
  const request = {
    member: tautString,
    loads: [{ type: 'point-force', at: 1, history: { type: 'step', amplitude: 1 } }],
    sample: { times: { end: 0.02, count: 201 }, quantities: ['displacement'] },
  };
  const most = (2 * 2) / (4 * 400);
  const peak = (share: number) => ({ type: 'peak', quantity: 'displacement', limit: share * most, at: 1 });
  expect(verdictsOf('responses', request, [peak(1.05), peak(0.98), peak(1)])).toEqual([
    'pass',
    'fail',
    'undetermined',
  ]);
});

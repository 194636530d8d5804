import { describe, expect, it } from 'vitest';
import { readRequest } from '../../../src/contract/read-request.ts';
import { solveModes } from '../../../src/solutions/modes.ts';
import { resultsOf, tautString, verdictsOf } from '../../support/checks.ts';

/** f_n = n/(2L) √(T/m), M. Mersenne, Harmonie universelle, 1636: 50 n Hz. */
const modes = { member: tautString, series: { modes: 6 } };
const [first] = solveModes(readRequest('modes', modes)).modes;

describe('a natural frequency in a range', () => {
  it('passes, fails, and is undetermined within rounding of its limit', () => {
    const verdicts = verdictsOf('modes', modes, [
      { type: 'frequency-range', order: 3, min: 149.999, max: 150.001 },
      { type: 'frequency-range', order: 3, min: '150.001 Hz' },
      { type: 'frequency-range', order: 3, max: '149.999 Hz' },
      { type: 'frequency-range', order: 1, min: first.frequency },
      { type: 'frequency-range', order: 1, max: first.frequency },
    ]);
    expect(verdicts).toEqual(['pass', 'fail', 'fail', 'undetermined', 'undetermined']);
  });

  it('states demand, bound, the limit that governs and the utilisation', () => {
    const [one, two] = resultsOf('modes', modes, [
      { type: 'frequency-range', order: 2, min: 80, max: 400 },
      { type: 'frequency-range', order: 2, min: 20, max: 105 },
    ]);
    expect(one.demand).toBeCloseTo(100, 10);
    expect(one.bound).toBeLessThan(1e-10);
    expect([one.limit, one.utilisation]).toEqual([80, expect.closeTo(0.8, 12)]);
    expect([two.limit, two.utilisation]).toEqual([105, expect.closeTo(100 / 105, 12)]);
    expect(one.statement).toMatch(/mode 2, 100 Hz \(counted between .*\), lies from 80 Hz to 400 Hz/);
  });

  it('says that a member of few modes has no such mode', () => {
    const member = {
      kind: 'wave',
      segments: [
        { length: 1, stiffness: 10, inertia: 0 },
        { length: 1, stiffness: 10, inertia: 0 },
      ],
      ends: { near: { type: 'fixed' }, far: { type: 'fixed' } },
      attachments: [{ at: 1, mass: 2 }],
    };
    const [result] = resultsOf('modes', { member, series: { modes: 1 } }, [
      { type: 'frequency-range', order: 2, min: 1 },
    ]);
    expect(result).toMatchObject({ verdict: 'undetermined', demand: null, utilisation: null });
    expect(result.remedy).toMatch(/from 1 to 1/);
  });
});

describe('separation of natural frequencies from bands of excitation', () => {
  const hold = (bands: number[][], margin: number, multiples?: number[]) =>
    resultsOf('modes', modes, [{ type: 'separation', bands, margin, ...(multiples && { multiples }) }])[0];

  it('passes between two natural frequencies and fails on one', () => {
    // 50 and 100 Hz: the band keeps 60·(1 − 0.1) = 54 and 88·1.1 = 96.8 Hz.
    expect(hold([[60, 88]], 0.1)).toMatchObject({ verdict: 'pass', modes: [2] });
    expect(hold([[60, 88]], 0.1).demand).toBeCloseTo(100 / 88 - 1, 10);
    expect(hold([[60, 88]], 0.15)).toMatchObject({ verdict: 'fail', modes: [2] });
    expect(
      hold(
        [
          [60, 99],
          [205, 240],
        ],
        0.01,
      ),
    ).toMatchObject({ verdict: 'pass' });
    expect(hold([[149, 151]], 0)).toMatchObject({
      verdict: 'fail',
      modes: [3],
      demand: 0,
      utilisation: null,
    });
  });

  it('counts twice the natural frequency as parametric excitation', () => {
    // The deck moves the anchor of the string at 2 f₁ (principal parametric resonance: Ω = 2ω).
    expect(hold([[98, 99.5]], 0.001)).toMatchObject({ verdict: 'pass' });
    expect(hold([[95, 98]], 0.03, [2])).toMatchObject({ verdict: 'fail', modes: [1] });
    expect(hold([[60, 95]], 0.05, [1, 2])).toMatchObject({ verdict: 'pass' });
    // Modes 2 at 100 Hz and 1 at 50 Hz, twice of which is 100 Hz.
    expect(hold([[102, 140]], 0.05, [1, 2])).toMatchObject({ verdict: 'fail', modes: [1, 2] });
  });

  it('is undetermined where the edge is a natural frequency itself', () => {
    expect(hold([[20, first.frequency]], 0)).toMatchObject({ verdict: 'undetermined', modes: [1] });
  });

  it('leaves rigid-body modes out', () => {
    const ends = { near: { type: 'free' }, far: { type: 'free' } };
    const request = { member: { ...tautString, ends }, series: { modes: 3 } };
    const [result] = resultsOf('modes', request, [{ type: 'separation', bands: [[0, 40]], margin: 0.1 }]);
    expect(result.verdict).toBe('pass');
  });
});

describe('a minimum of damping', () => {
  /** ζ_n = α/(2ω_n) + βω_n/2 (Lord Rayleigh, The Theory of Sound, vol. 1, §102). */
  const [alpha, beta] = [4, 2e-6];
  const damping = { type: 'rayleigh', massCoefficient: alpha, stiffnessCoefficient: beta };
  const request = { member: { ...tautString, damping }, series: { modes: 6 } };
  const zeta = (n: number) => alpha / (200 * Math.PI * n) + (beta * 100 * Math.PI * n) / 2;

  it('passes, fails, and is undetermined at the value itself', () => {
    const least = Math.min(...[1, 2, 3, 4, 5, 6].map(zeta));
    const results = resultsOf('modes', request, [
      { type: 'damping', minimum: 0.999 * least },
      { type: 'damping', minimum: 1.001 * least },
      { type: 'damping', minimum: least },
    ]);
    expect(results.map(({ verdict }) => verdict)).toEqual(['pass', 'fail', 'undetermined']);
    expect(results[0].demand).toBeCloseTo(least, 14);
  });

  it('looks at modes up to the frequency alone', () => {
    const upTo = (frequency: number) => ({ type: 'damping', minimum: 0.9 * zeta(1), upTo: frequency });
    expect(verdictsOf('modes', request, [upTo(60), upTo(110)])).toEqual(['pass', 'fail']);
    // Mode 2 fails, if it counts at all.
    const second = solveModes(readRequest('modes', request)).modes[1].frequency;
    expect(verdictsOf('modes', request, [upTo(second)])).toEqual(['undetermined']);
  });

  it('takes given ratios as they are', () => {
    const ratios = { type: 'ratios', values: [0.02, 0.01, 0.03] };
    const member = { ...tautString, damping: ratios };
    const verdicts = verdictsOf('modes', { member, series: { modes: 6 } }, [
      { type: 'damping', minimum: 0.01 },
      { type: 'damping', minimum: 0.02, upTo: 60 },
      { type: 'damping', minimum: 0.0100001 },
    ]);
    expect(verdicts).toEqual(['pass', 'pass', 'fail']);
  });
});

describe('vortex shedding', () => {
  /**
   * Critical speed f D/St (EN 1991-1-4, Annex E, eq. E.2, from memory) with St = 0.18 of a circular cylinder:
   * 50 Hz × 9 mm / 0.18 = 2.5 m/s for mode 1, 5 m/s for mode 2.
   */
  const hold = (wind: number[]) =>
    resultsOf('modes', modes, [{ type: 'vortex', diameter: '9 mm', strouhal: 0.18, wind }])[0];

  it('passes between two critical speeds and below the first', () => {
    expect(hold([2.6, 4.9])).toMatchObject({ verdict: 'pass', modes: [2], limit: 4.9 });
    expect(hold([2.6, 4.9]).demand).toBeCloseTo(5, 12);
    expect(hold([0, 2.4])).toMatchObject({
      verdict: 'pass',
      modes: [1],
      utilisation: expect.closeTo(0.96, 12),
    });
    expect(hold([2.55, 4])).toMatchObject({ verdict: 'pass', modes: [1], limit: 2.55 });
  });

  it('fails with the modes that lock in and the speeds at which they do', () => {
    const result = hold([2.4, 5.1]);
    expect(result).toMatchObject({ verdict: 'fail', modes: [1, 2] });
    expect(result.statement).toMatch(/mode 1 at 2\.5 m\/s, mode 2 at 5 m\/s/);
    expect(result.utilisation).toBeGreaterThan(1);
  });

  it('is undetermined where the range ends at a critical speed', () => {
    expect(hold([1, (first.frequency * 9e-3) / 0.18])).toMatchObject({ verdict: 'undetermined', modes: [1] });
  });
});

describe('effective mass', () => {
  /** Uniform shear beam: 8/((2n − 1)² π²) (A. K. Chopra, Dynamics of Structures, from memory). */
  const member = {
    kind: 'shear-column',
    segments: [{ length: 20, shearWaveSpeed: 200, density: 1900 }],
    ends: { near: { type: 'fixed' }, far: { type: 'free' } },
  };
  const request = (count: number) => ({ member, series: { modes: count }, participation: { ends: 'near' } });
  const captured = (count: number) =>
    Array.from({ length: count }, (_, n) => 8 / ((2 * n + 1) ** 2 * Math.PI ** 2)).reduce((a, b) => a + b, 0);

  it('passes, fails with the number of modes that would do, and is undetermined at the value itself', () => {
    const [pass, fail, open] = resultsOf('modes', request(2), [
      { type: 'effective-mass', minimum: 0.9 },
      { type: 'effective-mass', minimum: 0.95 },
      { type: 'effective-mass', minimum: captured(2) },
    ]);
    expect([pass, fail, open].map(({ verdict }) => verdict)).toEqual(['pass', 'fail', 'undetermined']);
    expect(pass.demand).toBeCloseTo(captured(2), 12);
    const needed = [3, 4, 5].find((count) => captured(count) >= 0.95);
    expect(fail.statement).toContain(`${needed} modes reach it`);
  });

  it('never reaches all of it', () => {
    const [all] = resultsOf('modes', request(3), [{ type: 'effective-mass', minimum: 1 }]);
    expect(all.verdict).toBe('fail');
    expect(all.statement).toMatch(/1003 modes do not reach it either \(0\.9997/);
  });
});

import { describe, expect, it } from 'vitest';
import {
  complex,
  divide,
  modulus,
  multiply,
  squareRoot,
  type Complex,
} from '../../../src/numerics/complex.ts';
import { resultsOf, verdictsOf } from '../../support/checks.ts';

const [thickness, speed, density, eta] = [20, 200, 1900, 0.1];

/** cos and sin of a complex number. */
function cosine({ re, im }: Complex): Complex {
  return complex(Math.cos(re) * Math.cosh(im), -Math.sin(re) * Math.sinh(im));
}
function sine({ re, im }: Complex): Complex {
  return complex(Math.sin(re) * Math.cosh(im), Math.cos(re) * Math.sinh(im));
}

/** Largest of a function of the frequency over a band, by bisection of a dense grid. */
function largestOf(magnitude: (frequency: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  for (let round = 0; round < 6; round++) {
    const grid = Array.from({ length: 2001 }, (_, i) => low + ((high - low) * i) / 2000);
    const values = grid.map(magnitude);
    const top = values.indexOf(Math.max(...values));
    [low, high] = [grid[Math.max(0, top - 1)], grid[Math.min(2000, top + 1)]];
  }
  return magnitude(0.5 * (low + high));
}

function column(damping: object | undefined) {
  return {
    kind: 'shear-column',
    segments: [{ length: thickness, shearWaveSpeed: speed, density }],
    ends: { near: { type: 'fixed' }, far: { type: 'free' } },
    ...(damping && { damping }),
  };
}

const request = (input: object, damping: object | undefined, output: object = {}) => ({
  member: column(damping),
  input,
  outputs: [{ at: thickness, quantity: 'displacement', ...output }],
  frequencies: [1],
});
const loss = { type: 'loss-factor', value: eta };
const around = (most: number, band: number[]) =>
  [1.001, 0.999, 1].map((share) => ({ type: 'transfer', band, limit: share * most }));
const threeWays = ['pass', 'fail', 'undetermined'];

/** k*H of a layer with hysteretic damping. */
function phase(frequency: number): Complex {
  const wave = 2 * Math.PI * frequency * thickness;
  return divide(complex(wave), multiply(complex(speed), squareRoot(complex(1, eta))));
}

describe('the magnitude of a transfer function in a band', () => {
  it('of a layer on rigid rock, 1/|cos k*H|', () => {
    // S. L. Kramer, Geotechnical Earthquake Engineering, 1996, sec. 7.2 (from memory).
    const most = largestOf((f) => 1 / modulus(cosine(phase(f))), 1, 12);
    const input = { type: 'end-motion', end: 'near', quantity: 'displacement' };
    expect(verdictsOf('transfer-functions', request(input, loss), around(most, [1, 12]))).toEqual(threeWays);
    // The first peak, at 2.5 Hz, is left out.
    const second = largestOf((f) => 1 / modulus(cosine(phase(f))), 5, 12);
    expect(verdictsOf('transfer-functions', request(input, loss), around(second, [5, 12]))).toEqual(
      threeWays,
    );
  });

  it('of a layer on an elastic half-space, 1/|cos k*H + i α* sin k*H|', () => {
    const rock = 2500e3;
    const soil = multiply(complex(density * speed), squareRoot(complex(1, eta)));
    const contrast = divide(soil, complex(rock));
    const amplification = (f: number): number => {
      const turned = multiply(multiply(complex(0, 1), contrast), sine(phase(f)));
      const still = cosine(phase(f));
      return 1 / Math.hypot(still.re + turned.re, still.im + turned.im);
    };
    const most = largestOf(amplification, 0, 15);
    const input = { type: 'outcrop-motion', end: 'near', impedance: rock, quantity: 'acceleration' };
    const asked = request(input, loss, { quantity: 'acceleration' });
    expect(verdictsOf('transfer-functions', asked, around(most, [0, 15]))).toEqual(threeWays);
  });

  it('of a rod under a force with modal damping ratios, without a closed form', () => {
    // Near the first resonance one mode rules: with ζ = 0.02 the peak is about F φ²/(2ζω²) and the static rest.
    const input = { type: 'point-force', at: thickness };
    const asked = request(input, { type: 'ratio', value: 0.02 });
    const [found] = resultsOf('transfer-functions', asked, [
      { type: 'transfer', band: [1, 4], limit: 1e-12 },
    ]);
    const omega = (Math.PI * speed) / (2 * thickness);
    const single = 2 / (density * thickness) / (2 * 0.02 * omega ** 2);
    const [pass, fail] = verdictsOf('transfer-functions', asked, [
      { type: 'transfer', band: [1, 4], limit: 1.02 * single },
      { type: 'transfer', band: [1, 4], limit: 0.98 * single },
    ]);
    expect([found.verdict, pass, fail]).toEqual(['fail', 'pass', 'fail']);
  });

  it('of Rayleigh damping, as displacement, velocity, acceleration and force', () => {
    const damping = { type: 'rayleigh', massCoefficient: 0.4, stiffnessCoefficient: 1e-3 };
    const input = { type: 'point-force', at: 12 };
    for (const quantity of ['displacement', 'velocity', 'acceleration', 'force']) {
      const asked = request(input, damping, { quantity, at: 7 });
      const [, top] = resultsOf('transfer-functions', asked, [
        { type: 'transfer', band: [1, 10], limit: 1e-30 },
        { type: 'transfer', band: [1, 10], limit: 1e30 },
      ]);
      expect(top.verdict).toBe('pass');
      // What passes by a wide limit is no peak yet; halve the distance until it is one.
      let [low, high] = [top.demand!, top.demand! + Math.min(top.bound!, 10 * top.demand!)];
      for (let round = 0; round < 12; round++) {
        const middle = 0.5 * (low + high);
        const [verdict] = verdictsOf('transfer-functions', asked, [
          { type: 'transfer', band: [1, 10], limit: middle },
        ]);
        if (verdict === 'pass') high = middle;
        else low = middle;
      }
      expect(high / low).toBeLessThan(1.05);
    }
  });

  it('fails where the band holds an undamped resonance, hit or not', () => {
    const input = { type: 'point-force', at: thickness };
    // 2.5 Hz = V/(4H); the middle of a band about it is the resonance itself.
    const verdicts = verdictsOf('transfer-functions', request(input, undefined), [
      { type: 'transfer', band: [2.5, 2.5], limit: 1 },
      { type: 'transfer', band: [2.41, 2.6], limit: 1 },
      { type: 'transfer', band: [2.6, 7.4], limit: 1 },
    ]);
    expect(verdicts).toEqual(['fail', 'fail', 'pass']);
  });

  it('holds all outputs of one quantity to the limit, or the one that is named', () => {
    const input = { type: 'end-motion', end: 'near', quantity: 'displacement' };
    const asked = {
      ...request(input, loss),
      outputs: [
        { at: 0, quantity: 'displacement' },
        { at: thickness, quantity: 'displacement' },
      ],
    };
    const criterion = { type: 'transfer', band: [1, 12], limit: 2 };
    const results = resultsOf('transfer-functions', asked, [criterion, { ...criterion, output: 0 }]);
    expect(results.map(({ verdict, at }) => [verdict, at])).toEqual([
      ['fail', thickness],
      ['pass', 0],
    ]);
  });
});

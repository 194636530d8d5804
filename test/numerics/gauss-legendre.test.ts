import { describe, expect, it } from 'vitest';
import { GAUSS_20, gaussLegendre } from '../../src/numerics/gauss-legendre.ts';

const EPS = Number.EPSILON;

/**
 * Abramowitz & Stegun, Handbook of Mathematical Functions, 1964, table 25.4: abscissas ±x and weights
 * on [−1, 1] (digits from memory, agree with the roots of P_n at 40 digits).
 */
const TABLE_25_4: Record<number, readonly (readonly [number, number])[]> = {
  2: [[0.577350269189626, 1]],
  3: [
    [0, 0.888888888888889],
    [0.774596669241483, 0.555555555555556],
  ],
  4: [
    [0.339981043584856, 0.652145154862546],
    [0.861136311594053, 0.347854845137454],
  ],
  5: [
    [0, 0.568888888888889],
    [0.538469310105683, 0.478628670499366],
    [0.906179845938664, 0.236926885056189],
  ],
  20: [
    [0.076526521133497, 0.152753387130726],
    [0.227785851141645, 0.149172986472604],
    [0.37370608871542, 0.142096109318382],
    [0.510867001950827, 0.131688638449177],
    [0.636053680726515, 0.118194531961518],
    [0.746331906460151, 0.10193011981724],
    [0.839116971822219, 0.083276741576705],
    [0.912234428251326, 0.062672048334109],
    [0.963971927277914, 0.040601429800387],
    [0.993128599185095, 0.017614007139152],
  ],
};

describe('nodes and weights are those of Abramowitz & Stegun, table 25.4', () => {
  it.each(Object.keys(TABLE_25_4).map(Number))('n = %i', (n) => {
    const { nodes, weights } = gaussLegendre(n);
    TABLE_25_4[n].forEach(([x, w]) => {
      for (const side of [0.5 * (1 - x), 0.5 * (1 + x)]) {
        // half a unit of the fifteenth decimal, halved by the map to [0, 1], and rounding
        const q = nodes.findIndex((node) => Math.abs(node - side) < 1e-10);
        expect(Math.abs(nodes[q] - side)).toBeLessThan(0.5e-15 + EPS);
        expect(Math.abs(weights[q] - 0.5 * w)).toBeLessThan(0.5e-15 + EPS);
      }
    });
  });
});

it.each([1, 2, 3, 4, 7, 12, 20])('the rule of %i points is exact for every power up to 2n − 1', (n) => {
  const { nodes, weights } = gaussLegendre(n);
  for (let power = 0; power <= 2 * n - 1; power++) {
    const sum = nodes.reduce((total, x, q) => total + weights[q] * x ** power, 0);
    expect(Math.abs(sum * (power + 1) - 1)).toBeLessThan(8 * EPS * (1 + power));
  }
});

it.each([1, 2, 3, 4])('the rule of %i points misses x^2n by the remainder of A&S 25.4.30', (n) => {
  const { nodes, weights } = gaussLegendre(n);
  const factorial = (m: number): number => (m <= 1 ? 1 : m * factorial(m - 1));
  // on [0, 1]: (n!)⁴/((2n + 1)((2n)!)³) f^(2n), f^(2n) = (2n)!
  const remainder = factorial(n) ** 4 / ((2 * n + 1) * factorial(2 * n) ** 2);
  const sum = nodes.reduce((total, x, q) => total + weights[q] * x ** (2 * n), 0);
  expect(Math.abs(1 / (2 * n + 1) - sum - remainder)).toBeLessThan(4 * EPS);
});

it('weights are positive, symmetric and sum to 1 within some roundings up to n = 256', () => {
  for (const n of [1, 2, 5, 20, 64, 255, 256]) {
    const { nodes, weights } = gaussLegendre(n);
    expect(Math.abs(weights.reduce((sum, w) => sum + w, 0) - 1)).toBeLessThan(16 * EPS);
    for (let q = 0; q < n; q++) {
      expect(weights[q]).toBeGreaterThan(0);
      expect(weights[n - 1 - q]).toBe(weights[q]);
      expect(Math.abs(nodes[q] + nodes[n - 1 - q] - 1)).toBeLessThan(EPS);
      if (q > 0) expect(nodes[q]).toBeGreaterThan(nodes[q - 1]);
    }
  }
});

it('one panel of 20 points integrates sin² over a phase of 4 to rounding', () => {
  const sum = GAUSS_20.nodes.reduce((total, x, q) => total + GAUSS_20.weights[q] * Math.sin(4 * x) ** 2, 0);
  expect(Math.abs(sum - (0.5 - Math.sin(8) / 16))).toBeLessThan(4 * EPS);
});

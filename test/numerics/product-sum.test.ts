import { expect, it } from 'vitest';
import { ProductSum } from '../../src/numerics/product-sum.ts';

function waves(size: number, seed: number): Float64Array {
  return Float64Array.from({ length: size }, (_, i) => Math.sin(seed + 1.7 * i * i));
}

it('a sum lies within (n + 1) roundings of the sum of magnitudes around the exact sum', () => {
  const [n, rows, columns] = [64, 6, 9];
  const a = waves(n * rows, 1);
  const b = waves(n * columns, 2);
  const sum = new ProductSum(rows, columns, n);
  sum.add(n, a, b);
  const values = sum.values();
  // products of doubles are exact in integers of 2⁻¹⁰⁶
  const scaled = (x: number): bigint => BigInt(Math.round(x * 2 ** 53));
  const parts = (x: number): [bigint, bigint] => {
    const high = scaled(x);
    return [high, BigInt(Math.round((x - Number(high) * 2 ** -53) * 2 ** 106))];
  };
  for (let r = 0; r < rows; r++) {
    for (let q = 0; q < columns; q++) {
      let exact = 0n;
      let size = 0;
      for (let m = 0; m < n; m++) {
        const [x, xRest] = parts(a[m * rows + r]);
        const [y, yRest] = parts(b[m * columns + q]);
        exact += x * y + ((x * yRest + xRest * y) >> 53n);
        size += Math.abs(a[m * rows + r] * b[m * columns + q]);
      }
      const error = Number(scaled(values[r * columns + q]) * 2n ** 53n - exact) * 2 ** -106;
      // scaled() itself rounds to 2⁻⁵⁴
      expect(Math.abs(error)).toBeLessThan((n + 1) * 2 ** -53 * size + 2 ** -53);
    }
  }
});

it('fewer rows than the depth and reading between calls change nothing else', () => {
  const whole = (size: number, seed: number): Float64Array =>
    Float64Array.from({ length: size }, (_, i) => ((i * 31 + seed) % 19) - 9);
  const sum = new ProductSum(3, 5, 64);
  expect(Array.from(sum.values())).toEqual(Array.from({ length: 15 }, () => 0));
  const expected = new Float64Array(15);
  for (const n of [64, 1, 10]) {
    const a = whole(n * 3, n);
    const b = whole(n * 5, n + 7);
    sum.add(n, a, b);
    for (let r = 0; r < 3; r++)
      for (let q = 0; q < 5; q++)
        for (let m = 0; m < n; m++) expected[r * 5 + q] += a[m * 3 + r] * b[m * 5 + q];
    expect(sum.values()).toEqual(expected);
  }
});

it('two sums side by side do not share memory', () => {
  const first = new ProductSum(1, 1, 1);
  const second = new ProductSum(1, 1, 1);
  first.add(1, Float64Array.of(2), Float64Array.of(3));
  second.add(1, Float64Array.of(5), Float64Array.of(7));
  expect([first.values()[0], second.values()[0]]).toEqual([6, 35]);
});

it('an entry has the same bits in a small table and in a large one', () => {
  const n = 33;
  const a = waves(n * 13, 3);
  const b = waves(n * 21, 4);
  const large = new ProductSum(13, 21, 64);
  large.add(n, a, b);
  const small = new ProductSum(1, 1, n);
  small.add(
    n,
    Float64Array.from({ length: n }, (_, m) => a[m * 13 + 12]),
    Float64Array.from({ length: n }, (_, m) => b[m * 21 + 17]),
  );
  expect(small.values()[0]).toBe(large.values()[12 * 21 + 17]);
});

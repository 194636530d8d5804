import { expect, it } from 'vitest';
import { addProduct } from '../../src/numerics/dense-product.ts';
import { ProductSum } from '../../src/numerics/product-sum.ts';
import { kernelTexts } from './kernel-source.ts';

it('the committed kernel is what its source assembles to', async () => {
  const { committed, assembled } = await kernelTexts('product-kernel', 'PRODUCT_KERNEL');
  expect(committed).toBe(assembled);
});

/** Deterministic values of mixed sign and size. */
function table(size: number, seed: number): Float64Array {
  let state = seed;
  return Float64Array.from({ length: size }, () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return (state / 2 ** 31 - 1) * 10 ** ((state >>> 7) % 7);
  });
}

it.each([
  [1, 1, 1],
  [64, 5, 3],
  [7, 4, 8],
  [64, 401, 203],
  [3, 2, 1000],
])('a product of %i × %i and %i columns equals the plain one bit for bit', (n, rows, columns) => {
  const sum = new ProductSum(rows, columns, 64);
  const plain = new Float64Array(rows * columns);
  for (const seed of [1, 2, 3]) {
    const a = table(n * rows, seed);
    const b = table(n * columns, seed + 10);
    sum.add(n, a, b);
    addProduct(n, a, rows, b, columns, plain);
  }
  expect(sum.values()).toEqual(plain);
});

it('agrees with sums in exact integers', () => {
  const sum = new ProductSum(6, 5, 64);
  const a = Float64Array.from({ length: 64 * 6 }, (_, i) => (i * 7) % 101);
  const b = Float64Array.from({ length: 64 * 5 }, (_, i) => (i * 13) % 97);
  sum.add(64, a, b);
  const exact = Array.from({ length: 30 }, (_, at) => {
    let total = 0n;
    for (let m = 0; m < 64; m++) total += BigInt(a[m * 6 + Math.floor(at / 5)]) * BigInt(b[m * 5 + (at % 5)]);
    return Number(total);
  });
  expect(Array.from(sum.values())).toEqual(exact);
});

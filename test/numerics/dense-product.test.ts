import { expect, it } from 'vitest';
import { addProduct } from '../../src/numerics/dense-product.ts';

/** Whole numbers small enough that every product and sum is exact in double. */
function whole(size: number, seed: number): Float64Array {
  return Float64Array.from({ length: size }, (_, i) => ((i * 7919 + seed * 104_729) % 2003) - 1001);
}

it('C += AᵀB is exact for whole numbers, whatever rest the 2 × 4 blocks leave', () => {
  for (const rows of [1, 2, 3, 5]) {
    for (const columns of [1, 3, 4, 6, 8, 9]) {
      for (const n of [0, 1, 17]) {
        const a = whole(n * rows, 1);
        const b = whole(n * columns, 2);
        const c = whole(rows * columns, 3);
        const expected = Array.from(c, (value, at) => {
          const r = Math.floor(at / columns);
          const q = at % columns;
          let sum = BigInt(value);
          for (let m = 0; m < n; m++) sum += BigInt(a[m * rows + r]) * BigInt(b[m * columns + q]);
          return Number(sum);
        });
        addProduct(n, a, rows, b, columns, c);
        expect(Array.from(c)).toEqual(expected);
      }
    }
  }
});

it('an entry does not depend on the rows and columns around it, bit for bit', () => {
  const [n, rows, columns] = [40, 7, 11];
  const a = Float64Array.from({ length: n * rows }, (_, i) => Math.sin(i * i));
  const b = Float64Array.from({ length: n * columns }, (_, i) => Math.cos(3 * i * i));
  const c = new Float64Array(rows * columns);
  addProduct(n, a, rows, b, columns, c);
  for (let r = 0; r < rows; r++) {
    for (let q = 0; q < columns; q++) {
      const own = new Float64Array(1);
      const left = Float64Array.from({ length: n }, (_, m) => a[m * rows + r]);
      const right = Float64Array.from({ length: n }, (_, m) => b[m * columns + q]);
      addProduct(n, left, 1, right, 1, own);
      expect(c[r * columns + q]).toBe(own[0]);
    }
  }
});

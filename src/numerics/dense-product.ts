/**
 * C += Aᵀ B for row-major tables A [n × rows] and B [n × columns], C [rows × columns].
 *
 * 2 × 4 register blocks; each entry is summed over n in ascending order within the call and then
 * added to C, so the result does not depend on how rows or columns are grouped. Cost 2·n·rows·columns
 * flops.
 */
export function addProduct(
  n: number,
  a: Float64Array,
  rows: number,
  b: Float64Array,
  columns: number,
  c: Float64Array,
): void {
  let r = 0;
  for (; r + 1 < rows; r += 2) {
    let q = 0;
    for (; q + 3 < columns; q += 4) {
      let c00 = 0;
      let c01 = 0;
      let c02 = 0;
      let c03 = 0;
      let c10 = 0;
      let c11 = 0;
      let c12 = 0;
      let c13 = 0;
      for (let m = 0, ia = r, ib = q; m < n; m++, ia += rows, ib += columns) {
        const a0 = a[ia];
        const a1 = a[ia + 1];
        const b0 = b[ib];
        const b1 = b[ib + 1];
        const b2 = b[ib + 2];
        const b3 = b[ib + 3];
        c00 += a0 * b0;
        c01 += a0 * b1;
        c02 += a0 * b2;
        c03 += a0 * b3;
        c10 += a1 * b0;
        c11 += a1 * b1;
        c12 += a1 * b2;
        c13 += a1 * b3;
      }
      const upper = r * columns + q;
      const lower = upper + columns;
      c[upper] += c00;
      c[upper + 1] += c01;
      c[upper + 2] += c02;
      c[upper + 3] += c03;
      c[lower] += c10;
      c[lower + 1] += c11;
      c[lower + 2] += c12;
      c[lower + 3] += c13;
    }
    for (; q < columns; q++) {
      c[r * columns + q] += entry(n, a, rows, r, b, columns, q);
      c[(r + 1) * columns + q] += entry(n, a, rows, r + 1, b, columns, q);
    }
  }
  for (; r < rows; r++) {
    for (let q = 0; q < columns; q++) c[r * columns + q] += entry(n, a, rows, r, b, columns, q);
  }
}

function entry(
  n: number,
  a: Float64Array,
  rows: number,
  r: number,
  b: Float64Array,
  columns: number,
  q: number,
): number {
  let sum = 0;
  for (let m = 0, ia = r, ib = q; m < n; m++, ia += rows, ib += columns) sum += a[ia] * b[ib];
  return sum;
}

import { addProduct } from './dense-product.ts';

/**
 * Running sum C += Aᵀ B of table products, rows × columns, in double precision.
 *
 * Every entry is summed over the rows of one call in ascending order, then added to C, so results do
 * not depend on tiling. Cost: 2 flops an entry and table row.
 */
export class ProductSum {
  private readonly rows: number;
  private readonly columns: number;
  private readonly sum: Float64Array;

  /** @param depth most rows that A and B have in one call */
  constructor(rows: number, columns: number, depth: number) {
    this.rows = rows;
    this.columns = columns;
    this.sum = new Float64Array(rows * columns);
    void depth;
  }

  /** Adds Aᵀ B of the first n rows of A [n × rows] and B [n × columns]. */
  add(n: number, a: Float64Array, b: Float64Array): void {
    addProduct(n, a, this.rows, b, this.columns, this.sum);
  }

  /** The sum, shape [rows × columns] row-major. */
  values(): Float64Array {
    return this.sum;
  }
}

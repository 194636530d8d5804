import { ProductSum } from '../numerics/product-sum.ts';

/** Modes summed at once, and numbers held of their shapes at most. */
const BLOCK = 16;
const HELD = 1e6;

/** Σ factor(instant) · shape(point) over modes, block by block. Cost: 2 flops a mode, instant and point. */
export class GatheredField {
  private readonly points: number;
  private readonly instants: number;
  private readonly block: number;
  private readonly sum: ProductSum;
  private readonly factors: Float64Array;
  private readonly shapes: Float64Array;
  private count = 0;

  constructor(instants: number, points: number) {
    this.instants = instants;
    this.points = points;
    this.block = Math.max(1, Math.min(BLOCK, Math.floor(HELD / points)));
    this.sum = new ProductSum(instants, points, this.block);
    this.factors = new Float64Array(this.block * instants);
    this.shapes = new Float64Array(this.block * points);
  }

  /** Adds a mode. @param factors shape [instants] @param shape shape [points] */
  add(factors: Float64Array, shape: Float64Array): void {
    this.factors.set(factors, this.count * this.instants);
    this.shapes.set(shape, this.count * this.points);
    this.count++;
    if (this.count === this.block) this.flush();
  }

  private flush(): void {
    if (this.count > 0) this.sum.add(this.count, this.factors, this.shapes);
    this.count = 0;
  }

  /** The field at each instant, shape [instants][points]. */
  rows(): Float64Array[] {
    this.flush();
    const values = this.sum.values();
    return Array.from({ length: this.instants }, (_, j) =>
      values.subarray(j * this.points, (j + 1) * this.points),
    );
  }
}

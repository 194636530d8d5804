/** A seeded stream of numbers (mulberry32): the same seed gives the same cases everywhere. */
export class RandomStream {
  private state: number;

  constructor(seed: number, stream = 0) {
    this.state = (seed ^ Math.imul(stream + 1, 0x9e3779b9)) >>> 0;
    for (let i = 0; i < 4; i++) this.unit();
  }

  /** Uniform in [0, 1). */
  unit(): number {
    this.state = (this.state + 0x6d2b79f5) >>> 0;
    let t = this.state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  }

  between(low: number, high: number): number {
    return low + (high - low) * this.unit();
  }

  integer(low: number, high: number): number {
    return low + Math.floor((high - low + 1) * this.unit());
  }

  /** Between 10^low and 10^high, evenly in the logarithm. */
  decades(low: number, high: number): number {
    return 10 ** this.between(low, high);
  }

  chance(probability: number): boolean {
    return this.unit() < probability;
  }

  pick<T>(values: readonly T[]): T {
    return values[this.integer(0, values.length - 1)];
  }
}

/**
 * cos and sin of rate·(start + j·step), j = 0 … count − 1, by two-level angle addition: one table of
 * steps within a block of about √count, one of block starts. Every entry is one addition theorem away
 * from library values, so errors do not grow: about 3·2⁻⁵² plus the rounding of the angle.
 *
 * Cost: about 2 √count library calls and 4 multiplications an entry.
 */
export class HarmonicTable {
  private stepCosine = new Float64Array(0);
  private stepSine = new Float64Array(0);

  fill(
    rate: number,
    start: number,
    step: number,
    count: number,
    cosine: Float64Array,
    sine: Float64Array,
    offset = 0,
  ): void {
    const block = Math.max(1, Math.ceil(Math.sqrt(count)));
    if (this.stepCosine.length < block) {
      this.stepCosine = new Float64Array(2 * block);
      this.stepSine = new Float64Array(2 * block);
    }
    const { stepCosine, stepSine } = this;
    for (let m = 0; m < block; m++) {
      const angle = rate * (m * step);
      stepCosine[m] = Math.cos(angle);
      stepSine[m] = Math.sin(angle);
    }
    for (let from = 0; from < count; from += block) {
      const angle = rate * (start + from * step);
      const c = Math.cos(angle);
      const s = Math.sin(angle);
      const to = Math.min(block, count - from);
      for (let m = 0, at = offset + from; m < to; m++, at++) {
        const cm = stepCosine[m];
        const sm = stepSine[m];
        cosine[at] = c * cm - s * sm;
        sine[at] = s * cm + c * sm;
      }
    }
  }
}

/** Start, step and count of equally spaced values. */
export interface EvenGrid {
  readonly start: number;
  readonly step: number;
  readonly count: number;
}

/** The even grid that values form within rounding of the largest, or null. */
export function evenGrid(values: ArrayLike<number>, from = 0, to = values.length): EvenGrid | null {
  const count = to - from;
  if (count < 8) return null;
  const start = values[from];
  const step = (values[to - 1] - start) / (count - 1);
  const tolerance = 2 * Number.EPSILON * Math.max(Math.abs(start), Math.abs(values[to - 1]));
  for (let j = 0; j < count; j++) {
    if (Math.abs(values[from + j] - (start + j * step)) > tolerance) return null;
  }
  return { start, step, count };
}

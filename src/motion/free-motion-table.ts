import { evenGrid, HarmonicTable, type EvenGrid } from '../numerics/harmonic-table.ts';
import { freeMotion } from './modal-motion.ts';

/**
 * Free motion of modal coordinates at fixed times ({@link freeMotion}), the sines of evenly spaced
 * times by two-level angle addition.
 */
export class FreeMotionTable {
  private readonly times: Float64Array;
  /** From here on the times are an even grid. */
  private readonly evenFrom: number;
  private readonly grid: EvenGrid | null;
  private readonly table = new HarmonicTable();
  private readonly cosine: Float64Array;
  private readonly sine: Float64Array;

  constructor(times: Float64Array) {
    this.times = times;
    // gauge windows that begin before t = 0 are clamped: the even part comes after them
    const clamped = times.findIndex((t, j) => t > 0 && (j === 0 || times[j - 1] >= 0));
    const later = Math.max(0, clamped);
    const whole = evenGrid(times);
    this.grid = whole ?? evenGrid(times, later);
    this.evenFrom = whole ? 0 : later;
    this.cosine = new Float64Array(times.length);
    this.sine = new Float64Array(times.length);
  }

  /** q and q′ at the times; see {@link freeMotion} for the arguments. */
  fill(
    a: number,
    v: number,
    omega: number,
    rate: number,
    position: Float64Array,
    velocity: Float64Array,
  ): void {
    const { times, grid, evenFrom, cosine, sine } = this;
    const half = 0.5 * rate;
    if (grid === null || !(half < 0.999 * omega)) {
      freeMotion(a, v, omega, rate, times, position, velocity);
      return;
    }
    if (evenFrom > 0) {
      freeMotion(a, v, omega, rate, times.subarray(0, evenFrom), position, velocity);
    }
    const damped = half === 0 ? omega : Math.sqrt((omega - half) * (omega + half));
    const b = (v + half * a) / damped;
    const d = (omega * omega * a + half * v) / damped;
    this.table.fill(damped, grid.start, grid.step, grid.count, cosine, sine);
    for (let m = 0, j = evenFrom; j < times.length; m++, j++) {
      position[j] = a * cosine[m] + b * sine[m];
      velocity[j] = v * cosine[m] - d * sine[m];
    }
    if (half === 0) return;
    for (let j = evenFrom; j < times.length; j++) {
      const fade = Math.exp(-half * times[j]);
      position[j] *= fade;
      velocity[j] *= fade;
    }
  }
}

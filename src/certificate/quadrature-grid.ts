import type { WaveMember } from '../members/wave-member.ts';
import { ENDS, evaluateShape, waveNumberSquare, type ModeShape } from '../modes/mode-shape.ts';
import { GAUSS_20 } from '../numerics/gauss-legendre.ts';

const POINTS = GAUSS_20.nodes.length;
/** Largest phase of one panel; products of two shapes pass twice that, 20 points still to rounding. */
const PANEL = 12;

/**
 * A grid of Gauss panels over the member, fine enough for products of shapes up to a frequency.
 * Sums of w ρ f g over it are the mass integrals that the closed forms must agree with.
 */
export class QuadratureGrid {
  /** Number of points. */
  readonly size: number;
  /** Weights times panel length, m, shape [size]. */
  readonly weights: Float64Array;
  private readonly member: WaveMember;
  private readonly panels: Int32Array;
  private readonly first: Int32Array;
  private readonly pair = new Float64Array(2);

  constructor(member: WaveMember, lambda: number) {
    this.member = member;
    const n = member.segmentCount;
    this.panels = new Int32Array(n);
    this.first = new Int32Array(n + 1);
    for (let i = 0; i < n; i++) {
      const square = waveNumberSquare(member, i, lambda);
      const bedding = member.foundation[i] / member.stiffness[i];
      const quickest = Math.sqrt(Math.max(Math.abs(square), bedding)) * member.length[i];
      // strong decay from the ends is resolved by the panels too, as far as it is worth it
      this.panels[i] = Math.min(Math.ceil(quickest / PANEL) || 1, square > 0 ? 1 << 20 : 64);
      this.first[i + 1] = this.first[i] + POINTS * this.panels[i];
    }
    this.size = this.first[n];
    this.weights = new Float64Array(Math.min(this.size, 1 << 20));
    if (this.size > this.weights.length) return;
    for (let i = 0; i < n; i++) {
      const width = member.length[i] / this.panels[i];
      for (let at = this.first[i], q = 0; at < this.first[i + 1]; at++, q = (q + 1) % POINTS) {
        this.weights[at] = GAUSS_20.weights[q] * width;
      }
    }
  }

  /** First and last + 1 point of segment i. */
  range(i: number): [number, number] {
    return [this.first[i], this.first[i + 1]];
  }

  /** φ and p of a shape at all points. Travelling waves by rotation from panel to panel. */
  sample(shape: ModeShape, displacement: Float64Array, flux: Float64Array): void {
    const { member, pair } = this;
    for (let i = 0; i < member.segmentCount; i++) {
      const k = member.stiffness[i];
      const width = member.length[i] / this.panels[i];
      const square = waveNumberSquare(member, i, shape.lambda);
      if (!(square * member.length[i] * member.length[i] > 1e-4)) {
        for (let at = this.first[i], m = 0; at < this.first[i + 1]; at++, m++) {
          const x = (Math.floor(m / POINTS) + GAUSS_20.nodes[m % POINTS]) * width;
          evaluateShape(member, shape, i, x, pair);
          displacement[at] = pair[0];
          flux[at] = pair[1];
        }
        continue;
      }
      const kappa = Math.sqrt(square);
      const impedance = k * kappa;
      const u = shape.ends[ENDS * i];
      const v = shape.ends[ENDS * i + 1] / impedance;
      for (let q = 0; q < POINTS; q++) {
        const offset = kappa * width * GAUSS_20.nodes[q];
        const co = Math.cos(offset);
        const so = Math.sin(offset);
        const a = u * co + v * so;
        const b = v * co - u * so;
        for (let panel = 0, at = this.first[i] + q; panel < this.panels[i]; panel++, at += POINTS) {
          const c = this.turn(panel, kappa * width);
          const s = this.turnSine;
          displacement[at] = a * c + b * s;
          flux[at] = impedance * (b * c - a * s);
        }
      }
    }
  }

  private turnSine = 0;
  private turnStep = Number.NaN;
  private readonly turnCosines: number[] = [];
  private readonly turnSines: number[] = [];

  /** cos(panel · step), its sine beside it; kept for the segment. */
  private turn(panel: number, step: number): number {
    if (step !== this.turnStep) {
      this.turnStep = step;
      this.turnCosines.length = 0;
      this.turnSines.length = 0;
    }
    if (panel >= this.turnCosines.length) {
      this.turnCosines.push(Math.cos(panel * step));
      this.turnSines.push(Math.sin(panel * step));
    }
    this.turnSine = this.turnSines[panel];
    return this.turnCosines[panel];
  }
}

import type { WaveMember } from '../members/wave-member.ts';
import type { Mode } from '../modes/mode-series.ts';
import { evaluateShape, waveNumberSquare } from '../modes/mode-shape.ts';
import type { HistoryPart } from './history.ts';
import { ForcedMotion } from './forced-motion.ts';
import type { LoadMover } from './load-mover.ts';

/** One stretch of the passage: distances from the near end of its segment, m, and times, s. */
export interface Passage {
  readonly segment: number;
  readonly near: number;
  readonly far: number;
  readonly from: number;
  readonly to: number;
}

/**
 * A constant force P that crosses the member at constant speed: F_n(t) = P φ_n(x(t)), x from the near
 * end on for v > 0, from the far end for v < 0. On each segment that is a harmonic (or a hyperbolic
 * sine, or a line) in time, so each modal coordinate is exact, at the wave speed too.
 */
export class MovingForceMotion {
  readonly force: number;
  /** |v|, m/s. */
  readonly pace: number;
  /** v, m/s, positive towards the far end. */
  readonly velocity: number;
  readonly start: number;
  /** Stretches in the order of passage: distances in the segment, times of entry and exit. */
  readonly passage: readonly Passage[];
  private readonly member: WaveMember;
  private readonly backwards: boolean;

  constructor(member: WaveMember, force: number, speed: number, start: number) {
    this.member = member;
    this.force = force;
    this.pace = Math.abs(speed);
    this.velocity = speed;
    this.start = start;
    this.backwards = speed < 0;
    const n = member.segmentCount;
    const total = member.position[n];
    const passage: Passage[] = [];
    for (let m = 0; m < n; m++) {
      const segment = this.backwards ? n - 1 - m : m;
      const length = member.length[segment];
      // no shape decays by more than e^{−200} over a stretch, so that its growing part can be held
      const bedding = Math.sqrt(member.foundation[segment] / member.stiffness[segment]) * length;
      const count = Math.max(1, Math.ceil(bedding / 200));
      for (let c = 0; c < count; c++) {
        const piece = this.backwards ? count - 1 - c : c;
        const near = (piece * length) / count;
        const far = piece + 1 === count ? length : ((piece + 1) * length) / count;
        const x0 = member.position[segment] + near;
        const x1 = member.position[segment] + far;
        const [enter, leave] = this.backwards ? [total - x1, total - x0] : [x0, x1];
        passage.push({ segment, near, far, from: start + enter / this.pace, to: start + leave / this.pace });
      }
    }
    this.passage = passage;
  }

  /** Place of the force at a time, m, or null while it is off the member. */
  placeAt(t: number): number | null {
    const path = this.pace * (t - this.start);
    const total = this.member.position[this.member.segmentCount];
    if (path < 0 || path > total) return null;
    return this.backwards ? total - path : path;
  }

  moverAt(times: Float64Array): LoadMover {
    const still: HistoryPart[] = this.passage.map(({ from, to }) => ({
      kind: 'linear',
      from,
      to,
      value: 0,
      slope: 0,
      curve: 0,
    }));
    const forced = new ForcedMotion(still, [], times);
    return {
      add: (mode, rate, factor, q, v) =>
        forced.add(mode.frequency.omega, rate, factor, q, v, this.partsOf(mode)),
    };
  }

  /** Place at a time, m, held at the ends before and after the passage. */
  heldPlaceAt(t: number): number {
    const total = this.member.position[this.member.segmentCount];
    const path = Math.min(Math.max(this.pace * (t - this.start), 0), total);
    return this.backwards ? total - path : path;
  }

  /** P φ_n(x(t)) of a mode, one part a segment. */
  private partsOf(mode: Mode): HistoryPart[] {
    const { member, force, pace } = this;
    const { lambda } = mode.shape;
    const entry = new Float64Array(2);
    const leave = new Float64Array(2);
    return this.passage.map(({ segment, near, far, from, to }) => {
      const k = member.stiffness[segment];
      const l = far - near;
      const square = waveNumberSquare(member, segment, lambda);
      const sign = this.backwards ? -1 : 1;
      // value and slope along the path at entry, value at exit
      evaluateShape(member, mode.shape, segment, this.backwards ? far : near, entry);
      evaluateShape(member, mode.shape, segment, this.backwards ? near : far, leave);
      const value = entry[0];
      const slope = (sign * entry[1]) / k;
      const exit = leave[0];
      const phase = square * l * l;
      if (phase > 1e-6) {
        const kappa = Math.sqrt(square);
        // u cos κvs + (u′/κ) sin κvs = Re[(u − i u′/κ) e^{iκvs}]
        const amplitude = { re: force * value, im: (-force * slope) / kappa };
        return { kind: 'wave', from, to, forcings: [{ amplitude, rate: { re: 0, im: kappa * pace } }] };
      }
      if (phase < -1e-6) {
        const kappa = Math.sqrt(-square);
        // growing and decaying parts from both end values
        const fade = Math.exp(-kappa * l);
        const rest = -Math.expm1(-2 * kappa * l);
        const decaying = (value - exit * fade) / rest;
        const growing = (exit - value * fade) / rest;
        return {
          kind: 'wave',
          from,
          to,
          forcings: [
            { amplitude: { re: force * decaying, im: 0 }, rate: { re: -kappa * pace, im: 0 } },
            { amplitude: { re: force * growing * fade, im: 0 }, rate: { re: kappa * pace, im: 0 } },
          ],
        };
      }
      return {
        kind: 'linear',
        from,
        to,
        value: force * value,
        slope: force * slope * pace,
        curve: -force * square * value * pace * pace,
      };
    });
  }
}

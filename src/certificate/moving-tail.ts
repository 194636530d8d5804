import type { WaveMember } from '../members/wave-member.ts';
import type { Mode } from '../modes/mode-series.ts';
import type { MovingForceMotion } from '../motion/moving-force.ts';
import type { LoadTailFactors } from './load-tail-factors.ts';
import { controlStations } from './member-tail.ts';
import { TailFlexibility } from './tail-flexibility.ts';

/** |1 − v/c| below which the force travels with the wave and no pointwise bound exists. */
const SONIC = 1e-6;
/** Stations a segment, both ends among them. */
const BETWEEN = 1;

/**
 * What the kept modes leave of the response to a moving force P, with μ = v/c, D = 1/|1 − μ²| on each
 * segment (with bedding the largest 1/|1 − μ² + v² s/(kω²)| of the later modes): while a segment is
 * crossed the particular motion of mode n is at most P D √(φ² + p²/(Zω)²)/ω² in the energy norm, and
 * every entry, interface, node and exit sets free what the two sides differ by, so at any time
 *
 *   |tail| ≤ P √ΔG(x) { D √(ΔG + ΔH/Z²)(vt) + Σ_passed Σ_± D^± (1 + μ^±) √(ΔG + ΔH^±/Z_±²) },
 *
 * for any damping; undamped, without bedding, the difference itself:
 *
 *   |D⁺ − D⁻| √ΔG(x_i) + v (|D⁺|/k⁺ √ΔH⁺ + |D⁻|/k⁻ √ΔH⁻), one term v|D⁺/k⁺ − D⁻/k⁻| √ΔH where p is continuous.
 */
export class MovingTail {
  private readonly member: WaveMember;
  private readonly motion: MovingForceMotion;
  private readonly tails: TailFlexibility;

  constructor(member: WaveMember, motion: MovingForceMotion) {
    this.member = member;
    this.motion = motion;
    this.tails = new TailFlexibility(member, controlStations(member, BETWEEN));
  }

  add(mode: Mode): void {
    this.tails.add(mode);
  }

  factors(nextOmega: number, ratio: number, gaugeTime: number, span: number): LoadTailFactors {
    const { member, motion } = this;
    const drag = Math.hypot(1, ratio);
    const lambda = nextOmega * nextOmega;
    const n = member.segmentCount;
    const v = motion.pace;
    const gain = new Float64Array(n);
    const mach = new Float64Array(n);
    let within = 0;
    let largest = 0;
    let steepest = 0;
    let restWithin = 0;
    for (let i = 0; i < n; i++) {
      const k = member.stiffness[i];
      const rho = member.inertia[i];
      const s = member.foundation[i];
      mach[i] = v * Math.sqrt(rho / k);
      gain[i] = this.gainOf(i, mach[i], lambda);
      const travelling = rho > 0 ? 1 - s / (rho * lambda) : 0;
      const [g, h] = this.joined(i, lambda);
      const wave =
        travelling > 0 ? Math.sqrt(g + h / (k * rho * travelling)) : rho === 0 ? Math.sqrt(g) : Infinity;
      largest = Math.max(largest, wave);
      // ΔH ≤ ΔH(x*) + kρ ΔG(x*) anywhere in the segment
      steepest = Math.max(steepest, rho > 0 ? Math.sqrt(h + k * rho * g) / k : Infinity);
      within = Math.max(within, gain[i] * wave);
      // a quasi-static part P G(x, vt) is taken out: D − 1 remains where it is smaller
      restWithin = Math.max(restWithin, this.restGain(i, gain[i], mach[i], ratio) * wave);
    }
    let events = 0;
    for (let j = 0; j <= n; j++) {
      if (this.passTime(j) > span) continue;
      events += this.event(j, gain, mach, lambda);
    }
    const displacement = motion.force === 0 ? 0 : Math.abs(motion.force) * (restWithin + events);
    const energy = motion.force === 0 ? 0 : Math.abs(motion.force) * (within + events);
    return {
      displacement,
      still: motion.force === 0 ? 0 : Math.abs(motion.force) * largest,
      velocity: Infinity,
      flux: Infinity,
      gaugeFlux: gaugeTime > 0 ? (2 * drag * energy) / gaugeTime : Infinity,
      gaugeAcceleration: Infinity,
      // the factors of √ΔG are √Σω²r²: what the r.m.s. over the member is made of
      rmsVelocity: energy + Math.abs(motion.force) * v * steepest,
      rmsFlux: member.damping.stiffnessCoefficient > 0 ? Infinity : displacement,
      rmsDisplacement: this.sonicMean(nextOmega, span),
    };
  }

  /** |D − 1| of the later modes at most: what is left of D beside the quasi-static part. */
  private restGain(i: number, gain: number, mach: number, ratio: number): number {
    const plain = this.member.foundation[i] === 0 && this.member.damping.stiffnessCoefficient === 0;
    return plain ? Math.min(gain + 1, gain * Math.hypot(mach * mach, ratio * mach)) : gain + 1;
  }

  /**
   * At the wave speed of a uniform undamped member only the mean square is bounded: mass norm at most
   * (P/2)(t + 1/ω_{N+1}) √(ΔG + ΔH/Z²), plus the quasi-static part that was taken out.
   */
  private sonicMean(nextOmega: number, span: number): number {
    const { member, motion } = this;
    if (member.segmentCount !== 1 || member.foundation[0] > 0) return Infinity;
    if (member.mass.some((mass) => mass > 0) || member.spring.some((spring) => spring > 0)) return Infinity;
    const [g, h] = this.joined(0, nextOmega * nextOmega);
    const wave = Math.sqrt(g + h / (member.stiffness[0] * member.inertia[0]));
    return Math.abs(motion.force) * wave * (0.5 * (span + 1 / nextOmega) + 1 / nextOmega);
  }

  /** Largest |D| of the later modes on a segment; infinite at the wave speed. */
  private gainOf(i: number, mach: number, lambda: number): number {
    if (Math.abs(1 - mach) < SONIC) return Infinity;
    const k = this.member.stiffness[i];
    const bedding = (this.motion.pace ** 2 * this.member.foundation[i]) / (k * lambda);
    const first = 1 - mach * mach;
    if (first > 0) return 1 / first;
    return first + bedding < 0 ? -1 / (first + bedding) : Infinity;
  }

  private signedGain(i: number, mach: number, lambda: number): number {
    const gain = this.gainOf(i, mach, lambda);
    return mach < 1 ? gain : -gain;
  }

  /** Tail flexibilities that hold anywhere in a segment: the largest of its stations with their distance. */
  private joined(i: number, lambda: number): [number, number] {
    const per = BETWEEN + 2;
    let best = Infinity;
    let pair: [number, number] = [0, 0];
    const k = this.member.stiffness[i];
    const rho = this.member.inertia[i];
    let largest = 0;
    for (let q = per * i; q < per * (i + 1); q++) {
      const g = this.tails.flexibilityTail(q, lambda);
      const h = this.tails.fluxTail(q);
      largest = Math.max(largest, g);
      if (rho === 0) continue;
      const sum = g + h / (k * rho);
      if (sum < best) {
        best = sum;
        pair = [g, h];
      }
    }
    return rho === 0 ? [largest, 0] : pair;
  }

  private passTime(j: number): number {
    const { passage } = this.motion;
    for (const one of passage) {
      if (one.segment === j && one.near === 0) return Math.min(one.from, one.to);
      if (one.segment === j - 1 && one.far === this.member.length[j - 1]) return Math.min(one.from, one.to);
    }
    return Infinity;
  }

  /** What passing node j sets free, in √(m/N). */
  private event(j: number, gain: Float64Array, mach: Float64Array, lambda: number): number {
    const { member } = this;
    const n = member.segmentCount;
    const per = BETWEEN + 2;
    const { damping } = member;
    const undamped =
      damping.ratios.every((ratio) => ratio === 0) &&
      damping.massCoefficient === 0 &&
      damping.stiffnessCoefficient === 0 &&
      member.foundation.every((s) => s === 0);
    const near = j > 0 ? per * j - 1 : -1;
    const far = j < n ? per * j : -1;
    const g = Math.sqrt(this.tails.flexibilityTail(near >= 0 ? near : far, lambda));
    if (undamped) {
      const d = (i: number): number => (i < 0 || i >= n ? 0 : this.signedGain(i, mach[i], lambda));
      const softness = (i: number): number => (i < 0 || i >= n ? 0 : d(i) / member.stiffness[i]);
      const hNear = near >= 0 ? Math.sqrt(this.tails.fluxTail(near)) : 0;
      const hFar = far >= 0 ? Math.sqrt(this.tails.fluxTail(far)) : 0;
      const joint = member.mass[j] === 0 && member.spring[j] === 0 && j > 0 && j < n;
      const turn = joint
        ? Math.abs(softness(j) - softness(j - 1)) * Math.max(hNear, hFar)
        : Math.abs(softness(j - 1)) * hNear + Math.abs(softness(j)) * hFar;
      return product(Math.abs(d(j) - d(j - 1)), g) + this.motion.pace * turn;
    }
    let sum = 0;
    for (const [i, q] of [
      [j - 1, near],
      [j, far],
    ]) {
      if (q < 0) continue;
      const travelling = 1 - member.foundation[i] / (member.inertia[i] * lambda);
      const wave =
        member.inertia[i] > 0 && travelling > 0
          ? Math.sqrt(g * g + this.tails.fluxTail(q) / (member.stiffness[i] * member.inertia[i] * travelling))
          : Infinity;
      sum += gain[i] * (1 + mach[i]) * wave;
    }
    return sum;
  }
}

function product(a: number, b: number): number {
  return a === 0 || b === 0 ? 0 : a * b;
}

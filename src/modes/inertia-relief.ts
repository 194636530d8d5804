import type { WaveMember } from '../members/wave-member.ts';
import { totalMass } from '../spectrum/spectrum-size.ts';

/**
 * Static response of an unrestrained member to a unit force balanced by its own inertia.
 *
 * With μ(z) the fraction of the mass before z, the flux is μ before the force and μ − 1 after it, so
 *
 *   G⊥(x,x) = ∫₀ˣ μ²/k + ∫ₓᴸ (1 − μ)²/k = Σ_{n≥2} φ_n²/ω_n²,
 *   H⊥(x) = m μ(x) (1 − μ(x)) = Σ_{n≥2} p_n²/ω_n⁴.
 *
 * All terms are positive. Cost: O(segments) once, O(1) a station.
 */
export class InertiaRelief {
  private readonly member: WaveMember;
  private readonly mass: number;
  /** μ just after the near node of each segment, and the rest 1 − μ just before its far node. */
  private readonly before: Float64Array;
  private readonly after: Float64Array;
  /** ∫μ²/k up to the near node of each segment, ∫(1 − μ)²/k from its far node on. */
  private readonly near: Float64Array;
  private readonly far: Float64Array;

  constructor(member: WaveMember) {
    const n = member.segmentCount;
    this.member = member;
    this.mass = totalMass(member);
    this.before = new Float64Array(n);
    this.after = new Float64Array(n);
    this.near = new Float64Array(n);
    this.far = new Float64Array(n);
    let share = 0;
    let integral = 0;
    for (let i = 0; i < n; i++) {
      share += member.mass[i] / this.mass;
      this.before[i] = share;
      this.near[i] = integral;
      const end = share + (member.inertia[i] * member.length[i]) / this.mass;
      integral += squareIntegral(share, end, member.length[i] / member.stiffness[i]);
      share = end;
    }
    share = 0;
    integral = 0;
    for (let i = n - 1; i >= 0; i--) {
      share += member.mass[i + 1] / this.mass;
      this.after[i] = share;
      this.far[i] = integral;
      const end = share + (member.inertia[i] * member.length[i]) / this.mass;
      integral += squareIntegral(share, end, member.length[i] / member.stiffness[i]);
      share = end;
    }
  }

  /** G⊥(x,x), m/N. */
  flexibility(i: number, distance: number): number {
    const { member } = this;
    const rest = member.length[i] - distance;
    const density = member.inertia[i] / this.mass;
    const mu = this.before[i] + density * distance;
    const nu = this.after[i] + density * rest;
    return (
      this.near[i] +
      squareIntegral(this.before[i], mu, distance / member.stiffness[i]) +
      this.far[i] +
      squareIntegral(this.after[i], nu, rest / member.stiffness[i])
    );
  }

  /** G⊥(x,z) = ∫ p_x p_z/k of the two balanced states, m/N. Cost O(segments). */
  mutualFlexibility(i: number, distance: number, j: number, other: number): number {
    const swap = j < i || (j === i && other < distance);
    const [a, x, b, z] = swap ? [j, other, i, distance] : [i, distance, j, other];
    const first = this.flexibilityParts(a, x);
    const second = this.flexibilityParts(b, z);
    // between the places the fluxes have opposite signs: −∫ μ(1 − μ)/k
    let between = 0;
    for (let m = a; m <= b; m++) {
      const from = m === a ? x : 0;
      const to = m === b ? z : this.member.length[m];
      between += this.crossIntegral(m, from, to);
    }
    return first.before + second.after - between;
  }

  /** Flux at (i, distance) under a unit force at (j, other) balanced by inertia: μ before it, μ − 1 after it. */
  influence(i: number, distance: number, j: number, other: number): number {
    const density = this.member.inertia[i] / this.mass;
    const before = i < j || (i === j && distance <= other);
    return before
      ? this.before[i] + density * distance
      : -(this.after[i] + density * (this.member.length[i] - distance));
  }

  /** Flux at (i, distance) under a unit force a metre from the near end up to (j, other), ∫₀ᶻ I_x(y) dy. */
  influenceIntegral(i: number, distance: number, j: number, other: number): number {
    const { member } = this;
    const density = member.inertia[i] / this.mass;
    const mu = this.before[i] + density * distance;
    const nu = this.after[i] + density * (member.length[i] - distance);
    const x = member.position[i] + distance;
    const z = member.position[j] + other;
    return z <= x ? -nu * z : mu * (z - x) - nu * x;
  }

  private flexibilityParts(i: number, distance: number): { before: number; after: number } {
    const { member } = this;
    const rest = member.length[i] - distance;
    const density = member.inertia[i] / this.mass;
    const soft = 1 / member.stiffness[i];
    return {
      before:
        this.near[i] + squareIntegral(this.before[i], this.before[i] + density * distance, distance * soft),
      after: this.far[i] + squareIntegral(this.after[i], this.after[i] + density * rest, rest * soft),
    };
  }

  /** ∫ μ (1 − μ)/k over a stretch of segment i. */
  private crossIntegral(i: number, from: number, to: number): number {
    const { member } = this;
    const density = member.inertia[i] / this.mass;
    const a = this.before[i] + density * from;
    const b = this.before[i] + density * to;
    const c = this.after[i] + density * (member.length[i] - from);
    const d = this.after[i] + density * (member.length[i] - to);
    return (((2 * a * c + a * d + b * c + 2 * b * d) / 6) * (to - from)) / member.stiffness[i];
  }

  /** H⊥(x), kg (shaft: kg·m²). */
  fluxInertia(i: number, distance: number): number {
    const density = this.member.inertia[i] / this.mass;
    const mu = this.before[i] + density * distance;
    const nu = this.after[i] + density * (this.member.length[i] - distance);
    return this.mass * mu * nu;
  }
}

/** ∫ of the square of a line from a to b over a stretch. */
function squareIntegral(a: number, b: number, stretch: number): number {
  return ((a * a + a * b + b * b) / 3) * stretch;
}

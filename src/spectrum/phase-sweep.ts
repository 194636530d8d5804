import type { WaveMember } from '../members/wave-member.ts';
import { PhaseMarch } from './phase-march.ts';

/** Numbers kept a segment by a survey. */
const SIDE = 7;

/** Roundings a product, sum and elementary function may bring, in units of 2⁻⁵²: 4, with a margin. */
const ROUNDING = 4 * Number.EPSILON;

/**
 * The counted Prüfer phase of a member, swept from both ends and joined in one segment.
 *
 * For a trial ω the solution of the segment equation is marched exactly from the near end and from
 * the far end up to the far node of the joining segment. With u = A sin θ / S and ±p = A cos θ on
 * either side, the total phase
 *
 *   Φ(ω) = θ_near + θ_far
 *
 * passes every n π once, upwards, at ω_n (Sturm oscillation; for a scale S that does not depend on ω it
 * is continuous and increasing, and where S changes, multiples of π stay what they are). The count is the
 * one of W. H. Wittrick and F. W. Williams, "A general algorithm for computing natural frequencies
 * of elastic structures", Q. J. Mech. Appl. Math. 24, 1971. Its derivative is closed form, the mass of
 * the trial shape over its amplitude at the joint, S′ counted where the joint travels:
 *
 *   dΦ/dω = 2 ω S (m_near/A_near² + m_far/A_far²) + S′(ω) (u p/A² on both sides).
 *
 * Half turns are counted as integers and the rest is held as the vector (u, p), never as an angle,
 * so small phases keep their relative precision (heavy lumps on a light member).
 *
 * Cost: O(segments), two elementary functions a segment.
 */
export class PhaseSweep {
  private readonly member: WaveMember;
  private readonly march: PhaseMarch;
  /** Number of sweeps made so far. */
  sweeps = 0;
  /** Φ − n π of the last sweep, rad. */
  residual = 0;
  /** dΦ/dω of the last sweep, s; in an evanescent joint that of a fixed scale. */
  slope = 0;
  /** Number of natural frequencies strictly below the last trial ω. */
  below = 0;
  /** Bound on the rounding error of the last residual, rad (first order, see {@link PhaseMarch}). */
  noise = 0;
  /** Segment of the last sweep that carries most of the trial shape's inertia. */
  liveliest = 0;

  /** Per segment: turns, u, g, mass, error, best share and its segment after a near-side sweep. */
  private readonly nearSide: Float64Array;

  constructor(member: WaveMember) {
    this.member = member;
    this.march = new PhaseMarch(member);
    this.nearSide = new Float64Array(SIDE * member.segmentCount);
  }

  /**
   * Sweeps at ω (rad/s, ≥ 0), joining in segment `joint`, and leaves residual against n π, slope,
   * count and the liveliest segment in the fields.
   */
  sweep(omega: number, n: number, joint: number): void {
    const { member, march } = this;
    const last = member.segmentCount - 1;
    const lambda = omega * omega;
    this.sweeps++;

    // from the near end through the joining segment
    march.start(member.nearFixed, member.spring[0] - lambda * member.mass[0], member.mass[0]);
    for (let i = 0; i <= joint; i++) {
      march.cross(i, lambda, omega);
      if (i < joint) march.lump(i + 1, lambda);
    }
    const turnsNear = march.turns;
    const uNear = march.u;
    const gNear = march.g;
    const massNear = march.mass;
    const errorNear = march.error;
    const best = march.bestShare;
    const liveliest = march.bestSegment;

    // from the far end up to the same node, its lump included
    const end = last + 1;
    march.start(member.farFixed, member.spring[end] - lambda * member.mass[end], member.mass[end]);
    for (let i = last; i > joint; i--) {
      march.cross(i, lambda, omega);
      march.lump(i, lambda);
    }

    this.join(joint, n, omega, turnsNear, uNear, gNear, massNear, errorNear, best, liveliest);
  }

  /**
   * Sweeps at ω once through the whole member from both ends and returns the joint from which ω_n
   * looks nearest, leaving that joint's residual and slope in the fields.
   *
   * Where a heavy lump or a barrier divides the member, the phase joined in one part rises in steps
   * at the frequencies of the other parts; all joints share the roots, and the one with the smallest
   * step is the smooth one. A slope beyond the travel time tells of such a step and is not trusted.
   *
   * Cost: O(segments), twice a sweep.
   */
  survey(omega: number, n: number, longestSlope: number): number {
    const { member, march, nearSide } = this;
    const last = member.segmentCount - 1;
    const lambda = omega * omega;
    this.sweeps += 2;
    march.start(member.nearFixed, member.spring[0] - lambda * member.mass[0], member.mass[0]);
    for (let i = 0, at = 0; i <= last; i++, at += SIDE) {
      march.cross(i, lambda, omega);
      nearSide[at] = march.turns;
      nearSide[at + 1] = march.u;
      nearSide[at + 2] = march.g;
      nearSide[at + 3] = march.mass;
      nearSide[at + 4] = march.error;
      nearSide[at + 5] = march.bestShare;
      nearSide[at + 6] = march.bestSegment;
      if (i < last) march.lump(i + 1, lambda);
    }
    const end = last + 1;
    march.start(member.farFixed, member.spring[end] - lambda * member.mass[end], member.mass[end]);
    let nearest = Number.POSITIVE_INFINITY;
    let chosen = last;
    let residual = 0;
    let slope = 0;
    let below = 0;
    let noise = 0;
    for (let i = last; i >= 0; i--) {
      const at = SIDE * i;
      this.join(
        i,
        n,
        omega,
        nearSide[at],
        nearSide[at + 1],
        nearSide[at + 2],
        nearSide[at + 3],
        nearSide[at + 4],
        nearSide[at + 5],
        nearSide[at + 6],
      );
      const step = Math.abs(this.residual) / Math.min(this.slope, longestSlope);
      if (step < nearest) {
        nearest = step;
        chosen = i;
        residual = this.residual;
        slope = this.slope;
        below = this.below;
        noise = this.noise;
      }
      if (i > 0) {
        march.cross(i, lambda, omega);
        march.lump(i, lambda);
      }
    }
    this.residual = residual;
    this.slope = slope;
    this.below = below;
    this.noise = noise;
    this.liveliest = chosen;
    return chosen;
  }

  /** Total phase, slope, count and rounding error from the two sides met at a joint. */
  private join(
    joint: number,
    n: number,
    omega: number,
    turnsNear: number,
    uNear: number,
    gNear: number,
    massNear: number,
    errorNear: number,
    bestNear: number,
    bestSegmentNear: number,
  ): void {
    const { member, march } = this;
    const lambda = omega * omega;
    const k = member.stiffness[joint];
    const rho = member.inertia[joint];
    const s = member.foundation[joint];
    const kappaSquare = (lambda * rho - s) / k;
    const perLength = 1 / member.length[joint];
    // scale of the joint: the impedance k κ where the wave travels, else any positive constant
    const travels = kappaSquare > perLength * perLength * 1e-4;
    const kappa = Math.sqrt(Math.abs(kappaSquare));
    const scale = travels ? k * kappa : k * Math.max(kappa, perLength);
    const scaleSlope = travels ? (omega * rho) / kappa : 0;

    const sineNear = scale * uNear;
    const sineFar = scale * march.u;
    const squareNear = sineNear * sineNear + gNear * gNear;
    const squareFar = sineFar * sineFar + march.g * march.g;
    const sine = sineNear * march.g + gNear * sineFar;
    const cosineOf = gNear * march.g - sineNear * sineFar;
    const rest = Math.atan2(-sine, -cosineOf);
    const turns = turnsNear + march.turns + 1;
    this.residual = Math.PI * (turns - n) + rest;
    this.below = rest > 0 ? turns : turns - 1;
    this.slope =
      2 * omega * scale * (massNear / squareNear + march.mass / squareFar) +
      scaleSlope * ((uNear * gNear) / squareNear + (march.u * march.g) / squareFar);

    this.noise =
      ROUNDING *
      (scale * (errorNear / squareNear + march.error / squareFar) +
        (Math.abs(sineNear * march.g) + Math.abs(gNear * sineFar)) / Math.sqrt(squareNear * squareFar));

    // shares of both sides on one scale
    this.liveliest =
      march.bestShare / squareFar > bestNear / squareNear ? march.bestSegment : bestSegmentNear;
  }
}

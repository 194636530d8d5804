import type { WaveMember } from '../members/wave-member.ts';
import { cosine, meanSquareBetween, sinc, sineSquareMean } from '../numerics/wave-functions.ts';

/** Vectors are rescaled beyond this magnitude so that squares never overflow or vanish. */
const LARGE = 1e70;
const SMALL = 1e-70;

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
 * is continuous and increasing in ω, and ω_n solves Φ = n π (Sturm oscillation; the count is the
 * one of W. H. Wittrick and F. W. Williams, "A general algorithm for computing natural frequencies
 * of elastic structures", Q. J. Mech. Appl. Math. 24, 1971). Its derivative is closed form, the
 * mass of the trial shape over its amplitude at the joint:
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
  /** Number of sweeps made so far. */
  sweeps = 0;
  /** Φ − n π of the last sweep, rad. */
  residual = 0;
  /** dΦ/dω of the last sweep, s. */
  slope = 0;
  /** Number of natural frequencies strictly below the last trial ω. */
  below = 0;
  /** Bound on the rounding error of the last residual, rad (first order, see {@link cross}). */
  noise = 0;
  /** Segment of the last sweep that carries most of the trial shape's inertia. */
  liveliest = 0;

  private turns = 0;
  private u = 0;
  private g = 0;
  private mass = 0;
  private error = 0;
  private bestShare = 0;
  private bestSegment = 0;

  constructor(member: WaveMember) {
    this.member = member;
  }

  /**
   * Sweeps at ω (rad/s, ≥ 0), joining in segment `joint`, and leaves residual against n π, slope,
   * count and the liveliest segment in the fields.
   */
  sweep(omega: number, n: number, joint: number): void {
    const { member } = this;
    const last = member.segmentCount - 1;
    const lambda = omega * omega;
    this.sweeps++;

    // from the near end through the joining segment
    this.start(member.nearFixed, member.spring[0] - lambda * member.mass[0], member.mass[0]);
    for (let i = 0; i <= joint; i++) {
      this.cross(i, lambda, omega);
      if (i < joint) this.lump(i + 1, lambda);
    }
    const turnsNear = this.turns;
    const uNear = this.u;
    const gNear = this.g;
    const massNear = this.mass;
    const errorNear = this.error;
    let best = this.bestShare;
    let liveliest = this.bestSegment;

    // from the far end up to the same node, its lump included
    const end = last + 1;
    this.start(member.farFixed, member.spring[end] - lambda * member.mass[end], member.mass[end]);
    for (let i = last; i > joint; i--) {
      this.cross(i, lambda, omega);
      this.lump(i, lambda);
    }

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
    const sineFar = scale * this.u;
    const squareNear = sineNear * sineNear + gNear * gNear;
    const squareFar = sineFar * sineFar + this.g * this.g;
    const sine = sineNear * this.g + gNear * sineFar;
    const cosineOf = gNear * this.g - sineNear * sineFar;
    const rest = Math.atan2(-sine, -cosineOf);
    const turns = turnsNear + this.turns + 1;
    this.residual = Math.PI * (turns - n) + rest;
    this.below = rest > 0 ? turns : turns - 1;
    this.slope =
      2 * omega * scale * (massNear / squareNear + this.mass / squareFar) +
      scaleSlope * ((uNear * gNear) / squareNear + (this.u * this.g) / squareFar);

    this.noise =
      ROUNDING *
      (scale * (errorNear / squareNear + this.error / squareFar) +
        (Math.abs(sineNear * this.g) + Math.abs(gNear * sineFar)) / Math.sqrt(squareNear * squareFar));

    // shares of both sides on one scale
    best /= squareNear;
    const bestFar = this.bestShare / squareFar;
    if (bestFar > best) liveliest = this.bestSegment;
    this.liveliest = liveliest;
  }

  private start(fixed: boolean, flux: number, mass: number): void {
    this.turns = 0;
    this.error = 0;
    this.bestShare = -1;
    this.bestSegment = 0;
    if (fixed) {
      this.u = 0;
      this.g = 1;
      this.mass = 0;
    } else {
      this.u = 1;
      this.g = flux;
      this.mass = mass;
    }
  }

  /** Passes the lump of an inner node: u stays, the flux jumps by (K − λ M) u. */
  private lump(node: number, lambda: number): void {
    const mass = this.member.mass[node];
    const spring = this.member.spring[node];
    if (mass === 0 && spring === 0) return;
    const inertia = mass * this.u * this.u;
    this.error += (spring * this.u + Math.abs(this.g)) * this.u + lambda * inertia;
    this.g += (spring - lambda * mass) * this.u;
    this.mass += inertia;
  }

  /** Crosses segment i in the sweep's direction, counts the half turns and adds its inertia. */
  private cross(i: number, lambda: number, omega: number): void {
    const { member } = this;
    const k = member.stiffness[i];
    const l = member.length[i];
    const rho = member.inertia[i];
    const s = member.foundation[i];
    const density = s === 0 ? lambda * rho : lambda * rho - s;
    const flexibility = l / k;
    const square = density * l * flexibility;
    const u = this.u;
    const g = this.g;
    const e = flexibility * g;
    let c: number;
    let sn: number;
    let inertia: number;
    if (square > 1e-8) {
      const a = s === 0 ? omega * l * Math.sqrt(rho / k) : Math.sqrt(square);
      const halfTurns = Math.round(a / Math.PI);
      c = Math.cos(a);
      sn = Math.sin(a) / a;
      const mean = square > 0.25 ? (1 - c * sn) / (2 * square) : sineSquareMean(square, c, sn);
      inertia = 0.5 * u * u * (1 + c * sn) + u * e * sn * sn + e * e * mean;
      if (halfTurns & 1) {
        c = -c;
        sn = -sn;
      }
      this.turns += halfTurns;
    } else if (square > -1) {
      // short or static stretch, a² a little above 0 included
      c = cosine(square);
      sn = sinc(square);
      inertia = 0.5 * u * u * (1 + c * sn) + u * e * sn * sn + e * e * sineSquareMean(square, c, sn);
    } else {
      this.decay(i, Math.sqrt(-square));
      return;
    }
    // an angle in (−π/2, 3π/2) from here on: u < 0 tells that a half turn was passed
    const turnA = c * u;
    const turnB = sn * e;
    const turnC = c * g;
    const turnD = density * l * sn * u;
    let next = turnA + turnB;
    let flux = turnC - turnD;
    this.error +=
      (Math.abs(turnA) + Math.abs(turnB)) * Math.abs(flux) + (Math.abs(turnC) + Math.abs(turnD)) * Math.abs(next);
    if (next < 0 || (next === 0 && flux < 0)) {
      this.turns += sn < 0 ? -1 : 1;
      next = -next;
      flux = -flux;
    }
    this.u = next;
    this.g = flux;
    this.finish(i, inertia * rho * l);
  }

  /**
   * Crosses an evanescent segment, a = κ l ≥ 1, as a growing and a decaying part, so that the ratio
   * of flux to displacement keeps its digits where the two nearly cancel:
   * κk u = α e^{a} + β e^{−a}, g = α e^{a} − β e^{−a}; everything is divided by e^{a}.
   */
  private decay(i: number, a: number): void {
    const { member } = this;
    const l = member.length[i];
    const impedance = (member.stiffness[i] / l) * a;
    const scaled = impedance * this.u;
    const growing = 0.5 * (scaled + this.g);
    const decaying = 0.5 * (scaled - this.g);
    const shrink = Math.exp(-a);
    const e2 = shrink * shrink;
    let next = (growing + decaying * e2) / impedance;
    let flux = growing - decaying * e2;
    this.mass *= e2;
    this.error *= e2;
    this.bestShare *= e2;
    this.error +=
      2 * Math.abs(next * flux) + (e2 * Math.abs(decaying) * (Math.abs(scaled) + Math.abs(this.g))) / impedance;
    const inertia = meanSquareBetween(this.u * shrink, next, a);
    if (next < 0 || (next === 0 && flux < 0)) {
      this.turns += 1;
      next = -next;
      flux = -flux;
    }
    this.u = next;
    this.g = flux;
    this.finish(i, inertia * member.inertia[i] * l);
  }

  /** Adds a segment's inertia and keeps the vector within range. */
  private finish(i: number, share: number): void {
    this.mass += share;
    if (share > this.bestShare) {
      this.bestShare = share;
      this.bestSegment = i;
    }
    const size = this.u * (this.member.stiffness[i] / this.member.length[i]) + Math.abs(this.g);
    if (size === 0) {
      // a purely decaying vector died out: whatever grows is what a real one would leave
      this.u = 1;
      this.g = this.member.stiffness[i] / this.member.length[i];
    } else if (size > LARGE || size < SMALL) {
      const factor = 1 / size;
      this.u *= factor;
      this.g *= factor;
      this.mass *= factor * factor;
      this.error *= factor * factor;
      this.bestShare *= factor * factor;
    }
  }
}


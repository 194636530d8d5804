import type { WaveMember } from '../members/wave-member.ts';
import { cosine, meanSquareBetween, sinc, sineSquareMean } from '../numerics/wave-functions.ts';

/** Vectors are rescaled beyond this magnitude so that squares never overflow or vanish. */
const LARGE = 1e70;
const SMALL = 1e-70;

/**
 * The solution of the segment equation marched from one end of the member, with the half turns of its
 * Prüfer angle counted: u = A sin θ / S, g = A cos θ for any positive scale S.
 *
 * Half turns are integers and the rest is the vector (u ≥ 0, g), never an angle, so small phases
 * keep their relative precision. Beside it the march gathers the inertia ∫ρu² + ΣMu², a first-order
 * bound on the rounding error of the vector, and the segment that moved most.
 */
export class PhaseMarch {
  /** Half turns completed. */
  turns = 0;
  /** Displacement, not negative, and flux in the direction of the march. */
  u = 0;
  g = 0;
  /** ∫ρu² + ΣMu² so far, on the scale of the vector. */
  mass = 0;
  /** Σ of |δu g| + |u δg| in units of rounding, on the same scale. */
  error = 0;
  /** Largest inertia of one segment so far, and that segment. */
  bestShare = 0;
  bestSegment = 0;
  private readonly member: WaveMember;

  constructor(member: WaveMember) {
    this.member = member;
  }

  /** Begins at an end: held, or free with the flux of its lump for unit displacement. */
  start(fixed: boolean, flux: number, mass: number): void {
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
  lump(node: number, lambda: number): void {
    const mass = this.member.mass[node];
    const spring = this.member.spring[node];
    if (mass === 0 && spring === 0) return;
    const inertia = mass * this.u * this.u;
    this.error += (spring * this.u + Math.abs(this.g)) * this.u + lambda * inertia;
    this.g += (spring - lambda * mass) * this.u;
    this.mass += inertia;
  }

  /** Crosses segment i in the sweep's direction, counts the half turns and adds its inertia. */
  cross(i: number, lambda: number, omega: number): void {
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
      (Math.abs(turnA) + Math.abs(turnB)) * Math.abs(flux) +
      (Math.abs(turnC) + Math.abs(turnD)) * Math.abs(next);
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
      2 * Math.abs(next * flux) +
      (e2 * Math.abs(decaying) * (Math.abs(scaled) + Math.abs(this.g))) / impedance;
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

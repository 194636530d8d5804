import type { WaveMember } from '../members/wave-member.ts';
import { cosine, meanSquare, meanSquareBetween, sinc } from '../numerics/wave-functions.ts';

/** Numbers held a segment: u and p at its near end, u and p at its far end. */
export const ENDS = 4;

/** From this decay κ l on, a segment's shape is held by its two end values, not by (u, p) at one end. */
const STRONG_DECAY = 1;

/** A mode shape with unit modal mass. */
export interface ModeShape {
  /** ω², 1/s². */
  readonly lambda: number;
  /** φ and p = k φ′ at both ends of each segment, shape [segments × 4]: u near, p near, u far, p far. */
  readonly ends: Float64Array;
  /**
   * How far the two marched sides miss each other at the joint: the amplitude that the missing force
   * would drive in a mode living in the joining segment, relative to this one, |Δp|/(ω² √(ρ l)).
   */
  readonly mismatch: number;
}

/** κ² = (ω² ρ − s)/k of segment i, 1/m²; negative where the shape is evanescent. */
export function waveNumberSquare(member: WaveMember, i: number, lambda: number): number {
  return (lambda * member.inertia[i] - member.foundation[i]) / member.stiffness[i];
}

/**
 * The shape at a natural frequency, marched exactly from both ends and joined in segment `joint`
 * on (φ, p) together; normalised to unit modal mass ∫ρφ² + ΣMφ² = 1, with φ(0) > 0, or φ′(0⁺) > 0
 * at a fixed near end.
 *
 * Accuracy: about 2⁻⁵² times the number of segments when the joint is where the mode is large and
 * no other frequency is closer than 1e-8 relative. Cost: O(segments).
 */
export function shapeAt(member: WaveMember, omega: number, joint: number): ModeShape {
  const n = member.segmentCount;
  const lambda = omega * omega;
  const ends = new Float64Array(ENDS * n);
  const nearLog = new Float64Array(n);
  const farLog = new Float64Array(n);
  const flow = { u: 0, g: 1, log: 0 };

  start(flow, member.nearFixed, member.spring[0] - lambda * member.mass[0]);
  for (let i = 0; i <= joint; i++) {
    ends[ENDS * i] = flow.u;
    ends[ENDS * i + 1] = flow.g;
    nearLog[i] = flow.log;
    cross(member, i, omega, flow);
    ends[ENDS * i + 2] = flow.u;
    ends[ENDS * i + 3] = flow.g;
    farLog[i] = flow.log;
    if (i < joint) {
      flow.g += (member.spring[i + 1] - lambda * member.mass[i + 1]) * flow.u;
    }
  }
  const uNear = flow.u;
  const pNear = flow.g;
  const jointLog = flow.log;

  start(flow, member.farFixed, member.spring[n] - lambda * member.mass[n]);
  flow.log = 0;
  for (let i = n - 1; i > joint; i--) {
    ends[ENDS * i + 2] = flow.u;
    ends[ENDS * i + 3] = -flow.g;
    farLog[i] = flow.log;
    cross(member, i, omega, flow);
    ends[ENDS * i] = flow.u;
    ends[ENDS * i + 1] = -flow.g;
    nearLog[i] = flow.log;
    flow.g += (member.spring[i] - lambda * member.mass[i]) * flow.u;
  }
  const uFar = flow.u;
  const pFar = -flow.g;

  const k2 = waveNumberSquare(member, joint, lambda);
  const scale = member.stiffness[joint] * Math.max(Math.sqrt(Math.abs(k2)), 0.01 / member.length[joint]);
  const factor =
    (scale * uNear * (scale * uFar) + pNear * pFar) / (scale * uFar * (scale * uFar) + pFar * pFar);
  for (let i = 0; i < n; i++) {
    const side = i <= joint ? 1 : factor;
    const base = i <= joint ? jointLog : flow.log;
    const near = side * Math.exp(nearLog[i] - base);
    const far = side * Math.exp(farLog[i] - base);
    ends[ENDS * i] *= near;
    ends[ENDS * i + 1] *= near;
    ends[ENDS * i + 2] *= far;
    ends[ENDS * i + 3] *= far;
  }
  if (member.farFixed) ends[ENDS * n - 2] = 0;
  const mass = modalMass(member, lambda, ends);
  const size = 1 / Math.sqrt(mass);
  for (let i = 0; i < ends.length; i++) ends[i] *= size;
  const missing = Math.hypot(scale * (uNear - factor * uFar), pNear - factor * pFar) / Math.sqrt(mass);
  const local = member.inertia[joint] * member.length[joint];
  return { lambda, ends, mismatch: missing / (lambda * Math.sqrt(local > 0 ? local : 1 / size ** 2)) };
}

/** The rigid-body mode: φ = 1/√m, no flux. */
export function rigidShape(member: WaveMember, mass: number): ModeShape {
  const ends = new Float64Array(ENDS * member.segmentCount);
  const height = 1 / Math.sqrt(mass);
  for (let i = 0; i < member.segmentCount; i++) {
    ends[ENDS * i] = height;
    ends[ENDS * i + 2] = height;
  }
  return { lambda: 0, ends, mismatch: 0 };
}

/** ∫ρφ² + ΣMφ² of a shape, kg (shaft: kg·m²). Cost O(segments). */
export function modalMass(member: WaveMember, lambda: number, ends: Float64Array): number {
  let mass = member.nearFixed ? 0 : member.mass[0] * ends[0] * ends[0];
  for (let i = 0; i < member.segmentCount; i++) {
    const u = ends[ENDS * i + 2];
    if (member.inertia[i] > 0) {
      mass += member.inertia[i] * member.length[i] * segmentMeanSquare(member, i, lambda, ends);
    }
    if (i + 1 < member.segmentCount || !member.farFixed) mass += member.mass[i + 1] * u * u;
  }
  return mass;
}

/** (1/l)∫φ² over segment i. */
export function segmentMeanSquare(member: WaveMember, i: number, lambda: number, ends: Float64Array): number {
  const l = member.length[i];
  const square = waveNumberSquare(member, i, lambda) * l * l;
  const u = ends[ENDS * i];
  if (square < -STRONG_DECAY) return meanSquareBetween(u, ends[ENDS * i + 2], Math.sqrt(-square));
  const slope = (ends[ENDS * i + 1] * l) / member.stiffness[i];
  return meanSquare(u, slope, square, cosine(square), sinc(square));
}

/** (1/l)∫p² over segment i, for the strain energy ½ ∫p²/k. */
export function segmentMeanSquareFlux(
  member: WaveMember,
  i: number,
  lambda: number,
  ends: Float64Array,
): number {
  const l = member.length[i];
  const k2 = waveNumberSquare(member, i, lambda);
  const square = k2 * l * l;
  const p = ends[ENDS * i + 1];
  if (square < -STRONG_DECAY) return meanSquareBetween(p, ends[ENDS * i + 3], Math.sqrt(-square));
  const slope = -member.stiffness[i] * k2 * l * ends[ENDS * i];
  return meanSquare(p, slope, square, cosine(square), sinc(square));
}

/**
 * Displacement and flux of a shape at a distance from the near end of segment i, into `out`
 * (φ in 1/√kg, p in N/√kg). Held by both end values where the shape is strongly evanescent.
 */
export function evaluateShape(
  member: WaveMember,
  shape: ModeShape,
  i: number,
  distance: number,
  out: Float64Array,
): void {
  const { ends } = shape;
  const at = ENDS * i;
  const k = member.stiffness[i];
  const l = member.length[i];
  const k2 = waveNumberSquare(member, i, shape.lambda);
  const u = ends[at];
  const p = ends[at + 1];
  const square = k2 * l * l;
  if (square < -STRONG_DECAY) {
    const kappa = Math.sqrt(-k2);
    const rest = Math.exp(-2 * kappa * l);
    const nearer = Math.exp(-kappa * distance) / (1 - rest);
    const farther = Math.exp(-kappa * (l - distance)) / (1 - rest);
    const fade = Math.exp(-2 * kappa * (l - distance));
    const grow = Math.exp(-2 * kappa * distance);
    const far = ends[at + 2];
    out[0] = u * nearer * (1 - fade) + far * farther * (1 - grow);
    out[1] = k * kappa * (far * farther * (1 + grow) - u * nearer * (1 + fade));
    return;
  }
  const local = k2 * distance * distance;
  const c = cosine(local);
  const s = sinc(local) * distance;
  out[0] = u * c + (p / k) * s;
  out[1] = p * c - k * k2 * u * s;
}

interface Flow {
  u: number;
  g: number;
  log: number;
}

function start(flow: Flow, fixed: boolean, flux: number): void {
  flow.u = fixed ? 0 : 1;
  flow.g = fixed ? 1 : flux;
  flow.log = 0;
}

/** Carries (u, g) through segment i in the direction of the march; the true vector is e^{log} times it. */
function cross(member: WaveMember, i: number, omega: number, flow: Flow): void {
  const k = member.stiffness[i];
  const l = member.length[i];
  const rho = member.inertia[i];
  const s = member.foundation[i];
  const density = omega * omega * rho - s;
  const square = (density * l * l) / k;
  if (square < -STRONG_DECAY) {
    const a = Math.sqrt(-square);
    const impedance = (k / l) * a;
    const growing = 0.5 * (impedance * flow.u + flow.g);
    const decaying = 0.5 * (impedance * flow.u - flow.g);
    const e2 = Math.exp(-2 * a);
    flow.u = (growing + decaying * e2) / impedance;
    flow.g = growing - decaying * e2;
    flow.log += a;
    if (flow.u === 0 && flow.g === 0) {
      flow.u = 1;
      flow.g = impedance;
    }
  } else {
    const a = s === 0 ? omega * l * Math.sqrt(rho / k) : Math.sqrt(Math.abs(square));
    const c = square > 0 ? Math.cos(a) : cosine(square);
    const sn = square > 0.25 ? Math.sin(a) / a : sinc(square);
    const u = flow.u;
    flow.u = c * u + sn * (l / k) * flow.g;
    flow.g = c * flow.g - density * l * sn * u;
  }
  const size = Math.abs(flow.u) * (k / l) + Math.abs(flow.g);
  if (size > 1e70 || size < 1e-70) {
    flow.u /= size;
    flow.g /= size;
    flow.log += Math.log(size);
  }
}

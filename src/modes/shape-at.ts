import type { WaveMember } from '../members/wave-member.ts';
import { cosine, meanSquare, meanSquareBetween, sinc } from '../numerics/wave-functions.ts';
import { ENDS, modalMass, STRONG_DECAY, waveNumberSquare, type ModeShape } from './mode-shape.ts';

/**
 * The shape at a natural frequency, marched exactly from both ends and joined at a node on (φ, p)
 * together; normalised to unit modal mass ∫ρφ² + ΣMφ² = 1, with φ(0) > 0, or φ′(0⁺) > 0 at a fixed near
 * end.
 *
 * A march keeps its digits as long as the shape grows in its direction, so the two meet where the mode
 * is large: at the node around which most of the inertia moves, found from both marches. `node` forces
 * another one.
 *
 * Accuracy: about 2⁻⁵² times the number of segments, where no other frequency is closer than 1e-8
 * relative. Cost: O(segments).
 */
export function shapeAt(member: WaveMember, omega: number, node?: number): ModeShape {
  const marches = new ShapeMarches(member, omega);
  return marches.join(node ?? marches.liveliestNode());
}

/** A state of a march: displacement, flux in its direction, both times e^{log}. */
interface March {
  /** At the end of each segment where the march enters it, and where it leaves it. */
  readonly entry: Float64Array;
  readonly exit: Float64Array;
  /** Inertia of everything passed before each node (its own lump not), on the scale of the vector there. */
  readonly mass: Float64Array;
}

/** How much a poor meeting of the marches counts against a lively node. */
const MISMATCH_WEIGHT = 1e14;

/** Numbers held a state: u, g, log. */
const STATE = 3;

class ShapeMarches {
  private readonly member: WaveMember;
  private readonly lambda: number;
  private readonly near: March;
  private readonly far: March;

  constructor(member: WaveMember, omega: number) {
    this.member = member;
    this.lambda = omega * omega;
    const crossings = Array.from({ length: member.segmentCount }, (_, i) => crossingOf(member, i, omega));
    this.near = this.march(crossings, true);
    this.far = this.march(crossings, false);
  }

  private march(crossings: readonly Crossing[], forward: boolean): March {
    const { member, lambda } = this;
    const n = member.segmentCount;
    const entry = new Float64Array(STATE * n);
    const exit = new Float64Array(STATE * n);
    const mass = new Float64Array(n + 1);
    const fixed = forward ? member.nearFixed : member.farFixed;
    let u = fixed ? 0 : 1;
    let g = fixed ? 1 : 0;
    let log = 0;
    let gathered = 0;
    for (let m = 0; m < n; m++) {
      const i = forward ? m : n - 1 - m;
      const node = forward ? i : i + 1;
      mass[node] = gathered;
      gathered += member.mass[node] * u * u;
      g += (member.spring[node] - lambda * member.mass[node]) * u;
      entry.set([u, g, log], STATE * i);
      const next = cross(member, i, crossings[i], u, g);
      const shrink = Math.exp(-next.growth);
      gathered =
        gathered * shrink * shrink +
        member.inertia[i] *
          member.length[i] *
          passedMeanSquare(member, i, crossings[i], u * shrink, g * shrink, next.u);
      ({ u, g } = next);
      log += next.growth;
      exit.set([u, g, log], STATE * i);
    }
    mass[forward ? n : 0] = gathered;
    return { entry, exit, mass };
  }

  /** Vector of a march arriving at a node, the node's lump not yet passed. */
  private arriving(march: March, node: number, forward: boolean): { u: number; g: number; log: number } {
    const { member } = this;
    const first = forward ? 0 : member.segmentCount;
    if (node === first) {
      const fixed = forward ? member.nearFixed : member.farFixed;
      return { u: fixed ? 0 : 1, g: fixed ? 1 : 0, log: 0 };
    }
    const at = STATE * (forward ? node - 1 : node);
    return { u: march.exit[at], g: march.exit[at + 1], log: march.exit[at + 2] };
  }

  /** The largest impedance of the segments and the lump at a node: what flux a displacement there weighs as. */
  private scaleAt(node: number): number {
    const { member, lambda } = this;
    let scale = member.spring[node] + lambda * member.mass[node];
    let still = 0;
    for (const i of [node - 1, node]) {
      if (i < 0 || i >= member.segmentCount) continue;
      const kappa = Math.sqrt(Math.abs(waveNumberSquare(member, i, lambda)));
      scale = Math.max(scale, member.stiffness[i] * kappa);
      still = Math.max(still, member.stiffness[i] / member.length[i]);
    }
    return scale > 0 ? scale : still;
  }

  /**
   * The node around which the largest share of the joined shape's inertia moves, among those where the
   * two marches meet.
   */
  liveliestNode(): number {
    const { member, lambda } = this;
    const n = member.segmentCount;
    let best = -1;
    let liveliest = 0;
    for (let node = 0; node <= n; node++) {
      const { left, factor, missing } = this.meet(node);
      const lumped = member.mass[node] * left.u * left.u;
      const total = this.near.mass[node] + factor * factor * this.far.mass[node] + lumped;
      const mismatch = missing / (lambda * Math.sqrt(total * this.localMass(node, total)));
      let local = lumped;
      for (const i of [node - 1, node]) {
        if (i < 0 || i >= n || member.inertia[i] === 0) continue;
        const square = waveNumberSquare(member, i, lambda);
        const kappa = Math.sqrt(Math.abs(square));
        const width = Math.min(member.length[i], 1 / (kappa || 1e-300));
        const moving = square > 0 ? left.g / (member.stiffness[i] * kappa) : 0;
        local += 0.5 * member.inertia[i] * width * (left.u * left.u + moving * moving);
      }
      const worth = local / total / (1 + MISMATCH_WEIGHT * mismatch);
      if (worth > best) {
        best = worth;
        liveliest = node;
      }
    }
    return liveliest;
  }

  /** Both marches at a node, the far one scaled by the factor that brings (φ, p) closest together. */
  private meet(node: number): {
    left: { u: number; g: number; log: number };
    right: { log: number };
    factor: number;
    missing: number;
  } {
    const { member, lambda } = this;
    const left = this.arriving(this.near, node, true);
    const right = this.arriving(this.far, node, false);
    const scale = this.scaleAt(node);
    // flux on the near side of the node: p there, −g after the lump from the far side
    const flux = -(right.g + (member.spring[node] - lambda * member.mass[node]) * right.u);
    const onU = scale * right.u;
    const factor = (scale * left.u * onU + left.g * flux) / (onU * onU + flux * flux);
    const missing = Math.hypot(scale * (left.u - factor * right.u), left.g - factor * flux);
    return { left, right, factor, missing };
  }

  /** The shape joined at a node. */
  join(node: number): ModeShape {
    const { member, lambda } = this;
    const n = member.segmentCount;
    const { left, right, factor, missing } = this.meet(node);
    const ends = new Float64Array(ENDS * n);
    for (let i = 0; i < n; i++) {
      const forward = i < node;
      const march = forward ? this.near : this.far;
      const base = forward ? left.log : right.log;
      const side = forward ? 1 : factor;
      const sign = forward ? 1 : -1;
      const at = STATE * i;
      const first = side * Math.exp(march.entry[at + 2] - base);
      const last = side * Math.exp(march.exit[at + 2] - base);
      const [near, far] = forward ? [march.entry, march.exit] : [march.exit, march.entry];
      const [onNear, onFar] = forward ? [first, last] : [last, first];
      ends[ENDS * i] = near[at] * onNear;
      ends[ENDS * i + 1] = sign * near[at + 1] * onNear;
      ends[ENDS * i + 2] = far[at] * onFar;
      ends[ENDS * i + 3] = sign * far[at + 1] * onFar;
    }
    this.holdEnds(ends);
    const mass = modalMass(member, lambda, ends);
    const turn = leadsNegative(member, ends) ? -1 : 1;
    const size = turn / Math.sqrt(mass);
    for (let i = 0; i < ends.length; i++) ends[i] *= size;
    return { lambda, ends, mismatch: missing / (lambda * Math.sqrt(mass * this.localMass(node, mass))) };
  }

  /** Exact zeros: displacement of fixed ends, flux of free massless ones. */
  private holdEnds(ends: Float64Array): void {
    const { member } = this;
    const n = member.segmentCount;
    if (member.nearFixed) ends[0] = 0;
    else if (member.mass[0] === 0 && member.spring[0] === 0) ends[1] = 0;
    if (member.farFixed) ends[ENDS * n - 2] = 0;
    else if (member.mass[n] === 0 && member.spring[n] === 0) ends[ENDS * n - 1] = 0;
  }

  private localMass(node: number, whole: number): number {
    const { member } = this;
    let mass = member.mass[node];
    for (const i of [node - 1, node]) {
      if (i >= 0 && i < member.segmentCount) mass = Math.max(mass, member.inertia[i] * member.length[i]);
    }
    return mass > 0 ? mass : whole;
  }
}

function leadsNegative(member: WaveMember, ends: Float64Array): boolean {
  return ends[member.nearFixed ? 1 : 0] < 0;
}

/** Closed-form propagation of one segment: a² = κ²l² with cos a and sin a / a, or a strong decay. */
interface Crossing {
  readonly square: number;
  readonly density: number;
  readonly c: number;
  readonly s: number;
}

function crossingOf(member: WaveMember, i: number, omega: number): Crossing {
  const k = member.stiffness[i];
  const l = member.length[i];
  const rho = member.inertia[i];
  const bedding = member.foundation[i];
  const density = omega * omega * rho - bedding;
  const square = (density * l * l) / k;
  if (square < -STRONG_DECAY) return { square, density, c: 0, s: 0 };
  const a = bedding === 0 ? omega * l * Math.sqrt(rho / k) : Math.sqrt(Math.abs(square));
  const c = square > 0 ? Math.cos(a) : cosine(square);
  const s = square > 0.25 ? Math.sin(a) / a : sinc(square);
  return { square, density, c, s };
}

/** Carries (u, g) over a segment; the true vector is e^{growth} times the result. */
function cross(
  member: WaveMember,
  i: number,
  crossing: Crossing,
  u: number,
  g: number,
): { u: number; g: number; growth: number } {
  const k = member.stiffness[i];
  const l = member.length[i];
  let growth = 0;
  let nextU: number;
  let nextG: number;
  if (crossing.square < -STRONG_DECAY) {
    // growing and decaying part apart, so that the ratio of flux to displacement keeps its digits
    const a = Math.sqrt(-crossing.square);
    const impedance = (k / l) * a;
    const growing = 0.5 * (impedance * u + g);
    const decaying = 0.5 * (impedance * u - g);
    const e2 = Math.exp(-2 * a);
    nextU = (growing + decaying * e2) / impedance;
    nextG = growing - decaying * e2;
    growth = a;
    if (nextU === 0 && nextG === 0) {
      nextU = 1;
      nextG = impedance;
    }
  } else {
    nextU = crossing.c * u + crossing.s * (l / k) * g;
    nextG = crossing.c * g - crossing.density * l * crossing.s * u;
  }
  const size = Math.abs(nextU) * (k / l) + Math.abs(nextG);
  if (size > 1e70 || size < 1e-70) {
    nextU /= size;
    nextG /= size;
    growth += Math.log(size);
  }
  return { u: nextU, g: nextG, growth };
}

/** (1/l)∫u² over a segment just passed, its entry given on the scale of its exit. */
function passedMeanSquare(
  member: WaveMember,
  i: number,
  crossing: Crossing,
  entryU: number,
  entryG: number,
  exitU: number,
): number {
  if (member.inertia[i] === 0) return 0;
  const { square, c, s } = crossing;
  if (square < -STRONG_DECAY) return meanSquareBetween(entryU, exitU, Math.sqrt(-square));
  return meanSquare(entryU, (entryG * member.length[i]) / member.stiffness[i], square, c, s);
}

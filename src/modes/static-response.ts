import type { WaveMember } from '../members/wave-member.ts';
import { cosine, meanSquare, meanSquareBetween, sinc } from '../numerics/wave-functions.ts';

/** Numbers kept a node side: displacement, flux, ∫u and ∫ρu² + ΣMu² gathered, with a common log factor. */
interface Branch {
  readonly u: Float64Array;
  readonly g: Float64Array;
  readonly area: Float64Array;
  readonly mass: Float64Array;
  /** True displacement is e^{log} u; mass gathered goes with e^{2 log}. */
  readonly log: Float64Array;
}

/**
 * Static response of the member with stiffness shifted by σ times the inertia: (k u′)′ = (s + σρ) u,
 * nodes K + σM. Everything marched is positive, so flexibilities keep full relative precision.
 *
 * With u_L, u_R the static solutions that meet the near and the far end conditions and
 * W = u_R p_L − u_L p_R:
 *
 *   G(x,x) = u_L u_R / W,   G(x,z) = u_L(min) u_R(max) / W
 *   H(x)   = [p_L² m_{z>x}(u_R,u_R) + p_R² m_{z<x}(u_L,u_L)] / W²
 *
 * where m_{z<x} and m_{z>x} are the inertia integrals on either side, node masses included; at a
 * node with mass the side of x decides to which of the two the mass belongs.
 * Needs σ > 0 or a restraint. Cost: O(segments) once, O(1) a station.
 */
export class StaticResponse {
  private readonly member: WaveMember;
  private readonly shift: number;
  /** At the near end of each segment, lump of its near node passed. */
  private readonly near: Branch;
  /** At the far end of each segment, lump of its far node passed; flux counted positive (−p). */
  private readonly far: Branch;

  constructor(member: WaveMember, shift = 0) {
    this.member = member;
    this.shift = shift;
    const n = member.segmentCount;
    this.near = branch(n);
    this.far = branch(n);
    const flow = { u: 0, g: 0, area: 0, mass: 0, log: 0 };
    begin(flow, member.nearFixed, this.lump(0), member.mass[0]);
    for (let i = 0; i < n; i++) {
      store(this.near, i, flow);
      this.cross(i, member.length[i], flow);
      this.pass(i + 1, flow);
    }
    begin(flow, member.farFixed, this.lump(n), member.mass[n]);
    for (let i = n - 1; i >= 0; i--) {
      store(this.far, i, flow);
      this.cross(i, member.length[i], flow);
      this.pass(i, flow);
    }
  }

  /** G(x,x), m/N, at a distance from the near end of segment i. */
  flexibility(i: number, distance: number): number {
    const { left, right } = this.meet(i, distance);
    return 1 / (left.g / left.u + right.g / right.u);
  }

  /** H(x) = Σ p_n²/(ω_n²+σ)², kg (shaft: kg·m²), inside segment i; segment ends are the node sides. */
  fluxInertia(i: number, distance: number): number {
    const { left, right } = this.meet(i, distance);
    const wronskian = right.u * left.g + left.u * right.g;
    const a = left.g / wronskian;
    const b = right.g / wronskian;
    return a * a * right.mass + b * b * left.mass;
  }

  /** G(x,z), m/N: displacement at one station under a unit static force at the other. */
  mutualFlexibility(i: number, distance: number, j: number, other: number): number {
    const swap = j < i || (j === i && other < distance);
    const [a, x, b, z] = swap ? [j, other, i, distance] : [i, distance, j, other];
    const first = this.meet(a, x);
    const second = this.meet(b, z);
    const decay = Math.exp(second.right.log - first.right.log);
    const wronskian = first.right.u * first.left.g + first.left.u * first.right.g;
    return (first.left.u / wronskian) * second.right.u * decay;
  }

  /** Flux at a station (segment i, distance) under a unit static force at (j, other). */
  influence(i: number, distance: number, j: number, other: number): number {
    const before = i < j || (i === j && distance <= other);
    const load = this.meet(j, other);
    const wronskian = load.right.u * load.left.g + load.left.u * load.right.g;
    const here = this.meet(i, distance);
    return before
      ? (load.right.u / wronskian) * here.left.g * Math.exp(here.left.log - load.left.log)
      : -(load.left.u / wronskian) * here.right.g * Math.exp(here.right.log - load.right.log);
  }

  /**
   * Flux at a station (segment i, distance) under a unit force a metre from the near end up to (j, other),
   * ∫₀ᶻ I_x(y) dy = −g_R(x) ∫₀ᶻ u_L/W before the station, + g_L(x) ∫ₓᶻ u_R/W beyond it.
   */
  influenceIntegral(i: number, distance: number, j: number, other: number): number {
    const here = this.meet(i, distance);
    const load = this.meet(j, other);
    const wronskian = here.right.u * here.left.g + here.left.u * here.right.g;
    const before = j < i || (j === i && other <= distance);
    const left = before ? load.left.area * Math.exp(load.left.log - here.left.log) : here.left.area;
    if (before) return (-here.right.g / wronskian) * left;
    const right = here.right.area - load.right.area * Math.exp(load.right.log - here.right.log);
    return (here.left.g * right - here.right.g * left) / wronskian;
  }

  /**
   * Static displacement of the nodes when one end is moved by 1 and the other keeps its condition,
   * shape [segments + 1].
   */
  endMotion(end: 'near' | 'far'): Float64Array {
    const n = this.member.segmentCount;
    const nodes = new Float64Array(n + 1);
    const moving = end === 'near' ? recall(this.far, 0) : recall(this.near, n - 1);
    this.cross(end === 'near' ? 0 : n - 1, this.member.length[end === 'near' ? 0 : n - 1], moving);
    for (let i = 0; i < n; i++) {
      if (end === 'near') {
        nodes[i + 1] = (this.far.u[i] / moving.u) * Math.exp(this.far.log[i] - moving.log);
      } else {
        nodes[i] = (this.near.u[i] / moving.u) * Math.exp(this.near.log[i] - moving.log);
      }
    }
    nodes[end === 'near' ? 0 : n] = 1;
    return nodes;
  }

  /** G(x,x) and the share u_R g_L/W of a unit load at x that the near side carries. */
  split(i: number, distance: number): { readonly flexibility: number; readonly nearShare: number } {
    const { left, right } = this.meet(i, distance);
    const wronskian = right.u * left.g + left.u * right.g;
    return { flexibility: (left.u * right.u) / wronskian, nearShare: (right.u * left.g) / wronskian };
  }

  /** u_L(z)/u_L(x) within segment i, z ≤ x; 1 at x = z also where u_L is 0. */
  nearRatio(i: number, z: number, x: number): number {
    if (z === x) return 1;
    const from = recall(this.near, i);
    this.cross(i, z, from);
    const to = recall(this.near, i);
    this.cross(i, x, to);
    return (from.u / to.u) * Math.exp(from.log - to.log);
  }

  /** u_R(z)/u_R(x) within segment i, z ≥ x. */
  farRatio(i: number, z: number, x: number): number {
    if (z === x) return 1;
    const l = this.member.length[i];
    const from = recall(this.far, i);
    this.cross(i, l - z, from);
    const to = recall(this.far, i);
    this.cross(i, l - x, to);
    return (from.u / to.u) * Math.exp(from.log - to.log);
  }

  private meet(i: number, distance: number): { left: Flow; right: Flow } {
    const left = recall(this.near, i);
    this.cross(i, distance, left);
    const right = recall(this.far, i);
    this.cross(i, this.member.length[i] - distance, right);
    return { left, right };
  }

  private lump(node: number): number {
    return this.member.spring[node] + this.shift * this.member.mass[node];
  }

  private pass(node: number, flow: Flow): void {
    flow.g += this.lump(node) * flow.u;
    flow.mass += this.member.mass[node] * flow.u * flow.u;
  }

  /** Carries a branch over a stretch of segment i; all terms are positive. */
  private cross(i: number, stretch: number, flow: Flow): void {
    if (stretch <= 0) return;
    const { member } = this;
    const k = member.stiffness[i];
    const rho = member.inertia[i];
    const bedding = member.foundation[i] + this.shift * rho;
    const square = (bedding * stretch * stretch) / k;
    const e = (stretch / k) * flow.g;
    if (square > 1) {
      const a = Math.sqrt(square);
      const impedance = (k / stretch) * a;
      const e2 = Math.exp(-2 * a);
      const u = flow.u * 0.5 * (1 + e2) + (e / a) * 0.5 * (1 - e2);
      const g = flow.g * 0.5 * (1 + e2) + impedance * flow.u * 0.5 * (1 - e2);
      // ∫u = (u₀ + u₁) tanh(a/2)/a
      flow.area = flow.area * Math.exp(-a) + stretch * (flow.u * Math.exp(-a) + u) * (Math.tanh(0.5 * a) / a);
      flow.mass = flow.mass * e2 + rho * stretch * meanSquareBetween(flow.u * Math.exp(-a), u, a);
      flow.u = u;
      flow.g = g;
      flow.log += a;
    } else {
      const c = cosine(-square);
      const s = sinc(-square);
      flow.mass += rho * stretch * meanSquare(flow.u, e, -square, c, s);
      const g = flow.g * c + bedding * stretch * s * flow.u;
      const u = flow.u * c + e * s;
      const half = 0.5 * Math.sqrt(square);
      flow.area += 0.5 * stretch * (flow.u + u) * (half > 0 ? Math.tanh(half) / half : 1);
      flow.u = u;
      flow.g = g;
    }
    const size = flow.u * (k / member.length[i]) + flow.g;
    if (size > 1e70 || size < 1e-70) {
      flow.u /= size;
      flow.g /= size;
      flow.area /= size;
      flow.mass /= size * size;
      flow.log += Math.log(size);
    }
  }
}

interface Flow {
  u: number;
  g: number;
  area: number;
  mass: number;
  log: number;
}

function begin(flow: Flow, fixed: boolean, flux: number, mass: number): void {
  flow.u = fixed ? 0 : 1;
  flow.g = fixed ? 1 : flux;
  flow.area = 0;
  flow.mass = fixed ? 0 : mass;
  flow.log = 0;
}

function branch(n: number): Branch {
  return {
    u: new Float64Array(n),
    g: new Float64Array(n),
    area: new Float64Array(n),
    mass: new Float64Array(n),
    log: new Float64Array(n),
  };
}

function store(into: Branch, i: number, flow: Flow): void {
  into.u[i] = flow.u;
  into.g[i] = flow.g;
  into.area[i] = flow.area;
  into.mass[i] = flow.mass;
  into.log[i] = flow.log;
}

function recall(from: Branch, i: number): Flow {
  return { u: from.u[i], g: from.g[i], area: from.area[i], mass: from.mass[i], log: from.log[i] };
}

import type { WaveMember } from '../members/wave-member.ts';
import { addProduct } from '../numerics/dense-product.ts';
import { sampleShape, type Stations } from '../modes/stations.ts';
import type { Mode } from '../modes/mode-series.ts';
import { dampingRate } from './modal-damping.ts';
import { freeMotion } from './modal-motion.ts';
import type { ModalStart } from './modal-projection.ts';

/** Fields that are summed over modes; stress is force times a factor. */
export type FieldKind = 'displacement' | 'velocity' | 'acceleration' | 'force';

/** Modes handled at once; also the length of a summation block. */
const BLOCK = 64;

/**
 * Sums the modal series at stations and times: fields[t][x] = Σ φ_n(x) q_n(t), or p_n(x) times
 * q_n + β q_n′ for the force.
 *
 * With a gauge time τ > 0 velocity, acceleration and force are averages over [t₀, t₀ + τ],
 * t₀ = max(0, t − τ/2), exact: (q₁ − q₀)/τ, (q′₁ − q′₀)/τ and −[q′₁ − q′₀ + (α + 2ζω)(q₁ − q₀)]/(ω² τ).
 *
 * Memory: O(64 (stations + times) + stations · times a field). Cost: 2 flops a mode, station, time
 * and field, and two elementary functions a mode and station or time.
 *
 * @param visit called once a mode with φ and p at the stations
 */
export function sampleMotion(
  member: WaveMember,
  modes: readonly { readonly mode: Mode; readonly start: ModalStart }[],
  stations: Stations,
  times: Float64Array,
  kinds: readonly FieldKind[],
  gaugeTime: number,
  visit: (mode: Mode, displacement: Float64Array, flux: Float64Array) => void,
): Map<FieldKind, Float64Array> {
  const columns = stations.segment.length;
  const rows = times.length;
  const fields = new Map(kinds.map((kind) => [kind, new Float64Array(rows * columns)]));
  const displacement = new Float64Array(BLOCK * columns);
  const flux = new Float64Array(BLOCK * columns);
  const tables = new Map(kinds.map((kind) => [kind, new Float64Array(BLOCK * rows)]));
  const clock = new ModalClock(member, times, gaugeTime);

  for (let from = 0; from < modes.length; from += BLOCK) {
    const count = Math.min(BLOCK, modes.length - from);
    for (let m = 0; m < count; m++) {
      const { mode, start } = modes[from + m];
      const u = displacement.subarray(m * columns, (m + 1) * columns);
      const p = flux.subarray(m * columns, (m + 1) * columns);
      sampleShape(member, mode.shape, stations, u, p);
      visit(mode, u, p);
      clock.run(mode, start);
      for (const [kind, table] of tables) clock.fill(kind, table.subarray(m * rows, (m + 1) * rows));
    }
    for (const [kind, table] of tables) {
      const shapes = kind === 'force' ? flux : displacement;
      addProduct(count, table, rows, shapes, columns, fields.get(kind) as Float64Array);
    }
  }
  return fields;
}

/** One modal coordinate at all times, at the instants or at both sides of the gauge window. */
class ModalClock {
  private readonly member: WaveMember;
  private readonly times: Float64Array;
  private readonly gaugeTime: number;
  private readonly begin: Float64Array;
  private readonly end: Float64Array;
  private readonly now: [Float64Array, Float64Array];
  private readonly first: [Float64Array, Float64Array];
  private readonly second: [Float64Array, Float64Array];
  private lambda = 0;
  private rate = 0;

  constructor(member: WaveMember, times: Float64Array, gaugeTime: number) {
    const table = (): [Float64Array, Float64Array] => [
      new Float64Array(times.length),
      new Float64Array(times.length),
    ];
    this.member = member;
    this.times = times;
    this.gaugeTime = gaugeTime;
    this.begin = times.map((t) => Math.max(0, t - 0.5 * gaugeTime));
    this.end = this.begin.map((t) => t + gaugeTime);
    this.now = table();
    this.first = table();
    this.second = table();
  }

  run(mode: Mode, start: ModalStart): void {
    const { omega, order } = mode.frequency;
    this.lambda = mode.shape.lambda;
    this.rate = dampingRate(this.member.damping, order, omega);
    const { position, velocity } = start;
    freeMotion(position, velocity, omega, this.rate, this.times, this.now[0], this.now[1]);
    if (this.gaugeTime > 0) {
      freeMotion(position, velocity, omega, this.rate, this.begin, this.first[0], this.first[1]);
      freeMotion(position, velocity, omega, this.rate, this.end, this.second[0], this.second[1]);
    }
  }

  fill(kind: FieldKind, into: Float64Array): void {
    const [q, v] = this.now;
    const beta = this.member.damping.stiffnessCoefficient;
    if (kind === 'displacement') {
      into.set(q);
    } else if (this.gaugeTime > 0) {
      this.fillAverage(kind, into);
    } else if (kind === 'velocity') {
      into.set(v);
    } else if (kind === 'acceleration') {
      for (let j = 0; j < into.length; j++) into[j] = -this.lambda * q[j] - this.rate * v[j];
    } else if (beta === 0) {
      into.set(q);
    } else {
      for (let j = 0; j < into.length; j++) into[j] = q[j] + beta * v[j];
    }
  }

  private fillAverage(kind: FieldKind, into: Float64Array): void {
    const [q0, v0] = this.first;
    const [q1, v1] = this.second;
    const tau = this.gaugeTime;
    if (kind === 'velocity') {
      for (let j = 0; j < into.length; j++) into[j] = (q1[j] - q0[j]) / tau;
    } else if (kind === 'acceleration') {
      for (let j = 0; j < into.length; j++) into[j] = (v1[j] - v0[j]) / tau;
    } else if (this.lambda === 0) {
      into.fill(0);
    } else {
      const drag = this.rate - this.member.damping.stiffnessCoefficient * this.lambda;
      const factor = -1 / (this.lambda * tau);
      for (let j = 0; j < into.length; j++) {
        into[j] = factor * (v1[j] - v0[j] + drag * (q1[j] - q0[j]));
      }
    }
  }
}

import type { WaveMember } from '../members/wave-member.ts';
import { ShapeSampler, stationSlice } from '../modes/shape-sampler.ts';
import type { Stations } from '../modes/stations.ts';
import { ProductSum } from '../numerics/product-sum.ts';
import type { Mode } from '../modes/mode-series.ts';
import { dampingRate } from './modal-damping.ts';
import type { AppliedLoad } from './applied-loads.ts';
import type { FieldKind } from './field-kind.ts';
import { Instant, type MovedMode, type SampledReach } from './instant.ts';
import { RECORD_LANES } from './record-motion.ts';
import { addStillFields } from './still-fields.ts';

/** Modes handled at once; also the length of a summation block. */
const BLOCK = 64;
/** Stations and times handled at once, so that tables stay small however many there are. */
const TILE = 2048;
/** Times handled at once under loads: a long record is run through once a mode and tile. */
const LOADED_TILE = 16_384;

/**
 * Sums the modal series at stations and times: fields[t][x] = Σ φ_n(x) q_n(t), or p_n(x) times
 * q_n + β q_n′ for the force.
 *
 * With a gauge time τ > 0 velocity, acceleration and force are averages over [t₀, t₀ + τ],
 * t₀ = max(0, t − τ/2), exact: (q₁ − q₀)/τ, (q′₁ − q′₀)/τ and −[q′₁ − q′₀ + (α + 2ζω)(q₁ − q₀)]/(ω² τ).
 *
 * Each entry is summed over blocks of 64 modes in ascending order, whatever the tiling.
 * Memory: about 5 MB beside the fields. Cost: 2 flops a mode, station, time and field, and a few
 * multiplications a mode and station or time.
 *
 * @param visit called once a mode and tile of stations, with φ and p there and the tile's first station
 * @param reaches under loads, filled with how far each mode goes
 */
export function sampleMotion(
  member: WaveMember,
  modes: readonly MovedMode[],
  stations: Stations,
  times: Float64Array,
  kinds: readonly FieldKind[],
  gaugeTime: number,
  visit: (mode: Mode, displacement: Float64Array, flux: Float64Array, first: number) => void,
  loads: readonly AppliedLoad[] = [],
  reaches: SampledReach[] = [],
): Map<FieldKind, Float64Array> {
  const columns = stations.segment.length;
  const fields = new Map(kinds.map((kind) => [kind, new Float64Array(times.length * columns)]));
  const rows = loads.length > 0 ? LOADED_TILE : TILE;
  for (let firstRow = 0; firstRow < times.length; firstRow += rows) {
    const someTimes = times.subarray(firstRow, firstRow + rows);
    const clock = new ModalClock(member, loads, someTimes, gaugeTime);
    for (let firstColumn = 0; firstColumn < columns; firstColumn += TILE) {
      const tile = stationSlice(stations, firstColumn, firstColumn + TILE);
      const look = firstRow === 0 ? visit : null;
      const sums = sumTile(
        member,
        modes,
        tile,
        clock,
        kinds,
        (mode, u, p) => look?.(mode, u, p, firstColumn),
        loads.length > 0 && firstColumn === 0 ? reaches : null,
      );
      for (const kind of kinds) {
        const from = sums.get(kind) as Float64Array;
        const into = fields.get(kind) as Float64Array;
        const width = tile.segment.length;
        if (loads.length > 0) addStillFields(member, loads, tile, someTimes, kind, gaugeTime, from);
        if (width === columns) {
          into.set(from, firstRow * columns);
          continue;
        }
        for (let row = 0; row < someTimes.length; row++) {
          const at = (firstRow + row) * columns + firstColumn;
          into.set(from.subarray(row * width, (row + 1) * width), at);
        }
      }
    }
  }
  return fields;
}

function sumTile(
  member: WaveMember,
  modes: readonly MovedMode[],
  stations: Stations,
  clock: ModalClock,
  kinds: readonly FieldKind[],
  visit: (mode: Mode, displacement: Float64Array, flux: Float64Array) => void,
  reaches: SampledReach[] | null,
): Map<FieldKind, Float64Array> {
  const columns = stations.segment.length;
  const rows = clock.count;
  const block = Math.min(BLOCK, modes.length);
  const sampler = new ShapeSampler(member, stations);
  const displacement = new Float64Array(block * columns);
  const flux = new Float64Array(block * columns);
  const tables = new Map(kinds.map((kind) => [kind, new Float64Array(block * rows)]));
  const products = new Map(kinds.map((kind) => [kind, new ProductSum(rows, columns, block)]));
  for (let from = 0; from < modes.length; from += BLOCK) {
    const count = Math.min(BLOCK, modes.length - from);
    for (let m = 0; m < count; m++) {
      const { mode } = modes[from + m];
      const u = displacement.subarray(m * columns, (m + 1) * columns);
      const p = flux.subarray(m * columns, (m + 1) * columns);
      sampler.sample(mode.shape, u, p);
      visit(mode, u, p);
      if (m % RECORD_LANES === 0) clock.expect(modes.slice(from + m, from + m + RECORD_LANES));
      clock.run(modes[from + m]);
      if (reaches !== null) reaches[from + m] = farther(reaches[from + m], clock.reach());
      for (const [kind, table] of tables) clock.fill(kind, table.subarray(m * rows, (m + 1) * rows));
    }
    for (const [kind, table] of tables) {
      (products.get(kind) as ProductSum).add(count, table, kind === 'force' ? flux : displacement);
    }
  }
  return new Map(kinds.map((kind) => [kind, (products.get(kind) as ProductSum).values()]));
}

function farther(one: SampledReach | undefined, other: SampledReach): SampledReach {
  if (one === undefined) return other;
  return {
    position: Math.max(one.position, other.position),
    velocity: Math.max(one.velocity, other.velocity),
  };
}

/** One modal coordinate at all times, at the instants or at both sides of the gauge window. */
class ModalClock {
  private readonly member: WaveMember;
  /** Number of times. */
  readonly count: number;
  private readonly gaugeTime: number;
  private readonly now: Instant;
  private readonly first: Instant | null;
  private readonly second: Instant | null;
  private lambda = 0;
  private rate = 0;

  constructor(member: WaveMember, loads: readonly AppliedLoad[], times: Float64Array, gaugeTime: number) {
    this.member = member;
    this.count = times.length;
    this.gaugeTime = gaugeTime;
    this.now = new Instant(member, loads, times);
    const begin = times.map((t) => Math.max(0, t - 0.5 * gaugeTime));
    const end = begin.map((t) => t + gaugeTime);
    this.first = gaugeTime > 0 ? new Instant(member, loads, begin) : null;
    this.second = gaugeTime > 0 ? new Instant(member, loads, end) : null;
  }

  /** Names the modes run next. */
  expect(modes: readonly MovedMode[]): void {
    const coordinates = modes.map(({ mode }) => ({ omega: mode.frequency.omega, rate: this.rateOf(mode) }));
    for (const instant of [this.now, this.first, this.second]) instant?.expect(coordinates);
  }

  run(moved: MovedMode): void {
    this.lambda = moved.mode.shape.lambda;
    this.rate = this.rateOf(moved.mode);
    for (const instant of [this.now, this.first, this.second]) instant?.run(moved, this.rate);
  }

  /** How far the mode run last goes. */
  reach(): SampledReach {
    return (this.first ?? this.now).reach(this.lambda);
  }

  private rateOf(mode: Mode): number {
    return dampingRate(this.member.damping, mode.frequency.order, mode.frequency.omega);
  }

  /** q less its quasi-static part F p/ω² (or its rate, acceleration, flux coordinate), or its average. */
  fill(kind: FieldKind, into: Float64Array): void {
    const { q, v, driven } = this.now;
    const { lambda, rate } = this;
    const soft = this.lambda > 0 ? 1 / this.lambda : 0;
    if (kind === 'displacement' || kind === 'relativeDisplacement') {
      for (let j = 0; j < into.length; j++) into[j] = q[j] - soft * driven[j];
    } else if (this.first !== null && this.second !== null) {
      this.fillAverage(kind, this.first, this.second, into);
    } else if (kind === 'velocity') {
      const drivenRate = this.now.drivenRate();
      for (let j = 0; j < into.length; j++) into[j] = v[j] - soft * drivenRate[j];
    } else if (kind === 'acceleration') {
      for (let j = 0; j < into.length; j++) into[j] = driven[j] - lambda * q[j] - rate * v[j];
    } else {
      const beta = this.member.damping.stiffnessCoefficient;
      for (let j = 0; j < into.length; j++) into[j] = q[j] + beta * v[j] - soft * driven[j];
    }
  }

  private fillAverage(kind: FieldKind, first: Instant, second: Instant, into: Float64Array): void {
    const tau = this.gaugeTime;
    const soft = this.lambda > 0 ? 1 / this.lambda : 0;
    if (kind === 'velocity') {
      for (let j = 0; j < into.length; j++) {
        into[j] = (second.q[j] - first.q[j] - soft * (second.driven[j] - first.driven[j])) / tau;
      }
    } else if (kind === 'acceleration') {
      for (let j = 0; j < into.length; j++) into[j] = (second.v[j] - first.v[j]) / tau;
    } else if (this.lambda === 0) {
      into.fill(0);
    } else {
      const drag = this.rate - this.member.damping.stiffnessCoefficient * this.lambda;
      const factor = -soft / tau;
      for (let j = 0; j < into.length; j++) {
        into[j] = factor * (second.v[j] - first.v[j] + drag * (second.q[j] - first.q[j]));
      }
    }
  }
}

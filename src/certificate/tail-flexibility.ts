import type { WaveMember } from '../members/wave-member.ts';
import { InertiaRelief } from '../modes/inertia-relief.ts';
import { masslessStretches } from '../modes/massless-stretches.ts';
import { waveNumberSquare } from '../modes/mode-shape.ts';
import type { Mode } from '../modes/mode-series.ts';
import { StaticResponse } from '../modes/static-response.ts';
import { ShapeSampler } from '../modes/shape-sampler.ts';
import type { Stations } from '../modes/stations.ts';
import { FAULT_MARGIN, shapeRounding } from './rounding.ts';
import { canDriftFreely, totalMass, travelTime } from '../spectrum/spectrum-size.ts';

const EPS = Number.EPSILON;

/**
 * What the modes kept so far leave of the static flexibility at a set of stations:
 *
 *   ΔG(x) = G(x,x) − G_held(x) − Σ φ_n²/ω_n²,   ΔH(x) = H(x) − Σ p_n²/ω_n⁴,
 *
 * known without any later mode. An unrestrained member uses G⊥ and H⊥ (rigid-body mode left out); a
 * nearly unrestrained one also the form shifted by σ, G_σ − Σ φ²/(ω² + σ), in which nothing cancels.
 *
 * The remainder is carried by successive subtraction, so each rounding is relative to what is left;
 * the floor 64·2⁻⁵² G + Σ 2 φ δφ/ω² covers the rounding of G and the errors of the shapes.
 *
 * Cost: O(segments) once, O(stations) a mode.
 */
export class TailFlexibility {
  /** Flexibility of all modes, G − G_held (unrestrained: G⊥), m/N, shape [stations]. */
  readonly whole: Float64Array;
  /** H of all modes (unrestrained: H⊥), kg, shape [stations]. */
  readonly wholeFlux: Float64Array;
  /** Largest H of a station and the two nodes of its segment, kg: the flux that its rounding is of. */
  readonly reachFlux: Float64Array;
  readonly stations: Stations;

  private readonly member: WaveMember;
  private readonly travelTime: number;
  private readonly sampler: ShapeSampler;
  private readonly displacement: Float64Array;
  private readonly flux: Float64Array;
  private readonly rest: Float64Array;
  private readonly restFlux: Float64Array;
  private readonly floor: Float64Array;
  private readonly floorFlux: Float64Array;
  private readonly shift: number;
  private readonly shifted: Float64Array | null;
  private readonly shiftedFloor: Float64Array | null;

  constructor(member: WaveMember, stations: Stations) {
    this.member = member;
    this.stations = stations;
    this.travelTime = travelTime(member);
    this.sampler = new ShapeSampler(member, stations);
    const count = stations.segment.length;
    const drifts = canDriftFreely(member);
    const source = drifts ? new InertiaRelief(member) : new StaticResponse(member);
    const held = new Float64Array(count);
    for (const stretch of masslessStretches(member)) {
      for (let q = 0; q < count; q++) {
        const i = stations.segment[q];
        if (i < stretch.first || i > stretch.last) continue;
        held[q] = stretch.held.flexibility(i - stretch.first, stations.distance[q]);
        if (!Number.isFinite(held[q])) held[q] = 0;
      }
    }
    const at = (f: (i: number, distance: number) => number): Float64Array =>
      Float64Array.from({ length: count }, (_, q) => f(stations.segment[q], stations.distance[q]));
    const all = at((i, d) => source.flexibility(i, d));
    this.whole = all.map((g, q) => Math.max(0, g - held[q]));
    this.wholeFlux = at((i, d) => source.fluxInertia(i, d));
    this.reachFlux = at((i, d) =>
      Math.max(source.fluxInertia(i, 0), source.fluxInertia(i, d), source.fluxInertia(i, member.length[i])),
    );
    this.rest = Float64Array.from(this.whole);
    this.restFlux = Float64Array.from(this.wholeFlux);
    this.floor = all.map((g) => 64 * EPS * g);
    this.floorFlux = this.wholeFlux.map((h) => 64 * EPS * h);
    this.displacement = new Float64Array(count);
    this.flux = new Float64Array(count);

    // nearly free: restrained by something much softer than the member itself is
    const relief = new InertiaRelief(member);
    const own = largest(at((i, d) => relief.flexibility(i, d)));
    const nearlyFree = !drifts && own > 0 && largest(this.whole) > 100 * own;
    this.shift = nearlyFree ? 1 / (own * totalMass(member)) : 0;
    if (nearlyFree) {
      const shiftedResponse = new StaticResponse(member, this.shift);
      const start = at((i, d) => shiftedResponse.flexibility(i, d));
      this.shifted = start.map((g, q) => Math.max(0, g - held[q]));
      this.shiftedFloor = start.map((g) => 64 * EPS * g);
    } else {
      this.shifted = null;
      this.shiftedFloor = null;
    }
  }

  /** Takes one more mode out of the remainder. Cost O(stations), two elementary functions each. */
  add(mode: Mode): void {
    this.sampler.sample(mode.shape, this.displacement, this.flux);
    this.addSampled(mode, this.displacement, this.flux);
  }

  /** The same at the stations from `first` on, with φ and p there already known. */
  addSampled(mode: Mode, displacement: Float64Array, flux: Float64Array, first = 0): void {
    const { member, stations } = this;
    const { lambda } = mode.shape;
    if (lambda === 0) return;
    const error = shapeRounding(mode, this.travelTime, member.segmentCount);
    const soft = 1 / lambda;
    const twice = 2 * error * soft;
    const reduced = lambda / (lambda + this.shift);
    let segment = -1;
    let impedance = 0;
    let admittance = 0;
    for (let m = 0; m < displacement.length; m++) {
      const q = first + m;
      if (stations.segment[q] !== segment) {
        segment = stations.segment[q];
        const square = waveNumberSquare(member, segment, lambda);
        // k|κ| where the shape waves and where it decays; a straight line reaches L/k
        impedance = member.stiffness[segment] * Math.sqrt(Math.abs(square));
        admittance = 1 / Math.max(impedance, member.stiffness[segment] / member.length[segment]);
      }
      const u = Math.abs(displacement[m]);
      const p = Math.abs(flux[m]);
      const square = u * u * soft;
      const slack = twice * u * (u + p * admittance);
      this.rest[q] -= square;
      this.floor[q] += slack;
      const fluxRatio = p * soft;
      this.restFlux[q] -= fluxRatio * fluxRatio;
      this.floorFlux[q] += twice * fluxRatio * (p + impedance * u);
      if (this.shifted && this.shiftedFloor) {
        this.shifted[q] -= square * reduced;
        this.shiftedFloor[q] += slack * reduced;
      }
    }
  }

  /**
   * Bound on ΔG at station q, m/N, given ω_{N+1}² (rad²/s²): the smallest of the valid forms, floor
   * included. With σ the factor 1 + σ/ω_{N+1}² of the energy belongs to it.
   */
  flexibilityTail(q: number, nextLambda: number): number {
    const plain = Math.abs(this.rest[q]) + this.floor[q];
    if (!this.shifted || !this.shiftedFloor) return plain;
    return Math.min(
      plain,
      (1 + this.shift / nextLambda) * (Math.abs(this.shifted[q]) + this.shiftedFloor[q]),
    );
  }

  /** Whether the modes took more of a flexibility than there is, far beyond its floor: a shape must be wrong. */
  overdrawn(): boolean {
    return (
      this.rest.some((rest, q) => rest < -FAULT_MARGIN * this.floor[q]) ||
      this.restFlux.some((rest, q) => rest < -FAULT_MARGIN * this.floorFlux[q])
    );
  }

  /** Bound on ΔH at station q, kg, floor included. */
  fluxTail(q: number): number {
    return Math.abs(this.restFlux[q]) + this.floorFlux[q];
  }
}

function largest(values: Float64Array): number {
  return values.reduce((most, value) => Math.max(most, value), 0);
}

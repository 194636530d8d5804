import type { WaveMember } from '../members/wave-member.ts';
import type { Mode } from '../modes/mode-series.ts';
import { largestFlexibility } from '../modes/largest-flexibility.ts';
import { peakDisplacement } from '../modes/shape-figures.ts';
import type { Stations } from '../modes/stations.ts';
import type { AppliedLoad } from '../motion/applied-loads.ts';
import { historyAmount, VALUES_ONLY, type HistoryMeasures } from '../motion/history-measures.ts';
import { complianceRounding } from '../motion/loaded-static.ts';
import { dampingRate, largestRatioAbove, smallestRatioAbove } from '../motion/modal-damping.ts';
import { NO_LOADS, type LoadTailFactors } from './load-tail-factors.ts';
import { MovingTail } from './moving-tail.ts';
import { TailFlexibility } from './tail-flexibility.ts';

const EPS = Number.EPSILON;

/**
 * What the kept modes leave of the response to loads, after the quasi-static part is taken exactly.
 * With V = variation of the drive p from rest, ω = ω_{N+1} and c/ω = 2ζ + α/ω, a later mode's rest
 * r = q − F p/ω² has ω²|r|/F at most the smallest of
 *
 *   V;   Σ√(Δp² + Δp′²/ω²) + TV(p′)/ω + (c/ω) TV(p);
 *   the same two with e^{−γ(t−s)} in the integrals, over √(1 − ζ²), γ = inf c/2, ζ < 1;
 *   (c/ω) sup|p′|/ω + Σ|Δp| + ∫e^{−γ(t−s)}|dp′|/(ω√(1 − ζ²)), ζ < 1: r + c F p′/ω⁴ moves freely between
 *   the kinks of p, and each kink gives it the motion after a unit impulse;
 *   A (1 + √(r⁴ + (cr/ω)²))/(1 − r²), r = Ω/ω, for a lasting harmonic;
 *
 * each times √(ΔC ΔG), ΔC = C − ΣF²/ω²; and impulses of a support Σ|Δy′| √((m(r,r) − ΣΓ²) ΔG).
 * A load of finite mass norm has also ΔF = ∫f²/ρ − ΣF², which bounds velocity and flux at the instant.
 * Under stiffness-proportional damping only V and the harmonic remain. Loads add up.
 */
export class LoadTails {
  private readonly member: WaveMember;
  private readonly loads: readonly AppliedLoad[];
  private readonly factorsOf: number[][] = [];
  private readonly compliance: Float64Array;
  private readonly complianceFloor: Float64Array;
  private readonly norm: Float64Array;
  private readonly points: TailFlexibility | null;
  private readonly pointOf: Int32Array;
  private readonly moving: (MovingTail | null)[];
  /** Reaches found for the modes left out, and their plain form for the modes kept, by load. */
  private readonly reaches = new Map<number, KnownReach>();
  private readonly swings = new Map<number, { readonly omega: number; readonly swing: number }>();

  constructor(member: WaveMember, loads: readonly AppliedLoad[]) {
    this.member = member;
    this.loads = loads;
    this.compliance = Float64Array.from(loads, (load) => load.still?.compliance ?? 0);
    const flexibility = loads.some((load) => load.cancels) ? largestFlexibility(member, true) : 0;
    this.complianceFloor = Float64Array.from(loads, (load) => complianceRounding(member, load, flexibility));
    this.norm = Float64Array.from(loads, (load) => load.massNorm);
    this.pointOf = new Int32Array(loads.length).fill(-1);
    const segments: number[] = [];
    const distances: number[] = [];
    loads.forEach((load, index) => {
      if (load.point === null) return;
      this.pointOf[index] = segments.length;
      segments.push(load.point.segment);
      distances.push(load.point.distance);
    });
    const stations: Stations = {
      position: new Float64Array(segments.length),
      segment: Int32Array.from(segments),
      distance: Float64Array.from(distances),
    };
    this.points = segments.length > 0 ? new TailFlexibility(member, stations) : null;
    this.moving = loads.map((load) => (load.moving ? new MovingTail(member, load.moving) : null));
  }

  /** F_n of every load for a kept mode, shape [loads]; takes the mode out of the remainders. */
  add(mode: Mode): number[] {
    const { lambda } = mode.shape;
    const factors = this.loads.map((load) => load.modalFactor(mode));
    this.points?.add(mode);
    this.moving.forEach((tail) => tail?.add(mode));
    factors.forEach((factor, index) => {
      this.norm[index] -= factor * factor;
      if (lambda > 0) this.compliance[index] -= (factor * factor) / lambda;
    });
    this.factorsOf.push(factors);
    return factors;
  }

  /**
   * Amplitude √J that a mode can reach under the loads up to the span, for the rounding of its motion.
   */
  amplitudes(mode: Mode, factors: readonly number[], span: number): number {
    const { omega } = mode.frequency;
    if (omega === 0) return 0;
    let amplitude = 0;
    factors.forEach((factor, index) => {
      const load = this.loads[index];
      if (load.moving !== null) {
        const peak = peakDisplacement(this.member, mode.shape) * Math.abs(load.moving.force);
        amplitude += peak * Math.min(span, 1 / omega + span);
        return;
      }
      const measures = load.measures as HistoryMeasures;
      const kicks = measures.weighedKicks(0);
      // F_n itself is known to the rounding of its terms only
      const known = Math.abs(factor) + load.totalForce * peakDisplacement(this.member, mode.shape);
      const reach = Math.min(
        measures.largest + this.swingOf(index, omega, mode.frequency.order - 1),
        harmonicReach(measures, this.member, mode),
        omega * span * measures.largest,
      );
      amplitude += known * (reach / omega + kicks);
    });
    return amplitude;
  }

  /** Factors of all loads together, given ω_{N+1}. */
  factors(nextOmega: number, kept: number, gaugeTime: number, span: number): LoadTailFactors {
    return this.loads.reduce((sum, _, index) => {
      const one = this.factorsOfLoad(index, nextOmega, kept, gaugeTime, span);
      return {
        displacement: sum.displacement + one.displacement,
        still: sum.still + one.still,
        velocity: sum.velocity + one.velocity,
        flux: sum.flux + one.flux,
        gaugeFlux: sum.gaugeFlux + one.gaugeFlux,
        gaugeAcceleration: sum.gaugeAcceleration + one.gaugeAcceleration,
        rmsVelocity: sum.rmsVelocity + one.rmsVelocity,
        rmsFlux: sum.rmsFlux + one.rmsFlux,
        rmsDisplacement: sum.rmsDisplacement + one.rmsDisplacement,
      };
    }, NO_LOADS);
  }

  private factorsOfLoad(
    index: number,
    nextOmega: number,
    kept: number,
    gaugeTime: number,
    span: number,
  ): LoadTailFactors {
    const { damping } = this.member;
    const moving = this.moving[index];
    const ratio = 2 * largestRatioAbove(damping, kept) + damping.massCoefficient / nextOmega;
    const drag = Math.hypot(1, ratio);
    if (moving !== null) return moving.factors(nextOmega, ratio, gaugeTime, span);
    const load = this.loads[index];
    const measures = load.measures as HistoryMeasures;
    const c = Math.sqrt(this.complianceTail(index, nextOmega));
    const f = load.smooth ? Math.sqrt(Math.abs(this.norm[index]) + 64 * EPS * load.massNorm) : Infinity;
    const source = Math.min(c, f / nextOmega);
    const { rest, energy } = this.reachOf(index, nextOmega, kept);
    const gamma = decayRate(this.member, nextOmega, kept);
    const zeta = 0.5 * ratio;
    const fading = zeta < 1 && damping.stiffnessCoefficient === 0;
    const kicks = Math.min(
      measures.weighedKicks(0),
      fading ? measures.weighedKicks(gamma) / Math.sqrt(1 - zeta * zeta) : Infinity,
    );
    const kicked = kicks === 0 ? 0 : kicks * f;
    const quiet = kicks === 0 && load.smooth;
    const oscillation = Math.min(2 * measures.largest, totalVariation(measures));
    const rough = damping.stiffnessCoefficient > 0;
    // an average over a jump of p holds the jump of the quasi-static part too
    const averagedJump =
      gaugeTime > 0
        ? (Math.min(historyAmount(measures).jumps, 2 * measures.largest) * source) / gaugeTime
        : 0;
    return {
      displacement: rest * source + kicked,
      still: measures.largest * source,
      velocity: quiet ? (energy + measures.largestRate / nextOmega) * f + averagedJump : Infinity,
      flux: quiet && !rough ? rest * f : Infinity,
      gaugeFlux:
        gaugeTime > 0
          ? ((2 * drag * energy + ratio * oscillation) * source + (2 * drag + 1) * kicked) / gaugeTime
          : Infinity,
      gaugeAcceleration: quiet && gaugeTime > 0 ? (2 * energy * f) / gaugeTime : Infinity,
      rmsVelocity: (energy + measures.largestRate / nextOmega) * source + kicked,
      rmsFlux: rough ? Infinity : rest * source + kicked,
      rmsDisplacement: (rest * source + kicked) / nextOmega,
    };
  }

  private complianceTail(index: number, nextOmega: number): number {
    const at = this.pointOf[index];
    if (at >= 0 && this.points) return this.points.flexibilityTail(at, nextOmega * nextOmega);
    return Math.abs(this.compliance[index]) + this.complianceFloor[index];
  }

  /** The reach of a load's history, found anew only when ω has grown by an eighth: it falls with ω and N. */
  private reachOf(index: number, omega: number, kept: number): Reach {
    const last = this.reaches.get(index);
    if (last && omega < 1.125 * last.omega && omega >= last.omega && kept > 8) return last.reach;
    const measures = this.loads[index].measures as HistoryMeasures;
    const reach = reachOfHistory(measures, this.member, omega, kept);
    this.reaches.set(index, { omega, reach });
    return reach;
  }

  /** The plainest form of its energy part, for rounding only: found anew when ω has grown fourfold. */
  private swingOf(index: number, omega: number, kept: number): number {
    const last = this.swings.get(index);
    if (last && omega < 4 * last.omega) return last.swing;
    const swing = plainSwing(this.loads[index].measures as HistoryMeasures, this.member, omega, kept);
    this.swings.set(index, { omega, swing });
    return swing;
  }
}

interface KnownReach {
  readonly omega: number;
  readonly reach: Reach;
}

/** ω²|r|/F and the energy norm ω²|(r, q′/ω)|/F of any later mode, at most. */
interface Reach {
  readonly rest: number;
  readonly energy: number;
}

function reachOfHistory(measures: HistoryMeasures, member: WaveMember, omega: number, kept: number): Reach {
  const { damping } = member;
  const total = totalVariation(measures);
  const rough = damping.stiffnessCoefficient > 0;
  const ratio = 2 * largestRatioAbove(damping, kept) + damping.massCoefficient / omega;
  const zeta = 0.5 * ratio;
  let rest = total;
  let energy = total;
  const take = (restReach: number, energyReach: number): void => {
    rest = Math.min(rest, restReach);
    energy = Math.min(energy, energyReach);
  };
  if (!rough) {
    const fully = { onValue: ratio, onSlope: 1 / omega };
    const slopes = { onValue: 0, onSlope: 1 / omega };
    const [slow] = measures.weighed(0, [fully]);
    // jumps of p count whole, beside their slopes: √(Δp² + Δp′²/ω²)
    const jumped = measures.jumps.reduce(
      (sum, jump) =>
        sum + Math.hypot(jump.value, jump.slope / omega) - Math.hypot(ratio * jump.value, jump.slope / omega),
      0,
    );
    const smooth = slow + Math.max(0, jumped);
    take(smooth, smooth + measures.largestRate / omega);
    if (zeta < 1) {
      const gamma = decayRate(member, omega, kept);
      const shrink = 1 / Math.sqrt(1 - zeta * zeta);
      const norm = Math.sqrt((1 + zeta) / (1 - zeta));
      const [plain, weighed, turned] = measures.weighed(gamma, [VALUES_ONLY, fully, slopes]);
      if (gamma > 0) {
        take(plain * shrink, plain * norm);
        const fine = weighed + Math.max(0, jumped);
        take(fine * shrink, fine * norm + measures.largestRate / omega);
      }
      const sudden = measures.jumps.reduce((sum, jump) => sum + jump.value, 0);
      const kinks = (sudden + turned) * shrink;
      const slow = measures.largestRate / omega;
      take(ratio * slow + kinks, (1 + ratio) * slow + kinks * (1 + zeta) * Math.hypot(1, ratio));
    }
  }
  const { harmonic } = measures;
  if (harmonic !== null && harmonic.omega < omega) {
    const r = harmonic.omega / omega;
    const loss = ratio * r + damping.stiffnessCoefficient * harmonic.omega;
    const gain = harmonic.amplitude / (1 - r * r);
    const reach = gain * (1 + Math.hypot(r * r, loss));
    take(reach, reach + gain * r);
  }
  return { rest, energy };
}

/** The energy norm ω²|(r, q′/ω)|/F of any later mode by V or its faded form alone. */
function plainSwing(measures: HistoryMeasures, member: WaveMember, omega: number, kept: number): number {
  const total = totalVariation(measures);
  const { damping } = member;
  const zeta = largestRatioAbove(damping, kept) + (0.5 * damping.massCoefficient) / omega;
  const gamma = decayRate(member, omega, kept);
  if (damping.stiffnessCoefficient > 0 || zeta >= 1 || gamma === 0) return total;
  return Math.min(total, measures.weighed(gamma, [VALUES_ONLY])[0] * Math.sqrt((1 + zeta) / (1 - zeta)));
}

/** ω²|(q, q′/ω)|/F of one mode under a lasting harmonic from rest, at most: twice its steady amplitude. */
function harmonicReach({ harmonic }: HistoryMeasures, member: WaveMember, { frequency }: Mode): number {
  if (harmonic === null) return Number.POSITIVE_INFINITY;
  const r = harmonic.omega / frequency.omega;
  const rate = dampingRate(member.damping, frequency.order, frequency.omega) / frequency.omega;
  return (2 * harmonic.amplitude * Math.max(1, r)) / Math.hypot(1 - r * r, rate * r);
}

function totalVariation(measures: HistoryMeasures): number {
  return historyAmount(measures).whole;
}

/** inf of c_n/2 over the later modes. */
function decayRate(member: WaveMember, omega: number, kept: number): number {
  const { damping } = member;
  return smallestRatioAbove(damping, kept) * omega + 0.5 * damping.massCoefficient;
}

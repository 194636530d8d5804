import type { ModalDamping } from '../members/wave-member.ts';
import { largestRatioAbove } from '../motion/modal-damping.ts';
import type { Quantity } from '../spec/types.ts';
import { NO_LOADS, type LoadTailFactors } from './load-tail-factors.ts';

/** Which kind of statement a bound makes. */
export type BoundKind = 'pointwise' | 'gauge-average' | 'rms';

/** What of a tail bound does not depend on the place. */
export interface TailEnergies {
  /** Bounds on E⁰, E¹, E² of the tail, J s^{−2 level}; infinite where the data are not smooth enough. */
  readonly energy: number;
  readonly first: number;
  readonly second: number;
  /** ω_{N+1}, rad/s. */
  readonly nextOmega: number;
}

/** The error of one quantity as a √ΔG + b √ΔH, a and b in √J s^{−level}. */
export interface TailFactors {
  readonly kind: BoundKind;
  /** Factor of √ΔG(x). */
  readonly onFlexibility: number;
  /** Factor of √ΔH(x). */
  readonly onFluxInertia: number;
  /** Whether a bound of this kind exists. */
  readonly exists: boolean;
  /** √(2E) whose quotient by √m or √∫dx/k bounds the r.m.s. error; infinite where none exists. */
  readonly rmsNumerator: number;
}

/**
 * Bounds of the tail of free motion, from |Σ φ_n q_n| ≤ √(Σ φ_n²/ω_n²) √(Σ ω_n² q_n²) and its kin.
 *
 * - displacement: √(2E ΔG), at every instant, for any damping;
 * - averages over a gauge time τ: velocity (2/τ) times that; flux (2/τ) √(1 + (2ζ + α/ω_{N+1})²) √(2E ΔH);
 *   acceleration (2/τ) √(2E¹ ΔG);
 * - at the instant, for data in the domain of the wave operator: velocity √(2E¹ ΔG), flux √(2E¹ ΔH),
 *   acceleration √(2E² ΔG) times √(1 + (2ζ + α/ω_{N+1})²), or 1 for a release from rest;
 * - else only in the mean square over the member.
 *
 * Under stiffness-proportional damping β the flux is the total k(u_x + β u_xt). For a release from rest
 * its bound takes √(1 + (2ζ + α/ω_{N+1})²); with an initial velocity it needs E² as well.
 *
 * @param loads what loads leave out, added to everything ({@link LoadTails})
 * @param released whether the motion starts from rest (no initial velocity)
 */
export function tailFactors(
  quantity: Quantity,
  tail: TailEnergies,
  damping: ModalDamping,
  kept: number,
  gaugeTime: number,
  released: boolean,
  loads: LoadTailFactors = NO_LOADS,
): TailFactors {
  const zeta = largestRatioAbove(damping, kept);
  const beta = damping.stiffnessCoefficient;
  const drag = Math.hypot(1, 2 * zeta + damping.massCoefficient / tail.nextOmega);
  const e0 = Math.sqrt(2 * tail.energy);
  const e1 = Math.sqrt(2 * tail.first);
  const e2 = Math.sqrt(2 * tail.second);
  const gauge = 2 / gaugeTime;
  switch (quantity) {
    case 'displacement':
    case 'relativeDisplacement': {
      const value = e0 + loads.displacement;
      const exists = Number.isFinite(value);
      return {
        kind: exists ? 'pointwise' : 'rms',
        onFlexibility: exists ? value : 0,
        onFluxInertia: 0,
        exists,
        rmsNumerator: e0 / tail.nextOmega + loads.rmsDisplacement,
      };
    }
    case 'velocity':
      return choose(
        e1 + loads.velocity,
        gaugeTime > 0 ? gauge * (e0 + loads.displacement) : Infinity,
        'flexibility',
        e0 + loads.rmsVelocity,
      );
    case 'acceleration': {
      const factor = released ? 1 : beta > 0 ? Infinity : drag;
      // a load gives every mode an acceleration of its own at once: only averages are bounded
      const loaded = loads === NO_LOADS ? 0 : Infinity;
      return choose(
        times(factor, e2) + loaded,
        gaugeTime > 0 ? gauge * e1 + loads.gaugeAcceleration : Infinity,
        'flexibility',
        times(factor, e1) + loaded,
      );
    }
    case 'force':
    case 'stress': {
      const factor = released && beta > 0 ? drag : 1;
      const pointwise = beta > 0 && !released ? e1 + beta * e2 : factor * e1;
      const rms = beta > 0 && !released ? Infinity : factor * e0;
      return choose(
        pointwise + loads.flux,
        gaugeTime > 0 ? gauge * drag * e0 + loads.gaugeFlux : Infinity,
        'flux',
        rms + loads.rmsFlux,
      );
    }
  }

  function choose(pointwise: number, average: number, on: 'flexibility' | 'flux', rms: number): TailFactors {
    const value = Math.min(pointwise, average);
    const exists = Number.isFinite(value);
    return {
      kind: gaugeTime > 0 ? 'gauge-average' : exists ? 'pointwise' : 'rms',
      onFlexibility: on === 'flexibility' ? value : 0,
      onFluxInertia: on === 'flux' ? value : 0,
      exists,
      rmsNumerator: rms,
    };
  }
}

/** Product in which 0 · ∞ means that no bound is needed. */
function times(factor: number, value: number): number {
  return value === 0 ? 0 : factor * value;
}

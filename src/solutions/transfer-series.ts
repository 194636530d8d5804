import { TailFlexibility } from '../certificate/tail-flexibility.ts';
import type { WaveMember } from '../members/wave-member.ts';
import { ModeSeries, type Mode } from '../modes/mode-series.ts';
import { ShapeSampler } from '../modes/shape-sampler.ts';
import type { Stations } from '../modes/stations.ts';
import { largestRatioAbove, ratioOf } from '../motion/modal-damping.ts';
import {
  add,
  complex,
  divide,
  modulus,
  multiply,
  scale,
  subtract,
  ZERO,
  type Complex,
} from '../numerics/complex.ts';

import { steadyFactors } from '../steady/steady-member.ts';
import { SteadyResponse, type BoundedState, type SteadyState } from '../steady/steady-response.ts';
import { placeOf, stateUnder, type Place } from '../steady/transfer-state.ts';
import { undamped } from '../steady/ratio-damped.ts';
import { InertiaRelief } from '../modes/inertia-relief.ts';
import { movingInertia } from '../modes/participation.ts';
import { canDriftFreely } from '../spectrum/spectrum-size.ts';
import type { TransferInput } from '../spec/types.ts';
import { inputFactor } from './transfer-exact.ts';

/** The modes of a truncated transfer function at the input's and the outputs' places. */
export interface TransferModes {
  readonly modes: readonly Mode[];
  /** φ_n and p_n at the outputs, shape [modes][outputs]. */
  readonly displacement: readonly Float64Array[];
  readonly flux: readonly Float64Array[];
  /** F_n, the input's factor of each mode. */
  readonly factor: Float64Array;
  /** What the modes leave of the flexibilities: outputs first, the input's place last. */
  readonly tails: TailFlexibility;
  /** ω_{N+1}, rad/s; infinite when the member has no more modes. */
  readonly nextOmega: number;
  /** ΔC of the input, bound. */
  readonly inputTail: number;
}

/**
 * Solves the modes of a truncated transfer function.
 *
 * @param stations outputs, then the place of the force (or of the moving end)
 * @param factorOf F_n of the input from φ and p at that last station
 * @param complianceTail bound on ΔC = C_F − ΣF_n²/ω_n² from the tails and what was summed
 */
export function transferModes(
  member: WaveMember,
  stations: Stations,
  count: number,
  factorOf: (mode: Mode, displacement: number, flux: number) => number,
  complianceTail: (tails: TailFlexibility, squares: number, nextLambda: number) => number,
): TransferModes {
  const series = new ModeSeries(member);
  const sampler = new ShapeSampler(member, stations);
  const tails = new TailFlexibility(member, stations);
  const last = stations.segment.length - 1;
  const modes: Mode[] = [];
  const displacement: Float64Array[] = [];
  const flux: Float64Array[] = [];
  const factors: number[] = [];
  let squares = 0;
  let next = series.next();
  while (next !== null && modes.length < count) {
    const u = new Float64Array(last + 1);
    const p = new Float64Array(last + 1);
    sampler.sample(next.shape, u, p);
    tails.addSampled(next, u, p);
    const factor = factorOf(next, u[last], p[last]);
    squares += factor * factor;
    modes.push(next);
    displacement.push(u);
    flux.push(p);
    factors.push(factor);
    next = series.next();
  }
  const nextOmega = next === null ? Number.POSITIVE_INFINITY : next.frequency.lower;
  const nextLambda = nextOmega * nextOmega;
  return {
    modes,
    displacement,
    flux,
    factor: Float64Array.from(factors),
    tails,
    nextOmega,
    inputTail: next === null ? 0 : complianceTail(tails, squares, nextLambda),
  };
}

/** One frequency of a truncated series at one output, for unit force or unit end displacement. */
export interface TruncatedState {
  readonly truncated: SteadyState;
  /** With the static part of the modes left out. */
  readonly corrected: SteadyState;
  /** Bounds of the corrected displacement and flux; infinite where Ω reaches the modes left out. */
  readonly displacementBound: number;
  readonly fluxBound: number;
}

/**
 * The series of N modes with and without its static remainder; s and λ̂ are the complex factors of the
 * damping on stiffness and on ω², D_n = ω_n² s − λ̂ + 2iζ_nω_nΩ, ρ = |λ̂|/ω_{N+1}² < |s|.
 *
 * - force: Σ φF/D, and + (w − Σ φF/ω²)/s. A later mode then errs by at most
 *   (|λ̂| + 2ζω_nΩ)/(ω_n⁴ |s| (|s| − ρ)), which with √(ΔC ΔG) bounds the displacement and, one 1/ω_n
 *   given to F_n, with ω_{N+1} √(ΔC ΔH) the flux;
 * - end motion: Σ φΓ (1 + Ω²/D), and r + Σ φΓ Ω²/D. Later modes: Ω²/(|s| − ρ) times
 *   √(ΔG (m(r,r) − ΣΓ²))/ω_{N+1} and √(ΔH (m(r,r) − ΣΓ²)).
 *
 * @param still static state under the input: w of a unit force (elastic part for an unrestrained
 *   member), r of a unit end motion
 */
export function truncatedState(
  member: WaveMember,
  modes: TransferModes,
  input: 'force' | 'motion',
  output: number,
  omega: number,
  lossFactor: number,
  still: { readonly displacement: number; readonly flux: number },
): TruncatedState {
  const { stiffness, lambda } = steadyFactors(member, omega, lossFactor);
  const square = omega * omega;
  let u: Complex = ZERO;
  let p: Complex = ZERO;
  let staticU = 0;
  let staticP = 0;
  modes.modes.forEach((mode, n) => {
    const { omega: own, order } = mode.frequency;
    const denominator = add(
      subtract(scale(stiffness, mode.shape.lambda), lambda),
      complex(0, 2 * ratioOf(member.damping, order) * own * omega),
    );
    const receptance = divide(complex(input === 'force' ? 1 : square), denominator);
    const phi = modes.factor[n] * modes.displacement[n][output];
    const flux = modes.factor[n] * modes.flux[n][output];
    u = add(u, scale(receptance, phi));
    p = add(p, scale(receptance, flux));
    const weight = input === 'motion' ? 1 : mode.shape.lambda > 0 ? 1 / mode.shape.lambda : 0;
    staticU += weight * phi;
    staticP += weight * flux;
  });
  const total = (displacement: Complex, flux: Complex): SteadyState => ({
    displacement,
    flux: multiply(flux, stiffness),
  });
  const restU = still.displacement - staticU;
  const restP = still.flux - staticP;
  const [onDisplacement, onFlux] = remainder(member, modes, input, omega, stiffness, lambda);
  const nextLambda = modes.nextOmega * modes.nextOmega;
  const source = Math.sqrt(modes.inputTail);
  const bounds = {
    displacementBound: times(
      onDisplacement,
      source * Math.sqrt(modes.tails.flexibilityTail(output, nextLambda)),
    ),
    fluxBound: times(onFlux, source * Math.sqrt(modes.tails.fluxTail(output))),
  };
  if (input === 'motion') {
    return {
      truncated: total(add(u, complex(staticU)), add(p, complex(staticP))),
      corrected: total(add(u, complex(still.displacement)), add(p, complex(still.flux))),
      ...bounds,
    };
  }
  const inverse = divide(complex(1), stiffness);
  return {
    truncated: total(u, p),
    corrected: total(add(u, scale(inverse, restU)), add(p, scale(inverse, restP))),
    ...bounds,
  };
}

/** Factors of √(ΔC ΔG) and √(ΔC ΔH) in the bounds of {@link truncatedState}. */
function remainder(
  member: WaveMember,
  modes: TransferModes,
  input: 'force' | 'motion',
  omega: number,
  stiffness: Complex,
  lambda: Complex,
): [number, number] {
  if (modes.nextOmega === Number.POSITIVE_INFINITY) return [0, 0];
  const next = modes.nextOmega;
  const size = modulus(stiffness);
  const reach = modulus(lambda) / (next * next);
  if (reach >= size) return [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  if (input === 'motion') {
    const factor = (omega * omega) / (size - reach);
    return [factor / next, factor * size];
  }
  // damping terms of both kinds have one sign, so they only add to the modulus of ω²s − Re λ̂
  const rate = 2 * largestRatioAbove(member.damping, modes.modes.length) * omega;
  const share = (modulus(lambda) + rate * next) / (next * next);
  const factor = share / (size * (size - reach));
  return [factor, factor * next * size];
}

function times(a: number, b: number): number {
  return a === 0 || b === 0 ? 0 : a * b;
}

/** States of a truncated series, input scale 1 (unit force or unit end displacement). */
export interface SeriesState {
  readonly truncated: SteadyState;
  readonly corrected: BoundedState;
}

/** The truncated series at (output, Ω). */
export interface SeriesSource {
  readonly modesUsed: number;
  at(output: number, omega: number): SeriesState;
}

/**
 * Prepares the modal series of a transfer function with N modes and its static remainder.
 *
 * Outcrop motion is the end motion of its base, which the half-space turns by the exact factor.
 */
export function seriesSource(
  member: WaveMember,
  input: TransferInput,
  stations: Stations,
  count: number,
  lossFactor: number,
): SeriesSource {
  const force = input.type === 'point-force';
  const load = force ? placeOf(member, input.at) : { segment: 0, distance: 0 };
  const all: Stations = {
    position: Float64Array.from([...stations.position, 0]),
    segment: Int32Array.from([...stations.segment, load.segment]),
    distance: Float64Array.from([...stations.distance, load.distance]),
  };
  const last = stations.segment.length;
  const source = force ? 0 : movingInertia(member, input.end);
  const modes = transferModes(
    member,
    all,
    count,
    (mode) => inputFactor(member, input, mode.shape),
    (tails, squares, nextLambda) =>
      force
        ? tails.flexibilityTail(last, nextLambda)
        : Math.max(0, source - squares) + 64 * Number.EPSILON * source,
  );
  const stills = Array.from(stations.segment, (segment, q) =>
    stillState(member, input, { segment, distance: stations.distance[q] }),
  );
  return {
    modesUsed: modes.modes.length,
    at: (output, omega) => {
      const state = truncatedState(
        member,
        modes,
        force ? 'force' : 'motion',
        output,
        omega,
        lossFactor,
        stills[output],
      );
      if (input.type !== 'outcrop-motion' || omega === 0) {
        return {
          truncated: state.truncated,
          corrected: {
            ...state.corrected,
            displacementError: state.displacementBound,
            fluxError: state.fluxBound,
          },
        };
      }
      const response = new SteadyResponse(member, steadyFactors(member, omega, lossFactor));
      const rock = complex(0, omega * input.impedance);
      const base = divide(rock, add(rock, response.endStiffness(input.end)));
      const turned = (one: SteadyState): SteadyState => ({
        displacement: multiply(base, one.displacement),
        flux: multiply(base, one.flux),
      });
      return {
        truncated: turned(state.truncated),
        corrected: {
          ...turned(state.corrected),
          displacementError: modulus(base) * state.displacementBound,
          fluxError: modulus(base) * state.fluxBound,
        },
      };
    },
  };
}

/** Static state under a unit input; for an unrestrained member under a force its elastic part. */
function stillState(
  member: WaveMember,
  input: TransferInput,
  place: Place,
): { displacement: number; flux: number } {
  if (input.type === 'point-force' && canDriftFreely(member)) {
    const load = placeOf(member, input.at);
    const relief = new InertiaRelief(member);
    return {
      displacement: relief.mutualFlexibility(place.segment, place.distance, load.segment, load.distance),
      flux: relief.influence(place.segment, place.distance, load.segment, load.distance),
    };
  }
  const state = stateUnder(member, input, undamped(member, complex(0)), place, 0);
  return { displacement: state.displacement.re, flux: state.flux.re };
}

import type { WaveMember } from '../members/wave-member.ts';
import { ModeSeries } from '../modes/mode-series.ts';
import { evaluateShape } from '../modes/mode-shape.ts';
import type { Stations } from '../modes/stations.ts';
import { add, complex, scale, subtract, type Complex } from '../numerics/complex.ts';
import type { TransferInput } from '../spec/types.ts';
import { canDriftFreely } from '../spectrum/spectrum-size.ts';
import { LARGEST_CLOSED_RATIO, modalReceptance, RatioDamped, undamped } from '../steady/ratio-damped.ts';
import { steadyFactors } from '../steady/steady-member.ts';
import { SteadyResponse, type BoundedState, type SteadyState } from '../steady/steady-response.ts';
import { resolventOf, stateUnder, type Place } from '../steady/transfer-state.ts';
import { inputFactor, isIdle } from './transfer-input.ts';
import { passesOver } from './transfer-resonance.ts';

/** States at (output, frequency) without a modal series. */
export interface ExactSource {
  /** Whether a bound (of a quadrature) belongs to the states. */
  readonly bounded: boolean;
  /** Modes solved for the states; null where none was. */
  readonly modesUsed: number | null;
  at(output: number, frequency: number): BoundedState;
}

/**
 * The exact steady states for the member's damping, or null where only a modal series remains (ratios
 * above {@link LARGEST_CLOSED_RATIO}, ratios beside drag, a list of ratios that ends in 0).
 *
 * @param steps from `undrivenResonances`, rad/s
 */
export function exactSource(
  member: WaveMember,
  input: TransferInput,
  stations: Stations,
  omegas: Float64Array,
  lossFactor: number,
  steps: Float64Array,
): ExactSource | null {
  const { ratios, massCoefficient } = member.damping;
  const places = Array.from(stations.segment, (segment, q) => ({ segment, distance: stations.distance[q] }));
  if (!ratios.some((ratio) => ratio > 0))
    return closedSource(member, input, places, omegas, lossFactor, steps);
  const last = ratios[ratios.length - 1];
  if (!(last > 0 && last <= LARGEST_CLOSED_RATIO) || massCoefficient > 0) return null;
  return ratioSource(member, input, places, omegas, last);
}

function closedSource(
  member: WaveMember,
  input: TransferInput,
  places: readonly Place[],
  omegas: Float64Array,
  lossFactor: number,
  steps: Float64Array,
): ExactSource {
  const respond = (omega: number): SteadyResponse =>
    new SteadyResponse(member, steadyFactors(member, omega, lossFactor));
  const responses = Array.from(omegas, (omega, j) =>
    steps[j] === 0 ? [respond(omega)] : AROUND.map((offset) => respond(omega + offset * steps[j])),
  );
  return {
    bounded: false,
    modesUsed: null,
    at: (output, frequency) => {
      const states = responses[frequency].map((response) =>
        stateUnder(member, input, response, places[output], omegas[frequency]),
      );
      const { displacement, flux } = states.length === 1 ? states[0] : between(states);
      return { displacement, flux, displacementError: 0, fluxError: 0 };
    },
  };
}

/** Steps at which a state is taken that has 0/0 at the frequency itself, and their weights. */
const AROUND = [-2, -1, 1, 2];
const WEIGHTS = [-1 / 6, 2 / 3, 2 / 3, -1 / 6];

/** The cubic through four states, read in their middle. */
function between(states: readonly SteadyState[]): SteadyState {
  const sum = (part: (state: SteadyState) => Complex): Complex =>
    states.reduce((total, state, j) => add(total, scale(part(state), WEIGHTS[j])), complex(0));
  return { displacement: sum((state) => state.displacement), flux: sum((state) => state.flux) };
}

/** Ratios: all modes with the last ratio in closed form, the first ones put right one by one. */
function ratioSource(
  member: WaveMember,
  input: TransferInput,
  places: readonly Place[],
  omegas: Float64Array,
  last: number,
): ExactSource {
  const moving = omegas.filter((omega) => omega > 0);
  const low = moving.length > 0 ? moving[0] : 1;
  const high = moving.length > 0 ? moving[moving.length - 1] : 1;
  const damped = new RatioDamped(member, last, low, high, canDriftFreely(member));
  const still = undamped(member, complex(0));
  const corrections = firstModes(member, input, places, last);
  const sources = places.map((place) => {
    const state = (response: SteadyResponse): SteadyState => resolventOf(member, input, response, place);
    return { state, nodes: damped.atNodes(state) };
  });
  return {
    bounded: true,
    modesUsed: corrections.length > 0 ? corrections.length : null,
    at: (output, frequency) => {
      const omega = omegas[frequency];
      const place = places[output];
      if (omega === 0) {
        return { ...stateUnder(member, input, still, place, 0), displacementError: 0, fluxError: 0 };
      }
      const sum = damped.at(omega, sources[output].state, sources[output].nodes);
      let { displacement, flux } = sum;
      for (const mode of corrections) {
        if (mode.idle && mode.ratio === 0 && passesOver(mode.omega, omega)) continue;
        const change = subtract(
          modalReceptance(mode.omega, mode.ratio, omega),
          modalReceptance(mode.omega, last, omega),
        );
        displacement = add(displacement, scale(change, mode.displacement[output]));
        flux = add(flux, scale(change, mode.flux[output]));
      }
      if (input.type === 'point-force') {
        return { displacement, flux, displacementError: sum.displacementError, fluxError: sum.fluxError };
      }
      const base = stateUnder(member, input, still, place, 0);
      const square = omega * omega;
      const lift = (from: Complex, by: Complex): Complex => add(from, scale(by, square));
      return {
        displacement: lift(base.displacement, displacement),
        flux: lift(base.flux, flux),
        displacementError: sum.displacementError * square,
        fluxError: sum.fluxError * square,
      };
    },
  };
}

interface FirstMode {
  readonly omega: number;
  readonly ratio: number;
  /** Whether the input does not drive it. */
  readonly idle: boolean;
  /** φ_n F_n and p_n F_n at the outputs. */
  readonly displacement: Float64Array;
  readonly flux: Float64Array;
}

/** The modes whose own ratio differs from the last one given. */
function firstModes(
  member: WaveMember,
  input: TransferInput,
  places: readonly Place[],
  last: number,
): FirstMode[] {
  const { ratios } = member.damping;
  const series = new ModeSeries(member);
  const pair = new Float64Array(2);
  const modes: FirstMode[] = [];
  for (let n = 0; n < ratios.length - 1; n++) {
    const mode = series.next();
    if (mode === null) break;
    if (ratios[n] === last) continue;
    const factor = inputFactor(member, input, mode.shape);
    const displacement = new Float64Array(places.length);
    const flux = new Float64Array(places.length);
    places.forEach((place, q) => {
      evaluateShape(member, mode.shape, place.segment, place.distance, pair);
      displacement[q] = factor * pair[0];
      flux[q] = factor * pair[1];
    });
    const idle = isIdle(member, input, mode.shape, mode.frequency.order, factor);
    modes.push({ omega: mode.frequency.omega, ratio: ratios[n], idle, displacement, flux });
  }
  return modes;
}

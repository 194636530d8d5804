import { fault } from '../faults/fault.ts';
import type { WaveMember } from '../members/wave-member.ts';
import { ModeSeries } from '../modes/mode-series.ts';
import { evaluateShape } from '../modes/mode-shape.ts';
import { participationFactor } from '../modes/participation.ts';
import type { Stations } from '../modes/stations.ts';
import { add, complex, scale, subtract, type Complex } from '../numerics/complex.ts';
import type { TransferInput } from '../spec/types.ts';
import { canDriftFreely } from '../spectrum/spectrum-size.ts';
import { LARGEST_CLOSED_RATIO, modalReceptance, RatioDamped, undamped } from '../steady/ratio-damped.ts';
import { steadyFactors } from '../steady/steady-member.ts';
import { SteadyResponse, type BoundedState, type SteadyState } from '../steady/steady-response.ts';
import { detuningUnder, placeOf, resolventOf, stateUnder, type Place } from '../steady/transfer-state.ts';

/** States at (output, frequency) without a modal series. */
export interface ExactSource {
  /** Whether a bound (of a quadrature) belongs to the states. */
  readonly bounded: boolean;
  at(output: number, frequency: number): BoundedState;
}

/** Units of rounding a segment within which a resonance counts as hit. */
const HIT = 64 * Number.EPSILON;

/**
 * The exact steady states for the member's damping, or null where only a modal series remains (ratios
 * above {@link LARGEST_CLOSED_RATIO}, ratios beside drag, a list of ratios that ends in 0).
 */
export function exactSource(
  member: WaveMember,
  input: TransferInput,
  stations: Stations,
  omegas: Float64Array,
  lossFactor: number,
): ExactSource | null {
  const { ratios, massCoefficient } = member.damping;
  const places = Array.from(stations.segment, (segment, q) => ({ segment, distance: stations.distance[q] }));
  if (!ratios.some((ratio) => ratio > 0)) return closedSource(member, input, places, omegas, lossFactor);
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
): ExactSource {
  const responses = Array.from(omegas, (omega) => {
    const response = new SteadyResponse(member, steadyFactors(member, omega, lossFactor));
    if (detuningUnder(member, input, response) < HIT * (member.segmentCount + 2)) {
      throw fault('resonance-hit', '/frequencies', { frequency: omega / (2 * Math.PI) });
    }
    return response;
  });
  return {
    bounded: false,
    at: (output, frequency) => ({
      ...stateUnder(member, input, responses[frequency], places[output], omegas[frequency]),
      displacementError: 0,
      fluxError: 0,
    }),
  };
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
    at: (output, frequency) => {
      const omega = omegas[frequency];
      const place = places[output];
      if (omega === 0) {
        if (detuningUnder(member, input, still) < HIT)
          throw fault('resonance-hit', '/frequencies', { frequency: 0 });
        return { ...stateUnder(member, input, still, place, 0), displacementError: 0, fluxError: 0 };
      }
      const sum = damped.at(omega, sources[output].state, sources[output].nodes);
      let { displacement, flux } = sum;
      for (const mode of corrections) {
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
    modes.push({ omega: mode.frequency.omega, ratio: ratios[n], displacement, flux });
  }
  return modes;
}

/** F_n of the input: φ_n at the force, Γ_n of the moving ends. */
export function inputFactor(
  member: WaveMember,
  input: TransferInput,
  shape: Parameters<typeof participationFactor>[1],
): number {
  if (input.type !== 'point-force') return participationFactor(member, shape, input.end);
  const pair = new Float64Array(2);
  const place = placeOf(member, input.at);
  evaluateShape(member, shape, place.segment, place.distance, pair);
  return pair[0];
}

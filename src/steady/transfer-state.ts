import type { WaveMember } from '../members/wave-member.ts';
import { placeStation } from '../modes/stations.ts';
import { add, complex, divide, multiply, scale, subtract, type Complex } from '../numerics/complex.ts';
import type { TransferInput } from '../spec/types.ts';
import type { SteadyResponse, SteadyState } from './steady-response.ts';
import { undamped } from './ratio-damped.ts';

/** A place on the member. */
export interface Place {
  readonly segment: number;
  readonly distance: number;
}

/** Segment and distance of a position; a node counts to its near side. */
export function placeOf(member: WaveMember, at: number): Place {
  const { i, d } = placeStation(member, at);
  return { segment: i, distance: d };
}

/**
 * State at a place under the unit input of a transfer function, displacement inputs for motions (an
 * acceleration input is scaled by the caller).
 *
 * Outcrop motion: the base stands on a half-space of impedance Z = ρV·area whose free surface would
 * move by 1, so its flux is iΩZ (u_b − 1) and u_b = iΩZ/(iΩZ + K), K the member's driving-point
 * stiffness (S. L. Kramer, Geotechnical Earthquake Engineering, 1996, ch. 7, from memory).
 */
export function stateUnder(
  member: WaveMember,
  input: TransferInput,
  response: SteadyResponse,
  place: Place,
  omega: number,
): SteadyState {
  const { segment, distance } = place;
  switch (input.type) {
    case 'point-force': {
      const load = placeOf(member, input.at);
      return response.underForce(segment, distance, load.segment, load.distance);
    }
    case 'end-motion': {
      if (input.end !== 'both') return response.underEndMotion(segment, distance, input.end);
      const near = response.underEndMotion(segment, distance, 'near');
      const far = response.underEndMotion(segment, distance, 'far');
      return {
        displacement: add(near.displacement, far.displacement),
        flux: add(near.flux, far.flux),
      };
    }
    case 'outcrop-motion': {
      const rock: Complex = complex(0, omega * input.impedance);
      // at rest the half-space and the base move together
      const base = omega === 0 ? complex(1) : divide(rock, add(rock, response.endStiffness(input.end)));
      const state = response.underEndMotion(segment, distance, input.end);
      return { displacement: multiply(base, state.displacement), flux: multiply(base, state.flux) };
    }
  }
}

/**
 * The part of the response that is a sum over modes, as a resolvent at complex λ: for a force the
 * whole response Σ φF/(ω_n² − λ), for end motion (U_λ − r)/λ = Σ φΓ/(ω_n² − λ), r the static shape.
 */
export function resolventOf(
  member: WaveMember,
  input: TransferInput,
  response: SteadyResponse,
  place: Place,
): SteadyState {
  const state = stateUnder(member, input, response, place, 0);
  if (input.type === 'point-force') return state;
  const still = stateUnder(member, input, undamped(member, complex(0)), place, 0);
  const { lambda } = response.factors;
  return {
    displacement: divide(subtract(state.displacement, still.displacement), lambda),
    flux: divide(subtract(state.flux, still.flux), lambda),
  };
}

/** A state times a real number. */
export function scaledState(state: SteadyState, factor: number): SteadyState {
  return { displacement: scale(state.displacement, factor), flux: scale(state.flux, factor) };
}

import type { WaveMember } from '../members/wave-member.ts';
import { InertiaRelief } from '../modes/inertia-relief.ts';
import { movingInertia } from '../modes/participation.ts';
import type { Stations } from '../modes/stations.ts';
import { add, complex, divide, modulus, multiply } from '../numerics/complex.ts';
import type { TransferInput } from '../spec/types.ts';
import { canDriftFreely } from '../spectrum/spectrum-size.ts';
import { undamped } from '../steady/ratio-damped.ts';
import { steadyFactors } from '../steady/steady-member.ts';
import { SteadyResponse, type BoundedState, type SteadyState } from '../steady/steady-response.ts';
import { placeOf, stateUnder, type Place } from '../steady/transfer-state.ts';
import { inputFactor, isIdle } from './transfer-input.ts';
import { transferModes, type TransferModes } from './transfer-modes.ts';
import { truncatedState } from './transfer-truncated.ts';

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

/** The first modes at the stations with their factors of the input, and what they leave out. */
export function modesUnder(
  member: WaveMember,
  input: TransferInput,
  stations: Stations,
  count: number,
): TransferModes {
  const force = input.type === 'point-force';
  const load = force ? placeOf(member, input.at) : { segment: 0, distance: 0 };
  const all: Stations = {
    position: Float64Array.from([...stations.position, 0]),
    segment: Int32Array.from([...stations.segment, load.segment]),
    distance: Float64Array.from([...stations.distance, load.distance]),
  };
  const last = stations.segment.length;
  const source = force ? 0 : movingInertia(member, input.end);
  return transferModes(
    member,
    all,
    count,
    (mode) => inputFactor(member, input, mode.shape),
    (mode, factor) => isIdle(member, input, mode.shape, mode.frequency.order, factor),
    (tails, squares, nextLambda) =>
      force
        ? tails.flexibilityTail(last, nextLambda)
        : Math.max(0, source - squares) + 64 * Number.EPSILON * source,
  );
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
  const modes = modesUnder(member, input, stations, count);
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

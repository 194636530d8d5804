import { fault } from '../faults/fault.ts';
import { readMember } from '../members/read-member.ts';
import type { WaveMember } from '../members/wave-member.ts';
import { placeStations } from '../modes/stations.ts';
import { stressFactors } from '../modes/stress-factors.ts';
import { complex, modulus, multiply, scale, type Complex } from '../numerics/complex.ts';
import type {
  Notice,
  TransferFunction,
  TransferFunctionsAnswer,
  TransferFunctionsRequest,
  TransferQuantity,
  TransferSeries,
} from '../spec/types.ts';
import type { BoundedState, SteadyState } from '../steady/steady-response.ts';
import { scaledState } from '../steady/transfer-state.ts';
import { unitOf } from './quantity-units.ts';
import { askedFrequencies, refineFrequencies } from './refine-frequencies.ts';
import { exactSource } from './transfer-exact.ts';
import { seriesSource, type SeriesState } from './transfer-series.ts';

/** Modes taken where no closed form exists (ratios above 0.7, or beside drag). */
const FALLBACK_MODES = 4096;

/**
 * Steady response e^{+iΩt} to a unit input, exact at every frequency: dynamic stiffness in closed form
 * for undamped members, loss factor, Rayleigh damping and uniform drag; for modal damping ratios the
 * sum over all modes by {@link RatioDamped}, or a modal series with a certified bound where that has
 * no room (ζ above 0.7, ratios beside drag).
 *
 * Faults: those of the member, `resonance-hit`, `stress-without-section`, `outcrop-with-ratios`,
 * `too-many-values`. Cost: O(segments + outputs) a frequency; modes only where asked for.
 */
export function solveTransferFunctions(request: TransferFunctionsRequest): TransferFunctionsAnswer {
  const { damping } = request.member;
  const lossFactor = damping?.type === 'loss-factor' ? damping.value : 0;
  const member = readMember(request.member, 'steady');
  if (request.input.type === 'outcrop-motion' && member.damping.ratios.some((ratio) => ratio > 0)) {
    throw fault('outcrop-with-ratios', '/member/damping', {});
  }
  const asked = askedFrequencies(request.frequencies);
  const grid = request.refine
    ? refineFrequencies(member, asked, lossFactor)
    : { frequencies: asked, refined: 0 };
  const omegas = grid.frequencies.map((frequency) => 2 * Math.PI * frequency);
  const stations = placeStations(
    member,
    request.outputs.map((output) => output.at),
  );
  const stress = request.outputs.map((output, index) =>
    output.quantity === 'stress'
      ? stressFactors(member, placeStations(member, [request.outputs[index].at]))[0]
      : 1,
  );

  const exact = exactSource(member, request.input, stations, omegas, lossFactor);
  const wanted = request.series?.modes ?? (exact === null ? FALLBACK_MODES : 0);
  const series = wanted > 0 ? seriesSource(member, request.input, stations, wanted, lossFactor) : null;

  const outputs = request.outputs.map((output, index) => {
    const states: BoundedState[] = [];
    const truncated: SteadyState[] = [];
    const corrected: BoundedState[] = [];
    omegas.forEach((omega, j) => {
      const input = inputScale(request.input, omega);
      const own = series?.at(index, omega) ?? null;
      const state = exact?.at(index, j) ?? (own as SeriesState).corrected;
      states.push(scaled(state, input));
      if (own !== null && request.series) {
        truncated.push(scaledState(own.truncated, input));
        corrected.push(scaled(own.corrected, input));
      }
    });
    const { quantity, at } = output;
    const read = (state: SteadyState, j: number): Complex =>
      valueOf(quantity, state, omegas[j], stress[index]);
    const error = (state: BoundedState, j: number): number =>
      errorOf(quantity, state, omegas[j], stress[index]);
    const values = states.map(read);
    const result: TransferFunction = {
      at,
      quantity,
      unit: transferUnit(quantity, member, request),
      real: Float64Array.from(values, (value) => value.re),
      imaginary: Float64Array.from(values, (value) => value.im),
      magnitude: Float64Array.from(values, modulus),
      phase: Float64Array.from(values, phaseOf),
    };
    if (exact === null || exact.bounded) result.bound = Float64Array.from(states, error);
    if (request.series && series) {
      result.series = seriesOf(
        series.modesUsed,
        truncated.map(read),
        corrected.map(read),
        corrected.map(error),
      );
    }
    return result;
  });

  const largest = outputs.reduce(
    (worst, output) => Array.from(output.bound ?? []).reduce((most, bound) => Math.max(most, bound), worst),
    0,
  );
  return {
    frequencies: grid.frequencies,
    outputs,
    convergence: {
      closedForm: exact !== null && !exact.bounded,
      modesUsed: series === null ? null : series.modesUsed,
      largestBound: largest,
    },
    notices: noticesOf(request, member, grid.refined),
  };
}

/** An acceleration input of 1 is a displacement input of −1/Ω². */
function inputScale(input: TransferFunctionsRequest['input'], omega: number): number {
  return input.type !== 'point-force' && input.quantity === 'acceleration' ? -1 / (omega * omega) : 1;
}

function scaled(state: BoundedState, factor: number): BoundedState {
  return {
    ...scaledState(state, factor),
    displacementError: state.displacementError * Math.abs(factor),
    fluxError: state.fluxError * Math.abs(factor),
  };
}

function valueOf(quantity: TransferQuantity, state: SteadyState, omega: number, stress: number): Complex {
  switch (quantity) {
    case 'displacement':
      return state.displacement;
    case 'velocity':
      return multiply(state.displacement, complex(0, omega));
    case 'acceleration':
      return scale(state.displacement, -omega * omega);
    case 'force':
      return state.flux;
    case 'stress':
      return scale(state.flux, stress);
  }
}

function errorOf(quantity: TransferQuantity, state: BoundedState, omega: number, stress: number): number {
  switch (quantity) {
    case 'displacement':
      return state.displacementError;
    case 'velocity':
      return state.displacementError * omega;
    case 'acceleration':
      return state.displacementError * omega * omega;
    case 'force':
      return state.fluxError;
    case 'stress':
      return state.fluxError * stress;
  }
}

/** Argument in (−π, π]. */
function phaseOf(value: Complex): number {
  const phase = Math.atan2(value.im, value.re);
  return phase === -Math.PI ? Math.PI : phase;
}

function transferUnit(
  quantity: TransferQuantity,
  member: WaveMember,
  request: TransferFunctionsRequest,
): string {
  const shaft = member.kind === 'shaft';
  const { input } = request;
  const per =
    input.type === 'point-force'
      ? shaft
        ? 'N.m'
        : 'N'
      : input.quantity === 'acceleration'
        ? shaft
          ? 'rad/s2'
          : 'm/s2'
        : shaft
          ? 'rad'
          : 'm';
  return `(${unitOf(quantity, member.kind)})/(${per})`;
}

function seriesOf(
  modes: number,
  truncated: readonly Complex[],
  corrected: readonly Complex[],
  bound: readonly number[],
): TransferSeries {
  const parts = (values: readonly Complex[]): TransferSeries['truncated'] => ({
    real: Float64Array.from(values, (value) => value.re),
    imaginary: Float64Array.from(values, (value) => value.im),
  });
  return { modes, truncated: parts(truncated), corrected: parts(corrected), bound: Float64Array.from(bound) };
}

function noticesOf(request: TransferFunctionsRequest, member: WaveMember, refined: number): Notice[] {
  const notices: Notice[] = [];
  const undampedMember =
    request.member.damping === undefined &&
    member.damping.massCoefficient === 0 &&
    request.input.type !== 'outcrop-motion';
  if (request.refine && undampedMember) {
    notices.push({
      code: 'undamped-not-refined',
      detail:
        'The member has no damping, so its peaks are infinite and cannot be resolved; no frequency was added.',
    });
  } else if (request.refine) {
    notices.push({
      code: 'refined',
      detail: `Frequencies were added around ${refined} resonances, so that no peak is missed by more than 1 %.`,
    });
  }
  return notices;
}

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
import { ANSWER_VALUES, FREQUENCY_LIMIT } from './limits.ts';
import { unitOf } from './quantity-units.ts';
import { askedFrequencies, refineFrequencies, type RefinedFrequencies } from './refine-frequencies.ts';
import { exactSource } from './transfer-exact.ts';
import { undrivenResonances } from './transfer-resonance.ts';
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
  const grid = request.refine ? refineFrequencies(member, request.input, asked, lossFactor) : null;
  const frequencies = grid === null ? asked : grid.frequencies;
  const count = request.outputs.length * frequencies.length;
  if (grid !== null && count > ANSWER_VALUES) {
    const what = `${request.outputs.length} outputs × ${frequencies.length} frequencies once refined`;
    throw fault('too-many-values', '/refine', { count, what, limit: ANSWER_VALUES });
  }
  const omegas = frequencies.map((frequency) => 2 * Math.PI * frequency);
  const stations = placeStations(
    member,
    request.outputs.map((output) => output.at),
  );
  const stress = request.outputs.map((output, index) =>
    output.quantity === 'stress'
      ? stressFactors(member, placeStations(member, [request.outputs[index].at]))[0]
      : 1,
  );

  const steps = undrivenResonances(member, request.input, frequencies, lossFactor);
  const exact = exactSource(member, request.input, stations, omegas, lossFactor, steps);
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

  return {
    frequencies,
    outputs,
    convergence: {
      closedForm: exact !== null && !exact.bounded,
      modesUsed: exact === null ? (series?.modesUsed ?? null) : exact.modesUsed,
      largestBound: outputs.reduce((worst, output) => Math.max(worst, relativeBound(output)), 0),
    },
    notices: grid === null ? [] : refinementNotices(grid),
  };
}

/** Largest bound over the largest magnitude; 1 where the output is 0 and its bound is not. */
function relativeBound(output: TransferFunction): number {
  const bound = largestOf(output.bound ?? []);
  const magnitude = largestOf(output.magnitude);
  if (bound === 0) return 0;
  return magnitude === 0 ? 1 : bound / magnitude;
}

function largestOf(values: ArrayLike<number>): number {
  let largest = 0;
  for (let j = 0; j < values.length; j++) largest = Math.max(largest, values[j]);
  return largest;
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
  // none exists from the first frequency left out on
  const known = bound.map((value) => (Number.isFinite(value) ? value : null));
  return { modes, truncated: parts(truncated), corrected: parts(corrected), bound: known };
}

/** What became of the refinement asked for; all peaks are claimed only where all were refined. */
function refinementNotices({ refined, infinite, stoppedAt }: RefinedFrequencies): Notice[] {
  if (stoppedAt !== null) {
    const detail =
      `Frequencies were added around ${refined} resonances up to ${stoppedAt} Hz, where the limit of ` +
      `${FREQUENCY_LIMIT} frequencies was reached; peaks above it may be missed. Ask for a narrower range.`;
    return [{ code: 'refined-in-part', detail }];
  }
  if (infinite > 0 && refined === 0) {
    const detail =
      'The member has no damping, so its peaks are infinite and cannot be resolved; no frequency was added.';
    return [{ code: 'undamped-not-refined', detail }];
  }
  if (infinite > 0) {
    const detail =
      `Frequencies were added around ${refined} resonances; ${infinite} undamped ones have infinite peaks ` +
      'and cannot be resolved.';
    return [{ code: 'refined-in-part', detail }];
  }
  const detail = `Frequencies were added around ${refined} resonances, so that no peak is missed by more than 1 %.`;
  return [{ code: 'refined', detail }];
}

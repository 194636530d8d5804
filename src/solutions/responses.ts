import { certify, loadedPlace } from '../certificate/field-bounds.ts';
import { loadRounding } from '../certificate/load-rounding.ts';
import { measureBetween, reachOfMode } from '../certificate/loaded-reach.ts';
import { checkIndependently } from '../certificate/independent-checks.ts';
import { keepModes } from '../certificate/kept-modes.ts';
import { peakLimit, type PeakBasis } from '../certificate/peak-limits.ts';
import { measureGrid } from '../certificate/sampled-limit.ts';
import { displacementBound, displacementCeiling, shortfallOf } from '../certificate/series-tolerance.ts';
import { TailFlexibility } from '../certificate/tail-flexibility.ts';
import { worstVerdict } from '../certificate/verdict.ts';
import { readMember } from '../members/read-member.ts';
import type { WaveMember } from '../members/wave-member.ts';
import { largestFlexibility } from '../modes/largest-flexibility.ts';
import { evenPositions, placeStations, type Stations } from '../modes/stations.ts';
import { stressFactors } from '../modes/stress-factors.ts';
import { readLoads, type AppliedLoad } from '../motion/applied-loads.ts';
import type { StartedSupport } from '../motion/initial-displacement.ts';
import { readInitialState, type InitialState } from '../motion/initial-state.ts';
import { stillPeak } from '../motion/still-peaks.ts';
import type { FieldKind } from '../motion/field-kind.ts';
import type { SampledReach } from '../motion/instant.ts';
import { sampleMotion } from '../motion/sampled-motion.ts';
import type {
  Field,
  Fields,
  Peak,
  Peaks,
  Quantity,
  ResponsesAnswer,
  ResponsesRequest,
  Times,
} from '../spec/types.ts';
import { HELD_NUMBERS } from './limits.ts';
import { unitOf } from './quantity-units.ts';
import { noticesOf } from './response-notices.ts';

/**
 * Free motion of a member after its initial displacement, velocity and impulses, with a certified
 * bound on every sampled value.
 *
 * The method: exact energies of the data; modes taken until the bound on the displacement meets its
 * tolerance; fields summed at the sampled stations and times; bounds from what the energies and the
 * flexibilities have left; checks that use none of it.
 *
 * Faults: those of the member, of the initial motion, `stress-without-section`, `too-many-values`.
 * Cost: O(modes · (segments + stations + times)) + 2 flops a mode and sampled value.
 */
export function solveResponses(request: ResponsesRequest): ResponsesAnswer {
  return moveMember(request).answer;
}

/** An answer with what it was made of, so that more can be said of the same motion. */
export interface MovedMember {
  readonly answer: ResponsesAnswer;
  readonly basis: PeakBasis;
  readonly stations: Stations;
  /** What the kept modes leave of the flexibilities at the stations. */
  readonly tails: TailFlexibility;
  readonly state: InitialState;
}

/** {@link solveResponses} with what the answer was made of. */
export function moveMember(request: ResponsesRequest): MovedMember {
  const member = readMember(request.member);
  const { quantities, gaugeTime } = request.sample;
  const stations = sampledStations(member, request);
  const times = sampledTimes(request.sample.times);
  const stress = quantities.includes('stress') ? stressFactors(member, stations) : null;
  const span = times.reduce((latest, t) => Math.max(latest, t), 0) + gaugeTime;

  const loads = readLoads(member, request.loads, span);
  const state = readInitialState(member, request.initial, startedSupports(loads, span));
  const flexibility = largestFlexibility(member);
  const wholeFlexibility = loads.length > 0 ? largestFlexibility(member, true) : flexibility;
  const still = stillPeak(member, loads, 'displacement', wholeFlexibility, 0, span);
  const series = keepModes(
    member,
    state,
    'modes' in request.series ? request.series.modes : request.series.maxModes,
    !('modes' in request.series),
    span,
    shortfallOf(request.series, member, flexibility, gaugeTime, state.released, span, still),
    HELD_NUMBERS,
    loads,
    gaugeTime,
  );

  const tails = new TailFlexibility(member, stations);
  const kinds = quantities.map(sampledKind);
  const sampledReaches: SampledReach[] = [];
  const sums = sampleMotion(
    member,
    series.modes,
    stations,
    times,
    [...new Set(kinds)],
    gaugeTime,
    (mode, u, p, first) => tails.addSampled(mode, u, p, first),
    loads,
    sampledReaches,
  );
  const between = measureBetween(loads, times, gaugeTime);

  const basis: PeakBasis = {
    member,
    series,
    flexibility,
    wholeFlexibility,
    loads,
    reaches: series.modes.map((kept, n) => reachOfMode(member, kept, sampledReaches[n], loads, between)),
    grid: measureGrid(member, stations, times),
    gaugeTime,
    released: state.released,
    span,
  };
  const fields: Fields = { positions: stations.position, times };
  const peaks: Peaks = {};
  quantities.forEach((quantity, index) => {
    const factor = quantity === 'stress' ? stress : null;
    const certificate = certify(
      quantity,
      member,
      series,
      tails,
      gaugeTime,
      state.released,
      span,
      factor,
      loads,
      wholeFlexibility,
    );
    const data = scaled(sums.get(kinds[index]) as Float64Array, factor);
    fields[quantity] = {
      unit: unitOf(quantity, member.kind),
      values: rowsOf(data, stations.position.length),
      bound: certificate.bound,
      boundKind: certificate.kind,
      ...(certificate.rms !== null && { rms: certificate.rms }),
      verdict: certificate.verdict,
    };
    const sampled = largestWithBound(data, certificate.bound);
    peaks[quantity] = sampledPeak(data, stations, times, peakLimit(quantity, basis, sampled));
  });

  const total = state.energies[0] + state.rigidEnergy;
  const captured = series.modes.reduce((sum, kept) => sum + kept.start.energy, 0);
  const checks = request.checks ? checkIndependently(member, series.modes, times, total, loads) : null;
  const answer: ResponsesAnswer = {
    coefficients: series.modes.map(({ mode, start }) => ({
      order: mode.frequency.order,
      angularFrequency: mode.frequency.omega,
      cosine: start.position,
      sine: mode.frequency.omega > 0 ? start.velocity / mode.frequency.omega : start.velocity,
      energy: start.energy,
    })),
    fields,
    peaks,
    convergence: {
      verdict: worstVerdict(quantities.map((quantity) => (fields[quantity] as Field).verdict)),
      modesUsed: series.modes.length,
      ...(series.modesNeeded !== null && { modesNeeded: series.modesNeeded }),
      energy: {
        total,
        captured,
        tail: series.tail.energies.energy,
        capturedFraction: total > 0 ? captured / total : 1,
      },
      ceiling: finite(displacementCeiling(series.tail, flexibility, still)),
      displacementBound: finite(
        displacementBound(series.tail, flexibility, span) +
          loadRounding(
            'displacement',
            loads,
            series.modes[0],
            loadedPlace(member, wholeFlexibility, span, gaugeTime),
          ),
      ),
      balance: checks && { maxRelativeDrift: checks.drift },
      orthogonality: checks && checks.orthogonality,
      residual: checks && checks.residual,
      spectrumComplete: true,
    },
    notices: noticesOf(request, member, state, series, loads, times),
  };
  return { answer, basis, stations, tails, state };
}

function sampledStations(member: WaveMember, request: ResponsesRequest): Stations {
  const { positions } = request.sample;
  return placeStations(member, 'count' in positions ? evenPositions(member, positions.count) : positions);
}

function sampledTimes(times: Times): Float64Array {
  if (!('count' in times)) return Float64Array.from(times);
  const { start, end, count } = times;
  return Float64Array.from({ length: count }, (_, j) =>
    j === count - 1 ? end : start + ((end - start) * j) / (count - 1),
  );
}

/** The field whose values give a quantity: stress is force times a factor. */
function sampledKind(quantity: Quantity): FieldKind {
  return quantity === 'stress' ? 'force' : quantity;
}

/** A table times a factor a column. */
function scaled(data: Float64Array, factor: Float64Array | null): Float64Array {
  return factor ? data.map((value, at) => value * factor[at % factor.length]) : data;
}

/** Rows of a table, one a time. */
function rowsOf(data: Float64Array, columns: number): Float64Array[] {
  return Array.from({ length: data.length / columns }, (_, row) =>
    data.subarray(row * columns, (row + 1) * columns),
  );
}

/** Largest |value| + bound of the samples; infinite without a bound. */
function largestWithBound(data: Float64Array, bound: Float64Array | null): number {
  if (bound === null) return Number.POSITIVE_INFINITY;
  let largest = 0;
  for (let at = 0; at < data.length;) {
    for (let q = 0; q < bound.length; q++, at++) {
      const size = Math.abs(data[at]) + bound[q];
      if (size > largest) largest = size;
    }
  }
  return largest;
}

function sampledPeak(
  data: Float64Array,
  stations: Stations,
  times: Float64Array,
  upper: number | null,
): Peak {
  let value = 0;
  let place = 0;
  for (let at = 0; at < data.length; at++) {
    if (Math.abs(data[at]) > Math.abs(value)) {
      value = data[at];
      place = at;
    }
  }
  const columns = stations.position.length;
  return {
    value,
    at: stations.position[place % columns],
    time: times[Math.floor(place / columns)],
    upper,
  };
}

/** A number, or null where none exists. */
function finite(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}

/** Supports that are displaced at t = 0. */
function startedSupports(loads: readonly AppliedLoad[], span: number): StartedSupport[] {
  return loads.flatMap(({ support }) => {
    if (support === null) return [];
    const { position } = support.motion.at(0);
    // the zero of a sine is one only to rounding
    const started = Math.abs(position) > 256 * Number.EPSILON * support.motion.peaks(span).position;
    return started ? [{ pieces: support.shape.pieces, position }] : [];
  });
}

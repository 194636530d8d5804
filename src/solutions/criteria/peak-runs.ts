import type { PeakPlace } from '../../certificate/peak-limits.ts';
import { peakLimit } from '../../certificate/peak-limits.ts';
import { memberLength, layOutNodes } from '../../members/node-layout.ts';
import { evaluateShape } from '../../modes/mode-shape.ts';
import type { Field, Positions, Quantity, ResponsesRequest, Times } from '../../spec/types.ts';
import type { MovedMember } from '../responses.ts';

/** What one run certifies of the peak of a quantity. */
export interface PeakReading {
  /** Largest sampled |value| with its place and time. */
  readonly value: number;
  readonly at: number;
  readonly time: number;
  /** The peak certainly reaches this; 0 where nothing is certain. */
  readonly lower: number;
  /** It certainly does not exceed this; null where no limit exists. */
  readonly upper: number | null;
  /** Largest bound of the samples; null where there is none. */
  readonly bound: number | null;
}

/** Reads a run: over the member, or at its stations alone. */
export function readPeak(run: MovedMember, quantity: Quantity, atStations: boolean): PeakReading {
  const field = run.answer.fields[quantity] as Field;
  const { positions, times } = run.answer.fields;
  let [value, at, time, lower, largest] = [0, positions[0], times[0], 0, 0];
  const reach = new Float64Array(positions.length);
  field.values.forEach((row, j) => {
    for (let q = 0; q < row.length; q++) {
      const size = Math.abs(row[q]);
      if (size > value) [value, at, time] = [size, positions[q], times[j]];
      if (size > reach[q]) reach[q] = size;
      if (field.bound !== null) lower = Math.max(lower, size - field.bound[q]);
    }
  });
  for (const one of field.bound ?? []) largest = Math.max(largest, one);
  const upper = atStations ? limitAtStations(run, quantity, reach) : run.answer.peaks[quantity]!.upper;
  return { value, at, time, lower, upper, bound: field.bound === null ? null : largest };
}

function limitAtStations(run: MovedMember, quantity: Quantity, reach: Float64Array): number | null {
  const { bound } = run.answer.fields[quantity] as Field;
  let largest = 0;
  for (let q = 0; q < reach.length; q++) {
    const sampled = bound === null ? Number.POSITIVE_INFINITY : reach[q] + bound[q];
    const limit = peakLimit(quantity, run.basis, sampled, placeAt(run, q));
    if (limit === null) return null;
    largest = Math.max(largest, limit);
  }
  return largest;
}

/** A station as the only place of a peak. Cost O(modes). */
function placeAt({ basis, stations, tails }: MovedMember, q: number): PeakPlace {
  const { member, series } = basis;
  const segment = stations.segment[q];
  const { nextOmega } = series.tail.energies;
  const pair = new Float64Array(2);
  const [displacement, flux] = [new Float64Array(series.modes.length), new Float64Array(series.modes.length)];
  series.modes.forEach(({ mode }, n) => {
    evaluateShape(member, mode.shape, segment, stations.distance[q], pair);
    displacement[n] = Math.abs(pair[0]);
    flux[n] = Math.abs(pair[1]);
  });
  return {
    flexibility: tails.whole[q],
    fluxInertia: tails.wholeFlux[q],
    tailFlexibility: tails.flexibilityTail(q, nextOmega * nextOmega),
    tailFlux: tails.fluxTail(q),
    stressFactor: member.stressFactor[segment],
    displacementOf: (n) => displacement[n],
    fluxOf: (n) => flux[n],
    single: true,
  };
}

/** What is looked at in a run: where (null: as the request samples), how densely, with how many modes. */
export interface RunPlan {
  readonly at: readonly number[] | null;
  readonly gaugeTime: number;
  readonly quantities: readonly Quantity[];
  /** Times that the spacing of the samples is halved. */
  readonly level: number;
  /** Number of modes; null as the request says. */
  readonly modes: number | null;
}

/** The request of a run. A refined grid holds every node, so that no kink lies between its stations. */
export function requestOf(request: ResponsesRequest, plan: RunPlan): ResponsesRequest {
  const { positions, times } = request.sample;
  return {
    ...request,
    series: plan.modes === null ? request.series : { modes: plan.modes },
    sample: {
      positions: plan.at === null ? densePositions(request, positions, plan.level) : [...plan.at],
      times: plan.level === 0 ? times : denseTimes(times, 2 ** plan.level),
      quantities: [...plan.quantities],
      gaugeTime: plan.gaugeTime,
    },
    checks: false,
  };
}

/** Sampled values of a run, positions × times × quantities. */
export function valuesOf(request: ResponsesRequest): number {
  const { positions, times, quantities } = request.sample;
  return countOf(positions) * countOf(times) * quantities.length;
}

function countOf(grid: Positions | Times): number {
  return Array.isArray(grid) ? grid.length : grid.count;
}

function densePositions(request: ResponsesRequest, positions: Positions, level: number): Positions {
  if (level === 0) return positions;
  const nodes = layOutNodes(request.member).position;
  const parts = Math.max(32, countOf(positions)) * 2 ** level;
  const length = memberLength(request.member);
  const dense: number[] = [nodes[0]];
  for (let i = 1; i < nodes.length; i++) {
    const stretch = nodes[i] - nodes[i - 1];
    const count = Math.max(1, Math.ceil((parts * stretch) / length));
    for (let m = 1; m < count; m++) dense.push(nodes[i - 1] + (stretch * m) / count);
    dense.push(nodes[i]);
  }
  return dense;
}

function denseTimes(times: Times, parts: number): Times {
  if (!Array.isArray(times)) return { ...times, count: (times.count - 1) * parts + 1 };
  return times.flatMap((time, j) =>
    j === 0
      ? [time]
      : Array.from({ length: parts }, (_, m) =>
          m === parts - 1 ? time : times[j - 1] + ((time - times[j - 1]) * (m + 1)) / parts,
        ),
  );
}

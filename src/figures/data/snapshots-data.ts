import type { ResponsesAnswer, ResponsesRequest } from '../../spec/types.ts';
import { countOf, formatAmong } from '../text/format-values.ts';
import { outlineOf } from './member-outline.ts';
import type { Panel, PanelFigure } from './panel-figure.ts';
import { boundInWords, capital, responseInWords } from './quantity-words.ts';
import {
  boundAlong,
  type Choice,
  fieldOf,
  nearestInstants,
  requireSamples,
  snapshotAt,
} from './sampled-field.ts';
import { extentOf, nearest, rangeAround, stepOf } from './value-range.ts';

/** Instants shown where none is asked for. */
const usual = 6;

/**
 * The field along the member at some instants, one panel each, with the band of its bound.
 *
 * @param room panels that the sheet has room for
 *
 * Faults: `figure-needs-samples`, `figure-instant-outside`.
 */
export function snapshotsData(
  request: ResponsesRequest,
  answer: ResponsesAnswer,
  choice: Choice,
  room: number,
): PanelFigure {
  const sampled = fieldOf(request, answer, 'snapshots');
  requireSamples(sampled, 'positions', 'snapshots');
  const { times, positions } = sampled;
  const asked = choice.instants;
  const wanted =
    asked === undefined
      ? usualInstants(request, answer, Math.min(room, usual))
      : nearestInstants(sampled, asked);
  const shown = wanted.slice(0, room);
  const bound = boundAlong(sampled);
  let [least, most] = [0, 0];
  const panels = shown.map((time): Panel => {
    const values = snapshotAt(sampled, time);
    const [low, high] = extentOf(values);
    if (low < 0 || high > 0) {
      least = Math.min(least, extentOf(bound ? values.map((value, i) => value - bound[i]) : values)[0]);
      most = Math.max(most, extentOf(bound ? values.map((value, i) => value + bound[i]) : values)[1]);
    }
    const curve = {
      along: positions,
      values,
      look: 0,
      kind: positions.length > 40 ? 'line' : 'dots',
    } as const;
    return {
      label: `at ${formatAmong(times[time], stepOf(times), 's')}`,
      curves: [{ ...curve, ...(bound && { bound }) }],
    };
  });
  const outline = outlineOf(request.member);
  const note =
    shown.length < wanted.length
      ? [
          `Shown: the first ${shown.length} of ${wanted.length} instants asked for; a larger figure has room for more.`,
        ]
      : asked !== undefined || shown.length === times.length
        ? []
        : [`Shown: ${shown.length} of ${countOf(times.length, 'sampled time')}.`];
  return {
    words: {
      title: `${capital(sampled.word)} along the member`,
      subtitle: responseInWords(request.member, answer),
      notes: [boundInWords(sampled.field, bound, sampled.gaugeTime), ...note],
    },
    along: { name: 'position', unit: 'm', from: 0, to: outline.length },
    value: { name: sampled.name, unit: sampled.unit, ...rangeAround(least, most) },
    panels,
    key: [],
    outline,
  };
}

/**
 * Times evenly spread over half a period of the mode with most energy, in which a free motion shows its
 * course; over the whole sample under loads or where the samples are too far apart for that.
 */
function usualInstants(request: ResponsesRequest, answer: ResponsesAnswer, most: number): number[] {
  const { times } = answer.fields;
  const from = times[0];
  let span = times[times.length - 1] - from;
  if (request.loads.length === 0) {
    const strongest = answer.coefficients.reduce((best, next) => (next.energy > best.energy ? next : best));
    const half = Math.PI / strongest.angularFrequency;
    const inside = nearest(times, from + half);
    if (half < span && inside >= most) span = half;
  }
  const indices = Array.from({ length: most }, (_, i) =>
    nearest(times, from + (most === 1 ? 0 : (span * i) / (most - 1))),
  );
  return [...new Set(indices)];
}

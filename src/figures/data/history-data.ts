import type { ResponsesAnswer, ResponsesRequest } from '../../spec/types.ts';
import { countOf, formatAmong } from '../text/format-values.ts';
import type { View } from '../views.ts';
import type { Panel, PanelFigure } from './panel-figure.ts';
import { boundInWords, capital, responseInWords } from './quantity-words.ts';
import {
  boundAlong,
  type Choice,
  envelopeOf,
  fieldOf,
  historyAt,
  nearestStations,
  requireSamples,
  type SampledField,
} from './sampled-field.ts';
import { extentOf, nearest, rangeAround, stepOf } from './value-range.ts';

/** Stations shown where none is asked for. */
const usual = 3;

/**
 * The field over time at some stations, one panel each, with the band of its bound.
 *
 * @param room panels that the sheet has room for
 *
 * Faults: `figure-quantity-not-sampled`, `figure-needs-samples`, `figure-station-outside`.
 */
export function historyData(
  request: ResponsesRequest,
  answer: ResponsesAnswer,
  choice: Choice,
  room: number,
  view: View,
): PanelFigure {
  const sampled = fieldOf(request, answer, view);
  requireSamples(sampled, 'times', view);
  const asked = choice.stations;
  const wanted =
    asked === undefined ? usualStations(sampled, Math.min(room, usual)) : nearestStations(sampled, asked);
  const shown = wanted.slice(0, room);
  const bound = boundAlong(sampled);
  let [least, most] = [0, 0];
  const panels = shown.map((index): Panel => {
    const values = historyAt(sampled, index);
    const [low, high] = extentOf(values);
    const half = bound?.[index] ?? 0;
    if (low < 0 || high > 0) {
      least = Math.min(least, low - half);
      most = Math.max(most, high + half);
    }
    const rest = low === 0 && high === 0 ? ' · at rest throughout' : '';
    return {
      label: `at ${formatAmong(sampled.positions[index], stepOf(sampled.positions), 'm')}${rest}`,
      curves: [
        {
          along: sampled.times,
          values,
          ...(bound && { bound: new Float64Array(values.length).fill(half) }),
          look: 0,
          kind: sampled.times.length > 60 ? 'line' : 'dots',
        },
      ],
    };
  });
  const shownBound = bound && shown.map((index) => bound[index]);
  return {
    words: {
      title: `${capital(sampled.word)} over time`,
      subtitle: responseInWords(request.member, answer),
      notes: [
        boundInWords(sampled.field, shownBound, sampled.gaugeTime),
        ...selectionNote(shown.length, wanted.length, sampled.positions.length, asked !== undefined),
      ],
    },
    along: {
      name: 'time',
      unit: 's',
      from: sampled.times[0],
      to: sampled.times[sampled.times.length - 1],
    },
    value: { name: sampled.name, unit: sampled.unit, ...rangeAround(least, most) },
    panels,
    key: [],
  };
}

function selectionNote(shown: number, wanted: number, sampled: number, asked: boolean): string[] {
  if (shown < wanted) {
    return [`Shown: the first ${shown} of ${wanted} stations asked for; a higher figure has room for more.`];
  }
  if (asked || shown === sampled) return [];
  return [`Shown: ${shown} of ${countOf(sampled, 'sampled position')}, among them the one of the peak.`];
}

/** The place of the sampled peak and those nearest to the middle and the quarters that move, at most so many. */
function usualStations(sampled: SampledField, most: number): number[] {
  const { positions } = sampled;
  const { least, most: highest } = envelopeOf(sampled);
  const reach = highest.map((high, index) => Math.max(-least[index], high));
  let peak = 0;
  for (let i = 1; i < reach.length; i++) if (reach[i] > reach[peak]) peak = i;
  const from = positions[0];
  const span = positions[positions.length - 1] - from;
  const candidates = [peak, ...[0.5, 0.25, 0.75].map((part) => nearest(positions, from + part * span))];
  const moving = [...new Set(candidates)].filter((index) => index === peak || reach[index] > 0);
  return moving.slice(0, most).toSorted((a, b) => a - b);
}

import type { ResponsesAnswer, ResponsesRequest } from '../../spec/types.ts';
import { formatQuantity } from '../text/format-values.ts';
import { outlineOf } from './member-outline.ts';
import type { Area, KeyEntry, PanelFigure } from './panel-figure.ts';
import { boundInWords, capital, responseInWords, roundedUp } from './quantity-words.ts';
import { boundAlong, envelopeOf, fieldOf, requireSamples, type SampledField } from './sampled-field.ts';
import { extentOf, rangeAround } from './value-range.ts';

/**
 * The envelope of the field over the sampled times, its bound as a strip beyond it, the sampled peak and
 * the certified limit.
 *
 * Faults: `figure-needs-samples`.
 */
export function envelopeData(request: ResponsesRequest, answer: ResponsesAnswer): PanelFigure {
  const sampled = fieldOf(request, answer, 'envelope');
  requireSamples(sampled, 'positions', 'envelope');
  const { positions, unit, field } = sampled;
  const { least, most } = envelopeOf(sampled);
  const bound = boundAlong(sampled);
  const moves = least.some((value) => value !== 0) || most.some((value) => value !== 0);
  const lowest = bound && moves ? least.map((value, i) => value - bound[i]) : least;
  const highest = bound && moves ? most.map((value, i) => value + bound[i]) : most;
  const areas: Area[] = [{ along: positions, lower: least, upper: most, role: 'body' }];
  const key: KeyEntry[] = [{ label: 'between the smallest and the largest value', look: 0, kind: 'area' }];
  if (bound && moves) {
    areas.push({ along: positions, lower: most, upper: highest, role: 'bound' });
    areas.push({ along: positions, lower: lowest, upper: least, role: 'bound' });
    key.push({ label: `bound, at most ±${roundedUp(extentOf(bound)[1], unit)}`, look: 1, kind: 'bound' });
  }
  const curves: PanelFigure['panels'][number]['curves'][number][] = [least, most].map((values) => ({
    along: positions,
    values,
    look: 0,
    kind: positions.length > 40 ? 'line' : 'dots',
  }));

  let low = extentOf(lowest)[0];
  let high = extentOf(highest)[1];
  const peak = answer.peaks[sampled.quantity];
  const upper = peak?.upper ?? null;
  // a limit far beyond the motion would press it flat; the words tell it
  const reach = Math.max(-low, high);
  const limited = upper !== null && upper > 0 && upper <= 2.5 * reach;
  if (limited) {
    const ends = [0, outlineOf(request.member).length];
    for (const side of [-upper, upper]) {
      curves.push({ along: ends, values: [side, side], look: 1 });
      low = Math.min(low, side);
      high = Math.max(high, side);
    }
    key.push({ label: `certified limit ±${roundedUp(upper, unit)}`, look: 1 });
  }
  const marks = [];
  if (peak !== undefined && peak.value !== 0) {
    marks.push({ along: peak.at, value: peak.value });
    const where = `at ${formatQuantity(peak.at, 'm', 4)}, ${formatQuantity(peak.time, 's', 4)}`;
    key.push({
      label: `sampled peak ${formatQuantity(peak.value, unit, 4)} ${where}`,
      look: 0,
      kind: 'dot',
    });
  }
  const outline = outlineOf(request.member);
  return {
    words: {
      title: `Envelope of ${sampled.word}`,
      subtitle: responseInWords(request.member, answer),
      notes: [
        ...(moves && bound && field.boundKind === 'pointwise'
          ? []
          : [boundInWords(field, bound, sampled.gaugeTime)]),
        ...(moves ? [] : [`The ${sampled.word} is zero throughout.`]),
        ...(upper === null || limited
          ? []
          : [
              `Certified limit over the whole member and the sampled time: ${roundedUp(upper, unit)}${limitWord(field.boundKind)}.`,
            ]),
      ],
    },
    along: { name: 'position', unit: 'm', from: 0, to: outline.length },
    value: { name: sampled.name, unit, ...rangeAround(low, high) },
    panels: [{ label: `${capital(sampled.word)} over ${timesInWords(sampled)}`, areas, curves, marks }],
    key,
    outline,
  };
}

function limitWord(kind: string): string {
  return kind === 'gauge-average' ? ' of the averages' : '';
}

function timesInWords({ times }: SampledField): string {
  const from = formatQuantity(times[0], 's', 4);
  const to = formatQuantity(times[times.length - 1], 's', 4);
  return times.length === 1 ? `one instant, ${from}` : `${times.length} times from ${from} to ${to}`;
}

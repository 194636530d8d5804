import type { Numbers, ResponsesAnswer, ResponsesRequest } from '../../spec/types.ts';
import { type MemberOutline, outlineOf } from './member-outline.ts';
import type { FigureWords } from './panel-figure.ts';
import { boundInWords, capital, responseInWords } from './quantity-words.ts';
import { boundAlong, fieldOf, requireSamples } from './sampled-field.ts';
import { extentOf } from './value-range.ts';

/** A field over position and time. */
export interface HeatMapFigure {
  readonly words: FigureWords;
  /** Name and unit of the values. */
  readonly name: string;
  readonly unit: string;
  /** s, ascending, shape [times]. */
  readonly times: Numbers;
  /** m, ascending, shape [positions]. */
  readonly positions: Float64Array;
  /** Rows of the answer, one a time, and the column of every position. */
  readonly values: readonly Numbers[];
  readonly columns: readonly number[];
  /** Largest magnitude, the ends of the colours; 0 where the field is zero. */
  readonly reach: number;
  readonly outline: MemberOutline;
}

/**
 * The sampled field as it is drawn by colours around zero.
 *
 * Faults: `figure-needs-samples`.
 */
export function heatMapData(request: ResponsesRequest, answer: ResponsesAnswer): HeatMapFigure {
  const sampled = fieldOf(request, answer, 'heat-map');
  requireSamples(sampled, 'positions', 'heat-map');
  requireSamples(sampled, 'times', 'heat-map');
  const { field } = sampled;
  let reach = 0;
  for (const row of field.values) {
    const [least, most] = extentOf(row);
    reach = Math.max(reach, -least, most);
  }
  const rest = reach === 0 ? [`The ${sampled.word} is zero throughout.`] : [];
  return {
    words: {
      title: `${capital(sampled.word)} over position and time`,
      subtitle: responseInWords(request.member, answer),
      notes: [
        ...rest,
        boundInWords(field, boundAlong(sampled), sampled.gaugeTime),
        ...(reach > 0 ? ['Negative values are hatched.'] : []),
      ],
    },
    name: sampled.name,
    unit: sampled.unit,
    times: sampled.times,
    positions: sampled.positions,
    values: field.values,
    columns: sampled.columns,
    reach,
    outline: outlineOf(request.member),
  };
}

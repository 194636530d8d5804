import { fault } from '../../faults/fault.ts';
import type { Mode, ModesAnswer, ModesRequest } from '../../spec/types.ts';
import { formatNumber, formatQuantity } from '../text/format-values.ts';
import type { PanelFigure } from './panel-figure.ts';
import type { Choice } from './sampled-field.ts';
import { chosenModes, modesInWords } from './shapes-data.ts';
import { extentOf } from './value-range.ts';

/**
 * Natural frequencies as stems: their height is the share of the effective mass where participation was
 * asked for; otherwise the frequency itself over the order of the mode.
 *
 * Faults: `figure-without-modes`, `figure-mode-not-solved`.
 */
export function frequenciesData(request: ModesRequest, answer: ModesAnswer, choice: Choice): PanelFigure {
  if (answer.modes.length === 0) throw fault('figure-without-modes', '/series/upTo');
  const modes = chosenModes(answer, choice.modes);
  return answer.participation === undefined
    ? plainFrequencies(request, answer, modes)
    : effectiveMasses(request, answer, modes, choice.modes === undefined);
}

function plainFrequencies(request: ModesRequest, answer: ModesAnswer, modes: readonly Mode[]): PanelFigure {
  const frequencies = modes.map((mode) => mode.frequency);
  const highest = extentOf(frequencies)[1];
  const last = modes[modes.length - 1].order;
  return {
    words: {
      title: 'Natural frequencies',
      subtitle: modesInWords(request, answer),
      notes: ['Effective masses are shown where the request asks for participation.'],
    },
    along: {
      name: 'order of the mode',
      unit: '',
      from: 0,
      to: last + Math.max(0.5, 0.02 * last),
      whole: true,
    },
    value: { name: 'frequency', unit: 'Hz', from: 0, to: highest > 0 ? 1.18 * highest : 1 },
    panels: [
      {
        label: '',
        curves: [
          {
            along: modes.map((mode) => mode.order),
            values: frequencies,
            look: 0,
            kind: 'stems',
            ...(modes.length <= 12 && {
              labels: frequencies.map((frequency) => formatQuantity(frequency, 'Hz', 4)),
            }),
          },
        ],
      },
    ],
    key: [],
  };
}

const percents = [0, 25, 50, 75, 100].map((value) => ({ value, label: String(value) }));

function effectiveMasses(
  request: ModesRequest,
  answer: ModesAnswer,
  modes: readonly Mode[],
  all: boolean,
): PanelFigure {
  const frequencies = modes.map((mode) => mode.frequency);
  const highest = extentOf(frequencies)[1];
  const shares = modes.map((mode) => 100 * (mode.participation?.effectiveMassFraction ?? 0));
  const sums = modes.map((mode) => 100 * (mode.participation?.cumulativeFraction ?? 0));
  const shaft = request.member.kind === 'shaft';
  const mass = formatQuantity(answer.participation?.mass ?? 0, shaft ? 'kg·m²' : 'kg', 4);
  const ends = answer.participation?.ends;
  const moved =
    ends === 'uniform' ? 'the whole member' : ends === 'both' ? 'both ends' : `the ${ends ?? ''} end`;
  const reached = sums[sums.length - 1];
  return {
    words: {
      title: 'Natural frequencies and effective masses',
      subtitle: modesInWords(request, answer),
      notes: [
        `Effective ${shaft ? 'inertia' : 'mass'} under a motion of ${moved}, in per cent of the ${mass} moved.`,
        `The modes up to number ${modes[modes.length - 1].order} reach ${formatNumber(reached, 4)} %.`,
      ],
    },
    along: { name: 'frequency', unit: 'Hz', from: 0, to: highest > 0 ? 1.03 * highest : 1 },
    value: { name: `effective ${shaft ? 'inertia' : 'mass'}`, unit: '%', from: 0, to: 122, marks: percents },
    panels: [
      {
        label: '',
        curves: [
          ...(all ? [{ along: frequencies, values: sums, look: 1, kind: 'steps' } as const] : []),
          {
            along: frequencies,
            values: shares,
            look: 0,
            kind: 'stems',
            labels: modes.map((mode, i) => (shares[i] >= 0.5 ? String(mode.order) : '')),
          },
        ],
      },
    ],
    key: [
      {
        label: `effective ${shaft ? 'inertia' : 'mass'} of a mode, with its order`,
        look: 0,
        kind: 'stem',
      },
      ...(all ? [{ label: 'sum up to there', look: 1 }] : []),
    ],
  };
}

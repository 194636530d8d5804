import type {
  Numbers,
  TransferFunction,
  TransferFunctionsAnswer,
  TransferFunctionsRequest,
} from '../../spec/types.ts';
import type { AxisSpec } from '../frame/axis.ts';
import { countOf, formatNumber, formatQuantity } from '../text/format-values.ts';
import { printedUnit } from '../text/units.ts';
import { memberInWords } from './member-outline.ts';
import type { Curve, KeyEntry, Panel, PanelFigure } from './panel-figure.ts';
import { wordOf } from './quantity-words.ts';
import { extentOf } from './value-range.ts';

/** Outputs, and panels of magnitudes, that one figure tells apart. */
const mostOutputs = 6;

/**
 * Magnitude and phase over frequency, outputs of one unit in one panel.
 *
 * @param room panels that the sheet has room for
 */
export function transferData(
  request: TransferFunctionsRequest,
  answer: TransferFunctionsAnswer,
  room: number,
): PanelFigure {
  const shown = answer.outputs.slice(0, mostOutputs);
  const units = [...new Set(shown.map((output) => output.unit))].slice(0, Math.max(1, room - 1));
  const drawn = shown
    .map((output, index) => ({ output, index, tag: String.fromCharCode(65 + index) }))
    .filter(({ output }) => units.includes(output.unit))
    .map((entry, look) => ({ ...entry, look }));
  const single = drawn.length === 1;
  const kind = answer.frequencies.length > 40 ? 'line' : 'dots';
  const along = answer.frequencies;
  const { kind: memberKind } = request.member;
  const panels = units.map((unit): Panel => {
    const outputs = drawn.filter(({ output }) => output.unit === unit);
    const curves = outputs.flatMap(({ output, look, tag }) => [
      {
        along,
        values: output.magnitude,
        ...(output.bound && { bound: output.bound }),
        look,
        kind,
        ...(!single && { tag }),
      } as const,
      ...(single ? seriesCurves(output, along) : []),
    ]);
    const words = new Set(outputs.map(({ output }) => wordOf(output.quantity, memberKind)));
    return {
      label: '',
      value: {
        name: `magnitude of ${[...words].join(', ')}`,
        unit: printedUnit(unit),
        ...magnitudeRange(curves.map((curve) => curve.values)),
      },
      curves,
    };
  });
  panels.push({
    label: '',
    value: { name: 'phase', unit: '°', from: -Math.PI, to: Math.PI, marks: phaseMarks },
    curves: drawn.flatMap(({ output, look }) => unbroken(along, output.phase, look, kind)),
  });

  const left = answer.outputs.length - drawn.length;
  return {
    words: {
      title: `Transfer functions of ${inputInWords(request)}`,
      subtitle: `${memberInWords(request.member)} · ${solutionInWords(answer)}`,
      notes: [
        boundInWords(answer),
        ...(left > 0 ? [`Shown: ${drawn.length} of ${countOf(answer.outputs.length, 'output')}.`] : []),
      ],
    },
    along: frequencyAxis(request, along),
    panels,
    key: [
      ...drawn.map(({ output, look, tag }) => ({
        label: `${single ? '' : `${tag} `}${wordOf(output.quantity, memberKind)} at ${formatQuantity(output.at, 'm', 4)}`,
        look,
      })),
      ...(single ? seriesKey(drawn[0].output) : []),
    ],
  };
}

const phaseMarks = [-180, -90, 0, 90, 180].map((degrees) => ({
  value: (degrees * Math.PI) / 180,
  label: formatNumber(degrees),
}));

/** The modal series beside the exact result: cut off, and with the static part of the rest. */
function seriesCurves({ series }: TransferFunction, along: Numbers): Curve[] {
  if (series === undefined) return [];
  return [series.truncated, series.corrected].map(({ real, imaginary }, i) => ({
    along,
    values: Float64Array.from(real, (value, j) => Math.hypot(value, imaginary[j])),
    look: i + 1,
  }));
}

function seriesKey({ series }: TransferFunction): KeyEntry[] {
  if (series === undefined) return [];
  const modes = countOf(series.modes, 'mode');
  return [
    { label: `${modes}, cut off`, look: 1 },
    { label: `${modes} with the static part of the rest`, look: 2 },
  ];
}

/** Curves without the jumps by a whole turn where the phase leaves (−π, π]. */
function unbroken(along: Numbers, phase: Numbers, look: number, kind: 'line' | 'dots'): Curve[] {
  const starts = [0];
  for (let i = 1; i < phase.length; i++) {
    if (Math.abs(phase[i] - phase[i - 1]) > 1.2 * Math.PI) starts.push(i);
  }
  if (starts.length > 200) return [{ along, values: phase, look, kind }];
  return starts.map((start, s) => ({
    along: along.slice(start, starts[s + 1]),
    values: phase.slice(start, starts[s + 1]),
    look,
    kind,
  }));
}

/** Logarithmic where magnitudes span more than a decade and a half, at most eight decades down. */
function magnitudeRange(lists: readonly Numbers[]): Pick<AxisSpec, 'from' | 'to' | 'logarithmic'> {
  let most = 0;
  let least = Infinity;
  for (const list of lists) {
    for (const value of list) {
      if (value > most) most = value;
      if (value > 0 && value < least) least = value;
    }
  }
  if (most === 0) return { from: 0, to: 1 };
  const from = Math.max(least, most * 1e-8);
  if (most / from > 30) return { from: from / 1.4, to: most * 1.6, logarithmic: true };
  return { from: 0, to: 1.08 * most };
}

function frequencyAxis({ frequencies }: TransferFunctionsRequest, along: Numbers): AxisSpec {
  const [from, to] = extentOf(along);
  const logarithmic = 'spacing' in frequencies && frequencies.spacing === 'logarithmic' && from > 0;
  if (from === to) return { name: 'frequency', unit: 'Hz', from: 0, to: to > 0 ? 2 * to : 1 };
  return { name: 'frequency', unit: 'Hz', from, to, logarithmic };
}

function inputInWords({ input, member }: TransferFunctionsRequest): string {
  const turns = member.kind === 'shaft';
  if (input.type === 'point-force') {
    return `a unit ${turns ? 'torque' : 'force'} at ${formatQuantity(input.at, 'm', 4)}`;
  }
  const word = wordOf(input.quantity, member.kind);
  if (input.type === 'outcrop-motion') return `a unit outcrop ${word} at the ${input.end} end`;
  return `a unit ${word} of ${input.end === 'both' ? 'both ends' : `the ${input.end} end`}`;
}

function solutionInWords({ convergence }: TransferFunctionsAnswer): string {
  if (convergence.closedForm) return 'closed form';
  return convergence.modesUsed === null
    ? 'sum over all modes'
    : `sum of ${countOf(convergence.modesUsed, 'mode')}`;
}

function boundInWords({ convergence }: TransferFunctionsAnswer): string {
  if (convergence.closedForm) return 'Dynamic stiffness in closed form, exact but for rounding.';
  const share = formatNumber(Number(convergence.largestBound.toPrecision(2)), 2);
  return `Bound at most ±${share} of the largest magnitude of an output, certified.`;
}

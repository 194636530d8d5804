import { fault } from '../../faults/fault.ts';
import type { ResponsesAnswer, ResponsesRequest } from '../../spec/types.ts';
import type { AxisSpec } from '../frame/axis.ts';
import { countOf, formatNumber } from '../text/format-values.ts';
import type { Curve, KeyEntry, Panel, PanelFigure } from './panel-figure.ts';
import { responseInWords, roundedUp, wordOf } from './quantity-words.ts';
import { extentOf } from './value-range.ts';

/** What the series leaves out after so many modes. */
export interface SeriesConvergence {
  /** 1, 2, …, N. */
  readonly modes: Float64Array;
  /**
   * Energy that the first n modes leave out over all there is: the certified tail plus the energies of the
   * modes between, a sum of positive terms, so that no digits cancel.
   */
  readonly leftOut: Float64Array;
  /**
   * Estimate of the displacement bound with n modes, in the unit of displacement; null where none can be
   * made: under loads, without a bound, or where nothing is left out.
   */
  readonly estimate: Float64Array | null;
}

/**
 * The estimate starts from the certified bound at N and goes back by the two factors of the bound
 * √(2 E_tail · Γ): E_tail is known for every n; the flexibility Γ that the modes leave is taken in
 * proportion to Σ_{k>n} 1/ω_k², above N with evenly spaced frequencies, Σ_{k>N} 1/k² ≈ 1/(N + ½).
 * The shapes' part in Γ varies along the member, so this is no bound. Cost O(N).
 */
export function convergenceOf(
  { coefficients, convergence }: ResponsesAnswer,
  loaded: boolean,
): SeriesConvergence {
  const count = coefficients.length;
  const { total, tail } = convergence.energy;
  const leftOut = new Float64Array(count);
  const flexibility = new Float64Array(count);
  const last = coefficients[count - 1].angularFrequency;
  let energy = tail;
  let given = last > 0 ? (count / last) ** 2 / (count + 0.5) : 0;
  for (let n = count - 1; n >= 0; n--) {
    leftOut[n] = energy / total;
    flexibility[n] = given;
    energy += coefficients[n].energy;
    const omega = coefficients[n].angularFrequency;
    if (omega > 0) given += 1 / omega ** 2;
  }
  const bound = convergence.displacementBound;
  const known = !loaded && bound !== null && bound > 0 && tail > 0 && flexibility[count - 1] > 0;
  const final = known ? bound / Math.sqrt(leftOut[count - 1] * flexibility[count - 1]) : 0;
  return {
    modes: Float64Array.from({ length: count }, (_, i) => i + 1),
    leftOut,
    estimate: known ? leftOut.map((share, i) => final * Math.sqrt(share * flexibility[i])) : null,
  };
}

/**
 * Energy left out and displacement bound against the modes kept.
 *
 * Faults: `figure-without-energy`.
 */
export function convergenceData(request: ResponsesRequest, answer: ResponsesAnswer): PanelFigure {
  const { energy, displacementBound, modesUsed, modesNeeded } = answer.convergence;
  if (!(energy.total > 0)) throw fault('figure-without-energy', '/initial');
  const loaded = request.loads.length > 0;
  const { modes, leftOut, estimate } = convergenceOf(answer, loaded);
  const word = wordOf('displacement', request.member.kind);
  const unit = request.member.kind === 'shaft' ? 'rad' : 'm';
  const kind = modes.length > 40 ? 'line' : 'dots';
  const panels: Panel[] = [
    {
      label: '',
      value: {
        name: 'energy left out / total, exact but for rounding',
        unit: '',
        logarithmic: true,
        ...decadesOf(leftOut),
      },
      curves: [{ along: modes, values: leftOut, look: 0, kind }],
      marks: [{ along: modes.length, value: leftOut[modes.length - 1] }],
    },
  ];
  const key: KeyEntry[] = [];
  const hasBound = displacementBound !== null && displacementBound > 0;
  if (hasBound) {
    panels.push(boundPanel(request, answer, modes, estimate, { word, unit, kind, key }));
    key.push({ label: `certified with ${countOf(modesUsed, 'mode')}`, look: 0, kind: 'dot' });
  } else key.push({ label: `with the ${countOf(modesUsed, 'mode')} used`, look: 0, kind: 'dot' });

  const captured = capturedInWords(energy.capturedFraction, leftOut[modes.length - 1]);
  return {
    words: {
      title: 'Convergence of the modal series',
      subtitle: responseInWords(request.member, answer),
      notes: [
        `${captured} ${
          hasBound
            ? `Bound on the ${word}, certified: ±${roundedUp(displacementBound, unit)}.`
            : `No bound on the ${word} exists.`
        }`,
        ...(loaded && hasBound
          ? ['The bound includes the loads and is certified with the modes used only.']
          : []),
        ...(modesNeeded === undefined
          ? []
          : [`The tolerance would take about ${countOf(modesNeeded, 'mode')}, an estimate.`]),
      ],
    },
    along: modesAxis(modes.length),
    panels,
    key,
  };
}

/** Close to all of it, what is missing says more than 100 %. */
function capturedInWords(fraction: number, leftOut: number): string {
  if (leftOut === 0) return 'All of the initial energy is captured.';
  if (fraction > 0.9999)
    return `All but ${formatNumber(100 * leftOut, 2)} % of the initial energy is captured.`;
  return `Captured: ${formatNumber(100 * fraction, 4)} % of the initial energy.`;
}

function boundPanel(
  request: ResponsesRequest,
  answer: ResponsesAnswer,
  modes: Float64Array,
  estimate: Float64Array | null,
  { word, unit, kind, key }: { word: string; unit: string; kind: 'line' | 'dots'; key: KeyEntry[] },
): Panel {
  const bound = answer.convergence.displacementBound as number;
  const curves: Curve[] = [];
  const shown = [bound];
  if (estimate !== null) {
    curves.push({ along: modes, values: estimate, look: 1, kind });
    shown.push(...extentOf(estimate));
    key.push({ label: 'bound with fewer modes, estimated', look: 1 });
  }
  const tolerance = toleranceOf(request, answer);
  if (tolerance !== null && tolerance > 0) {
    curves.push({
      along: [modesAxis(modes.length).from, modesAxis(modes.length).to],
      values: [tolerance, tolerance],
      look: 2,
    });
    shown.push(tolerance);
    key.push({ label: `tolerance ${roundedUp(tolerance, unit)}`, look: 2 });
  }
  return {
    label: '',
    value: { name: `bound on the ${word}`, unit, logarithmic: true, ...decadesOf(shown) },
    curves,
    marks: [{ along: modes.length, value: bound }],
  };
}

/** The tolerance on the displacement that the series had to meet, in its unit. */
function toleranceOf({ series }: ResponsesRequest, { convergence }: ResponsesAnswer): number | null {
  if ('relativeTolerance' in series) {
    return convergence.ceiling === null ? null : series.relativeTolerance * convergence.ceiling;
  }
  return 'tolerances' in series ? (series.tolerances.displacement ?? null) : null;
}

function modesAxis(count: number): AxisSpec {
  const many = count > 30;
  return {
    name: 'modes kept',
    unit: '',
    from: many ? 1 : 0,
    to: many ? 1.15 * count : count + 1,
    logarithmic: many,
    whole: true,
  };
}

/** Range of a logarithmic axis that shows all positive values with a margin. */
function decadesOf(values: readonly number[] | Float64Array): { from: number; to: number } {
  const positive = Array.from(values).filter((value) => value > 0);
  if (positive.length === 0) return { from: 1e-16, to: 1 };
  const [least, most] = extentOf(positive);
  const from = Math.max(least / 1.6, Number.MIN_VALUE * 1e20, most * 1e-20);
  const to = most * 1.6;
  return to / from < 10 ? { from: from / 2, to: to * 2 } : { from, to };
}

import { fault } from '../../faults/fault.ts';
import type { Mode, ModesAnswer, ModesRequest, Numbers } from '../../spec/types.ts';
import { countOf, formatQuantity } from '../text/format-values.ts';
import { memberInWords, outlineOf } from './member-outline.ts';
import type { Panel, PanelFigure } from './panel-figure.ts';
import { wordOf } from './quantity-words.ts';
import type { Choice } from './sampled-field.ts';
import { extentOf, rangeAround } from './value-range.ts';

/** Modes shown at most where none is named. */
const usual = 9;

/**
 * Mode shapes along the member, one panel each: displacement where it was asked for, else force.
 *
 * @param room panels that the sheet has room for
 *
 * Faults: `figure-without-modes`, `figure-without-shapes`, `figure-mode-not-solved`.
 */
export function shapesData(
  request: ModesRequest,
  answer: ModesAnswer,
  choice: Choice,
  room: number,
): PanelFigure {
  const { shapes } = request;
  const sampledAt = answer.shapes?.positions;
  if (answer.modes.length === 0) throw fault('figure-without-modes', '/series/upTo');
  if (shapes === undefined || sampledAt === undefined) throw fault('figure-without-shapes', '/shapes');
  const quantity = shapes.quantities.includes('displacement') ? 'displacement' : 'force';
  const wanted = chosenModes(answer, choice.modes);
  const shown = wanted.slice(0, choice.modes === undefined ? Math.min(room, usual) : room);
  const order = Array.from(sampledAt, (_, i) => i).toSorted((a, b) => sampledAt[a] - sampledAt[b]);
  const positions = order.map((i) => sampledAt[i]);
  let [least, most] = [0, 0];
  const panels = shown.map((mode): Panel => {
    const sampled = mode.shape?.[quantity] as Numbers;
    const values = order.map((i) => sampled[i]);
    const [low, high] = extentOf(values);
    least = Math.min(least, low);
    most = Math.max(most, high);
    return {
      label: labelOf(mode),
      curves: [{ along: positions, values, look: 0, kind: positions.length > 40 ? 'line' : 'dots' }],
    };
  });
  const outline = outlineOf(request.member);
  const mass = shapes.normalisation === 'mass';
  const word = wordOf(quantity, request.member.kind);
  return {
    words: {
      title: quantity === 'displacement' ? 'Mode shapes' : `Mode shapes in ${word}`,
      subtitle: modesInWords(request, answer),
      notes: [
        ...selectionNote(shown, wanted, answer, choice.modes !== undefined),
        mass
          ? 'Shapes are scaled to a modal mass of 1.'
          : 'Shapes are scaled to a largest displacement of 1 over the member.',
      ],
    },
    along: { name: 'position', unit: 'm', from: 0, to: outline.length },
    value: {
      name: quantity === 'displacement' ? `modal ${word}` : word,
      unit: unitOfShape(request, quantity),
      ...rangeAround(least, most),
    },
    panels,
    key: [],
    outline,
  };
}

/**
 * The modes named, in their order; all where none is named.
 *
 * Faults: `figure-mode-not-solved`.
 */
export function chosenModes(answer: ModesAnswer, orders: readonly number[] | undefined): readonly Mode[] {
  if (orders === undefined) return answer.modes;
  return [...new Set(orders)]
    .toSorted((a, b) => a - b)
    .map((order) => {
      const mode = answer.modes[order - 1];
      if (mode === undefined) {
        throw fault('figure-mode-not-solved', '', { order, count: answer.modes.length });
      }
      return mode;
    });
}

/** Member, completeness of the spectrum and number of modes. */
export function modesInWords(request: ModesRequest, answer: ModesAnswer): string {
  const { modesFound, modesInTotal } = answer.convergence;
  const all = modesInTotal !== null && modesFound === modesInTotal;
  const count = countOf(modesFound, 'mode');
  return `${memberInWords(request.member)} · spectrum complete · ${all ? `all ${count}` : count}`;
}

function labelOf(mode: Mode): string {
  const rate = mode.frequency > 0 ? formatQuantity(mode.frequency, 'Hz', 4) : '0 Hz, rigid body';
  return `mode ${mode.order} · ${rate}`;
}

function selectionNote(
  shown: readonly Mode[],
  wanted: readonly Mode[],
  answer: ModesAnswer,
  asked: boolean,
): string[] {
  if (shown.length === wanted.length) return [];
  const last = shown[shown.length - 1].order;
  return asked
    ? [`Shown: ${shown.length} of the ${wanted.length} modes named; a larger figure has room for more.`]
    : [`Shown: modes 1 to ${last} of ${answer.modes.length}; name others by modes=.`];
}

function unitOfShape({ member, shapes }: ModesRequest, quantity: 'displacement' | 'force'): string {
  const turns = member.kind === 'shaft';
  const root = turns ? '√(kg·m²)' : '√kg';
  if (shapes?.normalisation === 'mass')
    return quantity === 'force' ? `${turns ? 'N·m' : 'N'}/${root}` : `/${root}`;
  return quantity === 'force' ? (turns ? 'N·m/rad' : 'N/m') : '';
}

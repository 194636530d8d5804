import { fault } from '../faults/fault.ts';
import type {
  ModesAnswer,
  ModesRequest,
  ResponsesAnswer,
  ResponsesRequest,
  TransferFunctionsAnswer,
  TransferFunctionsRequest,
} from '../spec/types.ts';
import { convergenceData } from './data/convergence-data.ts';
import { envelopeData } from './data/envelope-data.ts';
import { frequenciesData } from './data/frequencies-data.ts';
import { heatMapData } from './data/heat-map-data.ts';
import { historyData } from './data/history-data.ts';
import type { FigureWords, PanelFigure } from './data/panel-figure.ts';
import { shapesData } from './data/shapes-data.ts';
import { snapshotsData } from './data/snapshots-data.ts';
import { transferData } from './data/transfer-data.ts';
import { drawHeatMap } from './draw/draw-heat-map.ts';
import { drawPanels } from './draw/draw-panels.ts';
import { panelRoom } from './draw/panel-room.ts';
import { Sheet } from './frame/sheet.ts';
import { type FigureOperation, figureSizes, type View, viewsOf } from './views.ts';

/** Which figure is wanted, and how. */
export interface FigureOptions {
  view: View;
  /** Size in px, within {@link figureSizes}. */
  width: number;
  height: number;
  theme: 'light' | 'dark';
  /** Positions, m, whose nearest sampled ones are shown by history and force-history. */
  stations?: readonly number[];
  /** Times, s, whose nearest sampled ones are shown by snapshots. */
  instants?: readonly number[];
  /** Orders of the modes shown by shapes and frequencies. */
  modes?: readonly number[];
}

/**
 * A figure of an answer as SVG: no scripts, no ids, nothing outside itself; the same arguments give the
 * same bytes.
 *
 * @param request the canonical request
 * @param answer the answer to it
 *
 * Faults: `figure-not-of-operation`, `figure-size`, and those of the data of the view.
 * Cost: O(samples) for the data, O(pixels) for the drawing.
 */
export function drawFigure(
  operation: FigureOperation,
  request: unknown,
  answer: unknown,
  options: FigureOptions,
): string {
  const { view, width, height, theme } = options;
  if (!viewsOf[operation].includes(view)) {
    throw fault('figure-not-of-operation', '', { operation, view, views: viewsOf[operation].join(', ') });
  }
  requireSize('width', width);
  requireSize('height', height);
  const sheet = new Sheet(width, height, theme);
  if (view === 'heat-map') {
    const figure = heatMapData(request as ResponsesRequest, answer as ResponsesAnswer);
    drawHeatMap(sheet, figure, theme);
    return finish(sheet, figure.words, [`Colors show the ${figure.name} over time and position.`]);
  }
  const figure = panelFigure(view, request, answer, {
    ...options,
    stations: unlessEmpty(options.stations),
    instants: unlessEmpty(options.instants),
    modes: unlessEmpty(options.modes),
  });
  drawPanels(sheet, figure);
  const shown = figure.panels.map(({ label, value }) =>
    [value?.name ?? figure.value?.name, label].filter((word) => word !== undefined && word !== '').join(' '),
  );
  const key = figure.key.length > 0 ? [`Key: ${figure.key.map(({ label }) => label).join('; ')}.`] : [];
  return finish(sheet, figure.words, [`${shown.join('; ')}; over ${figure.along.name}.`, ...key]);
}

function requireSize(side: 'width' | 'height', size: number): void {
  const { least, most } = figureSizes[side];
  if (Number.isInteger(size) && size >= least && size <= most) return;
  throw fault('figure-size', '', { side, size, least, most });
}

/** An empty choice is no choice. */
function unlessEmpty(list: readonly number[] | undefined): readonly number[] | undefined {
  return list?.length === 0 ? undefined : list;
}

function panelFigure(
  view: Exclude<View, 'heat-map'>,
  request: unknown,
  answer: unknown,
  options: FigureOptions,
): PanelFigure {
  const { width, height } = options;
  const { kind } = (request as { member: { kind: string } }).member;
  const along = panelRoom(width, height, kind === 'shear-column' ? 'upright' : 'position');
  const below = panelRoom(width, height, 'time');
  switch (view) {
    case 'shapes':
      return shapesData(request as ModesRequest, answer as ModesAnswer, options, along);
    case 'frequencies':
      return frequenciesData(request as ModesRequest, answer as ModesAnswer, options);
    case 'history':
    case 'force-history':
      return historyData(request as ResponsesRequest, answer as ResponsesAnswer, options, below, view);
    case 'snapshots':
      return snapshotsData(request as ResponsesRequest, answer as ResponsesAnswer, options, along);
    case 'envelope':
      return envelopeData(request as ResponsesRequest, answer as ResponsesAnswer);
    case 'convergence':
      return convergenceData(request as ResponsesRequest, answer as ResponsesAnswer);
    case 'transfer':
      return transferData(request as TransferFunctionsRequest, answer as TransferFunctionsAnswer, below);
  }
}

/** Closes the figure with a title and a description for those who cannot see it. */
function finish(sheet: Sheet, { title, subtitle, notes }: FigureWords, shown: readonly string[]): string {
  return sheet.finish(`${title}: ${subtitle}`, [...shown, ...notes].join(' '));
}

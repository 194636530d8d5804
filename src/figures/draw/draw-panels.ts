import type { MemberOutline } from '../data/member-outline.ts';
import type { Panel, PanelFigure } from '../data/panel-figure.ts';
import { type Axis, type AxisSpec, layOutAxis } from '../frame/axis.ts';
import type { Box, Sheet } from '../frame/sheet.ts';
import { sizes } from '../frame/theme.ts';
import { textWidth } from '../text/font.ts';
import { shorten, wrap } from '../text/fit-text.ts';
import { drawMember, drawNames, memberDepth } from './draw-member.ts';
import { drawPanel } from './draw-panel.ts';
import { drawWords } from './draw-words.ts';
import { gridFor } from './panel-room.ts';

const labelRow = sizes.tick + 5;
const tickRow = sizes.tick + 6;
const titleRow = sizes.body + 5;

/** What a panel without an axis would be measured by; every figure has one. */
const valueless: AxisSpec = { name: '', unit: '', from: 0, to: 1 };

/** Draws a figure of panels over a common axis. */
export function drawPanels(sheet: Sheet, figure: PanelFigure): void {
  const box = drawWords(sheet, figure.words, figure.key);
  if (figure.outline?.upright === true) drawUpright(sheet, box, figure);
  else drawLying(sheet, box, figure);
}

/** Panels whose common axis runs across, in rows and columns. */
function drawLying(sheet: Sheet, box: Box, figure: PanelFigure): void {
  const { outline, panels } = figure;
  const common = outline === undefined ? 'time' : 'position';
  const { columns, rows } = gridFor(panels.length, sheet.width, sheet.height, common);
  const depth = outline && memberDepth(outline);
  const named = outline !== undefined && outline.names.length > 0 && sheet.height >= 300;
  const strip = depth === undefined ? 0 : depth.before + depth.behind + 4 + (named ? tickRow : 0);
  const heading = figure.value === undefined ? 0 : titleRow;
  const top = box.y + heading + strip;
  const rowHeight = (box.y + box.height - tickRow - titleRow - top) / rows;
  const plotHeight = Math.max(rowHeight - labelRow - (rows > 1 ? 6 : 0), 16);
  const levels = panels.map((panel) => {
    const spec = panel.value ?? figure.value ?? valueless;
    return (y: number) => layOutAxis(spec, y + plotHeight, y, 'upright');
  });
  const gutter = Math.max(16, ...levels.map((level) => widestLabel(level(0)) + 8));
  const tagged = panels.some((panel) => panel.curves.some((curve) => curve.tag !== undefined));
  const right = tagged ? 16 : 8;
  const gap = outline === undefined ? 20 : 34;
  const left = box.x + gutter;
  const plotWidth = (box.x + box.width - right - left - gap * (columns - 1)) / columns;

  for (let column = 0; column < columns; column++) {
    const x = left + column * (plotWidth + gap);
    const along = layOutAxis(figure.along, x, x + plotWidth, 'across');
    const inColumn = panels.filter((_, i) => i % columns === column);
    if (column === 0 && figure.value !== undefined) {
      const title = shorten(levels[0](0).title, sizes.body, box.width);
      sheet.text(box.x, box.y + sizes.body, title, sizes.body);
    }
    if (outline !== undefined && depth !== undefined) {
      const where = {
        place: along.place,
        line: box.y + heading + (named ? tickRow : 0) + depth.before,
        upright: false,
      };
      const room = { least: x - 8, most: x + plotWidth + 8, width: plotWidth };
      if (named) drawNames(sheet, outline, where, box.y + heading + sizes.tick, room);
      drawMember(sheet, outline, where);
    }
    for (const [row, panel] of inColumn.entries()) {
      const y = top + row * rowHeight + labelRow;
      const plot = { x, y, width: plotWidth, height: plotHeight };
      const value = levels[row * columns + column](y);
      sheet.text(x, y - 4, shorten(labelOf(panel, value), sizes.tick, plotWidth), sizes.tick);
      drawPanel(sheet, plot, panel, { along, value, upright: false, divisions: divisionsOf(outline, along) });
      if (column === 0) drawLevels(sheet, x, value);
    }
    const bottom = top + (inColumn.length - 1) * rowHeight + labelRow + plotHeight;
    drawFoot(sheet, along, x, plotWidth, bottom);
  }
}

/** Panels side by side whose common axis grows upwards, as a column stands. */
function drawUpright(sheet: Sheet, box: Box, figure: PanelFigure): void {
  const { outline, panels } = figure;
  if (outline === undefined) return;
  const { columns, rows } = gridFor(panels.length, sheet.width, sheet.height, 'upright');
  const depth = memberDepth(outline);
  const names = outline.names.length > 0 && sheet.width >= 520 ? 96 : 0;
  const heading = titleRow;
  const lines = panels.length > 1 ? 2 : 1;
  const head = lines * (sizes.tick + 2) + 4;
  const rowHeight = (box.height - heading - titleRow) / rows;
  const plotHeight = rowHeight - head - tickRow - (rows > 1 ? 8 : 0);
  const level = (y: number) => layOutAxis(figure.along, y + plotHeight, y, 'upright');
  const ticksWidth = widestLabel(level(0)) + 8;
  const strip = depth.behind + depth.before + 4;
  const left = box.x + names + strip + ticksWidth;
  const gap = 22;
  const plotWidth = (box.x + box.width - 12 - left - gap * (columns - 1)) / columns;
  const title = shorten(level(0).title, sizes.body, box.width);
  sheet.text(box.x, box.y + sizes.body, title, sizes.body);
  let valueTitle = '';
  for (let row = 0; row < rows; row++) {
    const y = box.y + heading + row * rowHeight + head;
    const along = level(y);
    const where = { place: along.place, line: box.x + names + depth.behind, upright: true };
    const room = { least: y - 6, most: y + plotHeight + 6, width: names - 8 };
    if (names > 0) drawNames(sheet, outline, where, box.x + names - 6, room);
    drawMember(sheet, outline, where);
    drawLevels(sheet, left, along);
    for (let column = 0; column < columns && row * columns + column < panels.length; column++) {
      const panel = panels[row * columns + column];
      const x = left + column * (plotWidth + gap);
      const value = layOutAxis(panel.value ?? figure.value ?? valueless, x, x + plotWidth, 'across');
      valueTitle = value.title;
      const label = wrap(panel.label, sizes.tick, plotWidth + gap - 8, lines);
      for (const [i, line] of label.entries()) {
        sheet.text(x, y - 5 - (label.length - 1 - i) * (sizes.tick + 2), line, sizes.tick);
      }
      const axes = { along, value, upright: true, divisions: divisionsOf(outline, along) };
      drawPanel(sheet, { x, y, width: plotWidth, height: plotHeight }, panel, axes);
      drawTicksAcross(sheet, value, y + plotHeight, [x - gap / 2 + 2, x + plotWidth + gap / 2 - 2]);
    }
  }
  const middle = (left + box.x + box.width - 12) / 2;
  const shown = shorten(valueTitle, sizes.body, box.width - (left - box.x));
  const foot = Math.min(Math.max(middle, left + textWidth(shown, sizes.body) / 2), box.x + box.width);
  sheet.text(foot, box.y + box.height - 4, shown, sizes.body, { anchor: 'middle' });
}

/** What stands above a panel: its own axis, its label, or both. */
function labelOf(panel: Panel, value: Axis): string {
  if (panel.value === undefined) return panel.label;
  return panel.label === '' ? value.title : `${value.title} · ${panel.label}`;
}

function widestLabel(axis: Axis): number {
  return Math.max(0, ...axis.ticks.map((tick) => textWidth(tick.label, sizes.tick)));
}

/** Segment boundaries that are not too many to be told apart. */
export function divisionsOf(outline: MemberOutline | undefined, along: Axis): number[] {
  const places = (outline?.boundaries ?? []).map((at) => along.place(at));
  return places.filter((at, i) => i === 0 || Math.abs(at - places[i - 1]) >= 4);
}

/** Tick labels left of a plot. */
export function drawLevels(sheet: Sheet, x: number, axis: Axis): void {
  for (const { at, label } of axis.ticks) {
    sheet.text(x - 6, at + sizes.tick * 0.36, label, sizes.tick, {
      anchor: 'end',
      color: sheet.palette.softInk,
    });
  }
}

/** Tick labels below a plot; those that would leave the given stretch are moved into it. */
export function drawTicksAcross(
  sheet: Sheet,
  axis: Axis,
  bottom: number,
  [least, most]: [least: number, most: number],
): void {
  const color = sheet.palette.softInk;
  let taken = -Infinity;
  for (const { at, label } of axis.ticks) {
    const half = textWidth(label, sizes.tick) / 2;
    const middle = Math.min(Math.max(at, least + half), most - half);
    if (middle - half < taken) continue;
    taken = middle + half + 4;
    sheet.text(middle, bottom + sizes.tick + 4, label, sizes.tick, { anchor: 'middle', color });
  }
}

/** Tick labels and title below a plot. */
export function drawFoot(sheet: Sheet, axis: Axis, x: number, width: number, bottom: number): void {
  drawTicksAcross(sheet, axis, bottom, [x - 14, x + width + 8]);
  const title = shorten(axis.title, sizes.body, width + 8);
  sheet.text(x + width / 2, bottom + tickRow + sizes.body + 1, title, sizes.body, { anchor: 'middle' });
}

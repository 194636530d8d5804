import type { HeatMapFigure } from '../data/heat-map-data.ts';
import { layOutAxis } from '../frame/axis.ts';
import { type Box, px, type Sheet } from '../frame/sheet.ts';
import { sizes, type Theme } from '../frame/theme.ts';
import { shorten } from '../text/fit-text.ts';
import { textWidth } from '../text/font.ts';
import { drawMember, drawNames, memberDepth } from './draw-member.ts';
import { divisionsOf, drawFoot, drawLevels } from './draw-panels.ts';
import { drawWords } from './draw-words.ts';
import { fieldPalette } from './field-colors.ts';
import { colorOf, fieldPixels, hatchRow } from './field-image.ts';
import { indexedPng } from './indexed-png.ts';

const barWidth = 14;

/** Draws a field over position and time: one embedded picture, a colour bar, the member upright beside it. */
export function drawHeatMap(sheet: Sheet, figure: HeatMapFigure, theme: Theme): void {
  const box = drawWords(sheet, figure.words, []);
  const { outline, times, positions, reach } = figure;
  const depth = memberDepth(outline);
  const names = outline.names.length > 0 && sheet.width >= 560 ? 96 : 0;
  const heading = sizes.body + 14;
  const foot = sizes.tick + sizes.body + 12;
  const y = Math.round(box.y + heading);
  const height = Math.max(20, Math.floor(box.height - heading - foot));

  const along = layOutAxis(
    { name: 'position', unit: 'm', from: 0, to: outline.length },
    y + height,
    y,
    'upright',
  );
  const limit = reach > 0 ? reach : 1;
  const value = layOutAxis(
    { name: figure.name, unit: figure.unit, from: -limit, to: limit },
    y + height,
    y,
    'upright',
  );
  const widest = (labels: readonly { label: string }[]) =>
    Math.max(...labels.map(({ label }) => textWidth(label, sizes.tick)), 0);
  const left = Math.round(box.x + names + depth.behind + depth.before + 4 + widest(along.ticks) + 8);
  const barAt = Math.round(box.x + box.width - widest(value.ticks) - 6 - barWidth);
  const width = barAt - 14 - left;
  const time = layOutAxis(
    { name: 'time', unit: 's', from: times[0], to: times[times.length - 1] },
    left,
    left + width,
    'across',
  );

  const where = { place: along.place, line: box.x + names + depth.behind, upright: true };
  if (names > 0) {
    drawNames(sheet, outline, where, box.x + names - 6, {
      least: y - 4,
      most: y + height + 4,
      width: names - 8,
    });
  }
  drawMember(sheet, outline, where);
  drawLevels(sheet, left, along);
  const title = shorten(along.title, sizes.body, (barAt - box.x) / 2);
  sheet.text(box.x, y - 11, title, sizes.body);
  const valueTitle = shorten(
    value.title,
    sizes.body,
    box.x + box.width - box.x - textWidth(title, sizes.body) - 16,
  );
  sheet.text(box.x + box.width, y - 11, valueTitle, sizes.body, { anchor: 'end' });

  const palette = fieldPalette(theme);
  const top = Math.round(along.place(positions[positions.length - 1]));
  const bottom = Math.max(Math.round(along.place(positions[0])), top + 1);
  const pixels = fieldPixels(figure.values, figure.columns, times, positions, reach, width, bottom - top);
  const picture = indexedPng(pixels, width, bottom - top, palette).toString('base64');
  sheet.image({ x: left, y: top, width, height: bottom - top }, picture);
  drawColorBar(sheet, { x: barAt, y, width: barWidth, height }, palette);
  for (const { at, label } of value.ticks) {
    sheet.text(barAt + barWidth + 5, at + sizes.tick * 0.36, label, sizes.tick, {
      color: sheet.palette.softInk,
    });
  }
  for (const place of divisionsOf(outline, along)) {
    sheet.line(left, place, left + width, place, { color: sheet.palette.ink, dash: '1 4', opacity: 0.55 });
  }
  frame(sheet, { x: left, y, width, height });
  drawFoot(sheet, time, left, width, y + height);
}

function drawColorBar(sheet: Sheet, box: Box, palette: Uint8Array): void {
  const pixels = new Uint8Array(box.width * box.height);
  for (let y = 0; y < box.height; y++) {
    const row = pixels.subarray(y * box.width, (y + 1) * box.width);
    row.fill(colorOf(1 - (2 * (y + 0.5)) / box.height));
    hatchRow(row, y);
  }
  sheet.image(box, indexedPng(pixels, box.width, box.height, palette).toString('base64'));
  frame(sheet, box);
}

function frame(sheet: Sheet, { x, y, width, height }: Box): void {
  sheet.path(`M${px(x)} ${px(y)}h${px(width)}v${px(height)}h${px(-width)}Z`, { color: sheet.palette.edge });
}

import type { FigureWords, KeyEntry } from '../data/panel-figure.ts';
import { type Box, px, type Sheet } from '../frame/sheet.ts';
import { dashes, sizes } from '../frame/theme.ts';
import { shorten, wrap } from '../text/fit-text.ts';
import { textWidth } from '../text/font.ts';

const margin = 12;
const sampleWidth = 26;
/** Height that is kept for the plots, their axes and the member, px. */
const leastPlot = 130;

/**
 * Writes title, subtitle and key at the top and the notes at the bottom.
 *
 * @returns the room that is left between them
 */
export function drawWords(sheet: Sheet, words: FigureWords, key: readonly KeyEntry[]): Box {
  const { ink, softInk } = sheet.palette;
  const width = sheet.width - 2 * margin;
  let y = 8;
  for (const line of wrap(words.title, sizes.title, width, 2)) {
    y += sizes.title + 3;
    sheet.text(margin, y - 3, line, sizes.title, { color: ink });
  }
  y += 3;
  for (const line of wrap(words.subtitle, sizes.body, width, 2)) {
    y += sizes.body + 3.5;
    sheet.text(margin, y - 3, line, sizes.body, { color: softInk });
  }
  y += 2;
  if (key.length > 0) y = drawKey(sheet, key, y + 2, width);

  const usual = sheet.height < 300 ? 2 : sheet.height < 500 ? 4 : 6;
  // what finds no room stands in the description
  const room = Math.floor((sheet.height - y - leastPlot) / (sizes.tick + 3.5));
  const most = Math.min(usual, Math.max(room, 0));
  const lines = wrapNotes(words.notes, width, most);
  const bottom = sheet.height - 8 - lines.length * (sizes.tick + 3.5);
  for (const [i, line] of lines.entries()) {
    sheet.text(margin, bottom + (i + 1) * (sizes.tick + 3.5) - 2, line, sizes.tick, { color: softInk });
  }
  return { x: margin, y: y + 4, width, height: bottom - y - (lines.length > 0 ? 10 : 4) };
}

/** Each note begins a line of its own; where they are too many lines they run on. */
function wrapNotes(notes: readonly string[], width: number, most: number): string[] {
  if (most === 0) return [];
  const apart = notes.flatMap((note) => wrap(note, sizes.tick, width));
  if (apart.length <= most) return apart;
  return wrap(notes.join(' '), sizes.tick, width, most);
}

function drawKey(sheet: Sheet, key: readonly KeyEntry[], top: number, width: number): number {
  let x = margin;
  let y = top + sizes.body;
  for (const { label, look, kind = 'line' } of key) {
    const text = shorten(label, sizes.tick, width - sampleWidth - 6);
    const needed = sampleWidth + 6 + textWidth(text, sizes.tick);
    if (x > margin && x + needed > margin + width) {
      x = margin;
      y += sizes.body + 3.5;
    }
    drawSample(sheet, x, y - 4, look, kind);
    sheet.text(x + sampleWidth + 6, y, text, sizes.tick, { color: sheet.palette.ink });
    x += needed + 18;
  }
  return y + 4;
}

function drawSample(
  sheet: Sheet,
  x: number,
  y: number,
  look: number,
  kind: NonNullable<KeyEntry['kind']>,
): void {
  const color = lineColor(sheet, look);
  const rectangle = `M${px(x)} ${px(y - 5)}h${sampleWidth}v10h${-sampleWidth}Z`;
  if (kind === 'area') sheet.area(rectangle, color, 0.18);
  else if (kind === 'bound') sheet.area(rectangle, color, 0.4);
  else if (kind === 'dot') sheet.circle(x + sampleWidth / 2, y, 3.5, sheet.palette.ink);
  else if (kind === 'stem') {
    sheet.line(x + sampleWidth / 2, y + 5, x + sampleWidth / 2, y - 4, { color, width: 1.5 });
    sheet.circle(x + sampleWidth / 2, y - 3, 2.6, color);
  } else sheet.line(x, y, x + sampleWidth, y, { color, width: 1.8, dash: lineDash(look) });
}

/** Colour of the curve of that number. */
export function lineColor(sheet: Sheet, look: number): string {
  const { lines, softInk } = sheet.palette;
  return look < 0 ? softInk : lines[look % lines.length];
}

export function lineDash(look: number): string {
  return look < 0 ? '' : dashes[look % dashes.length];
}

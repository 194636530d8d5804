import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
// oxlint-disable-next-line import/default -- Node takes its CommonJS file, whose exports are the default
import opentype, { type Font, type PathCommand } from 'opentype.js';

/** File of the one font that figures use, shipped with the service so that a bare container draws the same text. */
export const fontFile: string = createRequire(import.meta.url).resolve('dejavu-fonts-ttf/ttf/DejaVuSans.ttf');

/** Name of that font, and what a browser without it takes: Verdana has nearly the same widths, the rest is narrower. */
export const fontFamily = "'DejaVu Sans', Verdana, Geneva, sans-serif";

/** Side of the square in which outlines are given. */
export const emSize = 1000;

let font: Font | null = null;
const widths = new Map<string, number>();
const outlines = new Map<string, string>();

/** Read at the first figure of a thread: some 50 ms. */
function loadedFont(): Font {
  if (font === null) {
    const file = readFileSync(fontFile);
    const bytes = file.buffer.slice(file.byteOffset, file.byteOffset + file.byteLength);
    font = opentype.parse(bytes, { lowMemory: true });
  }
  return font;
}

/**
 * Width of a line of text in the font of the figures, px: the sum of the advance widths. Kerning, which
 * mostly pulls letters together, is left out; a character that the font lacks has the width of its box.
 *
 * @param size font size, px
 */
export function textWidth(text: string, size: number): number {
  let sum = 0;
  for (const character of text) sum += advanceOf(character);
  return sum * size;
}

/** Width of one character, fraction of the font size. */
export function advanceOf(character: string): number {
  let width = widths.get(character);
  if (width === undefined) {
    const { unitsPerEm } = loadedFont();
    width = (loadedFont().charToGlyph(character).advanceWidth ?? unitsPerEm) / unitsPerEm;
    remember(widths, character, width);
  }
  return width;
}

/** SVG path of one character on a base line at y = 0, y downwards, in units of 1/emSize of the font size. */
export function outlineOf(character: string): string {
  let outline = outlines.get(character);
  if (outline === undefined) {
    outline = pathOf(loadedFont().charToGlyph(character).getPath(0, 0, emSize).commands);
    remember(outlines, character, outline);
  }
  return outline;
}

/** The commands as path data; the library's own (2.0.0) runs "151 −0" together as "1510". */
function pathOf(commands: readonly PathCommand[]): string {
  const point = (x: number, y: number) => `${Math.round(x)} ${Math.round(y)}`;
  return commands
    .map((command) => {
      switch (command.type) {
        case 'M':
        case 'L':
          return command.type + point(command.x, command.y);
        case 'Q':
          return `Q${point(command.x1, command.y1)} ${point(command.x, command.y)}`;
        case 'C':
          return `C${point(command.x1, command.y1)} ${point(command.x2, command.y2)} ${point(command.x, command.y)}`;
        case 'Z':
          return 'Z';
      }
    })
    .join('');
}

/** Keeps what was found; names may hold any character, so a full memory is begun anew. */
function remember<Value>(memory: Map<string, Value>, character: string, value: Value): void {
  if (memory.size >= 2000) memory.clear();
  memory.set(character, value);
}

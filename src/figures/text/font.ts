import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import opentype, { type Font } from 'opentype.js';

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
    font = opentype.parse(bytes as ArrayBuffer, { lowMemory: true });
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
    outline = loadedFont().charToGlyph(character).getPath(0, 0, emSize).toPathData(0);
    remember(outlines, character, outline);
  }
  return outline;
}

/** Keeps what was found; names may hold any character, so a full memory is begun anew. */
function remember<Value>(memory: Map<string, Value>, character: string, value: Value): void {
  if (memory.size >= 2000) memory.clear();
  memory.set(character, value);
}

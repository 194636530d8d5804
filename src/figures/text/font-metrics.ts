import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';

/** File of the one font that figures use, shipped with the service so that a bare container draws the same text. */
export const fontFile: string = createRequire(import.meta.url).resolve('dejavu-fonts-ttf/ttf/DejaVuSans.ttf');

/** Name of that font, and what a browser without it takes: Verdana has nearly the same widths, the rest is narrower. */
export const fontFamily = "'DejaVu Sans', Verdana, Geneva, sans-serif";

/** Advance widths by code point, as fractions of the font size. */
let widths: ReadonlyMap<number, number> | null = null;

/**
 * Width of a line of text in the font of the figures, px: the sum of the advance widths. Kerning, which
 * mostly pulls letters together, is left out; a glyph that the font lacks counts as a full em.
 *
 * @param size font size, px
 */
export function textWidth(text: string, size: number): number {
  widths ??= readAdvances(readFileSync(fontFile));
  let sum = 0;
  for (const character of text) sum += widths.get(character.codePointAt(0) as number) ?? 1;
  return sum * size;
}

/**
 * Advance widths out of the tables head, hhea, hmtx and cmap (format 4: the basic plane) of a TrueType
 * file (ISO/IEC 14496-22).
 */
function readAdvances(file: Buffer): Map<number, number> {
  const table = new Map<string, number>();
  for (let t = 0; t < file.readUInt16BE(4); t++) {
    const record = 12 + 16 * t;
    table.set(file.toString('latin1', record, record + 4), file.readUInt32BE(record + 8));
  }
  const at = (name: string) => table.get(name) as number;
  const unitsPerEm = file.readUInt16BE(at('head') + 18);
  const measured = file.readUInt16BE(at('hhea') + 34);
  const advance = (glyph: number) =>
    file.readUInt16BE(at('hmtx') + 4 * Math.min(glyph, measured - 1)) / unitsPerEm;

  const result = new Map<number, number>();
  const map = formatFour(file, at('cmap'));
  const segments = file.readUInt16BE(map + 6) / 2;
  for (let s = 0; s < segments; s++) {
    const end = file.readUInt16BE(map + 14 + 2 * s);
    const start = file.readUInt16BE(map + 16 + 2 * (segments + s));
    const delta = file.readUInt16BE(map + 16 + 2 * (2 * segments + s));
    const offsetPlace = map + 16 + 2 * (3 * segments + s);
    const offset = file.readUInt16BE(offsetPlace);
    for (let code = start; code <= end && code < 0xffff; code++) {
      const raw = offset === 0 ? code : file.readUInt16BE(offsetPlace + offset + 2 * (code - start));
      const glyph = raw === 0 ? 0 : (raw + delta) & 0xffff;
      if (glyph !== 0) result.set(code, advance(glyph));
    }
  }
  return result;
}

/** Place of the sub-table of format 4 in the table cmap. */
function formatFour(file: Buffer, cmap: number): number {
  for (let t = 0; t < file.readUInt16BE(cmap + 2); t++) {
    const place = cmap + file.readUInt32BE(cmap + 4 + 8 * t + 4);
    if (file.readUInt16BE(place) === 4) return place;
  }
  throw new Error('the font of the figures has no character map of format 4');
}

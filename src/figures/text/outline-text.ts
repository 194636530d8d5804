import { advanceOf, emSize, outlineOf, textWidth } from './font.ts';

const entities: Readonly<Record<string, string>> = { amp: '&', lt: '<', gt: '>', quot: '"', '#39': "'" };

/**
 * A figure whose text elements are replaced by the outlines of their letters, so that a renderer needs no
 * font. Understands the text elements that a sheet writes: one line each, with x, y, font-size and
 * perhaps text-anchor; other attributes are kept.
 */
export function outlineText(svg: string): string {
  return svg.replace(/<text x="([^"]*)" y="([^"]*)" font-size="([^"]*)"([^>]*)>([^<]*)<\/text>/g, outlined);
}

function outlined(_: string, x: string, y: string, size: string, rest: string, content: string): string {
  const text = content.replace(/&(amp|lt|gt|quot|#39);/g, (_entity, name: string) => entities[name]);
  const anchor = /text-anchor="(\w+)"/.exec(rest)?.[1];
  const width = textWidth(text, Number(size));
  const start = Number(x) - (anchor === 'middle' ? width / 2 : anchor === 'end' ? width : 0);
  const scale = Number(size) / emSize;
  let letters = '';
  let at = 0;
  for (const character of text) {
    const outline = outlineOf(character);
    if (outline !== '') letters += `<path transform="translate(${Math.round(at)} 0)" d="${outline}"/>`;
    at += advanceOf(character) * emSize;
  }
  // widths of strokes are those of the sheet, not of the outlines
  const look = rest.replace(
    /stroke-width="([\d.]+)"/,
    (__, px: string) => `stroke-width="${Number(px) / scale}"`,
  );
  return `<g transform="translate(${start} ${y}) scale(${scale})"${look}>${letters}</g>`;
}

import { Resvg } from '@resvg/resvg-js';
import { outlineText } from './text/outline-text.ts';

/**
 * A figure as PNG, one pixel a px of the SVG, with the font that the service ships and no other.
 *
 * Text is turned into outlines first: the renderer would read the whole font file again for every letter,
 * which takes longer than all the rest.
 *
 * @param svg a figure of `drawFigure`
 */
export function rasterise(svg: string): Uint8Array {
  return new Resvg(outlineText(svg), { font: { loadSystemFonts: false } }).render().asPng();
}

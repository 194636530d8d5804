import { Resvg } from '@resvg/resvg-js';
import { fontFile } from './text/font-metrics.ts';

/**
 * A figure as PNG, one pixel a px of the SVG, with the font that the service ships and no other.
 *
 * @param svg a figure of `drawFigure`
 */
export function rasterise(svg: string): Uint8Array {
  const renderer = new Resvg(svg, {
    font: { fontFiles: [fontFile], loadSystemFonts: false, defaultFontFamily: 'DejaVu Sans' },
  });
  return renderer.render().asPng();
}

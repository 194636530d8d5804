import { Resvg } from '@resvg/resvg-js';

/** The PNG of an SVG. */
export function rasterise(svg: string): Uint8Array {
  return new Resvg(svg, { font: { loadSystemFonts: false } }).render().asPng();
}

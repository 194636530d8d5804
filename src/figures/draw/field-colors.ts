import { interpolateRdBu } from 'd3-scale-chromatic';
import type { Theme } from '../frame/theme.ts';

/** Steps of colour on either side of zero. */
export const colorSteps = 84;

/** Index of the colour of zero; positive steps follow, then negative ones, then negative ones of the hatching. */
export const negativeFrom = colorSteps;
export const hatchedFrom = 2 * colorSteps;

type Rgb = readonly [red: number, green: number, blue: number];

/**
 * The diverging colours of C. Brewer's scheme RdBu (ColorBrewer 2.0; safe for colour-blind readers), red
 * for positive values. On dark paper its order of lightness is turned round, so that zero is dark there.
 * Both its arms get equally dark in grey, so negative values have hatching, whose colour contrasts with
 * each step.
 *
 * @returns red, green, blue of every colour, shape [3 · (3 · colorSteps + 1)]
 */
export function fieldPalette(theme: Theme): Uint8Array {
  const colors: Rgb[] = [arm(0, theme)];
  for (let step = 1; step <= colorSteps; step++) colors.push(arm(step / colorSteps, theme));
  const negative = Array.from({ length: colorSteps }, (_, i) => arm(-(i + 1) / colorSteps, theme));
  colors.push(...negative);
  colors.push(...negative.map((color, i) => hatch(color, (i + 1) / colorSteps)));
  return Uint8Array.from(colors.flat(), (value) => Math.round(value));
}

/** Colour of a value between −1 and 1. */
function arm(value: number, theme: Theme): Rgb {
  if (theme === 'light') return parse(interpolateRdBu(0.5 - value / 2));
  // zero is the dark paper; beyond a third the scheme runs from its strong colours to its light ones
  const size = Math.abs(value);
  const sign = Math.sign(value);
  const dark: Rgb = [26, 31, 37];
  const strong = parse(interpolateRdBu(0.5 - sign * 0.38));
  const pale = parse(interpolateRdBu(0.5 - sign * 0.12));
  return size < 0.6 ? mix(dark, strong, size / 0.6) : mix(strong, pale, (size - 0.6) / 0.4);
}

function hatch(color: Rgb, size: number): Rgb {
  const [red, green, blue] = color;
  const luminance = (0.2126 * red + 0.7152 * green + 0.0722 * blue) / 255;
  const strength = Math.min(1, 4 * size);
  return luminance > 0.45
    ? mix(color, [0, 0, 0], 0.3 * strength)
    : mix(color, [255, 255, 255], 0.4 * strength);
}

function mix(from: Rgb, to: Rgb, part: number): Rgb {
  return [0, 1, 2].map((i) => from[i] + (to[i] - from[i]) * part) as unknown as Rgb;
}

function parse(color: string): Rgb {
  return (color.match(/\d+/g) ?? []).map(Number) as unknown as Rgb;
}

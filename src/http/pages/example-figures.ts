import type { View } from '../../figures/views.ts';
import type { Example } from './example.ts';

/** A figure of an example: where it is drawn for either theme, and what is to be seen. */
export interface FigureLink {
  readonly caption: string;
  readonly light: string;
  readonly dark: string;
  readonly alt: string;
}

/** Size of every figure of the page in CSS pixels. */
export const figureSize = { width: 640, height: 400 } as const;

const wordsOfView: Readonly<Record<View, string>> = {
  shapes: 'mode shapes',
  frequencies: 'natural frequencies and effective mass',
  history: 'displacement over time',
  snapshots: 'displacement along the member at several times',
  'heat-map': 'displacement over position and time',
  envelope: 'largest displacement along the member, with its certified bound',
  convergence: 'captured energy and bound against the modes kept',
  transfer: 'magnitude and phase over frequency',
  'force-history': 'force over time',
};

/** What is best seen of each example. */
const viewsOfExample: Readonly<Record<string, readonly View[]>> = {
  'layered-soil-modes': ['shapes', 'frequencies'],
  'stay-cable-release': ['snapshots', 'envelope'],
  'tie-rod-end-mass': ['history', 'convergence'],
  'struck-pile': ['force-history', 'history'],
  'stepped-drive-shaft': ['history', 'snapshots'],
  'machine-on-tie-rod': ['history', 'force-history'],
  'shaken-soil-column': ['history', 'heat-map'],
  'load-crossing-cable': ['heat-map', 'snapshots'],
  'soil-column-transfer': ['transfer'],
};

/**
 * The figures to show of an example whose result is known.
 *
 * @param resultUrl where the result is, `/v1/results/{digest}`
 */
export function figureLinksOf({ name, title }: Example, resultUrl: string): FigureLink[] {
  const { width, height } = figureSize;
  return (viewsOfExample[name] ?? []).map((view) => {
    const words = wordsOfView[view];
    const drawn = `${resultUrl}?format=svg&view=${view}&width=${width}&height=${height}`;
    return {
      caption: words.charAt(0).toUpperCase() + words.slice(1),
      light: `${drawn}&theme=light`,
      dark: `${drawn}&theme=dark`,
      alt: `${title}: ${words}`,
    };
  });
}

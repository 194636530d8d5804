import type { View } from '../../figures/views.ts';
import type { Example } from './example.ts';

/** One drawing of a figure, for one kind of screen. */
export interface Drawing {
  readonly url: string;
  /** When a browser takes it, as a media query; '' for the one that is always possible. */
  readonly media: string;
  /** CSS px */
  readonly width: number;
  /** CSS px */
  readonly height: number;
}

/** A figure of an example, and what is to be seen on it. */
export interface FigureLink {
  readonly alt: string;
  /** The first whose media query holds is shown; the last always can be. */
  readonly drawings: readonly Drawing[];
}

/** Drawn for a telephone, so that its words stay readable, and for everything wider. */
const screens = [
  { narrow: true, width: 400, height: 360 },
  { narrow: false, width: 500, height: 370 },
] as const;

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
  return (viewsOfExample[name] ?? []).map((view) => {
    return {
      alt: `${title}: ${wordsOfView[view]}`,
      drawings: screens.flatMap((screen) => [
        drawing(resultUrl, view, screen, 'dark'),
        drawing(resultUrl, view, screen, 'light'),
      ]),
    };
  });
}

function drawing(
  resultUrl: string,
  view: View,
  { narrow, width, height }: (typeof screens)[number],
  theme: 'light' | 'dark',
): Drawing {
  const conditions = [
    ...(narrow ? ['(max-width: 36rem)'] : []),
    ...(theme === 'dark' ? ['(prefers-color-scheme: dark)'] : []),
  ];
  return {
    url: `${resultUrl}?format=svg&view=${view}&width=${width}&height=${height}&theme=${theme}`,
    media: conditions.join(' and '),
    width,
    height,
  };
}

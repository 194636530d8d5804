/** A figure that an answer can be shown as. */
export type View =
  | 'shapes'
  | 'frequencies'
  | 'history'
  | 'snapshots'
  | 'heat-map'
  | 'envelope'
  | 'convergence'
  | 'transfer'
  | 'force-history';

/** An operation whose answers can be drawn. */
export type FigureOperation = 'modes' | 'responses' | 'transfer-functions';

/** The views of each operation; the first one is shown where none is asked for. */
export const viewsOf: Readonly<Record<FigureOperation, readonly View[]>> = {
  modes: ['shapes', 'frequencies'],
  responses: ['history', 'snapshots', 'heat-map', 'envelope', 'convergence', 'force-history'],
  'transfer-functions': ['transfer'],
};

/** Sizes that can be drawn, CSS pixels: below them the words find no room, above them a picture is no picture. */
export const figureSizes = { width: { least: 320, most: 4096 }, height: { least: 240, most: 4096 } } as const;

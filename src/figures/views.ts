/** Figures of an answer. */
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

/** The views of every operation, the default first. */
export const viewsOf: Readonly<Record<'modes' | 'responses' | 'transfer-functions', readonly View[]>> = {
  modes: ['shapes', 'frequencies'],
  responses: ['history', 'snapshots', 'heat-map', 'envelope', 'convergence', 'force-history'],
  'transfer-functions': ['transfer'],
};

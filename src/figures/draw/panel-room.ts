/** How panels stand on the sheet. */
export interface PanelGrid {
  readonly columns: number;
  readonly rows: number;
}

/** Widest and flattest panels that still read well, px. */
const leastRow = 70;
const leastColumn = 165;
const leastUprightColumn = 92;
const leastUprightRow = 240;
/** Room for words and axes around the panels, and for the member above them, px. */
const words = 150;
const strip = 45;
const gutter = 60;

/**
 * How many panels a sheet has room for at most.
 *
 * @param common what the panels have in common: time (one below the other), position, or upright position
 */
export function panelRoom(width: number, height: number, common: 'time' | 'position' | 'upright'): number {
  const { columns, rows } = largestGrid(width, height, common);
  return columns * rows;
}

function largestGrid(width: number, height: number, common: 'time' | 'position' | 'upright'): PanelGrid {
  const across = common === 'upright' ? leastUprightColumn : leastColumn;
  const down = common === 'upright' ? leastUprightRow : leastRow;
  return {
    columns: common === 'time' ? 1 : Math.min(8, Math.max(1, Math.floor((width - gutter) / across))),
    rows: Math.min(8, Math.max(1, Math.floor((height - words - (common === 'position' ? strip : 0)) / down))),
  };
}

/** The grid for so many panels: few rows where panels are upright, few columns where they lie. */
export function gridFor(
  count: number,
  width: number,
  height: number,
  common: 'time' | 'position' | 'upright',
): PanelGrid {
  const { columns, rows } = largestGrid(width, height, common);
  if (common === 'upright') {
    const needed = Math.max(1, Math.ceil(count / columns));
    return { columns: Math.ceil(count / needed), rows: needed };
  }
  // lying panels look best three to six times as wide as high: a second column once rows get flat
  const lines = Math.max(1, Math.min(rows, count));
  let wanted = Math.ceil(count / lines);
  while (
    wanted < columns &&
    count > wanted &&
    (height - words) / Math.ceil(count / wanted) < (width - gutter) / wanted / 4
  ) {
    wanted++;
  }
  return { columns: wanted, rows: Math.ceil(count / wanted) };
}

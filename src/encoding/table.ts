/** One column of a table. */
export interface Column {
  /** The key of the answer, or one made of such keys. */
  readonly name: string;
  /** SI unit in UCUM code where there is one, "1" for a ratio; null for counts and texts. */
  readonly unit: string | null;
  readonly type: 'number' | 'integer' | 'text';
  /** Its values, null where the answer has none. */
  readonly values: ArrayLike<number | null> | ArrayLike<string>;
  /**
   * Rows that one value serves before the next one comes; after the last value the first one comes
   * again. So a grid is written down once, not once a row.
   */
  readonly each: number;
}

/** Values by rows and columns. */
export interface Table {
  readonly rows: number;
  readonly columns: readonly Column[];
}

/** A column with a value of its own for every row. */
export function column(
  name: string,
  unit: string | null,
  values: Column['values'],
  type: Column['type'] = 'number',
): Column {
  return { name, unit, type, values, each: 1 };
}

/** Place in `values` of the value of a row. */
export function placeOf({ values, each }: Column, row: number): number {
  return Math.floor(row / each) % values.length;
}

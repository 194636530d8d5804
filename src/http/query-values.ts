/** Reads the text of one query parameter: its value, or what is wanted instead. */
export type ReadValue<Value> = (text: string) => { readonly value: Value } | { readonly wanted: string };

export interface NumberRange {
  readonly minimum: number;
  readonly maximum: number;
  readonly whole?: boolean;
  readonly unit?: string;
}

/** One of several words, written as they are. */
export function oneOf<Word extends string>(words: readonly Word[]): ReadValue<Word> {
  return (text) => {
    const value = words.find((word) => word === text);
    return value === undefined ? { wanted: `one of: ${words.join(', ')}` } : { value };
  };
}

/** A decimal number in a range. */
export function numberBetween(range: NumberRange): ReadValue<number> {
  const { minimum, maximum, whole, unit } = range;
  const wanted = `a ${whole ? 'whole ' : ''}number from ${minimum} to ${maximum}${unit === undefined ? '' : ` ${unit}`}`;
  return (text) => {
    const value = decimal(text, range);
    return value === null ? { wanted } : { value };
  };
}

/**
 * Numbers with commas between them.
 *
 * @param what the numbers are, for the fault
 * @param most entries
 */
export function listOf(what: string, most: number, range: NumberRange): ReadValue<readonly number[]> {
  const wanted = `1 to ${most} ${what} with commas between them`;
  return (text) => {
    const values = text.split(',').map((entry) => decimal(entry, range));
    return values.length > most || values.includes(null) ? { wanted } : { value: values as number[] };
  };
}

/** A decimal number as JSON writes one, null where it is none or out of range. */
function decimal(text: string, { minimum, maximum, whole }: NumberRange): number | null {
  if (!/^-?\d{1,40}(\.\d{1,40})?([eE][+-]?\d{1,4})?$/.test(text)) return null;
  // −0 + 0 is 0.
  const value = Number(text) + 0;
  if (value < minimum || value > maximum || (whole && !Number.isInteger(value))) return null;
  return value;
}

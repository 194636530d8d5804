/** A value of a request as a wording shows it: JSON, cut to about 60 characters. */
export function showValue(value: unknown): string {
  if (Array.isArray(value)) return value.length === 0 ? 'an empty list' : `a list of ${value.length}`;
  if (value !== null && typeof value === 'object') return 'an object';
  if (typeof value === 'string') return shortText(value);
  return String(value);
}

/** A text in quotes, cut to about 60 characters without splitting one. */
export function shortText(text: string): string {
  const characters = Array.from(text.slice(0, 130));
  return JSON.stringify(characters.length > 60 ? `${characters.slice(0, 57).join('')}…` : text);
}

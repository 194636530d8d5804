import { textWidth } from './font.ts';

/** The text, or as much of its beginning as fits into the width (px) with an ellipsis. */
export function shorten(text: string, size: number, width: number): string {
  if (textWidth(text, size) <= width) return text;
  const characters = Array.from(text);
  let low = 0;
  let high = characters.length;
  while (low < high) {
    const mid = (low + high + 1) >> 1;
    if (textWidth(characters.slice(0, mid).join('').trimEnd() + '…', size) <= width) low = mid;
    else high = mid - 1;
  }
  return characters.slice(0, low).join('').trimEnd() + '…';
}

/**
 * The text broken at blanks into lines that fit the width (px); a single word that does not fit is
 * shortened, and so is the last line where more than `most` would be needed.
 */
export function wrap(text: string, size: number, width: number, most = 99): string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ')) {
    const longer = line === '' ? word : `${line} ${word}`;
    if (line === '' || textWidth(longer, size) <= width) line = longer;
    else {
      lines.push(line);
      line = word;
    }
  }
  if (line !== '') lines.push(line);
  if (lines.length > most) lines.splice(most - 1, lines.length, lines.slice(most - 1).join(' '));
  return lines.map((each) => shorten(each, size, width));
}

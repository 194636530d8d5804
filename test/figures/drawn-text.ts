import { textWidth } from '../../src/figures/text/font.ts';

/** A line of text of a figure and the room it takes, px. */
export interface DrawnText {
  readonly text: string;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** Height of the tallest letters and depth of the lowest ones of DejaVu Sans, fractions of the font size. */
const ascent = 0.76;
const descent = 0.24;

const entities: Readonly<Record<string, string>> = {
  '&amp;': '&',
  '&lt;': '<',
  '&gt;': '>',
  '&quot;': '"',
  '&#39;': "'",
};

/** Every text element of a figure with its box. */
export function drawnTexts(svg: string): DrawnText[] {
  return [...svg.matchAll(/<text ([^>]*)>([^<]*)<\/text>/g)].map(([, attributes, content]) => {
    const read = (name: string) => new RegExp(`(?:^| )${name}="([^"]*)"`).exec(attributes)?.[1];
    const text = content.replace(/&(amp|lt|gt|quot|#39);/g, (entity) => entities[entity]);
    const size = Number(read('font-size'));
    const width = textWidth(text, size);
    const anchor = read('text-anchor') ?? 'start';
    const left = Number(read('x')) - (anchor === 'end' ? width : anchor === 'middle' ? width / 2 : 0);
    const y = Number(read('y'));
    return { text, left, right: left + width, top: y - ascent * size, bottom: y + descent * size };
  });
}

/** Texts that touch each other or leave the sheet, one sentence each. */
export function findCollisions(svg: string): string[] {
  const texts = drawnTexts(svg);
  const [, width, height] = /width="(\d+)" height="(\d+)"/.exec(svg) ?? [];
  const slack = 0.6;
  const found: string[] = [];
  texts.forEach((a, i) => {
    if (a.left < 0 || a.top < 0 || a.right > Number(width) + slack || a.bottom > Number(height) + slack) {
      found.push(`"${a.text}" leaves the sheet`);
    }
    for (const b of texts.slice(i + 1)) {
      if (
        a.left < b.right - slack &&
        b.left < a.right - slack &&
        a.top < b.bottom - slack &&
        b.top < a.bottom - slack
      ) {
        found.push(`"${a.text}" touches "${b.text}"`);
      }
    }
  });
  return found;
}

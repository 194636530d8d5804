import { html, type Markup } from './markup.ts';

/** One paragraph of the description, without its bold title. */
export interface Paragraph {
  /** '' where it has none. */
  readonly title: string;
  readonly text: string;
}

/**
 * The paragraphs of a description in Markdown, as the reference document has it: parted by blank
 * lines, each with a bold title in front or none.
 */
export function paragraphsOf(description: string): Paragraph[] {
  return description
    .trim()
    .split(/\n\s*\n/)
    .map((paragraph) => {
      const text = paragraph.trim().replace(/\s+/g, ' ');
      const titled = /^\*\*(?<title>[^*]+?)\.?\*\* (?<rest>.*)$/.exec(text)?.groups;
      return titled === undefined ? { title: '', text } : { title: titled.title, text: titled.rest };
    });
}

/** @throws Error where the description has no such paragraph: the page would lack what it must say */
export function paragraphOf(description: string, title: string): string {
  const found = paragraphsOf(description).find((paragraph) => paragraph.title === title);
  if (found === undefined) throw new Error(`The reference document has no paragraph "${title}".`);
  return found.text;
}

/** The text with its `code` as HTML. */
export function inlineCode(text: string): Markup {
  const pieces = text.split('`');
  return html`${pieces.map((piece, i) => (i % 2 === 0 ? piece : html`<code>${piece}</code>`))}`;
}

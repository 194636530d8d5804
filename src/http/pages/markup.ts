/** Text that is HTML already and is not escaped again. */
export class Markup {
  readonly text: string;

  constructor(text: string) {
    this.text = text;
  }
}

export type Content = Markup | string | number | readonly Content[];

/** HTML with every inserted text escaped; lists are joined, markup is taken as it is. */
export function html(pieces: TemplateStringsArray, ...contents: readonly Content[]): Markup {
  return new Markup(pieces.reduce((text, piece, i) => text + written(contents[i - 1]) + piece));
}

function written(content: Content): string {
  if (content instanceof Markup) return content.text;
  if (typeof content === 'string') return escapeText(content);
  if (typeof content === 'number') return String(content);
  return content.map(written).join('');
}

const entities: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** Safe in the text of an element and in a quoted attribute. */
function escapeText(text: string): string {
  return text.replace(/[&<>"']/g, (character) => entities[character]);
}

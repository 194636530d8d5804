import { formatsOf, type Format } from '../../pool/answer-form.ts';
import { exampleUrl, solveUrl, type Example } from './example.ts';
import { figureLinksOf, type FigureLink } from './example-figures.ts';
import { html, type Markup } from './markup.ts';

/** Figures at the top are fetched at once, the rest when they come near. */
export type Loading = 'eager' | 'lazy';

/** What the forms of an answer are called in its links. */
const nameOfForm: Readonly<Record<Format, string>> = {
  json: 'JSON',
  csv: 'CSV',
  arrow: 'Arrow',
  svg: 'SVG',
  png: 'PNG',
  xml: 'XML',
};

/**
 * One example: its figures, links to its answer, the command that solves it, its request.
 *
 * @param resultUrl where its answer is
 * @param origin scheme, host and port for the command
 */
export function exampleSection(
  example: Example,
  resultUrl: string,
  origin: string,
  loading: Loading,
): Markup {
  const { name, title, text } = example;
  const [source, target] = [exampleUrl(example), solveUrl(example)];
  const figures = figureLinksOf(example, resultUrl);
  const command = [
    `curl -s ${origin}${source} |`,
    `  curl -s ${origin}${target} -H 'content-type: application/json' -d @-`,
  ].join('\n');
  return html`
    <article id="${name}" aria-labelledby="${name}-title">
      <header>
        <h4 id="${name}-title">${title}</h4>
        <p class="operation"><code>POST ${target}</code></p>
      </header>
      ${figures.length > 0 ? html`<div class="figures">${figures.map((link) => figure(link, loading))}</div>` : ''}
      <p class="forms">
        The answer:
        ${formatsOf[example.operation].map(
          (form) => html`<a href="${resultUrl}?format=${form}">${nameOfForm[form]}</a> `,
        )}
      </p>
      <p class="label" id="${name}-command">Solve it from a shell</p>
      <pre tabindex="0" role="region" aria-labelledby="${name}-command"><code>${command}</code></pre>
      <details>
        <summary>The request</summary>
        <p><a href="${source}">${name}.json</a>, to copy:</p>
        <pre tabindex="0" role="region" aria-label="Request: ${title}"><code>${text.trim()}</code></pre>
      </details>
    </article>
  `;
}

function figure({ alt, drawings }: FigureLink, loading: Loading): Markup {
  const always = drawings[drawings.length - 1];
  return html`
    <figure>
      <picture>
        ${drawings
          .slice(0, -1)
          .map(
            ({ url, media, width, height }) =>
              html`<source media="${media}" srcset="${url}" width="${width}" height="${height}" /> `,
          )}
        <img
          src="${always.url}"
          alt="${alt}"
          width="${always.width}"
          height="${always.height}"
          loading="${loading}"
        />
      </picture>
    </figure>
  `;
}

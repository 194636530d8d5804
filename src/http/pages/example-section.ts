import { exampleUrl, type Example } from './example.ts';
import { captionOf, figureSize, type FigureLink } from './example-figures.ts';
import { html, type Markup } from './markup.ts';

/** Figures above the fold are fetched at once, the rest when they come near. */
export type Loading = 'eager' | 'lazy';

/**
 * One example: its figures, the command that solves it, its request.
 *
 * @param origin scheme, host and port for the command
 */
export function exampleSection(
  example: Example,
  figures: readonly FigureLink[],
  origin: string,
  loading: Loading,
): Markup {
  const { name, title, url, text } = example;
  const command = [
    `curl -s ${origin}${exampleUrl(name)} |`,
    `  curl -s ${origin}${url} -H 'content-type: application/json' -d @-`,
  ].join('\n');
  return html`
    <article id="${name}" aria-labelledby="${name}-title">
      <header>
        <h4 id="${name}-title">${title}</h4>
        <p class="operation"><code>POST ${url}</code></p>
      </header>
      ${
        figures.length === 0
          ? ''
          : html`<div class="figures">${figures.map((link) => figure(link, loading))}</div>`
      }
      <p class="label" id="${name}-command">Solve it from a shell</p>
      <pre tabindex="0" role="region" aria-labelledby="${name}-command"><code>${command}</code></pre>
      <details>
        <summary>The request</summary>
        <p><a href="${exampleUrl(name)}">${name}.json</a>, to copy:</p>
        <pre tabindex="0" role="region" aria-label="Request: ${title}"><code>${text.trim()}</code></pre>
      </details>
    </article>
  `;
}

function figure({ view, light, dark, alt }: FigureLink, loading: Loading): Markup {
  const { width, height } = figureSize;
  return html`
    <figure>
      <picture>
        <source media="(prefers-color-scheme: dark)" srcset="${dark}" />
        <img src="${light}" alt="${alt}" width="${width}" height="${height}" loading="${loading}" />
      </picture>
      <figcaption>${captionOf(view)}</figcaption>
    </figure>
  `;
}

import type { Operation } from '../../contract/read-request.ts';
import { inlineCode, paragraphOf, paragraphsOf } from './description.ts';
import type { Example } from './example.ts';
import { exampleSection } from './example-section.ts';
import { html, type Markup } from './markup.ts';
import type { ServiceLimit } from './service-limits.ts';

export interface StartPage {
  /** `info` of the reference document: the wording of what the service is and is not. */
  readonly info: {
    readonly title: string;
    readonly version: string;
    readonly summary: string;
    readonly description: string;
  };
  readonly limits: readonly ServiceLimit[];
  /** Longest time from the arrival of a request to its answer, s. */
  readonly solveDeadline: number;
  readonly examples: readonly Example[];
  /** Where the answer of each example is, in their order. */
  readonly resultUrls: readonly string[];
  /** Scheme, host and port through which the page was asked. */
  readonly origin: string;
  readonly styleUrl: string;
  readonly iconUrl: string;
}

const links = [
  { url: '/docs', text: 'Reference', what: 'every key, unit and default; requests can be tried there' },
  { url: '/openapi.yaml', text: 'OpenAPI, YAML', what: 'the reference as a document, to build clients from' },
  { url: '/openapi.json', text: 'OpenAPI, JSON', what: 'the same' },
  { url: '/health/live', text: 'Live', what: 'whether the process answers' },
  { url: '/health/ready', text: 'Ready', what: 'whether the solvers take work' },
];

/** What the operations are called on the page. */
const headingOfOperation: Readonly<Record<Operation, string>> = {
  modes: 'Natural modes',
  responses: 'Motion',
  'transfer-functions': 'Steady state over frequency',
  checks: 'Checks',
};

/** Examples whose figures are fetched at once. */
const eagerExamples = 1;

/** The page `/` for people: HTML that needs no script. */
export function startPage(page: StartPage): string {
  const { info, examples, styleUrl, iconUrl } = page;
  const operations = [...new Set(examples.map(({ operation }) => operation))];
  const document = html`
    <html lang="en">
      <head>
        <meta charset="utf-8" />
        <title>${info.title}</title>
        <meta name="viewport" content="width=device-width" />
        <meta name="description" content="${info.summary}" />
        <meta name="color-scheme" content="light dark" />
        <link rel="icon" type="image/svg+xml" href="${iconUrl}" />
        <link rel="stylesheet" href="${styleUrl}" />
      </head>
      <body>
        <a class="skip" href="#main">Skip to the content</a>
        <header class="top">
          <div class="name">
            <img src="${iconUrl}" alt="" width="48" height="48" />
            <h1>${info.title}</h1>
            <p class="version">version ${info.version}</p>
          </div>
          <p class="summary">${info.summary}</p>
          <nav aria-label="On this page">
            <a href="#examples">Examples</a>
            <a href="#limits">Limits</a>
            <a href="#cautions">Cautions</a>
            <a href="#links">Links</a>
            <a href="/docs">Reference</a>
          </nav>
        </header>
        <main id="main">
          <div class="opening">
            <p class="job">${inlineCode(paragraphsOf(info.description)[0].text)}</p>
            ${cautions(info.description)}
          </div>
          <section id="examples" aria-labelledby="examples-title">
            <h2 id="examples-title">Examples</h2>
            <p>
              Each is a complete request; its figures are drawn by this service from the answer that it gives.
            </p>
            ${operations.map((operation, i) => operationExamples(page, operation, i === 0))}
          </section>
          ${limitTable(page)} ${linkList()}
        </main>
        <footer>
          <p>${info.title} ${info.version}</p>
        </footer>
      </body>
    </html>
  `;
  return `<!doctype html>\n${document.text.trim()}\n`;
}

function cautions(description: string): Markup {
  return html`
    <aside id="cautions" aria-labelledby="cautions-title">
      <h2 id="cautions-title">Before you rely on a number</h2>
      <p>${inlineCode(paragraphOf(description, 'Caution'))}</p>
      <p>${inlineCode(paragraphOf(description, 'Bounds'))}</p>
    </aside>
  `;
}

function operationExamples(page: StartPage, operation: Operation, first: boolean): Markup {
  const { examples, resultUrls, origin } = page;
  const shown = examples
    .map((example, i) => ({ example, resultUrl: resultUrls[i] }))
    .filter(({ example }) => example.operation === operation);
  return html`
    <h3>${headingOfOperation[operation]}</h3>
    ${shown.map(({ example, resultUrl }, i) =>
      exampleSection(example, resultUrl, origin, first && i < eagerExamples ? 'eager' : 'lazy'),
    )}
  `;
}

function limitTable({ limits, solveDeadline }: StartPage): Markup {
  const rows = [...limits, { what: 'time from a request to its answer', limit: `${solveDeadline} s` }];
  return html`
    <section id="limits" aria-labelledby="limits-title">
      <h2 id="limits-title">Limits of this instance</h2>
      <table>
        <thead>
          <tr>
            <th scope="col">What</th>
            <th scope="col">At most</th>
          </tr>
        </thead>
        <tbody>
          ${rows.map(
            ({ what, limit }) =>
              html`<tr>
                <th scope="row">${what}</th>
                <td>${limit}</td>
              </tr>`,
          )}
        </tbody>
      </table>
    </section>
  `;
}

function linkList(): Markup {
  return html`
    <section id="links" aria-labelledby="links-title">
      <h2 id="links-title">Links</h2>
      <dl>
        ${links.map(
          ({ url, text, what }) => html`
            <div>
              <dt><a href="${url}">${text}</a> <code>${url}</code></dt>
              <dd>${what}</dd>
            </div>
          `,
        )}
      </dl>
    </section>
  `;
}

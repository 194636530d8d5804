import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readRepositoryFile } from '../house/repository.ts';
import { viewsOf } from '../../src/figures/views.ts';
import { figureLinksOf } from '../../src/http/pages/example-figures.ts';
import { exchange, startTrialService, type TrialService } from './trial-service.ts';
import { trialPages } from './trial-pages.ts';

const { examples } = trialPages;
let service: TrialService;
beforeAll(async () => {
  service = await startTrialService();
});
afterAll(async () => {
  await service.app.close();
});
const pageText = async (): Promise<string> => (await fetch(`${service.url}/`)).text();
/** The status of an answer that is read to its end: else its connection would stay open. */
const statusOf = async (address: string | URL): Promise<number> => {
  const response = await fetch(address);
  await response.arrayBuffer();
  return response.status;
};
const unescaped = (text: string): string =>
  text
    .replaceAll('&lt;', '<')
    .replaceAll('&gt;', '>')
    .replaceAll('&quot;', '"')
    .replaceAll('&#39;', "'")
    .replaceAll('&amp;', '&');

describe('the start page', () => {
  it('is HTML that runs no script and fetches nothing from elsewhere', async () => {
    const response = await fetch(`${service.url}/`);
    expect([response.status, response.headers.get('content-type')]).toEqual([
      200,
      'text/html; charset=utf-8',
    ]);
    expect(response.headers.get('content-security-policy')).toMatch(/^default-src 'none'; style-src 'self'/);
    const text = await response.text();
    expect(text).toMatch(/^<!doctype html>\n<html lang="en">/);
    expect(text).not.toMatch(/<script|\son\w+=|style="|(?:src|href|srcset)="(?:https?:)?\/\//);
  });

  it('says the job in the words of the README and the reference document', async () => {
    const job = readRepositoryFile('README.md').split('\n')[2];
    expect(job).toMatch(/^A vibration or structural-dynamics engineer/);
    expect(unescaped(await pageText())).toContain(job);
  });

  it('shows every example with its request, its command and its figures', async () => {
    const text = await pageText();
    for (const example of examples) {
      const { name, title, text: request } = example;
      const article = text.slice(text.indexOf(`<article id="${name}"`)).split('</article>')[0];
      const shown = unescaped(article);
      expect(shown).toContain(title);
      expect(shown).toContain(request.trim());
      expect(shown).toContain(
        `curl -s ${service.url}/examples/${name}.json |\n  curl -s ${service.url}/v1/${example.operation} -H 'content-type: application/json' -d @-`,
      );
      const figures = [...article.matchAll(/<img\s+src="([^"]*)"\s+alt="([^"]*)"/g)];
      // Verdicts have no figures.
      if (example.operation === 'checks') expect(figures).toHaveLength(0);
      else expect(figures.length).toBeGreaterThan(0);
      for (const [, source, alt] of figures) {
        expect(unescaped(source)).toMatch(
          /^\/v1\/results\/[\w-]+\?format=svg&view=[\w-]+&width=\d+&height=\d+&theme=light$/,
        );
        expect(unescaped(alt).startsWith(`${title}: `)).toBe(true);
      }
      const dark = article.match(/media="[^"]*\(prefers-color-scheme: dark\)"\s+srcset="[^"]*theme=dark"/g);
      expect(dark ?? []).toHaveLength(2 * figures.length);
      const narrow = article.match(/media="\(max-width: 36rem\)[^"]*"\s+srcset="[^"]*width=400/g);
      expect(narrow ?? []).toHaveLength(2 * figures.length);
    }
  });

  it('shows each of the views somewhere, and of each example only what its operation has', () => {
    const shown = examples.flatMap((example) => {
      const views = figureLinksOf(example, '/r').flatMap(({ drawings }) =>
        drawings.map(({ url }) => new URL(url, service.url).searchParams.get('view')),
      );
      const own: readonly string[] = example.operation === 'checks' ? [] : viewsOf[example.operation];
      expect(own).toEqual(expect.arrayContaining(views));
      return views;
    });
    expect(new Set(shown)).toEqual(new Set(Object.values(viewsOf).flat()));
  });

  it('lists the limits that the README lists', async () => {
    const readme = readRepositoryFile('README.md').split('## Limits')[1].split('## ')[0];
    const listed = [...readme.matchAll(/^\| (?!what|---)(.*?) +\| (.*?) +\|$/gm)].map(([, ...row]) => row);
    const table = (await pageText()).split('<tbody>')[1].split('</tbody>')[0];
    const shown = [...table.matchAll(/<th scope="row">\s*([^<]*?)\s*<\/th>\s*<td>\s*([^<]*?)\s*<\/td>/g)].map(
      ([, ...row]) => row,
    );
    expect(shown).toEqual([...listed, ['time from a request to its answer', '30 s']]);
  });

  it('leads only to what is served', async () => {
    const text = await pageText();
    const ids = [...text.matchAll(/\bid="([^"]*)"/g)].map(([, id]) => id);
    expect(new Set(ids).size).toBe(ids.length);
    const targets = new Set([...text.matchAll(/(?:href|src)="([^"]*)"/g)].map(([, url]) => unescaped(url)));
    expect(targets.size).toBeGreaterThan(15);
    for (const target of targets) {
      if (target.startsWith('#')) expect(ids).toContain(target.slice(1));
      // Results have their own tests.
      else if (!target.startsWith('/v1/results/'))
        expect([target, await statusOf(service.url + target)]).toEqual([target, 200]);
    }
  });

  it.each([
    ['calc.example:8443', 'http://calc.example:8443'],
    ['[::1]:8080', 'http://[::1]:8080'],
  ])('shows commands for the host it was asked through: %s', async (host, origin) => {
    const answer = await exchange(
      service.port,
      `GET / HTTP/1.1\r\nhost: ${host}\r\nconnection: close\r\n\r\n`,
    );
    expect(answer).toContain(`curl -s ${origin}/v1/modes `);
  });

  it.each([`a"><script>alert(1)</script>`, 'a;reboot', '$(reboot)', "a'b", 'a/b?c'])(
    'never shows a host that is none: %s',
    async (host) => {
      const answer = await exchange(
        service.port,
        `GET / HTTP/1.1\r\nhost: ${host}\r\nconnection: close\r\n\r\n`,
      );
      expect(answer).toMatch(/^HTTP\/1\.1 200 /);
      expect(answer).not.toContain(host);
      expect(answer).toContain(`curl -s http://127.0.0.1:${service.port}/v1/modes `);
    },
  );

  it('has assets whose address changes with their bytes, so that they may be kept', async () => {
    const [, style] = /<link rel="stylesheet" href="([^"]*)"/.exec(await pageText())!;
    const response = await fetch(service.url + style);
    expect(response.headers.get('content-type')).toBe('text/css; charset=utf-8');
    expect(await response.text()).toContain('prefers-color-scheme: dark');
    expect(response.headers.get('cache-control')).toMatch(/immutable/);
    expect(style).toMatch(/\?[\w-]{12}$/);
  });

  it('serves each example as it is written', async () => {
    for (const { name } of examples) {
      const response = await fetch(`${service.url}/examples/${name}.json`);
      const file = new URL(`../../schemas/examples/${name}.json`, import.meta.url);
      expect(await response.text()).toBe(readFileSync(file, 'utf8'));
    }
  });
});

describe('what every client gets alike', () => {
  it.each([
    '/',
    '/docs/',
    '/docs/json',
    '/docs/static/swagger-ui-bundle.js',
    '/openapi.yaml',
    '/openapi.json',
  ])('is packed where the client unpacks: %s', async (url) => {
    const get = (coding: string): Promise<Response> =>
      fetch(service.url + url, { headers: { 'accept-encoding': coding } });
    const [plain, packed] = [await get('identity'), await get('gzip')];
    expect([plain.headers.get('content-encoding'), packed.headers.get('content-encoding')]).toEqual(
      url === '/docs/' ? [null, null] : [null, 'gzip'],
    );
    if (url !== '/docs/') expect(packed.headers.get('vary')).toMatch(/accept-encoding/i);
    expect(packed.headers.get('content-type')).toBe(plain.headers.get('content-type'));
    expect(await packed.text()).toBe(await plain.text());
  });
});

describe('the reference page', () => {
  it.each(['/docs', '/docs/'])(
    'is served at %s, with every asset from here and no inline script',
    async (url) => {
      const response = await fetch(service.url + url);
      expect(response.headers.get('content-type')).toBe('text/html; charset=utf-8');
      const policy = response.headers.get('content-security-policy') ?? '';
      expect(policy).toMatch(/^default-src 'none'; script-src 'self'; style-src 'self';/);
      expect(policy).not.toMatch(/unsafe|https?:/);
      const assets = [...(await response.text()).matchAll(/(?:src|href)="([^"]*)"/g)].map(
        ([, asset]) => asset,
      );
      expect(assets.length).toBeGreaterThan(4);
      for (const asset of assets) {
        const address = new URL(asset, service.url + url);
        expect(address.origin).toBe(service.url);
        expect([asset, await statusOf(address)]).toEqual([asset, 200]);
      }
    },
  );

  it.each(['/', '/docs', '/docs/'])('is HTML only: %s', async (url) => {
    const response = await fetch(service.url + url, { headers: { accept: 'application/json' } });
    expect(await response.json()).toMatchObject({ status: 406, code: 'not-acceptable' });
  });

  it('is that of the reference document', async () => {
    const document = await (await fetch(`${service.url}/docs/json`)).json();
    expect(document).toEqual(JSON.parse(trialPages.document.json));
  });

  it.each([
    ['/docs/static/nothing.js', 404, 'not-found'],
    ['/docs/nothing', 404, 'not-found'],
    ['/docs/static/', 404, 'not-found'],
    ['/docs/static/..%2f..%2fpackage.json', 404, 'not-found'],
    ['/docs/static/%00', 400, 'malformed-http'],
  ])('answers %s with a problem document', async (url, status, code) => {
    const response = await fetch(service.url + url);
    expect([response.status, response.headers.get('content-type')]).toEqual([
      status,
      'application/problem+json',
    ]);
    expect(await response.json()).toMatchObject({ status, code });
  });

  it('gives whole files, whatever range is asked for', async () => {
    const range = 'bytes=999999999-';
    const response = await fetch(`${service.url}/docs/static/index.css`, { headers: { range } });
    expect([response.status, (await response.text()).length > 100]).toEqual([200, true]);
  });
});

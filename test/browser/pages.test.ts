import type { Browser, Locator } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { trialPages } from '../http/trial-pages.ts';
import { startServiceProcess, type ServiceProcess } from '../http/service-process.ts';
import { browserIsHere, howToInstall, launchBrowser } from './browser.ts';
import { openWatched, strayRequests } from './watched-page.ts';

const { examples } = trialPages;
if (!browserIsHere) process.stderr.write(`\nSKIPPED: the pages in a browser. ${howToInstall}\n`);

let service: ServiceProcess;
let browser: Browser;

/** Every figure, once it has come into view and been decoded. */
async function naturalSizes(figures: Locator): Promise<number[]> {
  const widths: number[] = [];
  for (const figure of await figures.all()) {
    await figure.scrollIntoViewIfNeeded();
    widths.push(
      await figure.evaluate(async (element) => {
        const image = element as unknown as { decode(): Promise<void>; naturalWidth: number };
        await image.decode();
        return image.naturalWidth;
      }),
    );
  }
  return widths;
}

describe.runIf(browserIsHere)('the pages in a browser', { timeout: 300_000 }, () => {
  beforeAll(async () => {
    service = await startServiceProcess();
    browser = await launchBrowser();
  });
  afterAll(async () => {
    await browser.close();
    await service.stop();
  });

  it.each([
    { colorScheme: 'light', width: 1200 },
    { colorScheme: 'dark', width: 400 },
  ] as const)(
    'the start page draws every figure, $colorScheme, $width px wide',
    async ({ colorScheme, width }) => {
      const viewport = { width, height: 800 };
      const watched = await openWatched(browser, `${service.url}/`, { colorScheme, viewport });
      const { page } = watched;
      const figures = page.locator('figure img');
      const widths = await naturalSizes(figures);
      expect(widths.length).toBeGreaterThan(examples.length);
      expect(Math.min(...widths)).toBeGreaterThan(0);
      const sources = await figures.evaluateAll((images) =>
        images.map((image) => (image as unknown as { currentSrc: string }).currentSrc),
      );
      for (const source of sources) expect(new URL(source).searchParams.get('theme')).toBe(colorScheme);
      // Nothing sticks out sideways.
      expect(await page.evaluate('document.documentElement.scrollWidth')).toBe(width);
      expect(watched.faults).toEqual([]);
      expect(strayRequests(watched, service.url)).toEqual([]);
      await page.context().close();
    },
  );

  it('the start page says everything without scripts', async () => {
    const watched = await openWatched(browser, `${service.url}/`, { javaScriptEnabled: false });
    const { page } = watched;
    await page.getByRole('main').waitFor();
    for (const { title } of examples) {
      expect(await page.getByRole('article', { name: title, exact: true }).count()).toBe(1);
    }
    expect(await page.getByRole('navigation').count()).toBe(1);
    expect(watched.faults).toEqual([]);
    await page.context().close();
  });

  it('the command of an example holds what a shell needs, on a service asked through its address', async () => {
    const { page } = await openWatched(browser, `${service.url}/`);
    const command = page.locator('#struck-pile pre').first();
    expect(await command.innerText()).toBe(
      `curl -s ${service.url}/examples/struck-pile.json |\n  curl -s ${service.url}/v1/responses -H 'content-type: application/json' -d @-`,
    );
    await page.context().close();
  });

  it('the reference page offers every example, sends the one that is chosen, and shows the answer', async () => {
    const viewport = { width: 1200, height: 900 };
    const watched = await openWatched(browser, `${service.url}/docs`, { viewport });
    const { page } = watched;
    const blockOf = {
      modes: page.locator('#operations-solves-solveModes'),
      responses: page.locator('#operations-solves-solveResponses'),
      'transfer-functions': page.locator('#operations-solves-solveTransferFunctions'),
      checks: page.locator('#operations-solves-solveChecks'),
    };
    for (const block of Object.values(blockOf)) await block.locator('.opblock-summary-control').click();
    for (const { operation, title, text } of examples) {
      // The only example of an operation is filled in without a choice.
      const choice = blockOf[operation].locator('.examples-select select');
      const editor = blockOf[operation].locator('.opblock-section-request-body textarea');
      await editor.waitFor();
      if ((await choice.count()) > 0) await choice.selectOption({ label: title });
      await expect
        .poll(async () => JSON.parse(await editor.inputValue()) as unknown, { timeout: 10_000 })
        .toEqual(JSON.parse(text));
    }

    const block = blockOf.responses;
    const pile = examples.find(({ name }) => name === 'struck-pile')!;
    await block.locator('.examples-select select').selectOption({ label: pile.title });
    const solved = page.waitForResponse((response) => response.request().method() === 'POST');
    await block.locator('button.execute').click();
    const response = await solved;
    expect([response.status(), new URL(response.url()).pathname]).toEqual([200, '/v1/responses']);
    const shown = block.locator('.live-responses-table');
    await shown.waitFor({ timeout: 120_000 });
    expect(await shown.locator('.response .response-col_status').innerText()).toMatch(/^200/);
    const body = await shown.locator('.highlight-code, .microlight').first().innerText();
    expect(body).toContain('"coefficients"');
    expect(watched.faults).toEqual([]);
    expect(strayRequests(watched, service.url)).toEqual([]);
    await page.context().close();
  });
});

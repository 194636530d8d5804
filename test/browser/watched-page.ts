import type { Browser, BrowserContextOptions, Page } from 'playwright-core';

export interface WatchedPage {
  readonly page: Page;
  /** Addresses of all requests so far. */
  readonly requests: string[];
  /** What went wrong so far: errors and warnings of the console, errors of scripts, failed requests. */
  readonly faults: string[];
}

/** A page in a context of its own that keeps what it asks for and what goes wrong. */
export async function openWatched(
  browser: Browser,
  url: string,
  options: BrowserContextOptions = {},
): Promise<WatchedPage> {
  const page = await (await browser.newContext(options)).newPage();
  const requests: string[] = [];
  const faults: string[] = [];
  page.on('request', (request) => requests.push(request.url()));
  page.on('response', (response) => {
    if (response.status() >= 400) faults.push(`${response.status()} ${response.url()}`);
  });
  page.on('requestfailed', (request) =>
    faults.push(`${request.failure()?.errorText ?? 'failed'}: ${request.url()}`),
  );
  page.on('console', (message) => {
    if (['error', 'warning'].includes(message.type())) faults.push(message.text());
  });
  page.on('pageerror', (error) => faults.push(String(error)));
  await page.goto(url, { waitUntil: 'load' });
  return { page, requests, faults };
}

/** Requests that leave the service; pictures inside the page (`data:`) ask nobody. */
export function strayRequests({ requests }: WatchedPage, serviceUrl: string): string[] {
  return requests.filter((url) => !url.startsWith(`${serviceUrl}/`) && !url.startsWith('data:'));
}

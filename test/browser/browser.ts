import { existsSync } from 'node:fs';
import { chromium, type Browser } from 'playwright-core';

/** Where the browser is: `CHROMIUM`, or where Debian has it. */
const program = process.env.CHROMIUM ?? '/usr/bin/chromium';

export const browserIsHere = existsSync(program);

export const howToInstall = `No browser at ${program}. Install one (Debian: apt-get install chromium), or set CHROMIUM to one that is here.`;

/** Chromium without a window, that knows no other machine and asks for nothing by itself. */
export function launchBrowser(): Promise<Browser> {
  return chromium.launch({
    executablePath: program,
    args: [
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
      '--host-resolver-rules=MAP * ~NOTFOUND, EXCLUDE 127.0.0.1',
    ],
  });
}

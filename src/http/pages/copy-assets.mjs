// Part of the build: what the pages serve besides code goes beside the compiled code.
import { copyFileSync } from 'node:fs';

for (const name of ['page.css', 'mark.svg']) {
  copyFileSync(new URL(name, import.meta.url), new URL(`../../../dist/http/pages/${name}`, import.meta.url));
}

import { readFileSync } from 'node:fs';
import type { PageOptions } from '../../src/http/page-resources.ts';
import type { Example } from '../../src/http/pages/example.ts';

/** What the build makes of openapi.yaml and the examples. */
const built = (name: string): string => readFileSync(new URL(`../../dist/${name}`, import.meta.url), 'utf8');

/** The pages of an app under test: those of the service. */
export const trialPages = {
  document: { yaml: built('openapi.yaml'), json: built('openapi.json') },
  examples: JSON.parse(built('examples.json')) as Example[],
} satisfies Partial<PageOptions>;

import { describe, expect, it } from 'vitest';
import { findImportBreaches, homesOfPackage } from './import-rules.ts';
import { readSourceFile } from './source-file.ts';
import { readRepositoryFile, readSources } from './repository.ts';

function breaches(sources: Record<string, string>): string[] {
  return findImportBreaches(Object.entries(sources).map(([path, text]) => readSourceFile(path, text)));
}

describe('the import rules of the house', () => {
  it('hold in every file of src', () => {
    const sources = readSources();
    expect(sources.length).toBeGreaterThan(10);
    expect(findImportBreaches(sources)).toEqual([]);
  });

  it('give a home only to packages that the service ships', () => {
    const { dependencies } = JSON.parse(readRepositoryFile('package.json')) as { dependencies: object };
    expect(Object.keys(homesOfPackage).toSorted()).toEqual(Object.keys(dependencies).toSorted());
  });
});

describe('the import checker', () => {
  it('accepts a room that imports lower rooms and its own files', () => {
    expect(
      breaches({
        'modes/shape.ts': `import { x } from '../spectrum/phase.ts'; import type { Y } from './mass.ts'; export const z = x as Y;`,
        'modes/mass.ts': `export type Y = number; export const o = { Date: 1 }; o.Date = 2;`,
        'numerics/kernel.ts': `export const m = (globalThis as unknown as { WebAssembly: object }).WebAssembly;`,
        'spectrum/phase.ts': `import { fault } from '../faults/fault.ts'; export const x = fault;`,
        'main.ts': `import { settings } from './settings.ts'; import fastify from 'fastify'; fastify(settings);`,
      }),
    ).toEqual([]);
  });

  const wrong: readonly [title: string, path: string, text: string, breach: RegExp][] = [
    [
      'a room that imports a higher room',
      'modes/a.ts',
      `import { x } from '../motion/x.ts'; x();`,
      /modes \(rank 4\) imports motion/,
    ],
    [
      'a type import of a higher room',
      'modes/a.ts',
      `import type { X } from '../motion/x.ts'; export type Y = X;`,
      /imports motion/,
    ],
    ['an inline type import', 'modes/a.ts', `export type Y = import('../motion/x.ts').X;`, /imports motion/],
    [
      'a dynamic import of a higher room',
      'pool/a.ts',
      `await import('../http/app.ts');`,
      /pool \(rank 9\) imports http/,
    ],
    [
      'rooms of one rank that import each other',
      'encoding/a.ts',
      `import { x } from '../contract/x.ts'; x();`,
      /imports contract/,
    ],
    ['an unknown room', 'helpers/a.ts', `export const x = 1;`, /"helpers" is no room/],
    [
      'an import of an unknown room',
      'http/a.ts',
      `import { x } from '../helpers/x.ts'; x();`,
      /"helpers", which is no room/,
    ],
    ['an import from outside src', 'http/a.ts', `import { x } from '../../test/x.ts'; x();`, /outside src/],
    ['a barrel', 'modes/a.ts', `export * from './b.ts';`, /no barrel files/],
    ['a named re-export', 'modes/a.ts', `export { b } from './b.ts';`, /no barrel files/],
    [
      'a Node built-in in a pure room',
      'numerics/a.ts',
      `import { readFileSync } from 'node:fs'; readFileSync('x');`,
      /imports node:fs in a pure room/,
    ],
    [
      'a package in a pure room',
      'solutions/a.ts',
      `import Ajv from 'ajv'; new Ajv();`,
      /imports ajv in a pure room/,
    ],
    ['the clock in a pure room', 'motion/a.ts', `export const t = new Date();`, /uses Date in a pure room/],
    ['randomness in a pure room', 'certificate/a.ts', `export const r = Math.random();`, /uses Math.random/],
    ['the process in a pure room', 'members/a.ts', `process.exit();`, /uses process in a pure room/],
    ['import.meta in a pure room', 'modes/a.ts', `export const u = import.meta.url;`, /uses import.meta/],
    [
      'the process by way of globalThis',
      'motion/a.ts',
      `(globalThis as unknown as { process: { exit(): void } }).process.exit();`,
      /uses globalThis in a pure room/,
    ],
    ['a shorthand use of a global', 'modes/a.ts', `export const u = { performance };`, /uses performance/],
    [
      'a framework out of its room',
      'http/a.ts',
      `import Ajv from 'ajv/dist/2020.js'; new Ajv();`,
      /ajv belongs in contract/,
    ],
    [
      'worker threads out of their room',
      'http/a.ts',
      `import { Worker } from 'node:worker_threads'; new Worker('');`,
      /belongs in pool/,
    ],
    [
      'a built-in without its prefix',
      'http/a.ts',
      `import { join } from 'path'; join('');`,
      /write node:path/,
    ],
    ['an unlisted package', 'http/a.ts', `import x from 'left-pad'; x();`, /left-pad has no home/],
    [
      'the environment outside settings',
      'pool/a.ts',
      `export const n = process.env.WORKERS;`,
      /reads the environment/,
    ],
    ['logic in spec', 'spec/types.ts', `export const n = 1;`, /spec is types only/],
  ];
  it.each(wrong)('finds %s', (_title, path, text, breach) => {
    expect(breaches({ [path]: text }).join('\n')).toMatch(breach);
  });

  it('finds a cycle inside a room, through type imports too', () => {
    expect(
      breaches({
        'modes/a.ts': `import { b } from './b.ts'; export type A = typeof b;`,
        'modes/b.ts': `import { c } from './c.ts'; export const b = c;`,
        'modes/c.ts': `import type { A } from './a.ts'; export const c = 1 as unknown as A;`,
      }),
    ).toEqual(['cycle: modes/a.ts → modes/b.ts → modes/c.ts → modes/a.ts']);
  });
});

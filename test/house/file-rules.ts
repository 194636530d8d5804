import type { SourceFile } from './source-file.ts';
import { roomOf } from './import-rules.ts';

/** Longest file allowed in src/ (over 250 lines is already a smell). */
export const maximumLines = 300;

/** What may lie at the top level of the repository. */
const topLevelNames = new Set([
  'src',
  'schemas',
  'test',
  'docker',
  'openapi.yaml',
  'package.json',
  'README.md',
  'DEVELOPERS.md',
  'package-lock.json',
  'tsconfig.json',
  'tsconfig.build.json',
  'vitest.config.ts',
  '.oxlintrc.json',
  '.prettierrc.json',
  '.prettierignore',
  '.gitignore',
  '.npmrc',
  '.gitattributes',
  '.ci',
  'LICENSE',
]);

export function findLongFiles(files: readonly SourceFile[]): string[] {
  return files
    .filter((file) => roomOf(file.path) !== 'spec' && file.lineCount > maximumLines)
    .map((file) => `${file.path}: ${file.lineCount} lines, more than ${maximumLines}; one idea per file`);
}

/** Files named index.* hide what they hold. */
export function findIndexFiles(files: readonly SourceFile[]): string[] {
  return files
    .filter((file) => /(^|\/)index\.\w+$/.test(file.path))
    .map((file) => `${file.path}: no index files`);
}

export function findStrayNames(names: readonly string[]): string[] {
  return names
    .filter((name) => !topLevelNames.has(name))
    .map((name) => `${name} does not belong at the top level`);
}

/** Download addresses in a lock file tie it to one registry. */
export function findLockAddresses(lock: { packages: Record<string, { resolved?: string }> }): string[] {
  return Object.entries(lock.packages)
    .filter(([, entry]) => entry.resolved !== undefined)
    .map(([name]) => `package-lock.json: ${name} has a download address`);
}

/** Each example is served in the reference page, so the document names its file. */
export function findUnusedExamples(examples: readonly string[], document: string): string[] {
  return examples
    .filter((name) => !document.includes(`schemas/examples/${name}`))
    .map((name) => `schemas/examples/${name} is not referenced in openapi.yaml`);
}

import { execFileSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { readSourceFile, type SourceFile } from './source-file.ts';

const root = fileURLToPath(new URL('../../', import.meta.url));

export function readRepositoryFile(path: string): string {
  return readFileSync(join(root, path), 'utf8');
}

/** Every TypeScript file below src/. */
export function readSources(): SourceFile[] {
  return readdirSync(join(root, 'src'), { recursive: true, encoding: 'utf8' })
    .map((path) => path.replaceAll('\\', '/'))
    .filter((path) => path.endsWith('.ts'))
    .toSorted()
    .map((path) => readSourceFile(path, readRepositoryFile(`src/${path}`)));
}

export function listExamples(): string[] {
  return readdirSync(join(root, 'schemas/examples')).filter((name) => name.endsWith('.json'));
}

/** Names at the top level that belong to the repository: what git tracks, or in an exported tree what is not ignored. */
export function listTopLevel(): string[] {
  if (!existsSync(join(root, '.git'))) {
    const ignored = readRepositoryFile('.gitignore')
      .split('\n')
      .map((line) => line.replace(/\/$/, ''));
    return readdirSync(root).filter((name) => !ignored.includes(name));
  }
  const paths = execFileSync('git', ['ls-files'], { cwd: root, encoding: 'utf8' }).trim().split('\n');
  return [...new Set(paths.map((path) => path.split('/')[0]))];
}

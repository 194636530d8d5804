import { posix } from 'node:path';
import { isBuiltin } from 'node:module';
import type { SourceFile } from './source-file.ts';

/** Rank of every room of src/; a room imports only rooms of lower rank. */
export const rankOfRoom: Readonly<Record<string, number>> = {
  faults: 0,
  spec: 1,
  numerics: 1,
  members: 2,
  spectrum: 3,
  modes: 4,
  motion: 5,
  steady: 5,
  certificate: 6,
  solutions: 7,
  contract: 8,
  encoding: 8,
  figures: 8,
  pool: 9,
  jobs: 10,
  http: 11,
  'main.ts': 12,
  'settings.ts': 12,
};

/** Rooms up to this rank are pure: mathematics and mechanics, nothing of the machine. */
const highestPureRank = 7;

/** Where a package may be imported. A package that is not listed here may be imported nowhere. */
export const homesOfPackage: Readonly<Record<string, readonly string[]>> = {
  ajv: ['contract'],
  'apache-arrow': ['encoding'],
  xmlbuilder2: ['encoding'],
  piscina: ['pool'],
  'lru-cache': ['jobs'],
  bullmq: ['jobs'],
  ioredis: ['jobs'],
  fastify: ['http', 'main.ts'],
  '@fastify/accepts': ['http'],
  '@fastify/compress': ['http'],
  '@fastify/helmet': ['http'],
  '@fastify/swagger': ['http'],
  '@fastify/swagger-ui': ['http'],
  pino: ['http', 'main.ts'],
  'close-with-grace': ['main.ts'],
  'env-schema': ['settings.ts'],
  'd3-array': ['figures'],
  'd3-format': ['figures'],
  'd3-scale': ['figures'],
  'd3-scale-chromatic': ['figures'],
  'd3-shape': ['figures'],
  '@resvg/resvg-js': ['figures'],
  'dejavu-fonts-ttf': ['figures'],
  'opentype.js': ['figures'],
};

/** Node built-ins that belong to one room. */
const homesOfBuiltin: Readonly<Record<string, readonly string[]>> = {
  worker_threads: ['pool'],
  http: ['http', 'main.ts'],
  net: ['http', 'main.ts'],
};

const impureNames = [
  'Date',
  'Math.random',
  'process',
  'console',
  'performance',
  'Buffer',
  'setTimeout',
  'setInterval',
  'setImmediate',
  'queueMicrotask',
  'globalThis',
  'global',
  'require',
  'fetch',
  'crypto',
  'navigator',
  'Intl',
  'eval',
  'Function',
  'import.meta',
];

/** The room of a file: the first folder of its path, or the file itself beside the rooms. */
export function roomOf(path: string): string {
  return path.split('/')[0];
}

/**
 * Every breach of the import rules among the files of src/, one sentence each; empty when all hold.
 */
export function findImportBreaches(files: readonly SourceFile[]): string[] {
  return [...files.flatMap(breachesOfFile), ...findCycles(files)];
}

function breachesOfFile(file: SourceFile): string[] {
  const room = roomOf(file.path);
  const rank = rankOfRoom[room];
  if (rank === undefined) return [`${file.path}: "${room}" is no room of the house`];
  const breaches = file.imports.flatMap((specifier) =>
    specifier.startsWith('.') ? relativeBreach(file, specifier) : packageBreach(file, specifier),
  );
  for (const specifier of file.reexports)
    breaches.push(`${file.path}: passes "${specifier}" on; no barrel files`);
  if (rank <= highestPureRank) {
    for (const name of impureNames) {
      if (file.names.has(name)) breaches.push(`${file.path}: uses ${name} in a pure room`);
    }
  }
  if (room !== 'settings.ts' && file.names.has('process.env')) {
    breaches.push(`${file.path}: reads the environment; only settings.ts may`);
  }
  if (room === 'spec' && !file.typesOnly) breaches.push(`${file.path}: holds logic; spec is types only`);
  return breaches;
}

function relativeBreach(file: SourceFile, specifier: string): string[] {
  const target = resolveImport(file, specifier);
  const from = roomOf(file.path);
  const to = roomOf(target);
  if (target.startsWith('..')) return [`${file.path}: imports ${specifier}, outside src`];
  if (from === to) return [];
  if (rankOfRoom[to] === undefined) return [`${file.path}: imports "${to}", which is no room of the house`];
  if (from === 'main.ts' && to === 'settings.ts') return [];
  if (rankOfRoom[to] < rankOfRoom[from]) return [];
  return [`${file.path}: ${from} (rank ${rankOfRoom[from]}) imports ${to} (rank ${rankOfRoom[to]})`];
}

function packageBreach(file: SourceFile, specifier: string): string[] {
  const room = roomOf(file.path);
  if (rankOfRoom[room] <= highestPureRank) return [`${file.path}: imports ${specifier} in a pure room`];
  if (isBuiltin(specifier)) {
    const bare = specifier.replace(/^node:/, '').split('/')[0];
    if (bare === specifier) return [`${file.path}: write node:${bare}`];
    const homes = homesOfBuiltin[bare];
    return homes === undefined || homes.includes(room)
      ? []
      : [`${file.path}: ${specifier} belongs in ${homes.join(', ')}`];
  }
  const name = specifier
    .split('/')
    .slice(0, specifier.startsWith('@') ? 2 : 1)
    .join('/');
  const homes = homesOfPackage[name];
  if (homes === undefined) return [`${file.path}: ${name} has no home in test/house/import-rules.ts`];
  return homes.includes(room) ? [] : [`${file.path}: ${name} belongs in ${homes.join(', ')}`];
}

function resolveImport(file: SourceFile, specifier: string): string {
  return posix.join(posix.dirname(file.path), specifier);
}

/** Files that import themselves through others; type imports count, for a reader follows them too. */
function findCycles(files: readonly SourceFile[]): string[] {
  const targets = new Map(
    files.map((file) => [
      file.path,
      [...file.imports, ...file.reexports]
        .filter((s) => s.startsWith('.'))
        .map((s) => resolveImport(file, s)),
    ]),
  );
  const done = new Set<string>();
  const cycles: string[] = [];
  for (const file of files) follow(file.path, []);
  return cycles;

  function follow(path: string, trail: readonly string[]): void {
    const start = trail.indexOf(path);
    if (start >= 0) {
      cycles.push(`cycle: ${[...trail.slice(start), path].join(' → ')}`);
      return;
    }
    if (done.has(path)) return;
    for (const target of targets.get(path) ?? []) follow(target, [...trail, path]);
    done.add(path);
  }
}

import { describe, expect, it } from 'vitest';
import {
  findIndexFiles,
  findLockAddresses,
  findLongFiles,
  findStrayNames,
  findUnusedExamples,
  maximumLines,
} from './file-rules.ts';
import { listExamples, listTopLevel, readRepositoryFile, readSources } from './repository.ts';
import { readSourceFile } from './source-file.ts';

describe('the file rules of the house', () => {
  it('keep every file of src short and named after its idea', () => {
    expect(findLongFiles(readSources())).toEqual([]);
    expect(findIndexFiles(readSources())).toEqual([]);
  });

  it('keep the top level to what is known', () => {
    expect(findStrayNames(listTopLevel())).toEqual([]);
  });

  it('keep download addresses out of the lock file', () => {
    const lock = JSON.parse(readRepositoryFile('package-lock.json'));
    expect(Object.keys(lock.packages).length).toBeGreaterThan(50);
    expect(findLockAddresses(lock)).toEqual([]);
  });

  it('have every example referenced in the reference document', () => {
    expect(listExamples().length).toBeGreaterThan(0);
    expect(findUnusedExamples(listExamples(), readRepositoryFile('openapi.yaml'))).toEqual([]);
  });
});

describe('the file checker', () => {
  const long = readSourceFile('modes/long.ts', 'export {};\n'.repeat(maximumLines + 1));
  const full = readSourceFile('modes/full.ts', 'export {};\n'.repeat(maximumLines));

  it('finds a long file, and only a long one', () => {
    expect(findLongFiles([long, full])).toEqual([expect.stringContaining('modes/long.ts: 301 lines')]);
    expect(findLongFiles([{ ...long, path: 'spec/types.ts' }])).toEqual([]);
  });

  it('finds an index file', () => {
    expect(findIndexFiles([{ ...full, path: 'modes/index.ts' }])).toHaveLength(1);
  });

  it('finds a stray name, a lock address and an unused example', () => {
    expect(findStrayNames(['src', 'notes.txt'])).toEqual(['notes.txt does not belong at the top level']);
    expect(findLockAddresses({ packages: { a: { resolved: 'x' }, b: {} } })).toHaveLength(1);
    expect(findUnusedExamples(['a.json', 'b.json'], '$ref: schemas/examples/a.json')).toHaveLength(1);
  });
});

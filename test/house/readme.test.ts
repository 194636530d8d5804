import { describe, expect, it } from 'vitest';
import { operations } from '../../src/pool/operations.ts';
import { encodeJson } from '../../src/encoding/json.ts';
import { readSettings } from '../../src/settings.ts';
import { listExamples, readRepositoryFile } from './repository.ts';

const readme = readRepositoryFile('README.md');
const schemaOf = (name: string): Record<string, Record<string, Record<string, number>>> =>
  JSON.parse(readRepositoryFile(`schemas/${name}.json`));

describe('the README', () => {
  it('opens with the job and then the two commands, each on a line of its own', () => {
    const lines = readme.split('\n');
    expect(lines[0]).toBe('# Tailbound');
    expect(lines.indexOf('npm ci && npm run demo')).toBeGreaterThan(2);
    expect(lines.indexOf('npm ci && npm test')).toBeGreaterThan(lines.indexOf('npm ci && npm run demo'));
  });

  it('shows the answer that its first request really has', () => {
    const request = /\/v1\/modes .* -d '(\{[^]*?\})'\n/.exec(readme)?.[1] ?? '';
    const shown = JSON.parse(/```json\n([^]*?)```/.exec(readme)?.[1] ?? '') as {
      modes: Record<string, unknown>[];
    };
    const { read, solve } = operations.modes;
    const answer = JSON.parse(new TextDecoder().decode(encodeJson(solve(read(JSON.parse(request))))));
    delete shown.modes[1]['…'];
    expect(answer).toMatchObject(shown);
    expect(shown.modes).toHaveLength(2);
  });

  it.each(['responses', 'transfer-functions', 'checks'])(
    'shows in four digits what its request of %s gives',
    (operation) => {
      const shown = new RegExp(
        `/v1/${operation} .* -d '(\\{[^]*?\\})'\\n[^]*?\`\`\`json\\n([^]*?)\`\`\``,
      ).exec(readme);
      const { read, solve } = operations[operation];
      const answer = JSON.parse(
        new TextDecoder().decode(encodeJson(solve(read(JSON.parse(shown![1]))))),
        (_key, value) => (typeof value === 'number' ? Number(value.toPrecision(4)) : (value as unknown)),
      ) as unknown;
      expect(answer).toMatchObject(JSON.parse(shown![2]) as object);
    },
  );

  it('lists every setting with its default, and no other', () => {
    const listed = [...readme.matchAll(/^\| `([A-Z_]+)` +\| (.*?) +\|/gm)].map(([, name, value]) => [
      name,
      value.replaceAll('`', ''),
    ]);
    const defaults = Object.entries(readSettings({})).map(([name, value]) => [
      name,
      name === 'WORKERS' ? 'number of cores' : String(value),
    ]);
    expect(Object.fromEntries(listed)).toEqual(Object.fromEntries(defaults));
  });

  it('lists the limits of the schemas', () => {
    const limit = (what: string): string | undefined =>
      readme
        .split('\n')
        .find((line) => line.startsWith(`| ${what}`))
        ?.split('|')[2]
        .trim();
    expect(limit('modes of one request')).toBe(
      schemaOf('ModesByCount').properties.modes.maximum.toLocaleString('en'),
    );
    expect(limit('segments; attachments')).toBe(
      `${schemaOf('Cable').properties.segments.maxItems.toLocaleString('en')} each`,
    );
    const items = (schema: string, key: string): string =>
      schemaOf(schema).properties[key].maxItems.toLocaleString('en');
    expect(limit('loads of one request')).toBe(items('ResponsesRequest', 'loads'));
    expect(limit('samples of a record')).toBe(items('SampledHistory', 'values'));
    expect(limit('outputs of one request')).toBe(items('TransferFunctionsRequest', 'outputs'));
    expect(limit('frequencies; refined ones included')).toBe(
      schemaOf('FrequencyGrid').properties.count.maximum.toLocaleString('en'),
    );
  });

  it('names only examples that exist', () => {
    const named = [...readme.matchAll(/schemas\/examples\/([\w-]+\.json)/g)].map(([, name]) => name);
    expect(named.length).toBeGreaterThan(0);
    for (const name of named) expect(listExamples()).toContain(name);
  });
});

import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { parse } from 'yaml';
import { readRepositoryFile } from '../house/repository.ts';
import { startServiceProcess, type ServiceProcess } from '../http/service-process.ts';
import { tautString } from '../support/checks.ts';

/** The script and the CI file, word for word as the README has them. */
const readme = readRepositoryFile('README.md');
const script = /```sh\n(#!\/bin\/sh\n# check-members\.sh[^]*?)```/.exec(readme)![1];
const pipeline = parse(/```yaml\n(steps:[^]*?)```/.exec(readme)![1]) as {
  steps: { name: string; environment: Record<string, string>; run: string }[];
  reports: Record<string, string>;
};

let service: ServiceProcess;
let folder = '';
beforeAll(async () => {
  service = await startServiceProcess();
}, 60_000);
afterAll(() => service.stop());
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'pipeline-'));
  mkdirSync(join(folder, 'checks'));
  writeFileSync(join(folder, 'check-members.sh'), script);
});
afterEach(() => rmSync(folder, { recursive: true }));

function demand(file: string, criterion: object): void {
  const request = { member: tautString, series: { modes: 3 } };
  const criteria = [{ id: 'first', type: 'frequency-range', order: 1, ...criterion }];
  writeFileSync(join(folder, 'checks', file), JSON.stringify({ operation: 'modes', request, criteria }));
}

async function run(
  command: string,
  environment: Record<string, string>,
): Promise<{ code: number; output: string }> {
  const child = spawn('sh', ['-c', command], { cwd: folder, env: { ...process.env, ...environment } });
  let output = '';
  child.stdout.on('data', (chunk) => (output += String(chunk)));
  child.stderr.on('data', (chunk) => (output += String(chunk)));
  const [code] = (await once(child, 'close')) as [number];
  return { code, output };
}

/** Runs the steps of the CI file one after the other, as any runner does; the address is that of this service. */
async function runPipeline(): Promise<{ code: number; output: string }> {
  let output = '';
  for (const step of pipeline.steps) {
    expect(Object.keys(step.environment)).toEqual(['TAILBOUND_URL']);
    const done = await run(step.run, { TAILBOUND_URL: service.url });
    output += done.output;
    if (done.code !== 0) return { code: done.code, output };
  }
  return { code: 0, output };
}

describe.each([
  ['the shell script', () => run('sh check-members.sh', { TAILBOUND_URL: service.url })],
  ['the CI file', runPipeline],
])('%s of the README', (_name, start) => {
  it('passes a build whose checks all pass, and leaves a report of each', async () => {
    demand('one.json', { min: 49 });
    demand('two.json', { max: 51 });
    const { code, output } = await start();
    expect([code, output]).toEqual([0, 'checks/one.json: pass\nchecks/two.json: pass\n']);
    expect(pipeline.reports).toEqual({ 'test-results': 'checks/*.xml' });
    for (const name of ['one', 'two']) {
      expect(readFileSync(join(folder, 'checks', `${name}.xml`), 'utf8')).toMatch(/<testcase name="first"/);
    }
  });

  it('fails a build on one failing check, and still runs the others', async () => {
    demand('one.json', { min: 51 });
    demand('two.json', { max: 51 });
    const { code, output } = await start();
    expect([code, output]).toEqual([1, 'checks/one.json: fail\nchecks/two.json: pass\n']);
    expect(readFileSync(join(folder, 'checks', 'one.xml'), 'utf8')).toMatch(/<failure /);
  });

  it('fails a build on a request that is refused, and keeps the reason', async () => {
    demand('one.json', { min: 51, max: 49 });
    const { code, output } = await start();
    expect(code).toBe(1);
    expect(output).toContain('checks/one.json: not answered');
    expect(readFileSync(join(folder, 'checks', 'one.problem'), 'utf8')).toContain('range-reversed');
    expect(existsSync(join(folder, 'checks', 'one.xml'))).toBe(false);
  });
});

it('the script fails where no service answers', async () => {
  demand('one.json', { min: 49 });
  const { code, output } = await run('sh check-members.sh', { TAILBOUND_URL: 'http://127.0.0.1:1' });
  expect(code).toBe(1);
  expect(output).toContain('checks/one.json: not answered');
  expect(existsSync(join(folder, 'checks', 'one.xml'))).toBe(false);
});

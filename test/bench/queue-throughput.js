// Chunks a second through the shared queue: what one server can hand out, whatever a chunk holds.
import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { performance } from 'node:perf_hooks';
import { setTimeout as pause } from 'node:timers/promises';
import { DistributedJobs } from '../../dist/jobs/distributed-jobs.js';
import { fixed, printTable } from './timing.js';

const chunkLines = 32;
const count = 64_000;
const port = 7399;

/** Answers that cost nothing. */
const solver = {
  lineLimit: 1e6,
  async *lines(lines, _gone, onStart) {
    for await (const some of lines) {
      onStart();
      yield { bytes: Buffer.from('{}\n'.repeat(some.length)), count: some.length };
    }
  },
};

async function* text() {
  for (let i = 0; i < count; i += 1000)
    yield Buffer.from('{"id":"a","operation":"modes","request":{}}\n'.repeat(1000));
}

export async function queueThroughput() {
  const folder = mkdtempSync(join(tmpdir(), 'queue-'));
  const words = [
    '--port',
    String(port),
    '--bind',
    '127.0.0.1',
    '--dir',
    folder,
    '--appendonly',
    'yes',
    '--save',
    '',
  ];
  const server = spawn('redis-server', words, { stdio: 'ignore' });
  const failed = await Promise.race([
    new Promise((resolve) => server.once('error', () => resolve(true))),
    pause(1500),
  ]);
  if (failed) {
    console.log('Queue: no redis-server here, not measured');
    return;
  }
  const options = {
    url: `redis://127.0.0.1:${port}`,
    age: 60,
    bytes: 1e9,
    workers: 4,
    solver,
    onError: (error) => process.stderr.write(`${error}\n`),
  };
  const jobs = new DistributedJobs(options);
  await pause(500);
  const started = performance.now();
  const { id } = await jobs.submit({ kind: 'batch', source: text() }, null);
  const taken = performance.now();
  jobs.start();
  while ((await jobs.find(id)).state !== 'succeeded') await pause(20);
  const done = performance.now();
  const chunks = count / chunkLines;
  printTable(
    'Shared queue, chunks that cost nothing',
    ['chunks', 'put chunks/s', 'answered chunks/s', 'lines/s'],
    [
      [
        chunks,
        fixed((1000 * chunks) / (taken - started), 0),
        fixed((1000 * chunks) / (done - taken), 0),
        fixed((1000 * count) / (done - taken), 0),
      ],
    ],
  );
  await jobs.stop();
  server.kill();
  await pause(500);
  rmSync(folder, { recursive: true, force: true });
}

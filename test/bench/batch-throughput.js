// Batches of small members: how much sooner two workers answer than one, and what memory they take.
import { once } from 'node:events';
import { spawn } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { request as httpRequest } from 'node:http';
import { performance } from 'node:perf_hooks';
import { setTimeout as pause } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { fixed, median, printTable } from './timing.js';

const program = fileURLToPath(new URL('../../dist/main.js', import.meta.url));
const lineCount = 10_000;
const rounds = 3;

/** A hanger of two segments with a clamp, 24 modes with shapes at five places. */
const smallMember = (i) => ({
  id: `m${i}`,
  operation: 'modes',
  request: {
    member: {
      kind: 'cable',
      tension: 1e6 + 100 * i,
      segments: [
        { length: 12, massPerLength: 40 },
        { length: 20, massPerLength: 52 },
      ],
      ends: { near: { type: 'fixed' }, far: { type: 'fixed' } },
      attachments: [{ at: 12, mass: 15 }],
    },
    series: { modes: 24 },
    shapes: { positions: { count: 5 } },
  },
});

const lines = Array.from({ length: lineCount }, (_, i) => `${JSON.stringify(smallMember(i))}\n`);

async function startService(workers) {
  const environment = { ...process.env, PORT: '0', WORKERS: String(workers), LOG_LEVEL: 'info' };
  const child = spawn(process.execPath, [program], {
    env: environment,
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const url = await new Promise((resolve) => {
    let text = '';
    child.stdout.on('data', (chunk) => {
      text += chunk;
      const ready = /"url":"([^"]*)"[^\n]*"ready"/.exec(text);
      if (ready) resolve(ready[1]);
    });
  });
  return { url, child };
}

/** Sends lines and reads the answers as `onLine` allows; gives the seconds that it took. */
async function runBatch(url, sent, onLine = async () => undefined) {
  const started = performance.now();
  const request = httpRequest(`${url}/v1/batches`, {
    method: 'POST',
    headers: { 'content-type': 'application/x-ndjson' },
  });
  const sending = (async () => {
    for (let i = 0; i < sent.length; i += 20) {
      if (!request.write(sent.slice(i, i + 20).join(''))) await once(request, 'drain');
    }
    request.end();
  })();
  const [response] = await once(request, 'response');
  let answered = 0;
  for await (const chunk of response) {
    // searched, not walked: a reader that walks over 75 MB byte by byte takes a core from the workers
    for (let at = chunk.indexOf(10); at >= 0; at = chunk.indexOf(10, at + 1)) {
      if (++answered % 100 === 0) await onLine(answered);
    }
  }
  await sending;
  if (answered !== sent.length) throw new Error(`${answered} answers to ${sent.length} lines`);
  return (performance.now() - started) / 1000;
}

/** Loops of the same work in one process and in two at once: what the machine has to give at this moment. */
async function ceiling() {
  const loop = 'let s=0;for(let i=1;i<5e7;i++)s+=Math.sqrt(i);';
  const run = async (count) => {
    const started = performance.now();
    await Promise.all(
      Array.from({ length: count }, () => once(spawn(process.execPath, ['-e', loop]), 'exit')),
    );
    return performance.now() - started;
  };
  const one = await run(1);
  return (2 * one) / (await run(2));
}

export async function batchThroughput() {
  const services = [await startService(1), await startService(2)];
  const times = [[], []];
  const ceilings = [];
  for (const { url } of services) await runBatch(url, lines.slice(0, 2000));
  for (let round = 0; round < rounds; round++) {
    ceilings.push(await ceiling());
    for (const [i, { url }] of services.entries()) times[i].push(await runBatch(url, lines));
  }
  const [one, two] = times.map(median);
  printTable(
    `Batch of ${lineCount} small members`,
    ['one worker lines/s', 'two lines/s', 'ratio (goal 1.8)', 'ratio of bare loops'],
    [[fixed(lineCount / one, 0), fixed(lineCount / two, 0), fixed(one / two), fixed(median(ceilings))]],
  );
  for (const { child } of services) child.kill();
}

/** Resident memory of the service in the course of a batch, the second time with a reader that dawdles. */
export async function batchMemory() {
  const { url, child } = await startService(2);
  const resident = () =>
    Number(/VmRSS:\s+(\d+)/.exec(readFileSync(`/proc/${child.pid}/status`, 'utf8'))[1]) / 1024;
  const rows = [];
  for (const seconds of [0, 20]) {
    const seen = [];
    await runBatch(url, lines, async (answered) => {
      if (answered === 2000) {
        for (let i = 0; i < seconds; i++) {
          await pause(1000);
          seen.push(resident());
        }
      }
      if (answered >= 1000) seen.push(resident());
    });
    const [first, most] = [seen[0], Math.max(...seen)];
    rows.push([
      seconds === 0 ? 'steady' : `pauses ${seconds} s`,
      fixed(first, 0),
      fixed(most, 0),
      fixed(most / first),
    ]);
  }
  printTable(
    'Memory from line 1,000 to 10,000',
    ['reader', 'MiB first', 'MiB most', 'ratio (goal 1.2)'],
    rows,
  );
  child.kill();
}

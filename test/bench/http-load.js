import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import autocannon from 'autocannon';
import { modesRequest, responsesRequest } from './reference-member.js';
import { fixed, median, printTable } from './timing.js';

const pathOf = (name) => fileURLToPath(new URL(name, import.meta.url));
const solver = pathOf('../../dist/pool/worker.js');
const echo = pathOf('../pool/trial-worker.js');
const rounds = 3;
const secondsPerRun = 3;

async function startService(worker, reading) {
  const child = spawn(process.execPath, [pathOf('service.js'), worker, reading, '2'], {
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const url = await new Promise((resolve, reject) => {
    child.stdout.once('data', (chunk) => resolve(String(chunk).trim()));
    child.once('exit', (code) => reject(new Error(`the service ended with ${code}`)));
  });
  return { url, stop: () => child.kill() };
}

/** Requests per second and latency through HTTP, against an echo through the same app and pool. */
export async function httpLoad() {
  const services = {
    solver: await startService(solver, 'contract'),
    echo: await startService(echo, 'identity'),
  };
  try {
    const small = modesRequest(16);
    const large = responsesRequest(64, 200, 250);
    const loads = [
      ['small answer, echo', services.echo, '/v1/modes', small],
      ['small answer, 16 modes', services.solver, '/v1/modes', small],
      ['large answer, echo of 50,000 numbers', services.echo, '/v1/modes', { do: 'numbers', count: 50_000 }],
      ['large answer, 64 modes, 200 × 250', services.solver, '/v1/responses', large],
    ];
    const results = loads.map(() => []);
    for (let round = 0; round < rounds; round++) {
      for (const [i, [, { url }, path, request]] of loads.entries()) {
        results[i].push(await fire(url + path, request));
      }
    }
    const rows = loads.map(([name], i) => {
      const rate = medianOf(results[i], (result) => result.requests.average);
      const reference = medianOf(results[i - (i % 2)], (result) => result.requests.average);
      return [
        name,
        fixed(rate, 0),
        fixed(
          medianOf(results[i], (result) => result.latency.p50),
          1,
        ),
        fixed(
          medianOf(results[i], (result) => result.latency.p99),
          1,
        ),
        fixed(
          medianOf(results[i], (result) => result.throughput.average / result.requests.average / 1024),
          1,
        ),
        fixed(rate / reference),
        results[i].reduce((sum, result) => sum + result.non2xx + result.errors, 0),
      ];
    });
    printTable(
      'HTTP, 10 connections, 2 workers (load and service share the cores)',
      ['load', 'req/s', 'p50 ms', 'p99 ms', 'kB', '× echo', 'failed'],
      rows,
    );
  } finally {
    services.solver.stop();
    services.echo.stop();
  }
}

function fire(url, request) {
  return autocannon({
    url,
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify(request),
    connections: 10,
    duration: secondsPerRun,
  });
}

function medianOf(results, pick) {
  return median(results.map(pick));
}

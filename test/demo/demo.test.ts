import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { createServer, type AddressInfo } from 'node:net';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const program = fileURLToPath(new URL('run.js', import.meta.url));

function startDemo(port: string) {
  const child = spawn(process.execPath, [program], { env: { ...process.env, PORT: port } });
  const seen = { text: '' };
  child.stdout.on('data', (chunk) => (seen.text += String(chunk)));
  child.stderr.on('data', (chunk) => (seen.text += String(chunk)));
  return { child, seen };
}

describe('the demonstration', () => {
  it('solves three examples over HTTP, one of them loaded, says how to go on, serves, and stops cleanly', async () => {
    const { child, seen } = startDemo('0');
    const exited = once(child, 'exit');
    while (!seen.text.includes('Serving until')) await Promise.race([once(child.stdout, 'data'), exited]);
    expect(seen.text).toMatch(/A pile struck by a ram[^]*frequencies +25\.\d+, [^]*verdict +converged/);
    expect(seen.text).toMatch(/A stay cable, pulled and released[^]*Hz[^]*displacement +peak [^]*certified/);
    expect(seen.text).toMatch(/A tie rod that carries a running machine[^]*loads +point-force[^]*certified/);
    const url = /curl -s (http:\S+)\/v1\/responses/.exec(seen.text)?.[1] ?? '';
    expect((await fetch(`${url}/health/ready`)).status).toBe(200);
    child.kill('SIGINT');
    expect((await exited)[0]).toBe(0);
    await expect(fetch(`${url}/health/live`)).rejects.toThrow('fetch failed');
  });

  it('says that the port is taken, and ends', async () => {
    const server = createServer().listen(0, '127.0.0.1');
    await once(server, 'listening');
    const { child, seen } = startDemo(String((server.address() as AddressInfo).port));
    const [code] = await once(child, 'close');
    server.close();
    expect(code).toBe(1);
    expect(seen.text).toMatch(
      /^127\.0\.0\.1:\d+ is in use\. Stop what listens there, or set PORT to a free port\.\n$/,
    );
  });
});

import { spawn, spawnSync, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

const program = process.env.REDIS_SERVER ?? 'redis-server';

export const redisIsHere = spawnSync(program, ['--version']).status === 0;

export const howToInstall = `No ${program}. Install it (Debian: apt-get install redis-server), or set REDIS_SERVER to one that is here.`;

/** A server of the tests, on a free port, with its data in a folder of its own. */
export class RedisServer {
  readonly port: number;
  readonly #folder = mkdtempSync(join(tmpdir(), 'redis-'));
  #child: ChildProcess | null = null;

  private constructor(port: number) {
    this.port = port;
  }

  /** A server that is not started. */
  static async make(): Promise<RedisServer> {
    return new RedisServer(await freePort());
  }

  get url(): string {
    return `redis://127.0.0.1:${this.port}`;
  }

  /** Starts it with all that it has kept. */
  async start(): Promise<void> {
    const options = { port: this.port, bind: '127.0.0.1', dir: this.#folder, appendonly: 'yes', save: '' };
    const words = Object.entries(options).flatMap(([name, value]) => [`--${name}`, String(value)]);
    const child = spawn(program, [...words, '--appendfsync', 'always', '--maxmemory-policy', 'noeviction'], {
      stdio: ['ignore', 'pipe', 'inherit'],
    });
    this.#child = child;
    await new Promise<void>((resolve, reject) => {
      child.once('exit', (code) => reject(new Error(`redis-server ended with ${code}`)));
      child.stdout.on('data', (text: Buffer) => String(text).includes('Ready to accept') && resolve());
    });
  }

  /** Ends it. */
  async stop(signal: NodeJS.Signals = 'SIGTERM'): Promise<void> {
    const child = this.#child;
    this.#child = null;
    if (child === null || child.exitCode !== null) return;
    const exited = once(child, 'exit');
    child.kill(signal);
    await exited;
  }

  async remove(): Promise<void> {
    await this.stop('SIGKILL');
    rmSync(this.#folder, { recursive: true, force: true });
  }
}

async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  server.close();
  await once(server, 'close');
  return port;
}

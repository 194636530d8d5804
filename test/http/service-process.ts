import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { createInterface } from 'node:readline';
import { fileURLToPath } from 'node:url';

const program = fileURLToPath(new URL('../../dist/main.js', import.meta.url));

export interface ServiceProcess {
  readonly url: string;
  readonly child: ChildProcess;
  /** Lines of the log so far. */
  readonly log: Record<string, unknown>[];
  readonly post: (path: string, body: unknown) => Promise<Response>;
  /** Asks it to stop, and gives its exit code. */
  readonly stop: (signal?: NodeJS.Signals) => Promise<number | null>;
}

/** The service as `npm start` runs it, on a free port; resolves when it is ready. */
export async function startServiceProcess(environment: Record<string, string> = {}): Promise<ServiceProcess> {
  const child = spawn(process.execPath, ['--enable-source-maps', program], {
    env: { ...process.env, PORT: '0', WORKERS: '2', ...environment },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const log: Record<string, unknown>[] = [];
  const url = await new Promise<string>((resolve, reject) => {
    createInterface({ input: child.stdout }).on('line', (line) => {
      const entry = JSON.parse(line) as Record<string, unknown>;
      log.push(entry);
      if (entry.msg === 'ready') resolve(entry.url as string);
    });
    child.once('exit', (code) => reject(new Error(`the service ended with ${code}`)));
  });
  return {
    url,
    child,
    log,
    post: (path, body) =>
      fetch(url + path, {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: typeof body === 'string' ? body : JSON.stringify(body),
      }),
    stop: async (signal = 'SIGTERM') => {
      const exited = once(child, 'exit');
      child.kill(signal);
      return (await exited)[0] as number | null;
    },
  };
}

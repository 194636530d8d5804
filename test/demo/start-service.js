import { spawn } from 'node:child_process';
import { createInterface } from 'node:readline';
import { fileURLToPath } from 'node:url';

const program = fileURLToPath(new URL('../../dist/main.js', import.meta.url));

/**
 * Starts the service as a process of its own, as `npm start` does, with its log read here: shown
 * only where something is wrong. Ends this process where the service cannot start; it says why.
 */
export async function startService() {
  const child = spawn(process.execPath, ['--enable-source-maps', program], {
    env: { ...process.env, LOG_LEVEL: 'info' },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const ended = new Promise((resolve) => child.once('exit', (code) => resolve(code ?? 1)));
  const stop = async () => {
    child.kill('SIGTERM');
    return ended;
  };
  // Ctrl-C reaches the service by itself, a signal to this process alone does not; and asked twice to
  // end, the service would not finish its work.
  const state = { stopping: false };
  process.on('SIGINT', () => setTimeout(() => state.stopping || void stop(), 300));
  process.on('SIGTERM', () => void stop());

  const ready = new Promise((resolve) => {
    createInterface({ input: child.stdout }).on('line', (line) => {
      const entry = JSON.parse(line);
      if (entry.msg === 'ready') resolve(entry.url);
      if (entry.msg === 'stopping') state.stopping = true;
      if (entry.level >= 40) console.error(line);
    });
  });
  const url = await Promise.race([ready, ended.then(() => null)]);
  if (url === null) process.exit(1);
  return { url, ended, stop };
}

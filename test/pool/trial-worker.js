// Operations that misbehave on purpose, served by the compiled worker side of the pool.
import { serveTasks } from '../../dist/pool/serve-task.js';
import { fault } from '../../dist/faults/fault.js';
import { threadId } from 'node:worker_threads';

const read = (body) => {
  if (body.refuse)
    throw fault('malformed-json', '/refuse', { line: 1, column: 1, reason: 'asked to refuse' });
  return body;
};

function spin(milliseconds) {
  const end = Date.now() + milliseconds;
  while (Date.now() < end);
}

let solved = 0;

const solvers = {
  count: ({ milliseconds = 0 }) => {
    spin(milliseconds);
    return { threadId, solved: ++solved };
  },
  echo: (request) => ({ echo: request }),
  thread: ({ milliseconds = 0 }) => {
    spin(milliseconds);
    return { threadId };
  },
  busy: ({ milliseconds }) => {
    spin(milliseconds);
    return { milliseconds };
  },
  compute: ({ steps }) => {
    let sum = 0;
    for (let i = 1; i <= steps; i++) sum += Math.sqrt(i) / i;
    return { sum };
  },
  exit: () => process.exit(3),
  throwLater: ({ milliseconds }) => {
    queueMicrotask(() => {
      throw new Error('thrown after the task had returned');
    });
    spin(milliseconds ?? 0);
    return {};
  },
  heap: () => {
    const kept = [];
    for (;;) kept.push({ at: kept.length, text: `n${kept.length}` });
  },
  buffers: () => new Float64Array(1e13),
  bug: () => undefined.member,
  overflow: () => ({ modes: [{ frequency: Number.NaN }] }),
  refuse: () => {
    throw fault('no-inertia', '/member');
  },
  numbers: ({ count }) => ({ values: Float64Array.from({ length: count }, (_, i) => Math.sin(i)) }),
};

// What a request over HTTP asks for in `do`.
solvers.modes = (request) => solvers[request.do ?? 'echo'](request);
solvers.responses = solvers.modes;
solvers['transfer-functions'] = solvers.modes;

const operations = Object.fromEntries(
  Object.entries(solvers).map(([name, solve]) => [name, { read, solve }]),
);

export default serveTasks(operations);

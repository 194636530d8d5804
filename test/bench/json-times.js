import { encodeJson } from '../../dist/encoding/json.js';
import { readJson } from '../../dist/encoding/read-json.js';
import { inlineBodyLimit } from '../../dist/http/solve-resource.js';
import { operations } from '../../dist/pool/operations.js';
import { alternate, fixed, printTable } from './timing.js';

const encoder = new TextEncoder();
const value = (i) => Math.sin(i * 0.7) * 10 ** ((i % 9) - 5);

/** Writing answers against JSON.stringify, and the time that the largest inline body holds the event loop. */
export function jsonTimes() {
  const rows = Array.from({ length: 400 }, (_, i) =>
    Array.from({ length: 200 }, (__, j) => value(200 * i + j)),
  );
  const typed = { values: rows.map((row) => Float64Array.from(row)) };
  const modes = Array.from({ length: 10_000 }, (_, i) => ({
    order: i + 1,
    angularFrequency: value(i),
    frequency: value(i + 1),
    enclosure: [value(i + 2), value(i + 3)],
    modalMass: 1,
    energyShares: { segments: [value(i + 4), value(i + 5)], attachments: [], ends: [0, 0] },
  }));
  const table = [
    ['400 × 200 doubles', typed, { values: rows }],
    ['10,000 modes', { modes }, { modes }],
  ].map(([name, ours, plain]) => {
    const times = alternate(
      { ours: () => encodeJson(ours), plain: () => encoder.encode(JSON.stringify(plain)) },
      15,
    );
    return [name, fixed(times.ours), fixed(times.plain), fixed(times.ours / times.plain)];
  });
  printTable('Answer to JSON bytes', ['answer', 'ms', 'JSON.stringify ms', 'ratio'], table);

  const bodies = Object.entries(largestInlineBodies()).map(([name, body]) => {
    const bytes = encoder.encode(body);
    const { read } = alternate({ read: () => operations.modes.read(readJson(bytes)) }, 41);
    return [name, bytes.byteLength, fixed(read)];
  });
  printTable(
    'Reading the largest bodies on the event loop (goal: below 5 ms)',
    ['body', 'bytes', 'ms'],
    bodies,
  );
}

function largestInlineBodies() {
  const ends = { near: { type: 'fixed' }, far: { type: 'fixed' } };
  const grow = (make) => {
    let count = 2;
    while (JSON.stringify(make(count + 1)).length <= inlineBodyLimit) count++;
    return JSON.stringify(make(count));
  };
  const cable = { kind: 'cable', tension: 1e6, segments: [{ length: 100, massPerLength: 50 }], ends };
  return {
    'segments in unit strings': grow((count) => ({
      member: { ...cable, segments: Array(count).fill({ length: '4.5 m', massPerLength: '58 kg/m' }) },
      series: { modes: 3 },
    })),
    'positions in unit strings': grow((count) => ({
      member: cable,
      series: { modes: 3 },
      shapes: { positions: Array.from({ length: count }, (_, i) => `${i / 1000} m`) },
    })),
    'damping ratios': grow((count) => ({
      member: { ...cable, damping: { type: 'ratios', values: Array(count).fill(0.00123456789) } },
      series: { modes: 3 },
    })),
  };
}

import { performance } from 'node:perf_hooks';

export function median(values) {
  const sorted = values.toSorted((a, b) => a - b);
  return sorted[sorted.length >> 1];
}

/** Times in ms of each side, measured in turn so that a busy machine slows all alike. */
function runInTurn(sides, rounds, warm) {
  const times = Object.fromEntries(Object.keys(sides).map((name) => [name, []]));
  for (let round = 0; round < warm; round++) for (const run of Object.values(sides)) run();
  for (let round = 0; round < rounds; round++) {
    for (const [name, run] of Object.entries(sides)) {
      const started = performance.now();
      run();
      times[name].push(performance.now() - started);
    }
  }
  return times;
}

const medians = (times) =>
  Object.fromEntries(Object.entries(times).map(([name, list]) => [name, median(list)]));

/** Median time in ms of each side, run in turn. */
export function alternate(sides, rounds) {
  return medians(runInTurn(sides, rounds, 1));
}

/** The same with `over(a, b)`, the median of the rounds' own ratios: a busy minute counts once, not twice. */
export function alternateRatios(sides, rounds, warm) {
  const times = runInTurn(sides, rounds, warm);
  return {
    times: medians(times),
    over: (a, b) => median(times[a].map((time, round) => time / times[b][round])),
  };
}

/** Prints rows under a title, columns padded to their widest cell. */
export function printTable(title, head, rows) {
  const cells = [head, ...rows].map((row) => row.map(String));
  const widths = head.map((_, i) => Math.max(...cells.map((row) => row[i].length)));
  const line = (row) =>
    row.map((cell, i) => (i === 0 ? cell.padEnd(widths[i]) : cell.padStart(widths[i]))).join('  ');
  console.log(`\n${title}`);
  console.log(line(cells[0]));
  console.log(widths.map((width) => '-'.repeat(width)).join('  '));
  for (const row of cells.slice(1)) console.log(line(row));
}

export const fixed = (value, digits = 2) => value.toFixed(digits);

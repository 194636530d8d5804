import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { readJson } from '../../dist/encoding/read-json.js';
import { linearStep } from '../../dist/motion/linear-step.js';
import { operations } from '../../dist/pool/operations.js';
import { record, recordModesRequest, recordRequest } from './record-request.js';
import { alternateRatios, fixed, printTable } from './timing.js';

/** Runs of each side before any is timed: a long loop is compiled in the background, late on a busy machine. */
const WARM = 8;

/** A long base record against the same recurrences as bare loops, and the memory of a worker that solves it. */
export function recordTimes() {
  const { read, solve } = operations.responses;
  const rows = [
    ['relative displacement, no checks', ['relativeDisplacement'], false],
    ['relative displacement', ['relativeDisplacement'], true],
    ['three quantities', ['relativeDisplacement', 'acceleration', 'force'], true],
  ].map(([name, quantities, checks]) => {
    const request = read(recordRequest(quantities, checks));
    const bare = bareRecurrences(quantities);
    agree(solve(request).fields, bare());
    const { times, over } = alternateRatios({ solve: () => solve(request), bare }, 21, WARM);
    return [name, fixed(times.solve, 0), fixed(times.bare, 0), fixed(over('solve', 'bare'))];
  });
  printTable(
    'Base record of 100,000 points, 12 layers, 60 modes, 5 stations × 5,000 times (goal: solved in less than 2 × bare loops)',
    ['asked for', 'ms', 'bare loops ms', 'ratio'],
    rows,
  );
  const body = new TextEncoder().encode(JSON.stringify(recordRequest(['relativeDisplacement'], true)));
  const sides = { read: () => read(readJson(body)), bare: bareRecurrences(['relativeDisplacement']) };
  const { times, over } = alternateRatios(sides, 15, WARM);
  console.log(
    `Reading and checking its body of ${fixed(body.length / 1e6, 1)} MB beside that: ${fixed(times.read, 0)} ms, ${fixed(over('read', 'bare'))} × bare loops`,
  );
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    [fileURLToPath(new URL('record-memory.js', import.meta.url))],
    { encoding: 'utf8' },
  );
  if (status !== 0) throw new Error(stderr);
  console.log(stdout.trim());
}

/**
 * q″ + c q′ + ω² q = −factor × acceleration, by the step that is exact for a record of straight pieces,
 * mode by mode, summed over the shapes at the stations: q for a displacement or a force, q″ and the
 * base's own for an acceleration. Frequencies, shapes, factors and the eight numbers of every step are at hand, and
 * the record is an array of doubles: nothing is timed but slopes, steps and sums, no static part, bound
 * or check. What the record gives is added first, so that a step waits for three operations only: of the
 * orders in which its sum can be written the fastest.
 */
function bareRecurrences(quantities) {
  const { samples, interval, instants, stride, stations } = record;
  const { modes } = operations.modes.solve(operations.modes.read(recordModesRequest()));
  const acceleration = Float64Array.from(recordRequest([], false).loads[0].history.values);
  const rates = modes.map(({ angularFrequency, dampingRatio }) => 2 * dampingRatio * angularFrequency);
  const steps = modes.map(({ angularFrequency }, n) => linearStep(angularFrequency, rates[n], interval));
  return () => {
    const slope = new Float64Array(samples - 1);
    for (let i = 0; i < slope.length; i++) slope[i] = (acceleration[i + 1] - acceleration[i]) / interval;
    const sums = Object.fromEntries(
      quantities.map((quantity) => [quantity, new Float64Array(instants * stations)]),
    );
    const q = new Float64Array(instants);
    const v = new Float64Array(instants);
    const second = new Float64Array(instants);
    modes.forEach(({ angularFrequency, participation, shape }, n) => {
      march(steps[n], acceleration, slope, stride, q, v);
      for (const [quantity, sum] of Object.entries(sums)) {
        const heights = quantity === 'force' ? shape.force : shape.displacement;
        const weights = heights.map((height) => -participation.factor * height);
        if (quantity === 'acceleration') {
          const lambda = angularFrequency ** 2;
          for (let row = 0; row < instants; row++) {
            second[row] = acceleration[row * stride] - lambda * q[row] - rates[n] * v[row];
          }
          addSum(sum, weights, second);
        } else {
          addSum(sum, weights, q);
        }
      }
    });
    sums.acceleration?.forEach((_, at, sum) => (sum[at] += acceleration[Math.floor(at / stations) * stride]));
    return sums;
  };
}

/** q and q′ of a mode at every `stride`-th sample. */
function march(step, acceleration, slope, stride, q, v) {
  const { positionOfPosition: pp, positionOfVelocity: pv, positionOfLoad: pl, positionOfRate: pr } = step;
  const { velocityOfPosition: vp, velocityOfVelocity: vv, velocityOfLoad: vl, velocityOfRate: vr } = step;
  let position = 0;
  let velocity = 0;
  for (let row = 0, i = 0; row < q.length; row++) {
    for (; i < row * stride; i++) {
      const a = acceleration[i];
      const b = slope[i];
      const next = pl * a + pr * b + (pp * position + pv * velocity);
      velocity = vl * a + vr * b + (vp * position + vv * velocity);
      position = next;
    }
    q[row] = position;
    v[row] = velocity;
  }
}

/** sum[row][station] += weight · coordinate[row]. */
function addSum(sum, weights, coordinate) {
  const width = weights.length;
  for (let row = 0, at = 0; row < coordinate.length; row++) {
    const size = coordinate[row];
    for (let station = 0; station < width; station++, at++) sum[at] += weights[station] * size;
  }
}

/** Both sides must have solved the same; what the static part adds of the modes left out is small. */
function agree(fields, sums) {
  for (const [quantity, sum] of Object.entries(sums)) {
    let [difference, peak] = [0, 0];
    fields[quantity].values.forEach((row, j) =>
      row.forEach((value, q) => {
        difference = Math.max(difference, Math.abs(value - sum[j * row.length + q]));
        peak = Math.max(peak, Math.abs(value));
      }),
    );
    const small = quantity === 'relativeDisplacement' ? 1e-3 : 0.05;
    if (!(difference < small * peak))
      throw new Error(`the sides disagree on ${quantity} by ${difference} of ${peak}`);
  }
}

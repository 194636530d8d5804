import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { linearStep } from '../../dist/motion/linear-step.js';
import { operations } from '../../dist/pool/operations.js';
import { record, recordModesRequest, recordRequest } from './record-request.js';
import { alternate, fixed, printTable } from './timing.js';

/** A long base record against the same recurrences as bare loops, and the memory of a worker that solves it. */
export function recordTimes() {
  const { read, solve } = operations.responses;
  const bare = bareRecurrences();
  const rows = [
    ['relative displacement, no checks', ['relativeDisplacement'], false],
    ['relative displacement', ['relativeDisplacement'], true],
    ['three quantities', ['relativeDisplacement', 'acceleration', 'force'], true],
  ].map(([name, quantities, checks]) => {
    const request = read(recordRequest(quantities, checks));
    agree(solve(request).fields.relativeDisplacement.values, bare());
    const times = alternate({ solve: () => solve(request), bare }, 7);
    return [name, fixed(times.solve, 0), fixed(times.bare, 0), fixed(times.solve / times.bare)];
  });
  printTable(
    'Base record of 100,000 points, 12 layers, 60 modes, 5 stations × 5,000 times (goal: below 2)',
    ['asked for', 'ms', 'bare loops ms', 'ratio'],
    rows,
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
 * q″ + 2ζω q′ + ω² q = −factor × acceleration, by the step that is exact for a record of straight
 * pieces, mode by mode, summed over the shapes at the stations. Frequencies, shapes, factors and the
 * eight numbers of every step are at hand, and the record is an array of doubles: nothing is timed but
 * slopes, steps and sums. What the record gives is added first, so that a step waits for three
 * operations only: of the orders in which the sum can be written the fastest here.
 */
function bareRecurrences() {
  const { samples, interval, instants, stride, stations } = record;
  const { modes } = operations.modes.solve(operations.modes.read(recordModesRequest()));
  const acceleration = Float64Array.from(recordRequest([], false).loads[0].history.values);
  const steps = modes.map(({ angularFrequency, dampingRatio }) =>
    linearStep(angularFrequency, 2 * dampingRatio * angularFrequency, interval),
  );
  return () => {
    const slope = new Float64Array(samples - 1);
    for (let i = 0; i < slope.length; i++) slope[i] = (acceleration[i + 1] - acceleration[i]) / interval;
    const sums = new Float64Array(instants * stations);
    const coordinate = new Float64Array(instants);
    modes.forEach(({ participation, shape }, n) => {
      const { positionOfPosition: pp, positionOfVelocity: pv, positionOfLoad: pl } = steps[n];
      const { velocityOfPosition: vp, velocityOfVelocity: vv, velocityOfLoad: vl } = steps[n];
      const { positionOfRate: pr, velocityOfRate: vr } = steps[n];
      let [position, velocity] = [0, 0];
      for (let row = 0, i = 0; row < instants; row++) {
        for (; i < row * stride; i++) {
          const a = acceleration[i];
          const b = slope[i];
          const next = pl * a + pr * b + (pp * position + pv * velocity);
          velocity = vl * a + vr * b + (vp * position + vv * velocity);
          position = next;
        }
        coordinate[row] = position;
      }
      const weights = shape.displacement.map((height) => -participation.factor * height);
      for (let row = 0, at = 0; row < instants; row++) {
        const q = coordinate[row];
        for (let station = 0; station < stations; station++, at++) sums[at] += weights[station] * q;
      }
    });
    return sums;
  };
}

/** Both sides must have solved the same: the static part that bare modes leave out is small. */
function agree(values, sums) {
  const { stations } = record;
  let [difference, peak] = [0, 0];
  values.forEach((row, j) =>
    row.forEach((value, q) => {
      difference = Math.max(difference, Math.abs(value - sums[j * stations + q]));
      peak = Math.max(peak, Math.abs(value));
    }),
  );
  if (!(difference < 1e-3 * peak)) throw new Error(`the sides disagree by ${difference} of ${peak} m`);
}

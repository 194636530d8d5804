import { VALUES_ONLY, type HistoryMeasures, type Weighting } from './history-measures.ts';
import type { RecordDrive } from './record-motion.ts';

type RecordAmounts = Pick<
  HistoryMeasures,
  'jumps' | 'variation' | 'slopeVariation' | 'largest' | 'largestRate'
>;

/**
 * Measures of a long record, all of it (a longer span than needed only widens). Cost O(samples): running
 * maxima are compared in place, which takes a fraction of the time of Math.max in a long loop.
 */
export function measureRecord(drive: RecordDrive): HistoryMeasures {
  const { kick, interval: h } = drive;
  const amounts = amountsOf(drive);
  const { jumps, variation, slopeVariation } = amounts;
  return {
    ...amounts,
    weighedKicks: (gamma) => {
      const fade = Math.exp(-gamma * h);
      let held = 0;
      let most = 0;
      for (const one of kick ?? []) {
        held = held * fade + Math.abs(one);
        most = Math.max(most, held);
      }
      return most;
    },
    harmonic: null,
    weighed: (gamma, weightings) => {
      const ends = weightings.map(({ onValue, onSlope }) =>
        jumps.map((jump) => Math.hypot(onValue * jump.value, onSlope * jump.slope)),
      );
      // what never fades only grows, so its supremum is the whole
      if (gamma === 0) {
        return weightings.map(
          ({ onValue, onSlope }, index) =>
            ends[index][0] + onValue * variation + onSlope * slopeVariation + ends[index][1],
        );
      }
      const begins = ends.map(([begin]) => begin);
      const { held, most } =
        weightings.length === 1
          ? weighRecord(drive, gamma, weightings[0], begins[0])
          : weighThrice(drive, gamma, weightings, begins);
      return weightings.map((_, index) => Math.max(most[index], held[index] + ends[index][1]));
    },
  };
}

/** What is told of a record in one pass; apart, because numbers that a closure holds are slow in a loop. */
function amountsOf(drive: RecordDrive): RecordAmounts {
  const { value, slope, curve, interval: h, after } = drive;
  let variation = 0;
  let slopeVariation = 0;
  let largest = 0;
  let largestRate = 0;
  let reached = value[0];
  let before = slope[0];
  for (let i = 0; i < value.length; i++) {
    const bend = curve === null ? 0 : h * curve[i];
    const end = slope[i] + bend;
    const pace = Math.abs(slope[i]);
    const rate = pace > Math.abs(end) ? pace : Math.abs(end);
    // joints are continuous in p but for rounding and for kicks of y′ under drag
    variation += rate * h + Math.abs(value[i] - reached);
    slopeVariation += Math.abs(slope[i] - before) + Math.abs(bend);
    reached = value[i] + h * (slope[i] + 0.5 * bend);
    before = end;
    // a parabola rises above its ends by h² |curve|/8 at most
    const rise = 0.125 * h * Math.abs(bend);
    const from = Math.abs(value[i]) + rise;
    const to = Math.abs(reached) + rise;
    largest = largest > from ? largest : from;
    largest = largest > to ? largest : to;
    largestRate = largestRate > rate ? largestRate : rate;
  }
  const jumps = [
    { value: Math.abs(value[0]), slope: Math.abs(slope[0]) },
    { value: Math.abs(reached - after), slope: Math.abs(before) },
  ];
  return { jumps, variation, slopeVariation, largest, largestRate };
}

/** What was gathered at the end of the record and at most, one a weighting. */
interface Gathered {
  readonly held: readonly number[];
  readonly most: readonly number[];
}

/**
 * One recurrence a sample: what was gathered fades by e^{−γh}, an interval's change by its mean weight.
 *
 * @param begin what the record's beginning brings
 */
function weighRecord(
  drive: RecordDrive,
  gamma: number,
  { onValue, onSlope }: Weighting,
  begin: number,
): Gathered {
  const { value, slope, curve, interval: h } = drive;
  const { fade, mean } = fading(gamma, h);
  const onRun = onValue * h * mean;
  const onBend = onSlope * mean;
  // a sum from 0 is known to be a number, and stays out of the heap
  let held = 0 + begin;
  let most = held;
  let reached = value[0];
  let before = slope[0];
  for (let i = 0; i < value.length; i++) {
    const from = slope[i];
    const jump = onSlope * Math.abs(from - before) + onValue * Math.abs(value[i] - reached);
    before = from;
    reached = value[i] + h * from;
    let run = onRun * Math.abs(from);
    if (curve !== null) {
      const bend = h * curve[i];
      before = from + bend;
      reached += 0.5 * h * bend;
      run = onRun * Math.max(Math.abs(from), Math.abs(before)) + onBend * Math.abs(bend);
    }
    const peak = held + jump;
    most = most > peak ? most : peak;
    // beside held · fade, so that a sample waits for two operations of the last one only
    held = held * fade + (jump * fade + run);
    most = most > held ? most : held;
  }
  return { held: [held], most: [most] };
}

/** Three of them at once: one alone waits for its own last sum at every sample. */
function weighThrice(
  drive: RecordDrive,
  gamma: number,
  weightings: readonly Weighting[],
  begins: readonly number[],
): Gathered {
  const { value, slope, curve, interval: h } = drive;
  const { fade, mean } = fading(gamma, h);
  const [a, b, c] = [0, 1, 2].map((index) => weightings[index] ?? VALUES_ONLY);
  const { onValue: av, onSlope: as } = a;
  const { onValue: bv, onSlope: bs } = b;
  const { onValue: cv, onSlope: cs } = c;
  const onRun = h * mean;
  let held1 = 0 + begins[0];
  let held2 = 0 + begins[1];
  let held3 = 0 + (begins[2] ?? 0);
  let most1 = held1;
  let most2 = held2;
  let most3 = held3;
  let reached = value[0];
  let before = slope[0];
  for (let i = 0; i < value.length; i++) {
    const from = slope[i];
    const kink = Math.abs(from - before);
    const gap = Math.abs(value[i] - reached);
    before = from;
    reached = value[i] + h * from;
    let run = Math.abs(from);
    let turn = 0;
    if (curve !== null) {
      const bend = h * curve[i];
      before = from + bend;
      reached += 0.5 * h * bend;
      run = Math.max(run, Math.abs(before));
      turn = mean * Math.abs(bend);
    }
    run *= onRun;
    const jump1 = as * kink + av * gap;
    const jump2 = bs * kink + bv * gap;
    const jump3 = cs * kink + cv * gap;
    const peak1 = held1 + jump1;
    const peak2 = held2 + jump2;
    const peak3 = held3 + jump3;
    most1 = most1 > peak1 ? most1 : peak1;
    most2 = most2 > peak2 ? most2 : peak2;
    most3 = most3 > peak3 ? most3 : peak3;
    held1 = held1 * fade + (jump1 * fade + (av * run + as * turn));
    held2 = held2 * fade + (jump2 * fade + (bv * run + bs * turn));
    held3 = held3 * fade + (jump3 * fade + (cv * run + cs * turn));
    most1 = most1 > held1 ? most1 : held1;
    most2 = most2 > held2 ? most2 : held2;
    most3 = most3 > held3 ? most3 : held3;
  }
  return { held: [held1, held2, held3], most: [most1, most2, most3] };
}

/** e^{−γh}, and the mean of e^{−γs} over an interval. */
function fading(gamma: number, h: number): { readonly fade: number; readonly mean: number } {
  return {
    fade: Math.exp(-gamma * h),
    mean: gamma * h > 1e-8 ? -Math.expm1(-gamma * h) / (gamma * h) : 1,
  };
}

import type { HistoryMeasures } from './history-measures.ts';
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
    weighed: (gamma, onValue, onSlope) => {
      const [begin, end] = jumps.map((jump) => Math.hypot(onValue * jump.value, onSlope * jump.slope));
      // what never fades only grows, so its supremum is the whole
      if (gamma === 0) return begin + onValue * variation + onSlope * slopeVariation + end;
      return weighRecord(drive, gamma, onValue, onSlope, begin, end);
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

/**
 * One recurrence a sample: what was gathered fades by e^{−γh}, an interval's change by its mean weight.
 *
 * @param begin what the record's beginning brings, and `end` its end
 */
function weighRecord(
  drive: RecordDrive,
  gamma: number,
  onValue: number,
  onSlope: number,
  begin: number,
  end: number,
): number {
  const { value, slope, curve, interval: h } = drive;
  const fade = Math.exp(-gamma * h);
  const mean = gamma * h > 1e-8 ? -Math.expm1(-gamma * h) / (gamma * h) : 1;
  const onRun = onValue * h * mean;
  const onBend = onSlope * mean;
  // a sum from 0 is known to be a number, and stays out of the heap
  let held = 0 + begin;
  let most = held;
  let reached = value[0];
  let before = slope[0];
  for (let i = 0; i < value.length; i++) {
    const from = slope[i];
    held += onSlope * Math.abs(from - before) + onValue * Math.abs(value[i] - reached);
    most = most > held ? most : held;
    before = from;
    reached = value[i] + h * from;
    let run = onRun * Math.abs(from);
    if (curve !== null) {
      const bend = h * curve[i];
      before = from + bend;
      reached += 0.5 * h * bend;
      run = onRun * Math.max(Math.abs(from), Math.abs(before)) + onBend * Math.abs(bend);
    }
    held = held * fade + run;
    most = most > held ? most : held;
  }
  return Math.max(most, held + end);
}

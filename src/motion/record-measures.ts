import type { HistoryMeasures } from './history-measures.ts';
import type { RecordDrive } from './record-motion.ts';

/** Measures of a long record, all of it (a longer span than needed only widens). Cost O(samples). */
export function measureRecord(drive: RecordDrive): HistoryMeasures {
  const { value, slope, curve, kick, interval: h, after } = drive;
  let variation = 0;
  let slopeVariation = 0;
  let largest = 0;
  let largestRate = 0;
  let reached = value[0];
  let before = slope[0];
  for (let i = 0; i < value.length; i++) {
    const bend = curve === null ? 0 : h * curve[i];
    const end = slope[i] + bend;
    const rate = larger(Math.abs(slope[i]), Math.abs(end));
    // joints are continuous in p but for rounding and for kicks of y′ under drag
    variation += rate * h + Math.abs(value[i] - reached);
    slopeVariation += Math.abs(slope[i] - before) + Math.abs(bend);
    reached = value[i] + h * (slope[i] + 0.5 * bend);
    before = end;
    // a parabola rises above its ends by h² |curve|/8 at most
    const rise = 0.125 * h * Math.abs(bend);
    largest = larger(larger(largest, Math.abs(value[i]) + rise), Math.abs(reached) + rise);
    largestRate = larger(largestRate, rate);
  }
  const jumps = [
    { value: Math.abs(value[0]), slope: Math.abs(slope[0]) },
    { value: Math.abs(reached - after), slope: Math.abs(before) },
  ];
  return {
    jumps,
    variation,
    slopeVariation,
    largest,
    largestRate,
    weighedKicks: (gamma) => {
      const fade = Math.exp(-gamma * h);
      let held = 0;
      let most = 0;
      for (const one of kick ?? []) {
        held = held * fade + Math.abs(one);
        most = larger(most, held);
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
  let held = begin;
  let most = begin;
  let reached = value[0];
  let before = slope[0];
  for (let i = 0; i < value.length; i++) {
    const from = slope[i];
    held += onSlope * Math.abs(from - before) + onValue * Math.abs(value[i] - reached);
    most = larger(most, held);
    before = from;
    reached = value[i] + h * from;
    let run = onRun * Math.abs(from);
    if (curve !== null) {
      const bend = h * curve[i];
      before = from + bend;
      reached += 0.5 * h * bend;
      run = onRun * larger(Math.abs(from), Math.abs(before)) + onBend * Math.abs(bend);
    }
    held = held * fade + run;
    most = larger(most, held);
  }
  return larger(most, held + end);
}

/**
 * The larger of two numbers, none of them NaN, in less time than Math.max: in a long loop the running
 * maximum goes first, because a processor foresees which of the two wins.
 */
function larger(a: number, b: number): number {
  return a > b ? a : b;
}

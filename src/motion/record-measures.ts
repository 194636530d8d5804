import type { HistoryMeasures } from './history-measures.ts';
import type { RecordDrive } from './record-motion.ts';

/** Changes of p and p′ over a record, laid out once for all weights they are summed with. */
interface RecordChanges {
  /** Jumps |Δp| and |Δp′| at the beginning of each interval but the first, shape [intervals]. */
  readonly valueJump: Float64Array;
  readonly slopeJump: Float64Array;
  /** Variation of p and p′ within each interval, at most, shape [intervals]. */
  readonly valueRun: Float64Array;
  readonly slopeRun: Float64Array;
  /** The record's beginning and end. */
  readonly jumps: HistoryMeasures['jumps'];
  readonly largest: number;
}

/** Measures of a long record, all of it (a longer span than needed only widens). Cost O(samples). */
export function measureRecord(drive: RecordDrive): HistoryMeasures {
  const { kick, interval: h } = drive;
  const changes = changesOf(drive);
  const { valueJump, slopeJump, valueRun, slopeRun, jumps, largest } = changes;
  let variation = 0;
  let slopeVariation = 0;
  let longestRun = 0;
  for (let i = 0; i < valueRun.length; i++) {
    variation += valueRun[i] + valueJump[i];
    slopeVariation += slopeJump[i] + slopeRun[i];
    longestRun = valueRun[i] > longestRun ? valueRun[i] : longestRun;
  }
  return {
    jumps,
    variation,
    slopeVariation,
    largest,
    largestRate: longestRun / h,
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
    weighed: (gamma, onValue, onSlope) =>
      gamma > 0
        ? weighChanges(changes, gamma * h, onValue, onSlope)
        : // what never fades only grows, so the supremum is the whole
          jumps.reduce((sum, jump) => sum + Math.hypot(onValue * jump.value, onSlope * jump.slope), 0) +
          onValue * variation +
          onSlope * slopeVariation,
  };
}

function changesOf({ value, slope, curve, interval: h, after }: RecordDrive): RecordChanges {
  const count = value.length;
  const [valueJump, slopeJump, valueRun, slopeRun] = [0, 1, 2, 3].map(() => new Float64Array(count));
  let largest = 0;
  let reached = value[0];
  let before = slope[0];
  for (let i = 0; i < count; i++) {
    const bend = curve === null ? 0 : h * curve[i];
    const end = slope[i] + bend;
    const pace = Math.abs(slope[i]);
    const endPace = Math.abs(end);
    // joints are continuous in p but for rounding and for kicks of y′ under drag
    valueJump[i] = Math.abs(value[i] - reached);
    slopeJump[i] = Math.abs(slope[i] - before);
    valueRun[i] = h * (pace > endPace ? pace : endPace);
    slopeRun[i] = Math.abs(bend);
    reached = value[i] + h * (slope[i] + 0.5 * bend);
    before = end;
    // a parabola leaves the larger of its ends by h² |curve|/8 at most
    const from = Math.abs(value[i]);
    const to = Math.abs(reached);
    const peak = (from > to ? from : to) + 0.125 * h * Math.abs(bend);
    largest = peak > largest ? peak : largest;
  }
  const jumps = [
    { value: Math.abs(value[0]), slope: Math.abs(slope[0]) },
    { value: Math.abs(reached - after), slope: Math.abs(before) },
  ];
  return { valueJump, slopeJump, valueRun, slopeRun, jumps, largest };
}

/**
 * sup of ∫e^{−γ(t−s)} (|dp| a + |dp′| b), one recurrence a sample: what was gathered fades by e^{−γh},
 * an interval's change by its mean weight.
 *
 * @param fading γ h
 */
function weighChanges(changes: RecordChanges, fading: number, onValue: number, onSlope: number): number {
  const { valueJump, slopeJump, valueRun, slopeRun, jumps } = changes;
  const [begin, end] = jumps.map((jump) => Math.hypot(onValue * jump.value, onSlope * jump.slope));
  const fade = Math.exp(-fading);
  const mean = fading > 1e-8 ? -Math.expm1(-fading) / fading : 1;
  const onValueRun = onValue * mean;
  const onSlopeRun = onSlope * mean;
  let held = begin;
  let most = begin;
  for (let i = 0; i < valueRun.length; i++) {
    const joined = held + (onSlope * slopeJump[i] + onValue * valueJump[i]);
    most = joined > most ? joined : most;
    held = joined * fade + (onValueRun * valueRun[i] + onSlopeRun * slopeRun[i]);
    most = held > most ? held : most;
  }
  return Math.max(most, held + end);
}

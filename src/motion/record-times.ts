import { sampleBefore } from './history.ts';

/** Distinct offsets of sampled times within an interval up to which steps are computed once a mode. */
const OFFSET_LIMIT = 64;

/** Where sampled times lie in a record: before it, in which interval and how far, or after it. */
export class RecordTimes {
  /** Index of the first time that is not before the record, and of the first after it. */
  readonly first: number;
  readonly afterFrom: number;
  /** Interval that a time lies in, and its time after the interval's beginning, s; shape [times]. */
  readonly interval: Int32Array;
  readonly offset: Float64Array;
  /** Distinct offsets, told apart to 1e-9 of an interval, with each time's among them; null if many. */
  readonly offsets: readonly number[] | null;
  readonly offsetIndex: Int32Array;
  /** Times after the end of the record, s. */
  readonly after: Float64Array;

  /** @param times ascending */
  constructor(
    record: { readonly start: number; readonly interval: number; readonly value: Float64Array },
    times: Float64Array,
  ) {
    const { start, interval: h } = record;
    const count = record.value.length;
    this.interval = new Int32Array(times.length);
    this.offset = new Float64Array(times.length);
    this.offsetIndex = new Int32Array(times.length);
    const offsets: number[] = [];
    const known = new Map<number, number>();
    let first = 0;
    let afterFrom = times.length;
    for (let j = 0; j < times.length; j++) {
      const place = (times[j] - start) / h;
      const i = sampleBefore(place);
      if (i < 0) {
        first = j + 1;
        continue;
      }
      if (i >= count) {
        afterFrom = j;
        break;
      }
      this.interval[j] = i;
      const key = Math.round(Math.max(0, place - i) * 1e9);
      const exact = times[j] - start - i * h;
      let index = known.get(key);
      if (index === undefined) {
        index = offsets.length;
        known.set(key, index);
        offsets.push(Math.max(0, exact) < 1e-9 * h ? 0 : exact);
      }
      this.offset[j] = offsets[index];
      this.offsetIndex[j] = index;
    }
    this.first = first;
    this.afterFrom = Math.max(first, afterFrom);
    this.offsets = offsets.length <= OFFSET_LIMIT ? offsets : null;
    const end = start + count * h;
    this.after = times.slice(this.afterFrom).map((t) => Math.max(0, t - end));
  }
}

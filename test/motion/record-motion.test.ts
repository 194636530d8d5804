import { describe, expect, it } from 'vitest';
import { SupportMotion } from '../../src/motion/end-motion.ts';
import { ForcedMotion } from '../../src/motion/forced-motion.ts';
import { historyAt, historyIntegrals, recordParts, readHistory } from '../../src/motion/history.ts';
import { measureParts, VALUES_ONLY } from '../../src/motion/history-measures.ts';
import { measureRecord } from '../../src/motion/record-measures.ts';
import { RecordMotion } from '../../src/motion/record-motion.ts';
import type { History } from '../../src/spec/types.ts';
import { RandomStream } from '../support/random.ts';

const random = new RandomStream(5);
const values = Float64Array.from({ length: 130 }, () => random.between(-1, 1));
const record = { start: 0.35, interval: 0.02, values, holds: false };
const times = Float64Array.from({ length: 300 }, (_, j) => 0.011 * j);

function slopes(): Float64Array {
  return Float64Array.from(values.subarray(1), (value, i) => (value - values[i]) / record.interval);
}

const drive = {
  start: record.start,
  interval: record.interval,
  value: values.subarray(0, values.length - 1),
  slope: slopes(),
  curve: null,
  kick: null,
  after: 0,
};

describe('a record, as a recurrence and as parts', () => {
  it.each([
    [9, 0],
    [9, 0.2],
    [9, 18],
    [9, 18 * (1 + 1e-9)],
    [9, 300],
    [0, 0],
    [0, 0.4],
    [2000, 5],
    [1e-4, 0],
  ])('RecordMotion equals ForcedMotion: ω = %d, c = %d', (omega, rate) => {
    const [q, v, p, w] = [0, 1, 2, 3].map(() => new Float64Array(times.length));
    new RecordMotion(drive, times).add(omega, rate, 0.7, q, v);
    new ForcedMotion(recordParts(record), [], times).add(omega, rate, 0.7, p, w);
    const largest = (list: Float64Array): number => list.reduce((most, x) => Math.max(most, Math.abs(x)), 0);
    times.forEach((_, j) => {
      expect(Math.abs(q[j] - p[j])).toBeLessThan(1e-12 * largest(p));
      expect(Math.abs(v[j] - w[j])).toBeLessThan(1e-12 * largest(w));
    });
    expect(largest(p)).toBeGreaterThan(0);
  });

  it('value, rate and integral of a long record are those of its lines', () => {
    const long = { parts: [], record };
    const short = { parts: recordParts(record), record: null };
    const sums = [long, short].map((history) => historyIntegrals(history, times));
    times.forEach((t, j) => {
      expect(historyAt(long, t).value).toBeCloseTo(historyAt(short, t).value, 12);
      expect(sums[0][j]).toBeCloseTo(sums[1][j], 13);
    });
  });

  it('modes in company move as each alone, to the last bit', () => {
    const modes = [
      { omega: 9, rate: 0.2 },
      { omega: 2000, rate: 5 },
    ];
    const drag = drive.slope.map((slope) => 0.3 * slope);
    const kick = Float64Array.from({ length: drag.length + 1 }, () => random.between(-1, 1));
    for (const one of [drive, { ...drive, curve: drag, after: 0.2 }, { ...drive, curve: drag, kick }]) {
      const together = new RecordMotion(one, times);
      together.expect(modes);
      for (const { omega, rate } of modes) {
        const [q, v, p, w] = [0, 1, 2, 3].map(() => new Float64Array(times.length));
        together.add(omega, rate, 0.7, q, v);
        new RecordMotion(one, times).add(omega, rate, 0.7, p, w);
        expect([q, v]).toEqual([p, w]);
        expect(q.some((x) => x !== 0)).toBe(true);
      }
    }
  });

  it('the largest value of a record is its largest sample, the last one too', () => {
    const of = (values: number[]): number =>
      measureRecord({
        ...drive,
        value: Float64Array.from(values.slice(0, -1)),
        slope: Float64Array.from(values.slice(1), (value, i) => (value - values[i]) / drive.interval),
      }).largest;
    expect(of([0, 1, -1, 0.5])).toBeCloseTo(1, 14);
    expect(of([0, 1, -1, -3])).toBeCloseTo(3, 14);
  });

  it('measures of the record hold those of its parts, and brute-force sums', () => {
    const ofRecord = measureRecord(drive);
    const ofParts = measureParts(recordParts(record), [], 1e9);
    const brute = drive.slope.reduce((sum, slope) => sum + Math.abs(slope) * record.interval, 0);
    const turns = drive.slope.reduce(
      (sum, slope, i) => sum + (i > 0 ? Math.abs(slope - drive.slope[i - 1]) : 0),
      0,
    );
    const peak = values.reduce((most, x) => Math.max(most, Math.abs(x)), 0);
    for (const measures of [ofRecord, ofParts]) {
      expect(measures.variation).toBeCloseTo(brute, 10);
      expect(measures.slopeVariation).toBeCloseTo(turns, 8);
      expect(measures.jumps.map((jump) => jump.value)).toEqual([
        expect.closeTo(Math.abs(values[0]), 12),
        expect.closeTo(Math.abs(values[129]), 12),
      ]);
      expect(measures.largest).toBeGreaterThanOrEqual(peak);
    }
    // sup over t of ∫e^{−γ(t−s)}|dp|, by a fine sum of Stieltjes steps
    for (const gamma of [0.5, 10, 400]) {
      const steps = 400;
      const h = record.interval / steps;
      let held = Math.abs(values[0]);
      let most = held;
      for (const slope of drive.slope) {
        for (let m = 0; m < steps; m++) {
          held = held * Math.exp(-gamma * h) + Math.abs(slope) * h * Math.exp(-0.5 * gamma * h);
          most = Math.max(most, held);
        }
      }
      most = Math.max(most, held + Math.abs(values[129]));
      expect(ofRecord.weighed(gamma, [VALUES_ONLY])[0]).toBeGreaterThanOrEqual(most * (1 - 1e-6));
      expect(ofRecord.weighed(gamma, [VALUES_ONLY])[0]).toBeLessThanOrEqual(most * 1.001);
    }
  });
});

describe('measures of histories, against their definitions on a fine grid', () => {
  it.each([
    [{ type: 'harmonic', amplitude: 2, frequency: 1.3, phase: 0.4, start: 0.2 }],
    [{ type: 'half-sine-pulse', amplitude: -3, start: 0.1, duration: 0.7 }],
    [{ type: 'ramp', amplitude: 1.5, start: 0.3, duration: 0.9 }],
  ] as const)('%j', (history) => {
    const span = 2.3;
    const { parts } = readHistory(history);
    const measures = measureParts(parts, [], span);
    let [variation, turns, largest] = [0, 0, 0];
    const count = 200_000;
    let before = { value: 0, rate: 0 };
    for (let i = 0; i <= count; i++) {
      const now = historyAt({ parts, record: null }, (span * i) / count);
      variation += Math.abs(now.value - before.value);
      turns += Math.abs(now.rate - before.rate);
      largest = Math.max(largest, Math.abs(now.value));
      before = now;
    }
    const jumps = measures.jumps.reduce((sum, jump) => sum + jump.value, 0);
    const steps = measures.jumps.reduce((sum, jump) => sum + jump.slope, 0);
    expect(measures.variation + jumps).toBeGreaterThanOrEqual(variation * (1 - 1e-9));
    expect(measures.variation + jumps).toBeLessThan(variation * 1.001);
    expect(measures.slopeVariation + steps).toBeGreaterThanOrEqual(turns * (1 - 1e-4));
    expect(measures.slopeVariation + steps).toBeLessThan(turns * 1.001);
    expect(measures.largest).toBeGreaterThanOrEqual(largest * (1 - 1e-9));
    expect(measures.largest).toBeLessThan(largest * 1.001);
  });
});

describe('motion of a support', () => {
  it('integrates an acceleration exactly: harmonic, step, record', () => {
    const omega = 2 * Math.PI * 1.7;
    const harmonic = new SupportMotion(
      readHistory({ type: 'harmonic', amplitude: 3, frequency: 1.7, phase: 0, start: 0.5 }),
      'acceleration',
      0,
    );
    for (const s of [0, 0.01, 0.3, 4]) {
      const { position, velocity, acceleration } = harmonic.at(0.5 + s);
      expect(position).toBeCloseTo((3 * (1 - Math.cos(omega * s))) / omega ** 2, 13);
      expect(velocity).toBeCloseTo((3 * Math.sin(omega * s)) / omega, 13);
      expect(acceleration).toBeCloseTo(3 * Math.cos(omega * s), 12);
    }
    const step = new SupportMotion(readHistory({ type: 'step', amplitude: 2, start: 1 }), 'acceleration', 0);
    expect(step.at(4)).toEqual({ position: 9, velocity: 6, acceleration: 2 });
    expect(step.integrals(Float64Array.of(4))[0]).toBeCloseTo(9, 13);

    // a tent: y″ rises from 0 to 1 in 1 s and falls back; y = t³/6, then by hand
    const tent: History = { type: 'samples', interval: 1, values: [0, 1, 0], start: 0 };
    const few = new SupportMotion(readHistory(tent), 'acceleration', 0);
    expect(few.at(1).position).toBeCloseTo(1 / 6, 14);
    expect(few.at(2).position).toBeCloseTo(1, 14);
    expect(few.at(2).velocity).toBeCloseTo(1, 14);
    expect(few.at(5).position).toBeCloseTo(4, 13);
    // the same tent in 200 samples takes the other way
    const fine = Array.from({ length: 201 }, (_, i) => Math.min(i, 200 - i) / 100);
    const many = new SupportMotion(
      readHistory({ type: 'samples', interval: 0.01, values: fine, start: 0 }),
      'acceleration',
      0,
    );
    for (const t of [0.5, 1, 1.234, 2, 5]) {
      expect(many.at(t).position).toBeCloseTo(few.at(t).position, 13);
      expect(many.at(t).velocity).toBeCloseTo(few.at(t).velocity, 13);
      expect(many.integrals(Float64Array.of(t))[0]).toBeCloseTo(few.integrals(Float64Array.of(t))[0], 12);
    }
  });
});

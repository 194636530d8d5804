import { describe, expect, it } from 'vitest';
import { linearStep } from '../../src/motion/linear-step.ts';
import { RecordMotion, RECORD_LANES } from '../../src/motion/record-motion.ts';
import { ForcedRecurrence } from '../../src/numerics/forced-recurrence.ts';
import { LANES, STEP } from '../../src/numerics/plain-recurrence.ts';
import { RandomStream } from '../support/random.ts';
import { kernelTexts } from './kernel-source.ts';

it('the committed kernel is what its source assembles to', async () => {
  const { committed, assembled } = await kernelTexts('recurrence-kernel', 'RECURRENCE_KERNEL');
  expect(committed).toBe(assembled);
});

const random = new RandomStream(20);
const list = (length: number): Float64Array => Float64Array.from({ length }, () => random.between(-1, 1));
/** Bits, so that −0 is not 0. */
const bits = (values: Float64Array): BigUint64Array => new BigUint64Array(values.slice().buffer);

/** Undamped, light, critical to rounding, over-damped, rigid, stiff, and so quick that it dies within a step. */
function randomMode(): { omega: number; rate: number } {
  const omega = 10 ** random.between(-3, 5);
  const kinds = [
    { omega, rate: 0 },
    { omega, rate: 2 * omega * random.between(0, 0.2) },
    { omega, rate: 2 * omega },
    { omega, rate: 2 * omega * (1 + random.between(-1e-9, 1e-9)) },
    { omega, rate: omega * random.between(2, 1000) },
    { omega: 0, rate: 0 },
    { omega: 0, rate: random.between(0, 100) },
  ];
  return kinds[Math.floor(random.between(0, kinds.length))];
}

function randomDrive(intervals: number): ConstructorParameters<typeof RecordMotion>[0] {
  const [curve, kick] = [random.between(0, 1) < 0.5, random.between(0, 1) < 0.5];
  return {
    start: [0, 0.35, -3, 40][Math.floor(random.between(0, 4))],
    interval: 10 ** random.between(-3, 0),
    value: list(intervals),
    slope: list(intervals),
    curve: curve ? list(intervals) : null,
    kick: kick ? list(intervals + 1) : null,
    after: random.between(0, 1) < 0.5 ? 0 : 0.3,
  };
}

describe('the kernel has the bits of the plain loop', () => {
  it('from any states, at any stops, run after run', () => {
    for (let round = 0; round < 200; round++) {
      const forcing = randomDrive(1 + Math.floor(random.between(0, 300)));
      const [quick, plain] = [true, false].map((simd) => new ForcedRecurrence(forcing, simd));
      for (const most of [3, 200, 40]) {
        const stops = Int32Array.from({ length: Math.floor(random.between(0, most)) }, () =>
          Math.floor(random.between(0, forcing.value.length + 1)),
        ).toSorted();
        const [steps, states] = [list(STEP.length * LANES), list(2 * LANES)];
        // steps of any recurrence that does not grow
        steps.forEach((number, at) => (steps[at] = 0.5 * number));
        const [one, other] = [quick, plain].map((recurrence) => {
          recurrence.steps.set(steps);
          recurrence.states.set(states);
          const tables = recurrence.run(stops).slice(0, 2 * LANES * stops.length);
          return [bits(tables), bits(recurrence.states)];
        });
        expect(one).toEqual(other);
      }
    }
  });

  it('for the motion of random modes under random records, alone and in company', () => {
    let moved = 0;
    for (let round = 0; round < 300; round++) {
      const drive = randomDrive(65 + Math.floor(random.between(0, 200)));
      const { start, interval, value } = drive;
      const end = start + value.length * interval;
      const onGrid = random.between(0, 1) < 0.3;
      const times = Float64Array.from({ length: 1 + Math.floor(random.between(0, 60)) }, () => {
        const t = random.between(start - 0.3 * (end - start), end + 0.3 * (end - start));
        return onGrid ? start + interval * Math.round((t - start) / interval) : t;
      }).toSorted();
      const modes = Array.from({ length: RECORD_LANES }, randomMode);
      const count = 1 + Math.floor(random.between(0, RECORD_LANES));
      const quick = new RecordMotion(drive, times, new ForcedRecurrence(drive, true));
      const plain = new RecordMotion(drive, times, new ForcedRecurrence(drive, false));
      quick.expect(modes.slice(0, count));
      for (const { omega, rate } of modes.slice(0, count)) {
        const [q, v, p, w] = [0, 1, 2, 3].map(() => new Float64Array(times.length));
        quick.add(omega, rate, 0.7, q, v);
        plain.add(omega, rate, 0.7, p, w);
        expect([bits(q), bits(v)]).toEqual([bits(p), bits(w)]);
        if (q.some((x) => x !== 0)) moved++;
      }
    }
    expect(moved).toBeGreaterThan(500);
  });

  it('and both are the step of the mode, summed in exact order', () => {
    const [omega, rate, h] = [3, 0.4, 0.02];
    const step = linearStep(omega, rate, h);
    const drive = { ...randomDrive(80), start: 0, interval: h, curve: null, kick: null };
    const times = Float64Array.from(drive.value, (_, i) => i * h);
    const [q, v] = [new Float64Array(80), new Float64Array(80)];
    new RecordMotion(drive, times).add(omega, rate, 1, q, v);
    let [position, velocity] = [0, 0];
    for (let i = 0; i < 80; i++) {
      expect([q[i], v[i]]).toEqual([position, velocity]);
      const { value, slope } = drive;
      [position, velocity] = [
        step.positionOfLoad * value[i] +
          step.positionOfRate * slope[i] +
          (step.positionOfPosition * position + step.positionOfVelocity * velocity),
        step.velocityOfLoad * value[i] +
          step.velocityOfRate * slope[i] +
          (step.velocityOfPosition * position + step.velocityOfVelocity * velocity),
      ];
    }
  });
});

import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readRequest } from '../../src/contract/read-request.ts';
import { validatorOf } from '../../src/contract/validators.ts';
import { encodeJson } from '../../src/encoding/json.ts';
import { solveModes } from '../../src/solutions/modes.ts';
import { solveResponses } from '../../src/solutions/responses.ts';
import { solveTransferFunctions } from '../../src/solutions/transfer-functions.ts';
import type {
  EndMotion,
  ResponsesAnswer,
  SampledHistory,
  ShearColumn,
  TransferFunctionsAnswer,
} from '../../src/spec/types.ts';

const folder = new URL('../../schemas/examples/', import.meta.url);
const load = (file: string): Record<string, unknown> =>
  JSON.parse(readFileSync(new URL(file, folder), 'utf8')) as Record<string, unknown>;

/** An answer as a client sees it; it must satisfy its schema. */
function published(schema: string, answer: unknown): unknown {
  const seen = JSON.parse(new TextDecoder().decode(encodeJson(answer))) as unknown;
  const validate = validatorOf(schema);
  validate.call({ kind: 'cable', document: null, originals: new Map() }, seen);
  expect(validate.errors ?? []).toEqual([]);
  return seen;
}

const responsesOf = (file: string): ResponsesAnswer =>
  published('ResponsesAnswer', solveResponses(readRequest('responses', load(file)))) as ResponsesAnswer;

describe('a machine on a tie rod', () => {
  it('shakes it like a mass on a spring near resonance', () => {
    const { convergence, peaks, fields } = responsesOf('machine-on-tie-rod.json');
    expect(convergence.verdict).toBe('converged');
    // One mass on the rod's stiffness, a third of the rod's mass with it (Rayleigh), damping ratio 0.012.
    const stiffness = 1 / (6.9 / (205e9 * 1810e-6) + 0.4 / (205e9 * 3320e-6));
    const mass = 1620 + (7850 * (6.9 * 1810e-6 + 0.4 * 3320e-6)) / 3;
    const ratio = (2 * Math.PI * 24.5) / Math.sqrt(stiffness / mass);
    const steady = 175 / stiffness / Math.hypot(1 - ratio ** 2, 2 * 0.012 * ratio);
    // Steady state and the free motion that the start leaves: up to 1 + r times as much for a sine.
    const { value, upper } = peaks.displacement!;
    expect(Math.abs(value)).toBeGreaterThan(steady);
    expect(Math.abs(value)).toBeLessThan((1 + ratio) * 1.02 * steady);
    expect(upper!).toBeGreaterThanOrEqual(Math.abs(value));
    // Nothing moves before the machine starts, at 0.1 s.
    const still = fields.displacement!.values.filter((_, index) => fields.times[index] < 0.1);
    expect(still.flatMap((row) => [...row]).every((entry) => Math.abs(entry) < 1e-12)).toBe(true);
  });
});

describe('a soil column shaken by a made-up record', () => {
  const request = readRequest('responses', load('shaken-soil-column.json'));
  const { interval, values } = (request.loads[0] as EndMotion).history as SampledHistory;

  it('has at its base the twice integrated record', () => {
    const { fields, notices } = responsesOf('shaken-soil-column.json');
    let [velocity, displacement] = [0, 0];
    for (let index = 1; index < values.length; index++) {
      displacement += interval * (velocity + (interval * (2 * values[index - 1] + values[index])) / 6);
      velocity += (interval * (values[index - 1] + values[index])) / 2;
    }
    const last = fields.displacement!.values[fields.times.length - 1];
    expect(last[0]).toBeCloseTo(displacement + velocity * (24 - interval * (values.length - 1)), 9);
    expect(Math.max(...fields.relativeDisplacement!.values.map((row) => Math.abs(row[0])))).toBeLessThan(
      1e-12,
    );
    expect(notices.map(({ detail }) => detail).join(' ')).toMatch(/drift/);
  });

  it('moves at its surface as its first mode does, 15 % apart at most', () => {
    const { peaks } = responsesOf('shaken-soil-column.json');
    const { modes } = solveModes(
      readRequest('modes', {
        member: load('shaken-soil-column.json').member,
        series: { modes: 1 },
        shapes: { positions: [27] },
        participation: { ends: 'near' },
      }),
    );
    const [{ angularFrequency, participation, shape }] = modes;
    const surface = participation!.factor * shape!.displacement![0];
    // Central differences with 20 steps per sample: q″ + 2ζω q′ + ω² q = −acceleration.
    const step = interval / 20;
    let [before, now, peak] = [0, 0, 0];
    for (let index = 0; index < 24 / step; index++) {
      const place = index / 20;
      const left = values[Math.floor(place)] ?? 0;
      const right = values[Math.floor(place) + 1] ?? 0;
      const ground = left + (right - left) * (place % 1);
      const drag = 0.05 * angularFrequency * step;
      const next =
        (2 * now - (1 - drag) * before - step ** 2 * (ground + angularFrequency ** 2 * now)) / (1 + drag);
      [before, now] = [now, next];
      peak = Math.max(peak, Math.abs(now));
    }
    expect(Math.abs(peaks.relativeDisplacement!.value) / (surface * peak)).toBeGreaterThan(0.85);
    expect(Math.abs(peaks.relativeDisplacement!.value) / (surface * peak)).toBeLessThan(1.15);
  });
});

describe('a load that crosses a trolley wire', () => {
  it('pushes it aside as it would standing, and a little more', () => {
    const { convergence, peaks, fields } = responsesOf('load-crossing-cable.json');
    expect(convergence.verdict).toBe('converged');
    // Static deflection of a taut string under a force at mid-span, P L/(4 T).
    const standing = (70 * 32) / (4 * 10e3);
    expect(peaks.displacement!.value / standing).toBeGreaterThan(0.95);
    expect(peaks.displacement!.value / standing).toBeLessThan(1.25);
    const still = fields.displacement!.values.filter((_, index) => fields.times[index] <= 0.2);
    expect(still.flatMap((row) => [...row]).every((entry) => Math.abs(entry) < 1e-12)).toBe(true);
  });
});

describe('a soil column on an elastic half-space', () => {
  const request = readRequest('transfer-functions', load('soil-column-transfer.json'));
  const answer = published(
    'TransferFunctionsAnswer',
    solveTransferFunctions(request),
  ) as TransferFunctionsAnswer;

  type Complex = readonly [number, number];
  const times = ([a, b]: Complex, [c, d]: Complex): Complex => [a * c - b * d, a * d + b * c];
  const plus = ([a, b]: Complex, [c, d]: Complex): Complex => [a + c, b + d];
  const over = (left: Complex, [c, d]: Complex): Complex => {
    const [a, b] = times(left, [c, -d]);
    return [a / (c * c + d * d), b / (c * c + d * d)];
  };
  const root = ([a, b]: Complex): Complex => {
    const [size, angle] = [Math.sqrt(Math.hypot(a, b)), Math.atan2(b, a) / 2];
    return [size * Math.cos(angle), size * Math.sin(angle)];
  };
  const wave = ([a, b]: Complex): Complex => [Math.exp(-b) * Math.cos(a), Math.exp(-b) * Math.sin(a)];

  /** Surface over outcrop by the waves up and down in every layer (Kramer 1996, section 7.2.1, from memory). */
  function surfaceOverOutcrop(frequency: number): Complex {
    const layers = (request.member as ShearColumn).segments.toReversed() as {
      length: number;
      shearWaveSpeed: number;
      density: number;
    }[];
    const speeds = layers.map(({ shearWaveSpeed }) => times([shearWaveSpeed, 0], root([1, 0.1])));
    const impedances = speeds.map((speed, index) => times([layers[index].density, 0], speed));
    let [up, down]: [Complex, Complex] = [
      [1, 0],
      [1, 0],
    ];
    layers.forEach(({ length }, index) => {
      const ratio = over(impedances[index], impedances[index + 1] ?? [2.02e6, 0]);
      const phase = over([2 * Math.PI * frequency * length, 0], speeds[index]);
      const [rising, falling] = [times(up, wave(phase)), times(down, wave([-phase[0], -phase[1]]))];
      const half = (sign: 1 | -1): Complex => [(1 + sign * ratio[0]) / 2, (sign * ratio[1]) / 2];
      [up, down] = [
        plus(times(rising, half(1)), times(falling, half(-1))),
        plus(times(rising, half(-1)), times(falling, half(1))),
      ];
    });
    return over([1, 0], up);
  }

  it('amplifies the outcrop motion as waves up and down through its layers do', () => {
    const { frequencies, outputs, convergence } = answer;
    expect(convergence.closedForm).toBe(true);
    expect(frequencies.length).toBeGreaterThan(400);
    for (let index = 0; index < frequencies.length; index++) {
      const [real, imaginary] = surfaceOverOutcrop(frequencies[index]);
      const error = Math.hypot(outputs[0].real[index] - real, outputs[0].imaginary[index] - imaginary);
      expect(error).toBeLessThan(1e-10 * Math.hypot(real, imaginary));
    }
  });

  it('moves as one with the rock at low frequency', () => {
    expect(answer.outputs[0].magnitude[0]).toBeCloseTo(1, 2);
    expect(answer.outputs[1].magnitude[0]).toBeCloseTo(1, 2);
    // Newton: the shear stress under the soft clay accelerates its mass, 1680 kg/m³ × 3.5 m.
    expect(answer.outputs[2].magnitude[0] / (1680 * 3.5)).toBeCloseTo(1, 2);
  });
});

import { describe, expect, it } from 'vitest';
import { readRequest } from '../../src/contract/read-request.ts';
import { convergenceData, convergenceOf } from '../../src/figures/data/convergence-data.ts';
import { envelopeData } from '../../src/figures/data/envelope-data.ts';
import { frequenciesData } from '../../src/figures/data/frequencies-data.ts';
import { heatMapData } from '../../src/figures/data/heat-map-data.ts';
import { historyData } from '../../src/figures/data/history-data.ts';
import { outlineOf } from '../../src/figures/data/member-outline.ts';
import { shapesData } from '../../src/figures/data/shapes-data.ts';
import { snapshotsData } from '../../src/figures/data/snapshots-data.ts';
import { transferData } from '../../src/figures/data/transfer-data.ts';
import { solveResponses } from '../../src/solutions/responses.ts';
import type {
  ModesAnswer,
  ModesRequest,
  ResponsesAnswer,
  ResponsesRequest,
  TransferFunctionsAnswer,
  TransferFunctionsRequest,
} from '../../src/spec/types.ts';
import { figureCase } from './figure-cases.ts';

const length = 45;
const waveSpeed = Math.sqrt(2.4e6 / 58);
const cable = {
  kind: 'cable',
  tension: 2.4e6,
  segments: [{ length, massPerLength: 58 }],
  ends: { near: { type: 'fixed' }, far: { type: 'fixed' } },
};

function solved(body: unknown): [ResponsesRequest, ResponsesAnswer] {
  const request = readRequest('responses', body);
  return [request, solveResponses(request)];
}

function responses(name: string): [ResponsesRequest, ResponsesAnswer] {
  const { request, answer } = figureCase(name);
  return [request as ResponsesRequest, answer as ResponsesAnswer];
}

function modes(name: string): [ModesRequest, ModesAnswer] {
  const { request, answer } = figureCase(name);
  return [request as ModesRequest, answer as ModesAnswer];
}

describe('the envelope', () => {
  it('of a motion in one mode is A·sin(πx/L) on both sides (standing wave of a taut string)', () => {
    const amplitude = 0.03;
    const [request, answer] = solved({
      member: cable,
      initial: { displacement: { type: 'half-sine', amplitude, halfWaves: 1 } },
      series: { modes: 1 },
      sample: {
        positions: { count: 31 },
        // a whole period 2L/c, half of it among the samples
        times: { end: (2 * length) / waveSpeed, count: 101 },
        quantities: ['displacement'],
      },
    });
    const { panels, key } = envelopeData(request, answer);
    const [body] = panels[0].areas ?? [];
    for (let i = 0; i < 31; i++) {
      const expected = amplitude * Math.sin((Math.PI * i) / 30);
      expect(body.upper[i]).toBeCloseTo(expected, 12);
      expect(body.lower[i]).toBeCloseTo(-expected, 12);
    }
    expect(key.map(({ label }) => label).join()).toContain('sampled peak 30 mm at 22.5 m, 0 s');
  });

  it('has its bound as a strip outside of it on both sides', () => {
    const [request, answer] = responses('pull-loose');
    const [body, above, below] = envelopeData(request, answer).panels[0].areas ?? [];
    const bound = answer.fields.displacement?.bound ?? [];
    expect([above.role, below.role]).toEqual(['bound', 'bound']);
    for (let i = 0; i < bound.length; i++) {
      expect(above.lower[i]).toBe(body.upper[i]);
      expect(above.upper[i]).toBe(body.upper[i] + bound[i]);
      expect(below.upper[i]).toBe(body.lower[i]);
      expect(below.lower[i]).toBe(body.lower[i] - bound[i]);
    }
    expect(Math.max(...bound)).toBeGreaterThan(0.001);
  });
});

describe('the convergence', () => {
  it('of a string plucked in its middle leaves out 1 − Σ 8/(π²n²) over odd n (P. M. Morse, Vibration and Sound, 1948, §9)', () => {
    const [, answer] = solved({
      member: cable,
      initial: { displacement: { type: 'pull', at: length / 2, amplitude: 0.1 } },
      series: { modes: 40 },
      sample: { times: [0], quantities: ['displacement'] },
    });
    const { leftOut, estimate } = convergenceOf(answer, false);
    let captured = 0;
    for (let n = 1; n <= 40; n++) {
      if (n % 2 === 1) captured += 8 / (Math.PI * n) ** 2;
      expect(leftOut[n - 1]).toBeCloseTo(1 - captured, 12);
    }
    expect(estimate?.[39]).toBeCloseTo(answer.convergence.displacementBound ?? 0, 12);
  });

  it('estimates the bounds of shorter series within a factor of 1.5', () => {
    const bounds = [5, 10, 20, 40].map((count) => {
      const [, answer] = solved({
        member: cable,
        initial: { displacement: { type: 'pull', at: 15, amplitude: 0.1 } },
        series: { modes: count },
        sample: { times: [0], quantities: ['displacement'] },
      });
      return { count, bound: answer.convergence.displacementBound ?? 0, answer };
    });
    const { estimate } = convergenceOf(bounds[3].answer, false);
    for (const { count, bound } of bounds) {
      const ratio = (estimate?.[count - 1] ?? 0) / bound;
      expect(ratio).toBeGreaterThan(1 / 1.5);
      expect(ratio).toBeLessThan(1.5);
    }
  });

  it('marks the modes used with what is certified, and says what is estimated', () => {
    const [request, answer] = responses('pull-64-modes');
    const { panels, key, words } = convergenceData(request, answer);
    expect(panels[0].marks).toEqual([
      { along: 64, value: expect.closeTo(1 - answer.convergence.energy.capturedFraction, 10) },
    ]);
    expect(panels[1].marks).toEqual([{ along: 64, value: answer.convergence.displacementBound }]);
    expect(key.map(({ label }) => label)).toEqual([
      'bound with fewer modes, estimated',
      'certified with 64 modes',
    ]);
    expect(words.notes[0]).toMatch(
      /^Captured: 9\d\.\d+ % of the initial energy\. Bound on the displacement, certified: ±/,
    );
  });
});

describe('histories and snapshots', () => {
  it('show the sampled place nearest to a station and say which it is', () => {
    const [request, answer] = responses('pull-loose');
    const { panels } = historyData(request, answer, { stations: [14.9, 15.1, 30] }, 8, 'history');
    expect(panels.map(({ label }) => label)).toEqual(['at 15 m', 'at 30 m']);
    const column = answer.fields.positions.indexOf(15);
    expect(Array.from(panels[0].curves[0].values)).toEqual(
      answer.fields.displacement?.values.map((row) => row[column]),
    );
    expect(panels[0].curves[0].bound?.[0]).toBe(answer.fields.displacement?.bound?.[column]);
  });

  it('begin with the place of the sampled peak where none is named', () => {
    const [request, answer] = responses('pull-loose');
    const { panels, words } = historyData(request, answer, {}, 1, 'history');
    expect(panels.map(({ label }) => label)).toEqual([`at ${answer.peaks.displacement?.at} m`]);
    expect(words.notes[1]).toBe('Shown: 1 of 61 sampled positions, among them the one of the peak.');
  });

  it('sort positions that were sampled in another order', () => {
    const [request, answer] = responses('few-samples');
    const { panels } = snapshotsData(request, answer, {}, 8);
    expect(panels.map(({ label }) => label)).toEqual(['at 0 s', 'at 100 ms', 'at 250 ms']);
    const [{ along, values }] = panels[0].curves;
    expect(Array.from(along)).toEqual([7.5, 15, 30]);
    // the released pull at 15 m: straight to both ends, cut by 1e-3 of its ceiling
    expect(values[0]).toBeCloseTo(0.05, 3);
    expect(values[1]).toBeCloseTo(0.1, 3);
    expect(values[2]).toBeCloseTo(0.05, 3);
    const heat = heatMapData(request, answer);
    expect(Array.from(heat.positions)).toEqual([7.5, 15, 30]);
    expect(heat.reach).toBe(Math.abs(answer.peaks.displacement?.value ?? 0));
  });

  it('tell times apart that differ late in their digits', () => {
    const [request, answer] = responses('late');
    const { panels } = snapshotsData(request, answer, {}, 6);
    expect(new Set(panels.map(({ label }) => label)).size).toBe(panels.length);
    expect(panels[1].label).toMatch(/^at 100,000\.0\d+ s$/);
  });

  it('say of averages that they are averages, of r.m.s. errors that no bound holds', () => {
    const [request, answer] = responses('pull-attached');
    const force = historyData(request, answer, {}, 3, 'force-history');
    expect(force.value?.name).toBe('transverse force, 4 ms average');
    expect(force.words.notes[0]).toMatch(
      /^Averages over the gauge time of 4 ms; bound ±.* of the averages\.$/,
    );
    const [sudden, instants] = responses('pull-64-modes');
    expect(historyData(sudden, instants, {}, 3, 'force-history').words.notes[0]).toMatch(
      /^No bound holds at single instants: r\.m\.s\. error over the member ≤ /,
    );
  });
});

describe('modes', () => {
  it('are chosen by order, or the first ones with a word about the rest', () => {
    const [request, answer] = modes('modes-64');
    expect(shapesData(request, answer, { modes: [64, 3] }, 9).panels.map(({ label }) => label)).toEqual([
      'mode 3 · 6.781 Hz',
      'mode 64 · 144.7 Hz',
    ]);
    const { panels, words } = shapesData(request, answer, {}, 4);
    expect(panels).toHaveLength(4);
    expect(words.notes[0]).toBe('Shown: modes 1 to 4 of 64; name others by modes=.');
    // peak normalisation: the second shape is sin(2πx/L)
    const second = panels[1].curves[0];
    for (let i = 0; i < second.along.length; i++) {
      expect(second.values[i]).toBeCloseTo(Math.sin((2 * Math.PI * second.along[i]) / length), 9);
    }
  });

  it('of a free rod carry its whole mass in the rigid-body mode', () => {
    const [request, answer] = modes('modes-rigid');
    const { panels, words } = frequenciesData(request, answer, {});
    const [sums, stems] = panels[0].curves;
    expect(stems.along[0]).toBe(0);
    expect(stems.values[0]).toBeCloseTo(100, 9);
    expect(sums.values[4]).toBeCloseTo(100, 9);
    expect(words.notes[0]).toBe(
      'Effective mass under a motion of the whole member, in per cent of the 188.4 kg moved.',
    );
  });
});

describe('transfer functions', () => {
  it('stand in one panel a unit, and the phase below', () => {
    const { request, answer } = figureCase('transfer-three');
    const { panels, key } = transferData(
      request as TransferFunctionsRequest,
      answer as TransferFunctionsAnswer,
      6,
    );
    expect(panels.map(({ value }) => `${value?.name} (${value?.unit})`)).toEqual([
      'magnitude of displacement (m/N)',
      'magnitude of acceleration ((m/s²)/N)',
      'magnitude of transverse force ()',
      'phase (°)',
    ]);
    expect(panels[0].curves.map(({ tag }) => tag)).toEqual(['A', 'B']);
    expect(key.map(({ label }) => label)).toEqual([
      'A displacement at 12 m',
      'B displacement at 4 m',
      'C acceleration at 18.5 m',
      'D transverse force at 9 m',
    ]);
  });

  it('show a series beside the exact result', () => {
    const { request, answer } = figureCase('transfer-series');
    const transfer = answer as TransferFunctionsAnswer;
    const { panels } = transferData(request as TransferFunctionsRequest, transfer, 6);
    const { series } = transfer.outputs[0];
    const cut = panels[0].curves[1].values;
    expect(cut[7]).toBe(Math.hypot(series?.truncated.real[7] ?? 0, series?.truncated.imaginary[7] ?? 0));
  });
});

describe('the outline of a member', () => {
  it('holds ends, attachments and boundaries at their places', () => {
    const outline = outlineOf((figureCase('modes-attached').request as ModesRequest).member);
    expect(outline).toMatchObject({
      length: 23,
      upright: false,
      near: { mass: true, spring: true, dashpot: false },
      far: { mass: false, spring: true, dashpot: false },
      boundaries: [9],
    });
    expect(outline.attachments.map(({ at }) => at)).toEqual([4, 4.3, 12, 18.5]);
    expect(outline.names.map(({ name }) => name)).toContain('signal bridge');
    expect(outlineOf((figureCase('modes-layers').request as ModesRequest).member)).toMatchObject({
      upright: true,
      near: 'fixed',
    });
  });
});

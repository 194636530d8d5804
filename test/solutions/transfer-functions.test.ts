import { describe, expect, it } from 'vitest';
import frequencyGrid from '../../schemas/FrequencyGrid.json' with { type: 'json' };
import positionGrid from '../../schemas/PositionGrid.json' with { type: 'json' };
import timeGrid from '../../schemas/TimeGrid.json' with { type: 'json' };
import { Fault, type FaultRecord } from '../../src/faults/fault.ts';
import { ANSWER_VALUES, FREQUENCY_LIMIT } from '../../src/solutions/limits.ts';
import { solveModes } from '../../src/solutions/modes.ts';
import { solveTransferFunctions } from '../../src/solutions/transfer-functions.ts';
import type { Damping, TransferFunctionsRequest, TransferInput } from '../../src/spec/types.ts';
import { transferRequest, uniformMember } from '../support/forced-requests.ts';
import type { PlainMember } from '../support/plain-member.ts';
import { randomMember } from '../support/random-members.ts';
import { RandomStream } from '../support/random.ts';
import { requestMember } from '../support/requests.ts';

/** 20 m of soil, V = 200 m/s, ρ = 1900 kg/m³ on rigid rock: f_n = (2n − 1) V/4H = 2.5, 7.5, … Hz. */
const soil = uniformMember(20, 1900 * 200 * 200, 1900, false);
const top: TransferInput = { type: 'point-force', at: 20 };
const base: TransferInput = { type: 'end-motion', end: 'near', quantity: 'displacement' };

function request(
  member: PlainMember,
  input: TransferInput,
  frequencies: TransferFunctionsRequest['frequencies'],
  more: { damping?: Damping; outputs?: number[]; refine?: boolean; modes?: number } = {},
): TransferFunctionsRequest {
  const plain = transferRequest(member, more.damping, input, more.outputs ?? [20], [1], more.modes);
  return { ...plain, frequencies, refine: more.refine ?? false };
}

function faultOf(asked: TransferFunctionsRequest): FaultRecord | null {
  try {
    solveTransferFunctions(asked);
    return null;
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    return error.records[0];
  }
}

describe('an undamped resonance', () => {
  it.each([
    ['a force at the free end', top],
    ['a force within', { type: 'point-force', at: 7.3 }],
    ['a shaken base', base],
  ] as [string, TransferInput][])('is refused at its exact frequency under %s', (_, input) => {
    for (const frequency of [2.5, 7.5, 12.5, 2002.5]) {
      const fault = faultOf(request(soil, input, [1, frequency]));
      expect(fault).toMatchObject({ code: 'resonance-hit', pointer: '/frequencies' });
      expect(fault!.detail).toContain(`${frequency} Hz`);
    }
  });

  it('is answered one part in 1e11 beside, and with any damping', () => {
    expect(faultOf(request(soil, top, [2.5 * (1 + 1e-11)]))).toBeNull();
    for (const damping of [
      { type: 'loss-factor', value: 1e-6 },
      { type: 'ratio', value: 1e-3 },
    ] as Damping[]) {
      expect(faultOf(request(soil, top, [2.5], { damping }))).toBeNull();
    }
  });

  it('is refused where only this mode of a list has no damping', () => {
    const damping: Damping = { type: 'ratios', values: [0.02, 0, 0.02] };
    expect(faultOf(request(soil, top, [7.5], { damping }))).toMatchObject({ code: 'resonance-hit' });
    expect(faultOf(request(soil, top, [2.5, 12.5], { damping }))).toBeNull();
  });

  it("is refused at this service's own frequencies of random members", () => {
    let hits = 0;
    for (let index = 0; index < 40; index++) {
      const random = new RandomStream(77, index);
      const member = randomMember(random, random.pick(['general', 'uniform', 'rigid']));
      const length = member.segments.reduce((sum, segment) => sum + segment.length, 0);
      const { modes } = solveModes({
        member: requestMember(member),
        series: { modes: 6 },
      } as Parameters<typeof solveModes>[0]);
      const input: TransferInput = { type: 'point-force', at: 0.3719 * length };
      for (const { frequency } of modes) {
        const fault = faultOf(request(member, input, [frequency], { outputs: [0.6 * length] }));
        expect(fault?.code, `${index}: ${frequency}`).toBe('resonance-hit');
        hits++;
      }
    }
    expect(hits).toBeGreaterThan(150);
  });

  it('leaves the motion finite where the force stands in a node of the mode', () => {
    // string, L = 1, c = 1, force in the middle at ω = 2π: −sin κx/(2 κ cos(κ/2)) from sin κ(L/2)/sin κL
    const string = uniformMember(1, 1, 1, true);
    const input: TransferInput = { type: 'point-force', at: 0.5 };
    for (const frequency of [1, 3, 1 + 3e-12]) {
      const [output] = solveTransferFunctions(
        request(string, input, [frequency], { outputs: [0.2], modes: 20 }),
      ).outputs;
      const kappa = 2 * Math.PI * frequency;
      const exact = Math.sin(kappa * 0.2) / (2 * kappa * Math.cos(kappa / 2));
      expect(Math.abs(output.real[0] / exact - 1)).toBeLessThan(1e-10);
      const { corrected, bound } = output.series!;
      expect(Math.abs(corrected.real[0] - exact)).toBeLessThanOrEqual(bound[0]! + 1e-12 * Math.abs(exact));
    }
  });

  it('of a free member at rest is refused whatever the damping', () => {
    const free = { ...soil, nearFixed: false };
    for (const damping of [undefined, { type: 'loss-factor', value: 0.1 }] as (Damping | undefined)[]) {
      expect(faultOf(request(free, top, [0, 1], { damping }))).toMatchObject({ code: 'resonance-hit' });
    }
  });
});

describe('refinement', () => {
  const damping: Damping = { type: 'loss-factor', value: 0.02 };

  it('is held to the limit of values', () => {
    const outputs = Array.from({ length: 500 }, (_, index) => index / 25);
    const range = { from: 0.1, to: 2000, count: 20, spacing: 'linear' } as const;
    expect(faultOf(request(soil, top, range, { damping, outputs }))).toBeNull();
    expect(faultOf(request(soil, top, range, { damping, outputs, refine: true }))).toMatchObject({
      code: 'too-many-values',
      pointer: '/refine',
    });
  });

  it('says where it stopped', () => {
    const range = { from: 0.1, to: 50_000, count: 1000, spacing: 'linear' } as const;
    const { notices, frequencies } = solveTransferFunctions(
      request(soil, top, range, { damping: { type: 'loss-factor', value: 1e-6 }, refine: true }),
    );
    expect(frequencies.length).toBeLessThanOrEqual(100_000);
    expect(notices.map(({ code }) => code)).toEqual(['refined-in-part']);
    expect(notices[0].detail).not.toContain('no peak is missed');
    expect(notices[0].detail).toMatch(/ Hz/);
  });

  it('misses no peak of a damped column, and says so', () => {
    const { notices, outputs } = solveTransferFunctions(
      request(soil, base, [0.1, 30], { damping, refine: true }),
    );
    expect(notices.map(({ code }) => code)).toEqual(['refined']);
    // 1/|cos(κ*L)| with κ* of k(1 + iη): crest of the first resonance about 4/(πη)
    expect(Math.max(...outputs[0].magnitude) * Math.PI * 0.02).toBeCloseTo(4, 1);
  });

  it('sees the peaks that only the half-space damps', () => {
    const input: TransferInput = {
      type: 'outcrop-motion',
      end: 'near',
      impedance: 20 * 1900 * 200,
      quantity: 'displacement',
    };
    const { notices, outputs } = solveTransferFunctions(request(soil, input, [0.1, 30], { refine: true }));
    expect(notices.map(({ code }) => code)).toEqual(['refined']);
    // |cos κH + i α sin κH|⁻¹ has the peak 1/α at the natural frequencies of the column (Kramer 1996,
    // ch. 7, from memory)
    expect(Math.max(...outputs[0].magnitude)).toBeGreaterThan(0.99 * 20);
  });

  it('counts the undamped resonances it leaves', () => {
    const plain = solveTransferFunctions(request(soil, top, [0.1, 30], { refine: true }));
    expect(plain.notices.map(({ code }) => code)).toEqual(['undamped-not-refined']);
    const listed: Damping = { type: 'ratios', values: [0.02, 0, 0.02] };
    const mixed = solveTransferFunctions(request(soil, top, [0.1, 30], { refine: true, damping: listed }));
    expect(mixed.notices.map(({ code }) => code)).toEqual(['refined-in-part']);
  });
});

describe('convergence', () => {
  const grid = [0.3, 2.4, 9];

  it('relates the largest bound to the largest magnitude of its output', () => {
    const { convergence, outputs } = solveTransferFunctions(
      request(soil, top, grid, { damping: { type: 'ratio', value: 0.8 }, outputs: [5, 20] }),
    );
    const relative = outputs.map(({ bound, magnitude }) => Math.max(...bound!) / Math.max(...magnitude));
    expect(convergence.largestBound).toBe(Math.max(...relative));
    expect(convergence.largestBound).toBeGreaterThan(1e-12);
    expect(convergence).toMatchObject({ closedForm: false, modesUsed: 4096 });
  });

  it('names the modes of the answer itself, not those of the series beside it', () => {
    const closed = solveTransferFunctions(request(soil, top, grid, { modes: 7 }));
    expect(closed.convergence).toEqual({ closedForm: true, modesUsed: null, largestBound: 0 });
    expect(closed.outputs[0].series!.modes).toBe(7);
    const one = solveTransferFunctions(
      request(soil, top, grid, { modes: 7, damping: { type: 'ratio', value: 0.02 } }),
    );
    expect(one.convergence).toMatchObject({ closedForm: false, modesUsed: null });
    const listed = solveTransferFunctions(
      request(soil, top, grid, { damping: { type: 'ratios', values: [0.01, 0.02, 0.03] } }),
    );
    expect(listed.convergence).toMatchObject({ closedForm: false, modesUsed: 2 });
  });
});

it('a modal series has no bound at frequencies that it leaves out, and says null there', () => {
  // string of 1 m, c = 1 m/s: modes at 0.5, 1, 1.5, 2 Hz …
  const [output] = solveTransferFunctions(
    request(uniformMember(1, 1, 1, true), { type: 'point-force', at: 0.3 }, [0.7, 1.9, 2.1], {
      outputs: [0.2],
      modes: 3,
    }),
  ).outputs;
  const { bound } = output.series!;
  expect(bound[0]).toBeGreaterThan(0);
  expect(bound[1]).toBeGreaterThan(0);
  expect(bound[2]).toBeNull();
});

it('the schemas take as many frequencies and samples as the solver', () => {
  expect(frequencyGrid.properties.count.maximum).toBe(FREQUENCY_LIMIT);
  expect(positionGrid.properties.count.maximum).toBe(ANSWER_VALUES);
  expect(timeGrid.properties.count.maximum).toBe(ANSWER_VALUES);
});

import { expect, it } from 'vitest';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { ResponsesRequest } from '../../src/spec/types.ts';

/** A bar of length 1, wave speed 1, impedance 1, its far end fixed, struck at the near end by a ram. */
function struckBar(ram: number, end: number): ResponsesRequest {
  return {
    member: {
      kind: 'bar',
      segments: [{ length: 1, axialStiffness: 1, massPerLength: 1, foundation: 0, drag: 0 }],
      ends: { near: { type: 'attached', mass: ram, spring: 0, dashpot: 0 }, far: { type: 'fixed' } },
      attachments: [],
    },
    initial: { massVelocities: [{ at: 0, velocity: 1 }] },
    loads: [],
    series: { modes: 200 },
    sample: {
      positions: [0.5],
      times: { start: 0, end, count: 401 },
      quantities: ['displacement'],
      gaugeTime: 0,
    },
    checks: false,
  };
}

it('a ram of the mass of the bar is told to leave it where St. Venant ends the contact, after 3.068 L/c', () => {
  // S. P. Timoshenko and J. N. Goodier, Theory of Elasticity, 3rd ed. 1970, sec. 168 (from memory)
  const { notices } = solveResponses(struckBar(1, 4));
  const notice = notices.find(({ code }) => code === 'contact-tension');
  const time = Number(/tension at ([\d.]+) s/.exec(notice!.detail)![1]);
  expect(time).toBeGreaterThan(3.0);
  expect(time).toBeLessThan(3.2);
});

it('says nothing before that', () => {
  expect(solveResponses(struckBar(1, 2.9)).notices).toEqual([]);
});

it('says nothing of a mass that is simply pulled along', () => {
  const request = struckBar(1, 4);
  const pulled: ResponsesRequest = {
    ...request,
    initial: { displacement: { type: 'pull', at: 0, amplitude: 0.1 } },
  };
  expect(solveResponses(pulled).notices).toEqual([]);
});

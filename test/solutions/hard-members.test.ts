import { expect, it } from 'vitest';
import { Fault } from '../../src/faults/fault.ts';
import { solveResponses } from '../../src/solutions/responses.ts';
import type { Attachment, Damping, InitialMotion, Quantity, ResponsesRequest } from '../../src/spec/types.ts';

/** Members and data that are known to be hard, each against a closed form (own derivation). */

type Ends = ResponsesRequest['member']['ends'];

const FIXED = { type: 'fixed' } as const;
const FREE = { type: 'free' } as const;

function segment(length: number, stiffness: number, inertia: number, foundation = 0) {
  return { length, stiffness, inertia, foundation, drag: 0 };
}

function lump(at: number, mass: number): Attachment {
  return { at, mass, spring: 0, dashpot: 0 };
}

function request(
  segments: ReturnType<typeof segment>[],
  ends: { near: object; far: object },
  initial: InitialMotion,
  more: {
    attachments?: Attachment[];
    damping?: Damping;
    series?: ResponsesRequest['series'];
    positions: number[];
    times: number[];
    quantities?: Quantity[];
    gaugeTime?: number;
  },
): ResponsesRequest {
  return {
    member: {
      kind: 'wave',
      segments,
      ends: ends as Ends & { near: never; far: never },
      attachments: more.attachments ?? [],
      ...(more.damping && { damping: more.damping }),
    },
    initial,
    loads: [],
    series: more.series ?? { relativeTolerance: 1e-3, maxModes: 4096 },
    sample: {
      positions: more.positions,
      times: more.times,
      quantities: more.quantities ?? ['displacement'],
      gaugeTime: more.gaugeTime ?? 0,
    },
    checks: true,
  };
}

it('nine masses joined by springs, one of them a million times stiffer, keep all their energy', () => {
  const springs = [
    ...Array.from({ length: 8 }, () => segment(1, 1, 0)),
    segment(1, 1e6, 0),
    segment(1, 1, 0),
  ];
  const answer = solveResponses(
    request(
      springs,
      { near: FIXED, far: FIXED },
      { massVelocities: [{ at: 8, velocity: 1 }] },
      {
        attachments: [1, 2, 3, 4, 5, 6, 7, 8, 9].map((at) => lump(at, 1)),
        series: { modes: 100 },
        positions: [8, 9],
        times: [0, 0.3],
        quantities: ['velocity', 'force'],
      },
    ),
  );
  // a mass of 1 at velocity 1, all other masses at rest: ½ J
  expect(answer.convergence.verdict).toBe('complete');
  expect(Math.abs(answer.convergence.energy.captured - 0.5)).toBeLessThan(1e-14);
  const [at8, at9] = Array.from(answer.fields.velocity!.values[0]);
  expect(Math.abs(at8 - 1)).toBeLessThan(1e-12);
  expect(Math.abs(at9)).toBeLessThan(1e-12);
  expect(answer.convergence.orthogonality).toBeLessThan(1e-12);
  expect(answer.peaks.velocity!.upper).toBeGreaterThanOrEqual(1);
});

it('a capped pile in stiff bedding stands still at its far end', () => {
  // λρ ≪ s: the cap's motion decays as e^{−36 x}, 2e-16 of it at x = 1
  const answer = solveResponses(
    request(
      [segment(1, 1, 1, 1296)],
      { near: { type: 'attached', mass: 10, spring: 0, dashpot: 0 }, far: FREE },
      { massVelocities: [{ at: 0, velocity: 1 }] },
      { positions: [0, 0.9, 1], times: [0.5, 1, 7] },
    ),
  );
  const { values, bound } = answer.fields.displacement!;
  // waves shed by the impact travel too, at no more than what the cap gives them: see the energies
  expect(answer.convergence.energy.captured).toBeLessThanOrEqual(5 * (1 + 1e-12));
  expect(answer.convergence.energy.captured).toBeGreaterThan(5 * (1 - 1e-3));
  for (const row of values) expect(Math.abs(row[2])).toBeLessThan(0.01 + bound![2]);
});

it.each([1 - 1e-9, 1, 1 + 1e-12, 1 + 1e-9, 1 + 2e-9, 1 + 1e-7, 10])(
  'an oscillator with ζ = %d moves as its closed form',
  (zeta) => {
    const times = [0.5, 1, 5];
    const answer = solveResponses(
      request(
        [segment(1, 1, 0)],
        { near: FIXED, far: { type: 'attached', mass: 1, spring: 0, dashpot: 0 } },
        { massVelocities: [{ at: 1, velocity: 1 }] },
        { damping: { type: 'ratio', value: zeta }, series: { modes: 1 }, positions: [1], times },
      ),
    );
    times.forEach((t, j) => {
      const square = (zeta - 1) * (zeta + 1);
      // sinh(μt)/μ as a power series of μ²t², or by its two decaying exponentials
      const x = square * t * t;
      const exact =
        Math.abs(x) < 1e-3
          ? Math.exp(-zeta * t) * t * (1 + (x / 6) * (1 + x / 20))
          : (Math.exp(-t / (zeta + Math.sqrt(square))) - Math.exp(-(zeta + Math.sqrt(square)) * t)) /
            (2 * Math.sqrt(square));
      expect(Math.abs(answer.fields.displacement!.values[j][0] - exact)).toBeLessThanOrEqual(
        answer.fields.displacement!.bound![0] + 4 * Number.EPSILON,
      );
    });
  },
);

it('a small elastic motion beside a fast drift keeps its bound and its limits', () => {
  const initial: InitialMotion = {
    displacement: { type: 'polyline', positions: [0, 0.5, 1], values: [1e-9, -1e-9, 1e-9] },
    velocity: { type: 'uniform', value: 1, from: 0 },
  };
  const answer = solveResponses(
    request([segment(1, 1, 1)], { near: FREE, far: FREE }, initial, {
      series: { modes: 50 },
      positions: [0, 0.25, 0.5, 1],
      times: [0, 1e-4],
      quantities: ['displacement', 'velocity', 'force'],
      gaugeTime: 1e-4,
    }),
  );
  // strain energy ½ k ∫u′² = ½ (4e-9)², √(2E G⊥) with the largest G⊥ = 1/3 at the ends
  expect(Math.abs(answer.convergence.ceiling! / (4e-9 / Math.sqrt(3)) - 1)).toBeLessThan(1e-9);
  for (const quantity of ['displacement', 'velocity', 'force'] as const) {
    const { value, upper } = answer.peaks[quantity]!;
    expect(upper).toBeGreaterThanOrEqual(Math.abs(value));
  }
  const fast = solveResponses(
    request(
      [segment(1, 1, 1)],
      { near: FREE, far: FREE },
      {
        displacement: { type: 'polyline', positions: [0, 0.5, 1], values: [1e-6, -1e-6, 1e-6] },
        velocity: { type: 'uniform', value: 1000, from: 0 },
      },
      { series: { tolerances: { displacement: 1e-12 }, maxModes: 4096 }, positions: [0], times: [0] },
    ),
  );
  expect(fast.convergence.verdict).not.toBe('converged');
  expect(Math.abs(fast.fields.displacement!.values[0][0] - 1e-6)).toBeLessThanOrEqual(
    fast.fields.displacement!.bound![0],
  );
});

it('an impulse spread beside a mass moves the inertia, not the mass', () => {
  const answer = solveResponses(
    request(
      [segment(1, 1, 1)],
      { near: FIXED, far: FIXED },
      { impulses: [{ at: 0.5, impulse: 1, width: 0.2 }] },
      { attachments: [lump(0.5, 100)], series: { modes: 10 }, positions: [0.5], times: [0] },
    ),
  );
  // ½ (J/(wρ))² ρ w = J²/(2ρw)
  expect(Math.abs(answer.convergence.energy.total - 2.5)).toBeLessThan(1e-13);
});

it('a velocity whose terms cancel says how little its energy is known', () => {
  // shifted Legendre polynomial of degree 20: ½∫P² = ½/41 (Abramowitz and Stegun 22.2.11)
  const choose = (n: number, k: number): number =>
    Array.from({ length: k }, (_, i) => i).reduce((c, i) => Math.round((c * (n - i)) / (i + 1)), 1);
  const coefficients = Array.from(
    { length: 21 },
    (_, k) => (k % 2 ? -1 : 1) * choose(20, k) * choose(20 + k, k),
  );
  const answer = solveResponses(
    request(
      [segment(1, 1, 1)],
      { near: FIXED, far: FIXED },
      { velocity: { type: 'polynomial', coefficients, from: 0 } },
      { series: { modes: 100 }, positions: [0.05, 0.5], times: [0, 0.1] },
    ),
  );
  const { energy, verdict } = answer.convergence;
  expect(Math.abs(energy.total - 0.5 / 41)).toBeLessThan(1e-3 * energy.total + energy.tail);
  expect(Math.abs(energy.total / (0.5 / 41) - 1)).toBeLessThan(0.02);
  expect(verdict).toBe('rounding-limit');
  expect(answer.peaks.displacement!.upper).toBeGreaterThanOrEqual(Math.abs(answer.peaks.displacement!.value));
});

it.each([500, 777, 20_000])('%i half waves end at 0 on a fixed member', (halfWaves) => {
  const answer = solveResponses(
    request(
      [segment(0.4, 1, 1), segment(0.6, 1, 1)],
      { near: FIXED, far: FIXED },
      { displacement: { type: 'half-sine', amplitude: 1, halfWaves } },
      { series: { modes: 2 }, positions: [0.5], times: [0] },
    ),
  );
  // E = k (nπ)²/(4L)
  expect(Math.abs(answer.convergence.energy.total / ((halfWaves * Math.PI) ** 2 / 4) - 1)).toBeLessThan(
    1e-12,
  );
});

it('more modes than can be held are refused before they are solved', () => {
  const many = request(
    Array.from({ length: 1000 }, () => segment(1, 1, 1)),
    { near: FIXED, far: FIXED },
    { displacement: { type: 'half-sine', amplitude: 1, halfWaves: 1 } },
    { series: { modes: 3000 }, positions: [1], times: [0] },
  );
  const begun = performance.now();
  expect(() => solveResponses(many)).toThrow(Fault);
  expect(performance.now() - begun).toBeLessThan(5000);
});

it('the dense modes of a member in very stiff bedding are found at once', () => {
  const answer = solveResponses(
    request(
      [segment(1, 1, 1, 1e12)],
      { near: FIXED, far: FIXED },
      { displacement: { type: 'half-sine', amplitude: 1, halfWaves: 1 } },
      { series: { modes: 5 }, positions: [0.5], times: [0] },
    ),
  );
  // ω_n² = s + (nπ)², eleven digits of which are the bedding's
  answer.coefficients.forEach(({ angularFrequency }, n) => {
    expect(Math.abs(angularFrequency / Math.sqrt(1e12 + ((n + 1) * Math.PI) ** 2) - 1)).toBeLessThan(1e-15);
  });
}, 5000);

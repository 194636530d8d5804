import { describe, expect, it } from 'vitest';
import { readMember } from '../../src/members/read-member.ts';
import { ModeSeries } from '../../src/modes/mode-series.ts';
import { readLoads } from '../../src/motion/applied-loads.ts';
import type { Load } from '../../src/spec/types.ts';
import { uniformMember } from '../support/forced-requests.ts';
import type { PlainMember } from '../support/plain-member.ts';
import { randomMember } from '../support/random-members.ts';
import { randomLoad } from '../support/random-loads.ts';
import { RandomStream } from '../support/random.ts';
import { requestMember } from '../support/requests.ts';

const history = { type: 'step', amplitude: 1, start: 0 } as const;

function still(plain: PlainMember, load: Load) {
  const member = readMember(requestMember(plain));
  return { member, load: readLoads(member, [load], 1)[0] };
}

const [length, stiffness, inertia] = [3, 8, 2];

describe('textbook static shapes', () => {
  const uniform: Load = {
    type: 'distributed-force',
    profile: { type: 'uniform', value: 5, from: 0 },
    history,
  };
  const places = [0, 0.4, 1.5, 2.2, 3];

  it('a string under a uniform load: q x (L − x)/2T, sagging q L²/8T; C = q² L³/12T', () => {
    const { load } = still(uniformMember(length, stiffness, inertia, true), uniform);
    for (const x of places) {
      const { displacement, flux } = load.still!.at(0, x);
      expect(displacement).toBeCloseTo((5 * x * (length - x)) / (2 * stiffness), 13);
      expect(flux).toBeCloseTo(5 * (length / 2 - x), 13);
    }
    expect(load.still!.at(0, 1.5).displacement).toBeCloseTo((5 * 9) / (8 * stiffness), 13);
    expect(load.still!.compliance).toBeCloseTo((25 * 27) / (12 * stiffness), 12);
  });

  it('a bar hung from its near end under its own weight: ρ g (L x − x²/2)/k, ρ g (L − x)', () => {
    const { load } = still(uniformMember(length, stiffness, inertia, false), { type: 'body-force', history });
    for (const x of places) {
      const { displacement, flux } = load.still!.at(0, x);
      expect(displacement).toBeCloseTo((inertia * (length * x - 0.5 * x * x)) / stiffness, 13);
      expect(flux).toBeCloseTo(inertia * (length - x), 13);
    }
  });

  it('a cable on bedding under a uniform load: q/s (1 − cosh λ(x − L/2)/cosh(λL/2))', () => {
    const foundation = 20;
    const plain = uniformMember(length, stiffness, inertia, true);
    const bedded = { ...plain, segments: [{ ...plain.segments[0], foundation }] };
    const { load } = still(bedded, uniform);
    const lambda = Math.sqrt(foundation / stiffness);
    for (const x of places) {
      const share = Math.cosh(lambda * (x - length / 2)) / Math.cosh((lambda * length) / 2);
      expect(load.still!.at(0, x).displacement).toBeCloseTo((5 / foundation) * (1 - share), 13);
      const turn = Math.sinh(lambda * (x - length / 2)) / Math.cosh((lambda * length) / 2);
      expect(load.still!.at(0, x).flux).toBeCloseTo(-stiffness * (5 / foundation) * lambda * turn, 12);
    }
  });

  it('a free bar pushed at one end: F(x²/2L − x + L/3)/k with its mass centre at rest, F(x/L − 1)', () => {
    const plain = { ...uniformMember(length, stiffness, inertia, false), nearFixed: false };
    const { load } = still(plain, { type: 'point-force', at: 0, history });
    for (const x of places) {
      const shape = (x * x) / (2 * length) - x + length / 3;
      expect(load.still!.at(0, x).displacement).toBeCloseTo(shape / stiffness, 13);
      if (x > 0) expect(load.still!.at(0, x).flux).toBeCloseTo(x / length - 1, 13);
    }
  });
});

describe('static shapes of random loads and members', () => {
  it('are Σ φ F/ω², and their compliance Σ F²/ω²', () => {
    const failures: string[] = [];
    let compared = 0;
    for (let index = 0; index < 60; index++) {
      const random = new RandomStream(77, index);
      const plain = randomMember(random, random.pick(['general', 'uniform', 'rigid']));
      const load = randomLoad(
        random,
        plain,
        random.pick(['point-force', 'distributed-force', 'body-force', 'end-motion']),
        1,
      );
      if (load === null) continue;
      const { member, load: applied } = still(plain, load);
      const series = new ModeSeries(member);
      const segment = random.integer(0, member.segmentCount - 1);
      const distance = member.length[segment];
      let [sum, compliance] = [0, 0];
      for (let n = 0; n < 1500; n++) {
        const mode = series.next();
        if (mode === null) break;
        const { lambda, ends } = mode.shape;
        if (lambda === 0) continue;
        const factor = applied.modalFactor(mode);
        sum += (factor * ends[4 * segment + 2]) / lambda;
        compliance += factor ** 2 / lambda;
      }
      const { displacement } = applied.still!.at(segment, distance);
      const whole = applied.still!.compliance;
      compared++;
      // a body force moves a free member as a whole: its static part is the rounding of the force alone
      const softness = plain.segments.reduce((total, each) => total + each.length / each.stiffness, 0);
      const rounding = 1e-13 * applied.totalForce ** 2 * softness;
      // Cauchy–Schwarz: what 1,500 modes leave is at most √(ΔC G), ΔC what the compliance still lacks
      if (!(compliance <= whole * (1 + 1e-9) + 1e-300))
        failures.push(`case ${index}: C ${compliance} > ${whole}`);
      if (compliance < whole * 0.99 - rounding) failures.push(`case ${index}: C ${compliance} of ${whole}`);
      const peak = Math.max(Math.abs(displacement), Math.abs(sum));
      if (
        Math.abs(displacement - sum) >
        5e-3 * peak + 1e-6 * Math.sqrt(whole) + 1e-13 * applied.totalForce * softness
      ) {
        failures.push(`case ${index} ${load.type}: ${displacement} ${sum}`);
      }
    }
    expect(failures).toEqual([]);
    expect(compared).toBeGreaterThan(45);
  });
});

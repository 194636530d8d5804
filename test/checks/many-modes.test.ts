import { describe, expect, it } from 'vitest';
import { solveModes } from '../../src/solutions/modes.ts';
import { travelTime, type PlainMember } from '../support/plain-member.ts';
import { RandomStream } from '../support/random.ts';
import { modesRequest } from '../support/requests.ts';
import { countBelow, countWithNodesHeld } from '../support/wittrick-williams.ts';

/** Twenty different segments, a mass at node 7 and a spring at the far end. */
function longMember(): PlainMember {
  const random = new RandomStream(20);
  const segments = Array.from({ length: 20 }, () => ({
    length: random.between(0.4, 1.6),
    stiffness: random.decades(0, 2),
    inertia: random.decades(-1, 1),
    foundation: random.chance(0.3) ? random.between(1, 100) : 0,
  }));
  const none = Array.from({ length: 21 }, () => 0);
  return {
    segments,
    masses: none.map((_, node) => (node === 7 ? 5 : 0)),
    springs: none.map((_, node) => (node === 20 ? 40 : 0)),
    nearFixed: true,
    farFixed: false,
  };
}

describe('10,000 modes of a member of 20 segments with a mass', () => {
  const member = longMember();
  const { modes, convergence } = solveModes(modesRequest(member, 10_000));

  it('are all there, in ascending order, one enclosure after the other', () => {
    expect(modes).toHaveLength(10_000);
    expect(convergence).toMatchObject({ spectrumComplete: true, modesFound: 10_000, modesInTotal: null });
    modes.forEach((mode, i) => {
      expect(mode.order).toBe(i + 1);
      expect(mode.enclosure[0]).toBeLessThanOrEqual(mode.angularFrequency);
      expect(mode.enclosure[1]).toBeGreaterThanOrEqual(mode.angularFrequency);
      if (i > 0) expect(mode.enclosure[0]).toBeGreaterThan(modes[i - 1].enclosure[1]);
    });
  });

  it('are as many as the count with held nodes allows, everywhere (Weyl: n ≈ ωT/π)', () => {
    const time = travelTime(member);
    for (const { order, angularFrequency } of modes) {
      const { held, free } = countWithNodesHeld(member, angularFrequency * (1 + 1e-12));
      expect(order).toBeGreaterThanOrEqual(held);
      expect(order).toBeLessThanOrEqual(held + free);
      expect(Math.abs((angularFrequency * time) / Math.PI - order)).toBeLessThan(25);
    }
  });

  it('lie where the Wittrick-Williams count passes from n − 1 to n', () => {
    for (const { order, angularFrequency } of modes) {
      expect(countBelow(member, angularFrequency * (1 - 1e-9))).toBe(order - 1);
      expect(countBelow(member, angularFrequency * (1 + 1e-9))).toBe(order);
    }
  });

  it('cross no node, or as many as oscillation theory says: mode n has n − 1 of them', () => {
    // A chain of segments and lumps on springs is a Sturm-Liouville problem: mode n changes sign n − 1 times.
    for (const { order, nodalPoints } of modes) expect(nodalPoints).toBe(order - 1);
  });
});

import { expect, it } from 'vitest';
import { InertiaRelief } from '../../src/modes/inertia-relief.ts';
import { largestFlexibility } from '../../src/modes/largest-flexibility.ts';
import { StaticResponse } from '../../src/modes/static-response.ts';
import { readMember } from '../../src/members/read-member.ts';
import { canDriftFreely } from '../../src/spectrum/spectrum-size.ts';
import { RandomStream } from '../support/random.ts';
import { randomMember } from '../support/random-members.ts';
import { requestMember } from '../support/requests.ts';
import { uniformTrial, waveMember } from '../spectrum/trial-members.ts';

const EPS = Number.EPSILON;
const roundings = (found: number, expected: number): number => Math.abs(found / expected - 1) / EPS;

it('textbook members: L/4T at mid-span, L/EA at a free end, L/3EA at the ends of a free bar', () => {
  for (const count of [1, 2, 3, 5]) {
    expect(
      roundings(largestFlexibility(waveMember(uniformTrial(count, {}, [3, 8, 2]))), 3 / 32),
    ).toBeLessThan(8);
    const cantilever = waveMember(uniformTrial(count, { far: 'free' }, [3, 8, 2]));
    expect(roundings(largestFlexibility(cantilever), 3 / 8)).toBeLessThan(8);
    const bar = waveMember(uniformTrial(count, { near: 'free', far: 'free' }, [3, 8, 2]));
    expect(roundings(largestFlexibility(bar), 1 / 8)).toBeLessThan(8);
  }
});

it('two stiffnesses: the crest lies where the compliance is halved, at a quarter of its sum', () => {
  // G = a b/(a + b) with a, b the compliances to both ends
  const member = waveMember({
    segments: [
      [1, 1, 1],
      [1, 7, 1],
    ],
  });
  expect(roundings(largestFlexibility(member), (1 + 1 / 7) / 4)).toBeLessThan(8);
});

it('no station of random members is softer, and the largest is met within 2 %', () => {
  for (let stream = 0; stream < 60; stream++) {
    const random = new RandomStream(2, stream);
    const family = random.pick(['general', 'rigid', 'nearly-rigid', 'uniform'] as const);
    const member = readMember(requestMember(randomMember(random, family)));
    const source = canDriftFreely(member) ? new InertiaRelief(member) : new StaticResponse(member);
    let seen = 0;
    for (let i = 0; i < member.segmentCount; i++) {
      for (let j = 0; j <= 200; j++) {
        seen = Math.max(seen, source.flexibility(i, (member.length[i] * j) / 200));
      }
    }
    const largest = largestFlexibility(member);
    expect(largest).toBeGreaterThanOrEqual(seen * (1 - 8 * EPS));
    expect(largest).toBeLessThan(seen * 1.02);
  }
});

it('in a massless stretch the flexibility that no mode has is left out', () => {
  // a mass at mid-span of a massless string: G − G_held = G(mass) (x/a)², largest at the mass
  const member = waveMember({
    segments: [
      [1, 4, 0],
      [1, 4, 0],
    ],
    masses: { 1: 3 },
  });
  expect(roundings(largestFlexibility(member), 1 / 8)).toBeLessThan(8);
});

it('a nearly free member is as soft as its spring and the half beyond it, 1/K + L/2k', () => {
  const member = waveMember({ ...uniformTrial(2, { near: 'free', far: 'free' }), springs: { 1: 1e-13 } });
  expect(roundings(largestFlexibility(member), 1e13 + 0.5)).toBeLessThan(8);
});

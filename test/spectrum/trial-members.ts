import { readMember } from '../../src/members/read-member.ts';
import type { WaveMember } from '../../src/members/wave-member.ts';
import type { Damping } from '../../src/spec/types.ts';
import type { PlainMember } from '../support/plain-member.ts';
import { requestMember } from '../support/requests.ts';

/** A member in few words; ends are fixed unless said otherwise, lumps by node. */
export interface TrialMember {
  /** Length, stiffness, inertia and foundation of each segment. */
  readonly segments: readonly (readonly [number, number, number, number?])[];
  readonly near?: 'fixed' | 'free';
  readonly far?: 'fixed' | 'free';
  readonly masses?: Readonly<Record<number, number>>;
  readonly springs?: Readonly<Record<number, number>>;
  readonly damping?: Damping;
}

export function plainTrial(trial: TrialMember): PlainMember {
  const lumps = (given: Readonly<Record<number, number>> = {}): number[] =>
    Array.from({ length: trial.segments.length + 1 }, (_, node) => given[node] ?? 0);
  return {
    segments: trial.segments.map(([length, stiffness, inertia, foundation = 0]) => ({
      length,
      stiffness,
      inertia,
      foundation,
    })),
    masses: lumps(trial.masses),
    springs: lumps(trial.springs),
    nearFixed: trial.near !== 'free',
    farFixed: trial.far !== 'free',
  };
}

export function waveMember(trial: TrialMember): WaveMember {
  return readMember(requestMember(plainTrial(trial), trial.damping));
}

/** A uniform member of the given ends cut into `count` equal segments. */
export function uniformTrial(
  count: number,
  ends: Pick<TrialMember, 'near' | 'far'> = {},
  [length, stiffness, inertia, foundation]: readonly [number, number, number, number?] = [1, 1, 1],
): TrialMember {
  return {
    ...ends,
    segments: Array.from({ length: count }, () => [length / count, stiffness, inertia, foundation]),
  };
}

/** Two equal wells beside a barrier of foundation: pairs of frequencies with a gap of about e^{−decay}. */
export function doubleWell(decay: number, wall = 900): TrialMember {
  return {
    segments: [
      [1, 1, 1],
      [decay / Math.sqrt(wall), 1, 1, wall],
      [1, 1, 1],
    ],
  };
}

/**
 * 20 segments of contrast 10 in stiffness and inertia, a mass at 0.437 of the length, a spring at the
 * far end: the member by which speed is stated.
 */
export function referenceTrial(): TrialMember {
  const whole = Array.from({ length: 20 }, (_, i): [number, number, number] => [
    1 + 0.5 * Math.sin(1 + 2 * i),
    1e8 * 10 ** (0.5 + 0.5 * Math.sin(3 * i)),
    10 * 10 ** (0.5 + 0.5 * Math.cos(5 * i)),
  ]);
  const at = 0.437 * whole.reduce((sum, [length]) => sum + length, 0);
  const segments: [number, number, number][] = [];
  let from = 0;
  let node = 0;
  for (const [length, stiffness, inertia] of whole) {
    if (at > from && at < from + length) {
      segments.push([at - from, stiffness, inertia]);
      node = segments.length;
      segments.push([from + length - at, stiffness, inertia]);
    } else segments.push([length, stiffness, inertia]);
    from += length;
  }
  return { segments, far: 'free', masses: { [node]: 150 }, springs: { [segments.length]: 1e7 } };
}

import { keepModes, type KeptSeries } from '../../src/certificate/kept-modes.ts';
import { shortfallOf } from '../../src/certificate/series-tolerance.ts';
import type { WaveMember } from '../../src/members/wave-member.ts';
import { largestFlexibility } from '../../src/modes/largest-flexibility.ts';
import { readInitialState, type InitialState } from '../../src/motion/initial-state.ts';
import type { InitialMotion, ResponsesSeries } from '../../src/spec/types.ts';
import { waveMember, type TrialMember } from '../spectrum/trial-members.ts';

/** A member, its initial state and the modes kept for a series request. */
export interface TrialSeries {
  readonly member: WaveMember;
  readonly state: InitialState;
  readonly flexibility: number;
  readonly series: KeptSeries;
}

/** The steps of a response up to its kept modes; `span` in s, `heldNumbers` the numbers that may be held. */
export function keep(
  trial: TrialMember,
  initial: InitialMotion,
  wanted: ResponsesSeries,
  { span = 1, gaugeTime = 0, heldNumbers = 8e6 } = {},
): TrialSeries {
  const member = waveMember(trial);
  const state = readInitialState(member, initial);
  const flexibility = largestFlexibility(member);
  const shortfall = shortfallOf(wanted, member, flexibility, gaugeTime, state.released, span);
  const series = keepModes(
    member,
    state,
    'modes' in wanted ? wanted.modes : wanted.maxModes,
    !('modes' in wanted),
    span,
    shortfall,
    heldNumbers,
  );
  return { member, state, flexibility, series };
}

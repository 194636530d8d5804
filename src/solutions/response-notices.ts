import type { KeptSeries } from '../certificate/kept-modes.ts';
import type { WaveMember } from '../members/wave-member.ts';
import type { AppliedLoad } from '../motion/applied-loads.ts';
import type { InitialState } from '../motion/initial-state.ts';
import type { Notice, ResponsesRequest } from '../spec/types.ts';
import { contactNotice } from './contact-notice.ts';

/** What the reader of a response should know besides its numbers. */
export function noticesOf(
  request: ResponsesRequest,
  member: WaveMember,
  state: InitialState,
  series: KeptSeries,
  loads: readonly AppliedLoad[],
  times: Float64Array,
): Notice[] {
  const notices: Notice[] = [];
  if (state.lostEnergy > 1e-12 * (state.energies[0] + state.rigidEnergy)) {
    notices.push({
      code: 'massless-stretch-settled',
      detail: `Massless stretches cannot keep a shape of their own: for t > 0 they follow the places around them, and ${state.lostEnergy} J of the given shape's strain energy are left out.`,
    });
  }
  const [first] = series.modes;
  const driven = (first.factors ?? []).some((factor) => factor !== 0);
  if (first.mode.frequency.omega === 0 && (first.start.velocity !== 0 || driven)) {
    notices.push({
      code: 'rigid-body-motion',
      detail:
        'Nothing holds the member, so it drifts as a whole; the ceiling and the tolerance refer to its elastic motion.',
    });
  }
  notices.push(...driftNotices(request, loads));
  const contact = contactNotice(member, request.initial, series, loads, times);
  if (contact !== null) notices.push(contact);
  if ('modes' in request.series && series.modes.length < request.series.modes) {
    notices.push({
      code: 'finite-modes',
      detail: `All inertia is lumped, so the member has ${series.modes.length} modes; all of them are used.`,
    });
  }
  return notices;
}

/** What an acceleration record leaves behind: it is integrated as it is. */
function driftNotices(request: ResponsesRequest, loads: readonly AppliedLoad[]): Notice[] {
  return request.loads.flatMap((load, index) => {
    if (load.type !== 'end-motion' || load.quantity !== 'acceleration' || load.history.type !== 'samples')
      return [];
    const { start, interval, values } = load.history;
    const end = start + (values.length - 1) * interval;
    const state = loads[index].support?.motion.at(end);
    if (!state) return [];
    return [
      {
        code: 'record-drift',
        detail: `The acceleration record of load ${index} is used as it is, without a baseline correction; integrated twice it has drifted by ${end} s to a displacement of ${state.position} m and a velocity of ${state.velocity} m/s.`,
      },
    ];
  });
}

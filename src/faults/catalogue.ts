import { figureFaultWordings } from './figure-faults.ts';
import { criterionFaultWordings } from './criterion-faults.ts';
import { formFaultWordings } from './form-faults.ts';
import { jobFaultWordings } from './job-faults.ts';
import { loadFaultWordings } from './load-faults.ts';
import { memberFaultWordings } from './member-faults.ts';
import { representationFaultWordings } from './representation-faults.ts';
import { senseFaultWordings } from './sense-faults.ts';
import { serviceFaultWordings } from './service-faults.ts';

/**
 * Every fault that the service can report: stable code, title and wording with the remedy.
 * `{names}` are filled in where the fault is raised. No HTTP status here: http/ maps codes to it.
 */
export const catalogue = {
  ...formFaultWordings,
  ...senseFaultWordings,
  ...memberFaultWordings,
  ...loadFaultWordings,
  ...figureFaultWordings,
  ...criterionFaultWordings,
  ...serviceFaultWordings,
  ...representationFaultWordings,
  ...jobFaultWordings,

  'pull-without-restraint': {
    title: 'A pull needs a restraint',
    detail:
      'The member can move as a rigid body (no fixed end, spring or foundation), so a static pull at {at} m has no shape of rest. Restrain the member or describe the shape by a polyline.',
  },
  'pull-at-fixed-end': {
    title: 'A fixed end cannot be pulled',
    detail: 'The pull at {at} m acts on a fixed end, which does not move. Pull at another place.',
  },
  'force-in-velocity': {
    title: 'A force is no velocity',
    detail:
      'The velocity shape of the pull at {at} m is given by a force. Give its amplitude, the velocity at that place, in m/s (shaft: rad/s).',
  },
  'infinite-energy': {
    title: 'The initial displacement has infinite energy',
    detail: 'The initial displacement {reason} at {at} m; a jump stores infinite strain energy. {remedy}',
  },
  'impulse-on-no-mass': {
    title: 'An impulse needs something with inertia',
    detail:
      'The impulse at {at} m meets no mass; its kinetic energy would be infinite. Give it a width, or place it on an attachment with mass.',
  },
  'impulse-off-inertia': {
    title: 'An impulse is spread outside inertia',
    detail: 'The impulse at {at} m with width {width} m reaches over {reason}. Move it or make it narrower.',
  },
  'mass-velocity-on-no-mass': {
    title: 'No mass to move',
    detail: 'There is no mass at {at} m that could have a velocity of its own. Masses stand at: {places}.',
  },
  'moving-end-not-fixed': {
    title: 'The moving end is not a fixed end',
    detail:
      'Participation for "{ends}" moves the {end} end as a support, but that end is not fixed. Make it fixed, or choose other ends, or "uniform" where no end is fixed.',
  },
  'uniform-motion-held': {
    title: 'A fixed end cannot follow a uniform motion',
    detail:
      'Participation for "uniform" moves every point by one unit, but the {end} end is fixed. Choose "near", "far" or "both".',
  },
  'mode-out-of-reach': {
    title: 'Modes out of reach',
    detail:
      '{count} modes lie below {frequency} Hz; at most {limit} can be solved at once. Lower the frequency.',
  },
  'too-many-values': {
    title: 'Too many numbers to hold',
    detail: '{count} numbers would be needed ({what}); the limit is {limit}. Ask for less.',
  },
  'energy-inconsistent': {
    title: 'The answer contradicts its own energy',
    detail:
      'The modes kept carry {captured} J of the {total} J there are, more than rounding explains. The answer is withheld; please report the request.',
  },
  'result-overflow': {
    title: 'A result is not finite',
    detail:
      '{quantity} overflows the range of double precision. Check the magnitudes and units of the request.',
  },
  'stress-without-section': {
    title: 'No section to take a stress from',
    detail: 'Stress at {at} m needs the section of segment {segment}; {remedy}.',
  },
} as const satisfies Record<string, { title: string; detail: string }>;

export type FaultCode = keyof typeof catalogue;

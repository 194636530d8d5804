/**
 * Every fault that the service can report: stable code, title and wording with the remedy.
 * `{names}` are filled in where the fault is raised. No HTTP status here: http/ maps codes to it.
 */
export const catalogue = {
  'no-inertia': {
    title: 'The member has no inertia',
    detail: 'No segment and no moving node carries inertia, so nothing can vibrate. Give at least one segment or attachment a mass.',
  },
  'pull-without-restraint': {
    title: 'A pull needs a restraint',
    detail:
      'The member can move as a rigid body (no fixed end, spring or foundation), so a static pull at {at} m has no shape of rest. Restrain the member or describe the shape by a polyline.',
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
  'mode-out-of-reach': {
    title: 'Modes out of reach',
    detail: '{count} modes lie below {frequency} Hz; at most {limit} can be solved at once. Lower the frequency.',
  },
  'too-many-values': {
    title: 'Too many numbers to hold',
    detail: '{count} numbers would be needed ({what}); the limit is {limit}. Ask for less.',
  },
  'result-overflow': {
    title: 'A result is not finite',
    detail: '{quantity} overflows the range of double precision. Check the magnitudes and units of the request.',
  },
  'stress-without-section': {
    title: 'No section to take a stress from',
    detail: 'Stress at {at} m needs the section of segment {segment}; {remedy}.',
  },
} as const satisfies Record<string, { title: string; detail: string }>;

export type FaultCode = keyof typeof catalogue;

/** Loads, support motions and steady inputs that are described correctly but cannot act as posed. */
export const loadFaultWordings = {
  'nothing-moves': {
    title: 'Nothing sets the member in motion',
    detail:
      'There is neither an initial motion nor a load, so the member stays at rest. Give "initial", "loads" or both.',
  },
  'force-at-fixed-end': {
    title: 'A force acts on a fixed end',
    detail:
      'The force at {at} m acts on the fixed {end} end, which takes it up without motion. Let it act elsewhere, or move the support by {"type": "end-motion", …}.',
  },
  'force-in-profile': {
    title: 'A force at a point is no profile',
    detail:
      'The profile of the distributed force is a pull given by a force. Give its amplitude, the force per length at {at} m, or describe a force at a point by {"type": "point-force", …}.',
  },
  'moving-force-at-rest': {
    title: 'The moving force stands still',
    detail:
      'The speed of the moving force is 0, so it never crosses the member. Give it a speed, or describe a force that stays in its place by {"type": "point-force", …}.',
  },
  'moving-force-misses': {
    title: 'The moving force never reaches the member',
    detail:
      'The force enters the member at {start} s, after the last sampled time ({end} s). Let it start earlier, or sample longer.',
  },
  'end-motion-not-fixed': {
    title: 'The end that is moved is not a fixed end',
    detail:
      'The motion moves the {end} end as a support, but that end is of type "{type}". Make it {"type": "fixed"}, or load it by a point force instead.',
  },
  'end-motion-twice': {
    title: 'An end is moved twice',
    detail:
      'The {end} end is moved by load {other} already. Keep one of the two, or give their sum as one history.',
  },
  'end-displacement-jumps': {
    title: 'An end displacement jumps',
    detail:
      'The displacement of the {end} end jumps by {jump} {unit} at {time} s, which needs infinite energy. {remedy}',
  },
  'end-displacement-disagrees': {
    title: 'An end displacement disagrees with the initial displacement',
    detail:
      'The displacement of the {end} end begins at {first} {unit}, but the initial displacement of the member there is {initial} {unit}. Let both begin at the same value.',
  },
  'outcrop-end-not-fixed': {
    title: 'The half-space does not stand at a fixed end',
    detail:
      'The half-space stands under the {end} end, but that end is of type "{type}". Make it {"type": "fixed"}: the member is joined to the half-space there.',
  },
  'frequencies-not-ascending': {
    title: 'Frequencies do not ascend',
    detail:
      'The frequency {frequency} Hz does not lie above the one before it ({before} Hz). Sort the frequencies, each once.',
  },
  'frequency-span-empty': {
    title: 'The frequency span is empty',
    detail: 'The frequencies end at {to} Hz, not above their start at {from} Hz. Let them end higher.',
  },
  'logarithm-from-zero': {
    title: 'Logarithmic spacing begins at zero',
    detail:
      'With logarithmic spacing no frequency can be 0 Hz. Let "from" be above 0, or choose linear spacing.',
  },
  'acceleration-at-zero-frequency': {
    title: 'An acceleration input has no steady state at 0 Hz',
    detail:
      'At 0 Hz a constant acceleration of the support moves the member away without limit. Begin above 0 Hz, or take the displacement as input.',
  },
  'resonance-hit': {
    title: 'An undamped resonance is hit',
    detail:
      'At {frequency} Hz the undamped member is in resonance and its response infinite. Leave that frequency out, or give the member damping.',
  },
  'outcrop-with-ratios': {
    title: 'Modal damping ratios do not fit an outcrop motion',
    detail:
      'The half-space under the member takes energy away, so the damped modes are not those that the ratios belong to. Use "loss-factor" or "rayleigh" damping with an outcrop motion.',
  },
} as const satisfies Record<string, { title: string; detail: string }>;

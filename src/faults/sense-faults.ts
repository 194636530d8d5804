/** A request whose parts are right each by itself but do not fit together. */
export const senseFaultWordings = {
  'position-outside': {
    title: 'A position lies outside the member',
    detail:
      'The position {at} m lies beyond the far end of the member, whose segments end at {length} m. Move it inside.',
  },
  'positions-not-ascending': {
    title: 'Positions do not ascend',
    detail:
      'The position {at} m does not lie beyond the one before it ({before} m). Give the points of a polyline in ascending order, each once.',
  },
  'lengths-differ': {
    title: 'Two lists differ in length',
    detail: 'There are {positions} positions and {values} values. Give one value for each position.',
  },
  'stretch-empty': {
    title: 'A stretch is empty',
    detail: 'The stretch from {from} m to {to} m is empty. Let it end beyond its start.',
  },
  'times-not-ascending': {
    title: 'Times do not ascend',
    detail:
      'The time {time} s does not come after the one before it ({before} s). Sort the times, each once.',
  },
  'time-span-empty': {
    title: 'The time span is empty',
    detail: 'The times end at {end} s, not after their start at {start} s. Let them end later.',
  },
  'width-outside': {
    title: 'An impulse reaches beyond the member',
    detail:
      'The impulse at {at} m with width {width} m reaches beyond the member (0 to {length} m). Move it or make it narrower.',
  },
  'repeated-mass-velocity': {
    title: 'A mass has two velocities',
    detail: 'The mass at {at} m is given a velocity twice. Keep one of them.',
  },
  'more-faults': {
    title: 'There are more faults',
    detail: '{count} more faults are not listed. Mend those listed and send the request again.',
  },
} as const satisfies Record<string, { title: string; detail: string }>;

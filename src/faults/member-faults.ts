/** A member that is described correctly but cannot be solved as posed. */
export const memberFaultWordings = {
  'attachment-outside': {
    title: 'An attachment lies outside the member',
    detail:
      'The attachment at {at} m lies beyond the far end of the member, whose segments end at {length} m. Move it inside, or lengthen the segments.',
  },
  'attachment-at-end': {
    title: 'An attachment stands at an end',
    detail:
      'The attachment at {at} m stands at the {end} end. Describe it there instead: "ends": {"{end}": {"type": "attached", …}}.',
  },
  'inner-diameter-too-large': {
    title: 'The shaft has no wall',
    detail:
      'The inner diameter {inner} m is not below the outer diameter {outer} m, so no wall is left. Make it smaller, or leave it out for a solid shaft.',
  },
  'segment-too-short': {
    title: 'A segment is too short for double precision',
    detail:
      'The segment is {length} m long, less than {shortest} of the member ({total} m). Join it to its neighbour, or describe it as an attachment.',
  },
  'section-magnitude': {
    title: 'A section is beyond double precision',
    detail:
      'The {name} that follows from this segment is {value}, outside 1e-90 to 1e90. Check the magnitudes and units of the segment.',
  },
  'no-inertia': {
    title: 'The member has no inertia',
    detail:
      'No segment and no moving node carries inertia, so nothing can vibrate. Give at least one segment or attachment a mass.',
  },
  'drag-without-inertia': {
    title: 'Drag acts on a segment without inertia',
    detail:
      'The segment has drag {drag} but no inertia, so its motion is not a wave. Give it inertia, or leave its drag out.',
  },
  'drag-not-modal': {
    title: 'The drag couples the modes',
    detail:
      'Drag is modal damping only where it is the same multiple of the inertia in every segment and no node carries a mass; other drag needs complex modes, which are not solved yet. Leave the drag out, make it proportional to the inertia, or describe the loss by "damping": {"type": "ratio", …}.',
  },
  'dashpot-unsupported': {
    title: 'A dashpot needs complex modes',
    detail:
      'The dashpot {value} needs complex modes, which are not solved yet. Leave it out, or describe the loss by "damping": {"type": "ratio", …}.',
  },
  'damping-mixed': {
    title: 'Two descriptions of damping exclude each other',
    detail:
      'Modal damping ("type": "{type}") cannot stand beside a dashpot or drag that couples the modes. Keep one of the two.',
  },
  'loss-factor-in-time': {
    title: 'A loss factor describes a steady state only',
    detail:
      'A loss factor has no motion in time and no damping ratio of its own. Give "damping": {"type": "ratio", "value": {half}}, which dissipates the same at resonance, or ask for transfer functions.',
  },
} as const satisfies Record<string, { title: string; detail: string }>;

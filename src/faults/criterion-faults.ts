/** Criteria of a check that do not fit together or not to the request that they are held against. */
export const criterionFaultWordings = {
  'criterion-repeated': {
    title: 'Two criteria have one name',
    detail: 'The id {id} stands at criterion {other} already. Give every criterion a name of its own.',
  },
  'criterion-misplaced': {
    title: 'A criterion does not fit to the operation',
    detail:
      'A criterion of type "{type}" is held against {wanted}, but the operation is "{operation}". Send it with a request of the other operation, or leave it out.',
  },
  'criterion-not-sampled': {
    title: 'The quantity of a criterion is not sampled',
    detail:
      'The request samples {sampled}, but the criterion is on {quantity}. Add it to "quantities" of the sample.',
  },
  'criterion-without-limit': {
    title: 'A criterion has no limit',
    detail: 'The range of a natural frequency has neither "min" nor "max". Give one of them or both.',
  },
  'range-reversed': {
    title: 'A range is reversed',
    detail: '{key} begins at {from} {unit} and ends below it, at {to} {unit}. Give the lower value first.',
  },
  'criterion-without-participation': {
    title: 'The request has no participation',
    detail:
      'Effective mass belongs to a motion of the ends, and the request does not say which. Add "participation": {"ends": …} to it.',
  },
  'criterion-without-band': {
    title: 'A criterion on damping has no highest frequency',
    detail:
      'A request of {operation} does not say which modes are meant. Give "upTo", the highest natural frequency that counts.',
  },
  'criterion-on-loss-factor': {
    title: 'A loss factor is no damping ratio',
    detail:
      'The member is damped by a loss factor, which describes a steady state; its modes have no damping ratio. Leave the criterion out, or give the member "ratio" damping (half the loss factor dissipates the same at resonance).',
  },
  'vortex-on-kind': {
    title: 'Vortices do not excite this member',
    detail:
      'Vortex shedding moves a member across its axis, but a {kind} is solved for other motions. Describe the member as a cable.',
  },
  'gauge-without-use': {
    title: 'A gauge time has no use here',
    detail:
      'The {quantity} is bounded at every instant and is not averaged. Leave "gaugeTime" out of this criterion.',
  },
  'criterion-output-missing': {
    title: 'The output of a criterion does not exist',
    detail: 'There is no output {output}; the request has {count}, counted from 0. Choose one of them.',
  },
  'criterion-outputs-mixed': {
    title: 'One limit for several quantities',
    detail:
      'The outputs of the request are {quantities}, which have no limit in common. Say with "output" which one is meant.',
  },
} as const satisfies Record<string, { title: string; detail: string }>;

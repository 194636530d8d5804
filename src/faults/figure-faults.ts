/** A figure that an answer cannot be shown as; the answer itself is right. */
export const figureFaultWordings = {
  'figure-not-of-operation': {
    title: 'This answer has no such figure',
    detail: 'An answer of {operation} cannot be shown as "{view}". It has the views {views}.',
  },
  'figure-size': {
    title: 'A figure cannot have this size',
    detail: 'The {side} of {size} px cannot be drawn. Ask for a whole number from {least} to {most} px.',
  },
  'figure-without-modes': {
    title: 'There is no mode to show',
    detail:
      'The answer holds no mode: none lies below the frequency asked for. Raise "upTo", or ask for a number of modes.',
  },
  'figure-without-shapes': {
    title: 'There are no shapes to show',
    detail:
      'The answer holds no mode shapes. Ask for them in the request, for example "shapes": {"positions": {"count": 101}}, or for the view "frequencies".',
  },
  'figure-mode-not-solved': {
    title: 'A mode was not solved',
    detail:
      'Mode {order} was not solved; the answer holds modes 1 to {count}. Choose among those or solve more.',
  },
  'figure-station-outside': {
    title: 'A station lies outside the sampled stretch',
    detail:
      'The station at {at} m lies outside the sampled positions, {from} m to {to} m. Choose one inside or sample there.',
  },
  'figure-instant-outside': {
    title: 'An instant lies outside the sampled time',
    detail:
      'The instant {time} s lies outside the sampled times, {from} s to {to} s. Choose one inside or sample longer.',
  },
  'figure-quantity-not-sampled': {
    title: 'The quantity of this figure was not sampled',
    detail:
      'The view "{view}" shows the {quantity}, which was not sampled ({sampled}). Add "{quantity}" to the quantities of the sample, or ask for the view "history".',
  },
  'figure-needs-samples': {
    title: 'There are too few samples for this figure',
    detail:
      'The view "{view}" needs at least two sampled {what}. Sample more, or ask for the view "{instead}".',
  },
  'figure-without-energy': {
    title: 'There is no energy to share among the modes',
    detail:
      'The motion starts from rest without initial energy, so the convergence of the initial motion cannot be shown. The certified bound stands in every other view; ask for "envelope" or "history".',
  },
} as const satisfies Record<string, { title: string; detail: string }>;

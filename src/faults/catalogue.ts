import { formFaultWordings } from './form-faults.ts';
import { memberFaultWordings } from './member-faults.ts';
import { senseFaultWordings } from './sense-faults.ts';

/**
 * Every fault that the service can report: stable code, title and wording with the remedy.
 * `{names}` are filled in where the fault is raised. No HTTP status here: http/ maps codes to it.
 */
export const catalogue = {
  ...formFaultWordings,
  ...senseFaultWordings,
  ...memberFaultWordings,

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
    detail: 'Participation for "uniform" moves every point by one unit, but the {end} end is fixed. Choose "near", "far" or "both".',
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
  'result-overflow': {
    title: 'A result is not finite',
    detail:
      '{quantity} overflows the range of double precision. Check the magnitudes and units of the request.',
  },
  'stress-without-section': {
    title: 'No section to take a stress from',
    detail: 'Stress at {at} m needs the section of segment {segment}; {remedy}.',
  },

  // The text of a request body
  'empty-body': {
    title: 'The body is empty',
    detail: 'The request has no body. Send one JSON object.',
  },
  'not-utf8': {
    title: 'The body is not UTF-8',
    detail:
      'The byte at offset {offset} does not belong to UTF-8, the only encoding of JSON. Encode the body as UTF-8.',
  },
  'malformed-json': {
    title: 'The body is not JSON',
    detail: 'Line {line}, column {column}: {reason}. Correct the JSON there (RFC 8259).',
  },
  'duplicate-key': {
    title: 'A key stands twice',
    detail: 'The key {key} stands twice in one object, so which value counts is unclear. Keep one of them.',
  },
  'reserved-key': {
    title: 'A key is reserved',
    detail: 'The key {key} is never part of a request. Remove it.',
  },
  'nested-too-deep': {
    title: 'The body is nested too deep',
    detail:
      'Arrays and objects are nested more than {limit} levels deep; no request needs that. Flatten the body.',
  },
  'number-out-of-range': {
    title: 'A number is too large',
    detail: 'The number {text} exceeds the range of double precision (1.8e308). Check its exponent and unit.',
  },

  // The exchange over HTTP
  'not-found': {
    title: 'Nothing is served here',
    detail: 'There is no resource at {path}. The resources are: {resources}.',
  },
  'method-not-allowed': {
    title: 'The method is not offered',
    detail: '{path} does not take {method}. It takes: {methods}.',
  },
  'not-acceptable': {
    title: 'No acceptable representation',
    detail:
      'The Accept header {accept} admits none of the representations offered: {offered}. Ask for one of these.',
  },
  'unsupported-media-type': {
    title: 'The body has the wrong media type',
    detail: '{found} is not taken here. Send the body {wanted}.',
  },
  'body-too-large': {
    title: 'The body is too large',
    detail: 'The body exceeds {limit} bytes. Send a smaller request: fewer values, or coarser polylines.',
  },
  'malformed-http': {
    title: 'The HTTP request is malformed',
    detail: 'The request cannot be read as HTTP: {reason}. Correct the request line, headers or framing.',
  },
  'headers-too-large': {
    title: 'The headers are too large',
    detail: 'The request line and headers exceed {limit} bytes. Send fewer or shorter headers.',
  },
  'request-timeout': {
    title: 'The request came too slowly',
    detail: 'The request was not complete within {seconds} s. Send it again over a faster connection.',
  },

  // The solver pool
  'queue-full': {
    title: 'The solver queue is full',
    detail: '{limit} requests are waiting already. Try again after the time in Retry-After.',
  },
  'deadline-exceeded': {
    title: 'The deadline passed',
    detail:
      'The answer was not ready within {seconds} s, waiting time included. Ask for fewer modes or samples, or allow more time (Prefer: wait, or SOLVE_DEADLINE of the service).',
  },
  'solver-out-of-memory': {
    title: 'The request needs too much memory',
    detail:
      'The solver ran out of memory on this request and was replaced. Ask for fewer modes or samples, or raise MEMORY_LIMIT of the service.',
  },
  'solver-crashed': {
    title: 'The solver stopped unexpectedly',
    detail:
      'The solver stopped on this request and was replaced. Report it with the request id of this answer.',
  },
  'internal-error': {
    title: 'The service made a mistake',
    detail:
      'The service met an error of its own on this request. Report it with the request id of this answer.',
  },
  'not-ready': {
    title: 'The service is not ready',
    detail: 'The solvers are not ready yet. Try again after the time in Retry-After.',
  },
  stopping: {
    title: 'The service is stopping',
    detail:
      'The service takes no new work because it is being stopped. Send the request again; another instance may take it.',
  },
} as const satisfies Record<string, { title: string; detail: string }>;

export type FaultCode = keyof typeof catalogue;

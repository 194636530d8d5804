/** What goes wrong around the solver: the text of a body, the exchange over HTTP, the solver pool. */
export const serviceFaultWordings = {
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
} as const;

/** What goes wrong between an answer and the form in which it is wanted: query, negotiation, kept results. */
export const representationFaultWordings = {
  'unknown-parameter': {
    title: 'A query parameter is not known',
    detail: '{name} is no query parameter here. Those that may stand here: {allowed}.',
  },
  'repeated-parameter': {
    title: 'A query parameter stands twice',
    detail: 'The query parameter {name} stands {count} times. Give it once; a list has commas: {name}=1,2.',
  },
  'parameter-value': {
    title: 'A query parameter has a wrong value',
    detail: 'The query parameter {name} is {found}, but must be {wanted}.',
  },
  'parameter-without-use': {
    title: 'A query parameter does not apply',
    detail:
      'The query parameter {name} has no meaning for the format {format}. Leave it out, or ask for one of the formats it applies to: {formats}.',
  },
  'coding-not-acceptable': {
    title: 'No acceptable content coding',
    detail:
      'The Accept-Encoding header {accept} admits none of the content codings offered: {offered}. Ask for one of these.',
  },
  'nothing-to-tabulate': {
    title: 'The answer holds no such table',
    detail: 'The answer holds nothing for the table {table}: {reason}. {remedy}',
  },
  'result-not-kept': {
    title: 'The result is not kept here',
    detail:
      'No result {digest} is kept. This service keeps results in its own memory: the least recently used go when the store is full, all are forgotten when it restarts, and another version gives other digests. To get it back, POST the request again: the answer names its result in Content-Location.',
  },
} as const;

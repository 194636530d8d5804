/** A request that breaks its schema: a key, type, range or unit is wrong. */
export const formFaultWordings = {
  'missing-key': {
    title: 'A key is missing',
    detail: 'The key {key} is missing{form}. {about}',
  },
  'unknown-key': {
    title: 'A key is not known',
    detail: '{key} is not a key here.{hint} Keys that may stand here: {allowed}.',
  },
  'other-form': {
    title: 'Two forms are mixed',
    detail: '{key} does not belong to the form {form} that is given here. Leave {key} out, or use {other}.',
  },
  'form-missing': {
    title: 'No form is given',
    detail: 'Nothing in {key} says which form is meant (found: {found}). Give one of: {forms}.',
  },
  'wrong-type': {
    title: 'A value has the wrong type',
    detail: '{key} must be {wanted}, but is {found}.{hint}',
  },
  'out-of-range': {
    title: 'A value is out of range',
    detail: '{key} must be {wanted}, but is {found}. {about}',
  },
  'not-one-of': {
    title: 'A value is not among those allowed',
    detail: '{key} is {found}, but must be one of: {allowed}.',
  },
  'too-few-items': {
    title: 'A list is too short',
    detail: '{key} has {count} items, but needs at least {limit}. {about}',
  },
  'too-many-items': {
    title: 'A list is too long',
    detail: '{key} has {count} items; at most {limit} are taken. {about}',
  },
  'repeated-item': {
    title: 'An item stands twice',
    detail: '{key} holds {found} twice. Keep one of them.',
  },
  'nothing-given': {
    title: 'An object is empty',
    detail: '{key} says nothing. Give at least one of: {allowed}.',
  },
  'text-length': {
    title: 'A text is too short or too long',
    detail: '{key} must have {wanted} characters, but has {count}.',
  },
  'malformed-text': {
    title: 'A text is malformed',
    detail: '{key} is {text}, which holds half of a surrogate pair. Write the whole character.',
  },
  'too-many-keys': {
    title: 'An object has too many keys',
    detail:
      '{key} has {count} keys; no object of a request has more than {limit}. Remove the keys not known.',
  },
  'quantity-unreadable': {
    title: 'A quantity cannot be read',
    detail:
      '{text} is not a number and a unit. Write a number with a decimal point, a space and a UCUM code, such as {example}, or a plain number in {unit}.',
  },
  'unit-missing': {
    title: 'A unit is missing',
    detail:
      '{text} has no unit. Write the plain number {number} (without quotes) for {unit}, or add a unit: {allowed}.',
  },
  'unit-unknown': {
    title: 'A unit is not known',
    detail:
      '{code} in {text} is not a unit known here; codes are UCUM and case-sensitive.{hint} Units for {wanted}: {allowed} and their like.',
  },
  'unit-dimension': {
    title: 'A unit has the wrong dimension',
    detail: '{text} is {found}, but {wanted} is wanted here: in {allowed} or their like.',
  },
  'number-wanted': {
    title: 'A plain number is wanted',
    detail:
      '{text} is a text, but a plain number is wanted here: it multiplies a profile that has the unit. Write the number without quotes and unit.',
  },
  'number-magnitude': {
    title: 'A number is beyond the magnitudes that can be computed with',
    detail:
      '{text} is outside the magnitudes 1e-60 to 1e60 (and 0) that can be computed with. Check its exponent and unit.',
  },
} as const satisfies Record<string, { title: string; detail: string }>;

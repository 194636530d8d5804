/** What an engineer wants to see first: frequencies, peaks with their certified limits, the verdict. */
export function summarise(title, file, { request, modes, responses, milliseconds }) {
  const { member } = modes;
  const { convergence, fields, peaks } = responses;
  const { energy } = convergence;
  const rows = [
    ['member', `${member.kind}, ${digits(member.length)} m, ${digits(member.totalMass)} kg`],
    ['frequencies', `${modes.modes.map(({ frequency }) => digits(frequency)).join(', ')} Hz, …`],
    ...(request.loads ?? []).map((load) => ['loads', loadText(load)]),
    ...Object.entries(peaks).map(([quantity, peak]) => [quantity, peakText(peak, fields[quantity])]),
    ...startOf(energy),
    [
      'error',
      `${errorText(convergence, fields)} in any displacement, with ${counted(convergence.modesUsed, 'mode')}`,
    ],
    ['verdict', `${convergence.verdict}; solved over HTTP in ${digits(milliseconds, 2)} ms`],
    ...responses.notices.map(({ detail }) => ['note', detail]),
  ];
  const width = Math.max(...rows.map(([name]) => name.length));
  const lines = rows.map(([name, text]) => `  ${name.padEnd(width)}  ${text}`);
  return [`${title} (schemas/examples/${file})`, ...lines].join('\n');
}

/** The energy of the initial motion, where there is one. */
function startOf({ total, capturedFraction }) {
  if (total === 0) return [];
  const held = `of which the modes used hold ${digits(100 * capturedFraction, 6)} %`;
  return [['energy', `${scaled(total, 'J')}, ${held}`]];
}

function errorText({ displacementBound }, fields) {
  if (displacementBound === null) return 'no bound';
  return `at most ${scaled(displacementBound, fields.displacement?.unit ?? 'm')}`;
}

function counted(count, name) {
  return `${count} ${name}${count === 1 ? '' : 's'}`;
}

/** The kind of a load and what it does in time, in the words of the request. */
function loadText({ type, at, history }) {
  const place = at === undefined ? '' : ` at ${at}`;
  if (history === undefined) return `${type}${place}`;
  const figures = ['amplitude', 'frequency', 'duration'].map((key) => history[key]);
  return `${type}${place}: ${[history.type, ...figures.filter((figure) => figure !== undefined)].join(', ')}`;
}

function peakText({ value, at, time, upper }, { unit, boundKind, verdict }) {
  const place = `at ${digits(at)} m, ${scaled(time, 's')}`;
  const average = boundKind === 'gauge-average' ? ', averaged over the gauge time' : '';
  const limit = upper === null ? 'no certified limit' : `certified below ${scaled(upper, unit)}`;
  return `peak ${scaled(value, unit)} ${place}${average}; ${limit} (${verdict})`;
}

const prefixes = [
  [1e9, 'G'],
  [1e6, 'M'],
  [1e3, 'k'],
  [1, ''],
  [1e-3, 'm'],
  [1e-6, 'µ'],
  [1e-9, 'n'],
];

/** A value with the SI prefix that leaves one to three digits before the point. */
function scaled(value, unit) {
  const [factor, prefix] = prefixes.find(([limit]) => Math.abs(value) >= limit) ?? [1, ''];
  return `${digits(value / factor)} ${prefix}${unit}`;
}

function digits(value, count = 4) {
  return Number(value.toPrecision(count)).toString();
}

/** What an engineer wants to see first: frequencies, peaks with their certified limits, the verdict. */
export function summarise(title, file, modes, responses, milliseconds) {
  const { member } = modes;
  const { convergence, fields, peaks } = responses;
  const { energy } = convergence;
  const rows = [
    ['member', `${member.kind}, ${digits(member.length)} m, ${digits(member.totalMass)} kg`],
    ['frequencies', `${modes.modes.map(({ frequency }) => digits(frequency)).join(', ')} Hz, …`],
    ...Object.entries(peaks).map(([quantity, peak]) => [quantity, peakText(peak, fields[quantity])]),
    [
      'energy',
      `${scaled(energy.total, 'J')}, of which the modes used hold ${digits(100 * energy.capturedFraction, 6)} %`,
    ],
    [
      'error',
      `at most ${scaled(convergence.displacementBound, fields.displacement?.unit ?? 'm')} in any displacement, with ${convergence.modesUsed} modes`,
    ],
    ['verdict', `${convergence.verdict}; solved over HTTP in ${digits(milliseconds, 2)} ms`],
    ...responses.notices.map(({ detail }) => ['note', detail]),
  ];
  const width = Math.max(...rows.map(([name]) => name.length));
  const lines = rows.map(([name, text]) => `  ${name.padEnd(width)}  ${text}`);
  return [`${title} (schemas/examples/${file})`, ...lines].join('\n');
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
];

/** A value with the SI prefix that leaves one to three digits before the point. */
function scaled(value, unit) {
  const [factor, prefix] = prefixes.find(([limit]) => Math.abs(value) >= limit) ?? [1, ''];
  return `${digits(value / factor)} ${prefix}${unit}`;
}

function digits(value, count = 4) {
  return Number(value.toPrecision(count)).toString();
}

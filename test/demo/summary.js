/** What an engineer wants to see first: frequencies, peaks with their certified limits, the verdict. */
export function summarise(title, file, modes, responses, milliseconds) {
  const { member } = modes;
  const { convergence, fields, peaks } = responses;
  const { energy } = convergence;
  const lines = [
    `${title} (schemas/examples/${file})`,
    `  ${member.kind}, ${number(member.length)} m, ${number(member.totalMass)} kg; a wave takes ${number(member.travelTime)} s from end to end`,
    `  frequencies   ${modes.modes.map(({ frequency }) => number(frequency)).join(', ')} Hz`,
  ];
  for (const [quantity, { value, at, time, upper }] of Object.entries(peaks)) {
    const { unit, boundKind, verdict } = fields[quantity];
    const limit =
      upper === null
        ? 'no certified limit'
        : `nowhere and never above ${number(upper)} ${unit}${kindWords[boundKind] ?? ''}`;
    lines.push(
      `  ${quantity.padEnd(13)} peak ${number(value)} ${unit} at ${number(at)} m, ${number(time)} s; ${limit} (${verdict})`,
    );
  }
  lines.push(
    `  energy        ${number(energy.total)} J, of which the series holds ${percent(energy.capturedFraction)}`,
    `  displacement  wrong by at most ${number(convergence.displacementBound)} ${fields.displacement?.unit ?? 'm'}, because ${convergence.modesUsed} modes were used`,
    `  verdict       ${convergence.verdict}, solved in ${number(milliseconds, 2)} ms`,
    ...responses.notices.map(({ detail }) => `  note          ${detail}`),
  );
  return lines.join('\n');
}

const kindWords = { 'gauge-average': ' on average over the gauge time' };

function number(value, digits = 4) {
  return Number(value.toPrecision(digits)).toString();
}

function percent(fraction) {
  return `${number(100 * fraction, 6)} %`;
}

/**
 * Prints the acceleration record of the example shaken-soil-column.json, one JSON list in m/s².
 *
 * The record is made up, not measured: Σ_k √(S(f_k)) cos(2π f_k t + θ_k), k = 1 … 200, with
 * - f_k = 0.1 k Hz, so that it does not repeat within the 10 s between rise and decay;
 * - S the spectrum of rock motion filtered by a layer (Kanai 1957, Tajimi 1960), layer frequency 2.5 Hz,
 *   damping ratio 0.6, without its slow part (second filter of Clough and Penzien, Dynamics of
 *   Structures, 1975), 0.5 Hz, damping ratio 0.6; both from memory;
 * - θ_k from a linear congruential generator (multiplier 1664525, increment 1013904223, modulus 2³²;
 *   Knuth, The Art of Computer Programming, vol. 2, section 3.3.4, from memory), seed 20;
 * - times an envelope that rises as t² over 2 s, stays 1 until 9 s, then falls as exp(−0.55 (t − 9 s));
 * - less two smooth pulses, so that the ground ends at rest where it began;
 * - scaled to a peak of 1.6 m/s², rounded to 0.1 mm/s².
 *
 * Give the path of a file to compare its record with; the exit code is 1 where it differs.
 */
import { readFileSync } from 'node:fs';

const interval = 0.02;
const count = 1001;
const peak = 1.6;
const times = Array.from({ length: count }, (_, index) => index * interval);
const duration = times[count - 1];

function phases(number) {
  let state = 20;
  return Array.from({ length: number }, () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return 2 * Math.PI * (state / 2 ** 32);
  });
}

function spectrum(frequency) {
  const layer = (frequency / 2.5) ** 2;
  const slow = (frequency / 0.5) ** 2;
  const damping = 4 * 0.6 ** 2;
  const filtered = (1 + damping * layer) / ((1 - layer) ** 2 + damping * layer);
  return (filtered * slow ** 2) / ((1 - slow) ** 2 + damping * slow);
}

function envelope(time) {
  if (time < 2) return (time / 2) ** 2;
  return time < 9 ? 1 : Math.exp(-0.55 * (time - 9));
}

/** Final velocity and displacement of a record of straight lines that starts at rest. */
function finalState(values) {
  let velocity = 0;
  let displacement = 0;
  for (let index = 1; index < values.length; index++) {
    const [left, right] = [values[index - 1], values[index]];
    displacement += interval * (velocity + (interval * (2 * left + right)) / 6);
    velocity += (interval * (left + right)) / 2;
  }
  return [velocity, displacement];
}

const theta = phases(200);
const raw = times.map((time) => {
  const terms = theta.map((phase, index) => {
    const frequency = 0.1 * (index + 1);
    return Math.sqrt(spectrum(frequency)) * Math.cos(2 * Math.PI * frequency * time + phase);
  });
  return envelope(time) * terms.reduce((sum, term) => sum + term, 0);
});

// Two pulses a·p + b·q with the same final velocity and displacement as the record are taken off.
const pulses = [2, 3].map((waves) =>
  times.map(
    (time) =>
      Math.sin((Math.PI * time) / duration) ** 2 * Math.cos((Math.PI * time * (waves - 2)) / duration),
  ),
);
const [[v, d], [v1, d1], [v2, d2]] = [raw, ...pulses].map(finalState);
const determinant = v1 * d2 - v2 * d1;
const [first, second] = [(v * d2 - v2 * d) / determinant, (v1 * d - v * d1) / determinant];
const corrected = raw.map((value, index) => value - first * pulses[0][index] - second * pulses[1][index]);

const scale = peak / Math.max(...corrected.map(Math.abs));
const record = corrected.map((value) => Math.round(value * scale * 1e4) / 1e4 + 0);

if (process.argv[2] === undefined) console.log(JSON.stringify(record));
else {
  const { loads } = JSON.parse(readFileSync(process.argv[2], 'utf8'));
  const { history } = loads[0];
  if (history.interval !== interval || JSON.stringify(history.values) !== JSON.stringify(record)) {
    console.error(`${process.argv[2]} does not hold the record that this script makes.`);
    process.exitCode = 1;
  }
}

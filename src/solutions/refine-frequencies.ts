import type { WaveMember } from '../members/wave-member.ts';
import { dampingRate } from '../motion/modal-damping.ts';
import type { Frequencies } from '../spec/types.ts';
import { NaturalFrequencies } from '../spectrum/natural-frequencies.ts';

/** Frequencies that a refined transfer function may have. */
const FREQUENCY_LIMIT = 100_000;

/**
 * Offsets from a peak in half-widths ζω. Between neighbours a resonance 1/|x − i| is missed by less
 * than 1 % where it is curved most, x = 0, and its flanks are followed.
 */
const OFFSETS = [0, 0.14, 0.3, 0.5, 0.75, 1, 1.5, 2.2, 3.3, 5, 8];

/** The asked frequencies, Hz, ascending. */
export function askedFrequencies(frequencies: Frequencies): Float64Array {
  if (!('count' in frequencies)) return Float64Array.from(frequencies);
  const { from, to, count, spacing } = frequencies;
  return Float64Array.from({ length: count }, (_, j) => {
    if (j === 0) return from;
    if (j === count - 1) return to;
    const share = j / (count - 1);
    return spacing === 'logarithmic' ? from * (to / from) ** share : from + (to - from) * share;
  });
}

/**
 * The asked frequencies with more around every natural frequency between the first and the last, so
 * that a linear reading misses no peak by more than 1 %. The half-width of a resonance is taken from
 * the damping; without damping nothing is added, a peak being infinite there.
 *
 * @returns ascending frequencies in Hz, and how many resonances were refined
 */
export function refineFrequencies(
  member: WaveMember,
  asked: Float64Array,
  lossFactor: number,
): { frequencies: Float64Array; refined: number } {
  const lowest = asked[0];
  const highest = asked[asked.length - 1];
  const series = new NaturalFrequencies(member);
  const added: number[] = [];
  let refined = 0;
  for (let mode = series.next(); mode !== null; mode = series.next()) {
    const natural = mode.omega / (2 * Math.PI);
    if (natural > highest * 1.2 || asked.length + added.length > FREQUENCY_LIMIT - 21) break;
    if (mode.omega === 0) continue;
    const ratio = dampingRate(member.damping, mode.order, mode.omega) / (2 * mode.omega) + 0.5 * lossFactor;
    if (ratio <= 0 || ratio > 0.5) continue;
    // the crest of a damped resonance lies at ω√(1 − 2ζ²)
    const crest = natural * Math.sqrt(1 - 2 * ratio * ratio);
    let inside = false;
    for (const offset of OFFSETS) {
      for (const side of offset === 0 ? [0] : [-offset, offset]) {
        const frequency = crest * (1 + side * ratio);
        if (frequency > lowest && frequency < highest) {
          added.push(frequency);
          inside = true;
        }
      }
    }
    if (inside) refined++;
  }
  const all = Float64Array.from([...asked, ...added]).sort();
  return { frequencies: all.filter((f, j) => j === 0 || f > all[j - 1]), refined };
}

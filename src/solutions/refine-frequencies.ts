import { FREQUENCY_LIMIT } from './limits.ts';
import type { WaveMember } from '../members/wave-member.ts';
import { participationFactor } from '../modes/participation.ts';
import { shapeAt } from '../modes/shape-at.ts';
import { dampingRate } from '../motion/modal-damping.ts';
import type { Frequencies, TransferInput } from '../spec/types.ts';
import { NaturalFrequencies } from '../spectrum/natural-frequencies.ts';

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

/** A refined grid of frequencies. */
export interface RefinedFrequencies {
  /** Hz, ascending. */
  readonly frequencies: Float64Array;
  /** Resonances around which frequencies were added. */
  readonly refined: number;
  /** Undamped resonances within the range, whose peaks are infinite: nothing was added there. */
  readonly infinite: number;
  /** Natural frequency, Hz, from which on nothing was added for want of room; null when all were seen. */
  readonly stoppedAt: number | null;
}

/**
 * The asked frequencies with more around every natural frequency between the first and the last, so
 * that a linear reading misses no peak by more than 1 %. The half-width of a resonance is taken from
 * the damping; without damping nothing is added, a peak being infinite there. A half-space of impedance
 * Z under the end adds the rate p_n(end)²/(Z ω_n²) = Γ_n² ω_n²/Z, the power it takes from the mode.
 */
export function refineFrequencies(
  member: WaveMember,
  input: TransferInput,
  asked: Float64Array,
  lossFactor: number,
): RefinedFrequencies {
  const lowest = asked[0];
  const highest = asked[asked.length - 1];
  const series = new NaturalFrequencies(member);
  const added: number[] = [];
  let refined = 0;
  let infinite = 0;
  let stoppedAt: number | null = null;
  for (let mode = series.next(); mode !== null; mode = series.next()) {
    const natural = mode.omega / (2 * Math.PI);
    if (natural > highest * 1.2) break;
    if (mode.omega === 0) continue;
    const rate =
      dampingRate(member.damping, mode.order, mode.omega) + radiationRate(member, input, mode.omega);
    const ratio = rate / (2 * mode.omega) + 0.5 * lossFactor;
    if (ratio <= 0) {
      if (natural >= lowest && natural <= highest) infinite++;
      continue;
    }
    if (ratio > 0.5) continue;
    const inside = around(natural, ratio).filter((frequency) => frequency > lowest && frequency < highest);
    if (inside.length === 0) continue;
    if (asked.length + added.length + inside.length > FREQUENCY_LIMIT) {
      stoppedAt = natural;
      break;
    }
    added.push(...inside);
    refined++;
  }
  const all = Float64Array.from([...asked, ...added]).toSorted();
  return { frequencies: all.filter((f, j) => j === 0 || f > all[j - 1]), refined, infinite, stoppedAt };
}

/** Frequencies around the crest of a damped resonance, which lies at ω√(1 − 2ζ²). */
function around(natural: number, ratio: number): number[] {
  const crest = natural * Math.sqrt(1 - 2 * ratio * ratio);
  return OFFSETS.flatMap((offset) => (offset === 0 ? [0] : [-offset, offset])).map(
    (offset) => crest * (1 + offset * ratio),
  );
}

/** Rate at which a half-space under the moving end damps a mode, 1/s. Cost O(segments). */
function radiationRate(member: WaveMember, input: TransferInput, omega: number): number {
  if (input.type !== 'outcrop-motion') return 0;
  const factor = participationFactor(member, shapeAt(member, omega), input.end);
  return (factor * factor * omega * omega) / input.impedance;
}

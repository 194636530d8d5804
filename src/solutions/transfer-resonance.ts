import { fault } from '../faults/fault.ts';
import type { WaveMember } from '../members/wave-member.ts';
import { shapeAt } from '../modes/shape-at.ts';
import { dampingRate } from '../motion/modal-damping.ts';
import type { TransferInput } from '../spec/types.ts';
import { PhaseSweep } from '../spectrum/phase-sweep.ts';
import { canDriftFreely, modeCount, travelTime } from '../spectrum/spectrum-size.ts';
import { inputFactor, isIdle } from './transfer-input.ts';

/** Distance from a natural frequency, relative, below which its part of a motion loses half its digits. */
const NEAR = 1e-7;
/** Half width of an enclosure besides the noise of its phase, relative: that of the spectrum and 4 ulp. */
const WIDENED = 8 * Number.EPSILON;
/** Steps, relative, at which a motion is taken beside an undriven resonance; the first one over n. */
const FIRST_STEP = 5e-4;
const LAST_STEP = 1e-7;

/** Whether Ω is so near ω_n that the term of an undriven mode is 0/0 to rounding. */
export function passesOver(natural: number, omega: number): boolean {
  return Math.abs(natural - omega) <= 2 * NEAR * natural;
}

/**
 * Looks for undamped natural frequencies at the frequencies asked for.
 *
 * The modes within 1e-7 of Ω are counted ({@link PhaseSweep}). A mode whose phase passes nπ within its
 * rounding noise and 8 ulp of Ω, and which the input drives, is a resonance hit. One that the input does
 * not drive (a force in its node) leaves the motion finite, but 0/0 in closed form; for it a step
 * comes back by which to go aside, so small that no other mode is within 1000 steps.
 *
 * Fault: `resonance-hit`. Cost: two sweeps a frequency, O(segments) each; none for a damped member.
 *
 * @param frequencies Ω/2π, Hz
 * @returns a step in rad/s for each frequency, 0 where the motion is evaluated at Ω itself
 */
export function undrivenResonances(
  member: WaveMember,
  input: TransferInput,
  frequencies: Float64Array,
  lossFactor: number,
): Float64Array {
  const steps = new Float64Array(frequencies.length);
  if (input.type === 'point-force' && canDriftFreely(member) && frequencies.includes(0)) throw hit(0);
  // a half-space takes energy away from every mode
  if (input.type === 'outcrop-motion' || lossFactor > 0 || isDamped(member)) return steps;
  const phase = new PhaseSweep(member);
  const total = modeCount(member);
  const below = (omega: number): number => {
    phase.sweep(omega, 1, 0);
    return Math.min(phase.below, total);
  };
  frequencies.forEach((frequency, j) => {
    if (frequency === 0) return;
    const omega = 2 * Math.PI * frequency;
    const first = below(omega * (1 - NEAR)) + 1;
    const last = below(omega * (1 + NEAR));
    for (let order = first; order <= last; order++) {
      if (dampingRate(member.damping, order, omega) > 0) continue;
      const [natural, halfWidth] = locate(member, phase, omega, order);
      const shape = shapeAt(member, natural);
      const factor = inputFactor(member, input, shape);
      // shapes of neighbours closer than this mix, so a hit is a hit of them all
      const idle = first === last && isIdle(member, input, shape, order, factor);
      if (!idle && Math.abs(omega - natural) <= halfWidth) throw hit(frequency);
      if (!idle) continue;
      steps[j] = stepAside(omega, order, below);
      if (steps[j] === 0) throw hit(frequency);
    }
  });
  return steps;
}

/** ω_n near Ω by Newton's steps on the phase, and how far it may be off, rad/s. */
function locate(member: WaveMember, phase: PhaseSweep, omega: number, order: number): [number, number] {
  const time = travelTime(member);
  const longestSlope = time > 0 ? 1.5 * time : Number.POSITIVE_INFINITY;
  let natural = omega;
  for (let pass = 0; pass < 3; pass++) {
    phase.survey(natural, order, longestSlope);
    const step = phase.residual / phase.slope;
    if (!(Math.abs(step) <= 2 * NEAR * omega)) break;
    natural -= step;
  }
  return [natural, WIDENED * omega + phase.noise / phase.slope];
}

/** A step with no mode but this one within 1000 steps on both sides of Ω; 0 where there is none. */
function stepAside(omega: number, order: number, below: (omega: number) => number): number {
  for (let step = FIRST_STEP / order; step > LAST_STEP; step /= 4) {
    if (below(omega * (1 + 1000 * step)) - below(omega * (1 - 1000 * step)) === 1) return omega * step;
  }
  return 0;
}

function isDamped(member: WaveMember): boolean {
  const { ratios, massCoefficient, stiffnessCoefficient } = member.damping;
  if (massCoefficient > 0 || stiffnessCoefficient > 0) return true;
  return ratios.length > 0 && ratios.every((ratio) => ratio > 0);
}

function hit(frequency: number): Error {
  return fault('resonance-hit', '/frequencies', { frequency });
}

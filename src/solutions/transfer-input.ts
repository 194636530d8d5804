import type { WaveMember } from '../members/wave-member.ts';
import { ENDS, evaluateShape, waveNumberSquare, type ModeShape } from '../modes/mode-shape.ts';
import { participationFactor } from '../modes/participation.ts';
import type { TransferInput } from '../spec/types.ts';
import { placeOf } from '../steady/transfer-state.ts';

/** Roundings a mode number and segment by which a factor that is 0 may differ from it. */
const IDLE = 256 * Number.EPSILON;

/** F_n of the input: φ_n at the force (1/√kg), Γ_n of the moving ends (√kg). */
export function inputFactor(member: WaveMember, input: TransferInput, shape: ModeShape): number {
  if (input.type !== 'point-force') return participationFactor(member, shape, input.end);
  const pair = new Float64Array(2);
  const place = placeOf(member, input.at);
  evaluateShape(member, shape, place.segment, place.distance, pair);
  return pair[0];
}

/**
 * Whether F_n is zero to rounding, beside the largest amplitude of φ_n (force) or of p_n/ω_n² (end
 * motion): a force in a node of the mode, ends whose motions cancel. Cost O(segments).
 */
export function isIdle(
  member: WaveMember,
  input: TransferInput,
  shape: ModeShape,
  order: number,
  factor: number,
): boolean {
  if (shape.lambda === 0) return factor === 0;
  const force = input.type === 'point-force';
  let largest = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    // k²κ², which turns u into the flux of the same wave
    const square = Math.max(0, waveNumberSquare(member, i, shape.lambda)) * member.stiffness[i] ** 2;
    for (const at of [ENDS * i, ENDS * i + 2]) {
      const u = shape.ends[at];
      const p = shape.ends[at + 1];
      const amplitude = force
        ? square > 0
          ? Math.hypot(u, p / Math.sqrt(square))
          : Math.abs(u)
        : Math.hypot(p, u * Math.sqrt(square)) / shape.lambda;
      largest = Math.max(largest, amplitude);
    }
  }
  return Math.abs(factor) <= IDLE * (order + member.segmentCount) * largest;
}

import type { Wave } from '../spec/types.ts';
import type { SegmentProperties } from './segment-properties.ts';

/** The segments of a member given by the coefficients of the wave equation themselves. */
export function waveSegments(wave: Wave): SegmentProperties[] {
  return wave.segments.map(({ length, stiffness, inertia, foundation, drag }) => ({
    length,
    stiffness,
    inertia,
    foundation,
    drag,
    stressFactor: 0,
  }));
}

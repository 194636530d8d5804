import type { Bar, BarSegment } from '../spec/types.ts';
import type { SegmentProperties } from './segment-properties.ts';

/**
 * The segments of a bar in tension and compression: k = E·A, ρ = density·A, stress = force/A.
 *
 * Rayleigh, The Theory of Sound, vol. 1, §150 (lateral inertia neglected).
 */
export function barSegments(bar: Bar): SegmentProperties[] {
  return bar.segments.map((segment) => ({
    length: segment.length,
    ...stiffnessAndInertia(segment),
    foundation: segment.foundation,
    drag: segment.drag,
    stressFactor: segment.area === undefined ? 0 : 1 / segment.area,
  }));
}

function stiffnessAndInertia(segment: BarSegment): Pick<SegmentProperties, 'stiffness' | 'inertia'> {
  if ('axialStiffness' in segment) {
    return { stiffness: segment.axialStiffness, inertia: segment.massPerLength };
  }
  return { stiffness: segment.youngsModulus * segment.area, inertia: segment.density * segment.area };
}

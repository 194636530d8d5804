import type { ShearColumn, ShearColumnSegment } from '../spec/types.ts';
import type { SegmentProperties } from './segment-properties.ts';

/**
 * The segments of a shear column or soil profile: k = G·A, ρ = density·A, stress = force/A.
 *
 * The shear wave speed V gives the modulus G = density·V² (Kramer, Geotechnical Earthquake
 * Engineering, 1996, §5.2, from memory). The shear stiffness form carries κGA as one number and
 * no section.
 */
export function shearColumnSegments(column: ShearColumn): SegmentProperties[] {
  return column.segments.map((segment) => ({
    length: segment.length,
    ...stiffnessAndInertia(segment),
    foundation: segment.foundation,
    drag: segment.drag,
    stressFactor: 'area' in segment ? 1 / segment.area : 0,
  }));
}

function stiffnessAndInertia(segment: ShearColumnSegment): Pick<SegmentProperties, 'stiffness' | 'inertia'> {
  if ('shearStiffness' in segment) {
    return { stiffness: segment.shearStiffness, inertia: segment.massPerLength };
  }
  const inertia = segment.density * segment.area;
  if ('shearModulus' in segment) return { stiffness: segment.shearModulus * segment.area, inertia };
  return { stiffness: inertia * segment.shearWaveSpeed * segment.shearWaveSpeed, inertia };
}

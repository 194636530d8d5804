import type { Shaft, ShaftMaterialSegment } from '../spec/types.ts';
import type { SegmentProperties } from './segment-properties.ts';

/**
 * The segments of a shaft in torsion: k = G·J, ρ = density·J, with the polar second moment of area
 * J = π(D⁴ − d⁴)/32 of a round section; greatest shear stress = torque·(D/2)/J at the outer surface.
 *
 * Coulomb's theory of the round shaft (Timoshenko, Strength of Materials, part I, 3rd ed. 1955,
 * art. 62, from memory).
 */
export function shaftSegments(shaft: Shaft): SegmentProperties[] {
  return shaft.segments.map((segment) => {
    const { length, foundation, drag } = segment;
    if ('torsionalStiffness' in segment) {
      const { torsionalStiffness: stiffness, inertiaPerLength: inertia } = segment;
      return { length, stiffness, inertia, foundation, drag, stressFactor: 0 };
    }
    const polarSecondMoment = polarSecondMomentOfArea(segment);
    return {
      length,
      stiffness: segment.shearModulus * polarSecondMoment,
      inertia: segment.density * polarSecondMoment,
      foundation,
      drag,
      stressFactor: segment.outerDiameter / 2 / polarSecondMoment,
    };
  });
}

/**
 * J = π(D⁴ − d⁴)/32 in m⁴, written as a product so that a thin wall loses no digits.
 *
 * @param segment diameters in m, innerDiameter < outerDiameter
 */
export function polarSecondMomentOfArea(
  segment: Pick<ShaftMaterialSegment, 'outerDiameter' | 'innerDiameter'>,
): number {
  const { outerDiameter: outer, innerDiameter: inner } = segment;
  return (Math.PI / 32) * (outer * outer + inner * inner) * (outer + inner) * (outer - inner);
}

import type { Cable } from '../spec/types.ts';
import type { SegmentProperties } from './segment-properties.ts';

/**
 * The segments of a taut cable: k = T, ρ = mass per length.
 *
 * Small transverse motion under a constant tension (Rayleigh, The Theory of Sound, vol. 1, §122).
 * The dynamic stress of a cable is of second order in the motion: no stress factor.
 */
export function cableSegments(cable: Cable): SegmentProperties[] {
  return cable.segments.map(({ length, massPerLength, foundation, drag }) => ({
    length,
    stiffness: cable.tension,
    inertia: massPerLength,
    foundation,
    drag,
    stressFactor: 0,
  }));
}

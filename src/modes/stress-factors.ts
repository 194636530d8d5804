import { fault } from '../faults/fault.ts';
import type { WaveMember } from '../members/wave-member.ts';
import type { Stations } from './stations.ts';

/**
 * Stress per force at stations: 1/A for bars and shear columns (1/m²), (D/2)/J for shafts (1/m³).
 *
 * @throws `stress-without-section` for the first station on a segment that has no section
 */
export function stressFactors(member: WaveMember, stations: Stations): Float64Array {
  return Float64Array.from(stations.segment, (i, q) => {
    const factor = member.stressFactor[i];
    if (!(factor > 0)) {
      throw fault('stress-without-section', '/sample/quantities', {
        at: stations.position[q],
        segment: member.origin[i],
        remedy: SECTION_REMEDY[member.kind],
      });
    }
    return factor;
  });
}

/** How a segment of each kind of member gets a section. */
export const SECTION_REMEDY: Record<WaveMember['kind'], string> = {
  cable: 'a cable has no stress here: its transverse force is no normal force; ask for "force"',
  bar: 'give its "area"',
  shaft: 'describe it by "shearModulus", "density" and "outerDiameter"',
  'shear-column': 'give its "area"',
  wave: 'a "wave" member has no section: ask for "force"',
};

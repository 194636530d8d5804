import type { Member } from '../spec/types.ts';
import { barSegments } from './bar.ts';
import { cableSegments } from './cable.ts';
import type { SegmentProperties } from './segment-properties.ts';
import { shaftSegments } from './shaft.ts';
import { shearColumnSegments } from './shear-column.ts';
import { waveSegments } from './wave.ts';

/** The segments of any member in the terms of the wave equation, in the order of the request. */
export function memberSegments(member: Member): SegmentProperties[] {
  switch (member.kind) {
    case 'cable':
      return cableSegments(member);
    case 'bar':
      return barSegments(member);
    case 'shaft':
      return shaftSegments(member);
    case 'shear-column':
      return shearColumnSegments(member);
    case 'wave':
      return waveSegments(member);
  }
}

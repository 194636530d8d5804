import { entryDisplacement, entryMember, entryVelocity } from './entries.ts';
import { initialState } from './initial-shapes.ts';
import type { ReferenceEntry } from './reference.ts';
import { TravellingWaves } from './travelling-waves.ts';

/** The exact motion of an entry by characteristics, up to `duration` seconds. */
export function wavesOfEntry(entry: ReferenceEntry, duration: number, refinement = 1): TravellingWaves {
  const member = entryMember(entry);
  const { shapes, nodes } = entryVelocity(entry);
  const nodeVelocities: (number | undefined)[] = [];
  for (const { node, velocity } of nodes) nodeVelocities[node] = velocity;
  const state = initialState(member, entryDisplacement(entry), shapes, nodeVelocities);
  return new TravellingWaves(member, state, duration, refinement);
}

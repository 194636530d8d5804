import { layOutNodes, snapToNode } from '../members/node-layout.ts';
import type { InitialMotion, Load, Member, Positions, Shape } from '../spec/types.ts';

/**
 * Positions of a request that lie within a few rounding units of a node mean the node; they are
 * set to its very position (see `samePlace`), so that later work may compare them.
 *
 * @param member without faults; its attachments are moved
 * @returns what moves a position of the request
 */
export function snapAttachments(member: Member): (at: number) => number {
  const { position, attachmentNode } = layOutNodes(member);
  member.attachments.forEach((attachment, index) => {
    attachment.at = position[attachmentNode[index]];
  });
  return (at) => snapToNode(at, position);
}

/** Moves the positions of a list in place; grids have none. */
export function snapList(positions: Positions, snap: (at: number) => number): void {
  if (!Array.isArray(positions)) return;
  for (let index = 0; index < positions.length; index++) positions[index] = snap(positions[index]);
}

/** Moves every position in the description of an initial motion in place. */
export function snapInitialMotion(initial: InitialMotion, snap: (at: number) => number): void {
  for (const shapes of [initial.displacement, initial.velocity]) {
    for (const shape of [shapes ?? []].flat()) snapShape(shape, snap);
  }
  for (const entry of [...(initial.massVelocities ?? []), ...(initial.impulses ?? [])]) {
    entry.at = snap(entry.at);
  }
}

/** Moves every position in a load in place. */
export function snapLoad(load: Load, snap: (at: number) => number): void {
  if (load.type === 'point-force') load.at = snap(load.at);
  if (load.type === 'distributed-force') snapShape(load.profile, snap);
}

function snapShape(shape: Shape, snap: (at: number) => number): void {
  switch (shape.type) {
    case 'pull':
      shape.at = snap(shape.at);
      break;
    case 'polyline':
      snapList(shape.positions, snap);
      break;
    case 'polynomial':
    case 'uniform':
      shape.from = snap(shape.from);
      if (shape.to !== undefined) shape.to = snap(shape.to);
      break;
    case 'half-sine':
      break;
  }
}

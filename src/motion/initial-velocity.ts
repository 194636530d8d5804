import { Fault, fault, faultRecord, type FaultRecord } from '../faults/fault.ts';
import type { WaveMember } from '../members/wave-member.ts';
import { placeStation } from '../modes/stations.ts';
import type { StaticResponse } from '../modes/static-response.ts';
import type { Impulse, InitialMotion, MassVelocity, Shape } from '../spec/types.ts';
import { pieceValue, type PiecewiseField, type WaveTerm } from './piecewise-field.ts';
import { listOf, place, shapePieces, shapePointer, type GivenShape } from './shape-pieces.ts';

/** The initial velocity: a density on the segments and a value of its own for each node mass. */
export interface InitialVelocity {
  /** m/s (shaft: rad/s); what it says on massless segments carries no energy. */
  readonly pieces: PiecewiseField;
  /** Velocity of the node masses, shape [segments + 1]; 0 where there is no mass. */
  readonly masses: Float64Array;
}

/**
 * Reads initial velocity shapes, velocities of masses and impulses.
 *
 * A velocity shape gives node masses its value at their place (the mean of both sides where it
 * jumps, or the side that is not 0), a mass velocity replaces that, impulses add: J/M on a mass, or
 * J/(width ρ) spread over inertia.
 *
 * Faults: `pull-without-restraint`, `pull-at-fixed-end`, `force-in-velocity`,
 * `mass-velocity-on-no-mass`, `impulse-on-no-mass`, `impulse-off-inertia`.
 */
export function readVelocity(
  member: WaveMember,
  initial: InitialMotion,
  response: StaticResponse | null,
): InitialVelocity {
  const shapes = listOf(initial.velocity);
  const given = shapes.filter((shape): shape is GivenShape => shape.type !== 'pull');
  const pulls = shapes.flatMap((shape, index) =>
    shape.type === 'pull'
      ? [readVelocityPull(member, shape, response, shapePointer('velocity', initial.velocity, index))]
      : [],
  );
  const impulses = initial.impulses ?? [];
  requireInertia(member, impulses, initial.massVelocities ?? []);
  const spread = impulses.filter((impulse) => impulse.width !== undefined && impulse.width > 0);

  const breaks = [...pulls.map((pull) => pull.at), ...spread.flatMap(reach)];
  const extra = (from: number, to: number, segment: number): { powers?: number[]; waves?: WaveTerm[] } => {
    const middle = 0.5 * (from + to);
    let velocity = 0;
    for (const impulse of spread) {
      const [first, last] = reach(impulse);
      if (middle < first || middle > last || member.inertia[segment] === 0) continue;
      velocity += impulse.impulse / (impulse.width as number) / member.inertia[segment];
    }
    return {
      powers: velocity === 0 ? [] : [velocity],
      waves: pulls.map((pull) => staticTerm(member, pull, response as StaticResponse, from, to, segment)),
    };
  };
  const pieces = shapePieces(member, given, breaks, extra);

  // a spread impulse acts on the inertia beside a mass, not on the mass
  const shaped =
    spread.length === 0
      ? pieces
      : shapePieces(member, given, breaks, (from, to, segment) => ({
          waves: pulls.map((pull) => staticTerm(member, pull, response as StaticResponse, from, to, segment)),
        }));
  const atNodes = velocityAtNodes(member, shaped);
  const masses = new Float64Array(member.segmentCount + 1);
  for (let j = 0; j <= member.segmentCount; j++) if (member.mass[j] > 0) masses[j] = atNodes[j];
  for (const own of initial.massVelocities ?? []) {
    const j = massNode(member, own.at) as number;
    masses[j] = own.velocity;
  }
  for (const impulse of impulses) {
    if (impulse.width !== undefined && impulse.width > 0) continue;
    const j = massNode(member, impulse.at) as number;
    masses[j] += impulse.impulse / member.mass[j];
  }
  return { pieces, masses };
}

interface VelocityPull {
  readonly at: number;
  readonly segment: number;
  readonly distance: number;
  readonly force: number;
}

function readVelocityPull(
  member: WaveMember,
  shape: Shape & { type: 'pull' },
  response: StaticResponse | null,
  pointer: string,
): VelocityPull {
  if ('force' in shape) throw fault('force-in-velocity', `${pointer}/force`, { at: shape.at });
  if (response === null) throw fault('pull-without-restraint', `${pointer}/at`, { at: shape.at });
  const { segment, distance } = place(member, shape.at);
  const flexibility = response.flexibility(segment, distance);
  if (flexibility === 0) throw fault('pull-at-fixed-end', `${pointer}/at`, { at: shape.at });
  return { at: shape.at, segment, distance, force: shape.amplitude / flexibility };
}

/** The static shape of a pull on one cell: a line, or a hyperbolic sine on a foundation. */
function staticTerm(
  member: WaveMember,
  pull: VelocityPull,
  response: StaticResponse,
  from: number,
  to: number,
  segment: number,
): WaveTerm {
  const start = Math.max(0, from - member.position[segment]);
  const end = Math.min(member.length[segment], to - member.position[segment]);
  const at = (distance: number): number =>
    pull.force * response.mutualFlexibility(segment, distance, pull.segment, pull.distance);
  const value = at(start);
  const farValue = at(end);
  const square = -member.foundation[segment] / member.stiffness[segment];
  const h = end - start;
  const a = Math.min(Math.sqrt(-square) * h, 700);
  const slope = a > 0 ? ((farValue - value * Math.cosh(a)) * (a / Math.sinh(a))) / h : (farValue - value) / h;
  return { square, value, slope, farValue };
}

function reach(impulse: Impulse): [number, number] {
  const half = 0.5 * (impulse.width ?? 0);
  return [impulse.at - half, impulse.at + half];
}

function velocityAtNodes(member: WaveMember, pieces: PiecewiseField): Float64Array {
  const near = new Float64Array(member.segmentCount + 1);
  const far = new Float64Array(member.segmentCount + 1);
  for (const piece of pieces) {
    if (piece.start === 0) far[piece.segment] = pieceValue(piece, 0).value;
    near[piece.segment + 1] = pieceValue(piece, piece.length).value;
  }
  near[0] = far[0];
  far[member.segmentCount] = near[member.segmentCount];
  return near.map((value, j) => (value === 0 ? far[j] : far[j] === 0 ? value : 0.5 * (value + far[j])));
}

/** Node of the mass at a place, or null. */
function massNode(member: WaveMember, at: number): number | null {
  const { i, d } = placeStation(member, at);
  const tolerance = 64 * Number.EPSILON * member.position[member.segmentCount];
  const j = d >= member.length[i] ? i + 1 : at <= tolerance ? 0 : -1;
  return j >= 0 && member.mass[j] > 0 ? j : null;
}

function requireInertia(
  member: WaveMember,
  impulses: readonly Impulse[],
  massVelocities: readonly MassVelocity[],
): void {
  const records: FaultRecord[] = [];
  const places = Array.from(member.position).filter((_, j) => member.mass[j] > 0);
  massVelocities.forEach((own, index) => {
    if (massNode(member, own.at) !== null) return;
    records.push(
      faultRecord('mass-velocity-on-no-mass', `/initial/massVelocities/${index}/at`, {
        at: own.at,
        places: places.length > 0 ? places.map((x) => `${x} m`).join(', ') : 'nowhere',
      }),
    );
  });
  impulses.forEach((impulse, index) => {
    const pointer = `/initial/impulses/${index}`;
    if (impulse.width === undefined || impulse.width === 0) {
      if (massNode(member, impulse.at) === null) {
        records.push(faultRecord('impulse-on-no-mass', `${pointer}/at`, { at: impulse.at }));
      }
      return;
    }
    const reason = offInertia(member, impulse);
    if (reason === null) return;
    records.push(
      faultRecord('impulse-off-inertia', `${pointer}/width`, {
        at: impulse.at,
        width: impulse.width,
        reason,
      }),
    );
  });
  if (records.length > 0) throw new Fault(records);
}

function offInertia(member: WaveMember, impulse: Impulse): string | null {
  const [first, last] = reach(impulse);
  const length = member.position[member.segmentCount];
  const tolerance = 64 * Number.EPSILON * length;
  if (first < -tolerance || last > length + tolerance) return 'the end of the member';
  for (let i = 0; i < member.segmentCount; i++) {
    const overlaps = first < member.position[i + 1] - tolerance && last > member.position[i] + tolerance;
    if (overlaps && member.inertia[i] === 0) return `a massless stretch (segment ${member.origin[i]})`;
  }
  return null;
}

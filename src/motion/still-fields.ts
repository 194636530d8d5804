import type { WaveMember } from '../members/wave-member.ts';
import { InertiaRelief } from '../modes/inertia-relief.ts';
import { StaticResponse } from '../modes/static-response.ts';
import { placeStation, type Stations } from '../modes/stations.ts';
import { canDriftFreely } from '../spectrum/spectrum-size.ts';
import type { AppliedLoad } from './applied-loads.ts';
import type { FieldKind } from './field-kind.ts';
import { supportState } from './support-shape.ts';

/**
 * Adds the exact quasi-static part of all loads to a field [times × stations]: w(x) p(t) of each load,
 * y(t) r(x) of each support, P G(x, vt) of each moving force, and their rates; with a gauge time their
 * averages over it.
 *
 * The acceleration takes only the support's y″ r: modes carry the rest. The average of a moving force's flux
 * is (P/(v τ)) ∫ I_x(z) dz over the stretch it passes, I_x the influence line.
 * Cost: O(times · stations) a load.
 */
export function addStillFields(
  member: WaveMember,
  loads: readonly AppliedLoad[],
  stations: Stations,
  times: Float64Array,
  kind: FieldKind,
  gaugeTime: number,
  field: Float64Array,
): void {
  const begin = times.map((t) => Math.max(0, t - 0.5 * gaugeTime));
  const end = begin.map((t) => t + gaugeTime);
  const average = gaugeTime > 0 && kind !== 'displacement' && kind !== 'relativeDisplacement';
  for (const load of loads) {
    if (load.moving !== null) {
      addMoving(member, load.moving, stations, times, begin, end, kind, average, field);
      continue;
    }
    const onLoad = average ? averagedDrive(load, kind, begin, end) : instantDrive(load, kind, times);
    addOuter(field, onLoad, stillAt(load, stations, kind));
    if (load.support === null || kind === 'relativeDisplacement') continue;
    const onSupport = average
      ? averagedSupport(member, load, kind, begin, end)
      : instantSupport(member, load, kind, times);
    addOuter(field, onSupport, supportAt(member, load, stations, kind));
  }
}

function addOuter(field: Float64Array, rows: Float64Array, columns: Float64Array): void {
  for (let j = 0, at = 0; j < rows.length; j++) {
    const factor = rows[j];
    if (factor === 0) {
      at += columns.length;
      continue;
    }
    for (let q = 0; q < columns.length; q++, at++) field[at] += factor * columns[q];
  }
}

function stillAt(load: AppliedLoad, stations: Stations, kind: FieldKind): Float64Array {
  return Float64Array.from(stations.segment, (segment, q) => {
    if (load.still === null || kind === 'acceleration') return 0;
    const state = load.still.at(segment, stations.distance[q]);
    return kind === 'force' ? state.flux : state.displacement;
  });
}

function supportAt(member: WaveMember, load: AppliedLoad, stations: Stations, kind: FieldKind): Float64Array {
  const { shape } = load.support as NonNullable<AppliedLoad['support']>;
  return Float64Array.from(stations.segment, (segment, q) => {
    const state = supportState(member, shape, segment, stations.distance[q]);
    return kind === 'force' ? state.flux : state.displacement;
  });
}

function instantDrive(load: AppliedLoad, kind: FieldKind, times: Float64Array): Float64Array {
  if (kind === 'acceleration') return new Float64Array(times.length);
  const { value, rate } = load.drivesAt(times);
  return kind === 'velocity' ? rate : value;
}

function averagedDrive(
  load: AppliedLoad,
  kind: FieldKind,
  begin: Float64Array,
  end: Float64Array,
): Float64Array {
  if (kind === 'acceleration') return new Float64Array(begin.length);
  if (kind === 'velocity') {
    const [from, to] = [load.drivesAt(begin).value, load.drivesAt(end).value];
    return begin.map((t, j) => (to[j] - from[j]) / (end[j] - t));
  }
  const first = load.driveIntegrals(begin);
  const last = load.driveIntegrals(end);
  return begin.map((t, j) => (last[j] - first[j]) / (end[j] - t));
}

function instantSupport(
  member: WaveMember,
  load: AppliedLoad,
  kind: FieldKind,
  times: Float64Array,
): Float64Array {
  const { motion } = load.support as NonNullable<AppliedLoad['support']>;
  const { position, velocity, acceleration } = motion.table(times);
  const beta = member.damping.stiffnessCoefficient;
  switch (kind) {
    case 'velocity':
      return velocity;
    case 'acceleration':
      return acceleration;
    case 'force':
      return position.map((place, j) => place + beta * velocity[j]);
    default:
      return position;
  }
}

function averagedSupport(
  member: WaveMember,
  load: AppliedLoad,
  kind: FieldKind,
  begin: Float64Array,
  end: Float64Array,
): Float64Array {
  const { motion } = load.support as NonNullable<AppliedLoad['support']>;
  const beta = member.damping.stiffnessCoefficient;
  const [from, to] = [motion.table(begin), motion.table(end)];
  if (kind === 'force') {
    const first = motion.integrals(begin);
    const last = motion.integrals(end);
    return begin.map((t, j) => {
      const change = to.position[j] - from.position[j];
      return (last[j] - first[j] + beta * change) / (end[j] - t);
    });
  }
  return begin.map((t, j) => {
    const change =
      kind === 'velocity' ? to.position[j] - from.position[j] : to.velocity[j] - from.velocity[j];
    return change / (end[j] - t);
  });
}

function addMoving(
  member: WaveMember,
  moving: NonNullable<AppliedLoad['moving']>,
  stations: Stations,
  times: Float64Array,
  begin: Float64Array,
  end: Float64Array,
  kind: FieldKind,
  average: boolean,
  field: Float64Array,
): void {
  if (kind === 'acceleration') return;
  const source = canDriftFreely(member) ? new InertiaRelief(member) : new StaticResponse(member);
  const columns = stations.segment.length;
  const travelled = (t: number): ((q: number) => number) => {
    const { i: j, d: z } = placeStation(member, moving.heldPlaceAt(t));
    const factor = moving.force / moving.velocity;
    return (q) => factor * source.influenceIntegral(stations.segment[q], stations.distance[q], j, z);
  };
  const at = (t: number): ((q: number) => number) => {
    const x = moving.placeAt(t);
    if (x === null) return () => 0;
    const { i: j, d: z } = placeStation(member, x);
    return (q) => {
      const i = stations.segment[q];
      const d = stations.distance[q];
      if (kind === 'force') return moving.force * source.influence(i, d, j, z);
      if (kind === 'velocity' && !average) {
        // P v ∂G(x,z)/∂z, the slope at z of the shape that a force at x makes
        return (moving.force * moving.velocity * source.influence(j, z, i, d)) / member.stiffness[j];
      }
      return moving.force * source.mutualFlexibility(i, d, j, z);
    };
  };
  for (let row = 0; row < times.length; row++) {
    if (average) {
      const change = kind === 'force' ? travelled : at;
      const from = change(begin[row]);
      const to = change(end[row]);
      for (let q = 0; q < columns; q++)
        field[row * columns + q] += (to(q) - from(q)) / (end[row] - begin[row]);
    } else {
      const now = at(times[row]);
      for (let q = 0; q < columns; q++) field[row * columns + q] += now(q);
    }
  }
}

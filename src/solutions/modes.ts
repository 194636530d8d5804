import { fault } from '../faults/fault.ts';
import { readMember } from '../members/read-member.ts';
import type { WaveMember } from '../members/wave-member.ts';
import { ModeSeries, type Mode as SolvedMode } from '../modes/mode-series.ts';
import { movingInertia, participationFactor, type MovingEnds } from '../modes/participation.ts';
import { peakDisplacement, strainShares } from '../modes/shape-figures.ts';
import { ShapeSampler } from '../modes/shape-sampler.ts';
import { evenPositions, placeStations, type Stations } from '../modes/stations.ts';
import { dampingRate } from '../motion/modal-damping.ts';
import type { Member, Mode, ModesAnswer, ModesRequest, Notice } from '../spec/types.ts';
import { totalMass } from '../spectrum/spectrum-size.ts';
import { HELD_NUMBERS, MODE_LIMIT } from './limits.ts';

/**
 * Natural frequencies, each enclosed by count, and mode shapes of a member.
 *
 * Faults: `mode-out-of-reach`, `too-many-values`, and those of {@link readMember}.
 * Cost: 7 to 11 sweeps of O(segments) a mode, O(positions) a shape.
 */
export function solveModes(request: ModesRequest): ModesAnswer {
  const member = readMember(request.member);
  const series = new ModeSeries(member);
  const count = wantedModes(request, series);
  const stations = shapeStations(member, request);
  const sampled = (stations?.position.length ?? 0) * (request.shapes?.quantities.length ?? 0);
  if (count * Math.max(sampled, member.segmentCount) > HELD_NUMBERS) {
    throw fault('too-many-values', sampled > 0 ? '/shapes' : '/series', {
      count: count * Math.max(sampled, member.segmentCount),
      what: `${count} modes of ${sampled > 0 ? `${sampled} shape values` : `${member.segmentCount} segments`}`,
      limit: HELD_NUMBERS,
    });
  }

  const sampler = stations && new ShapeSampler(member, stations);
  const ends = request.participation?.ends;
  const inertia = ends === undefined ? 0 : movingInertia(member, requireMovable(member, ends));
  const modes: Mode[] = [];
  let cumulative = 0;
  for (let n = 1; n <= count; n++) {
    const solved = series.next();
    if (solved === null) break;
    const mode = describe(request, member, solved, stations, sampler);
    if (ends !== undefined) {
      const factor = participationFactor(member, solved.shape, ends);
      const fraction = inertia > 0 ? (factor * factor) / inertia : 0;
      cumulative += fraction;
      mode.participation = {
        factor,
        effectiveMass: factor * factor,
        effectiveMassFraction: fraction,
        cumulativeFraction: cumulative,
      };
    }
    modes.push(mode);
  }

  const { total, travelTime } = series.frequencies;
  return {
    member: {
      kind: member.kind,
      length: member.position[member.segmentCount],
      travelTime,
      totalMass: totalMass(member),
    },
    modes,
    ...(stations && { shapes: { positions: stations.position } }),
    ...(ends !== undefined && { participation: { ends, mass: inertia, endMass: 0 } }),
    convergence: {
      spectrumComplete: true,
      modesFound: modes.length,
      modesInTotal: Number.isFinite(total) ? total : null,
    },
    notices: notices(request, modes.length, total),
  };
}

function wantedModes(request: ModesRequest, series: ModeSeries): number {
  if ('modes' in request.series) return request.series.modes;
  // a mode within rounding of the limit counts as up to it
  const below = series.frequencies.countBelow(2 * Math.PI * request.series.upTo * (1 + 8 * Number.EPSILON));
  if (below > MODE_LIMIT) {
    throw fault('mode-out-of-reach', '/series/upTo', {
      count: below,
      frequency: request.series.upTo,
      limit: MODE_LIMIT,
    });
  }
  return below;
}

function shapeStations(member: WaveMember, request: ModesRequest): Stations | null {
  if (!request.shapes) return null;
  const { positions } = request.shapes;
  return placeStations(member, 'count' in positions ? evenPositions(member, positions.count) : positions);
}

function requireMovable(member: WaveMember, ends: MovingEnds): MovingEnds {
  const near = (ends === 'near' || ends === 'both') && !member.nearFixed;
  const far = (ends === 'far' || ends === 'both') && !member.farFixed;
  if (near || far) {
    throw fault('moving-end-not-fixed', '/participation/ends', { end: near ? 'near' : 'far', ends });
  }
  if (ends === 'uniform' && (member.nearFixed || member.farFixed)) {
    throw fault('uniform-motion-held', '/participation/ends', { end: member.nearFixed ? 'near' : 'far' });
  }
  return ends;
}

function describe(
  request: ModesRequest,
  member: WaveMember,
  solved: SolvedMode,
  stations: Stations | null,
  sampler: ShapeSampler | null,
): Mode {
  const { frequency, shape } = solved;
  const { omega, order } = frequency;
  const peak = request.shapes?.normalisation === 'peak' ? peakDisplacement(member, shape) : 1;
  const mode: Mode = {
    order,
    angularFrequency: omega,
    frequency: omega / (2 * Math.PI),
    period: omega > 0 ? (2 * Math.PI) / omega : null,
    enclosure: [frequency.lower, frequency.upper],
    dampingRatio: omega > 0 ? dampingRate(member.damping, order, omega) / (2 * omega) : null,
    modalMass: 1 / (peak * peak),
    // Sturm's oscillation theorem: the n-th shape has n − 1 zeros inside the member
    nodalPoints: order - 1,
  };
  if (request.energyShares) mode.energyShares = omega > 0 ? shares(request.member, member, solved) : null;
  if (stations && request.shapes) {
    const displacement = new Float64Array(stations.position.length);
    const force = new Float64Array(stations.position.length);
    sampler?.sample(shape, displacement, force);
    const { quantities } = request.shapes;
    mode.shape = {
      ...(quantities.includes('displacement') && { displacement: displacement.map((value) => value / peak) }),
      ...(quantities.includes('force') && { force: force.map((value) => value / peak) }),
    };
  }
  return mode;
}

function shares(request: Member, member: WaveMember, solved: SolvedMode): NonNullable<Mode['energyShares']> {
  const strain = strainShares(member, solved.shape);
  const segments = new Float64Array(request.segments.length);
  strain.segments.forEach((share, i) => (segments[member.origin[i]] += share));
  const attachments = Float64Array.from(member.attachmentNode, (node, a) =>
    member.spring[node] > 0 ? (strain.nodes[node] * member.attachmentSpring[a]) / member.spring[node] : 0,
  );
  return { segments, attachments, ends: [strain.nodes[0], strain.nodes[member.segmentCount]] };
}

function notices(request: ModesRequest, found: number, total: number): Notice[] {
  const list: Notice[] = [];
  if ('modes' in request.series && found < request.series.modes) {
    list.push({
      code: 'finite-modes',
      detail: `All inertia is lumped, so the member has ${total} modes; all of them are given.`,
    });
  }
  return list;
}

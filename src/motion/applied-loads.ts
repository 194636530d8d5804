import type { WaveMember } from '../members/wave-member.ts';
import type { Mode } from '../modes/mode-series.ts';
import { participationFactor } from '../modes/participation.ts';
import type { Load } from '../spec/types.ts';
import { eventsOf, kicksUntil, quickestOf } from './drive-events.ts';
import { SupportMotion } from './end-motion.ts';
import { massForm } from './field-energy.ts';
import { ForcedMotion, type Kick } from './forced-motion.ts';
import type { LoadMover } from './load-mover.ts';
import { historyIntegrals, historyTable, readHistory, type DriveTable, type TimeHistory } from './history.ts';
import { measureParts, type HistoryMeasures } from './history-measures.ts';
import { modalForce, type LoadShape } from './load-shape.ts';
import { loadedStatic, type LoadedStatic } from './loaded-static.ts';
import { MovingForceMotion } from './moving-force.ts';
import { measureRecord } from './record-measures.ts';
import { RecordMotion, type RecordDrive } from './record-motion.ts';
import { piecePhase, pieceValue } from './piecewise-field.ts';
import { place, shapePieces, type GivenShape } from './shape-pieces.ts';
import { supportShape, type SupportShape } from './support-shape.ts';
import { gauss } from './wave-integrals.ts';

/** One load, ready for modes: its factor of each, its drive in time, its static response. */
export interface AppliedLoad {
  /** F_n per unit drive (−Γ_n for a support). */
  modalFactor(mode: Mode): number;
  /** Motion at fixed times. */
  moverAt(times: Float64Array): LoadMover;
  /** The static response per unit drive, elastic part; null for a moving force. */
  readonly still: LoadedStatic | null;
  /** p and p′ of the quasi-static part at each time. */
  drivesAt(times: Float64Array): DriveTable;
  /** ∫p up to each time, kicks included. */
  driveIntegrals(times: Float64Array): Float64Array;
  /** Instants up to a time at which the drive changes its formula, at most `most` of them, and sudden changes of q′. */
  events(until: number, most: number): readonly number[];
  kicks(until: number): readonly Kick[];
  /** Largest rate of the drive's waves, rad/s. */
  readonly quickest: number;
  /** Support motion and its static shape. */
  readonly support: { readonly shape: SupportShape; readonly motion: SupportMotion } | null;
  /** Whether the load has a finite mass norm, and that norm ∫f²/ρ + Σf²/M. */
  readonly smooth: boolean;
  readonly massNorm: number;
  /** Largest flux that a unit drive can cause statically, N: the sum of |f|. */
  readonly totalForce: number;
  /** Whether parts of the load may cancel each other. */
  readonly cancels: boolean;
  /** Place of a point force, or null. */
  readonly point: LoadShape['point'];
  /** Measures of the drive up to the span; null for a moving force. */
  readonly measures: HistoryMeasures | null;
  readonly moving: MovingForceMotion | null;
}

/**
 * Reads the loads of a request.
 *
 * @param span latest time that is sampled, gauge time included, s
 */
export function readLoads(member: WaveMember, loads: readonly Load[], span: number): AppliedLoad[] {
  return loads.map((load) => {
    switch (load.type) {
      case 'point-force':
        return shapedLoad(member, pointShape(member, load.at), readHistory(load.history), span);
      case 'distributed-force':
        return shapedLoad(
          member,
          distributedShape(member, load.profile as GivenShape),
          readHistory(load.history),
          span,
        );
      case 'body-force':
        return shapedLoad(member, bodyShape(member), readHistory(load.history), span);
      case 'end-motion':
        return supportLoad(
          member,
          load.end,
          new SupportMotion(
            readHistory(load.history, load.quantity === 'displacement'),
            load.quantity,
            member.damping.massCoefficient,
          ),
          span,
        );
      case 'moving-force':
        return movingLoad(member, load.force, load.speed, load.start);
    }
  });
}

function pointShape(member: WaveMember, at: number): LoadShape {
  return {
    pieces: [],
    nodes: new Float64Array(member.segmentCount + 1),
    point: place(member, at),
    smooth: false,
    massNorm: 0,
  };
}

function distributedShape(member: WaveMember, profile: GivenShape): LoadShape {
  const pieces = shapePieces(member, [profile]);
  const nodes = new Float64Array(member.segmentCount + 1);
  const smooth = pieces.every(
    (piece) =>
      member.inertia[piece.segment] > 0 || (piece.waves.length === 0 && piece.powers.every((c) => c === 0)),
  );
  // ∫f²/ρ is the mass form of f/ρ
  const fields = pieces.map((piece) => {
    const factor = member.inertia[piece.segment] > 0 ? 1 / member.inertia[piece.segment] : 0;
    return {
      ...piece,
      powers: piece.powers.map((c) => c * factor),
      magnitude: piece.magnitude * factor,
      waves: piece.waves.map((term) => ({
        ...term,
        value: term.value * factor,
        slope: term.slope * factor,
        farValue: term.farValue * factor,
      })),
    };
  });
  return { pieces, nodes, point: null, smooth, massNorm: smooth ? massForm(member, fields, nodes) : 0 };
}

function bodyShape(member: WaveMember): LoadShape {
  const pieces = Array.from(member.inertia, (rho, segment) => ({
    segment,
    start: 0,
    length: member.length[segment],
    powers: [rho],
    waves: [],
    magnitude: rho,
  }));
  let massNorm = 0;
  for (let i = 0; i < member.segmentCount; i++) massNorm += member.inertia[i] * member.length[i];
  for (const mass of member.mass) massNorm += mass;
  return { pieces, nodes: Float64Array.from(member.mass), point: null, smooth: true, massNorm };
}

function shapedLoad(member: WaveMember, shape: LoadShape, history: TimeHistory, span: number): AppliedLoad {
  const drive = history.record ? recordDrive(history.record) : null;
  return {
    modalFactor: (mode) => modalForce(member, mode.shape, shape),
    moverAt: (times) => moverOf(drive, history.parts, times),
    still: loadedStatic(member, shape),
    drivesAt: (times) => historyTable(history, times),
    driveIntegrals: (times) => historyIntegrals(history, times),
    events: (until, most) => eventsOf(drive, history.parts, until, most),
    kicks: () => [],
    quickest: quickestOf(history.parts),
    support: null,
    smooth: shape.smooth,
    massNorm: shape.massNorm,
    totalForce: totalForce(shape),
    cancels: shape.pieces.length > 0,
    point: shape.point,
    measures: drive ? measureRecord(drive) : measureParts(history.parts, [], span),
    moving: null,
  };
}

function recordDrive(record: NonNullable<TimeHistory['record']>): RecordDrive {
  const { start, interval, values } = record;
  const count = values.length - 1;
  const slope = new Float64Array(count);
  for (let i = 0; i < count; i++) slope[i] = (values[i + 1] - values[i]) / interval;
  return { start, interval, value: values.subarray(0, count), slope, curve: null, kick: null, after: 0 };
}

function moverOf(drive: RecordDrive | null, parts: TimeHistory['parts'], times: Float64Array): LoadMover {
  if (drive !== null) {
    const record = new RecordMotion(drive, times);
    return {
      expect: (modes) => record.expect(modes),
      add: (mode, rate, factor, q, v) => record.add(mode.frequency.omega, rate, factor, q, v),
    };
  }
  const forced = new ForcedMotion(parts, [], times);
  return { add: (mode, rate, factor, q, v) => forced.add(mode.frequency.omega, rate, factor, q, v) };
}

function supportLoad(
  member: WaveMember,
  end: 'near' | 'far' | 'both',
  motion: SupportMotion,
  span: number,
): AppliedLoad {
  const shape = supportShape(member, end);
  const drag = member.damping.massCoefficient;
  const inertial = loadedStatic(member, shape.load);
  return {
    modalFactor: (mode) => -participationFactor(member, mode.shape, end),
    moverAt: (times) => {
      if (motion.record !== null) return moverOf(motion.record, [], times);
      const forced = new ForcedMotion(motion.drive, motion.kicks, times);
      return { add: (mode, rate, factor, q, v) => forced.add(mode.frequency.omega, rate, factor, q, v) };
    },
    still: {
      compliance: inertial.compliance,
      at: (segment, distance) => {
        const state = inertial.at(segment, distance);
        return { displacement: -state.displacement, flux: -state.flux };
      },
    },
    drivesAt: (times) => {
      const { velocity, acceleration, jerk } = motion.table(times);
      return {
        value: acceleration.map((now, j) => now + drag * velocity[j]),
        rate: jerk.map((now, j) => now + drag * acceleration[j]),
      };
    },
    driveIntegrals: (times) => {
      const { velocity, position } = motion.table(times);
      return velocity.map((now, j) => now + drag * position[j]);
    },
    events: (until, most) => [
      ...eventsOf(motion.record, motion.drive, until, most),
      ...motion.kicks.filter((kick) => kick.time <= until).map((kick) => kick.time),
    ],
    kicks: (until) => kicksUntil(motion, until),
    quickest: quickestOf(motion.drive),
    support: { shape, motion },
    smooth: true,
    massNorm: shape.inertia,
    totalForce: totalForce(shape.load),
    cancels: false,
    point: null,
    measures: motion.record ? measureRecord(motion.record) : measureParts(motion.drive, motion.kicks, span),
    moving: null,
  };
}

function movingLoad(member: WaveMember, force: number, speed: number, start: number): AppliedLoad {
  const moving = new MovingForceMotion(member, force, speed, start);
  return {
    modalFactor: () => 1,
    moverAt: (times) => moving.moverAt(times),
    still: null,
    drivesAt: ({ length }) => ({ value: new Float64Array(length), rate: new Float64Array(length) }),
    driveIntegrals: (times) => new Float64Array(times.length),
    events: (until) => moving.passage.flatMap(({ from, to }) => [from, to]).filter((t) => t <= until),
    kicks: () => [],
    quickest: 0,
    support: null,
    smooth: false,
    massNorm: 0,
    totalForce: Math.abs(force),
    cancels: false,
    point: null,
    measures: null,
    moving,
  };
}

/** ∫|f| + Σ|f_j|, at most. */
function totalForce(shape: LoadShape): number {
  let total = shape.point === null ? 0 : 1;
  for (const piece of shape.pieces) {
    total += gauss(piece.length, 2 * piecePhase(piece) + 6, (xi) => Math.abs(pieceValue(piece, xi).value));
  }
  for (const force of shape.nodes) total += Math.abs(force);
  // kinks of |f| inside a cell cost the quadrature a little
  return total * (shape.pieces.length > 0 ? 1.02 : 1);
}

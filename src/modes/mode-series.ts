import type { WaveMember } from '../members/wave-member.ts';
import { NaturalFrequencies, type NaturalFrequency } from '../spectrum/natural-frequencies.ts';
import { totalMass } from '../spectrum/spectrum-size.ts';
import { massProduct } from './mass-product.ts';
import { rigidShape, shapeAt, type ModeShape } from './mode-shape.ts';

/** A mode of the member: its frequency with enclosure and its mass-normalised shape. */
export interface Mode {
  readonly frequency: NaturalFrequency;
  readonly shape: ModeShape;
  /** Largest mass product with the modes of the same close group before orthogonalisation. */
  readonly coupling: number;
}

/** Neighbours closer than this (relative) are shaped together. */
const CLOSE = 1e-3;
/** Segments tried as joints for the shapes of a close group. */
const JOINT_LIMIT = 64;
/** Least independent part, match counted, below which no second shape was found. */
const INDEPENDENT = 1e-9;

/**
 * The modes of a member in ascending order, made on demand.
 *
 * Shapes of neighbours whose frequencies differ by less than 1e-3 are made together: within such a
 * group a single shape is defined only up to rounding over the gap, and two careless matches can
 * give the same shape twice. The group's shapes are therefore chosen independent, from joints in
 * different segments if need be, and made orthonormal in the mass product.
 *
 * Cost: about 6 sweeps a mode, O(segments) each.
 */
export class ModeSeries {
  readonly frequencies: NaturalFrequencies;
  private readonly member: WaveMember;
  private queue: Mode[] = [];
  private ahead: NaturalFrequency | null | undefined;

  constructor(member: WaveMember) {
    this.member = member;
    this.frequencies = new NaturalFrequencies(member);
  }

  /** The next mode, or null when the member has no more. */
  next(): Mode | null {
    if (this.queue.length === 0) this.fill();
    return this.queue.shift() ?? null;
  }

  private fill(): void {
    const first = this.ahead === undefined ? this.frequencies.next() : this.ahead;
    this.ahead = undefined;
    if (first === null) {
      this.ahead = null;
      return;
    }
    if (first.omega === 0) {
      this.queue.push({
        frequency: first,
        shape: rigidShape(this.member, totalMass(this.member)),
        coupling: 0,
      });
      return;
    }
    const group = [first];
    for (;;) {
      const next = this.frequencies.next();
      this.ahead = next;
      if (next === null || next.omega - group[group.length - 1].omega > CLOSE * next.omega) break;
      // a dense spectrum is not a close group: spacing must also be small against the mean spacing
      const mean = Math.PI / this.frequencies.travelTime;
      if (next.omega - group[group.length - 1].omega > 0.05 * mean) break;
      group.push(next);
    }
    if (group.length === 1) {
      const shape = shapeAt(this.member, first.omega, first.joint);
      this.queue.push({ frequency: first, shape, coupling: 0 });
    } else {
      this.queue.push(...shapeGroup(this.member, group));
    }
  }
}

/** Orthonormal shapes of a group of near-degenerate modes. */
function shapeGroup(member: WaveMember, group: readonly NaturalFrequency[]): Mode[] {
  const modes: Mode[] = [];
  for (const frequency of group) {
    let best: ModeShape | null = null;
    let bestPart = 0;
    for (const joint of joints(member, frequency.joint)) {
      const candidate = shapeAt(member, frequency.omega, joint);
      const freed = free(member, candidate, modes);
      // a poor match brings other modes in; beyond some independence nothing is gained
      const part = Math.min(freed.part, 0.7) / (1 + candidate.mismatch * 1e11);
      if (part > bestPart) {
        bestPart = part;
        best = freed.shape;
      }
      if (part > 0.5) break;
    }
    if (best === null || bestPart < INDEPENDENT) {
      best = free(member, shapeAt(member, frequency.omega, frequency.joint), []).shape;
    }
    let coupling = 0;
    for (const mode of modes) coupling = Math.max(coupling, Math.abs(massProduct(member, best, mode.shape)));
    modes.push({ frequency, shape: best, coupling });
  }
  return modes;
}

function* joints(member: WaveMember, first: number): Generator<number> {
  yield first;
  const stride = Math.max(1, Math.floor(member.segmentCount / JOINT_LIMIT));
  for (let i = 0; i < member.segmentCount; i += stride) if (i !== first) yield i;
}

/** A shape made orthogonal to others (twice, for full orthogonality), and how much of it was left. */
function free(
  member: WaveMember,
  shape: ModeShape,
  others: readonly Mode[],
): { shape: ModeShape; part: number } {
  const ends = Float64Array.from(shape.ends);
  const result = { ...shape, ends };
  let part = 1;
  for (let pass = 0; pass < 2; pass++) {
    for (const other of others) {
      const overlap = massProduct(member, result, other.shape);
      for (let i = 0; i < ends.length; i++) ends[i] -= overlap * other.shape.ends[i];
    }
    const size = Math.sqrt(massProduct(member, result, result));
    if (!(size > 0)) return { shape: result, part: 0 };
    part *= size;
    for (let i = 0; i < ends.length; i++) ends[i] /= size;
  }
  return { shape: signed(member, result), part };
}

/** φ(0) > 0, or φ′(0⁺) > 0 at a fixed near end. */
function signed(member: WaveMember, shape: ModeShape): ModeShape {
  if (shape.ends[member.nearFixed ? 1 : 0] < 0)
    for (let i = 0; i < shape.ends.length; i++) shape.ends[i] *= -1;
  return shape;
}

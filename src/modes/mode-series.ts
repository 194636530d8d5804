import type { WaveMember } from '../members/wave-member.ts';
import { NaturalFrequencies, type NaturalFrequency } from '../spectrum/natural-frequencies.ts';
import { totalMass } from '../spectrum/spectrum-size.ts';
import { massProduct } from './mass-product.ts';
import { rigidShape, type ModeShape } from './mode-shape.ts';
import { shapeAt } from './shape-at.ts';

/** A mode of the member: its frequency with enclosure and its mass-normalised shape. */
export interface Mode {
  readonly frequency: NaturalFrequency;
  readonly shape: ModeShape;
  /** Largest mass product with the modes of the same close group before orthogonalisation. */
  readonly coupling: number;
}

/** Neighbours closer than this (relative) may be shaped together. */
const CLOSE = 1e-4;
/** More modes than this so close together are a dense spectrum, not twins, and are shaped one by one. */
const GROUP_LIMIT = 6;
/** Nodes tried as joints for the shapes of a close group. */
const JOINT_LIMIT = 64;
/** Independent part from which a shape needs no other joint. */
const INDEPENDENT_ENOUGH = 0.5;

/**
 * The modes of a member in ascending order, made on demand.
 *
 * Shapes of neighbours whose frequencies differ by less than 1e-4 are made together: within such a
 * group a single shape is defined only up to rounding over the gap, and two careless matches can
 * give the same shape twice. The group's shapes are therefore chosen independent, from joints in
 * different segments if need be, and made orthonormal in the mass product.
 *
 * Cost: 7 to 11 sweeps a mode, O(segments) each.
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
      if (group.length === GROUP_LIMIT) break;
      group.push(next);
    }
    if (group.length === 1) {
      const shape = shapeAt(this.member, first.omega);
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
    let best = free(member, shapeAt(member, frequency.omega), modes);
    if (best.part < INDEPENDENT_ENOUGH) {
      const stride = Math.max(1, Math.floor(member.segmentCount / JOINT_LIMIT));
      for (let node = 0; node <= member.segmentCount; node += stride) {
        const candidate = free(member, shapeAt(member, frequency.omega, node), modes);
        if (worth(candidate) > worth(best)) best = candidate;
      }
    }
    const { shape } = best;
    let coupling = 0;
    for (const mode of modes) coupling = Math.max(coupling, Math.abs(massProduct(member, shape, mode.shape)));
    modes.push({ frequency, shape, coupling });
  }
  return modes;
}

/** Independence up to a point beyond which nothing is gained, against a poor match, which brings other modes in. */
function worth(candidate: { shape: ModeShape; part: number }): number {
  return Math.min(candidate.part, 0.7) / (1 + candidate.shape.mismatch * 1e11);
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

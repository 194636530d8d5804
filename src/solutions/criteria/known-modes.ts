import { fault } from '../../faults/fault.ts';
import type { WaveMember } from '../../members/wave-member.ts';
import { NaturalFrequencies, type NaturalFrequency } from '../../spectrum/natural-frequencies.ts';
import { MODE_LIMIT } from '../limits.ts';

const TURN = 2 * Math.PI;

/** A natural frequency in Hz with its enclosure, rounded outward. */
export interface EnclosedFrequency {
  readonly order: number;
  /** Hz; 0 for a rigid-body mode. */
  readonly frequency: number;
  readonly lower: number;
  readonly upper: number;
  /** rad/s */
  readonly natural: NaturalFrequency;
}

/** The natural frequencies of a member, solved once for all criteria, as far as they are asked for. */
export class KnownModes {
  readonly member: WaveMember;
  private readonly series: NaturalFrequencies;
  private readonly known: EnclosedFrequency[] = [];

  constructor(member: WaveMember) {
    this.member = member;
    this.series = new NaturalFrequencies(member);
  }

  /** Number of modes that the member has; infinite for nearly all. */
  get total(): number {
    return this.series.total;
  }

  /** Mode number `order` from 1, or null where the member has fewer. Cost: 5 to 9 sweeps a mode not yet known. */
  mode(order: number): EnclosedFrequency | null {
    while (this.known.length < order) {
      const natural = this.series.next();
      if (natural === null) return null;
      this.known.push(enclosed(natural));
    }
    return this.known[order - 1];
  }

  /**
   * All vibrating modes whose enclosure begins at or below a frequency, and the one above; a rigid-body
   * mode is left out.
   *
   * @param frequency Hz
   * @throws Fault `mode-out-of-reach` at `pointer` where they are more than one request may have
   */
  upTo(frequency: number, pointer: string): EnclosedFrequency[] {
    const limit = TURN * frequency * (1 + 8 * Number.EPSILON);
    // A first trial at 0 has nothing below it.
    const count = limit > 0 ? this.counted(limit) : 0;
    if (count > MODE_LIMIT)
      throw fault('mode-out-of-reach', pointer, { count, frequency, limit: MODE_LIMIT });
    const found: EnclosedFrequency[] = [];
    for (let order = 1; order <= MODE_LIMIT + 1; order++) {
      const mode = this.mode(order);
      if (mode === null) break;
      if (mode.frequency > 0) found.push(mode);
      if (mode.lower > frequency) break;
    }
    return found;
  }

  private counted(omega: number): number {
    return new NaturalFrequencies(this.member).countBelow(omega);
  }
}

/** From rad/s to Hz, each side moved outward by what the division rounds. */
function enclosed(natural: NaturalFrequency): EnclosedFrequency {
  const { order, omega, lower, upper } = natural;
  const slack = 2 * Number.EPSILON;
  return {
    order,
    frequency: omega / TURN,
    lower: (lower / TURN) * (1 - slack),
    upper: (upper / TURN) * (1 + slack),
    natural,
  };
}

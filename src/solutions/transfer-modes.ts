import { TailFlexibility } from '../certificate/tail-flexibility.ts';
import type { WaveMember } from '../members/wave-member.ts';
import { ModeSeries, type Mode } from '../modes/mode-series.ts';
import { ShapeSampler } from '../modes/shape-sampler.ts';
import type { Stations } from '../modes/stations.ts';

/** The modes of a truncated transfer function at the input's and the outputs' places. */
export interface TransferModes {
  readonly modes: readonly Mode[];
  /** φ_n and p_n at the outputs, shape [modes][outputs]. */
  readonly displacement: readonly Float64Array[];
  readonly flux: readonly Float64Array[];
  /** F_n, the input's factor of each mode. */
  readonly factor: Float64Array;
  /** Whether the input does not drive the mode, F_n being zero to rounding. */
  readonly idle: readonly boolean[];
  /** What the modes leave of the flexibilities: outputs first, the input's place last. */
  readonly tails: TailFlexibility;
  /** ω_{N+1}, rad/s; infinite when the member has no more modes. */
  readonly nextOmega: number;
  /** ΔC of the input, bound. */
  readonly inputTail: number;
}

/**
 * Solves the modes of a truncated transfer function.
 *
 * @param stations outputs, then the place of the force (or of the moving end)
 * @param factorOf F_n of the input
 * @param idleIn whether F_n is zero to rounding
 * @param complianceTail bound on ΔC = C_F − ΣF_n²/ω_n² from the tails and what was summed
 */
export function transferModes(
  member: WaveMember,
  stations: Stations,
  count: number,
  factorOf: (mode: Mode) => number,
  idleIn: (mode: Mode, factor: number) => boolean,
  complianceTail: (tails: TailFlexibility, squares: number, nextLambda: number) => number,
): TransferModes {
  const series = new ModeSeries(member);
  const sampler = new ShapeSampler(member, stations);
  const tails = new TailFlexibility(member, stations);
  const last = stations.segment.length - 1;
  const modes: Mode[] = [];
  const displacement: Float64Array[] = [];
  const flux: Float64Array[] = [];
  const factors: number[] = [];
  const idle: boolean[] = [];
  let squares = 0;
  let next = series.next();
  while (next !== null && modes.length < count) {
    const u = new Float64Array(last + 1);
    const p = new Float64Array(last + 1);
    sampler.sample(next.shape, u, p);
    tails.addSampled(next, u, p);
    const factor = factorOf(next);
    squares += factor * factor;
    modes.push(next);
    displacement.push(u);
    flux.push(p);
    factors.push(factor);
    idle.push(idleIn(next, factor));
    next = series.next();
  }
  const nextOmega = next === null ? Number.POSITIVE_INFINITY : next.frequency.lower;
  const nextLambda = nextOmega * nextOmega;
  return {
    modes,
    displacement,
    flux,
    factor: Float64Array.from(factors),
    idle,
    tails,
    nextOmega,
    inputTail: next === null ? 0 : complianceTail(tails, squares, nextLambda),
  };
}

import { fault } from '../faults/fault.ts';
import type { WaveMember } from '../members/wave-member.ts';
import { ModeSeries, type Mode } from '../modes/mode-series.ts';
import { massProduct } from '../modes/mass-product.ts';
import type { AppliedLoad } from '../motion/applied-loads.ts';
import type { InitialState } from '../motion/initial-state.ts';
import { ModalProjection, type ModalStart } from '../motion/modal-projection.ts';
import type { Verdict } from '../spec/types.ts';
import { EnergyTail } from './energy-tail.ts';
import { NO_LOADS, type LoadTailFactors } from './load-tail-factors.ts';
import { LoadTails } from './load-tails.ts';
import { controlStations, memberTail, type MemberTail } from './member-tail.ts';
import type { TailEnergies } from './quantity-bounds.ts';
import { Rounding } from './rounding.ts';
import { TailFlexibility } from './tail-flexibility.ts';

/** A mode with its initial state. */
export interface KeptMode {
  readonly mode: Mode;
  readonly start: ModalStart;
  /** F_n of each load per unit drive, shape [loads]. */
  readonly factors: readonly number[];
  /** Largest ω|(q, q′/ω)| that the loads can give it, √J. */
  readonly forced: number;
}

/** The rigid-body part of the motion: |a₀|φ₀ and |v₀|φ₀, m and m/s. */
export interface RigidPart {
  readonly position: number;
  readonly velocity: number;
}

/** What is known of the tail after N modes, over the whole member. */
export interface TailState {
  readonly kept: number;
  readonly energies: TailEnergies;
  readonly member: MemberTail;
  readonly rounding: Rounding;
  readonly loads: LoadTailFactors;
  /** Rigid-body part of the motion; 0 where there is none. */
  readonly rigid: RigidPart;
  /** The whole elastic motion taken as a tail: its energies and the suprema of G and H. */
  readonly whole: {
    readonly energies: TailEnergies;
    readonly member: MemberTail;
    readonly loads: LoadTailFactors;
    /** Whether there is no elastic energy, or nothing but rounding beside a rigid-body motion. */
    readonly silent: boolean;
  };
}

/** Decides whether the modes kept so far are enough: the error over its tolerance; ≤ 1 is enough. */
export type Shortfall = (tail: TailState) => { readonly ratio: number; readonly roundingRatio: number };

/** The modes of an answer with everything its certificate needs. */
export interface KeptSeries {
  readonly modes: readonly KeptMode[];
  readonly tail: TailState;
  readonly energy: EnergyTail;
  readonly rounding: Rounding;
  readonly verdict: Verdict;
  /** Estimate of the modes needed, where the limit of modes stopped the series short. */
  readonly modesNeeded: number | null;
  /** Largest mass product between neighbours. */
  readonly coupling: number;
}

/** Neighbours farther apart than this (relative) have no measurable coupling. */
const NEAR = 1e-2;

/** Tail of a member that has no further mode. */
const NOTHING: TailEnergies = { energy: 0, first: 0, second: 0, nextOmega: Number.MAX_VALUE };

/**
 * Takes modes until the certificate meets its tolerance, exactly `count` of them, or all there are.
 *
 * With a tolerance N is the smallest number whose certified bound meets it; the frequency N + 1 is
 * always solved too, because the bounds use it. Verdicts: `complete`, `converged`, `mode-limit`,
 * `rounding-limit` (more modes would not help).
 *
 * Faults: `too-many-values`, `energy-inconsistent`. Cost: O(segments + pieces) a mode.
 *
 * @param adaptive stop at the first N that meets the tolerance; else use `limit` modes
 * @param span latest sampled time, s
 */
export function keepModes(
  member: WaveMember,
  state: InitialState,
  limit: number,
  adaptive: boolean,
  span: number,
  shortfall: Shortfall,
  heldNumbers: number,
  loads: readonly AppliedLoad[] = [],
  gaugeTime = 0,
): KeptSeries {
  const series = new ModeSeries(member);
  const projection = new ModalProjection(member, state.displacement, state.velocity);
  const energy = new EnergyTail(state.energies, state.roundings);
  const flexibility = new TailFlexibility(member, controlStations(member));
  const rounding = new Rounding(span, series.frequencies.travelTime, member.segmentCount);
  const loadTails = new LoadTails(member, loads);
  const modes: KeptMode[] = [];
  const history: number[] = [];
  const mostHeld = Math.floor(heldNumbers / (4 * member.segmentCount));
  let coupling = 0;
  let whole: TailState['whole'] | null = null;
  let rigid: RigidPart = { position: 0, velocity: 0 };

  const tooMany = (count: number): never => {
    throw fault('too-many-values', '/series', {
      count: 4 * member.segmentCount * count,
      what: `${count} modes of ${member.segmentCount} segments`,
      limit: heldNumbers,
    });
  };
  if (!adaptive && Math.min(limit, series.frequencies.total) > mostHeld) tooMany(limit);

  /** The elastic motion before any elastic mode is taken out, ω its lowest frequency. */
  const wholeMotion = (omega: number, kept: number): TailState['whole'] => {
    const [total, first, second] = state.energies;
    const atMost = (value: number | null, rounding: number): number =>
      value === null ? Number.POSITIVE_INFINITY : value + rounding + 64 * Number.EPSILON * value;
    return {
      energies: {
        energy: atMost(total, state.roundings[0]),
        first: atMost(first, state.roundings[1]),
        second: atMost(second, state.roundings[2]),
        nextOmega: omega,
      },
      member: memberTail(member, flexibility, omega * omega),
      loads: loadTails.factors(omega, kept, gaugeTime, span),
      silent: loads.length === 0 && (total === 0 || (state.rigidEnergy > 0 && total <= state.roundings[0])),
    };
  };

  let upcoming = series.next();
  for (;;) {
    const mode: Mode = upcoming as Mode;
    const start = projection.project(mode.shape);
    const elastic = mode.frequency.omega > 0;
    if (elastic) whole ??= wholeMotion(mode.frequency.lower, modes.length);
    else rigid = rigidPart(mode, start);
    const previous = modes[modes.length - 1]?.mode;
    const shared = couplingOf(member, mode, previous);
    coupling = Math.max(coupling, shared);
    const factors = loadTails.add(mode);
    const forced = loads.length > 0 ? loadTails.amplitudes(mode, factors, span) : 0;
    modes.push({ mode, start, factors, forced });
    rounding.add(mode, start, forced);
    if (elastic) energy.add(start.energy, mode.shape.lambda, rounding.slack, shared);
    flexibility.add(mode);
    upcoming = series.next();

    const kept = modes.length;
    if (upcoming === null) {
      const tail: TailState = {
        kept,
        energies: NOTHING,
        member: { flexibility: 0, fluxInertia: 0 },
        rounding,
        loads: NO_LOADS,
        rigid,
        whole: whole ?? {
          energies: NOTHING,
          member: { flexibility: 0, fluxInertia: 0 },
          loads: NO_LOADS,
          silent: true,
        },
      };
      requireConsistent(energy, flexibility, Number.POSITIVE_INFINITY);
      return { modes, tail, energy, rounding, verdict: 'complete', modesNeeded: null, coupling };
    }
    const last = kept >= limit;
    if (!adaptive && !last) continue;

    const nextOmega: number = upcoming.frequency.lower;
    whole ??= wholeMotion(nextOmega, kept);
    const nextLambda = nextOmega * nextOmega;
    const tail: TailState = {
      kept,
      energies: {
        energy: energy.energy(nextLambda),
        first: energy.first(nextLambda),
        // a rigid-body motion alone is as smooth as any: what its elastic modes show is rounding
        second: whole.silent && Number.isFinite(energy.second()) ? 0 : energy.second(),
        nextOmega,
      },
      member: memberTail(member, flexibility, nextLambda),
      rounding,
      loads: loadTails.factors(nextOmega, kept, gaugeTime, span),
      rigid,
      whole,
    };
    // the rigid-body mode must be among the kept; every series keeps at least one mode
    const { ratio, roundingRatio } = shortfall(tail);
    history.push(ratio);
    // rounding of the initial energy counts only where that energy makes most of the bound
    const atFloor = energy.atFloor && Math.sqrt(2 * tail.energies.energy) >= tail.loads.displacement;
    const verdict = decide(ratio, roundingRatio, last, atFloor);
    if (verdict !== null) {
      requireConsistent(energy, flexibility, nextLambda);
      const modesNeeded = verdict === 'mode-limit' ? estimateNeeded(history, kept, ratio, adaptive) : null;
      return { modes, tail, energy, rounding, verdict, modesNeeded, coupling };
    }
    if (kept >= mostHeld) tooMany(limit);
  }
}

function decide(ratio: number, roundingRatio: number, last: boolean, atFloor: boolean): Verdict | null {
  if (ratio <= 1) return 'converged';
  if (roundingRatio > 1) return 'rounding-limit';
  if (last) return atFloor ? 'rounding-limit' : 'mode-limit';
  return null;
}

function couplingOf(member: WaveMember, mode: Mode, previous: Mode | undefined): number {
  if (!previous || previous.shape.lambda === 0) return 0;
  if (mode.frequency.omega - previous.frequency.omega > NEAR * mode.frequency.omega) return 0;
  return Math.abs(massProduct(member, mode.shape, previous.shape));
}

/**
 * Number of modes at which the bound would meet its tolerance, from its fall over the last half of
 * the modes taken as a power of N; with a fixed number of modes the bound is taken to fall as 1/N.
 */
function estimateNeeded(
  history: readonly number[],
  kept: number,
  ratio: number,
  adaptive: boolean,
): number | null {
  let power = 1;
  if (adaptive && history.length >= 4) {
    const half = history[Math.floor(history.length / 2) - 1];
    power = Math.log(half / ratio) / Math.log(history.length / Math.floor(history.length / 2));
  }
  if (!(power > 0.05)) return null;
  const needed = kept * ratio ** (1 / power);
  return needed < 1e9 ? Math.ceil(needed) : null;
}

/**
 * Energies and flexibilities must add up: more captured than there is, less than the smoothness of the
 * data allows, or a flexibility overdrawn means a wrong shape, and is never clamped silently.
 */
function requireConsistent(energy: EnergyTail, flexibility: TailFlexibility, nextLambda: number): void {
  const overdrawn = flexibility.overdrawn();
  if (energy.excess <= 0 && !(energy.missing(nextLambda) > 0) && !overdrawn) return;
  throw fault('energy-inconsistent', '', {
    captured: energy.captured,
    total: energy.total[0],
  });
}

function rigidPart(mode: Mode, start: ModalStart): RigidPart {
  const height = mode.shape.ends[0];
  return { position: Math.abs(start.position) * height, velocity: Math.abs(start.velocity) * height };
}

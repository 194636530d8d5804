import type { WaveMember } from '../members/wave-member.ts';
import { peakDisplacement, peakFlux, peakSlope } from '../modes/shape-figures.ts';
import type { Stations } from '../modes/stations.ts';
import { dampingRate } from '../motion/modal-damping.ts';
import type { Quantity } from '../spec/types.ts';
import type { KeptMode } from './kept-modes.ts';
import type { ModeReach } from './loaded-reach.ts';

/** The grid that a displacement was sampled on. */
export interface SampledGrid {
  /** Longest time between neighbouring samples, s. */
  readonly step: number;
  /** Longest stretch between neighbouring stations, and from an end to the first, m. */
  readonly spacing: number;
  readonly edge: number;
  /** Whether a node lies between two stations, where shapes have kinks. */
  readonly kinked: boolean;
}

/** Measures the grid; times and positions ascending. Cost O(times + stations · segments). */
export function measureGrid(member: WaveMember, { position }: Stations, times: Float64Array): SampledGrid {
  let step = 0;
  for (let j = 1; j < times.length; j++) step = Math.max(step, times[j] - times[j - 1]);
  let spacing = 0;
  for (let q = 1; q < position.length; q++) spacing = Math.max(spacing, position[q] - position[q - 1]);
  const last = position[position.length - 1];
  const edge = Math.max(position[0], member.position[member.segmentCount] - last);
  const sampled = new Set(position);
  const kinked = member.position.some((x) => x > position[0] && x < last && !sampled.has(x));
  return { step, spacing, edge, kinked };
}

/**
 * What the kept modes' displacement Σφ_n q_n can rise between the samples of a grid, m. A function of x
 * and t lies above its bilinear interpolation by no more than, mode by mode,
 *
 *   max|φ| min(2 sup|q|, sup|q′| h/2, sup|q″| h²/8) + sup|q| min(2 max|φ|, max|φ′| d/2, max|φ″| d²/8),
 *
 * h and d the steps of the grid, sup|q″| = ω² √(1 + (c/ω)²) times the reach; where q′ or φ′ jumps, the first
 * orders alone. Beyond the outermost stations max|φ′| times the distance. Cost: O(segments) a mode.
 *
 * @param heightAt |φ_n| at the one place that counts, then nothing rises in space; by default max|φ_n|
 */
export function riseBetween(
  member: WaveMember,
  modes: readonly KeptMode[],
  reaches: readonly ModeReach[],
  { step, spacing, edge, kinked }: SampledGrid,
  heightAt: ((n: number) => number) | null = null,
): number {
  return modes.reduce((sum, { mode }, n) => {
    const { omega, position, velocity, push, kicked } = reaches[n];
    const height = heightAt?.(n) ?? peakDisplacement(member, mode.shape);
    const elastic = omega > 0;
    const farthest = elastic ? position + push / (omega * omega) : position;
    const damped = elastic ? dampingRate(member.damping, mode.frequency.order, omega) / omega : 0;
    const acceleration = elastic
      ? omega * velocity * Math.hypot(1, damped)
      : push + velocity * member.damping.massCoefficient;
    const inTime = Math.min(
      2 * farthest,
      0.5 * velocity * step,
      kicked > 0 ? Infinity : 0.125 * acceleration * step * step,
    );
    if (heightAt !== null) return sum + height * inTime;
    const slope = peakSlope(member, mode.shape);
    const bend = kinked
      ? Infinity
      : 0.125 * curvature(member, mode.shape.lambda) * height * spacing * spacing;
    const inSpace = Math.max(Math.min(2 * height, 0.5 * slope * spacing, bend), slope * edge);
    return sum + height * inTime + farthest * inSpace;
  }, 0);
}

/**
 * The same of velocity, force and stress in free motion, m/s, N or Pa without the stress factor: of a
 * coordinate c with its rates, and for the flux p′ = −(ω²ρ − s) φ, p″ = −(ω²ρ − s) p/k.
 *
 * A gauge average moves by no more than the coordinate, and by (2/τ) sup|c|; before τ/2 it stands still.
 * Infinite where no such limit exists: for accelerations, and for the flux over the member where it jumps at
 * a lump, of which only one side is sampled.
 *
 * @param heightAt |φ_n|, or |p_n| for the flux, at the one place that counts; null for the whole member
 */
export function freeRiseBetween(
  quantity: Quantity,
  member: WaveMember,
  modes: readonly KeptMode[],
  reaches: readonly ModeReach[],
  { step, spacing, edge, kinked }: SampledGrid,
  gaugeTime: number,
  heightAt: ((n: number) => number) | null,
): number {
  if (quantity === 'acceleration') return Number.POSITIVE_INFINITY;
  const flux = quantity !== 'velocity';
  if (flux && heightAt === null && (jumpsInside(member) || changesSection(quantity, member))) {
    return Number.POSITIVE_INFINITY;
  }
  const bedded = flux ? largestPull(member) : null;
  return modes.reduce((sum, { mode }, n) => {
    const { omega } = mode.frequency;
    if (omega === 0) {
      // the drift v e^{−αt}, the same everywhere
      const slowing = flux ? 0 : member.damping.massCoefficient;
      return sum + Math.abs(mode.shape.ends[0]) * reaches[n].velocity * Math.min(2, 0.5 * slowing * step);
    }
    const { lambda } = mode.shape;
    const swing = swingOf(flux, member, mode.frequency.order, reaches[n], gaugeTime);
    const inTime = Math.min(2 * swing.most, 0.5 * swing.rate * step, 0.125 * swing.second * step * step);
    if (heightAt !== null) return sum + heightAt(n) * inTime;
    const height = flux ? peakFlux(member, mode.shape) : peakDisplacement(member, mode.shape);
    const slope = flux
      ? (bedded as (lambda: number) => number)(lambda) * peakDisplacement(member, mode.shape)
      : peakSlope(member, mode.shape);
    const bend = kinked ? Infinity : 0.125 * curvature(member, lambda) * height * spacing * spacing;
    const inSpace = Math.max(Math.min(2 * height, 0.5 * slope * spacing, bend), slope * edge);
    return sum + height * inTime + swing.most * inSpace;
  }, 0);
}

/** sup|c|, sup|c′| and sup|c″| of q′, or of q + βq′ for the flux, or of its gauge average. */
function swingOf(
  flux: boolean,
  member: WaveMember,
  order: number,
  { omega, position, velocity }: ModeReach,
  gaugeTime: number,
): { readonly most: number; readonly rate: number; readonly second: number } {
  const beta = member.damping.stiffnessCoefficient;
  const damped = dampingRate(member.damping, order, omega) / omega;
  const drag = Math.hypot(1, damped);
  // |q″| and |q‴| from q″ = −ω²q − cq′
  const acceleration = omega * velocity * drag;
  const jerk = omega * omega * velocity * (1 + damped * drag);
  const most = flux ? position * Math.hypot(1, beta * omega) : velocity;
  const rate = flux ? velocity + beta * acceleration : acceleration;
  const second = flux ? acceleration + beta * jerk : jerk;
  if (gaugeTime === 0) return { most, rate, second };
  const gauge = 2 / gaugeTime;
  return { most, rate: Math.min(rate, gauge * most), second: Math.min(second, gauge * rate) };
}

/** Whether the flux jumps at a lump inside the member. */
function jumpsInside({ mass, spring, segmentCount }: WaveMember): boolean {
  for (let j = 1; j < segmentCount; j++) if (mass[j] > 0 || spring[j] > 0) return true;
  return false;
}

function changesSection(quantity: Quantity, { stressFactor }: WaveMember): boolean {
  return quantity === 'stress' && stressFactor.some((factor) => factor !== stressFactor[0]);
}

/** Largest |ω²ρ − s| of the segments as a function of ω², N/m². */
function largestPull({ inertia, foundation }: WaveMember): (lambda: number) => number {
  return (lambda) =>
    inertia.reduce((most, rho, i) => Math.max(most, Math.abs(lambda * rho - foundation[i])), 0);
}

/** Largest |ω²ρ − s|/k of the segments, 1/m². */
function curvature(member: WaveMember, lambda: number): number {
  let largest = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    const square = (lambda * member.inertia[i] - member.foundation[i]) / member.stiffness[i];
    largest = Math.max(largest, Math.abs(square));
  }
  return largest;
}

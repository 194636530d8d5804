import type { WaveMember } from '../members/wave-member.ts';
import { peakDisplacement, peakSlope } from '../modes/shape-figures.ts';
import type { Stations } from '../modes/stations.ts';
import { dampingRate } from '../motion/modal-damping.ts';
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
 */
export function riseBetween(
  member: WaveMember,
  modes: readonly KeptMode[],
  reaches: readonly ModeReach[],
  { step, spacing, edge, kinked }: SampledGrid,
): number {
  return modes.reduce((sum, { mode }, n) => {
    const { omega, position, velocity, push, kicked } = reaches[n];
    const height = peakDisplacement(member, mode.shape);
    const slope = peakSlope(member, mode.shape);
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
    const bend = kinked
      ? Infinity
      : 0.125 * curvature(member, mode.shape.lambda) * height * spacing * spacing;
    const inSpace = Math.max(Math.min(2 * height, 0.5 * slope * spacing, bend), slope * edge);
    return sum + height * inTime + farthest * inSpace;
  }, 0);
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

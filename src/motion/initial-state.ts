import type { WaveMember } from '../members/wave-member.ts';
import { masslessStretches } from '../modes/massless-stretches.ts';
import { StaticResponse } from '../modes/static-response.ts';
import type { InitialMotion } from '../spec/types.ts';
import { canDriftFreely, totalMass } from '../spectrum/spectrum-size.ts';
import {
  massForm,
  massRounding,
  piecesStrainForm,
  strainForm,
  strainFormRounding,
  strainRounding,
} from './field-energy.ts';
import {
  readDisplacement,
  settle,
  type InitialDisplacement,
  type StartedSupport,
} from './initial-displacement.ts';
import { readVelocity, type InitialVelocity } from './initial-velocity.ts';
import { listOf } from './shape-pieces.ts';
import { acceleration, inEnergySpace, type AccelerationField } from './smoothness.ts';
import { pieceIntegral } from './wave-integrals.ts';

/** The initial state of a member with the energies that its data allow. */
export interface InitialState {
  /** What the member keeps for t > 0. */
  readonly displacement: InitialDisplacement;
  readonly velocity: InitialVelocity;
  /**
   * E⁰ = ½a(f,f) + ½m(g,g), J; E¹ the same of (g, u_tt), J/s², where f lies in the domain of the wave
   * operator and g has finite strain energy; E² once more, J/s⁴; null where the data are not that smooth.
   * Without the rigid-body motion, which an unrestrained member has besides.
   */
  readonly energies: readonly [number, number | null, number | null];
  /** Bounds on the rounding of the energies. */
  readonly roundings: readonly [number, number, number];
  /** Kinetic energy of the rigid-body motion, J. */
  readonly rigidEnergy: number;
  /** Strain energy of the given shape that massless stretches cannot keep, J. */
  readonly lostEnergy: number;
  /** Whether the motion starts from rest. */
  readonly released: boolean;
}

/** Reads and measures an initial motion. Faults: those of its two readers. Cost O(pieces). */
export function readInitialState(
  member: WaveMember,
  initial: InitialMotion,
  supports: readonly StartedSupport[] = [],
): InitialState {
  const response = canDriftFreely(member) ? null : new StaticResponse(member);
  const stretches = masslessStretches(member);
  const given = readDisplacement(member, initial.displacement, response, supports);
  const velocity = readVelocity(member, initial, response);
  const displacement = settle(member, given, stretches);

  const strain = 0.5 * strainForm(member, displacement, response);
  const mean = response === null ? meanVelocity(member, velocity) : 0;
  const own = mean === 0 ? velocity : relativeTo(member, velocity, mean);
  const kinetic = 0.5 * massForm(member, own.pieces, own.masses);
  const rigidEnergy = 0.5 * totalMass(member) * mean * mean;
  const roundings: [number, number, number] = [
    strainFormRounding(member, displacement, response) + massRounding(member, own.pieces),
    0,
    0,
  ];
  const lost = stretches.length > 0 ? 0.5 * strainForm(member, given, response) - strain : 0;

  // one level up, u_t takes the place of u and u_tt that of u_t
  const speed = inEnergySpace(member, velocity, stretches);
  const start = acceleration(member, displacement.pieces, displacement.pulls);
  let first: number | null = null;
  let second: number | null = null;
  if (speed !== null && start !== null) {
    first = 0.5 * piecesStrainForm(member, speed) + 0.5 * massForm(member, start.pieces, start.masses);
    roundings[1] =
      strainRounding(member, speed) + massRounding(member, start.pieces) + nodeRounding(member, start);
    const startSettled = inEnergySpace(member, start, stretches);
    const jerk = acceleration(member, speed, []);
    if (startSettled !== null && jerk !== null) {
      second =
        0.5 * piecesStrainForm(member, startSettled) + 0.5 * massForm(member, jerk.pieces, jerk.masses);
      const strained = nodeStrain(member, start.errors);
      roundings[2] =
        strainRounding(member, startSettled) +
        massRounding(member, jerk.pieces) +
        nodeRounding(member, jerk) +
        2 * Math.sqrt(second * strained) +
        strained;
    }
  }
  const still = velocity.masses.every((value) => value === 0) && kinetic === 0 && mean === 0;
  return {
    displacement,
    velocity,
    energies: [strain + kinetic, first, second],
    roundings,
    rigidEnergy,
    lostEnergy: Math.max(0, lost),
    released: still && listOf(initial.impulses).length === 0,
  };
}

/** Rounding of the kinetic energy of the node values of an acceleration. */
function nodeRounding(member: WaveMember, { masses, errors }: AccelerationField): number {
  let rounding = 0;
  for (let j = 0; j <= member.segmentCount; j++) {
    rounding += member.mass[j] * errors[j] * (Math.abs(masses[j]) + errors[j]);
  }
  return rounding;
}

/** Strain energy at most of node values off by their errors. */
function nodeStrain(member: WaveMember, errors: Float64Array): number {
  let energy = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    const hold = member.stiffness[i] / member.length[i] + member.foundation[i] * member.length[i];
    energy += 0.5 * hold * (errors[i] + errors[i + 1]) ** 2;
  }
  for (let j = 0; j <= member.segmentCount; j++) energy += 0.5 * member.spring[j] * errors[j] ** 2;
  return energy;
}

/** m(1, g)/m, the velocity of the whole. */
function meanVelocity(member: WaveMember, velocity: InitialVelocity): number {
  let momentum = 0;
  for (const piece of velocity.pieces) {
    const rho = member.inertia[piece.segment];
    if (rho > 0) momentum += rho * pieceIntegral(piece);
  }
  for (let j = 0; j <= member.segmentCount; j++) momentum += member.mass[j] * velocity.masses[j];
  return momentum / totalMass(member);
}

/** The velocity seen from the moving whole. */
function relativeTo(member: WaveMember, velocity: InitialVelocity, mean: number): InitialVelocity {
  return {
    pieces: velocity.pieces.map((piece) => ({
      ...piece,
      powers: [(piece.powers[0] ?? 0) - mean, ...piece.powers.slice(1)],
      magnitude: piece.magnitude + Math.abs(mean),
    })),
    masses: velocity.masses.map((value, j) => (member.mass[j] > 0 ? value - mean : 0)),
  };
}

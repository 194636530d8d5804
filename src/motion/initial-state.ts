import type { WaveMember } from '../members/wave-member.ts';
import { masslessStretches } from '../modes/massless-stretches.ts';
import { StaticResponse } from '../modes/static-response.ts';
import type { InitialMotion } from '../spec/types.ts';
import { canDriftFreely } from '../spectrum/spectrum-size.ts';
import { massForm, piecesStrainForm, strainForm } from './field-energy.ts';
import {
  readDisplacement,
  settle,
  type InitialDisplacement,
  type StartedSupport,
} from './initial-displacement.ts';
import { readVelocity, type InitialVelocity } from './initial-velocity.ts';
import { listOf } from './shape-pieces.ts';
import { acceleration, inEnergySpace } from './smoothness.ts';

/** The initial state of a member with the energies that its data allow. */
export interface InitialState {
  /** What the member keeps for t > 0. */
  readonly displacement: InitialDisplacement;
  readonly velocity: InitialVelocity;
  /**
   * E⁰ = ½a(f,f) + ½m(g,g), J; E¹ the same of (g, u_tt), J/s², where f lies in the domain of the wave
   * operator and g has finite strain energy; E² once more, J/s⁴; null where the data are not that smooth.
   */
  readonly energies: readonly [number, number | null, number | null];
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
  const kinetic = 0.5 * massForm(member, velocity.pieces, velocity.masses);
  const lost = stretches.length > 0 ? 0.5 * strainForm(member, given, response) - strain : 0;

  // one level up, u_t takes the place of u and u_tt that of u_t
  const speed = inEnergySpace(member, velocity, stretches);
  const start = acceleration(member, displacement.pieces, displacement.pulls);
  let first: number | null = null;
  let second: number | null = null;
  if (speed !== null && start !== null) {
    first = 0.5 * piecesStrainForm(member, speed) + 0.5 * massForm(member, start.pieces, start.masses);
    const startSettled = inEnergySpace(member, start, stretches);
    const jerk = acceleration(member, speed, []);
    if (startSettled !== null && jerk !== null) {
      second =
        0.5 * piecesStrainForm(member, startSettled) + 0.5 * massForm(member, jerk.pieces, jerk.masses);
    }
  }
  const still = velocity.masses.every((value) => value === 0) && kinetic === 0;
  return {
    displacement,
    velocity,
    energies: [strain + kinetic, first, second],
    lostEnergy: Math.max(0, lost),
    released: still && listOf(initial.impulses).length === 0,
  };
}

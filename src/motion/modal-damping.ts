import type { ModalDamping } from '../members/wave-member.ts';

/**
 * Damping rate c_n of q″ + c_n q′ + ω² q = 0, 1/s: c_n = α + 2 ζ_n ω_n + β ω_n².
 *
 * @param order mode number from 1; the last given ratio serves all higher modes
 * @param omega ω_n, rad/s
 */
export function dampingRate(damping: ModalDamping, order: number, omega: number): number {
  return (
    damping.massCoefficient +
    2 * ratioOf(damping, order) * omega +
    damping.stiffnessCoefficient * omega * omega
  );
}

/** ζ_n of the given ratios; the last one serves all higher modes; 0 where none is given. */
export function ratioOf(damping: ModalDamping, order: number): number {
  const { ratios } = damping;
  return ratios.length === 0 ? 0 : ratios[Math.min(order, ratios.length) - 1];
}

/** Largest ζ among the modes above `order`. */
export function largestRatioAbove(damping: ModalDamping, order: number): number {
  const { ratios } = damping;
  if (ratios.length === 0) return 0;
  let largest = ratios[ratios.length - 1];
  for (let n = order; n < ratios.length; n++) largest = Math.max(largest, ratios[n]);
  return largest;
}

/** Smallest ζ among the modes above `order`. */
export function smallestRatioAbove(damping: ModalDamping, order: number): number {
  const { ratios } = damping;
  if (ratios.length === 0) return 0;
  let smallest = ratios[ratios.length - 1];
  for (let n = order; n < ratios.length; n++) smallest = Math.min(smallest, ratios[n]);
  return smallest;
}

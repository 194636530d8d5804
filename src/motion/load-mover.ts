import type { Mode } from '../modes/mode-series.ts';

/** ω and damping rate of q″ + c q′ + ω² q = p. */
export interface ModalCoordinate {
  readonly omega: number;
  readonly rate: number;
}

/** Adds a mode's motion from rest under one load to tables of q and q′. */
export interface LoadMover {
  /** Names the modes added next, so that a long record is run through once for them together. */
  expect?(modes: readonly ModalCoordinate[]): void;
  add(mode: Mode, rate: number, factor: number, q: Float64Array, v: Float64Array): void;
}

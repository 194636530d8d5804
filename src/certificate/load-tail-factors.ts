/** Coefficients of what loads leave out, to be multiplied by √ΔG(x) or √ΔH(x). */
export interface LoadTailFactors {
  /** Displacement at the instant: times √ΔG. */
  readonly displacement: number;
  /** Quasi-static displacement of the modes left out: times √ΔG. */
  readonly still: number;
  /** Velocity at the instant: times √ΔG; infinite where no such bound exists. */
  readonly velocity: number;
  /** Flux at the instant: times √ΔH; infinite where no such bound exists. */
  readonly flux: number;
  /** Flux averaged over τ, less its static part: times √ΔH; already divided by τ. */
  readonly gaugeFlux: number;
  /** Acceleration averaged over τ: times √ΔG; infinite where none. */
  readonly gaugeAcceleration: number;
  /** r.m.s. of displacement and velocity times √m, and of flux times √∫dx/k. */
  readonly rmsDisplacement: number;
  readonly rmsVelocity: number;
  readonly rmsFlux: number;
}

/** No loads, or no mode left out. */
export const NO_LOADS: LoadTailFactors = {
  displacement: 0,
  still: 0,
  velocity: 0,
  flux: 0,
  gaugeFlux: 0,
  gaugeAcceleration: 0,
  rmsVelocity: 0,
  rmsFlux: 0,
  rmsDisplacement: 0,
};

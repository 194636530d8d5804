/**
 * Canonical requests, answers and problems: SI numbers, defaults filled in.
 * Generated from schemas/ by "npm run types": do not edit.
 */

/** Numbers of an answer. */
export type Numbers = readonly number[] | Float64Array;

/**
 * A uniform stretch of a bar, in one of two forms: axialStiffness + massPerLength (+ area), or youngsModulus + area + density.
 */
export type BarSegment = BarStiffnessSegment | BarMaterialSegment;
/**
 * Damping of the whole member. Absent: undamped.
 */
export type Damping = RatioDamping | RatiosDamping | RayleighDamping | LossFactorDamping;
/**
 * What one end of a cable, bar, shear column or wave member does.
 */
export type End = FixedEnd | FreeEnd | AttachedEnd;
/**
 * A one-dimensional member of length L, x measured from its near end (0) to its far end (L).
 */
export type Member = Cable | Bar | Shaft | ShearColumn | Wave;
/**
 * Which modes are wanted: a number of them, or all up to a frequency.
 */
export type ModesSeries = ModesByCount | ModesByFrequency;
/**
 * Which ends move together by one unit: near, far or both; uniform: the whole member, where no end is fixed.
 */
export type MovingEnds = 'near' | 'far' | 'both' | 'uniform';
/**
 * Where: a number of equally spaced positions, both ends included, or a list of positions.
 */
export type Positions = PositionGrid | number[];
/**
 * The static shape under a force at one point, given by `amplitude` (the displacement there) or by `force`.
 */
export type PullShape = PullByAmplitude | PullByForce;
/**
 * A field that can be sampled: displacement (m; rad for a shaft), velocity (m/s; rad/s), acceleration (m/s²; rad/s²), force (N; N·m) or stress (Pa, where the section is known).
 */
export type Quantity = 'displacement' | 'velocity' | 'acceleration' | 'force' | 'stress';
/**
 * How many modes are used: a fixed number, or the smallest number that meets a tolerance.
 */
export type ResponsesSeries = ModesByCount | SeriesByRelativeTolerance | SeriesByTolerances;
/**
 * What one end of a shaft does.
 */
export type ShaftEnd = FixedEnd | FreeEnd | ShaftAttachedEnd;
/**
 * A uniform stretch of a shaft, in one of two forms: torsionalStiffness + inertiaPerLength, or shearModulus + density + outerDiameter (+ innerDiameter).
 */
export type ShaftSegment = ShaftStiffnessSegment | ShaftMaterialSegment;
/**
 * A function of position, zero outside its stretch.
 */
export type Shape = PullShape | HalfSineShape | PolylineShape | PolynomialShape | UniformShape;
/**
 * A quantity of a mode shape: displacement, or force (stiffness × slope).
 */
export type ShapeQuantity = 'displacement' | 'force';
/**
 * One shape, or several that add up (at most 100).
 */
export type Shapes = Shape | Shape[];
/**
 * A uniform stretch of a shear column or soil layer, in one of three forms: shearStiffness + massPerLength, shearModulus + density (+ area), or shearWaveSpeed + density (+ area).
 */
export type ShearColumnSegment = ShearStiffnessSegment | ShearModulusSegment | ShearWaveSpeedSegment;
/**
 * When: equally spaced times, or a list of times.
 */
export type Times = TimeGrid | number[];
/**
 * converged: the bound meets the tolerance; mode-limit: it does not with the modes allowed; irregular-data: no pointwise bound exists for these data; rounding-limit: rounding hides the rest; complete: the member has no more modes.
 */
export type Verdict = 'converged' | 'mode-limit' | 'irregular-data' | 'rounding-limit' | 'complete';

/**
 * An end that carries any of a mass, a spring and a dashpot together.
 */
export interface AttachedEnd {
  /**
   * Something is attached to the end.
   */
  type: 'attached';
  /**
   * Lumped mass, kg. Default 0.
   */
  mass: number;
  /**
   * Spring to ground, N/m. Default 0.
   */
  spring: number;
  /**
   * Viscous dashpot to ground, N·s/m. Default 0. A value above 0 is refused (422) until damped modes are solved.
   */
  dashpot: number;
}
/**
 * A mass, a spring to ground and a dashpot to ground, any of them, joined rigidly to the member at one place.
 */
export interface Attachment {
  /**
   * Position of the attachment from the near end, m, inside the member (not at an end: use `ends`). Within 64 rounding units of the member length of a segment boundary it stands on that boundary.
   */
  at: number;
  /**
   * Lumped mass, kg. Default 0.
   */
  mass: number;
  /**
   * Spring to ground, N/m. Default 0.
   */
  spring: number;
  /**
   * Viscous dashpot to ground, N·s/m. Default 0. A value above 0 is refused (422) until damped modes are solved.
   */
  dashpot: number;
  /**
   * A name of your own for this part; it changes no result.
   */
  name?: string;
}
/**
 * A bar in tension and compression: u is the axial displacement (m), the force is the axial force (N, tension positive).
 */
export interface Bar {
  /**
   * The kind of member.
   */
  kind: 'bar';
  /**
   * Uniform stretches from the near end to the far end; 1 to 1,000.
   */
  segments: BarSegment[];
  ends: Ends;
  /**
   * What is joined to the member between its ends; up to 1,000, in any order; several at one position add up. Default: none.
   */
  attachments: Attachment[];
  damping?: Damping;
}
/**
 * A uniform stretch of a bar, described by its material and section.
 */
export interface BarMaterialSegment {
  /**
   * Length of the segment, m.
   */
  length: number;
  /**
   * Young's modulus E, Pa.
   */
  youngsModulus: number;
  /**
   * Cross-section area A, m².
   */
  area: number;
  /**
   * Mass density of the material, kg/m³. May be 0 as long as something else has inertia.
   */
  density: number;
  /**
   * Elastic bedding to ground per length, N/m². Default 0.
   */
  foundation: number;
  /**
   * Viscous resistance to ground per length, N·s/m². Default 0. It is modal damping only where it is the same multiple of the inertia in every segment and no node carries a mass.
   */
  drag: number;
  /**
   * A name of your own for this part; it changes no result.
   */
  name?: string;
}
/**
 * A uniform stretch of a bar, described by its axial stiffness.
 */
export interface BarStiffnessSegment {
  /**
   * Length of the segment, m.
   */
  length: number;
  /**
   * Axial stiffness EA, N.
   */
  axialStiffness: number;
  /**
   * Mass per length, kg/m. May be 0 as long as something else has inertia.
   */
  massPerLength: number;
  /**
   * Cross-section area, m², needed only for stress.
   */
  area?: number;
  /**
   * Elastic bedding to ground per length, N/m². Default 0.
   */
  foundation: number;
  /**
   * Viscous resistance to ground per length, N·s/m². Default 0. It is modal damping only where it is the same multiple of the inertia in every segment and no node carries a mass.
   */
  drag: number;
  /**
   * A name of your own for this part; it changes no result.
   */
  name?: string;
}
/**
 * A taut cable or string: u is the transverse displacement (m), the force is the transverse force tension·u′ (N), not the tension.
 */
export interface Cable {
  /**
   * The kind of member.
   */
  kind: 'cable';
  /**
   * Tension T, N, the same in all segments.
   */
  tension: number;
  /**
   * Uniform stretches from the near end to the far end; 1 to 1,000.
   */
  segments: CableSegment[];
  ends: Ends;
  /**
   * What is joined to the member between its ends; up to 1,000, in any order; several at one position add up. Default: none.
   */
  attachments: Attachment[];
  damping?: Damping;
}
/**
 * A uniform stretch of a cable.
 */
export interface CableSegment {
  /**
   * Length of the segment, m.
   */
  length: number;
  /**
   * Mass per length, kg/m. May be 0 as long as something else has inertia.
   */
  massPerLength: number;
  /**
   * Elastic bedding to ground per length, N/m². Default 0.
   */
  foundation: number;
  /**
   * Viscous resistance to ground per length, N·s/m². Default 0. It is modal damping only where it is the same multiple of the inertia in every segment and no node carries a mass.
   */
  drag: number;
  /**
   * A name of your own for this part; it changes no result.
   */
  name?: string;
}
/**
 * Both ends of the member.
 */
export interface Ends {
  /**
   * The end at x = 0.
   */
  near: End;
  /**
   * The end at x = L.
   */
  far: End;
}
/**
 * Energy of the initial motion.
 */
export interface EnergyAccount {
  /**
   * Exact energy of the initial motion, J.
   */
  total: number;
  /**
   * Energy of the modes used, J.
   */
  captured: number;
  /**
   * Energy left out, rounding included, J.
   */
  tail: number;
  /**
   * captured/total; 1 where total is 0.
   */
  capturedFraction: number;
}
/**
 * Energy of the sampled fields, integrated, against the exact balance.
 */
export interface EnergyBalance {
  /**
   * Largest difference relative to the initial energy.
   */
  maxRelativeDrift: number;
}
/**
 * How the strain energy of one mode is shared; the shares sum to 1.
 */
export interface EnergyShares {
  /**
   * Share of each segment of the request, its foundation included.
   */
  segments: Numbers;
  /**
   * Share of the spring of each attachment of the request.
   */
  attachments: Numbers;
  /**
   * Share of the springs of the near and the far end.
   *
   * @minItems 2
   * @maxItems 2
   */
  ends: [number, number];
}
/**
 * One sampled quantity with the bound of its error.
 */
export interface Field {
  /**
   * SI unit of values and bound.
   */
  unit: string;
  /**
   * Values, one row per time, one column per position.
   */
  values: Numbers[];
  /**
   * Largest possible error per position, at all sampled times; null where no such bound exists.
   */
  bound: Numbers | null;
  /**
   * pointwise: of the value at the instant; gauge-average: values and bound are averages over the gauge time; rms: see rms.
   */
  boundKind: 'pointwise' | 'gauge-average' | 'rms';
  /**
   * Largest possible root-mean-square error over the member, where boundKind is rms.
   */
  rms?: number;
  verdict: Verdict;
}
/**
 * The sampled quantities.
 */
export interface Fields {
  /**
   * Positions from the near end, m.
   */
  positions: Numbers;
  /**
   * Times, s.
   */
  times: Numbers;
  displacement?: Field;
  velocity?: Field;
  acceleration?: Field;
  force?: Field;
  stress?: Field;
}
/**
 * An end that does not move.
 */
export interface FixedEnd {
  /**
   * The end is held: u = 0.
   */
  type: 'fixed';
}
/**
 * An end that nothing holds or loads.
 */
export interface FreeEnd {
  /**
   * The end is free: the force is 0.
   */
  type: 'free';
}
/**
 * amplitude·sin(n π x/L).
 */
export interface HalfSineShape {
  /**
   * Half waves of a sine over the whole member.
   */
  type: 'half-sine';
  /**
   * Amplitude: m (rad for a shaft) in a displacement, m/s (rad/s) in a velocity.
   */
  amplitude: number;
  /**
   * Number n of half waves over the member, 1 to 20,000. Default 1.
   */
  halfWaves: number;
}
/**
 * A blow at time 0: on the mass at its position, or spread evenly over a width of member.
 */
export interface Impulse {
  /**
   * Position from the near end, m; the middle of the width.
   */
  at: number;
  /**
   * Impulse, N·s (N·m·s for a shaft).
   */
  impulse: number;
  /**
   * Width over which the impulse is spread evenly, m, inside the member and on segments with inertia. Absent: the impulse acts on the mass at its position.
   */
  width?: number;
}
/**
 * How the motion starts: displacement and velocity at time 0. What is not given is zero.
 */
export interface InitialMotion {
  /**
   * Initial displacement: a shape, or a list of shapes that add up. It must be continuous and zero at fixed ends.
   */
  displacement?: Shapes;
  /**
   * Initial velocity: a shape, or a list of shapes that add up. Node masses take the value at their place.
   */
  velocity?: Shapes;
  /**
   * Velocities of single masses, at most one per place.
   */
  massVelocities?: MassVelocity[];
  /**
   * Blows at time 0; they add to the velocities.
   */
  impulses?: Impulse[];
}
/**
 * The process answers.
 */
export interface LiveAnswer {
  /**
   * live: the process answers.
   */
  status: 'live';
}
/**
 * Stiffnesses multiplied by (1 + iη). It describes a steady state only: modes and responses refuse it (422).
 */
export interface LossFactorDamping {
  /**
   * Damping by a loss factor.
   */
  type: 'loss-factor';
  /**
   * Loss factor η, dimensionless.
   */
  value: number;
}
/**
 * The initial velocity of the mass at one place; it replaces what the velocity shapes give that mass.
 */
export interface MassVelocity {
  /**
   * Position of the mass from the near end, m; 0 and L are the ends.
   */
  at: number;
  /**
   * Its velocity, m/s (rad/s for a shaft).
   */
  velocity: number;
}
/**
 * The member as it was understood.
 */
export interface MemberSummary {
  /**
   * The kind of member.
   */
  kind: 'cable' | 'bar' | 'shaft' | 'shear-column' | 'wave';
  /**
   * Length L, m.
   */
  length: number;
  /**
   * Time a wave takes from end to end, ∫√(ρ/k) dx, s.
   */
  travelTime: number;
  /**
   * Inertia of segments and moving nodes together, kg (kg·m² for a shaft).
   */
  totalMass: number;
}
/**
 * Motion of one mode of unit modal mass: q(t) = cosine·cos ωt + sine·sin ωt without damping; for a rigid-body mode cosine + sine·t.
 */
export interface ModalCoefficient {
  /**
   * Number of the mode, from 1.
   */
  order: number;
  /**
   * ω, rad/s.
   */
  angularFrequency: number;
  /**
   * a, m·√kg (rad·√(kg·m²) for a shaft).
   */
  cosine: number;
  /**
   * b, m·√kg; of a rigid-body mode its velocity, m·√kg/s.
   */
  sine: number;
  /**
   * Energy of the mode at time 0, J.
   */
  energy: number;
}
/**
 * One natural mode.
 */
export interface Mode {
  /**
   * Number of the mode, from 1 in ascending frequency.
   */
  order: number;
  /**
   * ω, rad/s; 0 for a rigid-body mode.
   */
  angularFrequency: number;
  /**
   * f = ω/2π, Hz.
   */
  frequency: number;
  /**
   * 1/f, s; null for a rigid-body mode.
   */
  period: number | null;
  /**
   * Lower and upper limit of ω, rad/s, both counted and rounded outward.
   *
   * @minItems 2
   * @maxItems 2
   */
  enclosure: [number, number];
  /**
   * ζ of critical; null for a rigid-body mode.
   */
  dampingRatio: number | null;
  /**
   * Mass of the shape as normalised, node masses included.
   */
  modalMass: number;
  /**
   * Number of places between the ends that the mode leaves at rest.
   */
  nodalPoints: number;
  participation?: ModeParticipation;
  /**
   * Strain energy shares, where asked for; null for a rigid-body mode.
   */
  energyShares?: EnergyShares | null;
  shape?: ModeShape;
}
/**
 * Participation of one mode under the motion of the ends that was asked for.
 */
export interface ModeParticipation {
  /**
   * m(r, φ) of the mass-normalised shape, √kg (√(kg·m²) for a shaft).
   */
  factor: number;
  /**
   * factor², kg (kg·m² for a shaft).
   */
  effectiveMass: number;
  /**
   * factor²/m(r, r).
   */
  effectiveMassFraction: number;
  /**
   * Sum of the fractions up to this mode.
   */
  cumulativeFraction: number;
}
/**
 * The shape of one mode at the positions asked for.
 */
export interface ModeShape {
  /**
   * Shape φ, normalised as asked: 1/√kg (1/√(kg·m²) for a shaft) by mass, dimensionless by peak.
   */
  displacement?: Numbers;
  /**
   * Force of the shape, stiffness·φ′, on the near side of a node.
   */
  force?: Numbers;
}
/**
 * Natural modes of a member.
 */
export interface ModesAnswer {
  member: MemberSummary;
  /**
   * Modes in ascending frequency.
   */
  modes: Mode[];
  shapes?: ShapePositions;
  participation?: ParticipationSummary;
  convergence: ModesConvergence;
  /**
   * What the reader of this answer should know, cautions included.
   */
  notices: Notice[];
}
/**
 * The first so many modes.
 */
export interface ModesByCount {
  /**
   * Number of modes, 1 to 20,000.
   */
  modes: number;
}
/**
 * All modes up to a frequency.
 */
export interface ModesByFrequency {
  /**
   * Highest frequency, Hz; at most 20,000 modes may lie below it.
   */
  upTo: number;
}
/**
 * What is certain about the spectrum.
 */
export interface ModesConvergence {
  /**
   * No mode below the last one is missing: they were counted.
   */
  spectrumComplete: true;
  /**
   * Number of modes in this answer.
   */
  modesFound: number;
  /**
   * Number of modes the member has; null for infinitely many.
   */
  modesInTotal: number | null;
}
/**
 * A member and the modes wanted of it.
 */
export interface ModesRequest {
  member: Member;
  series: ModesSeries;
  shapes?: ShapesRequest;
  /**
   * Whether every mode states how its strain energy is shared. Default false.
   */
  energyShares: boolean;
  participation?: ParticipationRequest;
}
/**
 * Something the reader of the answer should know.
 */
export interface Notice {
  /**
   * Stable code.
   */
  code: string;
  /**
   * What there is to know.
   */
  detail: string;
}
/**
 * Asks for participation factors under a motion of the ends.
 */
export interface ParticipationRequest {
  ends: MovingEnds;
}
/**
 * The motion of the ends that the participation refers to.
 */
export interface ParticipationSummary {
  ends: MovingEnds;
  /**
   * m(r, r) of the static shape r under that motion, masses on moving ends left out, kg (kg·m² for a shaft).
   */
  mass: number;
  /**
   * Mass on the moving ends, kg (kg·m² for a shaft).
   */
  endMass: number;
}
/**
 * The sampled value of largest magnitude.
 */
export interface Peak {
  /**
   * The sampled value, sign kept.
   */
  value: number;
  /**
   * Its position, m from the near end.
   */
  at: number;
  /**
   * Its time, s.
   */
  time: number;
  /**
   * Certified upper limit of the magnitude over the member and the sampled time span; null where none exists.
   */
  upper: number | null;
}
/**
 * The peak of every sampled quantity.
 */
export interface Peaks {
  displacement?: Peak;
  velocity?: Peak;
  acceleration?: Peak;
  force?: Peak;
  stress?: Peak;
}
/**
 * Straight lines between given points; zero outside the first and the last.
 */
export interface PolylineShape {
  /**
   * Straight lines between points.
   */
  type: 'polyline';
  /**
   * Positions of the points from the near end, m, strictly ascending, within the member; 2 to 10,000.
   *
   * Items: Position from the near end, m.
   */
  positions: number[];
  /**
   * Values at those points, as many as positions: m (rad for a shaft) in a displacement, m/s (rad/s) in a velocity.
   *
   * Items: Value at the point.
   */
  values: number[];
}
/**
 * c₀ + c₁x + c₂x² + … over a stretch, x in m from the near end; zero outside it.
 */
export interface PolynomialShape {
  /**
   * A polynomial in x.
   */
  type: 'polynomial';
  /**
   * Coefficients c₀, c₁, …, at most 21 (degree 20): cᵢ in m per mⁱ (rad per mⁱ for a shaft) in a displacement, m/s per mⁱ in a velocity.
   *
   * Items: Coefficient cᵢ.
   */
  coefficients: number[];
  /**
   * Start of the stretch from the near end, m. Default 0.
   */
  from: number;
  /**
   * End of the stretch, m. Default: the far end.
   */
  to?: number;
}
/**
 * Equally spaced positions including both ends.
 */
export interface PositionGrid {
  /**
   * Number of positions, at least 2.
   */
  count: number;
}
/**
 * RFC 9457 problem details.
 */
export interface ProblemDocument {
  /**
   * URI reference of the kind of problem.
   */
  type: string;
  /**
   * The kind of problem in a few words.
   */
  title: string;
  /**
   * HTTP status.
   */
  status: number;
  /**
   * This occurrence of the problem.
   */
  detail: string;
  /**
   * URI reference of this occurrence.
   */
  instance?: string;
  /**
   * Stable code.
   */
  code: string;
  /**
   * Everything that is wrong with the request, at most 50 faults and a last entry that says how many more there are.
   */
  errors?: ProblemError[];
}
/**
 * One thing that is wrong with a request.
 */
export interface ProblemError {
  /**
   * RFC 6901 pointer into the request; empty for the request as a whole.
   */
  pointer: string;
  /**
   * What is wrong and what to change.
   */
  detail: string;
  /**
   * Stable code.
   */
  code: string;
}
/**
 * The static shape under a force at one point, scaled to a displacement there.
 */
export interface PullByAmplitude {
  /**
   * Static shape under a force at a point.
   */
  type: 'pull';
  /**
   * Position of the force from the near end, m.
   */
  at: number;
  /**
   * Value of the shape at that point: m (rad for a shaft) in a displacement, m/s (rad/s) in a velocity.
   */
  amplitude: number;
}
/**
 * The static shape under a given force at one point.
 */
export interface PullByForce {
  /**
   * Static shape under a force at a point.
   */
  type: 'pull';
  /**
   * Position of the force from the near end, m.
   */
  at: number;
  /**
   * The force that pulls, N (torque in N·m for a shaft). Only in a displacement.
   */
  force: number;
}
/**
 * The same damping ratio in every mode.
 */
export interface RatioDamping {
  /**
   * One ratio for all modes.
   */
  type: 'ratio';
  /**
   * Damping ratio ζ of critical, dimensionless, 0 or more; 1 and above is over-damped.
   */
  value: number;
}
/**
 * A damping ratio for each of the first modes.
 */
export interface RatiosDamping {
  /**
   * One ratio per mode.
   */
  type: 'ratios';
  /**
   * Damping ratios ζ₁, ζ₂, …, dimensionless; the last one serves all higher modes.
   */
  values: number[];
}
/**
 * Damping proportional to inertia and node masses, and to stiffness, foundation and springs: ζ = α/(2ω) + βω/2.
 */
export interface RayleighDamping {
  /**
   * Damping proportional to mass and stiffness.
   */
  type: 'rayleigh';
  /**
   * α, 1/s.
   */
  massCoefficient: number;
  /**
   * β, s.
   */
  stiffnessCoefficient: number;
}
/**
 * The solvers take work.
 */
export interface ReadyAnswer {
  /**
   * ready: the solvers take work.
   */
  status: 'ready';
  /**
   * Solves under way.
   */
  running: number;
  /**
   * Requests that wait for a solver.
   */
  waiting: number;
}
/**
 * Motion of a member with the bound of its error.
 */
export interface ResponsesAnswer {
  /**
   * Coefficients of the modes used.
   */
  coefficients: ModalCoefficient[];
  fields: Fields;
  peaks: Peaks;
  convergence: ResponsesConvergence;
  /**
   * What the reader of this answer should know, cautions included.
   */
  notices: Notice[];
}
/**
 * What is certain about the series.
 */
export interface ResponsesConvergence {
  /**
   * The worst verdict of the quantities asked for.
   */
  verdict: Verdict;
  /**
   * Number of modes summed.
   */
  modesUsed: number;
  /**
   * Estimate of the number of modes the tolerance needs, where maxModes stopped the series.
   */
  modesNeeded?: number;
  energy: EnergyAccount;
  /**
   * Limit of the displacement for all time, known before any mode: √(2·energy·flexibility), m (rad for a shaft).
   */
  ceiling: number;
  /**
   * Largest possible error of the displacement over the member and the sampled time span, m (rad for a shaft).
   */
  displacementBound: number;
  /**
   * Energy balance; null without checks.
   */
  balance: EnergyBalance | null;
  /**
   * Largest off-diagonal of the mass matrix of the modes by quadrature; null without checks.
   */
  orthogonality: number | null;
  /**
   * Largest relative residual of the equation of motion and the node conditions; null without checks.
   */
  residual: number | null;
  /**
   * No mode below the last one is missing: they were counted.
   */
  spectrumComplete: true;
}
/**
 * A member, how its motion starts, and what is wanted of the motion.
 */
export interface ResponsesRequest {
  member: Member;
  initial: InitialMotion;
  /**
   * How many modes are used. Default: relativeTolerance 1e-3, maxModes 4096.
   */
  series: ResponsesSeries;
  sample: Sample;
  /**
   * Whether the independent checks (energy balance, orthogonality, residual) are made. Default true.
   */
  checks: boolean;
}
/**
 * Where, when and what is sampled; positions × times × quantities at most 1,000,000.
 */
export interface Sample {
  /**
   * Where the fields are sampled. Default: 101 equally spaced positions.
   */
  positions: Positions;
  /**
   * When the fields are sampled.
   */
  times: Times;
  /**
   * What is sampled, each at most once. Default: displacement.
   */
  quantities: Quantity[];
  /**
   * Length of time over which a gauge averages, s; 0 samples the instant. Default 0.
   */
  gaugeTime: number;
}
/**
 * As many modes as a relative tolerance on the displacement needs.
 */
export interface SeriesByRelativeTolerance {
  /**
   * Certified displacement error over the whole member and the sampled time span, as a fraction of the ceiling, above 0 and at most 1. Default 1e-3.
   */
  relativeTolerance: number;
  /**
   * Most modes that may be used, 1 to 20,000. Default 4096.
   */
  maxModes: number;
}
/**
 * As many modes as absolute tolerances need.
 */
export interface SeriesByTolerances {
  tolerances: Tolerances;
  /**
   * Most modes that may be used, 1 to 20,000. Default 4096.
   */
  maxModes: number;
}
/**
 * A shaft in torsion: u is the rotation (rad), the force is the torque (N·m).
 */
export interface Shaft {
  /**
   * The kind of member.
   */
  kind: 'shaft';
  /**
   * Uniform stretches from the near end to the far end; 1 to 1,000.
   */
  segments: ShaftSegment[];
  ends: ShaftEnds;
  /**
   * What is joined to the member between its ends; up to 1,000, in any order; several at one position add up. Default: none.
   */
  attachments: ShaftAttachment[];
  damping?: Damping;
}
/**
 * A shaft end that carries any of an inertia, a torsional spring and a torsional dashpot together.
 */
export interface ShaftAttachedEnd {
  /**
   * Something is attached to the end.
   */
  type: 'attached';
  /**
   * Lumped polar mass moment of inertia, kg·m². Default 0.
   */
  inertia: number;
  /**
   * Torsional spring to ground, N·m/rad. Default 0.
   */
  spring: number;
  /**
   * Torsional dashpot to ground, N·m·s/rad. Default 0. A value above 0 is refused (422) until damped modes are solved.
   */
  dashpot: number;
}
/**
 * A polar inertia, a torsional spring to ground and a torsional dashpot to ground, any of them, joined rigidly to the shaft at one place.
 */
export interface ShaftAttachment {
  /**
   * Position of the attachment from the near end, m, inside the member (not at an end: use `ends`). Within 64 rounding units of the member length of a segment boundary it stands on that boundary.
   */
  at: number;
  /**
   * Lumped polar mass moment of inertia, kg·m². Default 0.
   */
  inertia: number;
  /**
   * Torsional spring to ground, N·m/rad. Default 0.
   */
  spring: number;
  /**
   * Torsional dashpot to ground, N·m·s/rad. Default 0. A value above 0 is refused (422) until damped modes are solved.
   */
  dashpot: number;
  /**
   * A name of your own for this part; it changes no result.
   */
  name?: string;
}
/**
 * Both ends of the shaft.
 */
export interface ShaftEnds {
  /**
   * The end at x = 0.
   */
  near: ShaftEnd;
  /**
   * The end at x = L.
   */
  far: ShaftEnd;
}
/**
 * A uniform stretch of a round shaft, described by its material and diameters.
 */
export interface ShaftMaterialSegment {
  /**
   * Length of the segment, m.
   */
  length: number;
  /**
   * Shear modulus G of the material, Pa.
   */
  shearModulus: number;
  /**
   * Mass density of the material, kg/m³. May be 0 as long as something else has inertia.
   */
  density: number;
  /**
   * Outer diameter, m.
   */
  outerDiameter: number;
  /**
   * Inner diameter, m, below the outer diameter. Default 0 (solid).
   */
  innerDiameter: number;
  /**
   * Elastic bedding to ground per length, N (N·m/rad per m). Default 0.
   */
  foundation: number;
  /**
   * Viscous resistance to ground per length, N·s (N·m·s/rad per m). Default 0. It is modal damping only where it is the same multiple of the inertia in every segment and no node carries an inertia.
   */
  drag: number;
  /**
   * A name of your own for this part; it changes no result.
   */
  name?: string;
}
/**
 * A uniform stretch of a shaft, described by its torsional stiffness.
 */
export interface ShaftStiffnessSegment {
  /**
   * Length of the segment, m.
   */
  length: number;
  /**
   * Torsional stiffness GJ, N·m².
   */
  torsionalStiffness: number;
  /**
   * Polar mass moment of inertia per length, kg·m. May be 0 as long as something else has inertia.
   */
  inertiaPerLength: number;
  /**
   * Elastic bedding to ground per length, N (N·m/rad per m). Default 0.
   */
  foundation: number;
  /**
   * Viscous resistance to ground per length, N·s (N·m·s/rad per m). Default 0. It is modal damping only where it is the same multiple of the inertia in every segment and no node carries an inertia.
   */
  drag: number;
  /**
   * A name of your own for this part; it changes no result.
   */
  name?: string;
}
/**
 * Where the mode shapes are sampled.
 */
export interface ShapePositions {
  /**
   * Positions from the near end, m.
   */
  positions: Numbers;
}
/**
 * Asks for mode shapes; positions × modes × quantities at most 1,000,000.
 */
export interface ShapesRequest {
  /**
   * Where the shapes are sampled.
   */
  positions: Positions;
  /**
   * mass: modal mass 1; peak: largest displacement over the member 1. Default mass.
   */
  normalisation: 'mass' | 'peak';
  /**
   * What is sampled, each at most once. Default: displacement.
   */
  quantities: ShapeQuantity[];
}
/**
 * A column or soil profile in shear: u is the transverse displacement (m), the force is the shear force (N).
 */
export interface ShearColumn {
  /**
   * The kind of member.
   */
  kind: 'shear-column';
  /**
   * Uniform stretches from the near end to the far end; 1 to 1,000.
   */
  segments: ShearColumnSegment[];
  ends: Ends;
  /**
   * What is joined to the member between its ends; up to 1,000, in any order; several at one position add up. Default: none.
   */
  attachments: Attachment[];
  damping?: Damping;
}
/**
 * A uniform stretch of a shear column or soil layer, described by its shear modulus.
 */
export interface ShearModulusSegment {
  /**
   * Length of the segment, m.
   */
  length: number;
  /**
   * Shear modulus G of the material, Pa.
   */
  shearModulus: number;
  /**
   * Mass density of the material, kg/m³. May be 0 as long as something else has inertia.
   */
  density: number;
  /**
   * Area that carries the shear, m². Default 1 m²: forces are then per square metre of plan.
   */
  area: number;
  /**
   * Elastic bedding to ground per length, N/m². Default 0.
   */
  foundation: number;
  /**
   * Viscous resistance to ground per length, N·s/m². Default 0. It is modal damping only where it is the same multiple of the inertia in every segment and no node carries a mass.
   */
  drag: number;
  /**
   * A name of your own for this part; it changes no result.
   */
  name?: string;
}
/**
 * A uniform stretch of a shear column, described by its shear stiffness.
 */
export interface ShearStiffnessSegment {
  /**
   * Length of the segment, m.
   */
  length: number;
  /**
   * Shear stiffness κGA, N.
   */
  shearStiffness: number;
  /**
   * Mass per length, kg/m. May be 0 as long as something else has inertia.
   */
  massPerLength: number;
  /**
   * Elastic bedding to ground per length, N/m². Default 0.
   */
  foundation: number;
  /**
   * Viscous resistance to ground per length, N·s/m². Default 0. It is modal damping only where it is the same multiple of the inertia in every segment and no node carries a mass.
   */
  drag: number;
  /**
   * A name of your own for this part; it changes no result.
   */
  name?: string;
}
/**
 * A uniform stretch of a shear column or soil layer, described by its shear wave speed.
 */
export interface ShearWaveSpeedSegment {
  /**
   * Length of the segment, m.
   */
  length: number;
  /**
   * Shear wave speed V, m/s.
   */
  shearWaveSpeed: number;
  /**
   * Mass density of the material, kg/m³, above 0: the stiffness G = density·V² follows from it.
   */
  density: number;
  /**
   * Area that carries the shear, m². Default 1 m²: forces are then per square metre of plan.
   */
  area: number;
  /**
   * Elastic bedding to ground per length, N/m². Default 0.
   */
  foundation: number;
  /**
   * Viscous resistance to ground per length, N·s/m². Default 0. It is modal damping only where it is the same multiple of the inertia in every segment and no node carries a mass.
   */
  drag: number;
  /**
   * A name of your own for this part; it changes no result.
   */
  name?: string;
}
/**
 * Equally spaced times including start and end.
 */
export interface TimeGrid {
  /**
   * First time, s. Default 0.
   */
  start: number;
  /**
   * Last time, s, after the start.
   */
  end: number;
  /**
   * Number of times, at least 2.
   */
  count: number;
}
/**
 * Largest certified errors over the whole member and the sampled time span; at least one.
 */
export interface Tolerances {
  /**
   * Largest error of the displacement, m (rad for a shaft).
   */
  displacement?: number;
  /**
   * Largest error of the force, N (N·m for a shaft).
   */
  force?: number;
}
/**
 * One value over a stretch; zero outside it.
 */
export interface UniformShape {
  /**
   * One value over a stretch.
   */
  type: 'uniform';
  /**
   * The value: m (rad for a shaft) in a displacement, m/s (rad/s) in a velocity.
   */
  value: number;
  /**
   * Start of the stretch from the near end, m. Default 0.
   */
  from: number;
  /**
   * End of the stretch, m. Default: the far end.
   */
  to?: number;
}
/**
 * Anything else that obeys inertia·u_tt = (stiffness·u_x)_x − foundation·u. Unit strings are read as for a cable (stiffness N, inertia kg/m, u in m); for another physics use plain numbers of one coherent system of units.
 */
export interface Wave {
  /**
   * The kind of member.
   */
  kind: 'wave';
  /**
   * Uniform stretches from the near end to the far end; 1 to 1,000.
   */
  segments: WaveSegment[];
  ends: Ends;
  /**
   * What is joined to the member between its ends; up to 1,000, in any order; several at one position add up. Default: none.
   */
  attachments: Attachment[];
  damping?: Damping;
}
/**
 * A uniform stretch of anything else that obeys the wave equation.
 */
export interface WaveSegment {
  /**
   * Length of the segment, m.
   */
  length: number;
  /**
   * Stiffness k, N.
   */
  stiffness: number;
  /**
   * Inertia ρ per length, kg/m. May be 0 as long as something else has inertia.
   */
  inertia: number;
  /**
   * Elastic bedding to ground per length, N/m². Default 0.
   */
  foundation: number;
  /**
   * Viscous resistance to ground per length, N·s/m². Default 0. It is modal damping only where it is the same multiple of the inertia in every segment and no node carries a mass.
   */
  drag: number;
  /**
   * A name of your own for this part; it changes no result.
   */
  name?: string;
}

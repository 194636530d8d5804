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
 * pass: certainly met; fail: certainly not met; undetermined: the certificate decides neither.
 */
export type CheckVerdict = 'pass' | 'fail' | 'undetermined';
/**
 * A solve and the criteria that its answer is held to.
 */
export type ChecksRequest = ModesChecksRequest | ResponsesChecksRequest | TransferFunctionsChecksRequest;
/**
 * What is demanded of a solve.
 */
export type Criterion =
  | PeakCriterion
  | FrequencyRangeCriterion
  | SeparationCriterion
  | DampingCriterion
  | VortexCriterion
  | EffectiveMassCriterion
  | TransferCriterion;
/**
 * Type of a criterion.
 */
export type CriterionType =
  'peak' | 'frequency-range' | 'separation' | 'damping' | 'vortex' | 'effective-mass' | 'transfer';
/**
 * Damping of the whole member. Absent: undamped.
 */
export type Damping = RatioDamping | RatiosDamping | RayleighDamping | LossFactorDamping;
/**
 * What one end of a cable, bar, shear column or wave member does.
 */
export type End = FixedEnd | FreeEnd | AttachedEnd;
/**
 * At which frequencies: a number of them between two, or a list.
 */
export type Frequencies = FrequencyGrid | number[];
/**
 * First and last frequency of a band, Hz, ascending.
 *
 * @minItems 2
 * @maxItems 2
 *
 * Items: Frequency, Hz.
 */
export type FrequencyBand = [number, number];
/**
 * A function of time, zero before its start, continuous from the right.
 */
export type History =
  HarmonicHistory | StepHistory | RampHistory | HalfSinePulse | RectangularPulse | SampledHistory;
/**
 * What acts on the member after time 0.
 */
export type Load = PointForce | DistributedForce | BodyForce | EndMotion | MovingForce;
/**
 * A one-dimensional member of length L, x measured from its near end (0) to its far end (L).
 */
export type Member = Cable | Bar | Shaft | ShearColumn | Wave;
/**
 * Which modes are wanted: a number of them, or all up to a frequency.
 */
export type ModesSeries = ModesByCount | ModesByFrequency;
/**
 * What the motion of a support is given as: displacement or acceleration.
 */
export type MotionQuantity = 'displacement' | 'acceleration';
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
 * A field that can be sampled: displacement (m; rad for a shaft), velocity (m/s; rad/s), acceleration (m/s²; rad/s²), force (N; N·m), stress (Pa, where the section is known) or relativeDisplacement (m; rad): the displacement less the static shape of the end motion, u − y(t)·r(x); without end motion the displacement itself.
 */
export type Quantity =
  'displacement' | 'velocity' | 'acceleration' | 'force' | 'stress' | 'relativeDisplacement';
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
 * Lowest and highest speed, m/s, ascending.
 *
 * @minItems 2
 * @maxItems 2
 *
 * Items: Speed, m/s.
 */
export type SpeedRange = [number, number];
/**
 * The end that moves, or both by the same amount; a fixed end is a support.
 */
export type SupportEnds = 'near' | 'far' | 'both';
/**
 * When: equally spaced times, or a list of times.
 */
export type Times = TimeGrid | number[];
/**
 * What drives the member, with amplitude 1 and the time factor e^(+iΩt).
 */
export type TransferInput = PointForceInput | EndMotionInput | OutcropMotionInput;
/**
 * What a transfer function gives: displacement, velocity, acceleration, force or stress (where the section is known).
 */
export type TransferQuantity = 'displacement' | 'velocity' | 'acceleration' | 'force' | 'stress';
/**
 * What an undetermined criterion is in the XML report: a failure, or skipped.
 */
export type UndeterminedReport = 'fail' | 'skip';
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
 * What came of one line of a batch: an answer or a problem.
 */
export interface BatchLineAnswer {
  /**
   * Name of the line; null where the line has none that can be read.
   */
  id: string | null;
  /**
   * HTTP status that the same request would have had by itself.
   */
  status: number;
  /**
   * The answer, the same bytes as those of a single request; where the status is 200.
   */
  answer?: {
    [k: string]: unknown;
  };
  /**
   * What is wrong, with the number of the line; where the status is 400 or more. Its pointers lead into the line.
   */
  problem?: ProblemDocument;
}
/**
 * One line of a batch.
 */
export interface BatchLineRequest {
  /**
   * A name of the caller for this line, which its answer bears too.
   */
  id: string;
  /**
   * What is asked for, as in the path of a single request: modes, responses, transfer-functions.
   */
  operation: string;
  /**
   * The request, as it would be sent to /v1/{operation}.
   */
  request: {
    [k: string]: unknown;
  };
}
/**
 * An acceleration that acts on all inertia, node masses included: a force of ρ times it per length.
 */
export interface BodyForce {
  /**
   * A force on all inertia.
   */
  type: 'body-force';
  /**
   * The acceleration, m/s² (rad/s² for a shaft).
   */
  history: History;
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
 * Verdicts on criteria.
 */
export interface ChecksAnswer {
  /**
   * fail where a criterion fails, else undetermined where one is, else pass.
   */
  verdict: CheckVerdict;
  /**
   * What became of each criterion, in the order of the request.
   */
  criteria: CriterionResult[];
  /**
   * What is certain about the series, of the longest one that was solved.
   */
  convergence: ModesConvergence | ResponsesConvergence | TransferConvergence;
  /**
   * What the reader of this answer should know, cautions included.
   */
  notices: Notice[];
}
/**
 * Complex numbers, one per frequency.
 */
export interface ComplexNumbers {
  /**
   * Real parts.
   */
  real: Numbers;
  /**
   * Imaginary parts.
   */
  imaginary: Numbers;
}
/**
 * What became of a criterion.
 */
export interface CriterionResult {
  /**
   * Name of the criterion.
   */
  id: string;
  type: CriterionType;
  verdict: CheckVerdict;
  /**
   * What is held against the limit, as computed, SI: peak magnitude; frequency, Hz; smallest separation, a fraction; smallest damping ratio; speed of the wind, m/s, at which the mode nearest to the range is excited; cumulative fraction; largest magnitude found. null where there is none.
   */
  demand: number | null;
  /**
   * By how much the demand can be worse than stated at most, in its unit: above it where the limit is an upper one, below it where it is a lower one; null where no bound exists.
   */
  bound: number | null;
  /**
   * The limit that governs, SI.
   */
  limit: number | null;
  /**
   * Demand over limit, or limit over demand where the limit is a lower one: above 1 it is exceeded. null where there is none.
   */
  utilisation: number | null;
  /**
   * A sentence or two that a report can print.
   */
  statement: string;
  /**
   * What would settle an undetermined criterion.
   */
  remedy?: string;
  /**
   * Orders of the modes concerned: those that vortices excite, those within a band of excitation, the one that governs.
   */
  modes?: number[];
  /**
   * Where the demand was found, m from the near end.
   */
  at?: number;
  /**
   * When the demand was found, s.
   */
  time?: number;
  /**
   * At which frequency the demand was found, Hz.
   */
  frequency?: number;
  /**
   * Fronts that are known to start in the motion, at which the force jumps at once while a gauge average does not.
   */
  fronts?: FrontJump[];
}
/**
 * The damping ratio of every mode up to a frequency reaches a minimum; rigid-body modes are left out.
 */
export interface DampingCriterion {
  /**
   * Name of the criterion in the answer and the report, each once; 1 to 200 characters.
   */
  id: string;
  /**
   * A minimum of damping.
   */
  type: 'damping';
  /**
   * Smallest damping ratio allowed, above 0.
   */
  minimum: number;
  /**
   * Highest natural frequency that counts, Hz. Default: all modes that a request of modes asks for; other requests need it.
   */
  upTo?: number;
}
/**
 * A force per length: the profile times the history.
 */
export interface DistributedForce {
  /**
   * A force per length.
   */
  type: 'distributed-force';
  /**
   * Force per length for a history of 1, N/m (N, that is N·m per m, for a shaft). A pull gives it by its amplitude.
   */
  profile: Shape;
  /**
   * A plain factor of the profile.
   */
  history: History;
}
/**
 * The modes that the request asks for carry at least a fraction of the inertia that moves with the ends; of modes with participation.
 */
export interface EffectiveMassCriterion {
  /**
   * Name of the criterion in the answer and the report, each once; 1 to 200 characters.
   */
  id: string;
  /**
   * Effective mass of the modes asked for.
   */
  type: 'effective-mass';
  /**
   * Smallest cumulative fraction allowed, above 0, at most 1.
   */
  minimum: number;
}
/**
 * A prescribed motion of a fixed end: the support moves. Each end is moved by at most one load.
 */
export interface EndMotion {
  /**
   * The support of an end moves.
   */
  type: 'end-motion';
  end: SupportEnds;
  /**
   * What the history gives: the displacement of the support, which must not jump, or its acceleration, from rest at displacement 0.
   */
  quantity: MotionQuantity;
  /**
   * The displacement, m (rad for a shaft), or the acceleration, m/s² (rad/s²).
   */
  history: History;
}
/**
 * A motion of amplitude 1 of a fixed end: 1 m or 1 m/s² (rad, rad/s² for a shaft).
 */
export interface EndMotionInput {
  /**
   * The support of an end moves.
   */
  type: 'end-motion';
  end: SupportEnds;
  /**
   * displacement: 1 m (rad for a shaft); acceleration: 1 m/s² (rad/s²), not at 0 Hz.
   */
  quantity: MotionQuantity;
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
 * Energy of the sampled fields, integrated, against the exact balance: initial energy and work of the loads less what is dissipated.
 */
export interface EnergyBalance {
  /**
   * Largest difference relative to the larger of the initial energy and the work of the loads.
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
  relativeDisplacement?: Field;
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
 * Frequencies including from and to.
 */
export interface FrequencyGrid {
  /**
   * First frequency, Hz; above 0 with logarithmic spacing.
   */
  from: number;
  /**
   * Last frequency, Hz, above the first.
   */
  to: number;
  /**
   * Number of frequencies, 2 to 100,000.
   */
  count: number;
  /**
   * linear: equal differences; logarithmic: equal ratios. Default linear.
   */
  spacing: 'linear' | 'logarithmic';
}
/**
 * A natural frequency lies within a range, its ends included; at least one of min and max is given.
 */
export interface FrequencyRangeCriterion {
  /**
   * Name of the criterion in the answer and the report, each once; 1 to 200 characters.
   */
  id: string;
  /**
   * A natural frequency within a range.
   */
  type: 'frequency-range';
  /**
   * Number of the mode from 1, 1 to 20,000.
   */
  order: number;
  /**
   * Lowest frequency allowed, Hz.
   */
  min?: number;
  /**
   * Highest frequency allowed, Hz.
   */
  max?: number;
}
/**
 * A sudden change of the force where a front passes.
 */
export interface FrontJump {
  /**
   * Position where the front starts, m from the near end.
   */
  at: number;
  /**
   * Jump of the force there, impedance times jump of the velocity, N (N·m for a shaft).
   */
  force: number;
}
/**
 * amplitude·sin(π·(t − start)/duration) over the duration; zero after it.
 */
export interface HalfSinePulse {
  /**
   * Half a wave of a sine.
   */
  type: 'half-sine-pulse';
  /**
   * Amplitude in the unit of its load: N (N·m for a shaft) under a point force, a plain factor of the profile under a distributed force, m/s² (rad/s²) under a body force, and under an end motion m (rad) for a displacement, m/s² (rad/s²) for an acceleration.
   */
  amplitude: number;
  /**
   * Time at which the history starts, s; it is zero before. Default 0.
   */
  start: number;
  /**
   * Duration of the pulse, s, above 0.
   */
  duration: number;
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
   * Amplitude: m (rad for a shaft) in a displacement, m/s (rad/s) in a velocity, N/m (N·m/m) in a distributed force.
   */
  amplitude: number;
  /**
   * Number n of half waves over the member, 1 to 20,000. Default 1.
   */
  halfWaves: number;
}
/**
 * amplitude·cos(2π·frequency·(t − start) + phase) from the start on.
 */
export interface HarmonicHistory {
  /**
   * A cosine.
   */
  type: 'harmonic';
  /**
   * Amplitude in the unit of its load: N (N·m for a shaft) under a point force, a plain factor of the profile under a distributed force, m/s² (rad/s²) under a body force, and under an end motion m (rad) for a displacement, m/s² (rad/s²) for an acceleration.
   */
  amplitude: number;
  /**
   * Frequency, Hz, above 0.
   */
  frequency: number;
  /**
   * Phase, rad; −π/2 ("-90 deg") makes it a sine, which begins at 0. Default 0.
   */
  phase: number;
  /**
   * Time at which the history starts, s; it is zero before. Default 0.
   */
  start: number;
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
   * Initial displacement: a shape, or a list of shapes that add up. It must be continuous, zero at fixed ends, and at an end with a prescribed displacement equal to its first value.
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
 * A job and how far it is.
 */
export interface JobAnswer {
  /**
   * Name of the job.
   */
  id: string;
  /**
   * queued: no solver has begun; running; succeeded: the result is there; failed: the result is a problem document; cancelled.
   */
  state: 'queued' | 'running' | 'succeeded' | 'failed' | 'cancelled';
  progress: JobProgress;
  /**
   * When the job was taken, RFC 3339, UTC.
   */
  submitted: string;
  /**
   * When a solver began.
   */
  started?: string;
  /**
   * When it succeeded, failed or was cancelled.
   */
  finished?: string;
  links: JobLinks;
}
/**
 * Where the parts of a job are.
 */
export interface JobLinks {
  /**
   * This document; DELETE cancels the job.
   */
  self: string;
  /**
   * Its progress as server-sent events.
   */
  events: string;
  /**
   * Its result, once it has succeeded.
   */
  result: string;
}
/**
 * How much of a job is done. It never goes back.
 */
export interface JobProgress {
  /**
   * Lines of a batch that are answered; 0 or 1 of a single solve.
   */
  done: number;
  /**
   * Lines of the batch; 1 of a single solve.
   */
  total: number;
  /**
   * Estimate of the rest from the pace so far, s; while a batch is running.
   */
  secondsLeft?: number;
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
 * Motion of one mode of unit modal mass that the initial motion leaves: q(t) = cosine·cos ωt + sine·sin ωt without damping; for a rigid-body mode cosine + sine·t. Loads add to it.
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
 * Criteria on natural modes.
 */
export interface ModesChecksRequest {
  /**
   * What is solved.
   */
  operation: 'modes';
  /**
   * What is solved, as it would be sent to the operation by itself.
   */
  request: ModesRequest;
  /**
   * What is demanded, 1 to 200 criteria.
   */
  criteria: Criterion[];
  /**
   * What an undetermined criterion is in the XML report: fail, a failure, or skip, skipped. Default fail.
   */
  undetermined: UndeterminedReport;
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
 * A constant force that crosses the member at constant speed; it has no mass.
 */
export interface MovingForce {
  /**
   * A force that crosses the member.
   */
  type: 'moving-force';
  /**
   * The force, N (torque in N·m for a shaft).
   */
  force: number;
  /**
   * Its speed, m/s: positive from the near to the far end, negative from the far to the near end; not 0.
   */
  speed: number;
  /**
   * Time at which it enters the member, s: at the near end for a positive speed, at the far end for a negative one. Default 0.
   */
  start: number;
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
 * A motion of amplitude 1 of the free surface of the elastic half-space on which an end stands.
 */
export interface OutcropMotionInput {
  /**
   * The outcrop of the half-space under an end moves.
   */
  type: 'outcrop-motion';
  /**
   * The end that stands on the half-space; it must be a fixed end.
   */
  end: 'near' | 'far';
  /**
   * Impedance Z = ρ·V·area of the half-space, N·s/m (N·m·s/rad for a shaft), above 0; area as in the segments.
   */
  impedance: number;
  /**
   * displacement: 1 m (rad for a shaft); acceleration: 1 m/s² (rad/s²), not at 0 Hz.
   */
  quantity: MotionQuantity;
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
 * The largest magnitude of a quantity over the sampled time span stays at or below a limit; of responses.
 */
export interface PeakCriterion {
  /**
   * Name of the criterion in the answer and the report, each once; 1 to 200 characters.
   */
  id: string;
  /**
   * A peak of the motion.
   */
  type: 'peak';
  /**
   * Which quantity; it must be among those that the request samples.
   */
  quantity: Quantity;
  /**
   * Largest magnitude allowed, in the unit of the quantity, above 0.
   */
  limit: number;
  /**
   * Where: a position or a list of them, m from the near end, whether sampled or not. Default: anywhere on the member.
   */
  at?: number | number[];
  /**
   * Length of time over which a gauge averages velocity, acceleration, force or stress, s. Default: that of the sample.
   */
  gaugeTime?: number;
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
  relativeDisplacement?: Peak;
}
/**
 * A force at one place (a torque for a shaft).
 */
export interface PointForce {
  /**
   * A force at a point.
   */
  type: 'point-force';
  /**
   * Position of the force from the near end, m; not at a fixed end.
   */
  at: number;
  /**
   * The force, N (N·m for a shaft).
   */
  history: History;
}
/**
 * A force of 1 N at one place (1 N·m for a shaft).
 */
export interface PointForceInput {
  /**
   * A force at a point.
   */
  type: 'point-force';
  /**
   * Position of the force from the near end, m; not at a fixed end.
   */
  at: number;
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
   * Values at those points, as many as positions: m (rad for a shaft) in a displacement, m/s (rad/s) in a velocity, N/m (N·m/m) in a distributed force.
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
   * Coefficients c₀, c₁, …, at most 21 (degree 20): cᵢ in m per mⁱ (rad per mⁱ for a shaft) in a displacement, m/s per mⁱ in a velocity, N/m per mⁱ in a distributed force.
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
   * Number of the line in a batch, the first is 1; blank lines count.
   */
  line?: number;
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
   * Value of the shape at that point: m (rad for a shaft) in a displacement, m/s (rad/s) in a velocity, N/m (N·m/m) in a distributed force.
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
 * A straight rise from 0 to amplitude over the duration; held after it.
 */
export interface RampHistory {
  /**
   * A rise that is held.
   */
  type: 'ramp';
  /**
   * Amplitude in the unit of its load: N (N·m for a shaft) under a point force, a plain factor of the profile under a distributed force, m/s² (rad/s²) under a body force, and under an end motion m (rad) for a displacement, m/s² (rad/s²) for an acceleration.
   */
  amplitude: number;
  /**
   * Time at which the history starts, s; it is zero before. Default 0.
   */
  start: number;
  /**
   * Duration of the rise, s, above 0.
   */
  duration: number;
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
 * amplitude over the duration; zero after it.
 */
export interface RectangularPulse {
  /**
   * A constant value for a while.
   */
  type: 'rectangular-pulse';
  /**
   * Amplitude in the unit of its load: N (N·m for a shaft) under a point force, a plain factor of the profile under a distributed force, m/s² (rad/s²) under a body force, and under an end motion m (rad) for a displacement, m/s² (rad/s²) for an acceleration.
   */
  amplitude: number;
  /**
   * Time at which the history starts, s; it is zero before. Default 0.
   */
  start: number;
  /**
   * Duration of the pulse, s, above 0.
   */
  duration: number;
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
 * Criteria on a motion.
 */
export interface ResponsesChecksRequest {
  /**
   * What is solved.
   */
  operation: 'responses';
  /**
   * What is solved, as it would be sent to the operation by itself.
   */
  request: ResponsesRequest;
  /**
   * What is demanded, 1 to 200 criteria.
   */
  criteria: Criterion[];
  /**
   * What an undetermined criterion is in the XML report: fail, a failure, or skip, skipped. Default fail.
   */
  undetermined: UndeterminedReport;
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
   * Limit of the displacement, known before any mode, m (rad for a shaft): √(2·energy·flexibility) for all time, and what the loads can add within the sampled time span; null where none exists (a force that moves with the wave).
   */
  ceiling: number | null;
  /**
   * Largest possible error of the displacement over the member and the sampled time span, m (rad for a shaft); null where none exists (a force that moves with the wave).
   */
  displacementBound: number | null;
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
 * A member, what sets it in motion (an initial motion, loads or both), and what is wanted of the motion.
 */
export interface ResponsesRequest {
  member: Member;
  /**
   * How the motion starts: displacement and velocity at time 0. Default: at rest.
   */
  initial: InitialMotion;
  /**
   * What acts on the member, up to 1,000 loads; they add up. Default: none.
   */
  loads: Load[];
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
 * Samples at equal intervals, joined by straight lines; zero outside them, except that an end displacement holds its last value. A record is used as it is, without baseline correction.
 */
export interface SampledHistory {
  /**
   * A record.
   */
  type: 'samples';
  /**
   * Time between two samples, s, above 0.
   */
  interval: number;
  /**
   * Samples in the unit of the load (see `amplitude` of the other histories), the first one at the start; 2 to 200,000.
   *
   * Items: Sample.
   */
  values: number[];
  /**
   * Time at which the history starts, s; it is zero before. Default 0.
   */
  start: number;
  /**
   * A name of your own for this part; it changes no result.
   */
  name?: string;
}
/**
 * Every natural frequency, and the multiples named of it, keeps a margin from bands of excitation; rigid-body modes are left out.
 */
export interface SeparationCriterion {
  /**
   * Name of the criterion in the answer and the report, each once; 1 to 200 characters.
   */
  id: string;
  /**
   * Natural frequencies apart from excitation.
   */
  type: 'separation';
  /**
   * Bands of excitation, 1 to 100.
   */
  bands: FrequencyBand[];
  /**
   * Distance kept, as a fraction of the edge of the band: below it edge × (1 − margin), above it edge × (1 + margin); 0 to below 1.
   */
  margin: number;
  /**
   * Multiples of the natural frequencies at which excitation acts, 1 to 20 of them: 1 for forced excitation, 2 for parametric excitation (the band at twice a natural frequency). Default: 1 alone.
   *
   * Items: Multiple, 0.01 to 100.
   */
  multiples: number[];
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
 * amplitude from the start on.
 */
export interface StepHistory {
  /**
   * A step.
   */
  type: 'step';
  /**
   * Amplitude in the unit of its load: N (N·m for a shaft) under a point force, a plain factor of the profile under a distributed force, m/s² (rad/s²) under a body force, and under an end motion m (rad) for a displacement, m/s² (rad/s²) for an acceleration.
   */
  amplitude: number;
  /**
   * Time at which the history starts, s; it is zero before. Default 0.
   */
  start: number;
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
 * How the transfer functions were found.
 */
export interface TransferConvergence {
  /**
   * true: by dynamic stiffness, exact but for rounding; false: by a modal sum with the stated bounds.
   */
  closedForm: boolean;
  /**
   * Number of modes summed; null where no mode was solved for the answer.
   */
  modesUsed: number | null;
  /**
   * Largest bound relative to the largest magnitude of its output; 0 in closed form.
   */
  largestBound: number;
}
/**
 * The magnitude of a transfer function stays at or below a limit at every frequency of a band, not only at those of the request; of transfer functions.
 */
export interface TransferCriterion {
  /**
   * Name of the criterion in the answer and the report, each once; 1 to 200 characters.
   */
  id: string;
  /**
   * A transfer function below a limit.
   */
  type: 'transfer';
  /**
   * Lowest and highest frequency, Hz, ascending.
   */
  band: FrequencyBand;
  /**
   * Largest magnitude allowed, in the unit of the output per unit of the input, above 0.
   */
  limit: number;
  /**
   * Index of the output in the request, from 0. Default: all outputs, which then have one quantity.
   */
  output?: number;
}
/**
 * A quantity at a place per unit of the input.
 */
export interface TransferFunction {
  /**
   * Position from the near end, m.
   */
  at: number;
  quantity: TransferQuantity;
  /**
   * SI unit of the quantity per unit of the input.
   */
  unit: string;
  /**
   * Real part, per frequency.
   */
  real: Numbers;
  /**
   * Imaginary part, per frequency.
   */
  imaginary: Numbers;
  /**
   * Magnitude, per frequency.
   */
  magnitude: Numbers;
  /**
   * Phase, rad, in (−π, π], per frequency.
   */
  phase: Numbers;
  /**
   * Largest possible magnitude of the error, per frequency; only with modal damping ratios, which have no closed form.
   */
  bound?: Numbers;
  series?: TransferSeries;
}
/**
 * Transfer functions of a member in the steady state.
 */
export interface TransferFunctionsAnswer {
  /**
   * Frequencies, Hz, ascending.
   */
  frequencies: Numbers;
  /**
   * One transfer function per output of the request, in its order.
   */
  outputs: TransferFunction[];
  convergence: TransferConvergence;
  /**
   * What the reader of this answer should know, cautions included.
   */
  notices: Notice[];
}
/**
 * Criteria on a steady state.
 */
export interface TransferFunctionsChecksRequest {
  /**
   * What is solved.
   */
  operation: 'transfer-functions';
  /**
   * What is solved, as it would be sent to the operation by itself.
   */
  request: TransferFunctionsRequest;
  /**
   * What is demanded, 1 to 200 criteria.
   */
  criteria: Criterion[];
  /**
   * What an undetermined criterion is in the XML report: fail, a failure, or skip, skipped. Default fail.
   */
  undetermined: UndeterminedReport;
}
/**
 * A member, what drives it and what is wanted of its steady state.
 */
export interface TransferFunctionsRequest {
  member: Member;
  input: TransferInput;
  /**
   * What is wanted, 1 to 1,000; outputs × frequencies at most 1,000,000.
   */
  outputs: TransferOutput[];
  frequencies: Frequencies;
  /**
   * Whether frequencies are added around resonances until every peak is resolved to 1 %. Default false.
   */
  refine: boolean;
  /**
   * Asks for the modal series of so many modes beside the exact result, cut off and with its static remainder.
   */
  series?: ModesByCount;
}
/**
 * A quantity at a place.
 */
export interface TransferOutput {
  /**
   * Position from the near end, m.
   */
  at: number;
  quantity: TransferQuantity;
}
/**
 * The modal series beside the exact transfer function.
 */
export interface TransferSeries {
  /**
   * Number of modes summed.
   */
  modes: number;
  /**
   * The sum of the modes alone.
   */
  truncated: ComplexNumbers;
  /**
   * The same with the static response of the modes left out.
   */
  corrected: ComplexNumbers;
  /**
   * Largest possible magnitude of the error of the corrected series, per frequency; null from the first frequency left out on, where no such bound exists.
   */
  bound: (number | null)[];
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
   * The value: m (rad for a shaft) in a displacement, m/s (rad/s) in a velocity, N/m (N·m/m) in a distributed force.
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
 * No natural frequency lies where vortices are shed, f = strouhal · speed / diameter (V. Strouhal, 1878), for any speed within a range of wind.
 */
export interface VortexCriterion {
  /**
   * Name of the criterion in the answer and the report, each once; 1 to 200 characters.
   */
  id: string;
  /**
   * Vortex shedding.
   */
  type: 'vortex';
  /**
   * Width of the section across the wind, m, above 0.
   */
  diameter: number;
  /**
   * Strouhal number of the section, above 0; 0.18 is the usual value for circular cylinders (EN 1991-1-4, Annex E).
   */
  strouhal: number;
  /**
   * Lowest and highest speed of the wind, m/s, ascending.
   */
  wind: SpeedRange;
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

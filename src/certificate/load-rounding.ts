import type { AppliedLoad } from '../motion/applied-loads.ts';
import { historyAmount, type HistoryMeasures } from '../motion/history-measures.ts';
import type { Quantity } from '../spec/types.ts';
import type { KeptMode } from './kept-modes.ts';

const EPS = Number.EPSILON;

/** What the rounding under loads needs to know of the member. */
export interface LoadedPlace {
  /** Largest G, what massless stretches add included, m/N. */
  readonly flexibility: number;
  /** Σ l/k, m/N. */
  readonly softness: number;
  /** Length of the member, m. */
  readonly length: number;
  /** Largest 1/k, 1/N. */
  readonly steepest: number;
  /** Latest time, s. */
  readonly span: number;
  readonly gaugeTime: number;
}

/**
 * Rounding of what loads add outside the elastic modes' own motion: the quasi-static shapes, known to
 * 64·2⁻⁵² of the terms they are summed from (for a load whose parts may cancel, of its whole force on the
 * whole flexibility), and the rigid-body mode that loads drive.
 */
export function loadRounding(
  quantity: Quantity,
  loads: readonly AppliedLoad[],
  first: KeptMode,
  place: LoadedPlace,
): number {
  const drifts = first.mode.frequency.omega === 0;
  const height = drifts ? Math.abs(first.mode.shape.ends[0]) : 0;
  return loads.reduce((sum, load, index) => {
    const push = load.moving
      ? Math.abs(load.moving.force) * height * height
      : Math.abs(first.factors?.[index] ?? 0) * height * (load.measures?.largest ?? 0);
    return (
      sum + 64 * EPS * (stillTerms(quantity, load, place) + drivenTerms(quantity, drifts ? push : 0, place))
    );
  }, 0);
}

function stillTerms(quantity: Quantity, load: AppliedLoad, place: LoadedPlace): number {
  const { gaugeTime, flexibility, softness } = place;
  const force = load.totalForce;
  // a free member's elastic shape is no softer than the member itself, whatever G says
  const reach = load.cancels
    ? force * (flexibility + softness)
    : Math.sqrt((load.still?.compliance ?? force * force * flexibility) * flexibility) + force * softness;
  const largest = load.moving ? 1 : (load.measures as HistoryMeasures).largest;
  const support = load.support?.motion.peaks(place.span) ?? { position: 0, velocity: 0 };
  // of a moving force P |∂G/∂z| v ≤ P v/k
  const pace = load.moving
    ? force * load.moving.pace * place.steepest
    : (load.measures as HistoryMeasures).largestRate * reach;
  const whole = load.moving ? 2 : historyAmount(load.measures as HistoryMeasures).whole;
  switch (quantity) {
    case 'relativeDisplacement':
    case 'displacement':
      return largest * reach + support.position;
    case 'velocity':
      return gaugeTime > 0
        ? (2 * (largest + whole) * reach + support.position) / gaugeTime + support.velocity
        : pace + support.velocity;
    case 'acceleration':
      return gaugeTime > 0 ? support.velocity / gaugeTime : 0;
    case 'force':
    case 'stress':
      return largest * force * passed(load, place) + support.position / (softness || 1);
  }
}

/** Of a moving force the average flux is the difference of two integrals along the member. */
function passed(load: AppliedLoad, { length, gaugeTime }: LoadedPlace): number {
  return load.moving !== null && gaugeTime > 0 ? 1 + (2 * length) / (load.moving.pace * gaugeTime) : 1;
}

/** The rigid-body mode under a push of constant size: ½ a t², a t, a. */
function drivenTerms(quantity: Quantity, push: number, place: LoadedPlace): number {
  const { span, gaugeTime } = place;
  switch (quantity) {
    case 'relativeDisplacement':
    case 'displacement':
      return push * span * span;
    case 'velocity':
      return push * span + (gaugeTime > 0 ? (2 * push * span * span) / gaugeTime : 0);
    case 'acceleration':
      return push + (gaugeTime > 0 ? (2 * push * span) / gaugeTime : 0);
    case 'force':
    case 'stress':
      return 0;
  }
}

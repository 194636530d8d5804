import type { CheckVerdict, SeparationCriterion } from '../../spec/types.ts';
import { ratio, shown, shownModes, worstOf, type Outcome } from './criterion-outcome.ts';
import type { EnclosedFrequency, KnownModes } from './known-modes.ts';

/** Where a natural frequency is excited by one band at one multiple, Hz. */
interface Excitation {
  readonly from: number;
  readonly to: number;
  readonly name: string;
}

/** How far a natural frequency is from an excitation. */
interface Distance {
  readonly mode: EnclosedFrequency;
  readonly excitation: Excitation;
  /** As a fraction of the edge; 0 inside. */
  readonly separation: number;
  readonly error: number;
  readonly verdict: CheckVerdict;
}

/** Rounding of the edges, relative. */
const EDGE = 4 * Number.EPSILON;

/**
 * Whether multiples of all natural frequencies keep a margin from bands of excitation: 1 for forced
 * excitation; 2 for parametric excitation, whose principal instability lies where the excitation has twice
 * the natural frequency (Lord Rayleigh, The Theory of Sound, 2nd ed., §68b, from memory). A band from a to b
 * excites by the multiple k between a/k and b/k. The modes are counted, so none is missed up to the highest.
 */
export function checkSeparation(
  { bands, margin, multiples }: SeparationCriterion,
  modes: KnownModes,
  pointer: string,
): Outcome {
  const excitations = bands.flatMap(([from, to]) =>
    multiples.map((multiple) => ({
      from: from / multiple,
      to: to / multiple,
      name: `${shown(from)} to ${shown(to)} Hz${multiple === 1 ? '' : ` by ${shown(multiple)} times its frequency`}`,
    })),
  );
  const highest = excitations.reduce((most, { to }) => Math.max(most, to), 0) * (1 + margin);
  const known = modes.upTo(highest, `${pointer}/bands`);
  const distances = known.flatMap((mode) =>
    excitations.map((excitation) => distanceOf(mode, excitation, margin)),
  );
  if (distances.length === 0) {
    const statement = 'The member has no vibrating mode, so nothing is near a band of excitation.';
    return { verdict: 'pass', demand: null, bound: null, limit: margin, utilisation: null, statement };
  }
  const verdict = worstOf(distances.map((one) => one.verdict));
  const near = distances.reduce((a, b) => (b.separation < a.separation ? b : a));
  const offenders = (kind: CheckVerdict): number[] => [
    ...new Set(distances.filter((one) => one.verdict === kind).map((one) => one.mode.order)),
  ];
  const concerned = verdict === 'pass' ? [near.mode.order] : offenders(verdict);
  const place = `the nearest is mode ${near.mode.order} at ${shown(near.mode.frequency)} Hz, ${percent(near.separation)} from the band ${near.excitation.name}`;
  const means = {
    pass: `Every natural frequency keeps ${percent(margin)} from the bands of excitation; ${place}.`,
    fail: `${capital(shownModes(concerned))} ${concerned.length === 1 ? 'does' : 'do'} not keep ${percent(margin)} from the bands of excitation; ${place}.`,
    undetermined: `Whether ${shownModes(concerned)} ${concerned.length === 1 ? 'keeps' : 'keep'} ${percent(margin)} from the bands of excitation is within rounding; ${place}.`,
  }[verdict];
  return {
    verdict,
    demand: near.separation,
    bound: near.error,
    limit: margin,
    utilisation: ratio(margin, near.separation),
    statement: `${means} ${counted(known, highest)}`,
    remedy: 'Move the bands or the margin by more than rounding.',
    modes: concerned,
    frequency: near.mode.frequency,
  };
}

function distanceOf(mode: EnclosedFrequency, excitation: Excitation, margin: number): Distance {
  const { from, to } = excitation;
  const { frequency, lower, upper } = mode;
  const below = from * (1 - margin);
  const above = to * (1 + margin);
  const clear = upper <= below * (1 - EDGE) || lower >= above * (1 + EDGE);
  const inside = lower > below * (1 + EDGE) && upper < above * (1 - EDGE);
  const verdict = clear ? 'pass' : inside ? 'fail' : 'undetermined';
  const edge = frequency < from ? from : to;
  const separation = frequency < from ? 1 - frequency / from : frequency > to ? frequency / to - 1 : 0;
  const error = edge > 0 ? Math.max(upper - frequency, frequency - lower) / edge + EDGE : 0;
  // A band at 0 Hz is infinitely far in its own measure.
  return {
    mode,
    excitation,
    separation: Number.isFinite(separation) ? separation : Number.MAX_VALUE,
    error,
    verdict,
  };
}

function percent(fraction: number): string {
  return `${shown(100 * fraction)} %`;
}

function capital(text: string): string {
  return text[0].toUpperCase() + text.slice(1);
}

function counted(known: readonly EnclosedFrequency[], highest: number): string {
  const count = known.filter(({ frequency }) => frequency <= highest).length;
  const up = `up to ${shown(highest)} Hz`;
  if (count === 0) return `No natural frequency lies ${up}: they were counted.`;
  return `${count === 1 ? 'The one natural frequency' : `All ${count} natural frequencies`} ${up} ${count === 1 ? 'was' : 'were'} counted.`;
}

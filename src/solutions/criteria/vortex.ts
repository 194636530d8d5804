import type { CheckVerdict, VortexCriterion } from '../../spec/types.ts';
import { ratio, shown, shownModes, worstOf, type Outcome } from './criterion-outcome.ts';
import type { EnclosedFrequency, KnownModes } from './known-modes.ts';

interface ShedMode {
  readonly mode: EnclosedFrequency;
  /** Speed of the wind at which vortices are shed at its frequency, m/s. */
  readonly speed: number;
  readonly error: number;
  readonly verdict: CheckVerdict;
}

const EDGE = 8 * Number.EPSILON;

/**
 * Whether vortices are shed at a natural frequency for some speed within a range of wind: f = St U/D
 * (V. Strouhal, Über eine besondere Art der Tonerregung, Annalen der Physik 241, 1878), critical speed
 * f D/St, the relation of EN 1991-1-4, Annex E (E.2), where St = 0.18 for circular cylinders (from memory).
 * It says where lock-in begins, not how large the motion becomes.
 */
export function checkVortex(
  { diameter, strouhal, wind }: VortexCriterion,
  modes: KnownModes,
  pointer: string,
): Outcome {
  const [from, to] = wind;
  const highest = (strouhal * to) / diameter;
  const shed = modes
    .upTo(highest * (1 + EDGE), `${pointer}/wind`)
    .map((mode) => speedOf(mode, diameter / strouhal, from, to));
  const range = `between ${shown(from)} and ${shown(to)} m/s`;
  if (shed.length === 0) {
    const statement = `The member has no vibrating mode, so no vortices shed by wind ${range} excite it.`;
    return { verdict: 'pass', demand: null, bound: null, limit: to, utilisation: null, statement };
  }
  const verdict = worstOf(shed.map((one) => one.verdict));
  const use = ({ speed }: ShedMode): number => Math.min(to / speed, from > 0 ? speed / from : Infinity);
  const nearest = shed.reduce((a, b) => (use(b) > use(a) ? b : a));
  const concerned = shed.filter((one) => one.verdict === verdict).map(({ mode }) => mode.order);
  const shedding = `vortices are shed at ${shown((strouhal * from) / diameter)} to ${shown(highest)} Hz`;
  const place = `mode ${nearest.mode.order} (${shown(nearest.mode.frequency)} Hz) is excited at ${shown(nearest.speed)} m/s`;
  const excited = shed
    .filter((one) => one.verdict === 'fail')
    .slice(0, 8)
    .map(({ mode, speed }) => `mode ${mode.order} at ${shown(speed)} m/s`);
  const statement = {
    pass: `Wind ${range} excites no mode by vortices: ${shedding}, and the nearest, ${place}.`,
    fail: `Wind ${range} excites ${shownModes(concerned)} by vortices: ${shedding}; lock-in of ${excited.join(', ')}${concerned.length > 8 ? ', …' : ''}.`,
    undetermined: `Whether wind ${range} excites ${shownModes(concerned)} by vortices is within rounding: ${shedding}, and ${place}.`,
  }[verdict];
  return {
    verdict,
    demand: nearest.speed,
    bound: nearest.error,
    limit: from > 0 && nearest.speed / from < to / nearest.speed ? from : to,
    utilisation: ratio(use(nearest), 1),
    statement,
    remedy: 'Move the range of wind by more than rounding.',
    modes: verdict === 'pass' ? [nearest.mode.order] : concerned,
    frequency: nearest.mode.frequency,
  };
}

function speedOf(mode: EnclosedFrequency, length: number, from: number, to: number): ShedMode {
  const lowest = mode.lower * length * (1 - EDGE);
  const highest = mode.upper * length * (1 + EDGE);
  const speed = mode.frequency * length;
  const verdict =
    highest < from || lowest > to ? 'pass' : lowest > from && highest < to ? 'fail' : 'undetermined';
  return { mode, speed, error: Math.max(highest - speed, speed - lowest), verdict };
}

import type { Member, PeakCriterion, Quantity, ResponsesRequest } from '../../spec/types.ts';
import { frontJumps, type FrontJump } from '../../motion/front-jumps.ts';
import { unitOf } from '../quantity-units.ts';
import { ratio, shown, type Outcome } from './criterion-outcome.ts';
import type { PeakFinding } from './settle-peaks.ts';

/** Fronts that a statement lists. */
const MOST_FRONTS = 20;

/** The outcome of a criterion on a peak, from what its runs have certified. */
export function peakOutcome(
  criterion: PeakCriterion,
  request: ResponsesRequest,
  finding: PeakFinding,
): Outcome {
  const { quantity, limit } = criterion;
  const { verdict, value, upper, at, time, lacking, run } = finding;
  const gaugeTime = isAveraged(quantity) ? run.basis.gaugeTime : 0;
  const demand = upper === null ? value : Math.min(value, upper);
  const found = finding.bound !== null || upper !== null;
  const fronts = gaugeTime > 0 || !found ? knownFronts(quantity, finding) : [];
  return {
    verdict,
    // Of a cut series of irregular data nothing is certain: what it shows is no demand.
    demand: found ? demand : null,
    bound: found && upper !== null ? upper - demand : null,
    limit,
    utilisation: found ? ratio(demand, limit) : null,
    statement: [
      statementOf(criterion, request, finding, gaugeTime, demand, found),
      frontStatement(quantity, fronts, run.basis.member.kind),
    ]
      .filter((sentence) => sentence !== '')
      .join(' '),
    ...(lacking !== null && { remedy: remedyOf(lacking, quantity, gaugeTime, finding) }),
    ...(found && { at, time }),
    ...(fronts.length > 0 && { fronts }),
  };
}

function isAveraged(quantity: Quantity): boolean {
  return quantity !== 'displacement' && quantity !== 'relativeDisplacement';
}

function statementOf(
  criterion: PeakCriterion,
  request: ResponsesRequest,
  { verdict, upper, lower, at, time, run, modesUsed }: PeakFinding,
  gaugeTime: number,
  demand: number,
  found: boolean,
): string {
  const { quantity, limit } = criterion;
  const unit = plainUnit(unitOf(quantity, run.basis.member.kind));
  const name = nameOf(quantity, request.member.kind);
  const average = gaugeTime > 0 ? `, averaged over ${shown(gaugeTime)} s,` : '';
  const times = run.answer.fields.times;
  const span = `from ${shown(times[0])} s to ${shown(times[times.length - 1])} s`;
  const places = criterion.at === undefined ? null : [criterion.at].flat();
  const where =
    places === null
      ? 'anywhere on the member'
      : places.length <= 5
        ? `at ${places.map(shown).join(', ')} m`
        : `at the ${places.length} positions named`;
  const subject = `The ${name}${average}`;
  const sampled = `the largest sampled value is ${shown(demand)} ${unit} at ${shown(at)} m and ${shown(time)} s`;
  const sure = upper === null ? '' : `, certainly not above ${shown(upper)} ${unit}`;
  const series = `(${modesUsed} ${modesUsed === 1 ? 'mode' : 'modes'})`;
  switch (verdict) {
    case 'pass':
      return `${subject} stays at or below ${shown(limit)} ${unit} ${where} ${span}: ${sampled}${sure} ${series}.${gaugeTime > 0 ? ' It is the average that passes, not the value at an instant.' : ''}`;
    case 'fail':
      return `${subject} exceeds ${shown(limit)} ${unit} ${places === null ? 'somewhere on the member' : where} ${span}: ${sampled}, certainly not below ${shown(lower)} ${unit} at its peak ${series}.`;
    case 'undetermined':
      return found
        ? `Whether the ${name}${average} stays at or below ${shown(limit)} ${unit} ${where} ${span} is not settled: its peak lies between ${shown(lower)} ${unit} and ${upper === null ? 'a value without limit' : `${shown(upper)} ${unit}`} ${series}.`
        : `Whether the ${name}${average} stays at or below ${shown(limit)} ${unit} ${where} ${span} cannot be said: the data are irregular, so the series has no bound at an instant.`;
  }
}

/** Names of the trade: the flux of a cable is its transverse force, of a shaft its torque. */
function nameOf(quantity: Quantity, kind: Member['kind']): string {
  if (quantity === 'relativeDisplacement') return 'displacement relative to the supports';
  if (quantity !== 'force') return quantity;
  return {
    cable: 'transverse force',
    shaft: 'torque',
    'shear-column': 'shear force',
    bar: 'axial force',
    wave: 'force',
  }[kind];
}

function plainUnit(unit: string): string {
  return unit.replace('s2', 's²').replace('.', '·');
}

function remedyOf(
  lacking: NonNullable<PeakFinding['lacking']>,
  quantity: Quantity,
  gaugeTime: number,
  { modesUsed, mostModes }: PeakFinding,
): string {
  switch (lacking) {
    case 'limit':
      return isAveraged(quantity) && gaugeTime === 0 && quantity !== 'acceleration'
        ? 'Give a "gaugeTime", over which a real gauge averages: averages have a bound where values at an instant have none.'
        : 'Give smoother data (shapes without kinks, histories without jumps), or check the displacement.';
    case 'modes':
      return modesUsed >= mostModes
        ? `More modes: ${modesUsed} were used, as many as the request allows; raise "maxModes".`
        : `More modes: ${modesUsed} were used and "maxModes" allows ${mostModes}, but so many with so many samples cost more than one check may; sample fewer positions or times.`;
    case 'samples':
      return 'Denser samples: shorten the time span, or name the positions that matter with "at". With many modes in the motion a "gaugeTime" helps velocity, force and stress.';
    case 'rounding':
      return 'Nothing but another limit: rounding hides what is left of the series.';
  }
}

/** Fronts of the force, as stress where that is checked; none of other quantities. */
function knownFronts(quantity: Quantity, { run }: PeakFinding): FrontJump[] {
  if (quantity !== 'force' && quantity !== 'stress') return [];
  const { member, loads = [], span } = run.basis;
  return frontJumps(member, run.state, loads, span)
    .toSorted((a, b) => b.force - a.force)
    .slice(0, MOST_FRONTS)
    .toSorted((a, b) => a.at - b.at);
}

function frontStatement(quantity: Quantity, fronts: readonly FrontJump[], kind: Member['kind']): string {
  if (fronts.length === 0) return '';
  const unit = plainUnit(unitOf('force', kind));
  const listed = fronts
    .slice(0, 3)
    .map(({ at, force }) => `${shown(force)} ${unit} at ${shown(at)} m`)
    .join(', ');
  const more = fronts.length > 3 ? ` and ${fronts.length - 3} more` : '';
  const what = quantity === 'stress' ? 'the force (stress times section)' : 'it';
  return `Fronts start in the motion at which ${what} jumps at once, impedance times jump of velocity: ${listed}${more}.`;
}

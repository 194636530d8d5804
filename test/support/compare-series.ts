import type { Field, Quantity, ResponsesAnswer } from '../../src/spec/types.ts';

/** One claim of an answer that the longer series contradicts. */
export interface Violation {
  readonly claim: string;
  readonly where: string;
  /** What was found, and the most that the two claims together allow. */
  readonly found: number;
  readonly allowed: number;
}

/** What one comparison brought. */
export interface Comparison {
  readonly violations: Violation[];
  /** Largest (difference − uncertainty of the longer series)/bound, by `quantity kind`. */
  readonly ratios: Map<string, number>;
}

/** The rounding of adding two bounds. */
const ROUNDING = 1 + 4 * Number.EPSILON;

function numbersIn(value: unknown, path: string, visit: (x: number, path: string) => void): void {
  if (typeof value === 'number') visit(value, path);
  else if (ArrayBuffer.isView(value) || Array.isArray(value)) {
    const list = value as unknown as ArrayLike<unknown>;
    for (let i = 0; i < list.length; i++) numbersIn(list[i], `${path}/${i}`, visit);
  } else if (value !== null && typeof value === 'object') {
    for (const [key, each] of Object.entries(value)) numbersIn(each, `${path}/${key}`, visit);
  }
}

/** Weights of the sampled positions for an r.m.s. over the member: mass for displacement and velocity, compliance for force. */
export interface RmsWeights {
  readonly velocity: readonly number[];
  readonly force: readonly number[];
}

/**
 * Holds an answer to a much longer series of the same motion. The difference of the two is at most the sum
 * of both bounds: that is all that may be concluded, and all that is checked.
 */
export function compareSeries(
  short: ResponsesAnswer,
  long: ResponsesAnswer,
  weights?: RmsWeights,
): Comparison {
  const violations: Violation[] = [];
  const ratios = new Map<string, number>();
  const demand = (claim: string, where: string, found: number, allowed: number): void => {
    if (!(found <= allowed)) violations.push({ claim, where, found, allowed });
  };
  for (const answer of [short, long]) {
    numbersIn(answer, '', (value, path) => {
      if (!Number.isFinite(value))
        violations.push({ claim: 'finite', where: path, found: value, allowed: 0 });
    });
  }
  const raise = (key: string, ratio: number): void => {
    if (ratio > (ratios.get(key) ?? 0)) ratios.set(key, ratio);
  };
  const positions = short.fields.positions;
  const times = short.fields.times;
  for (const quantity of [
    'displacement',
    'relativeDisplacement',
    'velocity',
    'acceleration',
    'force',
  ] as const) {
    const a = short.fields[quantity];
    const b = long.fields[quantity];
    if (a === undefined || b === undefined) continue;
    if (a.boundKind !== b.boundKind) {
      // A member of finitely many modes has exact values once all are kept, whatever its data.
      if (a.boundKind === 'rms' && b.verdict === 'complete') continue;
      // A force faster than the waves on bedding is bounded once the kept modes lie above the cut-off.
      if (a.boundKind === 'rms' && a.verdict === 'irregular-data' && quantity.endsWith('isplacement'))
        continue;
      violations.push({
        claim: `${quantity} kind`,
        where: `${a.boundKind} ${b.boundKind}`,
        found: 1,
        allowed: 0,
      });
      continue;
    }
    if (a.boundKind === 'rms') {
      if (weights !== undefined && quantity !== 'acceleration') {
        const weight = quantity === 'force' ? weights.force : weights.velocity;
        compareRms(quantity, a, b, weight, demand, raise, times);
      }
      continue;
    }
    const key = `${quantity} ${a.boundKind}`;
    if (a.bound === null || b.bound === null) {
      // No bound is claimed; the verdict must say so.
      demand(`${quantity} without bound`, a.verdict, a.verdict === 'irregular-data' ? 0 : 1, 0);
      continue;
    }
    const [boundA, boundB] = [a.bound, b.bound];
    for (let row = 0; row < times.length; row++) {
      for (let column = 0; column < positions.length; column++) {
        const difference = Math.abs(a.values[row][column] - b.values[row][column]);
        const where = `x = ${positions[column]}, t = ${times[row]}`;
        demand(key, where, difference, (boundA[column] + boundB[column]) * ROUNDING);
        if (boundA[column] > 0) raise(key, (difference - boundB[column]) / boundA[column]);
        const upper = short.peaks[quantity]?.upper;
        if (upper != null) {
          demand(
            `${quantity} upper`,
            where,
            Math.abs(b.values[row][column]),
            (upper + boundB[column]) * ROUNDING,
          );
        }
        if (quantity === 'displacement') {
          const { displacementBound } = short.convergence;
          if (displacementBound !== null)
            demand('displacementBound', where, difference, (displacementBound + boundB[column]) * ROUNDING);
        }
      }
    }
  }
  compareEnergies(short, long, demand);
  return { violations, ratios };
}

type Demand = (claim: string, where: string, found: number, allowed: number) => void;

function compareRms(
  quantity: Quantity,
  a: Field,
  b: Field,
  weights: readonly number[],
  demand: Demand,
  raise: (key: string, ratio: number) => void,
  times: ArrayLike<number>,
): void {
  if (a.rms === undefined || b.rms === undefined) {
    // The energy does not bound k β u_xt: no number is claimed for the total flux under Rayleigh β.
    demand(`${quantity} without bound`, a.verdict, a.verdict === 'irregular-data' ? 0 : 1, 0);
    return;
  }
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  for (let row = 0; row < times.length; row++) {
    let sum = 0;
    weights.forEach((weight, column) => {
      sum += weight * (a.values[row][column] - b.values[row][column]) ** 2;
    });
    const found = Math.sqrt(sum / total);
    // The samples integrate the square of the difference to about 1 %.
    demand(`${quantity} rms`, `t = ${times[row]}`, found, (a.rms + b.rms) * 1.01);
    raise(`${quantity} rms`, (found - b.rms) / a.rms);
  }
}

function compareEnergies(short: ResponsesAnswer, long: ResponsesAnswer, demand: Demand): void {
  const { energy, modesUsed, ceiling } = short.convergence;
  // Captured energy carries the rounding of every shape, a hundred ulp at most.
  demand('captured', '', energy.captured, energy.total * (1 + 1e-11));
  let beyond = 0;
  for (let n = modesUsed; n < long.coefficients.length; n++) beyond += long.coefficients[n].energy;
  // The coefficients of the longer series round too: 1e-9 of the largest amplitude, squared.
  demand('tail', '', beyond, energy.tail * (1 + 1e-9) + 1e-18 * energy.total);
  const first = long.coefficients[0];
  const field = long.fields.displacement;
  if (field !== undefined && first !== undefined && first.angularFrequency > 0 && ceiling !== null) {
    field.values.forEach((row, i) =>
      row.forEach((value, j) =>
        demand(
          'ceiling',
          `row ${i}, column ${j}`,
          Math.abs(value),
          (ceiling + (field.bound?.[j] ?? 0)) * ROUNDING,
        ),
      ),
    );
  }
}

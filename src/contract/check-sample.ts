import { faultRecord, type FaultRecord } from '../faults/fault.ts';
import { ANSWER_VALUES } from '../solutions/limits.ts';
import type { ModesRequest, Positions, Sample, Times } from '../spec/types.ts';
import { checkPosition, type Span } from './check-position.ts';

/** What in a sample does not fit together or not to the member. */
export function checkSample({ positions, times, quantities }: Sample, span: Span | null): FaultRecord[] {
  const counts = {
    positions: countOf(positions),
    times: countOf(times),
    quantities: quantities.length,
  };
  return [
    ...checkPositions(positions, '/sample/positions', span),
    ...checkTimes(times),
    ...checkSize(counts, '/sample'),
  ];
}

/** What in the mode shapes asked for does not fit together or not to the member. */
export function checkShapesRequest(
  shapes: ModesRequest['shapes'],
  modes: number,
  span: Span | null,
): FaultRecord[] {
  if (shapes === undefined) return [];
  const counts = {
    positions: countOf(shapes.positions),
    modes,
    quantities: shapes.quantities.length,
  };
  return [...checkPositions(shapes.positions, '/shapes/positions', span), ...checkSize(counts, '/shapes')];
}

function countOf(grid: Positions | Times): number {
  return Array.isArray(grid) ? grid.length : grid.count;
}

function checkPositions(positions: Positions, pointer: string, span: Span | null): FaultRecord[] {
  if (!Array.isArray(positions) || span === null) return [];
  const faults: FaultRecord[] = [];
  for (let index = 0; index < positions.length && faults.length < 50; index++) {
    if (positions[index] > span.limit) {
      faults.push(...checkPosition(positions[index], `${pointer}/${index}`, span));
    }
  }
  return faults;
}

function checkTimes(times: Times): FaultRecord[] {
  if (!Array.isArray(times)) {
    const { start, end } = times;
    return end > start ? [] : [faultRecord('time-span-empty', '/sample/times/end', { start, end })];
  }
  const stray = times.findIndex((time, index) => index > 0 && !(time > times[index - 1]));
  if (stray < 0) return [];
  const values = { time: times[stray], before: times[stray - 1] };
  return [faultRecord('times-not-ascending', `/sample/times/${stray}`, values)];
}

/** A fault where the product of these counts is more than one answer holds. */
export function checkSize(counts: Readonly<Record<string, number>>, pointer: string): FaultRecord[] {
  const count = Object.values(counts).reduce((product, factor) => product * factor, 1);
  if (count <= ANSWER_VALUES) return [];
  const what = Object.entries(counts)
    .map(([name, number]) => `${number} ${name}`)
    .join(' × ');
  return [faultRecord('too-many-values', pointer, { count, what, limit: ANSWER_VALUES })];
}

import { cellIntegral, cellIntegralTo, cellValue } from './cell-functions.ts';

/** Longest step by which every travel time and every break (measured in travel time) is a whole number of steps. */
export function commonStep(times: readonly number[]): number {
  let step = 0;
  const tolerance = 1e-9 * Math.max(...times);
  for (const time of times) {
    let a = Math.max(step, time);
    let b = Math.min(step, time);
    while (b > tolerance) {
      const rest = a - b * Math.round(a / b);
      a = b;
      b = Math.abs(rest);
    }
    step = a;
  }
  return step;
}

/** A cell function together with its integral over all cells before it. */
interface Cell {
  readonly values: number[];
  readonly before: number;
}

/** Values by time of a wave where it arrives at a node. */
export class WaveRecord {
  readonly cells: Cell[] = [];
  private total = 0;
  private readonly step: number;

  constructor(step: number) {
    this.step = step;
  }

  push(values: number[]): void {
    this.cells.push({ values, before: this.total });
    this.total += this.step * cellIntegral(values);
  }

  private locate(time: number): { cell: Cell; theta: number } {
    const index = Math.min(Math.max(Math.floor(time / this.step), 0), this.cells.length - 1);
    return { cell: this.cells[index], theta: Math.min(Math.max(time / this.step - index, 0), 1) };
  }

  value(time: number): number {
    const { cell, theta } = this.locate(time);
    return cellValue(cell.values, theta);
  }

  /** Integral from time 0. */
  integral(time: number): number {
    const { cell, theta } = this.locate(time);
    return cell.before + this.step * cellIntegralTo(cell.values, theta);
  }
}

import type { WaveMember } from '../members/wave-member.ts';
import { evenGrid, HarmonicTable, type EvenGrid } from '../numerics/harmonic-table.ts';
import { ENDS, evaluateShape, waveNumberSquare, type ModeShape } from './mode-shape.ts';
import type { Stations } from './stations.ts';

/** Stations that follow each other on one segment. */
interface Run {
  readonly segment: number;
  readonly from: number;
  readonly to: number;
  /** Distances as an even grid, where they form one. */
  readonly grid: EvenGrid | null;
}

/**
 * Samples φ and p of mode shapes at fixed stations. Evenly spaced stations on one segment are
 * evaluated by two-level angle addition ({@link HarmonicTable}), segment ends are copied.
 *
 * Cost a mode: about 4 multiplications an even station, two elementary functions any other.
 */
export class ShapeSampler {
  private readonly member: WaveMember;
  private readonly stations: Stations;
  private readonly runs: Run[] = [];
  private readonly table = new HarmonicTable();
  private readonly cosine: Float64Array;
  private readonly sine: Float64Array;
  private readonly pair = new Float64Array(2);

  constructor(member: WaveMember, stations: Stations) {
    this.member = member;
    this.stations = stations;
    const { segment, distance } = stations;
    let longest = 0;
    for (let from = 0, to = 0; from < segment.length; from = to) {
      while (to < segment.length && segment[to] === segment[from]) to++;
      this.runs.push({ segment: segment[from], from, to, grid: evenGrid(distance, from, to) });
      longest = Math.max(longest, to - from);
    }
    this.cosine = new Float64Array(longest);
    this.sine = new Float64Array(longest);
  }

  /** φ (1/√kg) and p (N/√kg) at the stations. */
  sample(shape: ModeShape, displacement: Float64Array, flux: Float64Array): void {
    for (const run of this.runs) {
      const square = waveNumberSquare(this.member, run.segment, shape.lambda);
      if (run.grid !== null && square * this.member.length[run.segment] ** 2 > 1e-8)
        this.sampleEven(shape, run, run.grid, square, displacement, flux);
      else this.sampleEach(shape, run, displacement, flux);
    }
  }

  private sampleEven(
    shape: ModeShape,
    run: Run,
    grid: EvenGrid,
    square: number,
    displacement: Float64Array,
    flux: Float64Array,
  ): void {
    const { cosine, sine } = this;
    const kappa = Math.sqrt(square);
    const impedance = this.member.stiffness[run.segment] * kappa;
    this.table.fill(kappa, grid.start, grid.step, grid.count, cosine, sine);
    const u = shape.ends[ENDS * run.segment];
    const p = shape.ends[ENDS * run.segment + 1];
    const v = p / impedance;
    const w = impedance * u;
    for (let m = 0, q = run.from; q < run.to; m++, q++) {
      displacement[q] = u * cosine[m] + v * sine[m];
      flux[q] = p * cosine[m] - w * sine[m];
    }
    this.copyEnds(shape, run, displacement, flux);
  }

  private sampleEach(shape: ModeShape, run: Run, displacement: Float64Array, flux: Float64Array): void {
    const { pair } = this;
    const { distance } = this.stations;
    const length = this.member.length[run.segment];
    for (let q = run.from; q < run.to; q++) {
      if (distance[q] === 0 || distance[q] === length) continue;
      evaluateShape(this.member, shape, run.segment, distance[q], pair);
      displacement[q] = pair[0];
      flux[q] = pair[1];
    }
    this.copyEnds(shape, run, displacement, flux);
  }

  /** Segment ends as they were marched, exact at fixed ends. */
  private copyEnds(shape: ModeShape, run: Run, displacement: Float64Array, flux: Float64Array): void {
    const { distance } = this.stations;
    const length = this.member.length[run.segment];
    const at = ENDS * run.segment;
    for (let q = run.from; q < run.to; q++) {
      if (distance[q] === 0) {
        displacement[q] = shape.ends[at];
        flux[q] = shape.ends[at + 1];
      } else if (distance[q] === length) {
        displacement[q] = shape.ends[at + 2];
        flux[q] = shape.ends[at + 3];
      }
    }
  }
}

/** The stations from one index to another as stations of their own. */
export function stationSlice(stations: Stations, from: number, to: number): Stations {
  return {
    position: stations.position.subarray(from, to),
    segment: stations.segment.subarray(from, to),
    distance: stations.distance.subarray(from, to),
  };
}

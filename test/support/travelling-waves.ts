import { cellIntegral, cellPoints, cellWeights, integrationMatrix } from './cell-functions.ts';
import { solveDense } from './gauss.ts';
import { lengthOf, nodePositions, segmentAt, type PlainMember } from './plain-member.ts';
import { commonStep, WaveRecord } from './wave-record.ts';

/** Initial state: displacement with its slope and velocity, each smooth between the given breaks. */
export interface InitialState {
  readonly displacement: (x: number) => number;
  readonly slope: (x: number) => number;
  readonly velocity: (x: number) => number;
  /** Velocity of the lump at each node; the value of `velocity` there when left out. */
  readonly nodeVelocities?: readonly (number | undefined)[];
  /** Positions where a piece begins or ends. */
  readonly breaks: readonly number[];
}

/**
 * Exact motion of a member without foundation and damping, by the method of characteristics.
 *
 * On a segment u_t = a(t − ξ/c) + b(t + ξ/c) and p = Z(b − a), Z = √(kρ); at a node
 * M v′ + (Z₋ + Z₊) v + K u = 2 Z₋ a + 2 Z₊ b. Between fronts every function is smooth and held by 16
 * Gauss points a cell of `step` seconds, so the only error is rounding as long as Z·step/M and
 * step·√(K/M) stay below about 2. Needs segments with inertia and commensurate travel times and breaks.
 * Source: d'Alembert and Riemann; any text on waves in rods, e.g. K. F. Graff, Wave Motion in Elastic
 * Solids, 1975, ch. 2 (from memory). Cost O(segments · duration/step).
 */
export class TravellingWaves {
  readonly step: number;
  private readonly member: PlainMember;
  private readonly state: InitialState;
  private readonly positions: number[];
  private readonly speeds: number[];
  private readonly impedances: number[];
  private readonly delays: number[];
  /** Right-going wave at the far end and left-going wave at the near end of each segment. */
  private readonly toFar: WaveRecord[] = [];
  private readonly toNear: WaveRecord[] = [];

  /** @param refinement cells are this many times finer than fronts ask for */
  constructor(member: PlainMember, state: InitialState, duration: number, refinement = 1) {
    this.member = member;
    this.state = state;
    this.positions = nodePositions(member);
    this.speeds = member.segments.map(({ stiffness, inertia }) => Math.sqrt(stiffness / inertia));
    this.impedances = member.segments.map(({ stiffness, inertia }) => Math.sqrt(stiffness * inertia));
    const travel = member.segments.map(({ length }, i) => length / this.speeds[i]);
    const fronts = state.breaks
      .filter((x) => x > 0 && x < lengthOf(member))
      .map((x) => {
        const i = segmentAt(member, x);
        return (x - this.positions[i]) / this.speeds[i];
      });
    this.step = commonStep([...travel, ...fronts.filter((time) => time > 1e-12 * travel[0])]) / refinement;
    this.delays = travel.map((time) => Math.round(time / this.step));
    this.begin();
    this.march(Math.ceil(duration / this.step) + 1);
  }

  private begin(): void {
    const { displacement: _, slope, velocity } = this.state;
    this.member.segments.forEach((segment, i) => {
      const near = this.positions[i];
      const speed = this.speeds[i];
      const far = new WaveRecord(this.step);
      const back = new WaveRecord(this.step);
      for (let m = 0; m < this.delays[i]; m++) {
        const fromFar: number[] = [];
        const fromNear: number[] = [];
        for (const theta of cellPoints) {
          const share = (m + theta) / this.delays[i];
          const x = near + segment.length * (1 - share);
          fromFar.push((velocity(x) - speed * slope(x)) / 2);
          const y = near + segment.length * share;
          fromNear.push((velocity(y) + speed * slope(y)) / 2);
        }
        far.push(fromFar);
        back.push(fromNear);
      }
      this.toFar.push(far);
      this.toNear.push(back);
    });
  }

  private march(cells: number): void {
    const { member, step, impedances } = this;
    const last = member.segments.length;
    const u = this.positions.map((x) => this.state.displacement(x));
    const v = this.positions.map((x, i) => this.state.nodeVelocities?.[i] ?? this.state.velocity(x));
    const systems = this.positions.map((_, node) => {
      const mass = member.masses[node];
      const spring = member.springs[node];
      const damping = (node > 0 ? impedances[node - 1] : 0) + (node < last ? impedances[node] : 0);
      const size = cellPoints.length;
      return Array.from({ length: size }, (_row, i) =>
        Array.from({ length: size }, (_column, j) => {
          const once = step * integrationMatrix[i][j];
          if (mass === 0) return (i === j ? damping : 0) + spring * once;
          let twice = 0;
          if (spring !== 0)
            for (let q = 0; q < size; q++) {
              twice += step * step * integrationMatrix[i][q] * integrationMatrix[q][j];
            }
          return (i === j ? mass : 0) + damping * once + spring * twice;
        }),
      );
    });
    for (let m = 0; m < cells; m++) {
      const velocities = this.positions.map((_, node) => {
        const held = (node === 0 && member.nearFixed) || (node === last && member.farFixed);
        if (held) return cellPoints.map(() => 0);
        const left = node > 0 ? this.toFar[node - 1].cells[m].values : undefined;
        const right = node < last ? this.toNear[node].cells[m].values : undefined;
        const push = cellPoints.map(
          (_point, i) =>
            2 * (left === undefined ? 0 : impedances[node - 1] * left[i]) +
            2 * (right === undefined ? 0 : impedances[node] * right[i]) -
            member.springs[node] * u[node],
        );
        const mass = member.masses[node];
        const side =
          mass === 0
            ? push
            : integrationMatrix.map(
                (row) => mass * v[node] + step * row.reduce((sum, weight, j) => sum + weight * push[j], 0),
              );
        const values = solveDense(systems[node], side);
        if (mass > 0) {
          const damping = (node > 0 ? impedances[node - 1] : 0) + (node < last ? impedances[node] : 0);
          let impulse = 0;
          for (let i = 0; i < cellPoints.length; i++) {
            let moved = 0;
            for (let j = 0; j < cellPoints.length; j++) moved += step * integrationMatrix[i][j] * values[j];
            impulse += step * cellWeights[i] * (push[i] - damping * values[i] - member.springs[node] * moved);
          }
          v[node] += impulse / mass;
        }
        u[node] += step * cellIntegral(values);
        return values;
      });
      member.segments.forEach((_, i) => {
        const arrivedFar = this.toFar[i].cells[m].values;
        const arrivedNear = this.toNear[i].cells[m].values;
        this.toFar[i].push(velocities[i].map((value, q) => value - arrivedNear[q]));
        this.toNear[i].push(velocities[i + 1].map((value, q) => value - arrivedFar[q]));
      });
    }
  }

  private place(x: number, side: 'near' | 'far'): { segment: number; delayNear: number; delayFar: number } {
    let segment = segmentAt(this.member, x);
    if (side === 'far' && x === this.positions[segment + 1] && segment < this.member.segments.length - 1)
      segment++;
    const delayNear = (x - this.positions[segment]) / this.speeds[segment];
    return { segment, delayNear, delayFar: this.delays[segment] * this.step - delayNear };
  }

  displacement(x: number, time: number): number {
    const { segment, delayNear, delayFar } = this.place(x, 'near');
    const a = this.toFar[segment];
    const b = this.toNear[segment];
    return (
      this.state.displacement(x) +
      (a.integral(time + delayFar) - a.integral(delayFar)) +
      (b.integral(time + delayNear) - b.integral(delayNear))
    );
  }

  velocity(x: number, time: number): number {
    const { segment, delayNear, delayFar } = this.place(x, 'near');
    return this.toFar[segment].value(time + delayFar) + this.toNear[segment].value(time + delayNear);
  }

  /** Flux k u_x on the near side of a node, or on its far side. */
  force(x: number, time: number, side: 'near' | 'far' = 'near'): number {
    const { segment, delayNear, delayFar } = this.place(x, side);
    const difference =
      this.toNear[segment].value(time + delayNear) - this.toFar[segment].value(time + delayFar);
    return this.impedances[segment] * difference;
  }

  /** Average of the flux over [start, end]. */
  forceAverage(x: number, start: number, end: number, side: 'near' | 'far' = 'near'): number {
    const { segment, delayNear, delayFar } = this.place(x, side);
    const a = this.toFar[segment];
    const b = this.toNear[segment];
    const impulse =
      b.integral(end + delayNear) -
      b.integral(start + delayNear) -
      (a.integral(end + delayFar) - a.integral(start + delayFar));
    return (this.impedances[segment] * impulse) / (end - start);
  }

  /** Average of the velocity over [start, end]. */
  velocityAverage(x: number, start: number, end: number): number {
    return (this.displacement(x, end) - this.displacement(x, start)) / (end - start);
  }
}

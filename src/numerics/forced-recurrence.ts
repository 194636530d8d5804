import { LANES, marchPlain, STEP, type Forcing } from './plain-recurrence.ts';
import { RECURRENCE_KERNEL } from './recurrence-kernel.ts';
import { growTo, WasmKernel, type KernelMemory } from './wasm-kernel.ts';

/** Addresses in the kernel's memory, in bytes: steps, states, forcing. */
const STATES = 8 * STEP.length * LANES;
const FORCING = STATES + 8 * 2 * LANES;

interface Kernel {
  readonly memory: KernelMemory;
  march(forcing: number, bytes: number, stops: number, count: number, out: number, lane: number): void;
  marchBent(forcing: number, bytes: number, stops: number, count: number, out: number, lane: number): void;
}

const recurrence = new WasmKernel<Kernel>(RECURRENCE_KERNEL);

/**
 * Four linear recurrences of two numbers under the same forcing, in double precision,
 *
 *   p ← (pl load + pr climb + pc bend) + (pp p + pv v),
 *   v ← (pv load + pl climb + pr bend + blow) + (vp p + vv v),
 *
 * by a SIMD kernel (recurrence-kernel.wat) that holds a copy of the forcing. Every lane is summed in
 * the order of {@link marchPlain}, without fused or relaxed operations: same bits there, alone and in
 * company. Memory: 16 bytes an interval (32 with bends or blows) and 68 a stop.
 * Cost: about four cycles an interval and lane.
 */
export class ForcedRecurrence {
  private readonly intervals: number;
  private readonly kernel: Kernel | null;
  private readonly bent: boolean;
  private readonly forcing: Forcing;
  /** Stops and tables after the forcing, of that many stops. */
  private room = 0;
  private stops = new Int32Array(0);
  private tables = new Float64Array(0);
  /** Numbers of the steps, shape [7][LANES], and p and v, shape [2][LANES]: set before a run, states after it. */
  steps = new Float64Array(STEP.length * LANES);
  states = new Float64Array(2 * LANES);

  /** @param simd whether to use the kernel; else the plain loop */
  constructor(forcing: Forcing, simd = canRun()) {
    this.forcing = forcing;
    this.intervals = forcing.value.length;
    this.bent = forcing.curve !== null || forcing.kick !== null;
    this.kernel = simd ? recurrence.instantiate() : null;
    if (this.kernel !== null) this.hold(this.kernel);
  }

  private get forcingEnd(): number {
    return FORCING + (this.bent ? 32 : 16) * this.intervals;
  }

  private hold({ memory }: Kernel): void {
    const { value, slope, curve, kick } = this.forcing;
    growTo(memory, this.forcingEnd);
    this.view(memory);
    const tables = this.bent ? [value, slope, curve, kick?.subarray(1) ?? null] : [value, slope];
    tables.forEach((table, index) => {
      if (table === null) return;
      new Float64Array(memory.buffer, FORCING + 8 * index * value.length, value.length).set(table);
    });
  }

  private view({ buffer }: KernelMemory): void {
    this.steps = new Float64Array(buffer, 0, STEP.length * LANES);
    this.states = new Float64Array(buffer, STATES, 2 * LANES);
  }

  /**
   * Runs the lanes from the states before the first interval and leaves in `states` those at the last stop.
   *
   * @param stops numbers of intervals, ascending, after which a state is kept
   * @returns p and v at the stops, shape [2][LANES][stops], until the next run
   */
  run(stops: Int32Array): Float64Array {
    const count = stops.length;
    const { kernel } = this;
    if (count > this.room) this.makeRoom(count);
    if (kernel === null) {
      marchPlain(this.forcing, this.steps, this.states, stops, this.tables);
      return this.tables;
    }
    this.stops.set(stops);
    const places = [
      FORCING,
      8 * this.intervals,
      this.stops.byteOffset,
      count,
      this.tables.byteOffset,
    ] as const;
    if (this.bent) kernel.marchBent(...places, 8 * count);
    else kernel.march(...places, 8 * count);
    return this.tables;
  }

  private makeRoom(count: number): void {
    this.room = count;
    if (this.kernel === null) {
      this.tables = new Float64Array(2 * LANES * count);
      return;
    }
    const { memory } = this.kernel;
    const tables = this.forcingEnd + 8 * Math.ceil(count / 2);
    const { steps, states } = this;
    const kept = [steps.slice(), states.slice()];
    if (growTo(memory, tables + 8 * 2 * LANES * count)) {
      this.view(memory);
      this.steps.set(kept[0]);
      this.states.set(kept[1]);
    }
    this.stops = new Int32Array(memory.buffer, this.forcingEnd, count);
    this.tables = new Float64Array(memory.buffer, tables, 2 * LANES * count);
  }
}

let runs: boolean | null = null;

/** Whether this engine compiles the kernel: not without WebAssembly or a processor's 128-bit vectors. */
function canRun(): boolean {
  if (runs === null) {
    try {
      recurrence.instantiate();
      runs = true;
    } catch {
      runs = false;
    }
  }
  return runs;
}

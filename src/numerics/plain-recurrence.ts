/** Recurrences that run at once: one alone waits for its own last sum at every interval. */
export const LANES = 4;

/** What drives the recurrences on each interval: load + climb s + bend s²/2, and a blow at its end. */
export interface Forcing {
  /** Shape [intervals]. */
  readonly value: Float64Array;
  readonly slope: Float64Array;
  readonly curve: Float64Array | null;
  /** Shape [intervals + 1]; the first stands before all intervals and is not read. */
  readonly kick: Float64Array | null;
}

/** The numbers of a step over one interval, in their order. */
export const STEP = ['pp', 'pv', 'pl', 'pr', 'vp', 'vv', 'pc'] as const;

/**
 * The recurrences of `ForcedRecurrence` as a plain loop, two lanes at once: where there are no
 * vectors of doubles, and what the kernel is held to bit for bit.
 *
 * @param steps shape [7][LANES]
 * @param states p and v, shape [2][LANES], before the first interval; left at the last stop
 * @param out p and v at the stops, shape [2][LANES][stops]
 */
export function marchPlain(
  forcing: Forcing,
  steps: Float64Array,
  states: Float64Array,
  stops: Int32Array,
  out: Float64Array,
): void {
  for (let lane = 0; lane < LANES; lane += 2) marchPair(forcing, steps, states, stops, out, lane);
}

function marchPair(
  { value, slope, curve, kick }: Forcing,
  steps: Float64Array,
  states: Float64Array,
  stops: Int32Array,
  out: Float64Array,
  lane: number,
): void {
  const [app, apv, apl, apr, avp, avv, apc] = stepOf(steps, lane);
  const [bpp, bpv, bpl, bpr, bvp, bvv, bpc] = stepOf(steps, lane + 1);
  let p1 = states[lane];
  let v1 = states[LANES + lane];
  let p2 = states[lane + 1];
  let v2 = states[LANES + lane + 1];
  const plain = curve === null && kick === null;
  const count = stops.length;
  for (let j = 0, i = 0; j < count; j++) {
    const to = stops[j];
    if (plain) {
      for (; i < to; i++) {
        const load = value[i];
        const climb = slope[i];
        const q1 = apl * load + apr * climb + (app * p1 + apv * v1);
        v1 = apv * load + apl * climb + (avp * p1 + avv * v1);
        p1 = q1;
        const q2 = bpl * load + bpr * climb + (bpp * p2 + bpv * v2);
        v2 = bpv * load + bpl * climb + (bvp * p2 + bvv * v2);
        p2 = q2;
      }
    } else {
      for (; i < to; i++) {
        const load = value[i];
        const climb = slope[i];
        const bend = curve === null ? 0 : curve[i];
        const blow = kick === null ? 0 : kick[i + 1];
        const q1 = apl * load + apr * climb + apc * bend + (app * p1 + apv * v1);
        v1 = apv * load + apl * climb + apr * bend + blow + (avp * p1 + avv * v1);
        p1 = q1;
        const q2 = bpl * load + bpr * climb + bpc * bend + (bpp * p2 + bpv * v2);
        v2 = bpv * load + bpl * climb + bpr * bend + blow + (bvp * p2 + bvv * v2);
        p2 = q2;
      }
    }
    out[lane * count + j] = p1;
    out[(lane + 1) * count + j] = p2;
    out[(LANES + lane) * count + j] = v1;
    out[(LANES + lane + 1) * count + j] = v2;
  }
  states[lane] = p1;
  states[LANES + lane] = v1;
  states[lane + 1] = p2;
  states[LANES + lane + 1] = v2;
}

/** The numbers of a lane's step, in the order of STEP. */
function stepOf(steps: Float64Array, lane: number): number[] {
  return STEP.map((_, number) => steps[number * LANES + lane]);
}

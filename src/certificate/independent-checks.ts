import type { WaveMember } from '../members/wave-member.ts';
import { ENDS } from '../modes/mode-shape.ts';
import { nodeDisplacement } from '../modes/shape-figures.ts';
import type { AppliedLoad } from '../motion/applied-loads.ts';
import { GatheredField } from './gathered-field.ts';
import type { KeptMode } from './kept-modes.ts';
import { PowerBalance } from './power-balance.ts';
import { QuadratureGrid } from './quadrature-grid.ts';

/** What the checks found; each is relative and of the order of rounding when all is well. */
export interface CheckResults {
  /** Largest |energy by quadrature − (initial − dissipated)| over the initial energy. */
  readonly drift: number;
  /** Largest off-diagonal of the mass Gram matrix by quadrature. */
  readonly orthogonality: number;
  /** Largest residual of the segment equation and the node conditions. */
  readonly residual: number;
}

/** Products of modes, points and instants that the checks may spend. */
const WORK = 4e6;
/** Points beyond which a grid is not worth its time: the checks are then left out. */
const LARGEST_GRID = 1_000_000;
/** Share of a mode's largest displacement and flux below which a place counts as quiet. */
const QUIET = 1e-3;
/** Instants of the energy balance at most. */
const INSTANTS = 64;
/** Shapes held for the pairs far apart at most; 45 shapes make 990 pairs. */
const HELD = 45;

/**
 * Checks of the kept modes and of their motion that use none of the closed forms: everything is
 * integrated on a grid of Gauss panels.
 *
 * - balance: the energy of the summed fields (kept modes) at up to 64 of the sampled instants against
 *   their initial energy, the work of the loads and what damping took ({@link PowerBalance});
 * - orthogonality: neighbours (n, n+1), (n, n+2) and all pairs of up to 45 shapes spread over the
 *   spectrum;
 * - residual: momentum and compatibility of each segment, Δp + ∫(ω²ρ − s)φ and Δφ − ∫p/k, and the
 *   force balance of each node, relative to the terms.
 *
 * Of long series every m-th triple of modes is checked and fewer instants are taken, so that the
 * cost stays near 4e6 multiplications; null where one shape alone would need a million points.
 */
export function checkIndependently(
  member: WaveMember,
  kept: readonly KeptMode[],
  times: Float64Array,
  energy: number,
  loads: readonly AppliedLoad[] = [],
): CheckResults | null {
  const highest = kept[kept.length - 1].mode.shape.lambda;
  const grid = new QuadratureGrid(member, highest);
  const perMode = grid.size;
  if (perMode > LARGEST_GRID) return null;
  const most = Math.max(1, Math.min(INSTANTS, Math.floor(WORK / (2 * perMode * kept.length))));
  const balance = new PowerBalance(member, loads, times, Math.sqrt(highest), most, kept.length);
  const { instants } = balance;
  const balanced = perMode * kept.length <= 2 * WORK;
  const stride = Math.max(1, Math.ceil((perMode * kept.length) / WORK));

  const speed = balanced ? new GatheredField(instants.length, perMode) : null;
  const flux = balanced ? new GatheredField(instants.length, perMode) : null;
  const nodeSpeed = Array.from(instants, () => new Float64Array(member.segmentCount + 1));
  const nodePlace = Array.from(instants, () => new Float64Array(member.segmentCount + 1));
  const bedded = member.foundation.some((s) => s > 0);
  const place = balanced && bedded ? new GatheredField(instants.length, perMode) : null;

  const mostHeld = Math.max(2, Math.min(HELD, Math.floor(Math.sqrt((2 * WORK) / perMode))));
  const heldEvery = Math.max(1, Math.ceil(kept.length / mostHeld));
  const held: { shape: KeptMode; u: Float64Array }[] = [];
  const before: { shape: KeptMode; u: Float64Array }[] = [];
  const spare: Float64Array[] = [];
  const p = new Float64Array(perMode);
  let orthogonality = 0;
  let residual = 0;
  let initial = 0;
  for (let n = 0; n < kept.length; n++) {
    const due = n % heldEvery === 0;
    if (!balanced && n % (3 * stride) >= 3 && !due) continue;
    const { mode, start } = kept[n];
    // u stays with the shape for its neighbours; buffers of shapes let go are used again
    const u = spare.pop() ?? new Float64Array(perMode);
    grid.sample(mode.shape, u, p);
    residual = Math.max(residual, shapeResidual(member, grid, kept[n], u, p));
    for (const other of before) {
      orthogonality = Math.max(
        orthogonality,
        Math.abs(product(member, grid, kept[n], u, other.shape, other.u)),
      );
    }
    before.push({ shape: kept[n], u });
    if (before.length > 2) {
      const gone = before.shift() as { u: Float64Array };
      if (!held.some((other) => other.u === gone.u)) spare.push(gone.u);
    }
    if (due) {
      for (const other of held) {
        orthogonality = Math.max(
          orthogonality,
          Math.abs(product(member, grid, kept[n], u, other.shape, other.u)),
        );
      }
      held.push({ shape: kept[n], u });
    }
    if (!balanced) continue;
    initial += start.energy;
    const { q, v } = balance.add(kept[n]);
    speed?.add(v, u);
    flux?.add(q, p);
    place?.add(q, u);
    for (let j = 0; j < instants.length; j++) {
      for (let node = 0; node <= member.segmentCount; node++) {
        const phi = nodeDisplacement(mode.shape, node);
        nodeSpeed[j][node] += phi * v[j];
        nodePlace[j][node] += phi * q[j];
      }
    }
  }

  let drift = 0;
  const size = Math.max(energy, balance.largestWork);
  if (speed !== null && flux !== null && size > 0) {
    const [speeds, fluxes, places] = [speed.rows(), flux.rows(), place?.rows()];
    for (let j = 0; j < instants.length; j++) {
      const sum = fieldEnergy(member, grid, speeds[j], fluxes[j], places?.[j], nodeSpeed[j], nodePlace[j]);
      drift = Math.max(drift, Math.abs(sum + balance.taken[j] - initial) / size);
    }
  }
  return { drift, orthogonality, residual };
}

function fieldEnergy(
  member: WaveMember,
  grid: QuadratureGrid,
  speed: Float64Array,
  flux: Float64Array,
  place: Float64Array | undefined,
  nodeSpeed: Float64Array,
  nodePlace: Float64Array,
): number {
  let energy = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    const [from, to] = grid.range(i);
    const rho = member.inertia[i];
    const soft = 1 / member.stiffness[i];
    const s = member.foundation[i];
    for (let x = from; x < to; x++) {
      energy +=
        0.5 *
        grid.weights[x] *
        (rho * speed[x] * speed[x] + soft * flux[x] * flux[x] + (place ? s * place[x] * place[x] : 0));
    }
  }
  for (let j = 0; j <= member.segmentCount; j++) {
    energy += 0.5 * (member.mass[j] * nodeSpeed[j] ** 2 + member.spring[j] * nodePlace[j] ** 2);
  }
  return energy;
}

function product(
  member: WaveMember,
  grid: QuadratureGrid,
  a: KeptMode,
  u: Float64Array,
  b: KeptMode,
  w: Float64Array,
): number {
  let total = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    if (member.inertia[i] === 0) continue;
    const [from, to] = grid.range(i);
    let sum = 0;
    for (let x = from; x < to; x++) sum += grid.weights[x] * u[x] * w[x];
    total += member.inertia[i] * sum;
  }
  for (let j = 0; j <= member.segmentCount; j++) {
    if (member.mass[j] === 0) continue;
    total += member.mass[j] * nodeDisplacement(a.mode.shape, j) * nodeDisplacement(b.mode.shape, j);
  }
  return total;
}

function shapeResidual(
  member: WaveMember,
  grid: QuadratureGrid,
  kept: KeptMode,
  u: Float64Array,
  p: Float64Array,
): number {
  const { lambda, ends } = kept.mode.shape;
  // quiet places are held against a thousandth of the mode's own size, not against their own rounding
  let quietU = 0;
  let quietP = 0;
  for (let at = 0; at < ends.length; at += 2) {
    quietU = Math.max(quietU, QUIET * Math.abs(ends[at]));
    quietP = Math.max(quietP, QUIET * Math.abs(ends[at + 1]));
  }
  for (let x = 0; x < u.length; x++) {
    quietU = Math.max(quietU, QUIET * Math.abs(u[x]));
    quietP = Math.max(quietP, QUIET * Math.abs(p[x]));
  }
  let worst = 0;
  for (let i = 0; i < member.segmentCount; i++) {
    const [from, to] = grid.range(i);
    let sumU = 0;
    let sumP = 0;
    let sizeU = 0;
    let sizeP = 0;
    for (let x = from; x < to; x++) {
      const wu = grid.weights[x] * u[x];
      const wp = grid.weights[x] * p[x];
      sumU += wu;
      sumP += wp;
      sizeU += Math.abs(wu);
      sizeP += Math.abs(wp);
    }
    const density = lambda * member.inertia[i] - member.foundation[i];
    const [uNear, pNear, uFar, pFar] = ends.subarray(ENDS * i, ENDS * i + ENDS);
    const soft = 1 / member.stiffness[i];
    worst = Math.max(
      worst,
      ratio(
        pFar - pNear + density * sumU,
        Math.abs(pFar) + Math.abs(pNear) + Math.abs(density) * sizeU + quietP,
      ),
      ratio(uFar - uNear - soft * sumP, Math.abs(uFar) + Math.abs(uNear) + soft * sizeP + quietU),
    );
    const impedance = density > 0 ? Math.sqrt(density * member.stiffness[i]) : 0;
    const next = i + 1 < member.segmentCount ? ends[ENDS * (i + 1) + 1] : 0;
    if (i + 1 < member.segmentCount || !member.farFixed) {
      worst = Math.max(worst, nodeResidual(member, lambda, i + 1, uFar, pFar, next, impedance, quietP));
    }
    if (i === 0 && !member.nearFixed) {
      worst = Math.max(worst, nodeResidual(member, lambda, 0, uNear, 0, pNear, impedance, quietP));
    }
  }
  return worst;
}

/** Force balance p⁺ − p⁻ = (K − ω² M) φ of a node, relative to its terms and to the wave beside it. */
function nodeResidual(
  member: WaveMember,
  lambda: number,
  node: number,
  u: number,
  before: number,
  after: number,
  impedance: number,
  quiet: number,
): number {
  const spring = member.spring[node];
  const inertia = lambda * member.mass[node];
  const size = Math.abs(after) + Math.abs(before) + (spring + inertia + impedance) * Math.abs(u) + quiet;
  return ratio(after - before - (spring - inertia) * u, size);
}

function ratio(defect: number, size: number): number {
  return size > 1e-200 ? Math.abs(defect) / size : 0;
}

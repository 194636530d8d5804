/**
 * What one modal coordinate, q″ + c q′ + ω² q = p, does over a stretch h of time: free motion from
 * unit states and motion from rest under p = 1 and under p = t.
 */
export interface LinearStep {
  /** q and q′ from q = 1. */
  readonly positionOfPosition: number;
  readonly velocityOfPosition: number;
  /** q and q′ from q′ = 1. */
  readonly positionOfVelocity: number;
  readonly velocityOfVelocity: number;
  /** q and q′ under p = 1 from rest. */
  readonly positionOfLoad: number;
  readonly velocityOfLoad: number;
  /** q and q′ under p = t from rest. */
  readonly positionOfRate: number;
  readonly velocityOfRate: number;
  /** q under p = t²/2 from rest; its q′ is positionOfRate. */
  readonly positionOfCurve: number;
}

/** Below this ω h and c h the closed forms cancel and the power series of the solution is summed. */
const SHORT = 0.8;
const TERMS = 26;

/**
 * The exact step, for any damping and for ω = 0 (N. C. Nigam and P. C. Jennings, "Calculation of
 * response spectra from strong-motion earthquake records", Bull. Seism. Soc. Am. 59, 1969, for the
 * under-damped case). With S the motion from unit velocity,
 *
 *   q₁ = ∫S = (1 − S′ − c S)/ω²,  q_t = ∫q₁ = (h − S − c q₁)/ω²,  and ∫q_t likewise,
 *
 * over-damped with the decay rates s₁ ≤ s₂ and the entire functions (1 − e^{−x})/x and
 * (x − 1 + e^{−x})/x², so that a slow root costs no digits; short steps by series. Smooth through
 * critical damping. Accuracy: a few 2⁻⁵² of each entry's scale over the step. Cost: O(1).
 */
export function linearStep(omega: number, rate: number, h: number): LinearStep {
  const lambda = omega * omega;
  if (omega * h < SHORT && rate * h < SHORT) return seriesStep(lambda, rate, h);
  const half = 0.5 * rate;
  let s: number;
  let v: number;
  let load: number;
  let slope: number;
  let curve: number;
  if (half < omega) {
    const damped = Math.sqrt((omega - half) * (omega + half));
    const fade = Math.exp(-half * h);
    const x = damped * h;
    s = fade * (x < 1e-4 ? h * (1 - (x * x) / 6) : Math.sin(x) / damped);
    v = fade * Math.cos(x) - half * s;
    load = (1 - v - rate * s) / lambda;
    slope = (h - s - rate * load) / lambda;
    curve = (0.5 * h * h - load - rate * slope) / lambda;
  } else {
    const mu = Math.sqrt((half - omega) * (half + omega));
    const quick = half + mu;
    const slow = lambda / quick;
    if (mu * h < 1e-2) {
      // nearly critical, not short: entire in μ²
      const fade = Math.exp(-half * h);
      const x = mu * h;
      s = fade * h * (1 + (x * x) / 6 + x ** 4 / 120);
      v = fade * (1 + (x * x) / 2 + x ** 4 / 24) - half * s;
      load = (1 - v - rate * s) / lambda;
      slope = (h - s - rate * load) / lambda;
      curve = (0.5 * h * h - load - rate * slope) / lambda;
    } else {
      const gap = 2 * mu;
      const e1 = Math.exp(-slow * h);
      const e2 = Math.exp(-quick * h);
      s = (-e1 * Math.expm1(-gap * h)) / gap;
      v = (quick * e2 - slow * e1) / gap;
      load = (h * (once(slow * h) - once(quick * h))) / gap;
      slope = (h * h * (twice(slow * h) - twice(quick * h))) / gap;
      curve = (h * h * h * (thrice(slow * h) - thrice(quick * h))) / gap;
    }
  }
  return {
    positionOfPosition: v + rate * s,
    velocityOfPosition: -lambda * s,
    positionOfVelocity: s,
    velocityOfVelocity: v,
    positionOfLoad: load,
    velocityOfLoad: s,
    positionOfRate: slope,
    velocityOfRate: load,
    positionOfCurve: curve,
  };
}

/** (1 − e^{−x})/x. */
function once(x: number): number {
  return x < 1e-8 ? 1 - 0.5 * x : -Math.expm1(-x) / x;
}

/** (x − 1 + e^{−x})/x². */
function twice(x: number): number {
  if (x > 0.5) return (x + Math.expm1(-x)) / (x * x);
  let term = 0.5;
  let sum = term;
  for (let m = 3; m < 18; m++) {
    term *= -x / m;
    sum += term;
  }
  return sum;
}

/** (x²/2 − x + 1 − e^{−x})/x³. */
function thrice(x: number): number {
  if (x > 0.5) return (0.5 * x * x - x - Math.expm1(-x)) / (x * x * x);
  let term = 1 / 6;
  let sum = term;
  for (let m = 4; m < 20; m++) {
    term *= -x / m;
    sum += term;
  }
  return sum;
}

/** S = Σ a_m h^m with a_1 = 1, a_{m+2} = −(c (m+1) a_{m+1} + ω² a_m)/((m+1)(m+2)), and its integrals. */
function seriesStep(lambda: number, rate: number, h: number): LinearStep {
  let a = 0;
  let b = 1;
  let power = 1;
  let s = 0;
  let v = 0;
  let load = 0;
  let slope = 0;
  let curve = 0;
  for (let m = 0; m < TERMS; m++) {
    // a = a_m, b = a_{m+1}
    s += a * power;
    v += (m + 1) * b * power;
    load += (a * power * h) / (m + 1);
    slope += (a * power * h * h) / ((m + 1) * (m + 2));
    curve += (a * power * h * h * h) / ((m + 1) * (m + 2) * (m + 3));
    const next = -(rate * (m + 1) * b + lambda * a) / ((m + 1) * (m + 2));
    a = b;
    b = next;
    power *= h;
  }
  return {
    positionOfPosition: v + rate * s,
    velocityOfPosition: -lambda * s,
    positionOfVelocity: s,
    velocityOfVelocity: v,
    positionOfLoad: load,
    velocityOfLoad: s,
    positionOfRate: slope,
    velocityOfRate: load,
    positionOfCurve: curve,
  };
}

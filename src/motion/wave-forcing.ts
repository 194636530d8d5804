import {
  add,
  complex,
  divide,
  exponential,
  modulus,
  multiply,
  scale,
  subtract,
  type Complex,
} from '../numerics/complex.ts';

/** A forcing Re(amplitude · e^{rate t}). */
export interface WaveForcing {
  readonly amplitude: Complex;
  /** 1/s; iΩ for a harmonic. */
  readonly rate: Complex;
}

/** Motion from rest after a time. */
export interface Moved {
  position: number;
  velocity: number;
}

/** Detuning |a² + ca + ω²|/(ω² + |a|²) below which the particular solution is not used. */
const NEAR_RESONANCE = 1e-2;

/** Whether a forcing is so near a root of the modal equation that its particular solution cancels. */
export function nearResonance(omega: number, rate: number, forcing: WaveForcing): boolean {
  const a = forcing.rate;
  const square = multiply(a, a);
  const denominator = add(add(square, scale(a, rate)), complex(omega * omega));
  return modulus(denominator) < NEAR_RESONANCE * (omega * omega + modulus(square) + modulus(a) * rate);
}

/** The particular solution z/(a² + ca + ω²) as amplitude. */
export function particularAmplitude(omega: number, rate: number, forcing: WaveForcing): Complex {
  const a = forcing.rate;
  const denominator = add(add(multiply(a, a), scale(a, rate)), complex(omega * omega));
  return divide(forcing.amplitude, denominator);
}

/**
 * q and q′ from rest under Re(z e^{at}), as the divided difference of e^{xt} over a and the two roots:
 *
 *   q = Re(z f[a, s₁, s₂]),  q′ = Re(z (a f[a, s₁, s₂] + f[s₁, s₂])),  f(x) = e^{xt}.
 *
 * Exact and smooth when a meets a root (resonance) and when the roots meet (critical damping): the two
 * points farthest apart are divided by their distance, differences of near points are taken as
 * t e^{(x+y)t/2} sinh((x−y)t/2)/((x−y)t/2). Cost: O(1), three complex exponentials.
 */
export function movedFromRest(omega: number, rate: number, forcing: WaveForcing, t: number): Moved {
  const a = forcing.rate;
  const half = 0.5 * rate;
  let first: Complex;
  let second: Complex;
  if (half < omega) {
    const damped = Math.sqrt((omega - half) * (omega + half));
    first = complex(-half, damped);
    second = complex(-half, -damped);
  } else {
    const mu = Math.sqrt((half - omega) * (half + omega));
    const quick = half + mu;
    first = complex(quick > 0 ? (-omega * omega) / quick : 0);
    second = complex(-quick);
  }
  const roots = differenceOf(first, second, t);
  const nearFirst = modulus(subtract(a, first)) < modulus(subtract(a, second));
  const near = nearFirst ? first : second;
  const far = nearFirst ? second : first;
  // f[a, near, far] = (f[a, near] − f[near, far])/(a − far): a is farther from `far` than from `near`
  const gap = subtract(a, far);
  const triple =
    modulus(gap) * t < 1e-5
      ? scale(exponential(scale(add(a, add(first, second)), t / 3)), 0.5 * t * t)
      : divide(subtract(differenceOf(a, near, t), roots), gap);
  const position = multiply(forcing.amplitude, triple);
  const velocity = multiply(forcing.amplitude, add(multiply(a, triple), roots));
  return { position: position.re, velocity: velocity.re };
}

/** (e^{xt} − e^{yt})/(x − y). */
function differenceOf(x: Complex, y: Complex, t: number): Complex {
  const half = scale(subtract(x, y), 0.5 * t);
  if (modulus(half) > 0.5)
    return divide(subtract(exponential(scale(x, t)), exponential(scale(y, t))), subtract(x, y));
  const middle = exponential(scale(add(x, y), 0.5 * t));
  const square = multiply(half, half);
  let sum = complex(1);
  for (let m = 8; m >= 1; m--) sum = add(complex(1), scale(multiply(square, sum), 1 / (2 * m * (2 * m + 1))));
  return scale(multiply(middle, sum), t);
}

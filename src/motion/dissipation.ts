/**
 * Energy that damping takes from one free modal coordinate up to t, ∫₀ᵗ c q′² dt, J, from the closed
 * form of q′² (not from the energy left):
 *
 *   q′ = Re(z e^{st}),  s = −c/2 + iω_d:   ∫q′² = ½|z|² ∫e^{−ct} + ½ Re(z² ∫e^{2st}),
 *
 * over-damped with two decaying exponentials in the same way. Near critical damping (within 1 % of
 * it), where the form cancels, the change of the energy itself is taken.
 */
export function dissipatedEnergy(a: number, v: number, omega: number, rate: number, t: number): number {
  if (omega === 0) return 0.5 * v * v * -Math.expm1(-2 * rate * t);
  const half = 0.5 * rate;
  const lambda = omega * omega;
  const square = lambda - half * half;
  const d = lambda * a + half * v;
  if (square > 0.01 * lambda) {
    const damped = Math.sqrt(square);
    const zr = v;
    const zi = d / damped;
    // q′ = e^{−ct/2}(v cos − (d/ω_d) sin) = Re[(v + i d/ω_d) e^{st}]
    const plain = 0.5 * (zr * zr + zi * zi) * (-Math.expm1(-rate * t) / rate);
    const fade = Math.exp(-rate * t);
    const er = fade * Math.cos(2 * damped * t) - 1;
    const ei = fade * Math.sin(2 * damped * t);
    // (e^{2st} − 1)/(2s), s = −c/2 + iω_d
    const size = rate * rate + 4 * square;
    const ir = (-rate * er + 2 * damped * ei) / size;
    const ii = (-rate * ei - 2 * damped * er) / size;
    const z2r = zr * zr - zi * zi;
    const z2i = 2 * zr * zi;
    return rate * (plain + 0.5 * (z2r * ir - z2i * ii));
  }
  if (square < -0.01 * lambda) {
    const mu = Math.sqrt(-square);
    const quick = half + mu;
    const slow = lambda / quick;
    const p = 0.5 * (v - d / mu);
    const q = 0.5 * (v + d / mu);
    const decayed = (r: number): number => -Math.expm1(-r * t) / r;
    return rate * (p * p * decayed(2 * slow) + 2 * p * q * decayed(rate) + q * q * decayed(2 * quick));
  }
  if (half * t > 300) return 0.5 * (v * v + lambda * a * a);
  const fade = Math.exp(-half * t);
  const c = square >= 0 ? Math.cos(Math.sqrt(square) * t) : Math.cosh(Math.sqrt(-square) * t);
  const x = Math.sqrt(Math.abs(square)) * t;
  const s = x < 1e-6 ? t : square > 0 ? (Math.sin(x) / x) * t : (Math.sinh(x) / x) * t;
  const position = fade * (a * c + (v + half * a) * s);
  const velocity = fade * (v * c - d * s);
  return 0.5 * (v * v + lambda * a * a - velocity * velocity - lambda * position * position);
}

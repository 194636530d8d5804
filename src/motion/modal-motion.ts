/**
 * Free motion of one modal coordinate, q″ + c q′ + ω² q = 0, exact at every time: sampled into two
 * tables, q and q′.
 *
 *   c < 2ω:  q = e^{−ct/2} [a cos ω_d t + (v + c a/2) sin ω_d t/ω_d],  ω_d² = ω² − c²/4
 *   c > 2ω:  the same with cosh and sinh, written with the slow rate ω²/(c/2 + μ), so that neither
 *            overflow nor cancellation occurs
 *   ω = 0:   q = a + v (1 − e^{−ct})/c, a + v t without damping
 *
 * Smooth through critical damping: sin ω_d t/ω_d is taken as an entire function. Cost: one sine and
 * cosine a time.
 *
 * @param a q(0), @param v q′(0), @param omega ω in rad/s, @param rate c in 1/s
 */
export function freeMotion(
  a: number,
  v: number,
  omega: number,
  rate: number,
  times: Float64Array,
  position: Float64Array,
  velocity: Float64Array,
): void {
  const count = times.length;
  if (omega === 0) {
    for (let j = 0; j < count; j++) {
      const t = times[j];
      position[j] = a + v * (rate > 0 ? -Math.expm1(-rate * t) / rate : t);
      velocity[j] = v * Math.exp(-rate * t);
    }
    return;
  }
  const half = 0.5 * rate;
  const lambda = omega * omega;
  if (half < omega) {
    const damped = half === 0 ? omega : Math.sqrt((omega - half) * (omega + half));
    const b = v + half * a;
    const d = lambda * a + half * v;
    for (let j = 0; j < count; j++) {
      const t = times[j];
      const phase = damped * t;
      const fade = half === 0 ? 1 : Math.exp(-half * t);
      const c = Math.cos(phase);
      const s = phase < 1e-4 ? t * (1 - (phase * phase) / 6) : Math.sin(phase) / damped;
      position[j] = fade * (a * c + b * s);
      velocity[j] = fade * (v * c - d * s);
    }
    return;
  }
  const mu = Math.sqrt((half - omega) * (half + omega));
  const slow = lambda / (half + mu);
  for (let j = 0; j < count; j++) {
    const t = times[j];
    const fade = Math.exp(-slow * t);
    const quick = Math.exp(-2 * mu * t);
    const c = 0.5 * fade * (1 + quick);
    const s = mu === 0 ? fade * t : (-0.5 * fade * Math.expm1(-2 * mu * t)) / mu;
    position[j] = a * c + (v + half * a) * s;
    velocity[j] = v * c - (lambda * a + half * v) * s;
  }
}

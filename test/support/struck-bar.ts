/** Σ c_i θ^i, coefficients ascending. */
type Polynomial = readonly number[];

function evaluate(polynomial: Polynomial, theta: number): number {
  return polynomial.reduceRight((sum, coefficient) => sum * theta + coefficient, 0);
}

function derivative(polynomial: Polynomial): Polynomial {
  return polynomial.slice(1).map((coefficient, i) => coefficient * (i + 1));
}

/**
 * Impact of a rigid mass on the end of a bar whose other end is fixed, the mass staying in contact.
 *
 * Time τ in travel times L/c, stress in E V₀/c. The wave that leaves the struck end is
 * e(τ) = P_j(θ) e^{−θ/m}, θ = τ − 2j in [0, 2], with m = M/(ρAL) and P_j′ = P_{j−1}′ − (2/m) P_{j−1};
 * at τ = 2j the velocity e(τ) − e(τ − 2) of the mass is continuous. Stress at the struck end
 * e(τ) + e(τ − 2), at the fixed end 2 e(τ − 1).
 * Source: B. de Saint-Venant and Flamant 1883; S. P. Timoshenko & J. N. Goodier, Theory of Elasticity,
 * 3rd ed. 1970, Longitudinal Impact of Bars (from memory); re-derived.
 */
export class StruckBar {
  private readonly massRatio: number;
  private readonly pieces: Polynomial[] = [];

  /** @param massRatio m = mass over mass of the bar. @param duration largest τ asked for */
  constructor(massRatio: number, duration: number) {
    this.massRatio = massRatio;
    for (let j = 0; 2 * j <= duration; j++) {
      if (j === 0) {
        this.pieces.push([1]);
        continue;
      }
      const before = this.pieces[j - 1];
      const slope = before.map((value, i) => (derivative(before)[i] ?? 0) - (2 / massRatio) * value);
      const start = this.endOf(j - 1) + before[0] - (j > 1 ? this.endOf(j - 2) : 0);
      this.pieces.push([start, ...slope.map((value, i) => value / (i + 1))]);
    }
  }

  private endOf(j: number): number {
    return evaluate(this.pieces[j], 2) * Math.exp(-2 / this.massRatio);
  }

  /** Stress of the wave that leaves the struck end at τ, right-continuous. */
  wave(tau: number): number {
    if (tau < 0) return 0;
    const j = Math.min(Math.floor(tau / 2), this.pieces.length - 1);
    const theta = tau - 2 * j;
    return evaluate(this.pieces[j], theta) * Math.exp(-theta / this.massRatio);
  }

  /** ∫ of `wave` from 0 to τ. */
  waveIntegral(tau: number): number {
    let sum = 0;
    for (let j = 0; j < this.pieces.length && 2 * j < tau; j++) {
      const antiderivative = this.antiderivative(j);
      const theta = Math.min(tau - 2 * j, 2);
      sum += evaluate(antiderivative, theta) * Math.exp(-theta / this.massRatio) - antiderivative[0];
    }
    return sum;
  }

  /** Q with (Q e^{−θ/m})′ = P e^{−θ/m}. */
  private antiderivative(j: number): number[] {
    const piece = this.pieces[j];
    const result = Array.from<number>({ length: piece.length });
    for (let i = piece.length - 1; i >= 0; i--) {
      const higher = i + 1 < piece.length ? (i + 1) * result[i + 1] : 0;
      result[i] = this.massRatio * (higher - piece[i]);
    }
    return result;
  }

  struckEndStress(tau: number): number {
    return this.wave(tau) + this.wave(tau - 2);
  }

  fixedEndStress(tau: number): number {
    return 2 * this.wave(tau - 1);
  }

  massVelocity(tau: number): number {
    return this.wave(tau) - this.wave(tau - 2);
  }

  /** Displacement of the mass in V₀ L/c. */
  massDisplacement(tau: number): number {
    return this.waveIntegral(tau) - this.waveIntegral(tau - 2);
  }

  /** Average of the stress over [from, to] at a distance (in bar lengths) from the fixed end. */
  averageStress(distance: number, from: number, to: number): number {
    const integral = (tau: number): number =>
      this.waveIntegral(tau - (1 - distance)) + this.waveIntegral(tau - (1 + distance));
    return (integral(to) - integral(from)) / (to - from);
  }
}

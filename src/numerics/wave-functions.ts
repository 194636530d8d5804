/**
 * Solutions of y″ + κ² y = 0 for κ² of either sign, written with two entire functions of
 * a² = κ² h², so that nothing divides by zero where κ passes through zero:
 *
 *   C(a²) = cos a,  S(a²) = sin a / a      (cosh and sinh/a for a² < 0).
 */

/** Below this |a²| the closed forms (1 − C S)/(2 a²) and sin a / a lose digits; series take over. */
const SMALL_SQUARE = 0.25;

/** S(a²) = sin √a² / √a², entire; relative error a few ulp. */
export function sinc(square: number): number {
  if (square > SMALL_SQUARE) {
    const a = Math.sqrt(square);
    return Math.sin(a) / a;
  }
  if (square < -SMALL_SQUARE) {
    const a = Math.sqrt(-square);
    return Math.sinh(a) / a;
  }
  const q = -square;
  return (
    1 +
    (q / 6) *
      (1 + (q / 20) * (1 + (q / 42) * (1 + (q / 72) * (1 + (q / 110) * (1 + (q / 156) * (1 + q / 210))))))
  );
}

/** C(a²) = cos √a², entire. */
export function cosine(square: number): number {
  return square >= 0 ? Math.cos(Math.sqrt(square)) : Math.cosh(Math.sqrt(-square));
}

/**
 * R(a²) = (1 − C S)/(2 a²) = (1 − sin 2a / 2a)/(2 a²), the mean of sin² a ξ / a² over 0 ≤ ξ ≤ 1;
 * 1/3 at a = 0. Entire; a few ulp.
 */
export function sineSquareMean(square: number, c: number, s: number): number {
  if (square > SMALL_SQUARE || square < -SMALL_SQUARE) return (1 - c * s) / (2 * square);
  const q = -4 * square;
  // (sinc(4a²) − 1)/(−2a²), sinc(−q) − 1 = q/6 (1 + q/20 (1 + …))
  return (
    (1 / 3) *
    (1 +
      (q / 20) *
        (1 + (q / 42) * (1 + (q / 72) * (1 + (q / 110) * (1 + (q / 156) * (1 + (q / 210) * (1 + q / 272)))))))
  );
}

/**
 * Mean square over the stretch: (1/h)∫₀ʰ y² for y(x) = y₀ C + (h y₀′) ξ S, with slope = h y₀′.
 *
 *   y₀² (1 + C S)/2 + y₀ slope S² + slope² R
 *
 * Exact in exact arithmetic; loses digits only for decaying solutions with a² < −1, where
 * {@link meanSquareBetween} is to be used.
 */
export function meanSquare(y0: number, slope: number, square: number, c: number, s: number): number {
  return 0.5 * y0 * y0 * (1 + c * s) + y0 * slope * s * s + slope * slope * sineSquareMean(square, c, s);
}

/**
 * Mean square of an evanescent solution from its two end values, a = κ h > 0:
 *
 *   (1/h)∫ y² = (y₀² + y₁²)(cosh a sinh a − a)/(2a sinh² a) + y₀ y₁ (a cosh a − sinh a)/(a sinh² a)
 *
 * Written with e^{−a}, so that it neither overflows nor cancels for a ≥ 0.5.
 */
export function meanSquareBetween(y0: number, y1: number, a: number): number {
  const e = Math.exp(-a);
  const e2 = e * e;
  const d = 1 - e2;
  const own = (1 - e2 * e2 - 4 * a * e2) / (2 * a * d * d);
  const cross = (2 * e * (a * (1 + e2) - d)) / (a * d * d);
  return (y0 * y0 + y1 * y1) * own + y0 * y1 * cross;
}

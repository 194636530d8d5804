import { GAUSS_20, GAUSS_8, type QuadratureRule } from '../numerics/gauss-legendre.ts';
import { sinc } from '../numerics/wave-functions.ts';
import { derivedPowers, horner, waveSlope, waveValue, type Piece, type WaveTerm } from './piecewise-field.ts';

/** Largest phase of one Gauss panel. */
const PANEL = 3;
/** Phase below which 8 points are as good as 20 for a polynomial of degree up to 3. */
const SHORT = 0.5;

/**
 * ∫₀ʰ f y over a cell, f a piece and y a solution of y″ + κ² y = 0 given at both ends of the cell.
 *
 * Polynomials against a quick wave by repeated parts,
 *   ∫ f y = −Σ_m (−1)^m κ^{−2m−2} [f^{(2m)} y′ − f^{(2m+1)} y]₀ʰ,
 * two travelling waves by sum and difference of phases with sinc (no resonance to divide by), the
 * rest, where those forms cancel, by 20-point Gauss panels of phase at most 3 (rounding accuracy).
 * Cost: O(degree + waves), or O(phase) Gauss panels.
 */
export function pieceTimesWave(piece: Piece, y: WaveTerm): number {
  let total = 0;
  const { length } = piece;
  if (piece.powers.some((c) => c !== 0)) total += powersTimesWave(piece.powers, y, length);
  for (const term of piece.waves) total += waveTimesWave(term, y, length);
  return total;
}

/** ∫₀ʰ of a piece. */
export function pieceIntegral(piece: Piece): number {
  const powers = piece.powers.reduce((sum, c, j) => sum + c / (j + 1), 0) * piece.length;
  return piece.waves.reduce((sum, term) => sum + waveIntegral(term, piece.length), powers);
}

/**
 * ∫₀ʰ y of a wave, closed form without cancellation: y₀ h sinc a + y₀′ (h²/2) sinc²(a/2), or
 * (y₀ + y₁) tanh(a/2)/κ where it decays.
 */
export function waveIntegral(y: WaveTerm, h: number): number {
  const square = y.square * h * h;
  if (square < -1) {
    const kappa = Math.sqrt(-y.square);
    return ((y.value + y.farValue) * Math.tanh(0.5 * kappa * h)) / kappa;
  }
  const half = sinc(0.25 * square);
  return h * (y.value * sinc(square) + 0.5 * h * y.slope * half * half);
}

function powersTimesWave(powers: readonly number[], y: WaveTerm, h: number): number {
  if (powers.length === 1) return powers[0] * waveIntegral(y, h);
  const square = y.square * h * h;
  const phase = Math.sqrt(Math.abs(square));
  if (phase < SHORT && powers.length <= 4) {
    return gauss(h, 0, (xi) => horner(powers, xi / h) * waveValue(y, h, xi), GAUSS_8);
  }
  if (phase <= Math.max(PANEL, powers.length)) {
    return gauss(h, phase, (xi) => horner(powers, xi / h) * waveValue(y, h, xi));
  }
  const z = 1 / square;
  const slopeNear = h * waveSlope(y, h, 0);
  const slopeFar = h * waveSlope(y, h, h);
  const far = waveValue(y, h, h);
  let sum = 0;
  let factor = -z;
  let even: readonly number[] = powers;
  while (even.length > 0) {
    const odd = derivedPowers(even);
    sum += factor * (horner(even, 1) * slopeFar - (even[0] ?? 0) * slopeNear);
    if (odd.length > 0) sum -= factor * (horner(odd, 1) * far - odd[0] * y.value);
    factor *= -z;
    even = derivedPowers(odd);
  }
  return h * sum;
}

function waveTimesWave(f: WaveTerm, y: WaveTerm, h: number): number {
  const a = Math.sqrt(Math.abs(f.square)) * h;
  const b = Math.sqrt(Math.abs(y.square)) * h;
  if (f.square > 0 && y.square > 0 && a > 1 && b > 1) {
    const cosineF = (f.slope * h) / a;
    const cosineY = (y.slope * h) / b;
    const difference = 0.5 * (a - b);
    const sum = 0.5 * (a + b);
    const dc = cosineF * cosineY + f.value * y.value;
    const ds = f.value * cosineY - cosineF * y.value;
    const sc = cosineF * cosineY - f.value * y.value;
    const ss = f.value * cosineY + cosineF * y.value;
    const sincDifference = difference === 0 ? 1 : Math.sin(difference) / difference;
    const midDifference = dc * Math.cos(difference) - ds * Math.sin(difference);
    const midSum = sc * Math.cos(sum) - ss * Math.sin(sum);
    return 0.5 * h * (midDifference * sincDifference - (midSum * Math.sin(sum)) / sum);
  }
  const apart = f.square < 0 !== y.square < 0 || a > 2 * b || b > 2 * a;
  if (apart && a * a + b * b > PANEL * PANEL) {
    // (f′y − f y′)′ = (κ_y² − κ_f²) f y, the squares far apart
    const end = waveSlope(f, h, h) * waveValue(y, h, h) - waveValue(f, h, h) * waveSlope(y, h, h);
    return (end - (f.slope * y.value - f.value * y.slope)) / (y.square - f.square);
  }
  return gauss(h, Math.max(a, b), (xi) => waveValue(f, h, xi) * waveValue(y, h, xi));
}

/** ∫₀ʰ g with 20-point panels of at most the given phase each. */
export function gauss(
  h: number,
  phase: number,
  g: (xi: number) => number,
  rule: QuadratureRule = GAUSS_20,
): number {
  const panels = Math.max(1, Math.ceil(phase / PANEL));
  const width = h / panels;
  let total = 0;
  for (let panel = 0; panel < panels; panel++) {
    let sum = 0;
    for (let q = 0; q < rule.nodes.length; q++) {
      sum += rule.weights[q] * g((panel + rule.nodes[q]) * width);
    }
    total += sum;
  }
  return total * width;
}

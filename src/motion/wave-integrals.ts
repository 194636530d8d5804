import { GAUSS_20 } from '../numerics/gauss-legendre.ts';
import { derivedPowers, horner, waveSlope, waveValue, type Piece, type WaveTerm } from './piecewise-field.ts';

/** Largest phase of one Gauss panel. */
const PANEL = 3;

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

function powersTimesWave(powers: readonly number[], y: WaveTerm, h: number): number {
  const square = y.square * h * h;
  const phase = Math.sqrt(Math.abs(square));
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
  if (f.square < 0 !== y.square < 0 && a * a + b * b > PANEL * PANEL) {
    // (f′y − f y′)′ = (κ_y² − κ_f²) f y, of one sign here
    const end = waveSlope(f, h, h) * waveValue(y, h, h) - waveValue(f, h, h) * waveSlope(y, h, h);
    return (end - (f.slope * y.value - f.value * y.slope)) / (y.square - f.square);
  }
  return gauss(h, Math.max(a, b), (xi) => waveValue(f, h, xi) * waveValue(y, h, xi));
}

/** ∫₀ʰ g with 20-point panels of at most the given phase each. */
export function gauss(h: number, phase: number, g: (xi: number) => number): number {
  const panels = Math.max(1, Math.ceil(phase / PANEL));
  const width = h / panels;
  let total = 0;
  for (let panel = 0; panel < panels; panel++) {
    let sum = 0;
    for (let q = 0; q < GAUSS_20.nodes.length; q++) {
      sum += GAUSS_20.weights[q] * g((panel + GAUSS_20.nodes[q]) * width);
    }
    total += sum;
  }
  return total * width;
}

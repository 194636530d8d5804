/** Gauss-Legendre points and weights on [0, 1] (Newton on the Legendre recurrence). */
export function gaussLegendre(count: number): { points: number[]; weights: number[] } {
  const points = Array.from<number>({ length: count });
  const weights = Array.from<number>({ length: count });
  for (let i = 0; i < count; i++) {
    let x = Math.cos((Math.PI * (i + 0.75)) / (count + 0.5));
    let slope = 1;
    for (let step = 0; step < 60; step++) {
      let previous = 1;
      let current = x;
      for (let n = 2; n <= count; n++) {
        const next = ((2 * n - 1) * x * current - (n - 1) * previous) / n;
        previous = current;
        current = next;
      }
      if (count === 1) previous = 1;
      slope = (count * (x * current - previous)) / (x * x - 1);
      const move = current / slope;
      x -= move;
      if (Math.abs(move) < 1e-16) break;
    }
    points[count - 1 - i] = (1 + x) / 2;
    weights[count - 1 - i] = 1 / ((1 - x * x) * slope * slope);
  }
  return { points, weights };
}

/** Solves the dense system in place by elimination with row exchange; returns x. */
export function solveDense(matrix: number[][], rightSide: number[]): number[] {
  const size = rightSide.length;
  const a = matrix.map((row) => [...row]);
  const b = [...rightSide];
  for (let column = 0; column < size; column++) {
    let pivot = column;
    for (let row = column + 1; row < size; row++) {
      if (Math.abs(a[row][column]) > Math.abs(a[pivot][column])) pivot = row;
    }
    [a[column], a[pivot]] = [a[pivot], a[column]];
    [b[column], b[pivot]] = [b[pivot], b[column]];
    for (let row = column + 1; row < size; row++) {
      const factor = a[row][column] / a[column][column];
      if (factor === 0) continue;
      for (let k = column; k < size; k++) a[row][k] -= factor * a[column][k];
      b[row] -= factor * b[column];
    }
  }
  for (let row = size - 1; row >= 0; row--) {
    for (let k = row + 1; k < size; k++) b[row] -= a[row][k] * b[k];
    b[row] /= a[row][row];
  }
  return b;
}

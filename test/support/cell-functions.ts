import { gaussLegendre } from './gauss.ts';

/** Points a cell: a function that is smooth inside a cell of length 1 is held by its values there. */
const POINTS = 16;
const gauss = gaussLegendre(POINTS);

export const cellPoints: readonly number[] = gauss.points;
export const cellWeights: readonly number[] = gauss.weights;

function barycentricWeights(nodes: readonly number[]): number[] {
  return nodes.map((node, i) => {
    let product = 1;
    nodes.forEach((other, j) => {
      if (j !== i) product *= 4 * (node - other);
    });
    return 1 / product;
  });
}

function interpolate(
  nodes: readonly number[],
  weights: readonly number[],
  values: readonly number[],
  theta: number,
): number {
  let numerator = 0;
  let denominator = 0;
  for (let i = 0; i < nodes.length; i++) {
    const distance = theta - nodes[i];
    if (distance === 0) return values[i];
    const share = weights[i] / distance;
    numerator += share * values[i];
    denominator += share;
  }
  return numerator / denominator;
}

const valueWeights = barycentricWeights(cellPoints);
const integralNodes = [0, ...cellPoints, 1];
const integralWeights = barycentricWeights(integralNodes);

/** Value at theta in [0, 1] of the polynomial through the cell values. */
export function cellValue(values: readonly number[], theta: number): number {
  return interpolate(cellPoints, valueWeights, values, theta);
}

/** integrationMatrix[i][j]: weight of value j in the integral from 0 to point i of the cell. */
export const integrationMatrix: readonly (readonly number[])[] = cellPoints.map((end) => {
  const row = Array.from({ length: POINTS }, () => 0);
  for (let q = 0; q < POINTS; q++) {
    for (let j = 0; j < POINTS; j++) {
      const unit = Array.from({ length: POINTS }, () => 0);
      unit[j] = 1;
      row[j] += end * cellWeights[q] * cellValue(unit, end * cellPoints[q]);
    }
  }
  return row;
});

/** Integral of the cell function from 0 to 1. */
export function cellIntegral(values: readonly number[]): number {
  let sum = 0;
  for (let j = 0; j < POINTS; j++) sum += cellWeights[j] * values[j];
  return sum;
}

/** Integral of the cell function from 0 to theta. */
export function cellIntegralTo(values: readonly number[], theta: number): number {
  const atNodes = [0];
  for (let i = 0; i < POINTS; i++) {
    let sum = 0;
    for (let j = 0; j < POINTS; j++) sum += integrationMatrix[i][j] * values[j];
    atNodes.push(sum);
  }
  atNodes.push(cellIntegral(values));
  return interpolate(integralNodes, integralWeights, atNodes, theta);
}

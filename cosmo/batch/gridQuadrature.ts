import { type GridBlock, gridBlocks, gridSize, gridStep } from "./temperatureGrid";

/** Points of the interpolation polynomial behind every rule here, and its places around a cell from 0 to 1. */
const stencil = 6;
const stencilStart = -2;

/** Coefficients, ascending powers, of the Lagrange polynomials on places `first` to `first + 5`. */
function lagrangeCoefficients(first: number): number[][] {
  return Array.from({ length: stencil }, (_, j) => {
    let coefficients = [1];
    for (let k = 0; k < stencil; k++) {
      if (k === j) continue;
      const next = new Array<number>(coefficients.length + 1).fill(0);
      coefficients.forEach((c, power) => {
        next[power + 1] += c / (j - k);
        next[power] -= (c * (first + k)) / (j - k);
      });
      coefficients = next;
    }
    return coefficients;
  });
}

/** Weights of the integral from place `from` to `to` of the polynomial through places `first` to `first + 5`. */
function cellWeights(first: number, from: number, to: number): number[] {
  return lagrangeCoefficients(first).map((coefficients) =>
    coefficients.reduce((sum, c, power) => sum + (c * (to ** (power + 1) - from ** (power + 1))) / (power + 1), 0),
  );
}

/** Weights of one cell between two neighbors from the six points around it: (11, -93, 802, 802, -93, 11)/1440. */
export const innerCell = Float64Array.from(cellWeights(stencilStart, 0, 1));

/** Coefficients of the polynomial around a cell: power p of the value at place j at 6 p + j. */
export const cellPolynomial = new Float64Array(stencil * stencil);
lagrangeCoefficients(stencilStart).forEach((coefficients, j) => {
  coefficients.forEach((c, power) => {
    cellPolynomial[stencil * power + j] = c;
  });
});

/**
 * Weights of the integral over u from the last point of the grid up to point `upTo` of the first block: six-point cells, shifted
 * inward at the ends of blocks. Points further up than two above `upTo` have none.
 */
export function tailWeights(upTo: number): Float64Array {
  const weights = new Float64Array(gridSize);
  gridBlocks.forEach((block, b) => {
    if (b === 0) addBlock(weights, block, upTo, block.first);
    else addBlock(weights, block, block.first - 1, block.first - 1);
  });
  return weights;
}

/** Cells of one block, from its last point up to point `top`, by points no higher than `highest`. */
function addBlock(weights: Float64Array, { end, stride }: GridBlock, top: number, highest: number): void {
  for (let lower = end - 1; lower > top; lower--) {
    // Places count downward in index: place 0 is the cell's upper point, lower - 1.
    const start = Math.min(Math.max(lower - 1 + stencilStart, highest), end - stencil);
    const offset = start - (lower - 1);
    const cell = cellWeights(offset, 0, 1);
    for (let j = 0; j < stencil; j++) weights[start + j] += stride * gridStep * cell[j];
  }
}

/**
 * Weights, times 1440, at the beginning of a run of inner cells: places -2 to 3 from its first point; 1440 follow.
 */
export const edgeWeights = Float64Array.of(11, -82, 720, 1522, 1429, 1440);

/** int_from^1 of the polynomial through six values around a cell, over the cell's own coordinate. */
export function partialCell(values: Float64Array, start: number, from: number): number {
  let sum = 0;
  let power = from;
  for (let p = 0; p < stencil; p++) {
    let coefficient = 0;
    for (let j = 0; j < stencil; j++) coefficient += cellPolynomial[stencil * p + j] * values[start + j];
    sum += (coefficient * (1 - power)) / (p + 1);
    power *= from;
  }
  return sum;
}

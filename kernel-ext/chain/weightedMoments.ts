/** Sum of weights, mean and standard deviation of weighted samples. */
export interface WeightedMoments {
  readonly weight: number;
  readonly mean: number;
  readonly deviation: number;
}

/**
 * Weighted mean and standard deviation.
 *
 * mean = sum w x/sum w; deviation^2 = sum w (x - mean)^2/sum w: a weight counts like that many equal samples (no n - 1). Two passes, so that
 * a small spread about a large mean keeps its digits.
 *
 * @param values samples; @param weights one a sample, at least 0, not all 0; without them all count the same
 * @example weightedMoments(Float64Array.of(1, 2, 4), Float64Array.of(1, 1, 2)) // mean 2.75, deviation 1.299
 */
export function weightedMoments(values: Float64Array, weights: Float64Array | undefined): WeightedMoments {
  const count = values.length;
  let weight = 0;
  let sum = 0;
  // Sums about a sample lose nothing where all values are close to each other.
  const origin = values[0] ?? 0;
  for (let i = 0; i < count; i++) {
    const w = weights === undefined ? 1 : weights[i]!;
    weight += w;
    sum += w * (values[i]! - origin);
  }
  const mean = origin + sum / weight;
  let squares = 0;
  for (let i = 0; i < count; i++) {
    const away = values[i]! - mean;
    squares += (weights === undefined ? 1 : weights[i]!) * away * away;
  }
  return { weight, mean, deviation: Math.sqrt(squares / weight) };
}

/**
 * Pearson's correlation of every pair of columns: sum w (x - <x>)(y - <y>) over the square root of the product of the two sums of squares.
 * Rows by columns, 1 on the diagonal; 0 for a column that does not vary.
 */
export function correlationMatrix(columns: readonly Float64Array[], weights: Float64Array | undefined): number[][] {
  const moments = columns.map((column) => weightedMoments(column, weights));
  const matrix = columns.map(() => columns.map(() => 1));
  for (let i = 0; i < columns.length; i++) {
    for (let j = 0; j < i; j++) {
      const [a, b] = [columns[i]!, columns[j]!];
      const { mean: meanA, deviation: spreadA, weight } = moments[i]!;
      const { mean: meanB, deviation: spreadB } = moments[j]!;
      let sum = 0;
      for (let k = 0; k < a.length; k++) {
        sum += (weights === undefined ? 1 : weights[k]!) * (a[k]! - meanA) * (b[k]! - meanB);
      }
      const product = weight * spreadA * spreadB;
      const value = product > 0 ? Math.max(-1, Math.min(1, sum / product)) : 0;
      matrix[i]![j] = value;
      matrix[j]![i] = value;
    }
  }
  return matrix;
}

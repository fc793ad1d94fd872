import { weightedMoments } from "./weightedMoments";

/** Blocks that a long chain is summed into before its correlation is measured. */
const mostBlocks = 65_536;

/**
 * How many independent samples would fix the mean as well as this chain does.
 *
 * n_eff = sigma^2/Var(mean). With y_i = w_i (x_i - mean), the mean's variance is Var(sum y)/(sum w)^2, to first order in the fluctuation of sum w; and
 * Var(sum y) = n (gamma_0 + 2 sum gamma_t), the autocovariances of y summed over Geyer's initial positive and monotone sequence of pairs
 * gamma_2k + gamma_2k+1 (Geyer 1992, Statistical Science 7, 473, section 3.3). For independent rows this is (sum w)^2/sum w^2 (Kish 1965, Survey
 * Sampling, section 11.7); a row of weight 2 counts like the same state twice. Longer chains are first summed into at most
 * 65,536 blocks of neighbouring rows, which leaves sum y as it is.
 *
 * @param values samples in the chain's order; @param weights one a sample, at least 0
 * @returns between 1 and the number of rows with weight; that number for a column that does not vary
 */
export function effectiveSampleSize(values: Float64Array, weights: Float64Array | undefined): number {
  const { mean, deviation, weight } = weightedMoments(values, weights);
  let rows = 0;
  for (let i = 0; i < values.length; i++) if (weights === undefined || weights[i]! > 0) rows++;
  if (!(deviation > 0) || rows < 4) return rows;
  const length = Math.ceil(values.length / mostBlocks);
  const count = Math.floor(values.length / length);
  const sums = new Float64Array(count);
  // What does not fill the last block, under one part in 65,536, is left out.
  for (let i = 0; i < count * length; i++) {
    sums[Math.floor(i / length)]! += (weights === undefined ? 1 : weights[i]!) * (values[i]! - mean);
  }
  const variance = values.length * (longRunVariance(sums) / length);
  const size = (deviation * deviation * weight * weight) / variance;
  return Math.max(1, Math.min(rows, size));
}

/** gamma_0 + 2 sum gamma_t of a sequence with mean 0, over Geyer's initial monotone sequence. */
function longRunVariance(sequence: Float64Array): number {
  const count = sequence.length;
  const covariance = (lag: number): number => {
    let sum = 0;
    for (let i = lag; i < count; i++) sum += sequence[i]! * sequence[i - lag]!;
    return sum / count;
  };
  const zero = covariance(0);
  let sum = -zero;
  let before = Number.POSITIVE_INFINITY;
  for (let lag = 0; lag + 1 < count; lag += 2) {
    const pair = (lag === 0 ? zero : covariance(lag)) + covariance(lag + 1);
    if (!(pair > 0)) break;
    before = Math.min(before, pair);
    sum += 2 * before;
  }
  // A sequence that swings from row to row can have a sum at or below 0: then the rows count as independent at least.
  return sum > 0 ? sum : zero;
}

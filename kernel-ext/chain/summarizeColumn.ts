import { effectiveSampleSize } from "./effectiveSampleSize";
import { weightedMoments } from "./weightedMoments";
import { weightedQuantiles } from "./weightedQuantiles";

/** A column of a chain in figures. */
export interface ColumnSummary {
  readonly name: string;
  readonly mean: number;
  /** Standard deviation. */
  readonly deviation: number;
  readonly median: number;
  /** Equal-tailed credible intervals, [low, high]. */
  readonly interval68: readonly [number, number];
  readonly interval95: readonly [number, number];
  /** How many independent samples fix the mean as well. */
  readonly effectiveSize: number;
}

/** Mean, spread, median, intervals (16% and 84%, 2.5% and 97.5% of the weight below) and effective size of a column. */
export function summarizeColumn(name: string, values: Float64Array, weights: Float64Array | undefined): ColumnSummary {
  const { mean, deviation } = weightedMoments(values, weights);
  const [a, b, median, c, d] = weightedQuantiles(values, weights, [0.025, 0.16, 0.5, 0.84, 0.975]) as [
    number,
    number,
    number,
    number,
    number,
  ];
  return {
    name,
    mean,
    deviation,
    median,
    interval68: [b, c],
    interval95: [a, d],
    effectiveSize: effectiveSampleSize(values, weights),
  };
}

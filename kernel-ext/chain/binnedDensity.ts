import { weightedQuantiles } from "./weightedQuantiles";

/** Ends of what is shown of a column: all of it, but for far outliers. */
export function shownRange(values: Float64Array, weights: Float64Array | undefined): [low: number, high: number] {
  const [from, to] = weightedQuantiles(values, weights, [0.0005, 0.9995]) as [number, number];
  const room = 0.06 * (to - from) || 1e-6 * Math.abs(from) || 1e-6;
  return [from - room, to + room];
}

/** Weight of a column's samples in equal bins over a range, the highest 1. Samples outside are left out. */
export function histogram(
  values: Float64Array,
  weights: Float64Array | undefined,
  [low, high]: readonly [number, number],
  bins: number,
): Float64Array {
  const content = new Float64Array(bins);
  const scale = bins / (high - low);
  for (let i = 0; i < values.length; i++) {
    const bin = Math.floor((values[i]! - low) * scale);
    if (bin >= 0 && bin < bins) content[bin]! += weights === undefined ? 1 : weights[i]!;
  }
  let most = 0;
  for (const each of content) most = Math.max(most, each);
  return most > 0 ? content.map((each) => each / most) : content;
}

/** A density over two columns, on a grid of cells. */
export interface PlaneDensity {
  readonly bins: number;
  /** Row by row from below: cell (i, j) of column i and row j stands at j bins + i. */
  readonly cells: Float64Array;
  /** The heights of the density at whose edge the smallest region with each share of the weight ends. */
  readonly levels: readonly number[];
}

/**
 * The density of weighted samples over two columns, and the levels that enclose given shares of their weight.
 *
 * Method: cells of a grid, smoothed by a Gaussian whose width is the standard deviation times n_eff^(-1/6) (Scott 1992, Multivariate Density
 * Estimation, section 6.3, for two dimensions), at most 3 cells; the level of a share is the height of the last cell when the cells are summed
 * from the highest down. Samples outside the ranges are left out.
 *
 * @param effective n_eff of the two columns, the smaller
 * @param deviations standard deviations of the two columns
 */
export function planeDensity(
  x: Float64Array,
  y: Float64Array,
  weights: Float64Array | undefined,
  ranges: readonly [readonly [number, number], readonly [number, number]],
  deviations: readonly [number, number],
  effective: number,
  shares: readonly number[],
  bins: number,
): PlaneDensity {
  const [[lowX, highX], [lowY, highY]] = ranges;
  const scaleX = bins / (highX - lowX);
  const scaleY = bins / (highY - lowY);
  let cells: Float64Array = new Float64Array(bins * bins);
  for (let k = 0; k < x.length; k++) {
    const i = Math.floor((x[k]! - lowX) * scaleX);
    const j = Math.floor((y[k]! - lowY) * scaleY);
    if (i >= 0 && i < bins && j >= 0 && j < bins) cells[j * bins + i]! += weights === undefined ? 1 : weights[k]!;
  }
  const width = effective ** (-1 / 6);
  cells = smoothed(cells, bins, 1, Math.min(3, deviations[0] * scaleX * width));
  cells = smoothed(cells, bins, bins, Math.min(3, deviations[1] * scaleY * width));
  const falling = Float64Array.from(cells).sort().reverse();
  let total = 0;
  for (const cell of cells) total += cell;
  const levels = shares.map((share) => {
    let sum = 0;
    for (const height of falling) {
      sum += height;
      if (sum >= share * total) return height;
    }
    return 0;
  });
  return { bins, cells, levels };
}

/** A Gaussian of this width in cells along one direction; near the edge it is divided by the part of it that lies inside. */
function smoothed(cells: Float64Array, bins: number, stride: number, width: number): Float64Array {
  if (!(width > 0.3)) return cells;
  const reach = Math.ceil(4 * width);
  const kernel = Float64Array.from({ length: reach + 1 }, (_, k) => Math.exp(-0.5 * (k / width) ** 2));
  const result = new Float64Array(cells.length);
  const other = stride === 1 ? bins : 1;
  for (let line = 0; line < bins; line++) {
    for (let at = 0; at < bins; at++) {
      let sum = 0;
      let inside = 0;
      for (let from = Math.max(0, at - reach); from <= Math.min(bins - 1, at + reach); from++) {
        const share = kernel[Math.abs(at - from)]!;
        sum += share * cells[line * other + from * stride]!;
        inside += share;
      }
      result[line * other + at * stride] = sum / inside;
    }
  }
  return result;
}

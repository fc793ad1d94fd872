/** Samples that are sorted rather than cut into bins again. */
const fewEnough = 4096;
const bins = 2048;

/**
 * Quantiles of weighted samples: the smallest sample x for which the samples up to x carry at least the share p of the weight (the inverse of the
 * empirical distribution function; Hyndman & Fan 1996, The American Statistician 50, 361, definition 1, with weights). A sample of weight
 * 2 counts like two equal samples.
 *
 * Method: the samples are cut into bins, and the bin that holds the answer again, until few are left to be sorted: linear in their number.
 *
 * @param values finite samples; @param weights one a sample, at least 0, not all 0; without them all count the same
 * @param shares between 0 and 1
 * @example weightedQuantiles(Float64Array.of(3, 1, 2), undefined, [0.5]) // [2]
 */
export function weightedQuantiles(
  values: Float64Array,
  weights: Float64Array | undefined,
  shares: readonly number[],
): number[] {
  let total = 0;
  for (let i = 0; i < values.length; i++) total += weights === undefined ? 1 : weights[i]!;
  if (!(total > 0)) throw new RangeError(`weightedQuantiles: weights must sum to more than 0, got ${total}`);
  return shares.map((share) => {
    if (!(share >= 0 && share <= 1)) {
      throw new RangeError(`weightedQuantiles: shares must be between 0 and 1, got ${share}`);
    }
    // A share such as 0.16 of a whole number of samples must not miss one by rounding.
    return select(values, weights, share * total * (1 - 1e-14));
  });
}

/** The sample at which the weight from below reaches the target. */
function select(values: Float64Array, weights: Float64Array | undefined, target: number): number {
  let [samples, shares] = [values, weights];
  let below = 0;
  while (samples.length > fewEnough) {
    let low = Number.POSITIVE_INFINITY;
    let high = Number.NEGATIVE_INFINITY;
    for (const value of samples) {
      if (value < low) low = value;
      if (value > high) high = value;
    }
    if (low === high) return low;
    const scale = bins / (high - low);
    const binOf = (value: number): number => Math.min(bins - 1, Math.floor((value - low) * scale));
    const content = new Float64Array(bins);
    for (let i = 0; i < samples.length; i++) content[binOf(samples[i]!)]! += shares === undefined ? 1 : shares[i]!;
    let bin = 0;
    let next = below + content[0]!;
    while ((next < target || content[bin] === 0) && bin < bins - 1) {
      below = next;
      bin++;
      next += content[bin]!;
    }
    const kept: number[] = [];
    for (let i = 0; i < samples.length; i++) if (binOf(samples[i]!) === bin) kept.push(i);
    if (kept.length === samples.length) break;
    const all = samples;
    const every = shares;
    samples = Float64Array.from(kept, (i) => all[i]!);
    shares = every === undefined ? undefined : Float64Array.from(kept, (i) => every[i]!);
  }
  const order = Array.from(samples.keys()).sort((a, b) => samples[a]! - samples[b]!);
  let last = Number.NaN;
  for (const i of order) {
    const weight = shares === undefined ? 1 : shares[i]!;
    if (weight === 0) continue;
    below += weight;
    last = samples[i]!;
    if (below >= target) return last;
  }
  return last;
}

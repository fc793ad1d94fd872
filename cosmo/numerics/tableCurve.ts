import { DomainError } from "../errors";

/**
 * A curve through the points of a table, held at its end values beyond them.
 *
 * `cubic`: cubic pieces whose slope at a point is that of the parabola through it and its two neighbors. `linear`: straight pieces.
 *
 * @param x ascending, two or more; @param y as many; others: DomainError.
 * Accuracy: exact at the points, and for parabolas with `cubic`; between the points the third power of their distance for a smooth
 * function, the second with `linear`.
 * Source: Bessel's interpolation; see de Boor 1978, A Practical Guide to Splines, chapter IV.
 * @example tableCurve([0, 1, 2], [0, 1, 0], "linear")(0.5) // 0.5
 */
export function tableCurve(
  x: readonly number[],
  y: readonly number[],
  kind: "cubic" | "linear",
): (at: number) => number {
  if (x.length < 2 || x.length !== y.length || !x.every((value, i) => i === 0 || value > x[i - 1]!)) {
    const rule = "must be ascending, two or more, and as many as y";
    throw new DomainError({ where: "tableCurve", argument: "x", rule, value: x });
  }
  const last = x.length - 1;
  const slopes = kind === "cubic" ? parabolaSlopes(x, y) : undefined;
  return (at) => {
    if (at <= x[0]!) return y[0]!;
    if (at >= x[last]!) return y[last]!;
    let low = 0;
    let high = last;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (x[middle]! <= at) low = middle;
      else high = middle;
    }
    const width = x[high]! - x[low]!;
    const t = (at - x[low]!) / width;
    if (slopes === undefined) return y[low]! + t * (y[high]! - y[low]!);
    const u = 1 - t;
    return (
      u * u * ((1 + 2 * t) * y[low]! + t * width * slopes[low]!) +
      t * t * ((1 + 2 * u) * y[high]! - u * width * slopes[high]!)
    );
  };
}

/** Slope at each point of the parabola through it and its two neighbors; with two points in all, of the straight line. */
function parabolaSlopes(x: readonly number[], y: readonly number[]): number[] {
  const widths = x.slice(1).map((value, i) => value - x[i]!);
  const chords = widths.map((width, i) => (y[i + 1]! - y[i]!) / width);
  const last = chords.length - 1;
  if (last === 0) return [chords[0]!, chords[0]!];
  const inner = chords.slice(1).map((right, i) => {
    const [before, after] = [widths[i]!, widths[i + 1]!];
    return (after * chords[i]! + before * right) / (before + after);
  });
  const first = 2 * chords[0]! - inner[0]!;
  return [first, ...inner, 2 * chords[last]! - inner[inner.length - 1]!];
}

/**
 * Fewer points for the same picture: a chart's data travel inside the notebook, so that a curve keeps only the points
 * whose absence could be seen.
 *
 * Method: Ramer (1972), Douglas & Peucker (1973): keep the point farthest from the chord while it is farther than a
 * tolerance, here in pixels; the tolerance starts at a tenth of a pixel and doubles until few enough points are left.
 */

/** Indices of the points to keep, first and last always among them. */
export function thinned(x: ArrayLike<number>, y: ArrayLike<number>, most: number): number[] {
  const count = x.length;
  if (count <= 2) return Array.from({ length: count }, (_, index) => index);
  for (let tolerance = 0.1; ; tolerance *= 2) {
    const kept = simplified(x, y, tolerance);
    if (kept.length <= most) return kept;
  }
}

function simplified(x: ArrayLike<number>, y: ArrayLike<number>, tolerance: number): number[] {
  const keep = new Uint8Array(x.length);
  keep[0] = 1;
  keep[x.length - 1] = 1;
  const spans: [number, number][] = [[0, x.length - 1]];
  for (let span = spans.pop(); span !== undefined; span = spans.pop()) {
    const [from, to] = span;
    let farthest = -1;
    let distance = tolerance;
    const dx = (x[to] as number) - (x[from] as number);
    const dy = (y[to] as number) - (y[from] as number);
    const length = Math.hypot(dx, dy);
    for (let index = from + 1; index < to; index++) {
      const px = (x[index] as number) - (x[from] as number);
      const py = (y[index] as number) - (y[from] as number);
      const away = length > 0 ? Math.abs(dx * py - dy * px) / length : Math.hypot(px, py);
      if (away > distance) {
        distance = away;
        farthest = index;
      }
    }
    if (farthest > 0) {
      keep[farthest] = 1;
      spans.push([from, farthest], [farthest, to]);
    }
  }
  const kept: number[] = [];
  for (let index = 0; index < keep.length; index++) if (keep[index] === 1) kept.push(index);
  return kept;
}

/** A number at seven significant digits: more cannot be seen in a chart. */
export function chartDigits(value: number): number {
  return Number(value.toPrecision(7));
}

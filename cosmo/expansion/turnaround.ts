import { findMinimum, findRoot } from "../numerics";
import { expansionPart, type ModelPart } from "./expansion";

/** How far the future is searched, in ln a: any curvature above rounding has outgrown matter by then. */
const farthest = 60;
const points = 1200;

/**
 * The redshift, between -1 and 0, at which the expansion stops and the model falls back, or undefined when it expands forever.
 *
 * H = 0 in the future asks for negative curvature or negative dark energy. Method: a^2 H^2 is scanned over 1200 points in ln a from
 * 0 to 60, low points are refined, and the zero nearest to today is found by Brent's method.
 */
export const turnaroundRedshiftPart: ModelPart<number | undefined> = {
  name: "turnaround redshift",
  compute: (evaluation) => {
    const expansion = evaluation.once(expansionPart);
    if (expansion.curvatureDensity >= 0 && expansion.darkEnergy >= 0) return undefined;
    const term = (s: number) => {
      const a = Math.exp(s);
      return expansion.squaredTerm(a) / (a * a);
    };
    let before = 0;
    let middle = 0;
    let root: number | undefined;
    for (let i = 1; i <= points && root === undefined; i++) {
      const s = (farthest * i) / points;
      const here = term(s);
      // Growing dark energy has left the range of numbers: nothing stops it any more.
      if (here === Number.POSITIVE_INFINITY) return undefined;
      if (here <= 0) {
        root = findRoot(term, middle, here === Number.NEGATIVE_INFINITY ? lastFinite(term, middle, s) : s).value;
      } else if (i > 1 && term(middle) < here && term(middle) < term(before)) {
        const bottom = findMinimum(term, before, s);
        if (bottom.minimum <= 0) root = findRoot(term, before, bottom.value).value;
      }
      before = middle;
      middle = s;
    }
    return root === undefined ? undefined : Math.expm1(-root);
  },
};

/** A point where the term is negative and finite, found by bisection between a positive and an infinite one. */
function lastFinite(term: (s: number) => number, positive: number, infinite: number): number {
  let low = positive;
  let high = infinite;
  for (;;) {
    const middle = 0.5 * (low + high);
    const value = term(middle);
    if (value === Number.NEGATIVE_INFINITY) high = middle;
    else if (value <= 0) return middle;
    else low = middle;
  }
}

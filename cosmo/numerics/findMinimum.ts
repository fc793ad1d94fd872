import { DomainError, NotConvergedError } from "../errors";
import type { NumericalResult } from "./numericalResult";

/** What `findMinimum` may be asked for. */
export interface FindMinimumOptions {
  /** Tolerance of the argument, relative to it; 1.5e-8 unless given: below that f no longer tells. */
  relative?: number;
  /** Absolute tolerance of the argument; 1e-12 times the width of the interval unless given. The two add up. */
  absolute?: number;
  /** Most iterations; 200 unless given. */
  maximumIterations?: number;
}

/** A minimum: `value` is the argument where it lies, `error` belongs to that argument. */
export interface MinimumResult extends NumericalResult {
  /** The function there. */
  minimum: number;
}

const GOLDEN = 0.5 * (3 - Math.sqrt(5));

/**
 * Argument of a local minimum of a function in an interval; of the only one if the function is unimodal.
 *
 * @param f - function; a value that is NaN throws NotConvergedError with the x
 * @param lower - lower end, finite
 * @param upper - upper end, finite, above `lower`
 * @param options - tolerance `relative |x| + absolute`, most iterations
 * @returns `value` (the argument), `minimum`, and `error`, half the width of the remaining bracket
 *
 * Method: golden section and parabolas through the three best points.
 * Accuracy: near a smooth minimum f changes only in second order, so the argument is good to about 1e-8 of the width over
 * which f doubles; find the root of the derivative where more is needed.
 * Source: Brent 1973, Algorithms for Minimization without Derivatives, chapter 5.
 *
 * @example
 * findMinimum((x) => (x - 2) ** 2 + 1, 0, 5); // value 2, minimum 1
 */
export function findMinimum(
  f: (x: number) => number,
  lower: number,
  upper: number,
  options: FindMinimumOptions = {},
): MinimumResult {
  const where = "findMinimum";
  if (!Number.isFinite(lower))
    throw new DomainError({ where, argument: "lower", rule: "must be finite", value: lower });
  if (!(Number.isFinite(upper) && upper > lower)) {
    throw new DomainError({
      where,
      argument: "upper",
      rule: `must be finite and above lower (${lower})`,
      value: upper,
    });
  }
  const { relative = 1.5e-8, absolute = 1e-12 * (upper - lower), maximumIterations = 200 } = options;
  if (!(relative >= 0)) throw new DomainError({ where, argument: "relative", rule: "must be >= 0", value: relative });
  if (!(absolute > 0)) throw new DomainError({ where, argument: "absolute", rule: "must be > 0", value: absolute });

  let a = lower;
  let b = upper;
  // x is the best point, w the second best, v the one before w.
  let x = a + GOLDEN * (b - a);
  let w = x;
  let v = x;
  let fx = sample(f, x);
  let fw = fx;
  let fv = fx;
  let step = 0;
  let stepBefore = 0;
  let evaluations = 1;
  for (let iteration = 0; ; iteration++) {
    const middle = 0.5 * (a + b);
    const tolerance = relative * Math.abs(x) + absolute;
    const converged = Math.abs(x - middle) <= 2 * tolerance - 0.5 * (b - a);
    if (converged || iteration >= maximumIterations) {
      return { value: x, minimum: fx, error: Math.max(x - a, b - x), evaluations, converged };
    }
    let useGolden = true;
    if (Math.abs(stepBefore) > tolerance) {
      const r = (x - w) * (fx - fv);
      let q = (x - v) * (fx - fw);
      let p = (x - v) * q - (x - w) * r;
      q = 2 * (q - r);
      if (q > 0) p = -p;
      else q = -q;
      if (Math.abs(p) < Math.abs(0.5 * q * stepBefore) && p > q * (a - x) && p < q * (b - x)) {
        stepBefore = step;
        step = p / q;
        const u = x + step;
        if (u - a < 2 * tolerance || b - u < 2 * tolerance) step = x < middle ? tolerance : -tolerance;
        useGolden = false;
      }
    }
    if (useGolden) {
      stepBefore = (x < middle ? b : a) - x;
      step = GOLDEN * stepBefore;
    }
    const u = x + (Math.abs(step) >= tolerance ? step : step > 0 ? tolerance : -tolerance);
    const fu = sample(f, u);
    evaluations++;
    if (fu <= fx) {
      if (u < x) b = x;
      else a = x;
      v = w;
      fv = fw;
      w = x;
      fw = fx;
      x = u;
      fx = fu;
    } else {
      if (u < x) a = u;
      else b = u;
      if (fu <= fw || w === x) {
        v = w;
        fv = fw;
        w = u;
        fw = fu;
      } else if (fu <= fv || v === x || v === w) {
        v = u;
        fv = fu;
      }
    }
  }
}

function sample(f: (x: number) => number, x: number): number {
  const y = f(x);
  if (Number.isNaN(y)) {
    throw new NotConvergedError({ where: "findMinimum", reason: `the function is NaN at x = ${x}`, value: x });
  }
  return y;
}

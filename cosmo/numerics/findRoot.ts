import { DomainError, NotConvergedError } from "../errors";
import type { NumericalResult } from "./numericalResult";

/** What `findRoot` may be asked for. */
export interface FindRootOptions {
  /** Tolerance relative to the root; 4e-16 unless given, and never tighter than that. */
  relative?: number;
  /** Absolute tolerance; 0 unless given. The two add up. */
  absolute?: number;
  /** Most iterations; 200 unless given. */
  maximumIterations?: number;
}

/**
 * Root of a continuous function between two points where it has opposite signs.
 *
 * f(x) = 0, x between lower and upper
 *
 * @param f - function; a value that is NaN throws NotConvergedError with the x
 * @param lower - one end of the bracket, finite
 * @param upper - other end, finite; the order does not matter
 * @param options - tolerance `relative |x| + absolute`, most iterations
 * @returns the root; `error` is the width of the remaining bracket, `converged` is false only at the iteration limit
 *
 * Without a change of sign it throws DomainError, with both values of f.
 *
 * Method: inverse quadratic interpolation and secant, guarded by bisection.
 * Accuracy: the sign changes within `error` of the value; by default two units in the last place.
 * Source: Brent 1973, Algorithms for Minimization without Derivatives, chapter 4.
 *
 * @example
 * findRoot((x) => x * x - 2, 0, 2).value; // 1.4142135623730951
 */
export function findRoot(
  f: (x: number) => number,
  lower: number,
  upper: number,
  options: FindRootOptions = {},
): NumericalResult {
  const { relative = 4e-16, absolute = 0, maximumIterations = 200 } = options;
  const where = "findRoot";
  if (!Number.isFinite(lower))
    throw new DomainError({ where, argument: "lower", rule: "must be finite", value: lower });
  if (!Number.isFinite(upper))
    throw new DomainError({ where, argument: "upper", rule: "must be finite", value: upper });
  if (!(relative >= 0)) throw new DomainError({ where, argument: "relative", rule: "must be >= 0", value: relative });
  if (!(absolute >= 0)) throw new DomainError({ where, argument: "absolute", rule: "must be >= 0", value: absolute });
  const slack = Math.max(relative, 4e-16);

  // b is the best estimate, a the one before, c the other end of the bracket.
  let a = lower;
  let b = upper;
  let fa = sample(f, a);
  let fb = sample(f, b);
  let evaluations = 2;
  if (fa === 0) return { value: a, error: slack * Math.abs(a), evaluations, converged: true };
  if (fb === 0) return { value: b, error: slack * Math.abs(b), evaluations, converged: true };
  if (fa > 0 === fb > 0) {
    throw new DomainError({
      where,
      argument: "f",
      rule: `must change its sign between ${lower} and ${upper}`,
      value: [fa, fb],
    });
  }
  let c = a;
  let fc = fa;
  let step = b - a;
  let stepBefore = step;
  for (let iteration = 0; ; iteration++) {
    if (Math.abs(fc) < Math.abs(fb)) {
      a = b;
      b = c;
      c = a;
      fa = fb;
      fb = fc;
      fc = fa;
    }
    const tolerance = 0.5 * (slack * Math.abs(b) + absolute) + Number.MIN_VALUE;
    const toMiddle = 0.5 * (c - b);
    const converged = fb === 0 || Math.abs(toMiddle) <= tolerance;
    if (converged || iteration >= maximumIterations) {
      return { value: b, error: fb === 0 ? slack * Math.abs(b) : Math.abs(c - b), evaluations, converged };
    }
    if (Math.abs(stepBefore) < tolerance || Math.abs(fa) <= Math.abs(fb)) {
      step = toMiddle;
      stepBefore = step;
    } else {
      const s = fb / fa;
      let p: number;
      let q: number;
      if (a === c) {
        p = 2 * toMiddle * s;
        q = 1 - s;
      } else {
        const r = fb / fc;
        const t = fa / fc;
        p = s * (2 * toMiddle * t * (t - r) - (b - a) * (r - 1));
        q = (t - 1) * (r - 1) * (s - 1);
      }
      if (p > 0) q = -q;
      else p = -p;
      if (2 * p < Math.min(3 * toMiddle * q - Math.abs(tolerance * q), Math.abs(stepBefore * q))) {
        stepBefore = step;
        step = p / q;
      } else {
        step = toMiddle;
        stepBefore = step;
      }
    }
    a = b;
    fa = fb;
    if (Math.abs(step) > tolerance) b += step;
    else b += toMiddle > 0 ? tolerance : -tolerance;
    fb = sample(f, b);
    evaluations++;
    if (fb > 0 === fc > 0) {
      c = a;
      fc = fa;
      step = b - a;
      stepBefore = step;
    }
  }
}

function sample(f: (x: number) => number, x: number): number {
  const y = f(x);
  if (Number.isNaN(y)) {
    throw new NotConvergedError({ where: "findRoot", reason: `the function is NaN at x = ${x}`, value: x });
  }
  return y;
}

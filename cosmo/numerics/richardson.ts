import { DomainError, NotConvergedError } from "../errors";
import type { NumericalResult } from "./numericalResult";

const LEVELS = 12;
/** Ratio of two successive steps. */
const SHRINK = 1.5;

/**
 * Derivative of a function by extrapolation of central differences to step 0.
 *
 * D(h) = [f(x + h) - f(x - h)] / (2 h) = f'(x) + c_2 h^2 + c_4 h^4 + ...
 *
 * @param f - function, smooth within `step` of x; a value that is not finite throws NotConvergedError with the argument
 * @param x - where the derivative is taken; finite
 * @param step - first and largest step, above 0: about the scale on which f changes; small steps only add round-off
 * @returns the derivative; `converged` is true if the error estimate is below 1e-6 of the derivative or of max |f| / step
 *
 * Method: steps shrink by 1.5, each row of the table removes one more power of h^2; the entry with the least error estimate
 * (twice the difference from its two parents, plus the round-off of its row) is returned, and the table ends when the
 * estimates rise.
 * Accuracy: 1e-13 relative for an analytic f whose nearest pole is a few steps away; the estimate holds in 99% of the tests.
 * Source: Ridders 1982, Adv. Eng. Software 4, 75.
 *
 * @example
 * richardsonDerivative(Math.exp, 0, 0.5).value; // 1
 */
export function richardsonDerivative(f: (x: number) => number, x: number, step: number): NumericalResult {
  const where = "richardsonDerivative";
  if (!Number.isFinite(x)) throw new DomainError({ where, argument: "x", rule: "must be finite", value: x });
  if (!(Number.isFinite(step) && x + step > x && x - step < x)) {
    throw new DomainError({ where, argument: "step", rule: "must be finite, above 0 and change x", value: step });
  }
  // row[j] has j powers of h^2 removed; each new row overwrites the one before.
  const row = new Float64Array(LEVELS);
  let value = Number.NaN;
  let error = Number.POSITIVE_INFINITY;
  let largest = 0;
  let evaluations = 0;
  let h = step;
  for (let level = 0; level < LEVELS; level++, h /= SHRINK) {
    const above = x + h;
    const below = x - h;
    const fAbove = sample(f, above);
    const fBelow = sample(f, below);
    evaluations += 2;
    largest = Math.max(largest, Math.abs(fAbove), Math.abs(fBelow));
    let entry = (fAbove - fBelow) / (above - below);
    // Of the values and, through the slope, of the arguments.
    const rounding = Math.abs(fAbove) + Math.abs(fBelow) + (Math.abs(above) + Math.abs(below)) * Math.abs(entry);
    const roundOff = (Number.EPSILON * rounding) / (above - below);
    let power = 1;
    let bestOfRow = Number.POSITIVE_INFINITY;
    for (let j = 0; j < level; j++) {
      power *= SHRINK * SHRINK;
      const left = entry;
      const previous = row[j];
      entry = left + (left - previous) / (power - 1);
      row[j] = left;
      const estimate = 2 * Math.max(Math.abs(entry - left), Math.abs(entry - previous)) + 2 * roundOff;
      bestOfRow = Math.min(bestOfRow, estimate);
      if (estimate < error) {
        error = estimate;
        value = entry;
      }
    }
    row[level] = entry;
    if (level > 3 && bestOfRow > 4 * error) break;
  }
  return { value, error, evaluations, converged: error <= 1e-6 * Math.max(Math.abs(value), largest / step) };
}

function sample(f: (x: number) => number, x: number): number {
  const y = f(x);
  if (!Number.isFinite(y)) {
    throw new NotConvergedError({
      where: "richardsonDerivative",
      reason: `the function is ${y} at x = ${x}`,
      value: x,
    });
  }
  return y;
}

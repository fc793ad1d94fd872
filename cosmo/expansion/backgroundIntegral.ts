import { NotConvergedError } from "../errors";
import { type IntegrateOptions, integrate, type NumericalResult } from "../numerics";

/**
 * An integral over the expansion, in a unit: unit int_lower^upper f(x) dx.
 *
 * Adaptive Gauss-Kronrod, relative tolerance 1e-12 unless given; an integral that does not reach it throws NotConvergedError,
 * with the best value.
 *
 * @example backgroundIntegral("age", unitHubbleTime, integrand, 0, 1).value
 */
export function backgroundIntegral(
  where: string,
  unit: number,
  integrand: (x: number) => number,
  lower: number,
  upper: number,
  options: IntegrateOptions = {},
): NumericalResult {
  const result = integrate(integrand, lower, upper, options);
  const scaled = { ...result, value: unit * result.value, error: Math.abs(unit) * result.error };
  if (!result.converged) {
    throw new NotConvergedError({
      where,
      reason: "the integral over the expansion did not reach its tolerance",
      value: scaled.value,
      error: scaled.error,
      evaluations: scaled.evaluations,
    });
  }
  return scaled;
}

import type { ModelEvaluation, ModelQuantity } from "../expansion";
import type { NumericalResult } from "../numerics";
import { redshiftArgument } from "../quantity";
import { conformalTime } from "./conformalTime";

/**
 * Comoving particle horizon at a redshift, Mpc: how far light has come since a = 0.
 *
 * d_p(z) = c int_0^a da/(a^2 H), the conformal time times c.
 *
 * @param z redshift above -1. Domain, method and accuracy as {@link conformalTime}.
 * Source: Rindler's definition; common practice, no source.
 * @example particleHorizon(evaluation, 0).value // 14150 near Planck's parameters
 */
export function particleHorizon(evaluation: ModelEvaluation, z: number): NumericalResult {
  return conformalTime(evaluation, z, "particleHorizon");
}

export const particleHorizonQuantity: ModelQuantity = {
  name: "particleHorizon",
  symbol: "d_p",
  unit: "Mpc",
  arguments: [redshiftArgument],
  description: "Comoving particle horizon at a redshift",
  equation: String.raw`d_p(z) = c \int_0^{1/(1+z)} \frac{da}{a^2 H}`,
  method: "adaptive Gauss-Kronrod quadrature in the square root of the scale factor",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  compute: (evaluation, [z]) => particleHorizon(evaluation, z!),
};

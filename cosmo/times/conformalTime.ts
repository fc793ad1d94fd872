import {
  backgroundIntegral,
  expansionPart,
  type ModelEvaluation,
  type ModelQuantity,
  requireFiniteStart,
  requireRedshift,
  unitHubbleDistance,
} from "../expansion";
import type { NumericalResult } from "../numerics";
import { redshiftArgument } from "../quantity";

/**
 * Conformal time at a redshift times c, Mpc, counted from a = 0 with no electron-positron era; a = 1 today.
 *
 * c eta(z) = c int_0^a da/(a^2 H).
 *
 * @param z redshift above -1. A model without a Big Bang, or one in which the integral diverges: NoAnswerError.
 * Method: adaptive Gauss-Kronrod in sqrt(a), in which the integrand is smooth from radiation to matter. Accuracy 1e-13.
 * Source: common practice, no source (definition).
 * @example conformalTime(evaluation, 0).value // 14150 near Planck's parameters
 */
export function conformalTime(evaluation: ModelEvaluation, z: number, where = "conformalTime"): NumericalResult {
  requireRedshift(evaluation, z, where);
  requireFiniteStart(evaluation, where, 2);
  const expansion = evaluation.once(expansionPart);
  const integrand = (root: number) => (2 * root) / Math.sqrt(expansion.squaredTerm(root * root));
  return backgroundIntegral(where, unitHubbleDistance, integrand, 0, 1 / Math.sqrt(1 + z), {
    breakpoints: expansion.kinkRoots,
  });
}

export const conformalTimeQuantity: ModelQuantity = {
  name: "conformalTime",
  symbol: "c η",
  unit: "Mpc",
  arguments: [redshiftArgument],
  description: "Conformal time at a redshift times the speed of light",
  equation: String.raw`c\,\eta(z) = c \int_0^{1/(1+z)} \frac{da}{a^2 H}`,
  method: "adaptive Gauss-Kronrod quadrature in the square root of the scale factor",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  compute: (evaluation, [z]) => conformalTime(evaluation, z!),
};

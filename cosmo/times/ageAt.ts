import {
  backgroundIntegral,
  expansionPart,
  type ModelEvaluation,
  type ModelQuantity,
  requireFiniteStart,
  requireRedshift,
  unitHubbleTime,
} from "../expansion";
import type { NumericalResult } from "../numerics";
import { redshiftArgument } from "../quantity";

/**
 * Age of the universe at a redshift, Gyr, counted from a = 0 with no electron-positron era.
 *
 * t(z) = int_0^a da/(a H).
 *
 * @param z redshift above -1. A model without a Big Bang, or without a finite age: NoAnswerError.
 * Method: adaptive Gauss-Kronrod in sqrt(a), in which the integrand is smooth from radiation to matter. Accuracy 5e-13.
 * Source: Hogg 1999, eq. 30.
 * @example ageAt(evaluation, 0).value // 13.8 near Planck's parameters
 */
export function ageAt(evaluation: ModelEvaluation, z: number, where = "ageAt"): NumericalResult {
  requireRedshift(evaluation, z, where);
  requireFiniteStart(evaluation, where, 4);
  const expansion = evaluation.once(expansionPart);
  const integrand = (root: number) => {
    const a = root * root;
    return (2 * a * root) / Math.sqrt(expansion.squaredTerm(a));
  };
  return backgroundIntegral(where, unitHubbleTime, integrand, 0, 1 / Math.sqrt(1 + z), {
    breakpoints: expansion.kinkRoots,
  });
}

export const ageAtQuantity: ModelQuantity = {
  name: "ageAt",
  symbol: "t",
  unit: "Gyr",
  arguments: [redshiftArgument],
  description: "Age of the universe at a redshift",
  equation: String.raw`t(z) = \int_0^{1/(1+z)} \frac{da}{a H}`,
  method: "adaptive Gauss-Kronrod quadrature in the square root of the scale factor",
  accuracy: 5e-13,
  sources: ["hogg1999"],
  compute: (evaluation, [z]) => ageAt(evaluation, z!),
};

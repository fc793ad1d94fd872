import type { ModelEvaluation, ModelQuantity } from "../expansion";
import type { NumericalResult } from "../numerics";
import { ageAt } from "./ageAt";

/**
 * Age of the universe today, Gyr: t_0 = int_0^1 da/(a H). As {@link ageAt} at redshift 0.
 *
 * @example age(evaluation).value // 13.8 near Planck's parameters
 */
export function age(evaluation: ModelEvaluation): NumericalResult {
  return ageAt(evaluation, 0, "age");
}

export const ageQuantity: ModelQuantity = {
  name: "age",
  symbol: "t_0",
  unit: "Gyr",
  arguments: [],
  description: "Age of the universe today",
  equation: String.raw`t_0 = \int_0^1 \frac{da}{a H}`,
  method: "adaptive Gauss-Kronrod quadrature in the square root of the scale factor",
  accuracy: 5e-13,
  sources: ["hogg1999"],
  compute: (evaluation) => age(evaluation),
};

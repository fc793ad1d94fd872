import { NoAnswerError } from "../errors";
import type { ModelEvaluation, ModelQuantity } from "../expansion";
import type { ClosedModel } from "../model";
import { redshiftArgument } from "../quantity";

/** R (1+z) = 3 omega_b/(4 omega_gamma): baryons' momentum over photons' today. */
export function baryonLoadingToday(model: ClosedModel): number {
  if (!(model.photonDensity > 0)) {
    throw new NoAnswerError({
      where: "baryonLoading",
      reason: "this model has no radiation (photonTemperature 0), so there is no photon-baryon fluid",
      hint: "leave photonTemperature out for 2.7255 K",
    });
  }
  return (3 * model.baryonDensity) / (4 * model.photonDensity);
}

/**
 * R(z) = 3 omega_b/[4 omega_gamma (1+z)]: momentum density of baryons over that of photons.
 *
 * @param z redshift above -1. Exact. Source: Hu & Sugiyama 1996.
 * @example baryonLoading(evaluation, 1090) // 0.62
 */
export function baryonLoading(evaluation: ModelEvaluation, z: number): number {
  return baryonLoadingToday(evaluation.model) / (1 + z);
}

export const baryonLoadingQuantity: ModelQuantity = {
  name: "baryonLoading",
  symbol: "R",
  unit: "",
  arguments: [redshiftArgument],
  description: "Momentum density of baryons over that of photons",
  equation: String.raw`R(z) = \frac{3\,\omega_b}{4\,\omega_\gamma (1+z)}`,
  method: "closed form",
  accuracy: 1e-14,
  sources: ["huSugiyama1996"],
  compute: (evaluation, [z]) => ({ value: baryonLoading(evaluation, z!), error: 0 }),
};

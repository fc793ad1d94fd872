import type { ModelEvaluation, ModelPart } from "../expansion";
import { huSugiyamaOf } from "../fits";
import { historyQuantity, throughLastScattering } from "./historyQuantity";
import { opticalDepthPart } from "./opticalDepthHistory";

/** ln(1+z) at which the optical depth is one, whatever the conventions. */
export const unitDepthPart: ModelPart<number> = {
  name: "optical depth one",
  compute: (evaluation) => evaluation.once(opticalDepthPart).crossing("photon", 1),
};

/** ln(1 + z_*) under the model's conventions. */
export const lastScatteringPart: ModelPart<number> = {
  name: "last scattering",
  compute: (evaluation) =>
    evaluation.model.conventions.lastScattering === "full"
      ? evaluation.once(unitDepthPart)
      : Math.log1p(huSugiyamaOf(evaluation.model)),
};

/**
 * z_*: the redshift at which the optical depth, reionization excluded, is one; by the fit of Hu & Sugiyama 1996 where
 * `conventions.lastScattering` says so.
 *
 * Method: Brent's root on the depth within one step of the history. Accuracy 1e-10.
 * Source: Hu & Sugiyama 1996 (definition); Planck 2018 VI, section 2.
 * @example lastScatteringRedshift(evaluation) // 1089.9 near Planck's parameters
 */
export function lastScatteringRedshift(evaluation: ModelEvaluation): number {
  return Math.expm1(evaluation.once(lastScatteringPart));
}

export const lastScatteringRedshiftQuantity = historyQuantity({
  name: "lastScatteringRedshift",
  symbol: "z_*",
  unit: "",
  description: "Redshift of last scattering: optical depth one",
  equation: String.raw`\tau(z_*) = 1`,
  method: "root of the optical depth, full computation",
  accuracy: 1e-10,
  methodBesideFits: "",
  steps: ["lastScattering"],
  needsHistory: throughLastScattering,
  sources: ["huSugiyama1996", "planck2018Parameters"],
  compute: lastScatteringRedshift,
});

import type { ModelEvaluation, ModelPart } from "../expansion";
import { historyQuantity } from "./historyQuantity";
import { opticalDepthPart } from "./opticalDepthHistory";

/** ln(1 + z_*). */
export const lastScatteringPart: ModelPart<number> = {
  name: "last scattering",
  compute: (evaluation) => evaluation.once(opticalDepthPart).crossing("photon", 1),
};

/**
 * z_*: the redshift at which the optical depth, reionization excluded, is one.
 *
 * Method: Brent's root on the depth within one step of the history. Accuracy 1e-9, stated 1e-7.
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
  accuracy: 1e-7,
  sources: ["huSugiyama1996", "planck2018Parameters"],
  compute: lastScatteringRedshift,
});

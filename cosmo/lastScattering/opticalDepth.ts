import type { ModelEvaluation } from "../expansion";
import { pastRedshiftArgument } from "../quantity";
import { historyQuantity } from "./historyQuantity";
import { opticalDepthPart } from "./opticalDepthHistory";

/**
 * Thomson optical depth to a redshift, reionization excluded.
 *
 * tau(z) = int_0^z c sigma_T n_e dz/[H (1+z)]: the residue of recombination and all species' electrons included.
 *
 * @param z redshift, 0 or more. Method: Gauss-Legendre nodes on the steps of the ionization history. Accuracy 2e-9.
 * Source: Peebles 1968; Hu & Sugiyama 1996.
 */
export function opticalDepth(evaluation: ModelEvaluation, z: number): number {
  return evaluation.once(opticalDepthPart).depth("photon", Math.log1p(z));
}

export const opticalDepthQuantity = historyQuantity({
  name: "opticalDepth",
  symbol: "τ",
  unit: "",
  arguments: [pastRedshiftArgument],
  description: "Thomson optical depth to a redshift, reionization excluded",
  equation: String.raw`\tau(z) = \int_0^z \frac{c\,\sigma_T n_e\,dz'}{H\,(1+z')}`,
  method: "Gauss-Legendre quadrature on the steps of the ionization history",
  accuracy: 2e-9,
  sources: ["huSugiyama1996"],
  compute: (evaluation, [z]) => opticalDepth(evaluation, z!),
});

import type { ModelEvaluation } from "../expansion";
import { pastRedshiftArgument } from "../quantity";
import { historyQuantity } from "./historyQuantity";
import { opticalDepthPart } from "./opticalDepthHistory";

/**
 * Drag depth: the optical depth as the baryons feel it.
 *
 * tau_d(z) = int_0^z dtau/R, R = 3 omega_b/[4 omega_gamma (1+z)].
 *
 * @param z redshift, 0 or more. Method and accuracy as opticalDepth. Source: Hu & Sugiyama 1996; Eisenstein & Hu 1998.
 */
export function dragDepth(evaluation: ModelEvaluation, z: number): number {
  return evaluation.once(opticalDepthPart).depth("drag", Math.log1p(z));
}

export const dragDepthQuantity = historyQuantity({
  name: "dragDepth",
  symbol: "τ_d",
  unit: "",
  arguments: [pastRedshiftArgument],
  description: "Drag depth to a redshift",
  equation: String.raw`\tau_d(z) = \int_0^z \frac{c\,\sigma_T n_e\,dz'}{R\,H\,(1+z')}`,
  method: "Gauss-Legendre quadrature on the steps of the ionization history",
  accuracy: 2e-9,
  sources: ["huSugiyama1996", "eisensteinHu1998"],
  compute: (evaluation, [z]) => dragDepth(evaluation, z!),
});

import { unitHubbleDistance } from "../distances";
import {
  backgroundIntegral,
  expansionPart,
  type ModelEvaluation,
  type ModelQuantity,
  requireBigBang,
} from "../expansion";
import { baryonLoadingToday } from "../lastScattering";
import type { NumericalResult } from "../numerics";
import { redshiftArgument } from "../quantity";

/**
 * Comoving sound horizon r_s at a redshift, Mpc: how far sound has gone in the photon-baryon fluid since a = 0.
 *
 * r_s(z) = int_0^a c_s da/(a^2 H), c_s = c/sqrt[3 (1 + R)].
 *
 * @param z redshift above -1; below z_drag the fluid no longer exists and the number is the formula's alone.
 * Method: adaptive Gauss-Kronrod in sqrt(a), in which the integrand is smooth from radiation to matter. Accuracy 1e-12.
 * Source: Hu & Sugiyama 1996; Eisenstein & Hu 1998, eq. 4.
 * @example soundHorizon(evaluation, 1059.94).value // 147.1
 */
export function soundHorizon(evaluation: ModelEvaluation, z: number): NumericalResult {
  requireBigBang(evaluation, "soundHorizon");
  const expansion = evaluation.once(expansionPart);
  const loading = baryonLoadingToday(evaluation.model);
  const integrand = (root: number) => {
    const a = root * root;
    return (2 * root) / Math.sqrt(3 * (1 + loading * a) * expansion.squaredTerm(a));
  };
  return backgroundIntegral("soundHorizon", unitHubbleDistance, integrand, 0, 1 / Math.sqrt(1 + z));
}

export const soundHorizonQuantity: ModelQuantity = {
  name: "soundHorizon",
  symbol: "r_s",
  unit: "Mpc",
  arguments: [redshiftArgument],
  description: "Comoving sound horizon at a redshift",
  equation: String.raw`r_s(z) = \int_0^{1/(1+z)} \frac{c_s\,da}{a^2 H}`,
  method: "adaptive Gauss-Kronrod quadrature in the square root of the scale factor",
  accuracy: 1e-12,
  sources: ["huSugiyama1996", "eisensteinHu1998"],
  compute: (evaluation, [z]) => soundHorizon(evaluation, z!),
};

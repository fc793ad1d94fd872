import { unitHubbleDistance } from "../distances";
import { DomainError } from "../errors";
import {
  backgroundIntegral,
  earlyDarkEnergySharePart,
  expansionPart,
  type ModelEvaluation,
  type ModelQuantity,
  requireBigBang,
} from "../expansion";
import { eisensteinHuSoundHorizonOf, fitNotes } from "../fits";
import { baryonLoadingToday, fitsInForce, methodWithFits } from "../lastScattering";
import type { NumericalResult } from "../numerics";
import { redshiftArgument } from "../quantity";

/**
 * Comoving sound horizon r_s at a redshift, Mpc: how far sound has gone in the photon-baryon fluid since a = 0.
 *
 * r_s(z) = int_0^a c_s da/(a^2 H), c_s = c/sqrt[3 (1 + R)]; where `conventions.soundHorizon` is `eisensteinHu1998`, the closed
 * form of that paper.
 *
 * @param z redshift above -1, for the closed form above 0; below z_drag the fluid no longer exists and the number is the formula's alone.
 * Method: adaptive Gauss-Kronrod in sqrt(a), in which the integrand is smooth from radiation to matter. Accuracy 1e-13.
 * Source: Hu & Sugiyama 1996; Eisenstein & Hu 1998, eq. 4.
 * @example soundHorizon(evaluation, 1059.94).value // 147.1
 */
export function soundHorizon(evaluation: ModelEvaluation, z: number): NumericalResult {
  requireBigBang(evaluation, "soundHorizon");
  evaluation.once(earlyDarkEnergySharePart);
  if (evaluation.model.conventions.soundHorizon === "eisensteinHu1998") return closedForm(evaluation, z);
  const expansion = evaluation.once(expansionPart);
  const loading = baryonLoadingToday(evaluation.model);
  const integrand = (root: number) => {
    const a = root * root;
    return (2 * root) / Math.sqrt(3 * (1 + loading * a) * expansion.squaredTerm(a));
  };
  return backgroundIntegral("soundHorizon", unitHubbleDistance, integrand, 0, 1 / Math.sqrt(1 + z), {
    breakpoints: expansion.kinkRoots,
  });
}

/** The closed form divides by z: it has no value today. */
function closedForm(evaluation: ModelEvaluation, z: number): NumericalResult {
  if (!(z > 0)) {
    const rule = "must be above 0 in the closed form of Eisenstein & Hu 1998 (conventions.soundHorizon)";
    throw new DomainError({ where: "soundHorizon", argument: "redshift", rule, value: z });
  }
  const value = eisensteinHuSoundHorizonOf(evaluation.model, z);
  return { value, error: 1e-14 * value, evaluations: 1, converged: true };
}

export const soundHorizonQuantity: ModelQuantity = {
  name: "soundHorizon",
  symbol: "r_s",
  unit: "Mpc",
  arguments: [redshiftArgument],
  description: "Comoving sound horizon at a redshift",
  equation: String.raw`r_s(z) = \int_0^{1/(1+z)} \frac{c_s\,da}{a^2 H}`,
  method: "adaptive Gauss-Kronrod quadrature in the square root of the scale factor",
  methodFor: (model) => methodWithFits("", fitsInForce(model, ["soundHorizon"])),
  accuracy: 1e-13,
  sources: ["huSugiyama1996", "eisensteinHu1998"],
  notes: ({ model }) => fitsInForce(model, ["soundHorizon"]).flatMap(({ fit }) => fitNotes(fit, model)),
  compute: (evaluation, [z]) => soundHorizon(evaluation, z!),
};

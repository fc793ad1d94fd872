import { transverseDistance } from "../distances";
import type { ModelEvaluation, ModelPart } from "../expansion";
import { historyQuantity, lastScatteringRedshift, throughLastScattering } from "../lastScattering";
import { lastScatteringSoundHorizon } from "./lastScatteringSoundHorizon";

/** D_M(z_*), Mpc. */
export const lastScatteringDistancePart: ModelPart<number> = {
  name: "distance to last scattering",
  compute: (evaluation) => transverseDistance(evaluation, 0, lastScatteringRedshift(evaluation)).value,
};

/**
 * 100 theta_*: the angle that the sound horizon at last scattering fills today, in units of 0.01 rad.
 *
 * theta_* = r_s(z_*)/D_M(z_*), from the full computation of z_* unless `conventions` ask for a fit.
 *
 * Accuracy 1e-10. Source: Planck 2018 VI, section 2 and table 2.
 * @example acousticAngle(evaluation) // 1.0412 near Planck's parameters
 */
export function acousticAngle(evaluation: ModelEvaluation): number {
  return (100 * lastScatteringSoundHorizon(evaluation)) / evaluation.once(lastScatteringDistancePart);
}

export const acousticAngleQuantity = historyQuantity({
  name: "acousticAngle",
  symbol: "100 θ_*",
  unit: "rad",
  description: "Angle of the sound horizon at last scattering, times 100",
  equation: String.raw`\theta_* = \frac{r_s(z_*)}{D_M(z_*)}`,
  method: "ratio, z_* from the full computation",
  methodBesideFits: "ratio",
  steps: ["lastScattering", "soundHorizon"],
  needsHistory: throughLastScattering,
  accuracy: 1e-10,
  sources: ["planck2018Parameters"],
  compute: acousticAngle,
});

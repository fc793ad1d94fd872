import { unitHubbleDistance } from "../distances";
import type { ModelEvaluation } from "../expansion";
import { historyQuantity, throughLastScattering } from "../lastScattering";
import { lastScatteringDistancePart } from "./acousticAngle";

/**
 * Shift parameter R = sqrt(Omega_m) (H0/c) D_M(z_*), Omega_m with massive neutrinos.
 *
 * Accuracy 2e-12. Source: Bond, Efstathiou & Tegmark 1997.
 * @example shiftParameter(evaluation) // 1.75
 */
export function shiftParameter(evaluation: ModelEvaluation): number {
  const matter = Math.sqrt(evaluation.model.matterDensity);
  return (matter * evaluation.once(lastScatteringDistancePart)) / unitHubbleDistance;
}

export const shiftParameterQuantity = historyQuantity({
  name: "shiftParameter",
  symbol: "R_shift",
  unit: "",
  description: "Shift parameter of the distance to last scattering",
  equation: String.raw`\mathcal{R} = \sqrt{\Omega_m}\,\frac{H_0}{c}\,D_M(z_*)`,
  method: "closed form of D_M(z_*)",
  steps: ["lastScattering"],
  needsHistory: throughLastScattering,
  accuracy: 2e-12,
  sources: ["bond1997"],
  compute: shiftParameter,
});

import type { ModelEvaluation } from "../expansion";
import { historyQuantity, throughLastScattering } from "../lastScattering";
import { acousticAngle } from "./acousticAngle";

/**
 * l_A = pi/theta_*: the multipole spacing of the acoustic scale.
 *
 * Accuracy 1e-10. Source: Bond, Efstathiou & Tegmark 1997.
 * @example acousticMultipole(evaluation) // 301.7
 */
export function acousticMultipole(evaluation: ModelEvaluation): number {
  return (100 * Math.PI) / acousticAngle(evaluation);
}

export const acousticMultipoleQuantity = historyQuantity({
  name: "acousticMultipole",
  symbol: "l_A",
  unit: "",
  description: "Multipole of the acoustic scale",
  equation: String.raw`l_A = \pi/\theta_*`,
  method: "closed form of theta_*",
  steps: ["lastScattering", "soundHorizon"],
  needsHistory: throughLastScattering,
  accuracy: 1e-10,
  sources: ["bond1997"],
  compute: acousticMultipole,
});

import type { ModelEvaluation } from "../expansion";
import { historyQuantity } from "../lastScattering";
import { lastScatteringDistancePart } from "./acousticAngle";
import { dampingWavenumber } from "./dampingWavenumber";

/**
 * 100 theta_D: angle of the damping scale in units of 0.01 rad, theta_D = pi/[k_D D_M(z_*)].
 *
 * Accuracy 5e-10. Source: Planck 2018 VI, table 2.
 * @example dampingAngle(evaluation) // 0.1607
 */
export function dampingAngle(evaluation: ModelEvaluation): number {
  return (100 * Math.PI) / (dampingWavenumber(evaluation) * evaluation.once(lastScatteringDistancePart));
}

export const dampingAngleQuantity = historyQuantity({
  name: "dampingAngle",
  symbol: "100 θ_D",
  unit: "rad",
  description: "Angle of the damping scale, times 100",
  equation: String.raw`\theta_D = \frac{\pi}{k_D\,D_M(z_*)}`,
  method: "closed form of k_D and D_M(z_*)",
  steps: ["lastScattering"],
  accuracy: 5e-10,
  sources: ["planck2018Parameters"],
  compute: dampingAngle,
});

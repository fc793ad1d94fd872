import { unitDensity } from "../model";
import { redshiftArgument } from "../quantity";
import type { ModelEvaluation, ModelQuantity } from "./expansion";
import { hubbleRate } from "./hubbleRate";

/**
 * Critical density at a redshift, kg/m3.
 *
 * rho_c(z) = 3 H(z)^2/(8 pi G). G comes with the constants set.
 *
 * @param z redshift above -1; beyond a turning point: NoAnswerError.
 * Closed form; accuracy 2e-13. Source: Hogg 1999, section 2.
 * @example criticalDensity(evaluation, 0) // 8.5e-27
 */
export function criticalDensity(evaluation: ModelEvaluation, z: number): number {
  const rate = hubbleRate(evaluation, z) / 100;
  return unitDensity(evaluation.model.constants) * rate * rate;
}

export const criticalDensityQuantity: ModelQuantity = {
  name: "criticalDensity",
  symbol: "ρ_c",
  unit: "kg/m3",
  arguments: [redshiftArgument],
  description: "Critical density at a redshift",
  equation: String.raw`\rho_c(z) = \frac{3 H(z)^2}{8 \pi G}`,
  method: "closed form",
  accuracy: 5e-14,
  sources: (model) => ["hogg1999", model.conventions.constants],
  compute: (evaluation, [z]) => ({ value: criticalDensity(evaluation, z!), error: 0 }),
};

import { lightSpeed } from "../constants";
import { equalityRedshift, equalityRedshiftQuantity } from "./equalityRedshift";
import type { ModelEvaluation, ModelQuantity } from "./expansion";
import { hubbleRate } from "./hubbleRate";

/**
 * Wavenumber that entered the horizon at equality, 1/Mpc.
 *
 * k_eq = a H/c at z_eq, with the exact H of the model: massive neutrinos, curvature and dark energy included.
 *
 * Domain and convention as {@link equalityRedshift}. Closed form; accuracy 1e-13.
 * Source: Planck 2018 VI, Table 2.
 * @example equalityWavenumber(evaluation) // 0.0104 near Planck's parameters
 */
export function equalityWavenumber(evaluation: ModelEvaluation): number {
  const z = equalityRedshift(evaluation);
  return hubbleRate(evaluation, z) / ((lightSpeed / 1000) * (1 + z));
}

export const equalityWavenumberQuantity: ModelQuantity = {
  name: "equalityWavenumber",
  symbol: "k_eq",
  unit: "1/Mpc",
  arguments: [],
  description: "Wavenumber that entered the horizon at equality of matter and radiation",
  equation: String.raw`k_{eq} = \frac{H(z_{eq})}{c\,(1+z_{eq})}`,
  method: "closed form with the exact expansion rate",
  accuracy: 1e-13,
  sources: ["planck2018Parameters"],
  notes: (evaluation, values) => equalityRedshiftQuantity.notes!(evaluation, values),
  compute: (evaluation) => ({ value: equalityWavenumber(evaluation), error: 0 }),
};

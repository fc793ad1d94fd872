import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { type Computed, pastRedshiftArgument } from "../quantity";
import { hubbleDistance } from "./hubbleDistance";
import { antipodeNote, transverseDistance } from "./transverseDistance";

/**
 * Volume-averaged distance at a redshift, Mpc.
 *
 * D_V = (D_M^2 c z/H)^(1/3).
 *
 * @param z redshift, 0 or more. Beyond the turning point of a closed model: NoAnswerError. Accuracy 1e-13.
 * Source: Eisenstein et al. 2005, eq. 2.
 * @example volumeDistance(evaluation, 0.35).value // 1377 near Planck's parameters
 */
export function volumeDistance(evaluation: ModelEvaluation, z: number): Computed {
  const transverse = transverseDistance(evaluation, 0, z, "volumeDistance");
  if (z === 0) return { value: 0, error: 0 };
  const value = Math.cbrt(transverse.value ** 2 * z * hubbleDistance(evaluation, z));
  return { value, error: (2 / 3) * (transverse.error / transverse.value) * value };
}

export const volumeDistanceQuantity: ModelQuantity = {
  name: "volumeDistance",
  symbol: "D_V",
  unit: "Mpc",
  arguments: [pastRedshiftArgument],
  description: "Volume-averaged distance",
  equation: String.raw`D_V(z) = \left[D_M(z)^2\,\frac{c z}{H(z)}\right]^{1/3}`,
  method: "from the transverse comoving distance and the expansion rate",
  accuracy: 1e-13,
  sources: ["eisenstein2005"],
  notes: antipodeNote,
  compute: (evaluation, [z]) => volumeDistance(evaluation, z!),
};

import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { type Computed, pastRedshiftArgument } from "../quantity";
import { hubbleDistance } from "./hubbleDistance";
import { antipodeNote, transverseDistance } from "./transverseDistance";

/**
 * Comoving volume per unit redshift over the whole sky, Gpc3.
 *
 * dV/dz = 4 pi D_M^2 c/H.
 *
 * @param z redshift, 0 or more. Beyond the turning point of a closed model: NoAnswerError. Accuracy 1e-13.
 * Source: Hogg 1999, eq. 28, times 4 pi.
 * @example comovingVolumeElement(evaluation, 1).value // 361 near Planck's parameters
 */
export function comovingVolumeElement(evaluation: ModelEvaluation, z: number): Computed {
  const transverse = transverseDistance(evaluation, 0, z, "comovingVolumeElement");
  const factor = (4 * Math.PI * hubbleDistance(evaluation, z)) / 1e9;
  return { value: factor * transverse.value ** 2, error: 2 * factor * transverse.value * transverse.error };
}

export const comovingVolumeElementQuantity: ModelQuantity = {
  name: "comovingVolumeElement",
  symbol: "dV_C/dz",
  unit: "Gpc3",
  arguments: [pastRedshiftArgument],
  description: "Comoving volume per unit redshift over the whole sky",
  equation: String.raw`\frac{dV_C}{dz} = 4\pi\,D_M(z)^2\,\frac{c}{H(z)}`,
  method: "from the transverse comoving distance and the expansion rate",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  notes: antipodeNote,
  compute: (evaluation, [z]) => comovingVolumeElement(evaluation, z!),
};

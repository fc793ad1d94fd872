import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { type Computed, pastRedshiftArgument } from "../quantity";
import { hubbleDistance } from "./hubbleDistance";
import { antipodeNote, transverseDistance } from "./transverseDistance";

/**
 * Ratio of the transverse comoving distance to the Hubble distance: how a sphere at z looks stretched, without needing a ruler.
 *
 * F_AP = D_M(z) H(z)/c.
 *
 * @param z redshift, 0 or more. Beyond the turning point of a closed model: NoAnswerError. Accuracy 5e-14.
 * Source: Alcock & Paczynski 1979.
 * @example alcockPaczynskiRatio(evaluation, 0.5).value // 0.58 near Planck's parameters
 */
export function alcockPaczynskiRatio(evaluation: ModelEvaluation, z: number): Computed {
  const transverse = transverseDistance(evaluation, 0, z, "alcockPaczynskiRatio");
  const factor = 1 / hubbleDistance(evaluation, z);
  return { value: factor * transverse.value, error: factor * transverse.error };
}

export const alcockPaczynskiRatioQuantity: ModelQuantity = {
  name: "alcockPaczynskiRatio",
  symbol: "F_AP",
  unit: "",
  arguments: [pastRedshiftArgument],
  description: "Alcock-Paczynski ratio of transverse to line-of-sight size",
  equation: String.raw`F_{AP}(z) = \frac{D_M(z)\,H(z)}{c}`,
  method: "from the transverse comoving distance and the expansion rate",
  accuracy: 5e-14,
  sources: ["alcockPaczynski1979"],
  notes: antipodeNote,
  compute: (evaluation, [z]) => alcockPaczynskiRatio(evaluation, z!),
};
